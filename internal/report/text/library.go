package text

import (
	"fmt"
	"io"

	"hearduty/internal/bundle"
)

// Library lists bundles by what they say of themselves, one paragraph each.
func Library(w io.Writer, heads []*bundle.Head, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	for i, h := range heads {
		if i > 0 {
			p.blank()
		}
		p.para(0, 2, h.ID)
		p.para(2, 2, sentence(h.About.Title))
		p.para(2, 2, fmt.Sprintf("%s, %s, revision %s, last held against the text on %s.", upper(h.About.Kind), count(h.Duties, "duty", "duties"), h.Revision, h.About.CheckedOn))
		if h.Place != "" {
			p.para(2, 2, sentence("Read from "+h.Place)+signature(h.Signature))
		}
	}
	if len(heads) == 0 {
		p.raw("There are no bundles.")
	}
	return p.flush()
}
