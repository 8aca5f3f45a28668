package xlsx

import (
	"bytes"
	"math"
	"strconv"
	"strings"
	"testing"
	"unicode"
	"unicode/utf16"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
	"hearduty/internal/report/reporttest"
)

// Whatever a text holds, it comes back as a text, and no cell is a formula (OWASP, CSV injection: a formula begins
// with = + - @, tab or carriage return).
func TestTextsComeBackAsTexts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		odd := rapid.StringOf(rapid.OneOf(rapid.RuneFrom([]rune("=+-@\t\r\n '\"&<>_x0041;\x00\x1b\u00a0\u3000\ufffe")), rapid.Rune()))
		r := reporttest.Odd()
		r.Program, r.Findings, r.Duties = odd.Draw(t, "program"), r.Findings[:1], nil
		f := &r.Findings[0]
		f.Subject.ID, f.Message, f.Cite, f.Site, f.Status, f.Bundle = odd.Draw(t, "id"), odd.Draw(t, "message"), odd.Draw(t, "cite"), odd.Draw(t, "site"), finding.Status(odd.Draw(t, "status")), "b"
		f.Facts = map[string]any{"name": odd.Draw(t, "value")}
		f.Evidence = []finding.Evidence{{Record: odd.Draw(t, "record"), File: odd.Draw(t, "file"), Row: 1}}
		r.Rejects[0].Read, r.Inputs[0].File = odd.Draw(t, "read"), odd.Draw(t, "input")
		var b bytes.Buffer
		require.NoError(t, Format{}.Write(&b, r))
		for name, part := range unzipped(t, b.Bytes()) {
			require.NotRegexp(t, `<f[ >/]`, part, name)
		}
		book := opened(t, b.Bytes())
		_, rows := read(t, book, "Register", false)
		require.Len(t, rows, 1)
		for column, want := range map[string]string{"Subject": f.Subject.ID, "Paragraph": f.Cite, "Site": f.Site, "Status": string(f.Status)} {
			require.Equal(t, phrase.Clean(want), rows[0][column], column)
		}
		_, rows = read(t, book, "Rejects", false)
		require.Equal(t, phrase.Clean(r.Rejects[0].Read), rows[0]["Read"])
		for _, row := range rows {
			for _, text := range row {
				require.False(t, strings.ContainsFunc(text, unicode.IsControl), "%q", text)
			}
		}
	})
}

func TestFormulasStayTexts(t *testing.T) {
	texts := []string{"=1+1", "+1", "-1", "@SUM(A1)", "\t=1", "\r=1", "=cmd|' /C calc'!A0", "000123", "1e5", "TRUE", "2026-01-02", "_x0041_", "_x005F_", " a "}
	r := sample()
	r.Rejects = nil
	for _, text := range texts {
		r.Rejects = append(r.Rejects, finding.Reject{File: text, Read: text})
	}
	f := opened(t, reporttest.Written(t, Format{}, r))
	for i, text := range texts {
		for _, column := range []string{"A", "G"} {
			name := column + strconv.Itoa(i+2)
			got, err := f.GetCellValue("Rejects", name)
			require.NoError(t, err)
			assert.Equal(t, phrase.Clean(text), got)
			assert.Equal(t, "text", kindOf(t, f, "Rejects", name), text)
			formula, err := f.GetCellFormula("Rejects", name)
			require.NoError(t, err)
			assert.Empty(t, formula)
		}
	}
}

func units(s string) int { return len(utf16.Encode([]rune(s))) }

// A cell holds 32,767 units of UTF-16 and 253 line breaks (limits of the file format's programs).
func TestLongTextsAreCutWithANote(t *testing.T) {
	for _, c := range []struct {
		text string
		cut  bool
	}{
		{strings.Repeat("a", 32767), false}, {strings.Repeat("a", 32768), true}, {strings.Repeat("é", 32767), false}, {strings.Repeat("é", 32768), true},
		{strings.Repeat("🦻", 16383), false}, {strings.Repeat("🦻", 16384), true}, {strings.Repeat("作", 40000), true},
	} {
		got := clean(c.text)
		assert.LessOrEqual(t, units(got), 32767)
		assert.Equal(t, c.cut, strings.HasSuffix(got, cutNote))
		if !c.cut {
			assert.Equal(t, c.text, got)
			continue
		}
		kept := strings.TrimSuffix(got, cutNote)
		assert.True(t, strings.HasPrefix(c.text, kept))
		assert.GreaterOrEqual(t, units(got), 32766, "no more is cut than need be")
	}
	r := sample()
	r.Findings[0].Message = strings.Repeat("🦻 long ", 9000)
	for range 3000 {
		r.Findings[0].Evidence = append(r.Findings[0].Evidence, finding.Evidence{Record: "audiogram/A-00000001", File: "records/audiograms.csv", Row: 123456})
	}
	_, rows := read(t, opened(t, reporttest.Written(t, Format{}, r)), "Register", false)
	for _, column := range []string{"Finding", "Evidence"} {
		cell := rows[0][column]
		assert.True(t, strings.HasSuffix(cell, cutNote), column)
		assert.LessOrEqual(t, units(cell), 32767)
		assert.LessOrEqual(t, strings.Count(cell, "\n"), 253)
	}
}

// Programs disagree on the number of days before March 1900 (some hold 1900 for a leap year), so those are texts.
func TestDays(t *testing.T) {
	var s styles
	for day, want := range map[string]any{"1900-03-01": 61, "1983-04-07": 30413, "2026-06-30": 46203, "9999-12-31": 2958465, "1900-02-28": "1900-02-28", "0001-01-01": "0001-01-01"} {
		assert.Equal(t, want, s.dayCell(calendar.MustParse(day)).Value, day)
	}
	assert.Nil(t, s.dayCell(0).Value)
	assert.Equal(t, "soon", dayOf("soon"))
}

// Text of less than 24 px wants a contrast of 4.5 to 1 (WCAG 2.2, 1.4.3).
func TestColoursCanBeRead(t *testing.T) {
	for _, status := range finding.Statuses {
		c := colours[status]
		assert.GreaterOrEqual(t, contrast(c.ink, c.ground), 4.5, status)
	}
	assert.GreaterOrEqual(t, contrast(ink, faint), 4.5)
	assert.GreaterOrEqual(t, contrast(soft, "ffffff"), 4.5)
}

// contrast gives the contrast of two colours (WCAG 2.2, definition of contrast ratio).
func contrast(a, b string) float64 {
	light := func(colour string) float64 {
		sum := 0.0
		for i, weight := range []float64{0.2126, 0.7152, 0.0722} {
			n, _ := strconv.ParseUint(colour[2*i:2*i+2], 16, 8)
			v := float64(n) / 255
			if v <= 0.04045 {
				v /= 12.92
			} else {
				v = math.Pow((v+0.055)/1.055, 2.4)
			}
			sum += weight * v
		}
		return sum + 0.05
	}
	return max(light(a)/light(b), light(b)/light(a))
}

func TestLinesOfATextAreGuessed(t *testing.T) {
	for _, c := range []struct {
		text  string
		width float64
		lines int
	}{
		{"", 10, 1}, {"short", 10, 1}, {"two words here", 8, 3}, {"a\nb", 10, 2}, {strings.Repeat("0", 45), 10, 5}, {strings.Repeat("作", 9), 10, 2},
	} {
		assert.Equal(t, c.lines, linesOf(c.text, c.width), c.text)
	}
}

func TestWhatAValueWasCheckedAgainstIsSaid(t *testing.T) {
	_, law := factsOf(map[string]any{"a_limit": map[string]any{"value": 90.0, "unit": "dBA", "cite": "(b)", "seen": "secondary"}, "b": map[string]any{"value": nil, "seen": "memory"}})
	assert.Equal(t, list{"a limit: 90 dBA, (b) (read in a secondary source, not in the official text)", "b: not known (not checked against the official text)"}, law)
	assert.Equal(t, []string{"read in the official text", "hearsay"}, []string{seenWords("text"), seenWords("hearsay")})
}

func TestMarginsHoldNoCommands(t *testing.T) {
	assert.Equal(t, "A &&P B", marginal("A &P B", 20))
	assert.Equal(t, "a&&…", marginal("a&&&", 4))
	assert.Equal(t, " 12 tons", marginal("12 tons", 20), "behind a command a digit would be a size of letters")
	assert.Equal(t, "abcde…", marginal("abcdefgh", 5))
	r := sample()
	r.Program, r.Cautions = strings.Repeat("&", 400), []string{strings.Repeat("&", 400)}
	reporttest.Written(t, Format{}, r)
}
