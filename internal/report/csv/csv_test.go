package csv

import (
	"bytes"
	"encoding/csv"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

// read reads the file back, a map of cells a row.
func read(t require.TestingT, text []byte) (head []string, rows []map[string]string) {
	rest, ok := bytes.CutPrefix(text, []byte("\ufeff"))
	require.True(t, ok, "no byte order mark")
	require.Equal(t, bytes.Count(rest, []byte("\n")), bytes.Count(rest, []byte("\r\n")))
	all, err := csv.NewReader(bytes.NewReader(rest)).ReadAll()
	require.NoError(t, err)
	for _, cells := range all[1:] {
		row := map[string]string{}
		for i, cell := range cells {
			row[all[0][i]] = cell
		}
		rows = append(rows, row)
	}
	return all[0], rows
}

func TestARowForEachFinding(t *testing.T) {
	for name, r := range map[string]*finding.Report{"odd": reporttest.Odd(), "empty": reporttest.Empty(), "demo": reporttest.Demo(t, false)} {
		head, rows := read(t, reporttest.Written(t, Format{}, r))
		assert.Equal(t, []string{"id", "site", "bundle", "topic", "duty", "title", "subject_kind", "subject", "status", "accepted", "accepted_until",
			"severity", "due", "done", "days_over", "message", "cite", "remedy", "facts", "parameters", "evidence", "as_of", "caution"}, head)
		require.Len(t, rows, len(r.Findings), name)
		for i, f := range r.Findings {
			assert.Equal(t, f.ID, rows[i]["id"])
			assert.Equal(t, string(f.Status), rows[i]["status"])
			assert.Contains(t, rows[i]["caution"], "reading of the law")
		}
	}
}

func TestCells(t *testing.T) {
	_, rows := read(t, reporttest.Written(t, Format{}, reporttest.Odd()))
	for column, want := range map[string]string{
		"title": "Annual audiogram", "subject": "000987", "status": "gap", "accepted": "yes", "accepted_until": "2026-08-31", "due": "2026-06-29", "done": "", "days_over": "1",
		"facts": "time counted from 2025-07-15", "parameters": "audiogram interval 12 months (29 CFR 1910.95(g)(6))",
		"evidence": "audiogram/A-0977 exports/Prüfungen #2, 100%?.csv:544", "remedy": `'@do <it> now; "please".`,
	} {
		assert.Equal(t, want, rows[1][column], column)
	}
	assert.Equal(t, "protector_issue/2 records/issues.xlsx Year 2026!7; protector/3 clinic.zip/out/protectors.json:3", rows[2]["evidence"])
	assert.Equal(t, []string{"yes", ""}, []string{rows[7]["accepted"], rows[7]["accepted_until"]}, "accepted without an end")
}

func TestGuard(t *testing.T) {
	for text, guarded := range map[string]bool{
		"": false, "K-1": false, "a=b": false, "29 CFR": false, "é": false,
		"=1": true, "+1": true, "-1": true, "@x": true, " =1": true, "\u00a0=1": true, "'=1": true, "＝1": true, "\uFFFD=1": true,
	} {
		assert.Equal(t, guarded, guard(text) == "'"+text, "%q", text)
	}
}

// dangerous says whether a spreadsheet program could take a cell for a formula, whatever blank or control
// character goes before it (OWASP, CSV injection: = + - @, tab and carriage return).
func dangerous(cell string) bool {
	cell = strings.TrimLeftFunc(cell, func(c rune) bool { return unicode.IsSpace(c) || unicode.IsControl(c) })
	return cell != "" && strings.Contains("=+-@", cell[:1])
}

func TestNoCellIsAFormulaOrHasALineBreak(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		odd := rapid.StringOf(rapid.OneOf(rapid.RuneFrom([]rune("=+-@\t\r\n '\",;\x00\x1b\u00a0\u3000")), rapid.Rune()))
		r := reporttest.Odd()
		r.Findings = r.Findings[:1]
		f := &r.Findings[0]
		f.Subject.ID, f.Message, f.Remedy, f.Cite, f.Site = odd.Draw(t, "id"), odd.Draw(t, "message"), odd.Draw(t, "remedy"), odd.Draw(t, "cite"), odd.Draw(t, "site")
		f.Facts = map[string]any{odd.Draw(t, "name"): odd.Draw(t, "value")}
		f.Evidence = []finding.Evidence{{Record: odd.Draw(t, "record"), File: odd.Draw(t, "file"), Row: 1}}
		var b bytes.Buffer
		require.NoError(t, Format{}.Write(&b, r))
		_, rows := read(t, b.Bytes())
		require.Len(t, rows, 1)
		for name, cell := range rows[0] {
			require.False(t, dangerous(cell), "%s: %q", name, cell)
			require.False(t, strings.ContainsFunc(cell, unicode.IsControl), "%s: %q", name, cell)
		}
	})
}

func TestHealthHasAColumnOnlyIfTheReportHasIt(t *testing.T) {
	head, _ := read(t, reporttest.Written(t, Format{}, reporttest.Odd()))
	assert.NotContains(t, head, "health")
	_, rows := read(t, reporttest.Written(t, Format{}, reporttest.WithHealth()))
	assert.Equal(t, "left 11.7 dB; working left: (20 + 25 + 25) / 3 = 23.3 dB", rows[0]["health"])
	assert.Empty(t, rows[1]["health"])
}

// A cell of a workbook holds 32,767 characters.
func TestEvidenceFitsACell(t *testing.T) {
	r := reporttest.Odd()
	for range 2000 {
		r.Findings[0].Evidence = append(r.Findings[0].Evidence, finding.Evidence{Record: "audiogram/A-00000001", File: "records/audiograms.csv", Row: 123456})
	}
	_, rows := read(t, reporttest.Written(t, Format{}, r))
	cell := rows[0]["evidence"]
	assert.Less(t, len(cell), 32767)
	assert.Regexp(t, `:123456; and \d+ more records$`, cell)
}
