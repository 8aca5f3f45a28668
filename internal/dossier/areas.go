package dossier

import (
	"maps"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Area is the dossier of a place where people work, such as a hall.
type Area struct {
	Common
	Groups       []string           `json:"groups" doc:"groups that work in it"`
	Workers      int                `json:"workers" doc:"number of workers in these groups on the as-of day"`
	Exposed      map[string][]Spell `json:"exposed" doc:"stretches in which a group that works in it, or whoever would stay in it all day, is at or above each exposure level of the bundle"`
	Unknown      map[string][]Open  `json:"exposure_unknown" doc:"stretches in which that is not known of any, with the reason of one"`
	Measurements []Measurement      `json:"measurements" doc:"noise measurements of the area itself, oldest first"`
	Controls     []Control          `json:"controls" doc:"noise controls of the area and studies of them, oldest first"`
	Documents    []Document         `json:"documents" doc:"documents of the area and of the whole site"`
	Wear         []WearCount        `json:"wear_checks" doc:"looks at whether protectors are worn in it, oldest first"`
}

// WearCount is a look at how many of those in an area wear protectors.
type WearCount struct {
	Link
	Observed record.Number `json:"observed" doc:"number of workers looked at"`
	Wearing  record.Number `json:"wearing" doc:"number of them wearing protectors"`
}

// areaIDs lists the areas of the site: those of its groups, and those that its documents name.
func (b *Builder) areaIDs() []string {
	ids := map[string]bool{}
	for _, g := range b.Registers.Groups {
		if g.Site == b.Place.ID && g.Area != "" {
			ids[g.Area] = true
		}
	}
	for _, d := range b.Registers.Documents {
		if d.Site == b.Place.ID && d.Area != "" && d.Date <= b.AsOf {
			ids[d.Area] = true
		}
	}
	return slices.Sorted(maps.Keys(ids))
}

// Areas makes the dossiers of the site's areas.
func (b *Builder) Areas(u *Usage) []*File {
	var out []*File
	for _, id := range b.areaIDs() {
		out = append(out, b.area(id, u))
	}
	return out
}

func (b *Builder) area(id string, u *Usage) *File {
	refs := NewRefs()
	d := &Area{Common: b.common(id), Groups: []string{}, Exposed: map[string][]Spell{}, Unknown: map[string][]Open{}, Controls: []Control{}, Wear: []WearCount{}}
	file := &File{Kind: KindArea, ID: id, Site: b.Place.ID, Input: d, Series: map[string][]Link{}, Refs: refs}
	histories := []*history{}
	for _, group := range slices.Sorted(maps.Keys(b.Registers.Groups)) {
		g := b.Registers.Groups[group]
		if g.Site != b.Place.ID || g.Area != id {
			continue
		}
		d.Groups = append(d.Groups, group)
		d.Workers += u.members[group]
		refs.Of(g)
		histories = append(histories, b.histories[group])
	}
	own := until(b.Registers.byArea[id], b.AsOf, func(m *record.Measurement) Date { return m.Date })
	if len(histories) == 0 || len(own) > 0 {
		at := workplace{}
		results := []*result{}
		for rows := own; len(rows) > 0; {
			n := sameMeasurement(rows)
			results = append(results, b.channels.ofMeasurement(rows[:n:n], at))
			rows = rows[n:]
		}
		histories = append(histories, b.channels.historyOf(results, b.Registers.eventsOf("", id, b.AsOf), at))
	}
	b.areaLevels(d, histories)
	d.Measurements = b.measurements("", own, refs)
	for _, m := range d.Measurements {
		file.Series["measurement.any"] = append(file.Series["measurement.any"], m.Link)
	}
	for _, c := range until(b.Registers.Controls, b.AsOf, func(c *record.Control) Date { return c.Date }) {
		if c.Area == id {
			d.Controls = append(d.Controls, b.control(c, refs))
		}
	}
	d.Documents = b.documents(file, func(doc *record.Document) bool {
		return doc.Group == "" && (doc.Area == id || doc.Area == "" && doc.Site == b.Place.ID)
	})
	for _, c := range until(b.Registers.wearOf[id], b.AsOf, func(c *record.WearCheck) Date { return c.Date }) {
		d.Wear = append(d.Wear, WearCount{*link(refs, c, c.Date), c.Observed, c.Wearing})
	}
	return file
}

// areaLevels takes the stretches of all who work in an area together: a level is reached while one of them is at
// it, and not known while none is and one may be.
func (b *Builder) areaLevels(d *Area, histories []*history) {
	exposed, open := map[string][]calendar.Spell{}, map[string][]Open{}
	for _, h := range histories {
		_, unknown, plain := b.levelSpells(h.during(calendar.Spell{From: 1}, ""))
		for level, spells := range plain {
			exposed[level] = append(exposed[level], spells...)
		}
		for level, list := range unknown {
			open[level] = append(open[level], list...)
		}
	}
	for _, level := range b.levels {
		yes := calendar.Union(exposed[level])
		d.Exposed[level], d.Unknown[level] = b.spells(yes), []Open{}
		for _, o := range open[level] {
			for _, rest := range calendar.Subtract([]calendar.Spell{{From: o.From, To: o.To}}, yes) {
				d.Unknown[level] = append(d.Unknown[level], Open{From: rest.From, To: rest.To, Reason: o.Reason})
			}
		}
	}
}
