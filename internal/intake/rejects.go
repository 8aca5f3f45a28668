package intake

import (
	"encoding/csv"
	"io"
	"strconv"
	"strings"
)

// rejectColumns are the columns of the file of rejects.
var rejectColumns = []string{"file", "sheet", "row", "column", "header", "field", "read", "why", "remedy"}

// WriteRejects writes rejects as CSV for whoever mends the data: one a row, a header also if there are none. The
// text is UTF-8 with the mark by which spreadsheet programs recognize it. What such a program would take for
// a formula gets an apostrophe in front. Give it rejects that can be shown, as Ledger.Shown makes them.
func WriteRejects(w io.Writer, rejects []Reject) error {
	if _, err := io.WriteString(w, "\ufeff"); err != nil {
		return err
	}
	out := csv.NewWriter(w)
	if err := out.Write(rejectColumns); err != nil {
		return err
	}
	for _, r := range rejects {
		cells := []string{r.File, r.Sheet, known(r.Row), known(r.Column), r.Header, r.Field, r.Read, r.Why, r.Remedy}
		for i := range cells {
			cells[i] = guard(cells[i])
		}
		if err := out.Write(cells); err != nil {
			return err
		}
	}
	out.Flush()
	return out.Error()
}

// known writes a number, and nothing for 0.
func known(n int) string {
	if n == 0 {
		return ""
	}
	return strconv.Itoa(n)
}

// guard puts an apostrophe before a text that a spreadsheet program could run as a formula, also behind blanks
// and in wide signs, and before one that begins with a control character.
func guard(text string) string {
	rest := strings.TrimLeft(text, " \u00a0\u3000'")
	if text != "" && text[0] < ' ' || rest != "" && strings.ContainsRune("=+-@\t\r\n＝＋－＠", []rune(rest)[0]) {
		return "'" + text
	}
	return text
}
