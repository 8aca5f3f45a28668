package xlsx

import (
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/report/phrase"
)

// files lists what was read, so that rows = accepted + rejected + not data.
func files(r *finding.Report) table {
	return table{name: "Files", about: "every file and sheet read: rows = accepted + rejected + not data.",
		columns: []column{{"File", 44}, {"Sheet", 16}, {"Kind", 18}, {"Rows", 10}, {"Accepted", 10}, {"Rejected", 10}, {"Not data", 10}, {"What is no data", 28}, {"Records", 10}, {"SHA-256", 70}},
		rows:    len(r.Inputs), none: "No file was read.",
		row: func(i int) []any {
			in := r.Inputs[i]
			return []any{in.File, in.Sheet, spaced(string(in.Kind)), in.Rows, in.Accepted, in.Rejected, in.NotData, intake.Declared(in.Declared), in.Records, in.SHA256}
		}}
}

// rejects lists the rows that could not be used.
func rejects(r *finding.Report) table {
	return table{name: "Rejects", about: "rows that could not become records; each may hide a gap.",
		columns: []column{{"File", 36}, {"Sheet", 14}, {"Row", 9}, {"Column", 9}, {"Head of the column", 18}, {"Field", 18}, {"Read", 22}, {"What is wrong", 48}, {"What to do", 48}, {"Other fields with problems", 20}},
		rows:    len(r.Rejects), none: "No row was rejected.",
		row: func(i int) []any {
			x := r.Rejects[i]
			return []any{x.File, x.Sheet, place(x.Row), place(x.Column), x.Header, x.Field, x.Read, phrase.Sentence(x.Why), phrase.Sentence(x.Remedy), strings.Join(x.Also, ", ")}
		}}
}

// place gives the number of a row or column, and nothing for 0.
func place(n int) any {
	if n == 0 {
		return nil
	}
	return n
}

// observationCounts counts what somebody may want to look at.
func observationCounts(r *finding.Report) table {
	about := "how many records somebody may want to look at; never a verdict."
	if len(r.Observations) == 0 {
		about += " The option --all lists each."
	}
	return table{name: "Observations", about: about,
		columns: []column{{"Site", 20}, {"Kind of observation", 44}, {"Number", 12}},
		rows:    len(r.ObservationCounts), none: "Nothing was observed.",
		row: func(i int) []any {
			c := r.ObservationCounts[i]
			return []any{c.Site, spaced(c.Kind), c.Number}
		}}
}

// observations lists them.
func observations(r *finding.Report) table {
	return table{name: "Observations listed", about: "each observation with its records.",
		columns: []column{{"Site", 14}, {"Subject kind", 11}, {"Subject", 16}, {"Kind of observation", 24}, {"Ear", 8}, {"Observation", 54}, {"Record", 24}, {"File", 32}, {"Sheet", 14}, {"Row", 9}, {"Further records", 50}},
		rows:    len(r.Observations), none: "Nothing was observed.",
		row: func(i int) []any {
			o := r.Observations[i]
			return []any{o.Site, o.Subject.Kind, o.Subject.ID, spaced(o.Kind), o.Ear, phrase.Sentence(o.Text), o.Record, o.File, o.Sheet, place(o.Row), evidenceOf(o.More)}
		}}
}
