package record

import (
	"math"
	"testing"
)

// FuzzDecimal feeds texts to a number field: it never panics, takes nothing outside its range, and writes a
// number back so that it reads the same again.
func FuzzDecimal(f *testing.F) {
	for _, s := range []string{"", "62.5", "62,5", "1.234,5", "-0", "1e400", "NaN", "0x1p-2", "1O0", " 85 ", "٨٥", "85 dB", "+5", ".5", "5.", "−10"} {
		f.Add(s)
	}
	t, _ := TableOf("measurement")
	i := t.Index("dose_pct")
	f.Fuzz(func(t2 *testing.T, text string) {
		m := &Measurement{}
		if problem := t.Set(m, i, text); problem != nil {
			if problem.Why == "" {
				t2.Fatalf("%q is refused without a reason", text)
			}
			return
		}
		n := m.DosePct
		if n.Known && (math.IsNaN(n.Value) || n.Value < t.Fields[i].Min || n.Value > t.Fields[i].Max) {
			t2.Fatalf("%q gives %v", text, n.Value)
		}
		again := &Measurement{}
		if problem := t.Set(again, i, t.Text(m, i)); problem != nil || again.DosePct != n {
			t2.Fatalf("%q gives %v, which reads again as %v", text, n, again.DosePct)
		}
	})
}
