package rehearse

import (
	"bufio"
	"fmt"
	"io"
	"slices"
	"strings"
)

// Write writes the failures and a summary for people.
func (r *Result) Write(w io.Writer) error {
	out := bufio.NewWriter(w)
	for _, f := range r.Failures {
		fmt.Fprintf(out, "%s\n\n", f)
	}
	fmt.Fprintf(out, "%s, revision %s\n", r.Bundle.ID, r.Bundle.Revision)
	fmt.Fprintf(out, "  tests of rules   %s\n", r.Tests)
	fmt.Fprintf(out, "  law cases        %s\n", r.Cases)
	fmt.Fprintf(out, "  lines of rules   %d of %d reached by tests\n", r.Reached, r.Lines)
	if r.Narrowed {
		fmt.Fprintln(out, "Only a part was tried.")
		return out.Flush()
	}
	fmt.Fprintf(out, "  duties           %d of its own\n", len(r.Duties))
	for _, group := range []struct {
		what string
		miss func(*DutyCases) bool
	}{
		{"fires", func(d *DutyCases) bool { return d.Fires == 0 }},
		{"stays quiet", func(d *DutyCases) bool { return d.Quiet == 0 }},
		{"meets its boundary", func(d *DutyCases) bool { return d.Boundary == 0 && r.has(d, boundaryWords) }},
		{"lacks a record", func(d *DutyCases) bool { return d.Lacks == 0 && r.has(d, lackWords) }},
	} {
		var ids []string
		for i := range r.Duties {
			if group.miss(&r.Duties[i]) {
				ids = append(ids, r.Duties[i].ID)
			}
		}
		if len(ids) == 0 {
			ids = []string{"none"}
		}
		fmt.Fprintf(out, "  without a law case in which the duty %s: %s\n", group.what, strings.Join(ids, ", "))
	}
	if r.Failed() {
		fmt.Fprintf(out, "%s wrong.\n", things(len(r.Failures)))
	} else {
		fmt.Fprintln(out, "Nothing is wrong.")
	}
	return out.Flush()
}

// boundaryWords are the fields of an obligation that has a boundary, which are a time or a limit. lackWords are what a
// rule writes that says which record is missing. Of a duty without them a case cannot show either.
var (
	boundaryWords = []string{`"within":`, `"every":`, `"at_most":`, `"below":`, `"at_least":`, `"above":`}
	lackWords     = []string{`"missing":`}
)

func (r *Result) has(d *DutyCases, words []string) bool {
	duty, ok := r.Bundle.Duty(d.ID)
	return ok && slices.ContainsFunc(words, func(w string) bool { return strings.Contains(duty.Text, w) })
}

func things(n int) string {
	if n == 1 {
		return "1 thing is"
	}
	return fmt.Sprintf("%d things are", n)
}

// String says how many of those tried hold.
func (c Count) String() string { return fmt.Sprintf("%d of %d hold", c.Run-c.Failed, c.Run) }
