package draft

import (
	"fmt"
	"slices"

	"hearduty/internal/record"
)

// Points for a kind of record.
const (
	tonePoints = 2.0 // a column of thresholds with its ear
	namePoints = 3.0 // a name that one kind only has; shared among the kinds that have it
	needPoints = 1.0 // taken away for each required field without a column
	filePoints = 1.0 // the file has the canonical name
)

// findKind takes the export for the kind of record that its columns fit best.
func (a *analysis) findKind() {
	points := a.kindPoints()
	kinds := record.Kinds()
	slices.SortStableFunc(kinds, func(x, y record.Kind) int {
		switch {
		case points[x] > points[y]:
			return -1
		case points[x] < points[y]:
			return 1
		}
		return 0
	})
	best, second := kinds[0], kinds[1]
	a.kind = best
	eared, bare := a.tones()
	switch {
	case a.o.Kind != "":
		a.kind, a.kindSure, a.kindWhy = a.o.Kind, certain, "it was stated"
	case points[best] <= 0:
		a.kind, a.kindSure, a.kindWhy = "", unsure, "no column tells"
	case points[best] >= 4 && points[best] >= 1.6*points[second]:
		a.kindSure = certain
	case points[best] >= 1.5 && points[best] >= 1.15*points[second]:
		a.kindSure = likely
	default:
		a.kindWhy = fmt.Sprintf("the columns fit %s about as well", second)
	}
	if a.kindWhy == "" {
		switch {
		case best == "audiogram" && eared >= 2:
			a.kindWhy = fmt.Sprintf("thresholds of one ear at one frequency in %s", several(eared, "column"))
		case best == "audiogram" && a.frequency != nil:
			a.kindWhy = "columns tell ear, frequency and threshold"
		case best == "audiogram" && a.ear != nil:
			a.kindWhy = fmt.Sprintf("%d columns are frequencies, and one tells the ear", bare)
		default:
			a.kindWhy = fmt.Sprintf("%d of %d columns have names that are known for it", a.knownFor(best), len(a.columns))
		}
	}
	a.table, _ = record.TableOf(a.kind)
	if a.table != nil {
		return
	}
	a.kindSure = unsure
}

// knownFor counts the columns whose names are known for the kind.
func (a *analysis) knownFor(k record.Kind) int {
	table, _ := record.TableOf(k)
	n := 0
	for _, c := range a.columns {
		found, _ := known.fields(c.rest)
		n += bit(slices.ContainsFunc(found, func(t target) bool {
			return (t.kind == k || t.kind == "") && table.Index(t.field) >= 0
		}))
	}
	return n
}

func (a *analysis) kindPoints() map[record.Kind]float64 {
	points := map[record.Kind]float64{}
	claimed := map[target]bool{}
	for _, c := range a.columns {
		if c.tone != nil || c.rest == "" {
			continue
		}
		of := map[record.Kind]string{}
		found, _ := known.fields(c.rest)
		for _, t := range found {
			for _, k := range record.Kinds() {
				table, _ := record.TableOf(k)
				if (t.kind == k || t.kind == "") && table.Index(t.field) >= 0 && of[k] == "" {
					of[k] = t.field
				}
			}
		}
		for k, field := range of {
			if !claimed[target{k, field}] {
				claimed[target{k, field}] = true
				points[k] += namePoints / float64(len(of))
			}
		}
	}
	eared, bare := a.tones()
	points["audiogram"] += tonePoints * float64(eared)
	if a.ear != nil {
		points["audiogram"] += tonePoints * float64(bare+3)
	}
	for _, k := range record.Kinds() {
		table, _ := record.TableOf(k)
		for _, f := range table.Fields {
			if f.Required && !f.ID && f.Name != "measurement_id" && f.Name != "site" && !claimed[target{k, f.Name}] {
				points[k] -= needPoints
			}
		}
	}
	if k, ok := record.KindOfFile(a.shown); ok {
		points[k] += filePoints
	}
	return points
}
