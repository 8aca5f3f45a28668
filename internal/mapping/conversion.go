package mapping

import (
	"math"
	"strconv"
	"time"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// plainly makes a conversion of one that knows nothing of masking.
func plainly(f func(grid.Cell) (string, *convert.Problem)) func(grid.Cell) (string, bool, *convert.Problem) {
	return func(c grid.Cell) (string, bool, *convert.Problem) {
		text, p := f(c)
		return text, false, p
	}
}

// conversion gives what turns a cell into a text of the field.
func (r *reader) conversion(f *File, col *Column) func(grid.Cell) (string, bool, *convert.Problem) {
	numbers := newNumbers(f.Numbers)
	switch r.field.Type {
	case record.Day:
		return plainly(r.dates.Read)
	case record.Decimal:
		return plainly(quantity(r.field, numbers, col.Unit))
	case record.YesNo:
		return plainly(r.answer)
	case record.Words:
		return plainly(r.list(col.Split))
	case record.Hearing:
		return hearing(f, numbers, r.field)
	}
	if r.field.One != nil {
		return plainly(r.one)
	}
	id := convert.ID{Pad: col.Pad, Strip: col.Strip, Prefix: col.Prefix, Case: col.Case}
	if isID(r.field) || col.Pad > 0 || col.Strip != nil || col.Prefix != "" || col.Case != "" {
		return plainly(id.Read)
	}
	return plainly(freeText)
}

// newNumbers makes the reader of numbers.
func newNumbers(n *Numbers) *convert.Numbers {
	out := &convert.Numbers{}
	if n == nil {
		return out
	}
	if n.Decimal != "" {
		out.Decimal = n.Decimal[0]
	}
	switch n.Thousands {
	case "":
	case "space":
		out.Thousands = ' '
	default:
		out.Thousands = rune(n.Thousands[0])
	}
	return out
}

// newDates makes the reader of dates, and says whether their order is still to be proven.
func newDates(d *Dates, order string) (out *convert.Dates, proven bool) {
	out = &convert.Dates{}
	if d != nil {
		out.Latest, out.Buddhist = d.Latest, d.Calendar == "buddhist"
		out.Serial, _ = strconv.Atoi(d.Serial)
		switch d.Zone {
		case "":
		case "as_written":
			out.Written = true
		default:
			out.Zone, _ = time.LoadLocation(d.Zone) // the check of the map refuses unknown zones
		}
		if order == "" {
			order = d.Order
		}
	}
	if order == "proven" {
		return out, true
	}
	out.Order = convert.Order(order)
	return out, false
}

// quantity gives the conversion of a number, in the unit of its field.
func quantity(f *record.Field, n *convert.Numbers, unit string) func(grid.Cell) (string, *convert.Problem) {
	measure := measureOf(f)
	if unit == "" {
		unit = measure
	}
	switch measure {
	case minutes:
		return func(c grid.Cell) (string, *convert.Problem) { return n.Minutes(c, unit) }
	case percent:
		return func(c grid.Cell) (string, *convert.Problem) { return n.Percent(c, unit) }
	case hours:
		return func(c grid.Cell) (string, *convert.Problem) { return inHours(n, c, unit) }
	}
	signs := signsOf(f)
	return func(c grid.Cell) (string, *convert.Problem) { return n.Read(c, signs...) }
}

// inHours reads a duration and gives hours, rounded to the second unless hours are written.
func inHours(n *convert.Numbers, c grid.Cell, unit string) (string, *convert.Problem) {
	text, p := n.Minutes(c, unit)
	if p != nil || text == "" {
		return text, p
	}
	if unit == hours && c.Kind != grid.Clock {
		if written, p := n.Read(c); p == nil {
			return written, nil
		}
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		return "", &convert.Problem{Why: "the duration cannot be read", Remedy: "Write it in the unit that the map states"}
	}
	return strconv.FormatFloat(math.Round(v/60*1e4)/1e4, 'f', -1, 64), nil
}

// hearing gives the conversion of a threshold.
func hearing(f *File, n *convert.Numbers, field *record.Field) func(grid.Cell) (string, bool, *convert.Problem) {
	t := convert.Thresholds{Numbers: n}
	if said := f.Thresholds; said != nil {
		t.NotTested, t.Masked = said.NotTested, said.Masked
		if no := said.NoResponse; no != nil {
			t.NoWords, t.NoMarks, t.Limit = no.Words, no.Marks, no.limit
		}
	}
	hz, _ := frequencyOf(field.Name)
	return func(c grid.Cell) (string, bool, *convert.Problem) { return t.Read(c, hz) }
}

// limit gives the highest level presented at a frequency.
func (n *NoResponse) limit(hz int) (float64, bool) {
	if v, ok := n.Limits[strconv.Itoa(hz)]; ok {
		return v, true
	}
	return n.Limit, n.Limit != 0
}
