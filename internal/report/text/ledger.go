package text

import (
	"fmt"
	"strings"

	"hearduty/internal/finding"
)

// ledger accounts for every row that was read, and says of each row left out why.
func ledger(p *page, r *finding.Report) {
	p.heading(bold, "Records read: rows = accepted + rejected")
	if len(r.Inputs) == 0 {
		p.raw("No file was read.")
		return
	}
	name := func(in finding.Input) string {
		if in.Sheet != "" {
			return clean(in.File + " " + in.Sheet)
		}
		return clean(in.File)
	}
	first := cells("file")
	var rows, accepted, rejected int
	for _, in := range r.Inputs {
		first = max(first, cells(name(in)))
		rows, accepted, rejected = rows+in.Rows, accepted+in.Accepted, rejected+in.Rejected
	}
	const numbers = 30
	first = min(first, p.width-numbers)
	line := func(file string, a, b, c any) {
		for cells(file) > first {
			head := cut(file, first)
			p.raw(head)
			file = file[len(head):]
		}
		p.raw(padRight(file, first) + padLeft(fmt.Sprint(a), 9) + padLeft(fmt.Sprint(b), 10) + padLeft(fmt.Sprint(c), 10))
	}
	line("file", "rows", "accepted", "rejected")
	for _, in := range r.Inputs {
		line(name(in), in.Rows, in.Accepted, in.Rejected)
	}
	line("in all", rows, accepted, rejected)
	if len(r.Rejects) == 0 {
		return
	}
	p.heading(yellow, "Rejected rows: they count for nothing until they are mended")
	for _, reject := range r.Rejects {
		p.item(0, "- ", Reject(reject))
	}
}

// Reject tells in a sentence why a row was left out and what to do.
func Reject(r finding.Reject) string {
	at := r.File
	switch {
	case r.Sheet != "" && r.Row > 0:
		at += fmt.Sprintf(" %s!%d", r.Sheet, r.Row)
	case r.Row > 0:
		at += fmt.Sprintf(":%d", r.Row)
	}
	if r.Field != "" {
		at += ": " + r.Field
	}
	also := ""
	if len(r.Also) > 0 {
		also = "Look at " + strings.Join(r.Also, ", ") + " of the same row, too."
	}
	return strings.Join(strings.Fields(clean(at+": "+sentence(r.Why)+" "+sentence(r.Remedy)+" "+also)), " ")
}
