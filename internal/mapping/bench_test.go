package mapping_test

import (
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/mapping"
)

const benchRows = 20_000

const benchMap = `
map: Wide
kind: audiogram
dates: {order: ORDER}
fields:
  audiogram_id: {make: [worker_id, date]}
  worker_id: {column: EmpNo, pad: 8}
  date: TestDate
  purpose: {column: Type, values: {A: periodic, B: baseline}}
  audiometer_id: Device
  tester_id: Tech
  left.500: L500
  left.1000: L1000
  left.2000: L2000
  left.3000: L3000
  left.4000: L4000
  left.6000: L6000
  left.8000: L8000
  right.500: R500
  right.1000: R1000
  right.2000: R2000
  right.3000: R3000
  right.4000: R4000
  right.6000: R6000
  right.8000: R8000
thresholds: {no_response: {words: [NR], limit: 100}, not_tested: [DNT], masked: [m]}
blank: [n/a]
`

// wideText has one row a test, with dates, levels and words as exports write them.
func wideText(rows int) string {
	var b strings.Builder
	b.WriteString("EmpNo;TestDate;Type;Device;Tech;L500;L1000;L2000;L3000;L4000;L6000;L8000;R500;R1000;R2000;R3000;R4000;R6000;R8000\n")
	for i := range rows {
		fmt.Fprintf(&b, "%d;%02d/%02d/%d;%c;AM-%d;T%d", i, 1+i%28, 1+i/28%12, 2000+i%25, 'A'+i%2, i%5, i%17)
		for f := range 14 {
			switch {
			case (i+f)%97 == 0:
				b.WriteString(";NR")
			default:
				fmt.Fprintf(&b, ";%d", (i*7+f*5)%18*5)
			}
		}
		b.WriteByte('\n')
	}
	return b.String()
}

func benchmark(b *testing.B, mapText, text string, rows int) {
	m := good(b, mapText)
	f := export(b, "x.csv", text)
	b.SetBytes(int64(len(text)))
	b.ReportAllocs()
	for b.Loop() {
		s, _, err := m.Bind(f, m.Kind)
		require.NoError(b, err)
		var o mapping.Out
		n := 0
		for err = s.Next(&o); err == nil; err = s.Next(&o) {
			if o.Fault != nil {
				b.Fatalf("row %d: %+v", o.Line, o.Fault)
			}
			n += len(o.Records)
		}
		require.Equal(b, io.EOF, err)
		require.Positive(b, n)
	}
	b.ReportMetric(float64(rows)*float64(b.N)/b.Elapsed().Seconds(), "rows/s")
}

func BenchmarkWide(b *testing.B) {
	benchmark(b, strings.Replace(benchMap, "ORDER", "day_month_year", 1), wideText(benchRows), benchRows)
}

// BenchmarkProven reads the file twice.
func BenchmarkProven(b *testing.B) {
	benchmark(b, strings.Replace(benchMap, "ORDER", "proven", 1), wideText(benchRows), benchRows)
}

// BenchmarkFrequencies reads rows of one frequency, 14 a test.
func BenchmarkFrequencies(b *testing.B) {
	var text strings.Builder
	text.WriteString("Emp,Date,Ear,Hz,dB\n")
	for i := range benchRows {
		fmt.Fprintf(&text, "%d,2025-03-%02d,%c,%d,%d\n", i/14, 1+i/14%28, "LR"[i%14/7], []int{500, 1000, 2000, 3000, 4000, 6000, 8000}[i%7], i%18*5)
	}
	benchmark(b, "map: Long\nkind: audiogram\nfields:\n  audiogram_id: {make: [worker_id, date]}\n  worker_id: Emp\n  date: Date\near: {column: Ear, left: [L], right: [R]}\nfrequency: {frequency: Hz, threshold: dB}\n", text.String(), benchRows)
}
