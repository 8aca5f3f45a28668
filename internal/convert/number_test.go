package convert_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

func stored(s string) grid.Cell { return grid.Cell{Text: s, Kind: grid.Number} }
func clock(s string) grid.Cell  { return grid.Cell{Text: s, Kind: grid.Clock} }

var (
	point  = convert.Numbers{}
	comma  = convert.Numbers{Decimal: ','}
	german = convert.Numbers{Decimal: ',', Thousands: '.'}
	french = convert.Numbers{Decimal: ',', Thousands: ' '}
	swiss  = convert.Numbers{Decimal: '.', Thousands: '\''}
	us     = convert.Numbers{Decimal: '.', Thousands: ','}
)

// Case 18 of part B; the others are common practice, no source.
func TestNumbersRead(t *testing.T) {
	for _, c := range []struct {
		numbers convert.Numbers
		cell    grid.Cell
		units   []string
		want    string
	}{
		{point, text(""), nil, ""},
		{point, text("85"), nil, "85"},
		{point, text(" 85.3\u00a0"), nil, "85.3"},
		{point, text("-5"), nil, "-5"},
		{point, text("−5"), nil, "-5"},
		{point, text("–5"), nil, "-5"},
		{point, text("+5"), nil, "5"},
		{point, text(".5"), nil, "0.5"},
		{point, text("-.5"), nil, "-0.5"},
		{point, text("８５．３"), nil, "85.3"},
		{point, text("٨٥"), nil, "85"},
		{point, text(`="85.3"`), nil, "85.3"},
		{point, text("1234567890123.25"), nil, "1234567890123.25"},
		{comma, text("85,3"), nil, "85.3"},
		{comma, text("85"), nil, "85"},
		{comma, text("85，3"), nil, "85.3"},
		{comma, stored("85.3"), nil, "85.3"}, // numbers of a workbook have a point
		{german, text("1.234,5"), nil, "1234.5"},
		{german, text("1.234"), nil, "1234"},
		{german, text("-1.234.567,25"), nil, "-1234567.25"},
		{french, text("1 234,5"), nil, "1234.5"},
		{french, text("1\u00a0234,5"), nil, "1234.5"},
		{french, text("1\u202f234,5"), nil, "1234.5"},
		{french, text("1\u2009234,5"), nil, "1234.5"},
		{swiss, text("1'234.5"), nil, "1234.5"},
		{swiss, text("1’234.5"), nil, "1234.5"},
		{us, text("1,234.5"), nil, "1234.5"},
		{us, text("85.3"), nil, "85.3"},
		{comma, text("85,3 dBA"), []string{"dB", "dBA"}, "85.3"},
		{point, text("85 dB(A)"), []string{"dB(A)"}, "85"},
		{point, text("5dB"), []string{"dB"}, "5"},
		{point, text("5 DB"), []string{"dB"}, "5"},
		{point, stored("1.5E-3"), nil, "0.0015"},
		{point, stored("1E+2"), nil, "100"},
		{point, stored("85.299999999999997"), nil, "85.3"},
		{point, stored("0.30000000000000004"), nil, "0.3"},
		{point, stored("-0"), nil, "-0"},
		{point, stored("0.0E+00"), nil, "0"},
	} {
		got, p := c.numbers.Read(c.cell, c.units...)
		require.Nil(t, p, "%q: %v", c.cell.Text, p)
		assert.Equal(t, c.want, got, c.cell.Text)
	}
}

func TestNumbersRefused(t *testing.T) {
	for _, c := range []struct {
		numbers convert.Numbers
		cell    grid.Cell
		why     string
	}{
		{comma, text("1.234"), "between thousands or before decimals"},
		{point, text("1,234"), "between thousands or before decimals"},
		{comma, text("85.3"), "a point, but its decimal sign is stated to be a comma"},
		{point, text("85,3"), "a comma, but its decimal sign is stated to be a point"},
		{german, text("85.3"), "a point, but its decimal sign is stated to be a comma"},
		{german, text("0.123"), "a point, but its decimal sign"},
		{us, text("1,00,000"), "a comma, but"},
		{us, text("1,234,56"), "a comma, but"},
		{point, text("1 234"), "blanks or apostrophes"},
		{french, text("12 34"), "blanks or apostrophes"},
		{french, text("1 234 5"), "blanks or apostrophes"},
		{point, text("1'234"), "blanks or apostrophes"},
		{point, text("1.2.3"), "not one number"},
		{point, text("85."), "ends with its decimal sign"},
		{point, text("<80"), "a limit is no value"},
		{point, text("≥ 80"), "a limit is no value"},
		{point, text("OL"), "a limit of the instrument is no level"},
		{point, text("UR"), "a limit of the instrument is no level"},
		{point, text("Over range"), "a limit of the instrument is no level"},
		{point, text("---"), "signs only"},
		{point, text("."), "signs only"},
		{point, text("−"), "signs only"},
		{point, text("n/a"), "not a number"},
		{point, text("1O5"), "letter O"},
		{point, text("8O.5"), "letter O"},
		{point, text("62.5 %"), "percent sign"},
		{point, text("5-"), "minus stands behind"},
		{point, text("(5)"), "brackets"},
		{point, text("1.5E-3"), "scientific notation"},
		{point, text("85 dB"), "a unit or weighting that is not that of the field"},
		{point, text("85 dBC"), "a unit or weighting that is not that of the field"},
		{point, text("85 min"), "a unit or a remark"},
		{point, text("5²"), "a unit or a remark"}, // never 52
		{point, text("½"), "not a number"},
		{point, text("1e"), "a unit or a remark"},
		{point, text("0x10"), "not a number"},
		{point, text("NaN"), "not a number"},
		{point, text("- 5"), "blanks or apostrophes"},
		{point, stored("1E+300"), "too large"},
		{point, stored("NaN"), "too large or none"},
		{point, grid.Cell{Text: "2025-03-04", Kind: grid.Day}, "a date here"},
		{point, clock("0.5"), "a time here"},
		{point, grid.Cell{Text: "true", Kind: grid.Bool}, "true or false"},
		{point, grid.Cell{Text: "#DIV/0!", Kind: grid.Broken}, "error of the workbook"},
		{point, grid.Cell{Kind: grid.Uncomputed}, "a formula"},
	} {
		got, p := c.numbers.Read(c.cell)
		require.NotNil(t, p, "%q gives %s", c.cell.Text, got)
		assert.Contains(t, p.Why, c.why, c.cell.Text)
		assert.NotEmpty(t, p.Remedy)
		assert.Empty(t, got)
	}
}

// Case 19 of part B.
func TestMinutes(t *testing.T) {
	for _, c := range []struct {
		numbers convert.Numbers
		cell    grid.Cell
		unit    string
		want    string
	}{
		{point, text(""), "clock", ""},
		{point, text("465"), "minutes", "465"},
		{point, text("465 min"), "minutes", "465"},
		{comma, text("12,5"), "minutes", "12.5"},
		{point, text("7.75"), "hours", "465"},
		{comma, text("7,75 h"), "hours", "465"},
		{point, stored("7.75"), "hours", "465"},
		{point, text("7:45"), "clock", "465"},
		{point, text("07:45:00"), "clock", "465"},
		{point, text("07:45:30"), "clock", "465.5"},
		{point, text("0:00:20"), "clock", "0.3333"},
		{point, text("0:00:20.7"), "clock", "0.35"},
		{point, text("7h45"), "clock", "465"},
		{point, text("7 h 45 min"), "clock", "465"},
		{point, text("7 Std. 45 Min."), "clock", "465"},
		{point, text("7時間45分"), "clock", "465"},
		{point, text("7 h"), "clock", "420"},
		{point, text("45 min"), "clock", "45"},
		{point, text("90 min"), "clock", "90"},
		{point, text("24:00"), "clock", "1440"},
		{point, text("31:15"), "clock", "1875"},
		{point, text("0.32291667"), "day_fraction", "465"},
		{comma, text("0,32291667"), "day_fraction", "465"},
		{point, stored("0.32291666666666669"), "day_fraction", "465"},
		{point, stored("1.5"), "day_fraction", "2160"},
		{point, clock("0.32291666666666669"), "clock", "465"},
		{point, clock("0.32291666666666669"), "day_fraction", "465"},
		{point, clock("0.32291666666666669"), "hours", "465"},
		{point, clock("0.32291666666666669"), "minutes", "465"},
		{point, clock("1.25"), "clock", "1800"},
		{point, clock(""), "clock", ""},
	} {
		got, p := c.numbers.Minutes(c.cell, c.unit)
		require.Nil(t, p, "%q %s: %v", c.cell.Text, c.unit, p)
		assert.Equal(t, c.want, got, "%s %s", c.cell.Text, c.unit)
	}
	for _, c := range []struct {
		cell      grid.Cell
		unit, why string
	}{
		{text("7:45"), "minutes", "unit is not stated to be clock"},
		{text("7:45"), "hours", "unit is not stated to be clock"},
		{text("7h45"), "minutes", "other units"},
		{text("465 min"), "hours", "other units"},
		{text("465"), "clock", "not a duration in hours and minutes"},
		{text("7.75"), "clock", "not a duration in hours and minutes"},
		{text("7:5"), "clock", "not a duration"},
		{text("7.45 h"), "clock", "not a duration"},
		{text("7:45 AM"), "clock", "not a duration"},
		{text("7:75"), "clock", "60 minutes or seconds"},
		{text("7 h 90 min"), "clock", "60 minutes or seconds"},
		{text("45 min 7 h"), "clock", "not a duration"},
		{text("-7:45"), "clock", "negative"},
		{text("-5"), "minutes", "negative"},
		{clock("-0.5"), "clock", "negative"},
		{text("1e9"), "hours", "scientific"},
		{text("999999999"), "hours", "too long"},
		{text("9999999:00"), "clock", "too long"},
		{clock("465"), "minutes", "a time of a day or more"},
		{clock("7.75"), "hours", "a time of a day or more"},
		{stored("7.75"), "clock", "a plain number"},
		{grid.Cell{Text: "2025-03-04", Kind: grid.Day}, "clock", "a date here"},
		{text("---"), "minutes", "signs only"},
	} {
		got, p := point.Minutes(c.cell, c.unit)
		require.NotNil(t, p, "%q %s gives %s", c.cell.Text, c.unit, got)
		assert.Contains(t, p.Why, c.why, c.cell.Text)
		assert.NotEmpty(t, p.Remedy)
	}
}

// Case 18 of part B: 62.5 % vs 0.625 vs 625.
func TestPercent(t *testing.T) {
	for _, c := range []struct {
		numbers    convert.Numbers
		cell       grid.Cell
		unit, want string
	}{
		{point, text("62.5"), "percent", "62.5"},
		{point, text("62.5 %"), "percent", "62.5"},
		{comma, text("62,5%"), "percent", "62.5"},
		{point, text("62.5％"), "percent", "62.5"},
		{point, text("625"), "percent", "625"},
		{point, text("0.625"), "fraction", "62.5"},
		{comma, text("0,625"), "fraction", "62.5"},
		{point, text("2.124"), "fraction", "212.4"},
		{point, text("1"), "fraction", "100"},
		{point, text("0.005"), "fraction", "0.5"},
		{point, text("0"), "fraction", "0"},
		{point, text("-0.07"), "fraction", "-7"},
		{point, stored("0.57999999999999996"), "fraction", "58"}, // no binary noise
		{point, stored("0.625"), "percent", "0.625"},             // only the unit decides
		{point, text(""), "fraction", ""},
	} {
		got, p := c.numbers.Percent(c.cell, c.unit)
		require.Nil(t, p, "%q: %v", c.cell.Text, p)
		assert.Equal(t, c.want, got, c.cell.Text)
	}
	_, p := point.Percent(text("62.5 %"), "fraction")
	require.NotNil(t, p)
	assert.Contains(t, p.Why, "percent sign, but the unit of the column is stated to be fraction")
	_, p = point.Percent(text("OL"), "percent")
	require.NotNil(t, p)
}

// Case 14 of part B: frequencies as 0.5k, 1k.
func TestHertz(t *testing.T) {
	for _, c := range []struct{ cell, unit, want string }{
		{"500", "hz", "500"}, {"500", "", "500"}, {"500 Hz", "hz", "500"}, {"500Hz", "khz", "500"},
		{"0.5k", "hz", "500"}, {"0,5 kHz", "hz", "500"}, {"1K", "hz", "1000"}, {"1 kHz", "khz", "1000"},
		{"0.5", "khz", "500"}, {"1,5", "khz", "1500"}, {".75k", "", "750"}, {"8", "khz", "8000"}, {"０．５ｋ", "", "500"}, {"1000.0", "hz", "1000"}, {"", "hz", ""},
	} {
		got, p := point.Hertz(text(c.cell), c.unit)
		require.Nil(t, p, "%q: %v", c.cell, p)
		assert.Equal(t, c.want, got, c.cell)
	}
	got, p := german.Hertz(text("1.000"), "hz")
	require.Nil(t, p)
	assert.Equal(t, "1000", got)
	got, p = comma.Hertz(stored("0.5"), "khz")
	require.Nil(t, p)
	assert.Equal(t, "500", got)
	for _, c := range []struct{ cell, unit, why, remedy string }{
		{"0.5", "hz", "would be 500 Hz if it were in kHz", "khz"},
		{"500", "khz", "would be 500 Hz if it were in Hz", "hz"},
		{"5k", "hz", "none that records hold", "4000 Hz"},
		{"125", "hz", "none that records hold", "250 Hz"},
		{"12500", "hz", "none that records hold", "8000 Hz"},
		{"5oo", "hz", "not a frequency", "500"},
		{"left", "hz", "not a frequency", ""},
	} {
		got, p := point.Hertz(text(c.cell), c.unit)
		require.NotNil(t, p, "%q gives %s", c.cell, got)
		assert.Contains(t, p.Why, c.why, c.cell)
		assert.Contains(t, p.Remedy, c.remedy, c.cell)
	}
}

func TestNumbersAllocateNothing(t *testing.T) {
	n, plain, whole := point, text("85.3"), stored("85.3")
	assert.Zero(t, testing.AllocsPerRun(100, func() {
		_, _ = n.Read(plain, "dB")
		_, _ = n.Read(whole)
	}))
}
