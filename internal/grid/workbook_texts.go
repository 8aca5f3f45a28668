package grid

import (
	"strings"
)

const maxCellText = 1 << 20 // bytes of the text of one cell

// texts are the shared texts of a workbook, one behind the other.
type texts struct {
	all  string
	ends []uint32
}

func (t *texts) at(i int) (string, bool) {
	if i < 0 || i >= len(t.ends) {
		return "", false
	}
	from := uint32(0)
	if i > 0 {
		from = t.ends[i-1]
	}
	return t.all[from:t.ends[i]], true
}

func readTexts(b *book) (*texts, error) {
	t := &texts{}
	if b.texts == "" {
		return t, nil
	}
	var all strings.Builder
	var one []byte
	err := b.parts.each(b.texts, b.limits.texts, func(x *part, name string) (err error) {
		if name != "si" || x.depth() != 2 {
			return nil
		}
		if one, err = x.rich(one[:0]); err == nil {
			all.Write(unescape(one))
			t.ends = append(t.ends, uint32(all.Len()))
		}
		return err
	})
	t.all = all.String()
	return t, err
}

// rich appends the text of the element that has just started: its t elements and those of its runs, without
// what is only there to be spoken (phonetic runs).
func (m *markup) rich(out []byte) ([]byte, error) {
	take := false
	for depth := m.depth(); m.depth() >= depth; {
		tok, err := m.next()
		if err != nil {
			return out, cut(err)
		}
		switch {
		case tok == characters && take:
			if out = append(out, m.text...); len(out) > maxCellText {
				return out, errLongText
			}
		case tok == startTag && string(m.name) == "rPh":
			if err := m.skip(); err != nil {
				return out, cut(err)
			}
		case tok == startTag:
			take = string(m.name) == "t"
		case tok == endTag:
			take = false
		}
	}
	return out, nil
}
