package text

import (
	"fmt"
	"strconv"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/intake"
)

// The columns of numbers in the table of inputs, and the least width of the names beside them.
const (
	ledgerRows, ledgerNumber = 9, 10
	ledgerNumbers            = ledgerRows + 3*ledgerNumber
	ledgerLeastName          = 12
)

// ledger accounts for every row that was read, and says of each row left out why.
func ledger(p *page, r *finding.Report) {
	p.heading(bold, "Records read: rows = accepted + rejected + not data")
	if len(r.Inputs) == 0 {
		p.raw("No file was read.")
		return
	}
	first := cells("file")
	total := (&intake.Ledger{Inputs: r.Inputs}).Total()
	for i := range r.Inputs {
		first = max(first, cells(clean(r.Inputs[i].Name())))
	}
	row := ledgerRow(p, first)
	row("file", "rows", "accepted", "rejected", "not data")
	for i := range r.Inputs {
		in := &r.Inputs[i]
		row(clean(in.Name()), in.Rows, in.Accepted, in.Rejected, in.NotData)
	}
	row("in all", total.Rows, total.Accepted, total.Rejected, total.NotData)
	if total.NotData > 0 {
		p.para(0, 2, "Not data: "+intake.Declared(total.Declared)+".")
	}
	if len(r.Rejects) == 0 {
		return
	}
	p.heading(yellow, "Rejected rows: they count for nothing until they are mended")
	for _, reject := range r.Rejects {
		p.item(0, "- ", Reject(reject))
	}
}

// ledgerRow gives a function that writes a row of the table. Where the lines are too short for names beside
// the numbers, a name stands in lines of its own.
func ledgerRow(p *page, first int) func(file string, rows, accepted, rejected, notData any) {
	apart := p.width-ledgerNumbers < min(first, ledgerLeastName)
	first = min(first, p.width-ledgerNumbers)
	if apart {
		first = p.width
	}
	return func(file string, rows, accepted, rejected, notData any) {
		numbers := padLeft(fmt.Sprint(rows), ledgerRows)
		for _, n := range []any{accepted, rejected, notData} {
			numbers += padLeft(fmt.Sprint(n), ledgerNumber)
		}
		for cells(file) > first {
			head := cut(file, first)
			p.raw(head)
			file = file[len(head):]
		}
		if apart {
			p.raw(file)
			p.raw(padLeft(numbers, p.width))
			return
		}
		p.raw(padRight(file, first) + numbers)
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
		if r.Header != "" {
			at += " (column " + strconv.Quote(r.Header) + ")"
		}
	}
	also := ""
	if len(r.Also) > 0 {
		also = "Look at " + strings.Join(r.Also, ", ") + " of the same row, too."
	}
	return strings.Join(strings.Fields(clean(at+": "+sentence(r.Why)+" "+sentence(r.Remedy)+" "+also)), " ")
}
