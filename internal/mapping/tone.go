package mapping

import (
	"slices"
	"strconv"

	"hearduty/internal/audiometry"
	"hearduty/internal/grid"
)

// earOf tells the ear of a row.
func (s *source) earOf(row *grid.Row) (right bool, fault *Fault) {
	c := s.ear.from.of(row)
	side, known := s.ear.words.Find(c)
	switch {
	case known:
		return side == "right", nil
	case c.Text == "" && c.Kind != grid.Uncomputed:
		return false, s.fault(nil, "", s.ear.from, row, "the cell does not tell the ear", "Write one of the words that the map lists under ear")
	}
	return false, s.fault(nil, "", s.ear.from, row, "the map does not say which ear the cell means", "List it under ear.left or ear.right in the map, or leave such rows out by rows.only")
}

// tone adds the threshold of a row of one frequency.
func (s *source) tone(values []Value, row *grid.Row, right bool, fault *Fault) ([]Value, *Fault) {
	f := s.frequency
	got := f.readFrequency.read(f.frequency.of(row))
	if got.wrong != nil {
		return values, s.fault(fault, "frequency", f.frequency, row, got.wrong.Why, got.wrong.Remedy)
	}
	hz, err := strconv.Atoi(got.text)
	at := slices.Index(audiometry.Frequencies[:], hz)
	if err != nil || at < 0 {
		return values, s.fault(fault, "frequency", f.frequency, row, "the frequency is missing", "Fill it in, or leave such rows out by rows.only in the map")
	}
	field := f.left + at
	if right {
		field = f.right + at
	}
	cell := f.threshold.of(row)
	level := f.readThreshold[hz].read(cell)
	if level.wrong != nil {
		return values, s.fault(fault, s.table.Fields[field].Name, f.threshold, row, level.wrong.Why, level.wrong.Remedy)
	}
	if level.text != "" {
		values = append(values, Value{Field: field, Text: level.text, Read: unlike(cell.Text, level.text), Column: f.threshold.at + 1})
	}
	return s.masking(values, row, level.masked, fault)
}

// masking adds whether the other ear was masked, by the sign at the threshold or by a column.
func (s *source) masking(values []Value, row *grid.Row, sign bool, fault *Fault) ([]Value, *Fault) {
	f, field := s.frequency, s.recipes[0].masked
	from, text := f.threshold, ""
	if sign {
		text = "yes"
	}
	if f.masked != nil {
		got := f.readMasked.read(f.masked.of(row))
		if got.wrong != nil {
			return values, s.fault(fault, "masked", f.masked, row, got.wrong.Why, got.wrong.Remedy)
		}
		if text == "" {
			from, text = f.masked, got.text
		}
	}
	if text != "" && field >= 0 {
		values = append(values, Value{Field: field, Text: text, Read: unlike(from.of(row).Text, text), Column: from.at + 1})
	}
	return values, fault
}
