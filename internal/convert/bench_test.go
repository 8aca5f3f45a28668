package convert_test

import (
	"testing"

	"hearduty/internal/convert"
)

func BenchmarkDates(b *testing.B) {
	d := dayFirst
	for _, s := range []string{"2025-03-04", "04/03/2025", "04/03/2025 07:30", "4 mars 2025"} {
		b.Run(s, func(b *testing.B) {
			c := text(s)
			b.ReportAllocs()
			for b.Loop() {
				if _, p := d.Read(c); p != nil {
					b.Fatal(p)
				}
			}
		})
	}
}

func BenchmarkEvidence(b *testing.B) {
	e, c := &convert.Evidence{}, text("04/03/2025")
	b.ReportAllocs()
	for b.Loop() {
		e.Add(c, 2)
	}
}

func BenchmarkThresholds(b *testing.B) {
	th := clinic()
	for _, s := range []string{"25", "37,5", "NR", ">100", "45m"} {
		b.Run(s, func(b *testing.B) {
			c := text(s)
			b.ReportAllocs()
			for b.Loop() {
				if _, _, p := th.Read(c, 500); p != nil {
					b.Fatal(p)
				}
			}
		})
	}
}

func BenchmarkNumbers(b *testing.B) {
	for _, c := range []struct {
		numbers convert.Numbers
		text    string
	}{{point, "85.3"}, {comma, "85,3"}, {german, "1.234,5"}} {
		b.Run(c.text, func(b *testing.B) {
			cell := text(c.text)
			b.ReportAllocs()
			for b.Loop() {
				_, _ = c.numbers.Read(cell)
			}
		})
	}
}

func BenchmarkFold(b *testing.B) {
	for _, s := range []string{"test date", "TestDate", "Prüf-Datum"} {
		b.Run(s, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				convert.Fold(s)
			}
		})
	}
}
