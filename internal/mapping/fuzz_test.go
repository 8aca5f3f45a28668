package mapping_test

import (
	"errors"
	"io"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/rogpeppe/go-internal/txtar"
	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// FuzzLoad checks that no map makes Load panic, and that everything it says has a place within the map.
func FuzzLoad(f *testing.F) {
	paths, err := filepath.Glob(filepath.Join("testdata", "*.txtar"))
	require.NoError(f, err)
	for _, path := range paths {
		a, err := txtar.ParseFile(path)
		require.NoError(f, err)
		f.Add(string(a.Files[0].Data))
	}
	for _, text := range []string{"map: x\nfields: {a: &a {make: [a]}, b: *a}\n", "? [a]\n: b\n", "map: é\nkind: \"Ü\"\n", "a: !!binary x\n", "map: |\n  x\nrows: {only: [{is: [~]}]}\n", "map: x\nformat: fhir\nfhir: {constants: {left: 5, date: x}}\n"} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		m, problems := load(t, text)
		require.Equal(t, problems.Failed(), m == nil)
		lines := strings.Split(strings.NewReplacer("\r\n", "\n", "\r", "\n", "\u0085", "\n", "\u2028", "\n", "\u2029", "\n").Replace(text), "\n")
		for _, d := range problems {
			at := d.Position
			require.Equal(t, "m.yaml", at.File)
			require.NotEmpty(t, d.Problem)
			require.LessOrEqual(t, at.Line, len(lines)+1, "%s", d)
			if at.Column > 0 {
				require.Positive(t, at.Line)
				require.LessOrEqual(t, at.Column, utf8.RuneCountInString(lines[at.Line-1])+1, "%s", d)
			}
		}
	})
}

// FuzzHeader checks on any text that the header found holds the column that the map names, that every row comes
// once and in order, and that values are of the columns named.
func FuzzHeader(f *testing.F) {
	f.Add("ID,Date\n1,2025-03-04\n", "id", 1, false)
	f.Add("a,,b,\nID,Date,ID,Date\n1,2,3,4\n", "b ID", 2, false)
	f.Add("ID,1,2\nDate,,2025-03-04\n", "ID", 1, true)
	f.Add("x\n\nID;\xc3\x89\n\"1\n", "é", 1, false)
	f.Fuzz(func(t *testing.T, text, name string, rows int, transposed bool) {
		if strings.TrimSpace(name) == "" {
			return
		}
		m := &mapping.Map{Kind: "training", File: mapping.File{Fields: map[string]mapping.Column{
			"worker_id": {Column: mapping.Names{name}}, "date": {Constant: "2025-03-04"},
		}}}
		switch {
		case transposed:
			m.File.Head = &mapping.Head{Transposed: true}
		case rows == 2:
			m.File.Head = &mapping.Head{Rows: 2}
		}
		s, _, err := m.Bind(export(t, "t.csv", text), "training")
		if err != nil {
			var fault *grid.Fault
			require.True(t, errors.As(err, &fault), "%v", err)
			require.NotEmpty(t, fault.Remedy)
			return
		}
		table, _ := record.TableOf("training")
		var o mapping.Out
		last, column := 0, 0
		for err = s.Next(&o); err == nil; err = s.Next(&o) {
			require.Greater(t, o.Line, last)
			last = o.Line
			for _, e := range o.Records {
				for _, v := range e.Values {
					if v.Field == table.Index("worker_id") {
						require.True(t, column == 0 || column == v.Column)
						column = v.Column
						require.NotEmpty(t, s.(interface{ Header(int) string }).Header(column))
					}
				}
			}
		}
		if err != io.EOF {
			var fault *grid.Fault
			require.True(t, errors.As(err, &fault), "%v", err)
		}
	})
}
