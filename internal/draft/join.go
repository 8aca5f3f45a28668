package draft

import (
	"strings"

	"hearduty/internal/grid"
)

// merges gives the merged cells of a sheet in a row.
func merges(all []grid.Range, line int) []grid.Range {
	var out []grid.Range
	for _, m := range all {
		if m.FirstRow <= line && line <= m.LastRow {
			out = append(out, m)
		}
	}
	return out
}

// joinNames joins two header rows by a blank, as a map does: a blank cell above goes on from its left, or as far as
// merged cells reach. A name that is only known without what stands above it goes by its own.
func joinNames(above, below []string, merged []grid.Range) []string {
	names := make([]string, max(len(above), len(below)))
	at := func(list []string, i int) string {
		if i < len(list) {
			return list[i]
		}
		return ""
	}
	left := ""
	for i := range names {
		own, low := at(above, i), at(below, i)
		if own != "" {
			left = own
		}
		group := left
		if own == "" && merged != nil {
			group = ""
			for _, m := range merged {
				if m.FirstCol <= i+1 && i+1 <= m.LastCol {
					group = at(above, m.FirstCol-1)
				}
			}
		}
		names[i] = strings.TrimSpace(group + " " + low)
		_, isTone := parseTone(names[i])
		switch {
		case low == "":
			names[i] = own
		case !isTone && !known.knows(names[i]) && known.knows(low):
			names[i] = low
		}
	}
	return names
}
