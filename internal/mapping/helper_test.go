package mapping_test

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// load reads a map of which the text is given.
func load(t testing.TB, text string) (*mapping.Map, diag.List) {
	t.Helper()
	path := filepath.Join(t.TempDir(), "m.yaml")
	require.NoError(t, os.WriteFile(path, []byte(text), 0o600))
	return mapping.Load(path, "m.yaml")
}

// good reads a map that must have nothing wrong.
func good(t testing.TB, text string) *mapping.Map {
	t.Helper()
	m, problems := load(t, text)
	require.NoError(t, problems.Err())
	return m
}

// export writes a file and opens it.
func export(t testing.TB, name, text string) *grid.File {
	t.Helper()
	path := filepath.Join(t.TempDir(), name)
	require.NoError(t, os.WriteFile(path, []byte(text), 0o600))
	return opened(t, path)
}

func opened(t testing.TB, path string) *grid.File {
	t.Helper()
	f, err := grid.Open(path, "")
	require.NoError(t, err)
	t.Cleanup(func() { require.NoError(t, f.Close()) })
	return f
}

// read maps a file and tells what became of each row.
func read(t testing.TB, m *mapping.Map, f *grid.File) string {
	t.Helper()
	s, warnings, err := m.Bind(f, m.Kind)
	var b strings.Builder
	for _, d := range warnings {
		fmt.Fprintf(&b, "%s\n", d)
	}
	if err != nil {
		b.WriteString("refused" + refusal(t, err))
		return b.String()
	}
	table, _ := record.TableOf(m.Kind)
	var o mapping.Out
	for {
		switch err := s.Next(&o); {
		case err == io.EOF:
			require.Equal(t, io.EOF, s.Next(&o), "the end stays the end")
			return b.String()
		case err != nil:
			b.WriteString("broken" + refusal(t, err))
			return b.String()
		}
		tell(t, &b, table, &o)
	}
}

func refusal(t testing.TB, err error) string {
	t.Helper()
	var f *grid.Fault
	require.True(t, errors.As(err, &f), "%v is no fault", err)
	require.NotEmpty(t, f.Problem)
	require.NotEmpty(t, f.Remedy)
	at := ""
	if f.Line > 0 {
		at = fmt.Sprintf(" %d:%d", f.Line, f.Column)
	}
	return fmt.Sprintf("%s: %s. %s.\n", at, f.Problem, f.Remedy)
}

// tell writes one Out as a line, and checks that it is one of the three things that it can be.
func tell(t testing.TB, b *strings.Builder, table *record.Table, o *mapping.Out) {
	t.Helper()
	is := o.NotData != ""
	require.NotEqual(t, is, o.Fault != nil || len(o.Records) > 0, "row %d", o.Line)
	fmt.Fprintf(b, "%d", o.Line)
	for _, line := range o.Lines {
		fmt.Fprintf(b, ",%d", line)
	}
	switch {
	case o.NotData != "":
		fmt.Fprintf(b, " %s", o.NotData)
	case o.Fault != nil:
		f := o.Fault
		fmt.Fprintf(b, " FAULT col %d %q for %q read %q: %s. %s.", f.Column, f.Header, f.Field, f.Read, f.Why, f.Remedy)
		if f.Also != nil {
			fmt.Fprintf(b, " Also %s.", strings.Join(f.Also, ", "))
		}
	}
	for i, e := range o.Records {
		if i > 0 {
			b.WriteString(" |")
		}
		for _, v := range e.Values {
			fmt.Fprintf(b, " %s=%s", table.Fields[v.Field].Name, v.Text)
			p := table.Set(table.New(), v.Field, v.Text)
			require.True(t, p == nil || p.Severity == diag.Warning, "%s is not canonical: %v", v.Text, p)
		}
	}
	for _, r := range o.Remarks {
		fmt.Fprintf(b, " (%s)", r.Why)
	}
	b.WriteString("\n")
}
