package demo

import (
	"os"
	"slices"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// testedHz are the frequencies of the demo's hearing tests.
var testedHz = []int{500, 1000, 2000, 3000, 4000, 6000, 8000}

// common are the columns of a hearing test beside the thresholds.
var common = []string{"Masked", "Phones", "Fine steps", "Audiometer", "Booth", "Tester", "Hours quiet", "Protectors before", "Van", "Compared", "Reviewed by", "Reviewed"}

// exportTestsWide writes a clinic's workbook: a title, two rows of headers of which the upper one is merged over each
// ear, real dates, no response as >100, and a hidden sheet with notes.
func (b *book) exportTestsWide(path string) error {
	f := excelize.NewFile()
	defer f.Close()
	s := &sheet{file: f, name: "Tests"}
	s.do(f.SetSheetName("Sheet1", s.name))
	var err error
	s.date, err = f.NewStyle(&excelize.Style{NumFmt: 14})
	s.do(err)
	s.row("Hearing tests, Kiln Hill")
	s.row()
	upper, lower := []any{"", "", "", ""}, []any{"Test", "Worker", "Day", "Why"}
	for _, ear := range []string{"Right", "Left"} {
		upper = append(upper, ear)
		s.do(f.MergeCell(s.name, s.cell(len(lower)+1), s.cell(len(lower)+len(testedHz)+2)))
		for _, hz := range testedHz {
			lower = append(lower, strconv.Itoa(hz))
			upper = append(upper, "")
		}
		lower = append(lower, "1000 again", "shift")
		upper = append(upper, "")
	}
	for _, name := range common {
		lower = append(lower, name)
	}
	s.row(upper...)
	s.row(lower...)
	for _, t := range b.testsAt("kiln-hill") {
		row := []any{t.AudiogramID, t.WorkerID, t.Date, replaced(t.Purpose, "baseline", "B", "periodic", "A", "retest", "R", "exit", "E", "other", "O")}
		for _, e := range []struct {
			ear   *audiometry.Ear
			again record.Threshold
			shift record.Answer
		}{{&t.Right, t.RightRepeat, t.RightStatedShift}, {&t.Left, t.LeftRepeat, t.LeftStatedShift}} {
			for _, hz := range testedHz {
				row = append(row, tone(e.ear[slices.Index(audiometry.Frequencies[:], hz)]))
			}
			row = append(row, tone(e.again), word(e.shift, "STS", "-"))
		}
		row = append(row, word(t.Masked, "yes", "no"), t.Earphones, word(t.FineSteps, "yes", "no"), t.AudiometerID, t.RoomID, t.TesterID, t.QuietHours,
			word(t.QuietByProtectors, "yes", "no"), word(t.Mobile, "yes", "no"), t.DeterminedOn, t.Reviewer, t.ReviewedOn)
		s.row(row...)
	}
	_, err = f.NewSheet("Notes")
	s.do(err)
	s.do(f.SetCellStr("Notes", "A1", "not for export"))
	s.do(f.SetSheetVisible("Notes", false))
	return s.save(path)
}

// tone writes a threshold as the clinic does: a number, >100 for no response, DNT for not tested.
func tone(t record.Threshold) any {
	switch t.State {
	case audiometry.Measured:
		return float64(t.Tenths) / 10
	case audiometry.NoResponse:
		return strings.TrimPrefix(t.String(), "NR")
	case audiometry.NotTested:
		return "DNT"
	}
	return ""
}

func (b *book) testsAt(site string) []*record.Audiogram {
	at := map[string]bool{}
	for _, w := range b.workers {
		at[w.WorkerID] = at[w.WorkerID] || w.Site == site
	}
	var out []*record.Audiogram
	for _, t := range b.audiograms {
		if at[t.WorkerID] && (site == "kiln-hill" || t.WorkerID[0] != 'K') {
			out = append(out, t)
		}
	}
	return out
}

// exportTestsByEar writes one row an ear, separated by semicolons, with dates by the day first.
func (b *book) exportTestsByEar(path string) error {
	head := []string{"Test no", "Worker", "Date", "Purpose", "Ear"}
	for _, hz := range testedHz {
		head = append(head, strconv.Itoa(hz)+" Hz")
	}
	rows := [][]string{append(append(head, "1000 Hz again", "Shift"), common...)}
	for _, t := range b.testsAt("larch-street") {
		for _, e := range []struct {
			name  string
			ear   *audiometry.Ear
			again record.Threshold
			shift record.Answer
		}{{"L", &t.Left, t.LeftRepeat, t.LeftStatedShift}, {"R", &t.Right, t.RightRepeat, t.RightStatedShift}} {
			row := []string{t.AudiogramID, t.WorkerID, dotted(t.Date), t.Purpose, e.name}
			for _, hz := range testedHz {
				row = append(row, coded(e.ear[slices.Index(audiometry.Frequencies[:], hz)]))
			}
			rows = append(rows, append(row, coded(e.again), word(e.shift, "1", "0"), word(t.Masked, "1", "0"), t.Earphones, word(t.FineSteps, "1", "0"), t.AudiometerID, t.RoomID, t.TesterID, t.QuietHours.String(),
				word(t.QuietByProtectors, "1", "0"), word(t.Mobile, "1", "0"), dotted(t.DeterminedOn), t.Reviewer, dotted(t.ReviewedOn)))
		}
	}
	return os.WriteFile(path, delimited(';', rows), 0o644)
}

// coded writes a threshold with the number codes of some systems.
func coded(t record.Threshold) string {
	switch t.State {
	case audiometry.NoResponse:
		return "666"
	case audiometry.NotTested:
		return "888"
	}
	return t.String()
}

// sheet writes a sheet of a workbook row by row, and keeps the first error.
type sheet struct {
	file *excelize.File
	name string
	rows int
	date int // style of dates
	err  error
}

func (s *sheet) do(err error) {
	if s.err == nil {
		s.err = err
	}
}

// cell names the cell of a column in the next row.
func (s *sheet) cell(column int) string {
	name, err := excelize.CoordinatesToCellName(column, s.rows+1)
	s.do(err)
	return name
}

func (s *sheet) row(values ...any) {
	for i, v := range values {
		at := s.cell(i + 1)
		switch v := v.(type) {
		case Date:
			if v.Known() {
				s.do(s.file.SetCellFloat(s.name, at, serial(v), -1, 64))
				s.do(s.file.SetCellStyle(s.name, at, at, s.date))
			}
		case record.Number:
			if v.Known {
				s.do(s.file.SetCellFloat(s.name, at, v.Value, -1, 64))
			}
		case string:
			if v != "" {
				s.do(s.file.SetCellStr(s.name, at, v))
			}
		default:
			s.do(s.file.SetCellValue(s.name, at, v))
		}
	}
	s.rows++
}

// serial is the number under which a spreadsheet stores a day (of the 1900 system, after February 1900).
func serial(d Date) float64 { return float64(d - calendar.MustParse("1899-12-30")) }

// save writes the workbook with properties that do not change from run to run.
func (s *sheet) save(path string) error {
	s.do(s.file.SetDocProps(&excelize.DocProperties{Created: "2026-06-30T00:00:00Z", Modified: "2026-06-30T00:00:00Z", Creator: "demo", LastModifiedBy: "demo"}))
	s.do(s.file.SaveAs(path))
	return s.err
}
