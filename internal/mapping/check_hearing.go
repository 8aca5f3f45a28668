package mapping

import (
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/convert"
	"hearduty/internal/record"
)

// thresholds looks at how levels are said to be written.
func (c *checker) thresholds() {
	t := c.f.Thresholds
	if t == nil {
		return
	}
	if c.table != nil && c.table.Kind != "audiogram" {
		c.sayKey("/thresholds", "Remove the key", "%s records have no hearing threshold levels", c.table.Kind)
		return
	}
	c.noResponse("/thresholds/no_response", t.NoResponse)
	meanings := []struct {
		at    string
		words []string
	}{{"/blank", c.f.Blank}, {"/thresholds/not_tested", t.NotTested}}
	if t.NoResponse != nil {
		meanings = append(meanings, struct {
			at    string
			words []string
		}{"/thresholds/no_response/words", t.NoResponse.Words})
	}
	for i, m := range meanings {
		for _, earlier := range meanings[:i] {
			known := newWordSet(earlier.words)
			for j, w := range m.words {
				if known.has(w) {
					c.say(m.at+"/"+strconv.Itoa(j), "Keep it in one of the two", "the word %q stands under %s as well", record.Shorten(w), key(earlier.at))
				}
			}
		}
	}
}

// key writes a pointer as a person would name it: thresholds.not_tested.
func key(pointer string) string { return strings.ReplaceAll(pointer[1:], "/", ".") }

// noResponse wants the highest level presented where words do not tell it.
func (c *checker) noResponse(at string, n *NoResponse) {
	if n == nil {
		return
	}
	for _, hz := range sortedKeys(n.Limits) {
		if v, err := strconv.Atoi(hz); err != nil || !slices.Contains(audiometry.Frequencies[:], v) {
			c.sayKey(at+"/limits/"+token(hz), "Write a frequency in Hz such as 4000", "%q is no frequency that records hold", record.Shorten(hz))
		}
	}
	if n.Words == nil && n.Marks == nil {
		c.say(at, "List the words or the marks", "the map says neither by which words nor by which marks no response is written")
	}
	if n.Words == nil || n.Limit != 0 {
		return
	}
	if n.Limits == nil {
		c.say(at, "Write limit, in dB HL, or limits by frequency", "the words for no response do not say what the highest level presented was")
		return
	}
	missing := map[int]bool{}
	for _, fields := range c.f.allFields() {
		for name := range fields {
			if hz, ok := frequencyOf(name); ok && n.Limits[strconv.Itoa(hz)] == 0 {
				missing[hz] = true
			}
		}
	}
	for _, hz := range audiometry.Frequencies {
		if missing[hz] {
			c.say(at+"/limits", "Add it, or write limit for all other frequencies", "the highest level presented at %d Hz is not stated", hz)
		}
	}
}

// frequencyOf gives the frequency in Hz of a threshold's field.
func frequencyOf(name string) (int, bool) {
	side, inner, _ := strings.Cut(name, ".")
	if side != "left" && side != "right" && side != "ear" {
		return 0, false
	}
	if inner == "repeat_1000" {
		return 1000, true
	}
	hz, err := strconv.Atoi(inner)
	return hz, err == nil && slices.Contains(audiometry.Frequencies[:], hz)
}

// allFields lists the fields that are common, and those of each record.
func (f *File) allFields() []map[string]Column {
	out := []map[string]Column{f.Fields}
	for i := range f.Records {
		out = append(out, f.Records[i].Fields)
	}
	return out
}

// ear looks at the column that tells the ear.
func (c *checker) ear() {
	e := c.f.Ear
	if e == nil {
		return
	}
	c.place("/ear", e.Column, e.Position)
	if _, p := convert.NewWords(e.words()); p != nil {
		c.say("/ear/right", "Keep each word in one of the two", "a word stands for the left ear as well as for the right one")
	}
	if c.table != nil && fieldsNamed(c.table, "ear.500") == nil && fieldsNamed(c.table, "ear.par_db") == nil {
		c.sayKey("/ear", "Remove the key", "%s records have no fields for each ear", c.table.Kind)
	}
	if c.f.Frequency != nil {
		return
	}
	for name := range c.f.Fields {
		if strings.HasPrefix(name, "ear.") {
			return
		}
	}
	c.sayKey("/ear", "Name fields such as ear.500, or add frequency", "the map says which column tells the ear, but nothing that belongs to one ear")
}

// words gives what each word says of the ear. A word for both gives an entry that differs in blanks only, which
// convert.NewWords refuses.
func (e *EarRows) words() map[string]string {
	out := map[string]string{}
	for _, w := range e.Left {
		out[w] = "left"
	}
	for _, w := range e.Right {
		if _, both := out[w]; both {
			w += " "
		}
		out[w] = "right"
	}
	return out
}

// frequency looks at the columns of rows of one frequency.
func (c *checker) frequency() {
	f := c.f.Frequency
	if f == nil {
		return
	}
	if c.f.Ear == nil {
		c.sayKey("/frequency", "Say under ear which column tells the ear", "rows of one frequency need to know the ear")
	}
	if c.table != nil && c.table.Kind != "audiogram" {
		c.sayKey("/frequency", "Remove the key", "%s records have no hearing threshold levels", c.table.Kind)
	}
	threshold, masked := &record.Field{Name: "the threshold", Type: record.Hearing}, &record.Field{Name: "masked", Type: record.YesNo}
	if c.table != nil && c.table.Index("left.500") >= 0 {
		threshold = &c.table.Fields[c.table.Index("left.500")]
		masked = &c.table.Fields[c.table.Index("masked")]
	}
	c.fromCell("/frequency/frequency", &f.Frequency)
	c.fromCell("/frequency/threshold", &f.Threshold)
	c.column("/frequency/frequency", &f.Frequency, nil)
	if u := f.Frequency.Unit; u != "" && u != "hz" && u != "khz" {
		c.say("/frequency/frequency/unit", "Write hz or khz", "a frequency cannot be in the unit %s", u)
	}
	for _, word := range sortedKeys(f.Frequency.Values) {
		if hz, err := strconv.Atoi(f.Frequency.Values[word]); err != nil || !slices.Contains(audiometry.Frequencies[:], hz) {
			c.say("/frequency/frequency/values/"+token(word), "Write a frequency in Hz such as 4000", "this is no frequency that records hold")
		}
	}
	c.column("/frequency/threshold", &f.Threshold, threshold)
	if f.Masked != nil {
		c.fromCell("/frequency/masked", f.Masked)
		c.column("/frequency/masked", f.Masked, masked)
	}
}

// fromCell wants a column of each row.
func (c *checker) fromCell(at string, col *Column) {
	if col.Above != "" || col.Constant != "" || len(col.Make) > 0 {
		c.say(at, "Name the column", "this must come from a column of each row")
	}
}
