package convert_test

import (
	"strconv"
	"strings"
	"testing"
	"time"
	"unicode/utf8"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// FuzzDates reads a text in all ways. A date that is given is a day of the calendar that reads as itself; a
// problem has both sentences and does not repeat the cell. What is read without an order is not contradicted with
// one, and exchanging the two first numbers exchanges day-first and month-first.
func FuzzDates(f *testing.F) {
	for _, s := range []string{"2025-03-04", "04/03/2025", "4.3.25", "25/03/04", "20250304", "04032025", "45720", "60", "4-Mar-25", "04 mars 2025", "4. März 2025",
		"4 de marzo de 2025", "2025年3月4日", "令和7年3月4日", "R7.3.4", "4 มี.ค. 2568", "2025-03-04T07:30:00.5+02:00", "3/4/2025 12:00 AM", "20250304073000Z",
		"0000-00-00", "31/12/9999", "29/02/00", "2025-03-04-07.30.00.000000", "９９９９年１２月３１日 24時", "0001-01-01T00:00+15", "\xff1/2/2025", "1/2/2025 \xff"} {
		f.Add(s)
	}
	berlin, err := time.LoadLocation("Europe/Berlin")
	if err != nil {
		f.Fatal(err)
	}
	f.Fuzz(func(t *testing.T, s string) {
		read := func(d convert.Dates, kind grid.CellKind) string {
			day, p := d.Read(grid.Cell{Text: s, Kind: kind})
			checkProblem(t, s, day, p)
			if day == "" {
				return day
			}
			if _, err := calendar.Parse(day); err != nil {
				t.Fatalf("%q gives %s: %v", s, day, err)
			}
			if again, p := (&convert.Dates{}).Read(text(day)); p != nil || again != day {
				t.Fatalf("%q gives %s, which gives %s, %v", s, day, again, p)
			}
			return day
		}
		none := read(convert.Dates{Latest: 2026, Written: true}, grid.Text)
		for _, o := range []convert.Order{convert.DayMonthYear, convert.MonthDayYear, convert.YearMonthDay} {
			if one := read(convert.Dates{Latest: 2026, Order: o, Written: true}, grid.Text); none != "" && one != "" && one != none {
				t.Fatalf("%q gives %s, but %s in the order %s", s, none, one, o)
			}
			read(convert.Dates{Latest: 2569, Order: o, Buddhist: true, Zone: berlin, Serial: 1900}, grid.Text)
		}
		for kind := grid.Text; kind <= grid.Uncomputed; kind++ {
			read(convert.Dates{Serial: 1904, Zone: berlin}, kind)
		}
		symmetric(t, s)
		e := &convert.Evidence{}
		e.Add(text(s), 2)
		if o, line, why, ok := e.Settled(); ok != (o != "" && line == 2 && why == "") || ok && why != "" {
			t.Fatalf("%q settles %q at %d: %q", s, o, line, why)
		} else if ok && read(convert.Dates{Order: o, Latest: 2099, Written: true}, grid.Text) == "" &&
			read(convert.Dates{Order: o, Latest: 1999, Written: true}, grid.Text) == "" && !strings.ContainsAny(s, " ,Tt") {
			t.Fatalf("%q settles %q but is not read so", s, o)
		}
	})
}

// symmetric exchanges the first two numbers of a date with slashes.
func symmetric(t *testing.T, s string) {
	parts := strings.Split(s, "/")
	if len(parts) != 3 || len(parts[0]) > 2 || len(parts[1]) > 2 { // a longer one is a year, and its place tells the order
		return
	}
	dmy, mdy := convert.Dates{Order: convert.DayMonthYear, Latest: 2026}, convert.Dates{Order: convert.MonthDayYear, Latest: 2026}
	a, p := dmy.Read(text(s))
	b, q := mdy.Read(text(parts[1] + "/" + parts[0] + "/" + parts[2]))
	if strings.Trim(parts[0]+parts[1], "0123456789") == "" && (a != b || (p == nil) != (q == nil)) {
		t.Fatalf("%q gives %q day first, but exchanged %q month first", s, a, b)
	}
}

func checkProblem(t *testing.T, s, got string, p *convert.Problem) {
	t.Helper()
	switch {
	case p == nil:
	case p.Why == "" || p.Remedy == "" || strings.HasSuffix(p.Why, ".") || strings.HasSuffix(p.Remedy, "."):
		t.Fatalf("%q has the problem %+v", s, p)
	case got != "":
		t.Fatalf("%q gives %q and the problem %v", s, got, p)
	case !utf8.ValidString(p.Why + p.Remedy):
		t.Fatalf("%q has a problem that is no text", s)
	}
}

// FuzzNumbers reads a text in all ways. A number that is given is canonical and reads as itself.
func FuzzNumbers(f *testing.F) {
	for _, s := range []string{"85.3", "85,3", "1.234,5", "1\u202f234,5", "1'234.5", "−5", "＋８５", ".5", "5.", "1e400", "NaN", "0x1p-2", "1O0", "---", "<80", "62.5 %", "5²", "٨٥",
		"7:45", "07:45:00.5", "7h45", "7 h 45 min", "0.32291667", "-0", "999999999999999999999", "0.5k", "0,5 kHz", `="5"`, "\xff5"} {
		f.Add(s)
	}
	all := []convert.Numbers{point, comma, german, french, swiss, us}
	f.Fuzz(func(t *testing.T, s string) {
		check := func(got string, p *convert.Problem) string {
			checkProblem(t, s, got, p)
			if got == "" {
				return got
			}
			if strings.Trim(got, "-0123456789.") != "" {
				t.Fatalf("%q gives %q", s, got)
			}
			if _, err := strconv.ParseFloat(got, 64); err != nil && !strings.Contains(err.Error(), "range") {
				t.Fatalf("%q gives %q: %v", s, got, err)
			}
			if again, p := point.Read(text(got)); p != nil || again != got {
				t.Fatalf("%q gives %q, which gives %q, %v", s, got, again, p)
			}
			return got
		}
		for _, n := range all {
			for _, kind := range []grid.CellKind{grid.Text, grid.Number} {
				c := grid.Cell{Text: s, Kind: kind}
				check(n.Read(c, "dB", "%"))
				check(n.Percent(c, "percent"))
				check(n.Percent(c, "fraction"))
				for _, unit := range []string{"minutes", "hours", "clock", "day_fraction"} {
					if m := check(n.Minutes(c, unit)); strings.HasPrefix(m, "-") {
						t.Fatalf("%q gives %s minutes", s, m)
					}
				}
				if hz := check(n.Hertz(c, "khz")); hz != "" {
					if v, err := strconv.Atoi(hz); err != nil || !isTested(v) {
						t.Fatalf("%q gives %s Hz", s, hz)
					}
				}
			}
			check(n.Minutes(clock(s), "clock"))
		}
	})
}

func isTested(hz int) bool {
	for _, f := range audiometry.Frequencies {
		if f == hz {
			return true
		}
	}
	return false
}

// FuzzThresholds reads a text with and without lists. What is given is canonical, and a number that no list has
// never becomes no response.
func FuzzThresholds(f *testing.F) {
	for _, s := range []string{"25", "-10", "−10", "37,5", "NR", "N/R", "666", "-99", ">100", "100+", "110↓", "NR m", "[45]", "45m", "[>100]", "DNT", "888", "-", ".", "5 dB", "O", "m", "[]", ">", "+5", "NR>", "NR>NR>5", "\xff", "K", "45*m"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		for _, th := range []*convert.Thresholds{clinic(), {}, {NoMarks: []string{"", "-", "\xff"}, Masked: []string{"", "mm", "5", "\xff"}, NoWords: []string{""}}} {
			for _, kind := range []grid.CellKind{grid.Text, grid.Number} {
				got, masked, p := th.Read(grid.Cell{Text: s, Kind: kind}, 500)
				checkProblem(t, s, got, p)
				if masked && got == "" {
					t.Fatalf("%q is masked but says nothing", s)
				}
				parsed, err := audiometry.ParseThreshold(got)
				if err != nil || parsed.String() != got {
					t.Fatalf("%q gives %q: %v", s, got, err)
				}
				if th.NoWords == nil && parsed.State == audiometry.NoResponse && !strings.HasPrefix(strings.ToUpper(strings.TrimSpace(s)), "NR") && isPlain(s) {
					t.Fatalf("%q gives %q without a list", s, got)
				}
			}
		}
	})
}

func isPlain(s string) bool {
	return strings.IndexFunc(s, func(r rune) bool { return r >= utf8.RuneSelf || r == '=' }) < 0
}

// FuzzFold folds texts: what is folded is folded for good, has no blanks at its ends and none doubled. Ids are read
// once and for all, and words are found whatever their case.
func FuzzFold(f *testing.F) {
	for _, s := range []string{"Test_Date", "0.5 kHz", ".5k", "R.500", "Straße", "İI ıi", "ｶﾞ", "가", "\u1100\u1161", "e\u0301\u0323", "-99", ">= 100", "≥100", "+", "- -", "ſ", "ﬁ", "Ǆ", "½", "²", "㋿", "Ω", "\u0345", "\u0301", "ά", "a\u200b\u0301", "\xff", "ᾳ", "ẞ", "١٢", "..5", "1,,2", "~.5"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		once := convert.Fold(s)
		if twice := convert.Fold(once); twice != once {
			t.Fatalf("%q gives %q, which gives %q", s, once, twice)
		}
		if once != strings.Join(strings.Fields(once), " ") {
			t.Fatalf("%q gives %q", s, once)
		}
		id := convert.ID{}
		if got, p := id.Read(text(s)); p == nil {
			if again, p := id.Read(text(got)); utf8.ValidString(s) && (p != nil || again != got) && !strings.Contains(s, "=") {
				t.Fatalf("%q gives %q, which gives %q, %v", s, got, again, p)
			}
		} else {
			checkProblem(t, s, got, p)
		}
		w, p := convert.NewWords(map[string]string{s: "yes"})
		if p != nil {
			t.Fatal(p)
		}
		if got, ok := w.Find(text(" " + s + "\u00a0")); !ok || got != "yes" {
			if !strings.Contains(s, "=") && utf8.ValidString(s) {
				t.Fatalf("%q is not found", s)
			}
		}
	})
}
