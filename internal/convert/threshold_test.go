package convert_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// clinic reads the spellings of cases 9 to 12 of part B.
func clinic() *convert.Thresholds {
	return &convert.Thresholds{
		Numbers: &convert.Numbers{Decimal: ','},
		NoWords: []string{"NR", "N/R", "No Resp", "666", "999", "-99"},
		NoMarks: []string{">", "+", "↓", "NR"},
		Limit: func(hz int) (float64, bool) {
			return map[int]float64{500: 110, 1000: 120, 8000: 100.5}[hz], hz != 250
		},
		NotTested: []string{"DNT", "CNT", "NT", "888", "-", "."},
		Masked:    []string{"m", "[]", "*"},
	}
}

func TestThresholdsRead(t *testing.T) {
	for _, c := range []struct {
		cell   string
		want   string
		masked bool
	}{
		{"", "", false}, {" \u00a0", "", false},
		{"25", "25", false}, {"0", "0", false}, {"-5", "-5", false}, {"05", "5", false}, {"-0", "0", false}, {"120", "120", false},
		{"37", "37", false}, {"37,5", "37.5", false}, {"-10", "-10", false}, {"−10", "-10", false}, {"５", "5", false},
		{"5 dB", "5", false}, {"5dB HL", "5", false}, {"5,0 dBHL", "5", false}, {"+5 dB", "", false},
		{"NR", "NR>110", false}, {"nr", "NR>110", false}, {"N/R", "NR>110", false}, {"no  resp", "NR>110", false},
		{"666", "NR>110", false}, {"666.0", "NR>110", false}, {"999", "NR>110", false}, {"-99", "NR>110", false}, {"−99", "NR>110", false},
		{">100", "NR>100", false}, {"> 100", "NR>100", false}, {"100+", "NR>100", false}, {"110↓", "NR>110", false}, {"NR 100", "NR>100", false}, {"NR>100", "NR>100", false}, {"NR > 100", "NR>100", false},
		{">100 dB", "NR>100", false}, {">92,5", "NR>92.5", false},
		{"DNT", "NT", false}, {"cnt", "NT", false}, {"NT", "NT", false}, {"888", "NT", false}, {"888.0", "NT", false}, {"-", "NT", false}, {".", "NT", false},
		{"45m", "45", true}, {"45M", "45", true}, {"[45]", "45", true}, {"45 *", "45", true}, {"-5m", "-5", true}, {"45 dB m", "45", true},
		{"NR m", "NR>110", true}, {">100m", "NR>100", true}, {"[>100]", "NR>100", true}, {"[NR]", "NR>110", true},
	} {
		got, masked, p := clinic().Read(text(c.cell), 500)
		if c.cell == "+5 dB" { // with + as a mark it can be either
			require.NotNil(t, p)
			assert.Contains(t, p.Why, "sign before the level")
			continue
		}
		require.Nil(t, p, "%q: %v", c.cell, p)
		assert.Equal(t, c.want, got, c.cell)
		assert.Equal(t, c.masked, masked, c.cell)
	}
	for cell, want := range map[string]string{"25": "25", "37.5": "37.5", "666": "NR>100.5", "888": "NT"} {
		got, _, p := clinic().Read(stored(cell), 8000)
		require.Nil(t, p, "%q: %v", cell, p)
		assert.Equal(t, want, got)
	}
}

func TestThresholdsRefused(t *testing.T) {
	bare := &convert.Thresholds{}
	both := &convert.Thresholds{NoWords: []string{"x"}, NotTested: []string{"X"}}
	for _, c := range []struct {
		thresholds  *convert.Thresholds
		cell        grid.Cell
		hz          int
		why, remedy string
	}{
		{clinic(), text("NR"), 250, "highest level presented at 250 Hz is not known", "no_response.limit"},
		{&convert.Thresholds{NoWords: []string{"NR"}}, text("NR"), 500, "highest level presented at 500 Hz is not known", ""},
		{both, text("x"), 500, "both as no response and as not tested", ""},
		{clinic(), text(">"), 500, "a mark of no response, but no level", "no_response.words"},
		{clinic(), text("m"), 500, "a sign of masking but no level", ""},
		{clinic(), text("=\"\"m"), 500, "a sign of masking but no level", ""},
		{clinic(), text("[]"), 500, "a sign of masking but no level", ""},
		{bare, text("NR"), 500, "neither a level nor a word", "no_response.words, not_tested or blank"},
		{bare, text("NT"), 500, "neither a level nor a word", "not_tested"},
		{bare, text("-"), 500, "neither a level nor a word", "blank"},
		{bare, text("NR>"), 500, "neither a level nor a word", ""},
		{bare, text("666"), 500, "outside -20 to 130", "if it is a code"},
		{bare, text("-99"), 500, "outside -20 to 130", "if it is a code"},
		{bare, text("131"), 500, "outside -20 to 130", "slipped digit"},
		{clinic(), text(">140"), 500, "outside -20 to 130", ""},
		{bare, text(">100"), 500, "a sign that the map does not know", "no_response.marks"},
		{bare, text("100+"), 500, "a sign that the map does not know", "no_response.marks"},
		{bare, text("110↓"), 500, "a sign that the map does not know", "no_response.marks"},
		{clinic(), text("≥100"), 500, "a sign that the map does not know", ""},
		{bare, text("45m"), 500, "letters or signs around it", "masked"},
		{bare, text("[45]"), 500, "letters or signs around it", "masked"},
		{bare, text("O"), 500, "letter O", "digit 0"},
		{bare, text("1O"), 500, "letter O", "digit 0"},
		{bare, text("37,5"), 500, "a comma, but its decimal sign is stated to be a point", "numbers"},
		{bare, text("37.25"), 500, "more than one decimal", ""},
		{bare, text("25 30"), 500, "blanks", ""},
		{bare, grid.Cell{Text: "2025-03-04", Kind: grid.Day}, 500, "a date here", ""},
		{bare, grid.Cell{Text: "#N/A", Kind: grid.Broken}, 500, "error of the workbook", ""},
	} {
		got, masked, p := c.thresholds.Read(c.cell, c.hz)
		require.NotNil(t, p, "%q gives %s", c.cell.Text, got)
		assert.Contains(t, p.Why, c.why, c.cell.Text)
		assert.Contains(t, p.Remedy, c.remedy, c.cell.Text)
		assert.Empty(t, got)
		assert.False(t, masked)
	}
}

func TestThresholdsAllocateNothingOnLevels(t *testing.T) {
	th := clinic()
	cells := []grid.Cell{text("25"), text("-5"), text("5")}
	assert.Zero(t, testing.AllocsPerRun(100, func() {
		for _, c := range cells {
			_, _, _ = th.Read(c, 500)
		}
	}))
}
