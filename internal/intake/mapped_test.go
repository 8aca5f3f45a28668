package intake

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// mapped takes what a map would make of the rows of a file of audiograms, or of another kind.
func mapped(t *testing.T, kind record.Kind, outs ...mapping.Out) ([]record.Record, *Ledger) {
	t.Helper()
	table, _ := record.TableOf(kind)
	l := &Ledger{Inputs: []Input{{File: "workers.csv", Kind: "worker"}, {File: "tests.xlsx", Sheet: "T", Kind: kind}}}
	var records []record.Record
	in := &intake{ledger: l, people: newPeople(nil), emit: func(r record.Record) error { records = append(records, r); return nil }}
	in.register = newRegister(testProgram(), []source{{kind: "worker"}, {kind: kind}}, l)
	in.register.workers["000123"] = &person{}
	in.observer = newObserver(l)
	in.register.begin(table)
	s := mappedSink{sink: sink{in: in, input: &l.Inputs[1], index: 1, table: table}, header: func(c int) string { return "Spalte " + string(rune('@'+c)) }}
	for i := range outs {
		require.NoError(t, s.take(&outs[i]))
	}
	l.Remarks = in.remarks.done()
	balanced(t, l, len(records))
	return records, l
}

// entry makes a record of field names and canonical texts in turn; each comes from the column of its place.
func entry(t *testing.T, kind record.Kind, texts ...string) mapping.Entry {
	t.Helper()
	table, _ := record.TableOf(kind)
	var e mapping.Entry
	for i := 0; i < len(texts); i += 2 {
		require.GreaterOrEqual(t, table.Index(texts[i]), 0, texts[i])
		e.Values = append(e.Values, mapping.Value{Field: table.Index(texts[i]), Text: texts[i+1], Column: i/2 + 1})
	}
	return e
}

func TestMappedRows(t *testing.T) {
	good := entry(t, "audiogram", "audiogram_id", "A-1", "worker_id", "000123", "date", "2025-03-04")
	records, l := mapped(t, "audiogram",
		mapping.Out{Line: 1, NotData: "header"},
		mapping.Out{Line: 2, Records: []mapping.Entry{good}},
		mapping.Out{Line: 3, NotData: "blank"},
		mapping.Out{Line: 4, Fault: &mapping.Fault{Column: 2, Field: "date", Header: "Datum", Read: "04/03/2025", Why: "it can be read in two ways", Remedy: "State the order"}},
		mapping.Out{Line: 5},
	)
	require.Len(t, records, 1)
	assert.Equal(t, record.Origin{Source: 1, Row: 2}, records[0].At())
	in := l.Inputs[1]
	assert.Equal(t, []int{5, 1, 1, 3, 1}, []int{in.Rows, in.Accepted, in.Rejected, in.NotData, in.Records})
	assert.Equal(t, "1 blank, 1 header, 1 without a record", Declared(in.Declared))
	assert.Equal(t, []Reject{{File: "tests.xlsx", Sheet: "T", Row: 4, Column: 2, Header: "Datum", Field: "date", Read: "04/03/2025", Why: "it can be read in two ways", Remedy: "State the order", Source: 1}}, l.Rejects)
}

// Of the rows that one record was gathered from each is accounted for.
func TestGatheredRows(t *testing.T) {
	good := entry(t, "audiogram", "audiogram_id", "A-1", "worker_id", "000123", "date", "2025-03-04", "left.500", "10", "right.500", "15")
	bad := entry(t, "audiogram", "audiogram_id", "A-2", "worker_id", "000123", "date", "2025-03-05", "left.500", "200")
	records, l := mapped(t, "audiogram",
		mapping.Out{Line: 2, Lines: []int{3, 5}, Records: []mapping.Entry{good}},
		mapping.Out{Line: 4, Lines: []int{6, 7}, Records: []mapping.Entry{bad}},
		mapping.Out{Line: 8, Lines: []int{9}, Fault: &mapping.Fault{Why: "the ear is not known", Remedy: "Fill it in"}},
	)
	require.Len(t, records, 1)
	in := l.Inputs[1]
	assert.Equal(t, []int{8, 3, 5, 0, 1}, []int{in.Rows, in.Accepted, in.Rejected, in.NotData, in.Records})
	var rows []int
	for _, r := range l.Rejects {
		rows = append(rows, r.Row)
	}
	assert.Equal(t, []int{4, 6, 7, 8, 9}, rows)
	assert.Equal(t, "the row belongs to the record of row 4, which was rejected", l.Rejects[2].Why)
	assert.Equal(t, "Spalte D", l.Rejects[0].Header)
	assert.Equal(t, 4, l.Rejects[0].Column)
}

// The good records of a row are read even if another one of it is not.
func TestSeveralRecordsOfARow(t *testing.T) {
	first := entry(t, "audiogram", "audiogram_id", "A-1", "worker_id", "000123", "date", "2015-03-04")
	second := entry(t, "audiogram", "audiogram_id", "A-2", "worker_id", "000123", "date", "2025-02-30")
	third := entry(t, "audiogram", "audiogram_id", "A-3", "worker_id", "000123", "date", "2025-03-04")
	records, l := mapped(t, "audiogram",
		mapping.Out{Line: 2, Records: []mapping.Entry{first, second}},
		mapping.Out{Line: 3, Records: []mapping.Entry{third, entry(t, "audiogram", "audiogram_id", "A-4", "worker_id", "000123", "date", "2025-03-05")}},
	)
	require.Len(t, records, 3)
	in := l.Inputs[1]
	assert.Equal(t, []int{2, 1, 1, 3}, []int{in.Rows, in.Accepted, in.Rejected, in.Records})
	assert.Equal(t, `"2025-02-30" is not a day of the calendar; another record of the row was read all the same`, l.Rejects[0].Why)
}

// A reject shows what stands in the cell of the export, not what the map made of it.
func TestRejectReadsTheCell(t *testing.T) {
	bad := entry(t, "measurement", "measurement_id", "M", "worker_id", "000123", "date", "2025-03-04", "kind", "personnal")
	bad.Values[3].Read = "Persönlich"
	_, l := mapped(t, "measurement", mapping.Out{Line: 2, Records: []mapping.Entry{bad}})
	require.Len(t, l.Rejects, 1)
	assert.Equal(t, "Persönlich", l.Rejects[0].Read)
	assert.Equal(t, `"personnal" is not one of the words allowed here`, l.Rejects[0].Why, "what the map made of it")
	assert.Equal(t, "Spalte D", l.Rejects[0].Header)

	level := entry(t, "audiogram", "audiogram_id", "A", "worker_id", "000123", "date", "2025-03-04", "left.500", "250")
	level.Values[3].Read = "2,5e2"
	_, l = mapped(t, "audiogram", mapping.Out{Line: 2, Records: []mapping.Entry{level}})
	require.Len(t, l.Rejects, 1)
	assert.NotContains(t, l.Rejects[0].Why, "250")
	assert.Contains(t, l.Shown()[0].Why, "what stands there is outside")
}

func TestRemarksOfMaps(t *testing.T) {
	good := func(id string) []mapping.Entry {
		return []mapping.Entry{entry(t, "audiogram", "audiogram_id", id, "worker_id", "000123", "date", "2025-03-04")}
	}
	m := []mapping.Remark{{Field: "worker_id", Why: "zeros were put in front", Remedy: "Look"}}
	_, l := mapped(t, "audiogram", mapping.Out{Line: 2, Records: good("A"), Remarks: m}, mapping.Out{Line: 3, Records: good("B"), Remarks: m})
	require.Len(t, l.Remarks, 1)
	assert.Equal(t, "tests.xlsx T!2: worker_id: zeros were put in front (2 rows). Look.", l.Remarks[0].String())
}

// Thresholds and birth dates are not shown, whatever a map says of them, nor cells of which the field is unknown.
func TestShownRejects(t *testing.T) {
	l := &Ledger{Inputs: []Input{{File: "a", Kind: "audiogram"}, {File: "m", Kind: "measurement"}}}
	l.Rejects = []Reject{
		{File: "a", Field: "left.500", Read: "4S", Why: `"4S" is not a threshold`},
		{File: "a", Field: "left.500", Read: "100-", Why: "100- has its sign behind it"},
		{File: "a", Field: "threshold", Read: "45x", Why: `"45x" is no level`},
		{File: "a", Field: "date", Read: "bad", Why: `"bad" is not a date`},
		{File: "m", Field: "no such", Read: "45x", Why: `"45x" is no level`, Source: 1},
	}
	var read, why []string
	for _, r := range l.Shown() {
		read, why = append(read, r.Read), append(why, r.Why)
	}
	assert.Equal(t, []string{"", "", "", "bad", "45x"}, read)
	assert.Equal(t, []string{"what stands there is not a threshold", "what stands there has its sign behind it", "what stands there is no level", `"bad" is not a date`, `"45x" is no level`}, why)
	assert.Equal(t, "4S", l.Rejects[0].Read, "the ledger itself keeps it")
}
