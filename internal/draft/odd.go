package draft

import (
	"io"
	"slices"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// oddRows are the rows behind the header that are no data.
type oddRows struct {
	repeats  []int          // rows that repeat the header
	comments map[string]int // rows by the sign with which comments begin
	words    map[string][]int
	mid      map[string]bool // words that begin rows with data behind them
	few      []int           // rows with one or two cells that are neither; somebody must look
	hidden   int
}

// maxNamed is the number of rows that a comment names.
const maxNamed = 5

// classify says whether a row is data, and notes it if not.
func (a *analysis) classify(r *grid.Row) bool {
	n := filled(r)
	if n == 0 {
		return false
	}
	o := &a.odd
	begin := first(r)
	for _, sign := range []string{"#", "//"} {
		if strings.HasPrefix(begin, sign) && convert.Fold(begin) != "n a" && !strings.HasPrefix(begin, "#N") {
			o.comments[sign]++
			return false
		}
	}
	if a.repeatsHeader(r) {
		o.repeats = keep(o.repeats, r.Line)
		return false
	}
	if wide := len(a.h.names); n <= 2 && wide >= 4 || n == 1 && wide >= 3 {
		if word := footerWord(begin); word != "" {
			o.words[word] = keep(o.words[word], r.Line)
			return false
		}
		o.few = keep(o.few, r.Line)
		return false
	}
	if r.Hidden {
		o.hidden++
	}
	for word := range o.words {
		o.mid[word] = true
	}
	return true
}

func keep(rows []int, line int) []int {
	if len(rows) > maxNamed {
		return rows
	}
	return append(rows, line)
}

func (a *analysis) repeatsHeader(r *grid.Row) bool {
	for _, texts := range a.h.texts {
		same := len(texts) > 1 && len(texts) >= len(r.Cells)
		for i := 0; same && i < len(texts); i++ {
			same = strings.TrimSpace(cell(r, i).Text) == texts[i]
		}
		if same {
			return true
		}
	}
	return false
}

// footerWord gives the known word with which a row begins that is no data, as it is written there.
func footerWord(text string) string {
	small := strings.ToLower(text)
	for _, w := range known.footer {
		if rest, ok := strings.CutPrefix(small, w); ok && (rest == "" || !isLetterStart(rest)) && len(w) <= len(text) && strings.EqualFold(text[:len(w)], w) {
			return text[:len(w)]
		}
	}
	return ""
}

func isLetterStart(s string) bool { return hasLetter(string([]rune(s)[:1])) }

// readAll goes through the whole file for what a sample cannot settle: the order of dates, and rows that are no data.
func (a *analysis) readAll() error {
	a.odd = oddRows{comments: map[string]int{}, words: map[string][]int{}, mid: map[string]bool{}}
	if a.h.transposed {
		for i := range a.s.rows {
			if i > 0 {
				a.look(&a.s.rows[i])
			}
		}
		return nil
	}
	rows, err := a.file.Rows(a.open)
	if err != nil {
		return err
	}
	defer rows.Close()
	from := a.firstData()
	var r grid.Row
	for {
		err := rows.Next(&r)
		if err == io.EOF {
			break
		}
		if err != nil {
			a.s.bad = keep(a.s.bad, faultLine(err))
			break
		}
		if r.Fault == nil && r.NotData == "" && r.Line >= from {
			a.look(&r)
		}
	}
	a.s.about = rows.About()
	return nil
}

// look takes a row into the evidence.
func (a *analysis) look(r *grid.Row) {
	if !a.classify(r) {
		return
	}
	a.total++
	for _, c := range a.columns {
		if c.dated && c.index > 0 {
			v := cell(r, c.index-1)
			if text := strings.TrimSpace(v.Text); text != "" && !sentinel(text) && !known.codes["blank"][plain(text)] {
				c.dates.Add(v, r.Line)
			}
		}
	}
}

// firstData gives the first row that can be data.
func (a *analysis) firstData() int {
	switch {
	case isObjects(a.s.about.Format):
		return 1
	case a.h.rows == 0 && a.h.doubtful:
		return a.h.line + 1
	case a.h.rows == 0:
		return a.h.line
	case a.h.at+a.h.rows-1 < len(a.s.rows):
		return a.s.rows[a.h.at+a.h.rows-1].Last + 1
	}
	return 1
}

// takeData picks the rows of the sample that are data.
func (a *analysis) takeData() {
	a.odd = oddRows{comments: map[string]int{}, words: map[string][]int{}, mid: map[string]bool{}}
	from := a.firstData()
	for i := range a.s.rows {
		r := &a.s.rows[i]
		if a.h.transposed && i == 0 || !a.h.transposed && r.Line < from {
			continue
		}
		if a.classify(r) {
			a.data = append(a.data, r)
		}
	}
}

// sortedWords gives the words that begin rows which are no data: those with data behind them, or those without.
func (o *oddRows) sortedWords(mid bool) []string {
	var out []string
	for w := range o.words {
		if o.mid[w] == mid {
			out = append(out, w)
		}
	}
	slices.Sort(out)
	return out
}
