package mapping

import (
	"hearduty/internal/audiometry"
	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// frequencies makes the columns of rows of one frequency ready.
func (p *plan) frequencies(f *FrequencyRows) *frequencyColumns {
	out := &frequencyColumns{
		frequency: p.reference(f.Frequency.Column, f.Frequency.Position, "frequency", true),
		threshold: p.reference(f.Threshold.Column, f.Threshold.Position, "threshold", true),
		left:      p.table.Index("left.250"), right: p.table.Index("right.250"),
		readThreshold: map[int]*reader{},
	}
	numbers := newNumbers(p.file.Numbers)
	unit := f.Frequency.Unit
	if unit == "" {
		unit = "hz"
	}
	out.readFrequency = newReader(p.file, &f.Frequency, &record.Field{Name: "frequency", Type: record.Decimal})
	out.readFrequency.convert = plainly(func(c grid.Cell) (string, *convert.Problem) { return numbers.Hertz(c, unit) })
	for i, hz := range audiometry.Frequencies {
		out.readThreshold[hz] = newReader(p.file, &f.Threshold, &p.table.Fields[out.left+i])
	}
	if f.Masked != nil {
		out.masked = p.reference(f.Masked.Column, f.Masked.Position, "masked", false)
		out.readMasked = newReader(p.file, f.Masked, &p.table.Fields[p.table.Index("masked")])
	}
	return out
}
