package draft

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// Spellings: the shapes of exports in engineering/ecosystem.md, B1 and B2; further ones common practice, no source.
func TestParseTone(t *testing.T) {
	for name, want := range map[string]tone{
		"R500":                   {ear: "r", hz: 500},
		"500R":                   {ear: "r", hz: 500},
		"RE_500":                 {ear: "right", hz: 500},
		"Right 500":              {ear: "right", hz: 500},
		"Right_0.5k":             {ear: "right", hz: 500},
		"R 0.5 kHz":              {ear: "r", hz: 500},
		"R 0,5 kHz":              {ear: "r", hz: 500},
		"R_1K":                   {ear: "r", hz: 1000},
		"R.5":                    {ear: "r", hz: 500, kilo: true},
		"L4":                     {ear: "l", hz: 4000, kilo: true},
		"OD500":                  {ear: "right", hz: 500},
		"OG 4000 Hz":             {ear: "left", hz: 4000},
		"DX 2000":                {ear: "right", hz: 2000},
		"SX2000":                 {ear: "left", hz: 2000},
		"rechts 3000":            {ear: "right", hz: 3000},
		"Linkes Ohr 3 kHz":       {ear: "left", hz: 3000},
		"右500":                   {ear: "right", hz: 500},
		"左耳 4000Hz":              {ear: "left", hz: 4000},
		"AUXU1K1R":               {ear: "r", hz: 1000, reading: 1},
		"AUXU1K2L":               {ear: "l", hz: 1000, reading: 2},
		"AUXU500R":               {ear: "r", hz: 500},
		"AUXU2KR":                {ear: "r", hz: 2000},
		"BL_R2000":               {ear: "r", hz: 2000, part: "baseline"},
		"CURL4000":               {ear: "l", hz: 4000, part: "current"},
		"R1000 retest":           {ear: "r", hz: 1000, reading: 2},
		"left.500":               {ear: "left", hz: 500},
		"Höger 6000":             {ear: "right", hz: 6000},
		"højre 1500":             {ear: "right", hz: 1500},
		"Ucho prawe 750":         {ear: "right", hz: 750},
		"1000 Hz":                {hz: 1000},
		"BC R 500":               {ear: "r", hz: 500, bone: true},
		"Right Ear Air 8000 Hz":  {ear: "right", hz: 8000},
		"R12500":                 {ear: "r", hz: 12500},
		"HTL_R_500":              {ear: "r", hz: 500},
		"ouvido esquerdo 250 Hz": {ear: "left", hz: 250},
	} {
		got, ok := parseTone(name)
		assert.True(t, ok, name)
		assert.Equal(t, want, got, name)
	}
	for _, name := range []string{"", "R", "Right", "Total 500", "R500 shift", "R555", "Age at 500", "TWA 8h", "R500L", "Left Right 500", "STS_R", "R5000000000000000000000", "Shift 2", "1000 2000"} {
		_, ok := parseTone(name)
		assert.False(t, ok, name)
	}
}

func TestSettleLetters(t *testing.T) {
	for _, c := range []struct{ letters, right, left string }{
		{"r l", "r", "l"}, {"d g", "d", "g"}, {"d s", "d", "s"}, {"d i", "d", "i"}, {"d e", "d", "e"}, {"h v", "h", "v"}, {"p l", "p", "l"},
	} {
		assert.Equal(t, map[string]string{c.right: "right", c.left: "left"}, settleLetters(words(c.letters)), c.letters)
	}
	assert.Equal(t, map[string]string{"r": "right"}, settleLetters(words("r")))
	for _, letters := range []string{"", "l", "s l", "r d", "r l d", "h l"} {
		assert.Nil(t, settleLetters(words(letters)), letters)
	}
}

func TestSplitPart(t *testing.T) {
	for _, c := range []struct{ name, part, rest string }{
		{"BL_Date", "baseline", "date"}, {"Date baseline", "baseline", "date"}, {"CUR_Date", "current", "date"},
		{"Test date", "", "Test date"}, {"Baseline", "", "Baseline"},
	} {
		part, rest := splitPart(c.name)
		assert.Equal(t, [2]string{c.part, c.rest}, [2]string{part, rest}, c.name)
	}
}
