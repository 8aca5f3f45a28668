package draft

import (
	"bytes"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
)

// TestDraftsRepeatNoPersonalCells looks in all golden drafts for cells of the columns that are about people: names,
// birth dates, ids, thresholds and whatever is not known.
func TestDraftsRepeatNoPersonalCells(t *testing.T) {
	looked := 0
	for _, path := range exports(t) {
		got := draftOf(t, path, Options{})
		a := &analysis{shown: "x", open: grid.Options{Lenient: true}}
		var err error
		a.file, err = grid.Open(path, "")
		require.NoError(t, err)
		if found, _ := findResources(a.file); found != nil {
			a.file.Close()
			continue
		}
		require.NoError(t, a.read())
		for _, c := range a.columns {
			if c.index == 0 || c == a.ear || c == a.frequency || a.showsValues(c) {
				continue
			}
			for _, r := range a.data {
				text := strings.TrimSpace(cell(r, c.index-1).Text)
				if len([]rune(text)) < 4 || known.codes["no_response"][plain(text)] || sentinel(text) || onlyDigits(text) && len(text) < 5 {
					continue
				}
				looked++
				assert.NotContains(t, got, text, "%s: column %d, row %d", path, c.index, r.Line)
			}
		}
		a.file.Close()
	}
	assert.Greater(t, looked, 200)
}

func (a *analysis) showsValues(c *column) bool {
	if a.table == nil || c.field == "" || a.table.Index(c.field) < 0 {
		return false
	}
	return a.vocabulary(&a.table.Fields[a.table.Index(c.field)]) != ""
}

// TestHostileExportsStayPrivate looks at exports in which names stand where a draft might repeat them.
func TestHostileExportsStayPrivate(t *testing.T) {
	for name, content := range map[string]string{
		"no_header.csv":      "000123,Avelin Marrow,M,14/03/1971\n000124,Bastian Quill,F,02/11/1980\n",
		"words_only.csv":     "Avelin Marrow,caster\nBastian Quill,moulder\nCorin Thatch,caster\n",
		"names_in_id.csv":    "Employee,Course,Date trained,Trainer\nAvelin Marrow,HPD,2025-01-02,Corin Thatch\nBastian Quill,HPD,2025-01-02,Corin Thatch\n",
		"names_as_codes.csv": "Emp no,Test date,Purpose,Masked,R500,R1000,R2000,L500,L1000,L2000\nA1,2025-01-02,asked by Avelin Marrow himself last week,Avelin Marrow,1,2,3,4,5,6\n",
		"titles.csv":         "Tests of Avelin Marrow\nOperator: Corin Thatch\nEmp no,Test date,R500,R1000,R2000,L500,L1000,L2000\nA1,2025-01-02,1,2,3,4,5,Marrow\nprinted by Thatch\n",
		"keys.ndjson":        `{"Avelin Marrow": {"14.03.1971": 12}, "Bastian Quill": {"02.11.1980": 13}}`,
		"transposed.csv":     "Employee ID,000123\nFull name,Avelin Marrow\nDate of birth,14/03/1971\nHire date,02/11/1980\n",
		"no_second_head.csv": "Model name,NRR,H,M,L\n000123,1,2,3,4\n000124,2,3,4,6\n",
		"topics.csv":         "Employee ID,Topic,Date trained\nA1,told by Corin Thatch,2025-01-02\nA2,hearing protection,2025-01-02\n",
	} {
		got := of(t, name, content)
		for _, secret := range []string{"Marrow", "Quill", "Thatch", "000123", "000124", "1971", "1980"} {
			assert.NotContains(t, got, secret, name)
		}
	}
}

// TestResourcesStayPrivate looks at resources, whose patients have names and birth dates.
func TestResourcesStayPrivate(t *testing.T) {
	raw, err := os.ReadFile("testdata/fhir.json")
	require.NoError(t, err)
	require.True(t, bytes.Contains(raw, []byte("Marrow")))
	got := draftOf(t, "testdata/fhir.json", Options{})
	for _, secret := range []string{"Marrow", "1971", "000123", "p1"} {
		assert.NotContains(t, got, secret)
	}
	assert.Contains(t, got, "urn:example:staff")
}
