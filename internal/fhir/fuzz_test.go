package fhir

import (
	"errors"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// account reads a file and checks that every resource is accounted for exactly once, and that what was refused is
// said in whole sentences. It gives the number of records.
func account(t *testing.T, text, name string, f mapping.File) (records int) {
	t.Helper()
	table, _ := record.TableOf("audiogram")
	file := strings.NewReader(text)
	source, err := Open(file, name, &mapping.Map{File: f}, table)
	var refused *grid.Fault
	if err != nil {
		require.True(t, errors.As(err, &refused), "%v", err)
		sentence(t, refused.Problem, refused.Remedy)
		return 0
	}
	seen := map[int]bool{}
	for {
		var o mapping.Out
		err := source.Next(&o)
		if err == io.EOF {
			break
		}
		require.NoError(t, err, "the first reading found nothing wrong with the file")
		for _, line := range append([]int{o.Line}, o.Lines...) {
			require.Positive(t, line)
			require.False(t, seen[line], "resource %d is accounted for twice", line)
			seen[line] = true
		}
		ways := len(o.Records)
		if o.NotData != "" {
			ways++
		}
		if o.Fault != nil {
			ways++
			sentence(t, o.Fault.Why, o.Fault.Remedy)
		}
		require.Equal(t, 1, ways)
		for _, m := range o.Remarks {
			sentence(t, m.Why, m.Remedy)
		}
		for _, e := range o.Records {
			records++
			rec := table.New()
			for _, v := range e.Values {
				if p := table.Set(rec, v.Field, v.Text); p != nil {
					require.NotContains(t, []string{"left", "righ"}, (table.Fields[v.Field].Name + "    ")[:4], "%v", p)
				}
			}
		}
	}
	items, err := openItems(strings.NewReader(text), source.(interface{ shape() form }).shape())
	require.NoError(t, err)
	for n := 0; ; n++ {
		i, err := items.next()
		if err == io.EOF {
			require.Len(t, seen, n)
			return records
		}
		require.NoError(t, err)
		require.True(t, seen[i.line], "resource %d was lost", i.line)
	}
}

func (s *source) shape() form { return s.form }

func sentence(t *testing.T, texts ...string) {
	t.Helper()
	for _, text := range texts {
		require.NotEmpty(t, text)
		require.False(t, strings.HasSuffix(text, "."), text)
		require.Less(t, len(text), 1000, text)
	}
}

func FuzzFHIR(f *testing.F) {
	files, err := filepath.Glob(filepath.FromSlash("../../testdata/intake/fhir_*/*json"))
	require.NoError(f, err)
	for _, file := range files {
		text, err := os.ReadFile(file)
		require.NoError(f, err)
		f.Add(string(text), strings.HasSuffix(file, ".ndjson"))
	}
	l := toneText("l", "89024-4", level("10"), "")
	for _, text := range []string{
		bundleOf(worker7, l),
		bundleOf(l, l, worker7, panelText("A1", members("hasMember", "Observation/l", "Observation/A1", "#x"))),
		bundleOf("urn:uuid:1 "+worker7, "https://a.example/fhir/Observation/l "+l, reportText("R1", "final", members("result", "https://a.example/fhir/Observation/l"))),
		panelText("A1", `, "component": [`+component("89024-4", `"dataAbsentReason": {"coding": [{"code": "not-performed"}]}`)+`], "contained": [`+worker7+`]`),
		joined(worker7) + "\n" + joined(l) + "\n{",
	} {
		f.Add(text, false)
		f.Add(text, true)
	}
	f.Fuzz(func(t *testing.T, text string, bulk bool) {
		name := "a.json"
		if bulk {
			name = "a.ndjson"
		}
		account(t, text, name, wordsMap)
	})
}
