package schema

import "hearduty/internal/dossier"

// Names are the names that a bundle's measures and choices give to entries of the dossiers. A kind of
// name that is nil allows any.
type Names struct {
	Levels   []string // exposure levels: keys of exposed and exposure_unknown
	Channels []string // dose channels: keys of channels
	Choices  []string // keys of choices
	Schemes  []string // names of further hearing schemes: keys of schemes
}

// subjects holds an empty dossier of each subject kind.
var subjects = map[string]any{
	dossier.KindWorker: dossier.Worker{}, dossier.KindGroup: dossier.Group{}, dossier.KindArea: dossier.Area{}, dossier.KindSite: dossier.Site{},
	dossier.KindInstrument: dossier.Instrument{}, dossier.KindRoom: dossier.Room{}, dossier.KindTester: dossier.Tester{},
}

// Subjects lists the subject kinds in the order in which they are shown.
func Subjects() []string {
	return []string{dossier.KindWorker, dossier.KindGroup, dossier.KindArea, dossier.KindSite, dossier.KindInstrument, dossier.KindRoom, dossier.KindTester}
}

// Dossier gives the schema of the dossiers of a subject kind, for any bundle, in the form that OPA's type
// checker takes. An unknown kind is a mistake of the caller and panics.
func Dossier(kind string) map[string]any { return DossierOf(kind, Names{}) }

// DossierOf is Dossier with the names of one bundle, so that the misspelt name of a level is found as
// well as that of a field. The type checker knows no null: give the modules to AllowNull before.
func DossierOf(kind string, names Names) map[string]any { return plain(dossierObject(kind, names)) }

// DossierText is Dossier as the text that is published.
func DossierText(kind string) []byte { return text(dossierObject(kind, Names{})) }

func dossierObject(kind string, names Names) object {
	subject, ok := subjects[kind]
	if !ok {
		panic("schema: there is no subject kind " + kind)
	}
	keys := map[string][]string{}
	for name, list := range map[string][]string{
		"exposed": names.Levels, "exposure_unknown": names.Levels, "channels": names.Channels, "choices": names.Choices,
		"schemes": names.Schemes,
	} {
		if list != nil {
			keys[name] = list
		}
	}
	return of(subject, Options{
		Title:       "Dossier of a " + kind,
		Description: "What the rules of a duty see as input. Every key is there; what is not known is null.",
		Style:       ForDossier,
		Keys:        keys,
	})
}
