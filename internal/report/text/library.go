package text

import (
	"fmt"
	"io"

	"hearduty/internal/bundle"
)

// Library lists bundles, one paragraph each.
func Library(w io.Writer, l bundle.Library, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	for i, id := range l.IDs() {
		b := l[id]
		if i > 0 {
			p.blank()
		}
		p.para(0, 2, id)
		p.para(2, 2, sentence(b.About.Title))
		p.para(2, 2, fmt.Sprintf("%s, %s, revision %s, last held against the text on %s.", upper(b.About.Kind), count(len(b.Duties), "duty", "duties"), b.Revision, b.About.CheckedOn))
	}
	if len(l) == 0 {
		p.raw("There are no bundles.")
	}
	return p.flush()
}
