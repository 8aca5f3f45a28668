package intake

import (
	"archive/zip"
	"bytes"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"hearduty/internal/program"
)

// The cases of exports whose files are too large to keep: part B3, cases 24 and 25.

const (
	site      = "sites: [{id: kiln-hill, bundles: [us-osha-general-industry]}]\n"
	changeMap = "map: changes\nkind: change\nfields: {change_id: Id, date: Day, area: Area, what: What}\n"
)

// bulk loads a program with one export of that name in a folder of its own.
func bulk(t *testing.T, name string, content []byte) *program.Program {
	t.Helper()
	dir := t.TempDir()
	put := func(name string, content []byte) {
		require.NoError(t, os.WriteFile(filepath.Join(dir, name), content, 0o600))
	}
	member := ""
	if filepath.Ext(name) == ".zip" {
		member = ", member: changes.csv"
	}
	put(name, content)
	put("changes.yaml", []byte(changeMap))
	put("program.yaml", []byte("program: Harrow & Slate, bulk\n"+site+"records: [{file: "+name+member+", map: changes.yaml}]\n"))
	p, problems := program.Load(dir)
	require.Empty(t, problems)
	return p
}

// TestBulkBook reads a book of 100,000 rows.
func TestBulkBook(t *testing.T) {
	if testing.Short() {
		t.Skip("it writes and reads a large workbook")
	}
	const rows = 100_000
	x := excelize.NewFile()
	w, err := x.NewStreamWriter("Sheet1")
	require.NoError(t, err)
	require.NoError(t, w.SetRow("A1", []any{"Id", "Day", "Area", "What"}))
	for i := range rows {
		at, err := excelize.CoordinatesToCellName(1, i+2)
		require.NoError(t, err)
		require.NoError(t, w.SetRow(at, []any{fmt.Sprintf("C-%06d", i), "2024-03-04", "hall-1", i}))
	}
	require.NoError(t, w.Flush())
	var b bytes.Buffer
	require.NoError(t, x.Write(&b))
	p := bulk(t, "changes.xlsx", b.Bytes())
	from := time.Now()
	records, l, err := readAll(t, p)
	t.Logf("%d rows in %s", rows, time.Since(from).Round(time.Millisecond))
	require.NoError(t, err)
	require.Empty(t, l.Rejects)
	require.Len(t, records, rows)
	require.EqualValues(t, rows+1, records[rows-1].At().Row)
}

// TestBulkCell reads cells of 10 MB, in quotes and without: their rows are refused in a short sentence, and those around
// them are read.
func TestBulkCell(t *testing.T) {
	long := strings.Repeat("kiln ", 2<<20)
	for name, cell := range map[string]string{"plain": long, "quoted": `"` + long + `"`, "quote never closed": `"` + long} {
		p := bulk(t, "changes.csv", []byte("Id,Day,Area,What\nC-1,2024-03-04,hall-1,before\nC-2,2024-03-05,hall-1,"+cell+"\nC-3,2024-03-06,hall-1,behind\n"))
		records, l, err := readAll(t, p)
		require.NoError(t, err, name)
		require.Len(t, records, 2, name)
		require.Len(t, l.Rejects, 1, name)
		require.Equal(t, 3, l.Rejects[0].Row, name)
		require.Less(t, len(fmt.Sprint(l.Rejects[0])), 500, name)
	}
}

// TestBulkNames reads a file with a long name, and heads and words as long as cells can be: messages stay short.
func TestBulkNames(t *testing.T) {
	long := strings.Repeat("x", 60_000)
	name := strings.Repeat("n", 240) + ".csv"
	p := bulk(t, name, []byte("Id,Day,Area,What,"+long+"\n"+long+",2024-03-04,hall-1,a,b\n"+long+",2024-03-05,hall-1,a,b\nC-2,"+long+",hall-1,a,b\n"))
	records, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, records, 1)
	require.Len(t, l.Rejects, 2, "an id that was used before, and no date")
	require.Len(t, l.Remarks, 1, "a column that the map does not know")
	for _, text := range []string{fmt.Sprint(l.Rejects), l.Remarks.Error()} {
		require.Less(t, len(text), 2000)
	}
}

// TestBulkArchive refuses an archive that unpacks to far more than it is, before it fills the disk.
func TestBulkArchive(t *testing.T) {
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	w, err := z.Create("changes.csv")
	require.NoError(t, err)
	row := []byte(strings.Repeat("0", 1<<20))
	for range 100 {
		_, err = w.Write(row)
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	p := bulk(t, "changes.zip", b.Bytes())
	require.Len(t, p.Sources, 1)
	_, l, err := readAll(t, p)
	require.Error(t, err)
	require.Len(t, l.Rejects, 1)
	require.Contains(t, l.Rejects[0].Why, "would fill more than")
}
