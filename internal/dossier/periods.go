package dossier

import "hearduty/internal/record"

// DocumentMeasures say how long what documents attest holds, for a law that sets such times. Each time is a parameter.
type DocumentMeasures struct {
	PostedFor string `json:"posted_for,omitempty" doc:"parameter: time for which a report stays posted"`
	Periodic  string `json:"periodic,omitempty" doc:"kind of document that begins a period, such as noise_evaluation"`
	Every     string `json:"every,omitempty" doc:"parameter: length of that period"`
	Short     string `json:"short,omitempty" doc:"parameter: time after a change; a period that ends sooner is short"`
}

// Evaluation is a document that begins a period.
type Evaluation struct {
	Link
	Ends  Date `json:"ends" doc:"end of its period: the day by which the next one is due or, if it was made earlier, its day; null where the law knows no period yet"`
	Early bool `json:"early" doc:"whether it was made before the law knew such periods; its period then counts from the first day of that law"`
}

// evaluations writes the documents of a group that begin a period, oldest first.
func (b *Builder) evaluations(d *Group, refs Refs) []Evaluation {
	out := []Evaluation{}
	m := &b.Measures.Documents
	if m.Periodic == "" {
		return out
	}
	for _, doc := range b.Registers.Documents {
		if doc.Type != m.Periodic || doc.Date > b.AsOf || !b.covers(doc, d) {
			continue
		}
		e := Evaluation{Link: *link(refs, doc, doc.Date)}
		start := doc.Date
		if first := b.firstDay(m.Every); start < first {
			e.Early, start = true, first
		}
		e.Ends = b.after(m.Every, start)
		if n := len(out); n > 0 && (!out[n-1].Ends.Known() || e.Date < out[n-1].Ends) {
			out[n-1].Ends = e.Date
		}
		out = append(out, e)
	}
	return out
}

// periodOf gives the end of the period in which a change fell, and whether it ends soon after the change.
func (b *Builder) periodOf(list []Evaluation, change Date) (ends Date, short record.Answer) {
	for i := range list {
		if list[i].Date <= change {
			ends = list[i].Ends
		}
	}
	limit := b.after(b.Measures.Documents.Short, change)
	if !ends.Known() || !limit.Known() {
		return ends, record.Unanswered
	}
	if ends < limit {
		return ends, record.Yes
	}
	return ends, record.No
}

// postUntil gives the last day of the time for which a document is to stay posted.
func (b *Builder) postUntil(doc *record.Document) Date {
	if !doc.PostedOn.Known() || doc.PostedOn > b.AsOf {
		return 0
	}
	end := b.after(b.Measures.Documents.PostedFor, doc.PostedOn)
	if !end.Known() {
		return 0
	}
	return end - 1
}

// after gives the day that lies an interval of the law after a day; it is not known where the law has no such
// interval on that day, or counts in working days.
func (b *Builder) after(parameter string, day Date) Date {
	if parameter == "" {
		return 0
	}
	interval, ok := b.Law.Interval(parameter, day)
	if !ok {
		return 0
	}
	end, err := interval.After(day, nil)
	if err != nil {
		return 0
	}
	return end
}

// firstDay gives the first day on which a parameter has a value.
func (b *Builder) firstDay(parameter string) Date {
	if parameter == "" {
		return 0
	}
	var first Date
	for _, day := range b.Law.Days(parameter) {
		if !first.Known() || day < first {
			first = day
		}
	}
	return first
}
