package record

import (
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
	"hearduty/internal/diag"
)

func TestTables(t *testing.T) {
	require.Len(t, Kinds(), len(prototypes))
	require.Len(t, fileNames, len(prototypes))
	for _, k := range Kinds() {
		table, ok := TableOf(k)
		require.True(t, ok)
		require.Equal(t, k, table.New().Kind())
		got, ok := KindOfFile("records/" + table.FileName() + ".csv")
		require.True(t, ok, k)
		require.Equal(t, k, got)
		for i, f := range table.Fields {
			require.Equal(t, i, table.Index(f.Name))
			require.NotEmpty(t, f.Doc, "%s.%s", k, f.Name)
			require.Equal(t, strings.ToLower(f.Name), f.Name)
			require.False(t, f.HasMin && f.HasMax && f.Min >= f.Max, f.Name)
		}
	}
}

func TestExpandedNames(t *testing.T) {
	for kind, names := range map[Kind][]string{
		"audiogram": {"left.250", "left.500", "right.8000"}, "measurement": {"octave.63", "octave.8000"}, "protector": {"mean.125", "sd.4000"},
		"room_survey": {"band.500"}, "calibration": {"deviation.500", "deviation.6000"}, "fit_test": {"left.par_db"},
	} {
		table, _ := TableOf(kind)
		for _, name := range names {
			require.GreaterOrEqual(t, table.Index(name), 0, name)
		}
	}
	table, _ := TableOf("audiogram")
	require.Equal(t, -1, table.Index("left.501"))
	require.Equal(t, Hearing, table.Fields[table.Index("left.500")].Type)
}

func TestKindOfFile(t *testing.T) {
	for name, want := range map[string]Kind{
		"audiograms.csv": "audiogram", "a/b/Follow_Ups.NDJSON": "follow_up", "tasks.json": "task", "audiograms.xlsx": "audiogram", "x/Audiograms.YML": "audiogram", "audiograms.xls": "", "audiograms.pdf": "", "audiogram.csv": "", "audiograms": "", "": "",
	} {
		got, ok := KindOfFile(name)
		require.Equal(t, want, got, name)
		require.Equal(t, want != "", ok, name)
	}
}

// set sets one field of a new record and returns its canonical text.
func set(t *testing.T, kind Kind, field, text string) (string, *Problem) {
	t.Helper()
	table, _ := TableOf(kind)
	i := table.Index(field)
	require.GreaterOrEqual(t, i, 0, field)
	r := table.New()
	p := table.Set(r, i, text)
	return table.Text(r, i), p
}

func TestSetReads(t *testing.T) {
	for _, c := range []struct {
		kind              Kind
		field, text, want string
	}{
		{"worker", "worker_id", "\u00a0000123 ", "000123"},
		{"worker", "worker_id", "1.23E+05", "1.23E+05"},
		{"worker", "sex", "Female", "female"},
		{"worker", "birth_date", "1960-02-29", "1960-02-29"},
		{"worker", "in_program", "YES", "yes"},
		{"training", "topics", " noise_effects ;; protectors;", "noise_effects;protectors"},
		{"audiogram", "left.500", "nr>100", "NR>100"},
		{"audiogram", "right.8000", "-5", "-5"},
		{"measurement", "twa_dba", "85.30", "85.3"},
		{"measurement", "twa_dba", "0", "0"},
		{"measurement", "octave.63", "\u221210", "-10"},
		{"calibration", "deviation.500", "+2.5", "2.5"},
		{"notice", "about", "something_else", "something_else"},
		{"measurement", "peak_weighting", "c", "C"},
		{"measurement", "octave.63", " ", ""},
	} {
		got, p := set(t, c.kind, c.field, c.text)
		require.Nil(t, p, "%s %q", c.field, c.text)
		require.Equal(t, c.want, got, "%s %q", c.field, c.text)
	}
}

func TestSetRefuses(t *testing.T) {
	for _, c := range []struct {
		kind                     Kind
		field, text, why, remedy string
	}{
		{"worker", "birth_date", "04/03/1961", `"04/03/1961" is not a date of the form YYYY-MM-DD`, "State it as YYYY-MM-DD"},
		{"worker", "birth_date", "2023-02-29", "not a day of the calendar", "Look up the right date"},
		{"worker", "left_on", "9999-12-31", "outside 1900 to 2100", "leave the cell empty"},
		{"worker", "hired_on", "2025-03-04T00:00:00Z", "not a date", "YYYY-MM-DD"},
		{"worker", "sex", "femal", "not one of the words", "Write female if that is meant"},
		{"worker", "sex", "M", "not one of the words", "Write one of female, male, unspecified"},
		{"worker", "in_program", "true", "neither yes nor no", "yes or no"},
		{"worker", "job_title", "a\x1b[31m", "control character U+001B", "without it"},
		{"training", "topics", "a;b\x00", "control character U+0000", "without it"},
		{"measurement", "twa_dba", "85,3", "not a number", "after a point, not a comma"},
		{"measurement", "twa_dba", "1.234,5", "not a number", "thousands"},
		{"measurement", "twa_dba", "8O", "not a number", "letter O"},
		{"measurement", "twa_dba", "8.5e1", "not a number", "without an exponent"},
		{"measurement", "twa_dba", "NaN", "not a number", "such as 85.3"},
		{"measurement", "twa_dba", "85 dBA", "not a number", "without its unit"},
		{"measurement", "twa_dba", "<80", "not a number", "leave the cell empty"},
		{"measurement", "twa_dba", "85.", "not a number", "decimals after a point"},
		{"measurement", "twa_dba", "200", "200 is outside 0 to 140", "Check the number"},
		{"audiogram", "left.500", "200", "outside -20 to 130", "Correct the cell from the original record"},
		{"audiogram", "left.500", "1O", "letter O", "Correct the cell from the original record"},
		{"audiogram", "left.500", "45m", "not a threshold", "Correct the cell from the original record"},
		{"audiogram", "left.500", strings.Repeat("9", 500), "…", "Correct the cell from the original record"},
	} {
		got, p := set(t, c.kind, c.field, c.text)
		require.NotNil(t, p, "%s %q", c.field, c.text)
		require.Equal(t, diag.Error, p.Severity)
		require.Equal(t, c.field, p.Field)
		require.Contains(t, p.Why, c.why)
		require.Contains(t, p.Remedy, c.remedy)
		require.Empty(t, got, "a field that cannot be read stays absent")
		require.Less(t, len(p.Error()), 400)
	}
}

func TestVocabularyWarns(t *testing.T) {
	got, p := set(t, "follow_up", "kind", "refiting")
	require.Equal(t, "refiting", got)
	require.Equal(t, diag.Warning, p.Severity)
	require.Contains(t, p.Remedy, "refitting")
	got, p = set(t, "training", "topics", "protectors;noise_efects")
	require.Equal(t, "protectors;noise_efects", got)
	require.Equal(t, diag.Warning, p.Severity)
}

func TestSetClears(t *testing.T) {
	table, _ := TableOf("audiogram")
	a := sampleAudiogram()
	for i := range table.Fields {
		require.NotEmpty(t, table.Text(a, i))
		require.Nil(t, table.Set(a, i, ""))
		require.Empty(t, table.Text(a, i))
	}
}

// Every record that the tables can make is written as text and read back the same.
func TestTextRoundTrip(t *testing.T) {
	for _, kind := range Kinds() {
		table, _ := TableOf(kind)
		rapid.Check(t, func(t *rapid.T) {
			r := table.New()
			for i, f := range table.Fields {
				table.Set(r, i, drawText(t, f))
			}
			again := table.New()
			for i := range table.Fields {
				text := table.Text(r, i)
				p := table.Set(again, i, text)
				if p != nil && p.Severity == diag.Error {
					t.Fatalf("%s: %v", table.Fields[i].Name, p)
				}
			}
			require.Equal(t, r, again)
		})
	}
}

// drawText draws a text that may or may not fit the field.
func drawText(t *rapid.T, f Field) string {
	words := slices.Concat([]string{"", "yes", "no", "000123", "2025-03-04", "85.3", "-5", "NR>95", "NT", "a;b", "12"}, f.One, f.Like)
	return rapid.OneOf(rapid.SampledFrom(words), rapid.String(), rapid.StringMatching(`[0-9]{1,3}(\.[0-9]{1,2})?`)).Draw(t, f.Name)
}

func TestCheck(t *testing.T) {
	day := mustDate
	for _, c := range []struct {
		name, field string
		severity    diag.Severity
		r           Record
	}{
		{"left before hired", "left_on", diag.Error, &Worker{WorkerID: "1", Site: "s", HiredOn: day("2020-01-02"), LeftOn: day("2020-01-01")}},
		{"born after hired", "birth_date", diag.Error, &Worker{WorkerID: "1", Site: "s", HiredOn: day("2020-01-02"), BirthDate: day("2021-01-01")}},
		{"no worker id", "worker_id", diag.Error, &Worker{Site: "s", HiredOn: day("2020-01-02")}},
		{"to before from", "to", diag.Error, &Assignment{WorkerID: "1", Group: "g", From: day("2020-01-02"), To: day("2020-01-01")}},
		{"returned before issued", "returned_on", diag.Error, &ProtectorIssue{WorkerID: "1", ProtectorID: "p", Date: day("2020-01-02"), ReturnedOn: day("2020-01-01")}},
		{"certificate", "valid_to", diag.Error, &Tester{TesterID: "1", ValidFrom: day("2020-01-02"), ValidTo: day("2020-01-01")}},
		{"service", "in_service_to", diag.Error, &Instrument{InstrumentID: "1", Type: "dosimeter", InServiceFrom: day("2020-01-02"), InServiceTo: day("2020-01-01")}},
		{"measurement of nobody", "group", diag.Error, &Measurement{MeasurementID: "1", Date: day("2020-01-02"), Type: "area"}},
		{"wear check of nobody", "worker_id", diag.Error, &WearCheck{Date: day("2020-01-02")}},
		{"more wear than are there", "wearing", diag.Error, &WearCheck{Date: day("2020-01-02"), Area: "a", Observed: Num(3), Wearing: Num(4)}},
		{"change of nothing", "group", diag.Error, &Change{ChangeID: "1", Date: day("2020-01-02")}},
		{"control of nothing", "group", diag.Error, &Control{Type: "engineering", Date: day("2020-01-02")}},
		{"task", "minutes_high", diag.Error, &Task{Group: "g", Task: "t", Minutes: Num(3), MinutesLow: Num(3), MinutesHigh: Num(2)}},
		{"task without minutes", "minutes", diag.Error, &Task{Group: "g", Task: "t"}},
		{"received before test", "received_on", diag.Warning, &Audiogram{AudiogramID: "1", WorkerID: "1", Date: day("2020-01-02"), ReceivedOn: day("2020-01-01")}},
		{"examination on no day", "offered_on", diag.Error, &Examination{ExaminationID: "1", WorkerID: "1", Type: "hearing_test"}},
		{"attended before offer", "attended_on", diag.Warning, &Examination{ExaminationID: "1", WorkerID: "1", Type: "hearing_test", OfferedOn: day("2020-01-02"), AttendedOn: day("2020-01-01")}},
		{"told before test", "results_on", diag.Warning, &Examination{ExaminationID: "1", WorkerID: "1", Type: "hearing_test", AttendedOn: day("2020-01-02"), ResultsOn: day("2020-01-01")}},
		{"certified before test", "certificate_on", diag.Warning, &Examination{ExaminationID: "1", WorkerID: "1", Type: "hearing_test", AttendedOn: day("2020-01-02"), CertificateOn: day("2020-01-01")}},
		{"taken down before posted", "posted_to", diag.Error, &Document{Type: "x", Date: day("2020-01-01"), PostedOn: day("2020-01-02"), PostedTo: day("2020-01-01")}},
		{"reviewed before test", "reviewed_on", diag.Warning, &Audiogram{AudiogramID: "1", WorkerID: "1", Date: day("2020-01-02"), ReviewedOn: day("2020-01-01")}},
		{"good", "", "", &Worker{WorkerID: "1", Site: "s", HiredOn: day("2020-01-02"), LeftOn: day("2020-01-02")}},
		{"dose without settings", "", "", &Measurement{MeasurementID: "1", Date: day("2020-01-02"), Group: "g", Type: "personal", DosePct: Num(60)}},
	} {
		table, _ := TableOf(c.r.Kind())
		problems := table.Check(c.r)
		if c.field == "" {
			require.Empty(t, problems, c.name)
			continue
		}
		require.Len(t, problems, 1, c.name)
		require.Equal(t, c.field, problems[0].Field, c.name)
		require.Equal(t, c.severity, problems[0].Severity, c.name)
		require.NotEmpty(t, problems[0].Remedy, c.name)
	}
}

func TestAppendJSON(t *testing.T) {
	a := &Audiogram{AudiogramID: `A"1`, WorkerID: "007", Date: mustDate("2025-03-04"), QuietHours: Num(14), Mobile: No}
	a.Left[1] = audiometry.Threshold{Tenths: 125, State: audiometry.Measured}
	a.Left[9] = audiometry.Threshold{Tenths: 1000, State: audiometry.NoResponse}
	a.Right[0] = audiometry.Threshold{State: audiometry.NotTested}
	a.LeftRepeat = audiometry.Threshold{Tenths: 150, State: audiometry.Measured}
	a.SetAt(Origin{Source: 1, Row: 7})
	require.Equal(t, `{"record":"audiogram","audiogram_id":"A\"1","worker_id":"007","date":"2025-03-04","left":{"500":12.5,"8000":"NR>100","repeat_1000":15},"right":{"250":"NT"},"quiet_hours":14,"mobile":"no","origin":{"file":"audiograms.csv","row":7}}`,
		string(AppendJSON(nil, a, "audiograms.csv", "")))
	m := &Measurement{MeasurementID: "M", Type: "area", Octave: &Octaves{0: Num(70.5), 7: Num(60)}}
	require.Equal(t, `{"record":"measurement","measurement_id":"M","kind":"area","octave":{"63":70.5,"8000":60},"origin":{"file":"m.xlsx","sheet":"S","row":0}}`,
		string(AppendJSON(nil, m, "m.xlsx", "S")))
	require.Equal(t, `{"record":"training","topics":["a","b"],"origin":{"file":"","row":0}}`, string(AppendJSON(nil, &Training{Topics: List{"a", "b"}}, "", "")))
}
