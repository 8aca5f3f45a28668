package rulebook

import (
	"encoding/json"
	"fmt"
	"reflect"
	"slices"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// told names the fields that the book tells in words of its own. Any other is told by rest.
var told = map[reflect.Type]string{
	reflect.TypeFor[bundle.About]():               "id title authority country region extends drops kind instruments in_force checked_on seen_note cautions readings",
	reflect.TypeFor[dossier.Measures]():           "exposure hearing protection training documents working_days",
	reflect.TypeFor[dossier.ExposureMeasures]():   "channels levels margins enrols several strategy decision note notice_lasts",
	reflect.TypeFor[dossier.Channel]():            "kind of durations criterion_db exchange_db threshold_db upper_db weekly cite",
	reflect.TypeFor[dossier.Threshold]():          "channel at_least above instead any",
	reflect.TypeFor[dossier.HearingMeasures]():    "required shift others recordable age_correction professionals physicians licensed afterwards",
	reflect.TypeFor[dossier.ShiftMeasure]():       "retest retest_from retest_once",
	reflect.TypeFor[audiometry.Scheme]():          "name of rule frequencies at_least above baseline confirm over cite",
	reflect.TypeFor[dossier.ProtectionMeasures](): "rating channel derating percent real_world real_world_by_type bands",
	reflect.TypeFor[dossier.TrainingMeasures]():   "topics_over",
	reflect.TypeFor[dossier.DocumentMeasures]():   "posted_for periodic every short",
	reflect.TypeFor[dossier.WorkingDays]():        "rest holidays known_until cite",
}

// rest tells the fields of a struct that the book has no words of its own for, with what their documentation says, so
// that nothing which is added to bundles later is passed over in silence.
func (m *maker) rest(of any) []Row {
	var out []Row
	value := reflect.ValueOf(of)
	known := strings.Fields(told[value.Type()])
	for i := range value.NumField() {
		f := value.Type().Field(i)
		name, _, _ := strings.Cut(f.Tag.Get("json"), ",")
		if f.Anonymous || name == "-" || name == "" || slices.Contains(known, name) || value.Field(i).IsZero() {
			continue
		}
		out = append(out, row(upper(spaced(name)), m.rough(value.Field(i).Interface())+source(phrase.Clean(f.Tag.Get("doc")))))
	}
	return out
}

// rough writes a value of any kind, a parameter with its value on the day.
func (m *maker) rough(v any) string {
	text, err := json.Marshal(v)
	if err != nil {
		return fmt.Sprint(v)
	}
	var plain any
	if json.Unmarshal(text, &plain) != nil {
		return string(text)
	}
	if name, ok := plain.(string); ok {
		if _, ok := m.Parameters[name]; ok {
			return m.plain(name)
		}
	}
	return finding.Words(plain)
}
