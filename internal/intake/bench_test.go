package intake

import (
	"context"
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/record"
)

const benchRows = 50_000

// benchAudiograms is a canonical table of audiograms with all columns.
func benchAudiograms() string {
	table, _ := record.TableOf("audiogram")
	var b strings.Builder
	b.WriteString(strings.Join(table.Names(), ",") + "\n")
	for i := range benchRows {
		known := map[string]string{
			"audiogram_id": fmt.Sprintf("A-%06d", i), "worker_id": fmt.Sprintf("%06d", i%1000),
			"date": fmt.Sprintf("20%02d-03-%02d", 10+i%15, 1+i%28), "purpose": "periodic", "audiometer_id": "AM-1", "room_id": "R-1",
			"tester_id": "T-2", "quiet_hours": "14", "quiet_by_protectors": "no", "mobile": "no",
			"determined_on": "2025-03-12", "reviewer": "AUD-1", "reviewed_on": "2025-03-12",
		}
		for f := range table.Fields {
			if f > 0 {
				b.WriteByte(',')
			}
			if table.Fields[f].Type == record.Hearing {
				fmt.Fprintf(&b, "%d", (i+f)%13*5)
				continue
			}
			b.WriteString(known[table.Fields[f].Name])
		}
		b.WriteByte('\n')
	}
	return b.String()
}

func benchWorkers() string {
	var b strings.Builder
	b.WriteString("worker_id,site,hired_on\n")
	for i := range 1000 {
		fmt.Fprintf(&b, "%06d,kiln-hill,2009-01-01\n", i)
	}
	return b.String()
}

func BenchmarkReadAudiogramsCSV(b *testing.B) {
	benchmarkRead(b, "audiograms.csv", benchAudiograms())
}

func BenchmarkReadAudiogramsNDJSON(b *testing.B) {
	p := programOf(b, "workers.csv", benchWorkers(), "audiograms.csv", benchAudiograms())
	var text strings.Builder
	w := NewNDJSONWriter(&text, Inputs(p))
	_, err := Read(context.Background(), p, func(r record.Record) error {
		if r.Kind() == "worker" {
			return nil
		}
		return w.Write(r)
	})
	require.NoError(b, err)
	benchmarkRead(b, "audiograms.ndjson", text.String())
}

func benchmarkRead(b *testing.B, name, text string) {
	p := programOf(b, "workers.csv", benchWorkers(), name, text)
	b.SetBytes(int64(len(text)))
	b.ReportAllocs()
	rows := 0
	for b.Loop() {
		l, err := Read(context.Background(), p, func(record.Record) error { return nil })
		require.NoError(b, err)
		total := l.Total()
		require.Zero(b, total.Rejected)
		rows += total.Accepted
	}
	b.ReportMetric(float64(rows)/b.Elapsed().Seconds(), "rows/s")
}
