package draft

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
)

const rosterHead = "Employee ID,Sex,Date of birth,Hire date\n"

// TestOrderIsNeverGuessed holds the draft to what the dates prove.
func TestOrderIsNeverGuessed(t *testing.T) {
	for _, c := range []struct{ name, births, want, reason string }{
		{"open", "04/03/1975,05/03/1980,12/12/1990", "", "question"},
		{"equal parts", "05/05/1975,06/06/1980,07/07/1990", "", "question"},
		{"day first", "04/03/1975,25/03/1980,01/02/1990", "day_month_year", "row 3"},
		{"month first", "04/03/1975,04/05/1980,03/25/1990", "month_day_year", "row 4"},
		{"both", "25/03/1975,03/25/1980,01/02/1990", "", "question"},
		{"year first", "1975-03-04,1980-03-25,1990-01-02", "", ""},
	} {
		b := strings.Split(c.births, ",")
		got := of(t, "roster.csv", rosterHead+fmt.Sprintf("A1,male,%s,2010-01-01\nA2,female,%s,2010-01-01\nA3,female,%s,2010-01-01\n", b[0], b[1], b[2]))
		if c.want == "" {
			assert.NotContains(t, active(got), "order:", c.name)
		} else {
			assert.Contains(t, active(got), "order: "+c.want, c.name)
			assert.Contains(t, line(t, got, "order: "+c.want), c.reason, c.name)
		}
		assert.Equal(t, c.reason == "question", strings.Contains(got, "Which order have the dates"), c.name)
	}
}

// TestProofBehindTheSample wants dates settled by a row far behind the rows that everything else rests on.
func TestProofBehindTheSample(t *testing.T) {
	var b strings.Builder
	b.WriteString("Employee ID,Course,Date trained\n")
	for i := range sampleRows + 500 {
		fmt.Fprintf(&b, "A%d,HPD,0%d/03/2025\n", i, i%9+1)
	}
	open := b.String()
	assert.NotContains(t, active(of(t, "training.csv", open)), "order:")
	got := of(t, "training.csv", open+"A1,HPD,31/03/2025\n")
	assert.Contains(t, active(got), "order: day_month_year")
	assert.Contains(t, got, fmt.Sprintf("row %d of", sampleRows+502))
}

// TestOneColumnProvesNothingForAnother wants the order of a proven column to stay beside it.
func TestOneColumnProvesNothingForAnother(t *testing.T) {
	got := of(t, "roster.csv", rosterHead+"A1,male,25/03/1975,04/03/2010\nA2,male,26/03/1975,05/03/2010\n")
	assert.Contains(t, active(got), "    column: Date of birth\n    order: day_month_year")
	assert.Equal(t, 1, strings.Count(active(got), "order:"))
	assert.Contains(t, got, `Which order have the dates in "Hire date" (2)`)
	assert.NotContains(t, active(got), "\ndates:")
}

// TestSexCodesAreNeverGuessed holds the draft to words, and to M and F where both and nothing else occur.
func TestSexCodesAreNeverGuessed(t *testing.T) {
	for _, c := range []struct {
		codes string
		known map[string]string
		asked bool
	}{
		{"M F M F", map[string]string{"M": "male", "F": "female"}, false},
		{"m f m f", map[string]string{"m": "male", "f": "female"}, false},
		{"male female male male", nil, false},
		{"weiblich männlich divers weiblich", map[string]string{"weiblich": "female", `"männlich"`: "male", "divers": "unspecified"}, false},
		{"homme femme homme femme", map[string]string{"homme": "male", "femme": "female"}, false},
		{"hombre mujer mujer mujer", map[string]string{"hombre": "male", "mujer": "female"}, false},
		{"M M M M", nil, true},
		{"F F F F", nil, true},
		{"M F X M", nil, true},
		{"H M H M", nil, true},
		{"H F H F", nil, true},
		{"M V M V", nil, true},
		{"M K M K", nil, true},
		{"M W M W", nil, true},
		{"1 2 1 2", nil, true},
		{"0 1 0 1", nil, true},
		{"male 2 male 2", map[string]string{"male": "male"}, true},
	} {
		s := strings.Fields(c.codes)
		var b strings.Builder
		b.WriteString(rosterHead)
		for i, code := range s {
			fmt.Fprintf(&b, "A%d,%s,1975-03-0%d,2010-01-01\n", i, code, i+1)
		}
		got := of(t, "roster.csv", b.String())
		for code, meaning := range c.known {
			assert.Contains(t, active(got), "\n      "+code+": "+meaning, c.codes)
		}
		if c.known == nil {
			assert.NotContains(t, active(got), "values:", c.codes)
		}
		assert.Equal(t, c.asked, strings.Contains(got, `What do the cells of "Sex" mean`), c.codes)
		if c.asked {
			assert.Contains(t, got, ": ASK # ", c.codes)
		}
	}
}

// TestUnitsAreNeverGuessed looks at times and shares whose values do not tell their unit.
func TestUnitsAreNeverGuessed(t *testing.T) {
	for _, c := range []struct{ run, dose, unit, share string }{
		{"7.5 8 6", "62.5 41 131", "", "percent"},
		{"450 480 360", "0.6 0.4 1.3", "minutes", ""},
		{"7:45 8:00 6:30", "62% 41% 4%", "clock", "percent"},
		{"7h45 8h00 6h30", "8 12 3", "clock", ""},
		{"0.31 0.33 0.25", "0.6 0.4 1.3", "", ""},
	} {
		run, dose := strings.Fields(c.run), strings.Fields(c.dose)
		var b strings.Builder
		b.WriteString("Employee ID,Sample date,Run time,Dose\n")
		for i := range run {
			fmt.Fprintf(&b, "A%d,2025-03-04,%s,%s\n", i, run[i], dose[i])
		}
		read := active(of(t, "noise.csv", b.String()))
		for _, unit := range []string{"minutes", "hours", "clock", "day_fraction"} {
			assert.Equal(t, unit == c.unit, strings.Contains(read, "unit: "+unit), "%s: %s", c.run, unit)
		}
		for _, unit := range []string{"percent", "fraction"} {
			assert.Equal(t, unit == c.share, strings.Contains(read, "unit: "+unit), "%s: %s", c.dose, unit)
		}
	}
	named := active(of(t, "noise.csv", "Employee ID,Sample date,Run time (h),Dose %\nA1,2025-03-04,7.5,0.6\n"))
	assert.Contains(t, named, "unit: hours")
	assert.Contains(t, named, "unit: percent")
}

// TestCodesAmongThresholds looks at what stands for no level.
func TestCodesAmongThresholds(t *testing.T) {
	got := of(t, "tests.csv", "Emp no,Test date,R2000,R3000,R4000,L2000,L3000,L4000\n"+
		"A1,2025-03-04,NR,666,>100,100+,45m,[50]\n"+
		"A2,2025-03-04,DNT,888,-,999,-99,20*\n"+
		"A3,2025-03-04,20,NR>100,25 dB,37.5,15,zzz\n"+
		"A4,2025-03-04,20,2500,25,30,15,10\n")
	read := active(got)
	assert.Contains(t, read, `words: ["666", NR]`)
	assert.Contains(t, read, `marks: ["+", ">"]`)
	assert.Contains(t, read, `not_tested: ["-", "888", DNT]`)
	assert.Contains(t, read, `masked: ["[]", m]`)
	assert.NotContains(t, read, "999")
	assert.NotContains(t, read, "limit:")
	assert.Contains(t, got, "What do -99, 999 mean among the thresholds")
	assert.Contains(t, got, "Do the signs * around thresholds mean")
	assert.Contains(t, got, "What is the highest level presented")
	assert.Contains(t, got, "There are 2 (rows 4, 5); they will be rejected")
	assert.NotContains(t, got, "zzz")
	assert.NotContains(t, got, "2500")
}

// TestLostZeros asks about ids whose lengths differ while some have zeros before, and only about these.
func TestLostZeros(t *testing.T) {
	for ids, asked := range map[string]bool{"000123 000124 125": true, "000123 000124 000125": false, "123 1244 5": false, "A1 A22 A333": false} {
		s := strings.Fields(ids)
		got := of(t, "training.csv", fmt.Sprintf("Employee ID,Course,Date trained\n%s,HPD,2025-01-02\n%s,HPD,2025-01-02\n%s,HPD,2025-01-02\n", s[0], s[1], s[2]))
		assert.Equal(t, asked, strings.Contains(got, "# pad: 6"), ids)
		assert.NotContains(t, active(got), "pad:")
	}
}
