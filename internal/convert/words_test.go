package convert_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// Cases 1 and 2 of part B.
func TestID(t *testing.T) {
	for _, c := range []struct {
		id   convert.ID
		cell grid.Cell
		want string
	}{
		{convert.ID{}, text(""), ""},
		{convert.ID{Prefix: "X-", Pad: 3}, text(" \u00a0"), ""},
		{convert.ID{}, text("000123"), "000123"},
		{convert.ID{}, text(" \u00a0000123\u00a0 "), "000123"},
		{convert.ID{}, text("\ufeff０００１２３\u200b"), "000123"},
		{convert.ID{}, text(`="000123"`), "000123"},
		{convert.ID{}, text("AB\u00a012"), "AB 12"},
		{convert.ID{}, text("Zu\u0308-7"), "Zü-7"},
		{convert.ID{}, text("12E5"), "12E5"},
		{convert.ID{Pad: 6}, text("123"), "000123"},
		{convert.ID{Pad: 6}, stored("123"), "000123"},
		{convert.ID{Pad: 6}, text("1234567"), "1234567"},
		{convert.ID{Pad: 6}, text("A123"), "A123"},
		{convert.ID{Case: "upper"}, text("aus-00123k"), "AUS-00123K"},
		{convert.ID{Case: "lower"}, text("AUS-1"), "aus-1"},
		{convert.ID{Strip: []string{"AUS-"}}, text("AUS-00123"), "00123"},
		{convert.ID{Strip: []string{"AUS-"}}, text("aus-00123"), "aus-00123"},
		{convert.ID{Strip: []string{"AUS-"}, Case: "lower"}, text("Aus-00123"), "00123"},
		{convert.ID{Strip: []string{"A", "AUS-"}, Pad: 6, Prefix: "GER-"}, text("AUS- 123"), "GER-000123"},
		{convert.ID{}, stored("123456789012345"), "123456789012345"},
	} {
		got, p := c.id.Read(c.cell)
		require.Nil(t, p, "%q: %v", c.cell.Text, p)
		assert.Equal(t, c.want, got, c.cell.Text)
	}
	for _, c := range []struct {
		cell grid.Cell
		why  string
	}{
		{stored("1.23E+05"), "scientific notation or with a fraction"},
		{stored("123.5"), "scientific notation or with a fraction"},
		{stored("1234567890123456"), "more than 15 digits"},
		{text("1.23E+05"), "scientific notation"},
		{text("1,23e+05"), "scientific notation"},
		{grid.Cell{Text: "2025-03-04", Kind: grid.Day}, "a date or time"},
		{clock("0.5"), "a date or time"},
		{grid.Cell{Text: "true", Kind: grid.Bool}, "true or false"},
		{grid.Cell{Text: "#REF!", Kind: grid.Broken}, "error of the workbook"},
		{text("AUS-"), "nothing but a beginning"},
	} {
		got, p := (&convert.ID{Strip: []string{"AUS-"}}).Read(c.cell)
		require.NotNil(t, p, "%q gives %s", c.cell.Text, got)
		assert.Contains(t, p.Why, c.why, c.cell.Text)
		assert.NotEmpty(t, p.Remedy)
	}
}

// Case 23 of part B: headers that differ by case, blanks, signs or accents only.
func TestFold(t *testing.T) {
	for _, c := range []struct{ text, want string }{
		{"", ""},
		{"TestDate", "testdate"},
		{" Test_Date ", "test date"},
		{"test  DATE:", "test date"},
		{"Test\u00a0Date", "test date"},
		{"Ｔｅｓｔ　Ｄａｔｅ", "test date"},
		{"Prüfdatum", "prufdatum"},
		{"Pru\u0308fdatum", "prufdatum"},
		{"Straße / STRASSE", "strasse strasse"},
		{"Größe", "grosse"},
		{"N° d'employé", "n d employe"},
		{"İşçi Nº", "isci no"},
		{"ILIK ılık", "ilik ilik"},
		{"Ærø łódź", "aero lodz"},
		{"Œuvre Đuro þing ðe", "oeuvre duro thing de"},
		{"ΆΣΟΣ", "ασοσ"},
		{"右 500", "右 500"},
		{"右500", "右500"},
		{"ガード", "ガード"}, // in kana the accent makes another letter
		{"ｶﾞｰﾄﾞ", "ガード"},
		{"Чей", "чей"},
		{"กุมภาพันธ์", "กุมภาพันธ์"},
		{"R.500", "r 500"},
		{"L-500", "l 500"},
		{"0.5k", "0.5k"},
		{"0.5 kHz", "0.5 khz"},
		{"0,5 kHz", "0.5 khz"},
		{".5k", "0.5k"},
		{"5k", "5k"},
		{"TWA (dBA)", "twa dba"},
		{"Dose %", "dose"},
		{"-99", "-99"},
		{"−99", "-99"},
		{"<80", "<80"},
		{">=100", ">=100"},
		{" - 5", "5"},
		{"+", "+"},
		{"♀", "♀"},
		{" - - ", "- -"},
		{"a\u200bb\u00adc", "abc"},
		{"500\nHz", "500 hz"},
	} {
		assert.Equal(t, c.want, convert.Fold(c.text), "%q", c.text)
	}
}

// Case 16 of part B: what a code means is a matter of the table only.
func TestWords(t *testing.T) {
	french, p := convert.NewWords(map[string]string{"H": "male", "F": "female", "Féminin": "female", "1": "male", "+": "yes", "-": "no", "N/A": ""})
	require.Nil(t, p)
	for cell, want := range map[string]string{"H": "male", "h": "male", " f\u00a0": "female", "feminin": "female", "FÉMININ": "female", "１": "male", "+": "yes", "−": "no", "n/a": ""} {
		got, ok := french.Find(text(cell))
		assert.True(t, ok, cell)
		assert.Equal(t, want, got, cell)
	}
	for _, cell := range []string{"", "M", "H?", "-1", "1.5", "2", "na", "X"} { // near is not the same
		_, ok := french.Find(text(cell))
		assert.False(t, ok, cell)
	}
	got, ok := french.Find(stored("1"))
	assert.True(t, ok)
	assert.Equal(t, "male", got)
	_, ok = french.Find(grid.Cell{Text: "H", Kind: grid.Broken})
	assert.False(t, ok)

	_, p = convert.NewWords(map[string]string{"m": "male", "M": "female"})
	require.NotNil(t, p)
	assert.Contains(t, p.Why, "the words M and m are the same")
	_, p = convert.NewWords(map[string]string{"m": "male", "M": "male"})
	assert.Nil(t, p)
	blank, p := convert.NewWords(map[string]string{"": "no"})
	require.Nil(t, p)
	got, ok = blank.Find(text(" "))
	assert.True(t, ok)
	assert.Equal(t, "no", got)
}
