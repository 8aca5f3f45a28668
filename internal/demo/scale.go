package demo

import (
	"errors"
	"fmt"
	"strings"

	"hearduty/internal/record"
)

// The sizes of a program for measuring speed.
const (
	siteWorkers  = 1000 // at most, of one site
	groupWorkers = 50   // of one group
	quietEvery   = 10   // every tenth group is below the action level
)

// scaleStart is the day on which the firm of such a program starts, ten years before the as-of day.
var scaleStart = day("2016-07-01")

// WriteScale writes a program of any number of workers into dir, with ten years of records each: about
// 45 rows a worker in the noisy groups, one worker in fifty with a gap, and one in thirty-three with a
// threshold shift. Rows go straight to the files, site by site and worker by worker, so that memory does not
// grow with the number of workers. The folder is made if there is none; one that holds anything is refused.
func WriteScale(dir string, workers int) error {
	if workers < 1 {
		return errors.New("the number of workers must be 1 or more")
	}
	return publish(dir, func(temporary string) error {
		if err := writeProgram(temporary, scaleProgram(workers), ""); err != nil {
			return err
		}
		t, err := createTables(temporary)
		if err != nil {
			return err
		}
		scaleRecords(workers, t.put)
		return t.close()
	})
}

// scaleProgram is the head of the program file.
func scaleProgram(workers int) string {
	var b strings.Builder
	fmt.Fprintf(&b, "# A made-up program of %d workers for measuring speed.\nprogram: Harrow & Slate, %d workers\nas_of: %s\nsites:\n", workers, workers, asOf)
	for n := 0; n*siteWorkers < workers; n++ {
		fmt.Fprintf(&b, "  - {id: %s, country: US, region: OH, bundles: [us-osha-general-industry]}\n", scaleSite(n))
	}
	return b.String()
}

func scaleSite(n int) string { return fmt.Sprintf("site-%03d", n+1) }

// scaleRecords makes all records and hands them on one by one.
func scaleRecords(workers int, put func(record.Record)) {
	n := &numbers{}
	writeProtectors(put)
	writeProfessionals(put)
	for done, number := 0, 0; done < workers; number++ {
		here := min(siteWorkers, workers-done)
		scaleOneSite(number, done, here, n, put)
		done += here
	}
}

// scaleOneSite writes a site with its equipment, groups and workers.
func scaleOneSite(number, before, workers int, n *numbers, put func(record.Record)) {
	id := fmt.Sprintf("%03d", number+1)
	s := &site{id: scaleSite(number), models: []string{"P-1", "P-2", "M-2"}, strong: "M-1", clinic: &clinic{
		audiometer: "AM-" + id, room: "R-" + id, first: "T-" + id, second: "T-" + id, secondFrom: asOf + 1, everyTuesday: true,
		trainer: "S-" + id, mobile: record.No, used: map[Date]bool{}}}
	scaleEquipment(s, "D-"+id, put)
	var g *group
	for i := range workers {
		if i%groupWorkers == 0 {
			g = scaleGroup(s, "D-"+id, before/groupWorkers+i/groupWorkers, n, put)
		}
		p := newPerson(fmt.Sprintf("W%07d", before+i+1))
		rng := dice(p.id, "scale")
		p.stays = []stay{{s, g, scaleStart.AddDays(rng.IntN(28)), 0}}
		if rng.IntN(33) == 0 {
			p.ears = earsPlan{happens: []happening{accepted, passes, refuted}[rng.IntN(3)], test: 3 + rng.IntN(6), recordable: rng.IntN(2) == 0}
			p.offset = 30
		}
		writeCareer(p, asOf, n, scaleFault(rng.IntN(50) == 0, rng.IntN(5), put))
	}
	s.clinic.writeFunctionalChecks(put)
}

// scaleFault leaves out some records of a worker with a fault: a kind of record each.
func scaleFault(faulty bool, which int, put func(record.Record)) func(record.Record) {
	if !faulty {
		return put
	}
	since := day("2025-01-01")
	return func(r record.Record) {
		switch r := r.(type) {
		case *record.Audiogram:
			if which == 0 && r.Date >= since {
				return
			}
		case *record.Training:
			if which == 1 && r.Date >= since {
				return
			}
		case *record.Notice:
			if which == 2 && r.About == "exposure" {
				return
			}
		case *record.ProtectorIssue:
			if which == 3 {
				return
			}
		case *record.Worker:
			if which == 4 {
				r.InProgram = record.No
			}
		}
		put(r)
	}
}

// scaleGroup writes a group with its measurements. Its noise depends on its number.
func scaleGroup(s *site, dosimeter string, number int, n *numbers, put func(record.Record)) *group {
	twa := 86.6 + float64(number%8)*1.3
	if number%quietEvery == quietEvery-1 {
		twa = 78
	}
	g := &group{id: fmt.Sprintf("g-%05d", number+1), area: fmt.Sprintf("area-%05d", number+1), job: "operator", suspected: record.Yes, varied: record.Yes}
	for year := 2016; year <= 2021; year += 5 {
		g.surveys = append(g.surveys, survey{fmt.Sprintf("%d-06-21", year), twa, dosimeter})
	}
	if number%quietEvery == 0 {
		g.changes = []change{{"2018-04-09", "one machine renewed", "no"}}
		put(&record.Task{Group: g.id, Task: "setting up", Date: day("2016-06-20"), Minutes: record.Num(45), Samples: record.List{"78.5"}})
	}
	writeGroup(g, s.id, n, put)
	put(&record.Control{Group: g.id, Date: day("2019-10-14"), Type: "engineering", What: "enclosure", Feasible: "no"})
	return g
}

// scaleEquipment writes what a site tests and measures with, and its papers.
func scaleEquipment(s *site, dosimeter string, put func(record.Record)) {
	put(&record.Instrument{InstrumentID: dosimeter, Type: "dosimeter", Site: s.id, InServiceFrom: day("2016-06-01")})
	put(&record.Instrument{InstrumentID: s.clinic.audiometer, Type: "audiometer", Site: s.id, Standard: "ANSI S3.6", InServiceFrom: scaleStart})
	calibrated := scaleStart - 7
	for i := 0; calibrated <= asOf; i++ {
		put(&record.Calibration{InstrumentID: s.clinic.audiometer, Date: calibrated, Type: []string{"exhaustive", "acoustic"}[i%2], Deviation: deviation(1), Result: "pass", By: "LAB-1"})
		calibrated += 350
	}
	writeRoom(s.clinic.room, 2016, 2026, "supra_aural", put)
	put(&record.Tester{TesterID: s.clinic.first, Qualification: "technician", Certificate: "OHC " + s.id, ValidFrom: day("2016-01-01"), ValidTo: day("2029-12-31"), Supervisor: audiologist})
	for _, kind := range []string{"written_program", "standard_posted", "access_to_records", "noise_records"} {
		put(&record.Document{Type: kind, Site: s.id, Date: scaleStart})
	}
	for year := 2019; year <= 2026; year++ {
		put(&record.Document{Type: "injury_log", Site: s.id, Date: min(day(fmt.Sprintf("%d-12-31", year)), asOf), Covers: record.List{fmt.Sprint(year)}})
	}
}
