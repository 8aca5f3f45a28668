package demo

import (
	"fmt"
	"hash/fnv"
	"math/rand/v2"

	"hearduty/internal/record"
)

// person is one worker of the firm.
type person struct {
	id     string
	sex    string
	birth  Date
	stays  []stay
	offset int       // days from the first day in noise to the baseline audiogram; 0 for any
	van    string    // day of the baseline audiogram in the test van, if it was made there
	exit   bool      // an exit test is made on leaving
	ears   earsPlan  // what happens to the hearing
	roll   rollEntry // what the employer's roll says
}

type rollEntry = record.Answer

// stay is a stretch of days in one group; a stay without last day is open.
type stay struct {
	site     *site
	group    *group
	from, to Date
}

func (s stay) end() Date {
	if s.to.Known() {
		return s.to
	}
	return day("9999-12-31")
}

// posts says who works in a group from the takeover on: workers numbered first to last.
type posts struct {
	group       string
	first, last int
}

var kilnHillPosts = []posts{
	{"kh-grinding", 101, 114}, {"kh-knock-out", 115, 124}, {"kh-moulding", 125, 136}, {"kh-core", 137, 144}, {"kh-pattern", 145, 150},
	{"kh-office", 151, 158}, {"kh-melt", 159, 161}, {"kh-sand", 162, 163}, {"kh-yard", 164, 166}, {"kh-lab", 167, 168},
}

var larchStreetPosts = []posts{{"ls-planer", 1, 10}, {"ls-spray", 11, 15}, {"ls-assembly", 16, 23}, {"ls-office", 24, 28}}

// move is a worker's last day in a group, and the next group with its first day, if there is one.
type move struct{ id, last, group, first string }

var moves = []move{
	// Leavers.
	{"K0115", "2021-01-29", "", ""}, {"K0124", "2021-02-12", "", ""}, {"K0146", "2021-10-29", "", ""}, {"K0152", "2023-06-30", "", ""},
	{"K0135", "2023-03-31", "ls-planer", "2023-04-01"}, // to the other site
	{"K0164", "2024-02-29", "", ""}, {"K0174", "2025-04-30", "", ""}, {"K0155", "2025-08-29", "", ""},
	{"L0002", "2022-05-27", "", ""}, {"L0014", "2021-09-24", "", ""}, {"L0019", "2023-01-27", "", ""}, {"L0026", "2024-06-28", "", ""}, {"L0030", "2025-02-28", "", ""},
	// Moves between groups.
	{"K0130", "2023-04-30", "kh-office", "2023-05-01"},
	{"K0147", "2022-01-31", "kh-grinding", "2022-02-01"},
	{"K0139", "2021-05-31", "kh-moulding", "2021-06-01"},
	{"L0005", "2024-03-03", "ls-office", "2024-03-04"},
	{"L0018", "2022-10-02", "ls-planer", "2022-10-03"},
	// One worker who left and was hired again.
	{"K0120", "2022-08-31", "kh-knock-out", "2023-11-06"},
}

// hire is a worker who came after the takeover.
type hire struct{ id, group, first string }

var hires = []hire{
	{"K0169", "kh-moulding", "2021-02-01"}, {"K0170", "kh-knock-out", "2021-02-15"}, {"K0171", "kh-knock-out", "2021-03-01"},
	{"K0172", "kh-pattern", "2021-11-15"}, {"K0173", "kh-pattern", "2022-02-14"}, {"K0174", "kh-grinding", "2022-05-02"},
	{"K0175", "kh-knock-out", "2022-09-12"}, {"K0176", "kh-moulding", "2023-04-17"}, {"K0177", "kh-moulding", "2023-05-15"},
	{"K0178", "kh-office", "2023-07-10"}, {"K0179", "kh-yard", "2024-03-11"}, {"K0180", "kh-core", "2024-08-05"},
	{"K0181", "kh-grinding", "2025-05-12"}, {"K0182", "kh-office", "2025-09-08"}, {"K0183", "kh-grinding", "2026-03-09"},
	{"000417", "kh-knock-out", "2023-09-04"}, {"000418", "kh-core", "2024-10-07"}, {"000431", "kh-grinding", "2025-06-02"}, // agency workers
	{"L0029", "ls-spray", "2021-10-11"}, {"L0030", "ls-planer", "2022-06-06"}, {"L0031", "ls-assembly", "2022-10-10"},
	{"L0032", "ls-assembly", "2023-02-06"}, {"L0033", "ls-office", "2024-07-15"}, {"L0034", "ls-planer", "2024-03-11"},
	{"L0035", "ls-planer", "2025-03-17"}, {"L0036", "ls-assembly", "2025-10-06"},
}

// vanBaselines are the workers whose baseline audiogram was made in the test van, within the year that
// the law gives then.
var vanBaselines = map[string]string{"K0169": "2021-11-16", "K0170": "2021-11-16", "K0171": "2021-11-17"}

// roster gives all workers of the firm.
func roster(groups map[string]*group, sites map[string]*site) []*person {
	var list []*person
	byID := map[string]*person{}
	add := func(id, group string, first Date) {
		p := newPerson(id)
		p.ears = earsPlans[id]
		p.van = vanBaselines[id]
		p.stays = []stay{{sites[siteOf[group]], groups[group], first, 0}}
		if p.ears.happens != nothing {
			p.offset = 45 + 14*dice(id, "offset").IntN(4)
		}
		list, byID[id] = append(list, p), p
	}
	for _, part := range []struct {
		letter string
		posts  []posts
	}{{"K", kilnHillPosts}, {"L", larchStreetPosts}} {
		for _, g := range part.posts {
			for n := g.first; n <= g.last; n++ {
				add(fmt.Sprintf("%s%04d", part.letter, n), g.group, takeover)
			}
		}
	}
	for _, h := range hires {
		add(h.id, h.group, day(h.first))
	}
	for _, m := range moves {
		p := byID[m.id]
		p.stays[len(p.stays)-1].to = day(m.last)
		if m.group == "" {
			p.exit = true
			continue
		}
		p.stays = append(p.stays, stay{sites[siteOf[m.group]], groups[m.group], day(m.first), 0})
	}
	return list
}

// newPerson makes up a worker of working age.
func newPerson(id string) *person {
	rng := dice(id, "person")
	p := &person{id: id, sex: "male", birth: day("1962-01-15").AddDays(rng.IntN(38 * 365))}
	if rng.IntN(5) == 0 {
		p.sex = "female"
	}
	return p
}

// dice gives random numbers that depend on the worker and the purpose only.
func dice(id, purpose string) *rand.Rand {
	h := fnv.New64a()
	h.Write([]byte(id + "/" + purpose))
	return rand.New(rand.NewPCG(1910_95, h.Sum64()))
}
