package intake

import (
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/record"
)

// orphan says why a row of an unknown worker cannot be used, and whom it may belong to. It never decides that.
func (g *register) orphan(worker string) *record.Problem {
	shown := record.Shorten(worker)
	if at, ok := g.outWorkers[worker]; ok {
		return refuse("worker_id", worker, "Mend the worker's row first", "the row of worker %q (%s) was rejected, so this row belongs to nobody", shown, g.place(at))
	}
	if g.workerFiles == 0 {
		return refuse("worker_id", worker, "Add a file workers.csv to the records of the program file", "the program has no file of workers, so the row of worker %q belongs to nobody", shown)
	}
	switch like := g.alike(worker); len(like) {
	case 0:
		return refuse("worker_id", worker, "Correct the id (leading zeros count), or add the worker to the file of workers", "no worker has the id %q", shown)
	case 1:
		remedy := "If they are one person, "
		if len(worker) < len(like[0]) {
			remedy += "write pad: " + strconv.Itoa(len(like[0])) + " for worker_id in a map, or "
		}
		return refuse("worker_id", worker, remedy+"name the person in the same_person file: {id: "+strconv.Quote(like[0])+", also: ["+strconv.Quote(worker)+"]}",
			"no worker has the id %q, but the id %q differs in leading zeros only", shown, like[0])
	default:
		const most = 5
		if len(like) > most {
			like = append(slices.Clone(like[:most]), "…")
		}
		return refuse("worker_id", worker, "Look up whose row it is, and write the id in full",
			"no worker has the id %q, and which of %s is meant cannot be told", shown, strings.Join(like, ", "))
	}
}

// alike lists the workers whose ids are the same number: digits that differ in leading zeros only.
func (g *register) alike(worker string) []string {
	number, ok := numberOf(worker)
	if !ok {
		return nil
	}
	if g.likes == nil {
		g.likes = map[string][]string{}
		for id := range g.workers {
			if n, ok := numberOf(id); ok {
				g.likes[n] = append(g.likes[n], id)
			}
		}
		for _, ids := range g.likes {
			slices.Sort(ids)
		}
	}
	return g.likes[number]
}

// numberOf gives an id of digits without its leading zeros.
func numberOf(id string) (string, bool) {
	for i := range len(id) {
		if id[i] < '0' || id[i] > '9' {
			return "", false
		}
	}
	return strings.TrimLeft(id, "0"), id != ""
}
