package demo

import (
	"slices"
	"strconv"

	"hearduty/internal/record"
)

// siteOf tells the site of a group.
var siteOf = func() map[string]string {
	m := map[string]string{}
	for _, g := range kilnHillGroups {
		m[g.id] = "kiln-hill"
	}
	for _, g := range larchStreetGroups {
		m[g.id] = "larch-street"
	}
	return m
}()

// harrowAndSlate makes the whole program without a fault.
func harrowAndSlate() *book {
	b := &book{}
	n := &numbers{}
	sites := map[string]*site{
		"kiln-hill": {id: "kiln-hill", models: []string{"P-1", "P-2", "M-2"}, strong: "M-1", clinic: &clinic{audiometer: "AM-1", room: "R-1",
			first: "T-01", second: "T-02", secondFrom: day("2025-01-01"), trainer: "S-11", mobile: record.No, used: map[Date]bool{}},
			van: &clinic{audiometer: vanAudiometer, room: vanRoom, first: vanTester, secondFrom: asOf + 1, mobile: record.Yes, used: map[Date]bool{}}},
		"larch-street": {id: "larch-street", models: []string{"P-1", "M-1"}, strong: "M-1", clinic: &clinic{audiometer: "AM-2", room: "R-2",
			first: "T-03", second: "T-04", secondFrom: day("2025-02-01"), trainer: "S-21", mobile: record.No, used: map[Date]bool{}}},
	}
	groups := map[string]*group{}
	for _, list := range [][]*group{kilnHillGroups, larchStreetGroups} {
		for _, shared := range list {
			g := *shared // the measurements that are made are noted in a copy
			groups[g.id] = &g
			writeGroup(&g, siteOf[g.id], n, b.put)
		}
	}
	for _, p := range roster(groups, sites) {
		writeCareer(p, asOf, n, b.put)
	}
	writeAudiometers(b.put)
	writeNoiseInstruments(b.put)
	writeRoom("R-1", 2020, 2026, "supra_aural", b.put)
	writeRoom("R-2", 2020, 2026, "supra_aural", b.put)
	writeRoom(vanRoom, 2021, 2021, "circumaural", b.put)
	for _, c := range []*clinic{sites["kiln-hill"].clinic, sites["kiln-hill"].van, sites["larch-street"].clinic} {
		c.writeFunctionalChecks(b.put)
	}
	writeTesters(b.put)
	writeProtectors(b.put)
	writeTasks(b.put)
	writeControls(b.put)
	writeAreaChecks(b.put)
	writeDocuments(b)
	return b
}

// writeNoiseInstruments writes dosimeters, a sound level meter and a calibrator, calibrated once a year.
func writeNoiseInstruments(put func(record.Record)) {
	for _, i := range []record.Instrument{
		{InstrumentID: "D-1", Type: "dosimeter", Site: "kiln-hill", Serial: "07-1182", Class: "type 2", Standard: "ANSI S1.25"},
		{InstrumentID: "D-2", Type: "dosimeter", Site: "kiln-hill", Serial: "07-1183", Class: "type 2", Standard: "ANSI S1.25"},
		{InstrumentID: "D-3", Type: "dosimeter", Site: "larch-street", Serial: "09-0446", Class: "type 2", Standard: "ANSI S1.25"},
		{InstrumentID: "D-4", Type: "dosimeter", Site: "kiln-hill", Serial: "02-0010", Class: "type 2", Standard: "ANSI S1.25"},
		{InstrumentID: "S-1", Type: "sound_level_meter", Site: "kiln-hill", Serial: "11-5520", Class: "type 2", Standard: "ANSI S1.4"},
		{InstrumentID: "C-1", Type: "calibrator", Site: "kiln-hill", Serial: "11-5521", Class: "class 1", Standard: "ANSI S1.40"},
	} {
		i.InServiceFrom = day("2020-06-01")
		put(&i)
		for year := 2020; year <= 2026; year++ {
			put(&record.Calibration{InstrumentID: i.InstrumentID, Date: day(strconv.Itoa(year) + "-06-02"), Type: "laboratory", Result: "pass", By: "LAB-2"})
		}
	}
}

// writeProtectors writes the models that are handed out, with the ratings of their labels.
func writeProtectors(put func(record.Record)) {
	put(&record.Protector{ProtectorID: "P-1", Model: "plug P-1", Type: "formable", NRR: record.Num(29)})
	put(&record.Protector{ProtectorID: "P-2", Model: "plug P-2", Type: "premolded", NRR: record.Num(25)})
	put(&record.Protector{ProtectorID: "P-9", Model: "plug P-9", Type: "premolded", NRR: record.Num(11)})
	m := &record.Protector{ProtectorID: "M-1", Model: "muff M-1", Type: "earmuff", NRR: record.Num(27), Mean: new(record.Octaves), SD: new(record.Octaves)}
	for i, db := range []float64{14, 20, 28, 35, 36, 38, 37} { // 125 Hz to 8000 Hz
		m.Mean[i+1], m.SD[i+1] = record.Num(db), record.Num(2.5)
	}
	put(m)
	put(&record.Protector{ProtectorID: "M-2", Model: "muff M-2", Type: "helmet_muff", NRR: record.Num(23)})
}

// writeTasks describes the day of the pattern shop by its tasks.
func writeTasks(put func(record.Record)) {
	for _, t := range []struct {
		name           string
		min, low, high float64
		samples        record.List
	}{
		{"band saw", 45, 30, 60, record.List{"88.1", "87.6", "88.4"}},
		{"disc sander", 60, 45, 90, record.List{"86.2", "85.7"}},
		{"bench work", 285, 240, 320, record.List{"74.5", "73.9", "75.1"}},
		{"store and meetings", 90, 60, 120, record.List{"66"}},
	} {
		put(&record.Task{Group: "kh-pattern", Task: t.name, Date: day("2023-09-11"), Minutes: record.Num(t.min),
			MinutesLow: record.Num(t.low), MinutesHigh: record.Num(t.high), Samples: t.samples})
	}
}

// writeControls writes noise controls; the latest of each loud group is either in place or was found not
// to be feasible.
func writeControls(put func(record.Record)) {
	control := func(group, on, kind, what, feasible, installed string, reduction float64) {
		c := &record.Control{Group: group, Date: day(on), Type: kind, What: what, Feasible: feasible, ReductionDB: record.Num(reduction)}
		if installed != "" {
			c.InstalledOn = day(installed)
		}
		put(c)
	}
	control("kh-grinding", "2021-03-15", "engineering", "damped bench tops", "yes", "2021-06-07", 1)
	control("kh-grinding", "2024-01-22", "engineering", "enclosed cut-off saw", "yes", "2024-08-26", 2)
	control("kh-knock-out", "2022-11-07", "engineering", "enclosure of the shake-out grid", "no", "", 6)
	control("kh-moulding", "2022-11-14", "engineering", "enclosure of the jolt squeezer", "yes", "2023-05-08", 4)
	control("kh-melt", "2023-02-06", "administrative", "rotation between melt deck and control room", "no", "", 2)
	control("ls-planer", "2020-10-05", "engineering", "helical cutter heads", "yes", "2021-02-15", 3)
	control("ls-planer", "2023-06-12", "engineering", "enclosure of the whole line", "no", "", 8)
}

// writeAreaChecks writes looks at whole areas where protectors are worn.
func writeAreaChecks(put func(record.Record)) {
	for year := 2021; year <= 2025; year++ {
		for _, area := range []struct {
			name string
			n    float64
		}{{"moulding", 9}, {"planer hall", 8}} {
			put(&record.WearCheck{Area: area.name, Date: day(strconv.Itoa(year) + "-10-13"), Worn: record.Yes, Observed: record.Num(area.n), Wearing: record.Num(area.n)})
		}
	}
}

// writeDocuments writes the papers of both sites. The injury log of a year is kept where a hearing loss
// was entered in it.
func writeDocuments(b *book) {
	for _, site := range []string{"kiln-hill", "larch-street"} {
		for _, kind := range []string{"written_program", "standard_posted", "risk_assessment", "zone_signs", "access_to_records", "protectors_available", "noise_records"} {
			b.put(&record.Document{Type: kind, Site: site, Date: takeover, ReviewedOn: day("2026-01-12")})
		}
	}
	b.put(&record.Document{Type: "control_programme", Area: "fettling", Date: day("2024-02-05")})
	for _, group := range []struct{ id, on string }{
		{"kh-grinding", "2020-07-20"}, {"kh-knock-out", "2020-07-20"}, {"kh-moulding", "2020-07-21"}, {"kh-core", "2020-07-21"}, {"kh-melt", "2020-07-21"},
		{"kh-melt", "2025-02-24"}, {"kh-sand", "2025-10-13"}, {"ls-planer", "2020-07-20"}, {"ls-spray", "2020-07-20"}, {"ls-planer", "2023-03-20"},
	} {
		b.put(&record.Document{Type: "attenuation_evaluation", Group: group.id, Date: day(group.on)})
	}
	years := map[string][]string{}
	for _, f := range b.followUps {
		if f.Type == "log_entry" {
			site, year := b.siteOn(f.WorkerID, f.Date), strconv.Itoa(f.Date.Year())
			if !slices.Contains(years[site], year) {
				years[site] = append(years[site], year)
			}
		}
	}
	for _, site := range []string{"kiln-hill", "larch-street"} {
		slices.Sort(years[site])
		for _, year := range years[site] {
			b.put(&record.Document{Type: "injury_log", Site: site, Date: min(day(year+"-12-31"), asOf), Covers: record.List{year}})
		}
	}
}

// siteOn gives the site that employs the worker on a day.
func (b *book) siteOn(worker string, d Date) string {
	for _, w := range b.workers {
		if w.WorkerID == worker && w.HiredOn <= d && (!w.LeftOn.Known() || d <= w.LeftOn) {
			return w.Site
		}
	}
	return ""
}
