package intake

import (
	"bytes"
	"path/filepath"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/record"
)

// The cases of exports are read with codes as without: the same rows become records, and the same are rejected. No id
// that stands in a record comes out of the ledger.
func TestVeiledCases(t *testing.T) {
	folders, err := filepath.Glob("../../testdata/intake/*/program.yaml")
	require.NoError(t, err)
	require.Greater(t, len(folders), 20)
	all := 0
	for _, file := range folders {
		p, problems := program.Load(file)
		if problems.Failed() {
			continue
		}
		ids := map[string]bool{}
		plain, _ := Read(t.Context(), p, func(r record.Record) error { keepIDs(ids, r, hasDigit); return nil })
		veil, err := pseudonym.New([]byte("a key for tests, of which everybody knows"))
		require.NoError(t, err)
		codes := map[string]bool{}
		veiled, _ := ReadVeiled(t.Context(), p, veil, func(r record.Record) error { keepIDs(codes, r, isCode); return nil })
		assert.Equal(t, plain.Inputs, veiled.Inputs, file)
		assert.Equal(t, plain.Observations, veiled.Observations, file)
		assert.Equal(t, placesOf(plain), placesOf(veiled), file)
		assert.Len(t, veiled.Unreadable, len(plain.Unreadable), file)
		assert.GreaterOrEqual(t, len(codes), len(ids), "%s: some ids have no code of their own", file)
		var book bytes.Buffer
		require.NoError(t, veiled.WriteBook(&book, p.Title))
		for _, in := range veiled.Inputs { // names of files stay
			book = *bytes.NewBuffer(bytes.ReplaceAll(book.Bytes(), []byte(in.File), nil))
		}
		words := map[string]bool{}
		for word := range strings.FieldsFuncSeq(book.String(), func(c rune) bool { return c != '-' && !unicode.IsLetter(c) && !unicode.IsDigit(c) }) {
			words[word] = true
		}
		for id := range ids {
			all++
			assert.False(t, codes[id], "%s: the id %s was kept", file, id)
			if strings.ContainsFunc(id, unicode.IsLetter) && strings.ContainsFunc(id, unicode.IsDigit) || len(id) > 5 {
				assert.False(t, words[id], "%s: the ledger shows %s", file, id)
			}
		}
	}
	require.Greater(t, all, 500)
}

func hasDigit(s string) bool { return strings.ContainsFunc(s, unicode.IsDigit) }

func isCode(s string) bool { return len(s) == 11 && strings.ToUpper(s) == s }

// keepIDs keeps the ids of a record, as keep tells them from words.
func keepIDs(ids map[string]bool, r record.Record, keep func(string) bool) {
	table, _ := record.TableOf(r.Kind())
	for i := range table.Fields {
		if text := table.Text(r, i); pseudonym.Covers(table.Fields[i].Name) && keep(text) {
			ids[table.Fields[i].Name+" "+text] = true
			ids[text] = true
		}
	}
}

func placesOf(l *Ledger) []Place {
	var out []Place
	for _, r := range l.Rejects {
		out = append(out, Place{r.File, r.Sheet, r.Row})
	}
	return out
}
