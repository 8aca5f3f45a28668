package html

import (
	"cmp"
	"slices"
)

// laneNames are the lanes in the order in which they are drawn, with their names. Other lanes follow by name.
var laneNames = [][2]string{
	{"employment", "employed"}, {"in use", "in use"}, {"certificate", "certificate valid"}, {"group", "group"}, {"exposure", "exposure"},
	{"program", "in the program"}, {"protector", "protector"}, {"test", "hearing tests"}, {"training", "training"}, {"notice", "notices"},
	{"follow-up", "follow-ups"}, {"fit-test", "fit tests"}, {"wear-check", "wear checks"}, {"calibration", "calibration"},
	{"survey", "surveys"}, {"measurement", "measurements"}, {"change", "changes"}, {"control", "controls"}, {"document", "documents"},
}

// laneOrder gives the lanes of a list in the order in which they are drawn.
func laneOrder[T any](list []T, of func(*T) string) []string {
	var lanes []string
	for i := range list {
		if l := of(&list[i]); !slices.Contains(lanes, l) {
			lanes = append(lanes, l)
		}
	}
	place := func(lane string) int {
		if n := slices.IndexFunc(laneNames, func(x [2]string) bool { return x[0] == lane }); n >= 0 {
			return n
		}
		return len(laneNames)
	}
	slices.SortFunc(lanes, func(a, b string) int { return cmp.Or(place(a)-place(b), cmp.Compare(a, b)) })
	return lanes
}

func laneName(lane string) string {
	for _, x := range laneNames {
		if x[0] == lane {
			return x[1]
		}
	}
	return lane
}
