package fhir

import (
	"fmt"
	"io"
	"runtime"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// TestWrongTypesEverywhere puts each kind of value in the place of each member, one after the other: nothing may
// panic or be lost.
func TestWrongTypesEverywhere(t *testing.T) {
	t.Parallel()
	l := toneText("l", "89024-4", level("10"), `, "interpretation": [{"text": "x"}], "note": [{"text": "y"}], "device": {"display": "z"}, "performer": [{"identifier": {"value": "t"}}], "bodySite": {"text": "left"}, "meta": {"versionId": "1"}`)
	text := bundleOf(worker7, l, l, panelText("A1", members("hasMember", "Observation/l")+`, "component": [`+component("89025-1", level("5"))+`], "encounter": {"reference": "Encounter/1"}`),
		reportText("R1", "final", members("result", "#c")+`, "contained": [`+toneText("c", "89024-4", level("10"), "")+`]`))
	require.Equal(t, 2, account(t, text, "a.json", wordsMap))
	count := 0
	for i := range text {
		if text[i] != ':' || text[i+1] != ' ' {
			continue
		}
		end := i + 2 + valueLength(t, text[i+2:])
		for _, other := range []string{`null`, `true`, `7`, `"x"`, `[]`, `[[]]`, `[null]`, `[{}]`, `{}`, `{"reference": []}`, `""`, `-1e999`} {
			account(t, text[:i+2]+other+text[end:], "a.json", wordsMap)
			count++
		}
	}
	require.Greater(t, count, 500)
}

func valueLength(t *testing.T, text string) int {
	t.Helper()
	r := strings.NewReader(text)
	s := newScanner(r)
	_, err := s.value(1)
	require.NoError(t, err)
	return len(text) - r.Len() - s.r.Buffered()
}

func TestLargeResources(t *testing.T) {
	t.Parallel()
	huge := strings.Repeat("x", 10<<20)
	l := toneText("l", "89024-4", level("10"), `, "text": {"div": "`+huge+`"}`)
	for text, want := range map[string]string{
		bundleOf(worker7, l): "2: audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 left.500=10",
		bundleOf(worker7, strings.Replace(l, `"final"`, `"`+huge+`"`, 1)):                              "2: fault : the resource has no status, so it is not known whether it counts",
		bundleOf(worker7, `{"resourceType": "Observation", "x": [`+strings.Repeat("0,", 60_000)+"0]}"): "2: fault : the resource holds more than 50000 values or 4 MB of text",
	} {
		got := readAll(t, text, "a.json", mapping.File{})
		assert.Equal(t, want, got[1])
	}
}

// bulk gives lines of a bulk export: patients last, each with one test of loose thresholds.
type bulk struct {
	patients, at int
	rest         string
}

func (b *bulk) Read(p []byte) (int, error) {
	if b.rest == "" {
		const tests = 14
		switch who := b.at / tests; {
		case b.at < b.patients*tests:
			codes := []string{"89024-4", "89016-0", "89018-6", "89020-2", "89022-8", "89026-9", "89028-5", "89025-1", "89017-8", "89019-4", "89021-0", "89023-6", "89027-7", "89029-3"}
			b.rest = strings.ReplaceAll(toneText(fmt.Sprintf("o-%032d", b.at), codes[b.at%tests], level("10"), ""), "\n", " ")
			b.rest = strings.Replace(b.rest, "p7", fmt.Sprintf("p%d", who), 1) + "\n"
		case b.at < b.patients*(tests+1):
			n := b.at - b.patients*tests
			b.rest = strings.NewReplacer("p7", fmt.Sprintf("p%d", n), "0007", fmt.Sprintf("%06d", n)).Replace(worker7) + "\n"
		default:
			return 0, io.EOF
		}
		b.at++
	}
	n := copy(p, b.rest)
	b.rest = b.rest[n:]
	return n, nil
}

func (b *bulk) Seek(int64, int) (int64, error) {
	b.at, b.rest = 0, ""
	return 0, nil
}

// readBulk reads a bulk export and gives its audiograms and the memory that was in use before its end.
func readBulk(t testing.TB, patients int) (records int, heap uint64) {
	t.Helper()
	table, _ := record.TableOf("audiogram")
	s, err := Open(&bulk{patients: patients}, "a.ndjson", &mapping.Map{}, table)
	require.NoError(t, err)
	for {
		var o mapping.Out
		err := s.Next(&o)
		if err == io.EOF {
			return records, heap
		}
		require.NoError(t, err)
		require.Nil(t, o.Fault)
		records += len(o.Records)
		if o.Line == patients*14+patients {
			var m runtime.MemStats
			runtime.GC()
			runtime.ReadMemStats(&m)
			heap = m.HeapAlloc
		}
	}
}

// TestMemoryOfBulkExports holds the memory to a small part of the file, though all thresholds come before the
// patients and have to be kept.
func TestMemoryOfBulkExports(t *testing.T) {
	const patients = 2000
	records, heap := readBulk(t, patients)
	assert.Equal(t, patients, records)
	assert.Less(t, heap, uint64(patients*14*200+8<<20), "bytes")
}

func BenchmarkLooseObservations(b *testing.B) {
	const patients = 2000
	for b.Loop() {
		readBulk(b, patients)
	}
	b.ReportMetric(float64(patients*14*b.N)/b.Elapsed().Seconds(), "resources/s")
}
