package record

import (
	"math"
	"reflect"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
)

// drawRecord draws any record of the table's kind that Set could make, and some more.
func drawRecord(t *rapid.T, table *Table) Record {
	r := table.New()
	r.SetAt(Origin{rapid.Int32().Draw(t, "source"), rapid.Int32().Draw(t, "row")})
	v := reflect.ValueOf(r).Elem()
	for _, slot := range table.slots {
		if rapid.Bool().Draw(t, "present") {
			drawValue(t, pointer(v, slot))
		}
	}
	return r
}

func drawNumber(t *rapid.T) Number {
	v := rapid.OneOf(rapid.Float64(), rapid.Map(rapid.IntRange(-2000, 2000), func(n int) float64 { return float64(n) / 10 }),
		rapid.SampledFrom([]float64{0, math.Copysign(0, -1), 1e300, 0.1, 85.3, 1 << 41})).Draw(t, "number")
	return Num(v)
}

func drawNumbers(t *rapid.T, numbers []Number) {
	for i := range numbers {
		if rapid.Bool().Draw(t, "known") {
			numbers[i] = drawNumber(t)
		}
	}
}

func drawValue(t *rapid.T, pointer any) {
	word := rapid.OneOf(rapid.String(), rapid.SampledFrom([]string{"000123", "W-7", "kiln-hill"}))
	switch p := pointer.(type) {
	case *string:
		*p = word.Draw(t, "text")
	case *Date:
		*p = Date(rapid.Int32().Draw(t, "date"))
	case *Number:
		*p = drawNumber(t)
	case *Answer:
		*p = Answer(rapid.IntRange(0, 2).Draw(t, "answer"))
	case *List:
		*p = rapid.SliceOfN(word, 1, 5).Draw(t, "list")
	case *audiometry.Ear:
		for i := range p {
			p[i] = audiometry.Threshold{Tenths: rapid.Int16().Draw(t, "tenths"), State: audiometry.State(rapid.IntRange(0, 3).Draw(t, "state"))}
		}
	case *Threshold:
		*p = Threshold{Tenths: rapid.Int16().Draw(t, "tenths"), State: audiometry.State(rapid.IntRange(0, 3).Draw(t, "state"))}
	case *Octaves:
		drawNumbers(t, p[:])
	case **Octaves:
		*p = new(Octaves)
		drawNumbers(t, (*p)[:])
	case **Deviation:
		*p = new(Deviation)
		drawNumbers(t, (*p)[:])
	default:
		t.Fatalf("no generator for %T", pointer)
	}
}

func TestCompactFormIsLossless(t *testing.T) {
	for _, kind := range Kinds() {
		t.Run(string(kind), func(t *testing.T) {
			table, _ := TableOf(kind)
			rapid.Check(t, func(t *rapid.T) {
				a, b := drawRecord(t, table), drawRecord(t, table)
				bytes := Append(Append(nil, a), b)
				var d Decoder
				gotA, rest, err := d.Next(bytes)
				require.NoError(t, err)
				gotB, rest, err := d.Next(rest)
				require.NoError(t, err)
				require.Empty(t, rest)
				require.Equal(t, a, gotA)
				require.Equal(t, b, gotB)
				require.Equal(t, bytes, Append(Append(nil, gotA), gotB), "signed zeros are kept too")
			})
		})
	}
}

func TestEveryShortFormIsRefused(t *testing.T) {
	whole := Append(nil, sampleAudiogram())
	for n := range whole {
		var d Decoder
		_, _, err := d.Next(whole[:n])
		require.Error(t, err, "cut after %d bytes", n)
	}
}

func FuzzDecoder(f *testing.F) {
	f.Add(Append(nil, sampleAudiogram()))
	f.Add([]byte{255})
	for _, p := range prototypes {
		f.Add(Append(nil, p))
	}
	f.Fuzz(func(t *testing.T, b []byte) {
		var d Decoder
		for len(b) > 0 {
			r, rest, err := d.Next(b)
			if err != nil {
				return
			}
			require.Less(t, len(rest), len(b))
			table, _ := TableOf(r.Kind())
			for i := range table.Fields {
				table.Text(r, i)
			}
			b = rest
		}
	})
}

func sampleAudiogram() *Audiogram {
	a := &Audiogram{
		AudiogramID: "A-000412", WorkerID: "000123", Date: mustDate("2025-03-05"), Purpose: "periodic", AudiometerID: "AM-1", RoomID: "R-1",
		LeftRepeat: Threshold{Tenths: 150, State: audiometry.Measured}, RightRepeat: Threshold{State: audiometry.NotTested},
		LeftStatedShift: Yes, RightStatedShift: No,
		Masked: Yes, Earphones: "insert", FineSteps: No,
		TesterID: "T-2", QuietHours: Num(14), QuietByProtectors: No, Mobile: No, DeterminedOn: mustDate("2025-03-12"), ReceivedOn: mustDate("2025-03-12"), Reviewer: "AUD-1", ReviewedOn: mustDate("2025-03-12"),
	}
	for i := range a.Left {
		a.Left[i] = audiometry.Threshold{Tenths: int16(50 * i), State: audiometry.Measured}
		a.Right[i] = audiometry.Threshold{Tenths: int16(50 * i), State: audiometry.Measured}
	}
	a.SetAt(Origin{Source: 3, Row: 118})
	return a
}

func mustDate(s string) Date {
	var f Field
	var d Date
	if p := f.setDay(&d, s); p != nil {
		panic(p)
	}
	return d
}

func BenchmarkAppendAudiogram(b *testing.B) {
	a := sampleAudiogram()
	var buffer []byte
	b.ReportAllocs()
	for b.Loop() {
		buffer = Append(buffer[:0], a)
	}
	b.ReportMetric(float64(len(buffer)), "bytes")
}

func BenchmarkDecodeAudiogram(b *testing.B) {
	buffer := Append(nil, sampleAudiogram())
	var d Decoder
	b.ReportAllocs()
	for b.Loop() {
		if _, _, err := d.Next(buffer); err != nil {
			b.Fatal(err)
		}
	}
}
