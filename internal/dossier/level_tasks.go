package dossier

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// sampleOf gives the level in dBA that a task's sample names: a number, or the id of a measurement, which is
// then given as well.
func (c *channels) sampleOf(text string) (level float64, row *record.Measurement, ok bool) {
	if row := c.rows[text]; row != nil {
		return row.LAeqDBA.Value, row, true
	}
	level, err := strconv.ParseFloat(strings.TrimSpace(text), 64)
	return level, nil, err == nil && level >= 0 && level <= 150
}

// dayOfTasks are the tasks of one day with their levels.
type dayOfTasks struct {
	tasks       []acoustics.Task
	segments    []acoustics.Segment // one a sample; the samples of a task share its minutes
	instruments []string            // ids, one a sample; empty for a bare level
	classes     []string            // accuracy classes, one a sample; empty for a bare level
}

// class gives the least exact accuracy class of the samples; empty where one of them has none.
func (d dayOfTasks) class() string {
	if slices.Contains(d.classes, "") {
		return ""
	}
	return slices.Max(d.classes)
}

// ofTasks works out the exposure of a day that tasks describe, on every channel: the dose by D = 100 · Σ C/T,
// the level by the task-based strategy of ISO 9612.
func (c *channels) ofTasks(tasks []*record.Task, at workplace) *result {
	first := tasks[0]
	r := c.newResult(first.Date, first, "")
	day, note := c.day(tasks)
	if note == "" {
		for _, t := range tasks[1:] {
			r.more = append(r.more, t)
		}
	}
	for i := range r.on {
		on := &r.on[i]
		switch {
		case c.isHighest(i):
		case note != "":
			on.notes = append(on.notes, note)
		case c.isLevel(i):
			c.takeTaskLevel(on, day)
			if on.known() {
				c.margin(on, []*record.Measurement{{Date: first.Date, AccuracyClass: day.class()}})
				c.week(i, on, at)
			}
		default:
			on.takeTaskDose(c.scales[i], c.channels[i].Durations, day)
		}
	}
	c.finish(r, at.shift, at)
	return r
}

// day gathers the tasks of a day; the note says why it has no exposure.
func (c *channels) day(tasks []*record.Task) (d dayOfTasks, note string) {
	for _, t := range tasks {
		if len(t.Samples) == 0 {
			return d, fmt.Sprintf("the task %s has no level", t.Task)
		}
		one := acoustics.Task{Name: t.Task, Minutes: t.Minutes.Value}
		if t.MinutesLow.Known && t.MinutesHigh.Known {
			one.Low, one.High = t.MinutesLow.Value, t.MinutesHigh.Value
		}
		for _, sample := range t.Samples {
			db, row, ok := c.sampleOf(sample)
			if !ok {
				return d, fmt.Sprintf("the sample %s of the task %s has no level", sample, t.Task)
			}
			instrument, class := "", ""
			if row != nil {
				instrument, class = row.InstrumentID, row.AccuracyClass
				if run := row.RunMinutes; run.Known && run.Value > 0 && (one.ShortestSample == 0 || run.Value < one.ShortestSample) {
					one.ShortestSample = run.Value
				}
			}
			one.Levels = append(one.Levels, db)
			d.instruments, d.classes = append(d.instruments, instrument), append(d.classes, class)
			d.segments = append(d.segments, acoustics.Segment{Level: db, Minutes: t.Minutes.Value / float64(len(t.Samples))})
		}
		if t.Minutes.Value > 0 { // a task that takes no time adds no noise
			d.tasks = append(d.tasks, one)
		}
	}
	return d, ""
}

// takeTaskDose sums the dose of a day's tasks, with its numbers; where the law prints a table of permitted times,
// by that table.
func (r *reading) takeTaskDose(s acoustics.Scale, table []Limit, day dayOfTasks) {
	if len(table) > 0 {
		r.takeTableDose(table, day)
		return
	}
	pct, err := s.Dose(day.segments)
	if err != nil {
		r.notes = append(r.notes, err.Error())
		return
	}
	r.bounds = bounds{pct, pct}
	var parts, shares []string
	for _, seg := range day.segments {
		minutes := number(acoustics.RoundTenth(seg.Minutes))
		part := minutes + " min at " + number(seg.Level) + " dBA"
		if s.Threshold > 0 && seg.Level < s.Threshold {
			parts = append(parts, part+" (below "+number(s.Threshold)+" dBA, does not count)")
			continue
		}
		allowed := number(acoustics.RoundTenth(s.ReferenceMinutes(seg.Level)))
		parts = append(parts, part+" (T = "+allowed+" min)")
		shares = append(shares, minutes+"/"+allowed)
	}
	sum := "0"
	if len(shares) > 0 {
		sum = strings.Join(shares, " + ")
	}
	r.working = []string{
		"tasks: " + strings.Join(parts, ", "),
		"D = 100 · Σ C/T = 100 · (" + sum + ") = " + number(acoustics.RoundTenth(pct)) + " %",
	}
}

// takeTaskLevel works out L_EX,8h and its uncertainty by the task-based strategy. Without the kind of every
// instrument there is no uncertainty, and then no level where the uncertainty decides.
func (c *channels) takeTaskLevel(r *reading, day dayOfTasks) {
	if len(day.tasks) == 0 {
		r.notes = append(r.notes, "no task takes any time, so there is no level")
		return
	}
	instrument, why := c.instrumentOf(day.instruments)
	lex, err := acoustics.TaskBased(day.tasks, instrument)
	if err != nil {
		r.notes = append(r.notes, err.Error())
		return
	}
	lines := lex.Working()
	if why == "" {
		r.expanded = record.Num(lex.Expanded)
	} else {
		lines = lines[:len(lines)-2]
	}
	for _, fault := range lex.PlanFaults() {
		lines = append(lines, "ISO 9612 finds wanting: "+fault)
	}
	r.working = lines
	c.decide(r, lex.LEX, why)
}

// decide turns a level and its uncertainty into what is compared with the law, by the rule of the measures:
// the level itself, its upper limit, or both ends. Without uncertainty, for the reason given, only the first
// gives anything.
func (c *channels) decide(r *reading, lex float64, without string) {
	u := r.expanded.Value
	if c.measures.Decision != "" && c.measures.Decision != "best" && !r.expanded.Known {
		r.notes = append(r.notes, "the uncertainty decides, but it is not known: "+without)
		return
	}
	r.estimate = record.Num(lex)
	switch c.measures.Decision {
	case "upper":
		r.bounds = bounds{lex + u, lex + u}
		r.working = append(r.working, "the upper limit counts: "+hundredth(lex)+" + "+hundredth(u)+" = "+hundredth(lex+u)+" dBA")
	case "zones":
		r.bounds = bounds{lex - u, lex + u}
		r.working = append(r.working, "both limits count: "+hundredth(lex)+" ± "+hundredth(u)+" = "+hundredth(lex-u)+" to "+hundredth(lex+u)+" dBA")
	default:
		r.bounds = bounds{lex, lex}
		if !r.expanded.Known {
			r.working = append(r.working, "the uncertainty is not known: "+without)
		}
	}
}

// instrumentOf gives the least exact of the kinds of instrument that levels were taken with, by their ids. Where
// one of them is not known it says why, and gives the least exact of all.
func (c *channels) instrumentOf(ids []string) (worst acoustics.Instrument, why string) {
	var most float64
	for _, id := range ids {
		kind, problem := c.kindOf(id)
		if problem != "" {
			return acoustics.ClassTwoMeter, problem
		}
		if u, _ := kind.Uncertainty(); u > most {
			worst, most = kind, u
		}
	}
	return worst, ""
}

func (c *channels) kindOf(id string) (acoustics.Instrument, string) {
	if id == "" {
		return "", "a level names no instrument"
	}
	if in := c.registers.Instruments[id]; in != nil {
		one, two := strings.Contains(in.Class, "1"), strings.Contains(in.Class, "2")
		switch {
		case in.Type == "dosimeter":
			return acoustics.Exposimeter, ""
		case in.Type == "sound_level_meter" && one && !two:
			return acoustics.ClassOneMeter, ""
		case in.Type == "sound_level_meter" && two && !one:
			return acoustics.ClassTwoMeter, ""
		}
	}
	return "", "the instrument " + id + " is not in the records as a dosimeter, or a sound level meter of class 1 or 2"
}
