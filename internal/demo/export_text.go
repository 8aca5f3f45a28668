package demo

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"fmt"
	"os"
	"strings"

	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"

	"hearduty/internal/record"
)

// delimited writes rows as delimited text.
func delimited(delimiter rune, rows [][]string) []byte {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	w.Comma, w.UseCRLF = delimiter, true
	_ = w.WriteAll(rows) // a buffer takes everything
	return b.Bytes()
}

// american writes a date with the month first.
func american(d Date) string { return written(d, "%[2]d/%[3]d/%[1]d") }

// dotted writes a date with the day first.
func dotted(d Date) string { return written(d, "%02[3]d.%02[2]d.%[1]d") }

func written(d Date, form string) string {
	if !d.Known() {
		return ""
	}
	var y, m, day int
	_, _ = fmt.Sscanf(d.String(), "%d-%d-%d", &y, &m, &day) // a known date has this form
	return fmt.Sprintf(form, y, m, day)
}

// word writes an answer in the words of an export.
func word(a record.Answer, yes, no string) string {
	return map[record.Answer]string{record.Yes: yes, record.No: no}[a]
}

// replaced writes one of the words of an export in place of ours.
func replaced(text string, words ...string) string {
	for i := 0; i+1 < len(words); i += 2 {
		if text == words[i] {
			return words[i+1]
		}
	}
	return text
}

// exportRoster writes what a personnel system gives: a code page of Windows, two title rows, dates with the month
// first, a far day for those who are still there, and a footer.
func (b *book) exportRoster(path string) error {
	rows := [][]string{{"Harrow & Slate – personnel", "", "", "", "", "", "", "", ""}, {"", "", "", "", "", "", "", "", ""},
		{"Emp Nº", "Plant", "Sex", "Born", "Hired", "Left", "Job", "Hearing program", "Cost centre"}}
	for _, w := range b.workers {
		left := american(w.LeftOn)
		if left == "" {
			left = "12/31/9999"
		}
		rows = append(rows, []string{w.WorkerID, replaced(w.Site, "kiln-hill", "KH", "larch-street", "LS"), replaced(w.Sex, "male", "M", "female", "F"),
			american(w.BirthDate), american(w.HiredOn), left, w.JobTitle, word(w.InProgram, "Y", "N"), "40-" + w.WorkerID[1:2]})
	}
	rows = append(rows, []string{fmt.Sprintf("Total: %d rows", len(b.workers)), "", "", "", "", "", "", "", ""})
	text, err := charmap.Windows1252.NewEncoder().Bytes(delimited(';', rows))
	if err != nil {
		return err
	}
	return os.WriteFile(path, text, 0o644)
}

// exportUnits writes the groups of the workers as nested JSON.
func (b *book) exportUnits(path string) error {
	type unit struct {
		Employee struct {
			Number string `json:"number"`
		} `json:"employee"`
		Unit  string  `json:"unit"`
		Since string  `json:"since"`
		Until *string `json:"until"`
	}
	list := make([]unit, len(b.assignments))
	for i, a := range b.assignments {
		list[i].Employee.Number, list[i].Unit, list[i].Since = a.WorkerID, a.Group, a.From.String()
		if a.To.Known() {
			to := a.To.String()
			list[i].Until = &to
		}
	}
	text, err := json.MarshalIndent(map[string]any{"system": "shift planning", "rows": list}, "", " ")
	if err != nil {
		return err
	}
	return os.WriteFile(path, text, 0o644)
}

// exportDosimetry writes what a dosimeter's program gives: UTF-16, tabs, decimal commas, times as h:mm.
func (b *book) exportDosimetry(path string) error {
	rows := [][]string{{"Sample", "Day", "Group", "Worn by", "Place", "Kind", "Device", "Run time", "Shift", "Full shift", "Like the rest", "Response", "Criterion", "Exchange", "Threshold",
		"Upper", "Dose", "TWA", "LAeq", "LCeq", "TWA C", "Lmax", "Peak", "Peak weighting", "63", "125", "250", "500", "1k", "2k", "4k", "8k", "Cal before", "Cal after", "Observers asked", "Serial of clip"}}
	for _, m := range b.measurements {
		row := []string{m.MeasurementID, m.Date.String(), m.Group, m.WorkerID, m.Area, m.Type, m.InstrumentID, clock(m.RunMinutes), clock(m.ShiftMinutes), word(m.FullShift, "y", "n"),
			word(m.Representative, "y", "n"), strings.ToUpper(m.Method), comma(m.CriterionDB), comma(m.ExchangeDB), comma(m.ThresholdDB), comma(m.UpperDB), percent(m.DosePct), comma(m.TWADBA),
			comma(m.LAeqDBA), comma(m.LCeqDBC), comma(m.TWADBC), comma(m.MaxDBA), comma(m.PeakDB), m.PeakWeighting}
		for i := range record.OctaveBands {
			level := record.Number{}
			if m.Octave != nil {
				level = m.Octave[i]
			}
			row = append(row, comma(level))
		}
		rows = append(rows, append(row, comma(m.CheckBeforeDB), comma(m.CheckAfterDB), word(m.ObserversInvited, "y", "n"), "-"))
	}
	text, err := unicode.UTF16(unicode.LittleEndian, unicode.UseBOM).NewEncoder().Bytes(delimited('\t', rows))
	if err != nil {
		return err
	}
	return os.WriteFile(path, text, 0o644)
}

func comma(n record.Number) string { return strings.Replace(n.String(), ".", ",", 1) }

func percent(n record.Number) string {
	if !n.Known {
		return ""
	}
	return comma(n) + " %"
}

// clock writes whole minutes as h:mm.
func clock(n record.Number) string {
	if !n.Known {
		return ""
	}
	return fmt.Sprintf("%d:%02d", int(n.Value)/60, int(n.Value)%60)
}
