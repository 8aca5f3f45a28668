package diag

import (
	"testing"

	"github.com/stretchr/testify/require"
)

func TestDiagnosticText(t *testing.T) {
	for want, d := range map[string]Diagnostic{
		"a.csv:3:7: the cell is odd. Mend it.": {Error, Position{File: "a.csv", Line: 3, Column: 7}, "the cell is odd", "Mend it"},
		"a.csv:3: the row is odd.":             {Error, Position{File: "a.csv", Line: 3}, "the row is odd", ""},
		"a.csv: the file is odd.":              {Warning, Position{File: "a.csv", Column: 7}, "the file is odd", ""},
		"b.xlsx Tests!12: the row is odd.":     {Warning, Position{File: "b.xlsx", Sheet: "Tests", Line: 12}, "the row is odd", ""},
		"b.xlsx Tests: the sheet is odd.":      {Warning, Position{File: "b.xlsx", Sheet: "Tests"}, "the sheet is odd", ""},
		"something is odd.":                    {Warning, Position{}, "something is odd", ""},
	} {
		require.Equal(t, want, d.String())
	}
}

func TestList(t *testing.T) {
	var l List
	require.NoError(t, l.Err())
	l.Warnf(Position{File: "b", Line: 2}, "", "%d is odd", 7)
	require.False(t, l.Failed())
	require.NoError(t, l.Err(), "warnings are no error")
	l.Errorf(Position{File: "b", Line: 1, Column: 4}, "Mend it", "broken")
	l.Errorf(Position{File: "b", Line: 1, Column: 2}, "", "broken")
	l.Errorf(Position{File: "a", Line: 9}, "", "z")
	l.Errorf(Position{File: "a", Line: 9}, "", "y")
	require.True(t, l.Failed())
	l.Sort()
	require.EqualError(t, l.Err(), "a:9: y.\na:9: z.\nb:1:2: broken.\nb:1:4: broken. Mend it.\nb:2: 7 is odd.")
}

func TestNear(t *testing.T) {
	known := []string{"worker_id", "site", "left.500", "left.5000"}
	for name, want := range map[string]string{
		"worker-id": "worker_id", "WorkerID": "worker_id", "sit": "site", "left.50": "left.500", "left500": "left.500", "x": "", "birth_date": "", "": "",
	} {
		require.Equal(t, want, Near(name, known), name)
	}
	require.Empty(t, Near("site", nil))
}

func TestDistance(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{{"", "", 0}, {"", "abc", 3}, {"kitten", "sitting", 3}, {"über", "uber", 1}, {"ab", "ba", 2}} {
		require.Equal(t, c.want, distance(c.a, c.b))
		require.Equal(t, c.want, distance(c.b, c.a))
	}
}
