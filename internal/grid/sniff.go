package grid

import "bytes"

// SeparatorLine is why a first line such as sep=; is no data.
const SeparatorLine = "separator line"

// sniffed is the number of records that settle the delimiter.
const sniffed = 20

// candidates are the delimiters that are looked for; of two that fit equally well, the first is taken.
var candidates = [...]byte{'\t', ';', '|', ','}

const comma = len(candidates) - 1

// separatorLine reads a first line such as sep=; and gives the delimiter that it names.
func separatorLine(head []byte, newline byte) (delimiter byte, ok bool) {
	line, _, _ := bytes.Cut(head, []byte{newline})
	line = bytes.Trim(trimReturn(line), `"`)
	if len(line) < 5 || !bytes.EqualFold(line[:4], []byte("sep=")) {
		return 0, false
	}
	d := line[4]
	if d < ' ' && d != '\t' || d >= 0x7f || d == '"' || len(bytes.Trim(line[4:], string(d))) > 0 {
		return 0, false
	}
	return d, true
}

// tally counts, in one record, each candidate outside quotes, and those commas that may as well be part of a
// text or number: between digits or before a blank.
type tally struct {
	n     [len(candidates)]int
	loose int
}

// sniff finds the delimiter by consistency: the one that the most of the first records hold equally often,
// where a delimiter that stands more often in a record counts more. A comma gives way to another that the same
// records hold, if it only stands between digits or before blanks, as decimal commas and names do.
func sniff(head []byte, newline byte, whole, byHeader bool) byte {
	records := tallies(head, newline, whole, byHeader)
	best, bestScore := comma, 0
	for c := range candidates {
		often, fit := usual(records, c)
		score := often * fit
		switch {
		case score == 0 || c == comma && textOnly(records, best, often):
		case score > bestScore:
			best, bestScore = c, score
		}
	}
	return candidates[best]
}

// usual gives how often the candidate stands in most of the records that hold it, and how many these are.
func usual(records []tally, c int) (often, fit int) {
	counts := map[int]int{}
	for _, r := range records {
		if n := r.n[c]; n > 0 {
			counts[n]++
			if counts[n] > fit || counts[n] == fit && n > often {
				often, fit = n, counts[n]
			}
		}
	}
	return often, fit
}

// textOnly says whether all records that hold the comma so often hold the other candidate as often as is usual,
// and hold commas only as part of texts and numbers.
func textOnly(records []tally, other, often int) bool {
	if other == comma {
		return false
	}
	usually, _ := usual(records, other)
	for _, r := range records {
		if r.n[comma] == often && (r.n[other] != usually || r.loose != often) {
			return false
		}
	}
	return true
}

// tallies counts the candidates in the first records that are not blank. A quote opens at the start of a cell
// and closes at its end, whatever of the candidates stands between cells.
func tallies(head []byte, newline byte, whole, byHeader bool) []tally {
	limit := sniffed
	if byHeader {
		limit = 1
	}
	var out []tally
	var t tally
	start, filled, quoted := true, false, false
	for i := 0; i < len(head) && len(out) < limit; i++ {
		c := head[i]
		switch at := bytes.IndexByte(candidates[:], c); {
		case c == '"' && (start || quoted):
			quoted, filled, start = !quoted, true, quoted
		case quoted:
		case c == newline:
			if filled {
				out = append(out, t)
			}
			t, start, filled = tally{}, true, false
		case at >= 0:
			t.n[at]++
			filled, start = true, true
			if at == comma && i+1 < len(head) && (head[i+1] == ' ' || i > 0 && digit(head[i-1]) && digit(head[i+1])) {
				t.loose++
			}
		case c != ' ' && c != '\r':
			filled, start = true, false
		}
	}
	if filled && (whole || len(out) == 0) && len(out) < limit {
		out = append(out, t)
	}
	return out
}

func digit(c byte) bool { return '0' <= c && c <= '9' }
