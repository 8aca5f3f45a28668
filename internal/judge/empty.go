package judge

import (
	"reflect"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
)

// emptyDossiers gives a dossier of each subject kind in which nothing is known but the day.
func emptyDossiers(b *bundle.Bundle) map[string]any {
	out := map[string]any{
		dossier.KindWorker: &dossier.Worker{}, dossier.KindGroup: &dossier.Group{}, dossier.KindArea: &dossier.Area{}, dossier.KindSite: &dossier.Site{},
		dossier.KindInstrument: &dossier.Instrument{}, dossier.KindRoom: &dossier.Room{}, dossier.KindTester: &dossier.Tester{},
	}
	for _, d := range out {
		v := reflect.ValueOf(d).Elem()
		v.FieldByName("Choices").Set(reflect.ValueOf(b.ChoicesOf(nil)))
		for i := range v.NumField() {
			f := v.Field(i)
			switch f.Kind() {
			case reflect.Slice:
				f.Set(reflect.MakeSlice(f.Type(), 0, 0))
			case reflect.Map:
				f.Set(reflect.MakeMap(f.Type()))
				for name := range b.Measures.Exposure.Levels {
					f.SetMapIndex(reflect.ValueOf(name), reflect.MakeSlice(f.Type().Elem(), 0, 0))
				}
			}
		}
	}
	return out
}
