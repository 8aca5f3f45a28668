package intake

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/schema"
)

func testProgram() *program.Program {
	return &program.Program{Sites: []program.Site{{ID: "kiln-hill"}}}
}

func TestWriteRejects(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, WriteRejects(&b, nil))
	assert.Equal(t, "\ufefffile,sheet,row,column,header,field,read,why,remedy\n", b.String(), "a header also if there are none")
	b.Reset()
	require.NoError(t, WriteRejects(&b, []Reject{
		{File: "a.xlsx", Sheet: "T", Row: 7, Column: 3, Header: "=1+1", Field: "date", Read: "@x", Why: "it, too", Remedy: "Mend \"it\""},
		{File: "b.csv", Why: "the file is empty", Remedy: "Fill it"},
	}))
	assert.Equal(t, "\ufefffile,sheet,row,column,header,field,read,why,remedy\n"+
		"a.xlsx,T,7,3,'=1+1,date,'@x,\"it, too\",\"Mend \"\"it\"\"\"\nb.csv,,,,,,,the file is empty,Fill it\n", b.String())
}

// No cell of the file of rejects can run as a formula.
func TestGuard(t *testing.T) {
	for text, want := range map[string]string{
		"": "", "a": "a", "a=1": "a=1", "007": "007",
		"=1": "'=1", "+1": "'+1", "-1": "'-1", "@a": "'@a", "\t=1": "'\t=1", "\ra": "'\ra", "\n=1": "'\n=1", " =1": "' =1",
		"'=1": "''=1", "＝1": "'＝1", "　@a": "'　@a", "\u00a0-1": "'\u00a0-1", "\x00=1": "'\x00=1", "－1": "'－1",
	} {
		assert.Equal(t, want, guard(text), "%q", text)
	}
}

// The ledger as JSON fits its schema, and holds no cell that is nobody's business.
func TestBook(t *testing.T) {
	p := programOf(t,
		"workers.csv", "worker_id,site,birth_date,hired_on\n1,kiln-hill,05.02.1961,2001-01-01\n2,kiln-hill,1961-05-02,2000-01-01\n",
		"audiograms.csv", "audiogram_id,worker_id,date,left.500\nA-1,2,2025-01-01,4S\nA-2,2,2025-01-01,10\nA-3,2,2025-01-01,15\n",
		"changes.csv", "nonsense\n")
	l, err := Read(t.Context(), p, discard)
	require.Error(t, err)
	var b bytes.Buffer
	require.NoError(t, l.WriteBook(&b, "Harrow & Slate"))
	var value any
	require.NoError(t, json.Unmarshal(b.Bytes(), &value))
	require.Empty(t, schema.Validate("ledger", value, func(p string) diag.Position { return diag.Position{Field: p} }))
	for _, secret := range []string{"4S", "05.02.1961", "1961"} {
		assert.NotContains(t, b.String(), secret)
	}
	for _, want := range []string{`"kind": "same_day_tests"`, `"unreadable": [`, `"header": 1`, "what stands there is not a threshold", `"program": "Harrow & Slate"`} {
		assert.Contains(t, b.String(), want)
	}
	b.Reset()
	require.NoError(t, (&Ledger{}).WriteBook(&b, ""))
	assert.NotContains(t, b.String(), "null")
	assert.Equal(t, 5, strings.Count(b.String(), "[]"))
}
