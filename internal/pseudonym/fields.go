package pseudonym

import (
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/record"
)

// fields are the fields of records that hold an id of a person, or an id that may hold one.
var fields = map[string]Kind{
	"worker_id": Worker, "audiogram_id": Audiogram, "measurement_id": Measurement, "examination_id": Examination, "certificate": Certificate,
	"tester_id": Person, "reviewer": Person, "supervisor": Person, "by": Person, "fitted_by": Person,
}

// places are fields that hold the id of a worker where a group or an area stands for one person alone.
var places = []string{"group", "area"}

// samples is the field of tasks that holds ids of measurements, or levels.
const samples = "samples"

// professions stand in place of an id where records name no person; they stay.
var professions = professionWords()

func professionWords() []string {
	t, _ := record.TableOf("tester")
	return t.Fields[t.Index("qualification")].One
}

// plan says what to do with the fields of a kind of record.
type plan struct {
	table   *record.Table
	ids     []int // fields that hold ids, with their kinds
	kinds   []Kind
	places  []int
	samples int // field, or -1
}

func planOf(k record.Kind) *plan {
	t, _ := record.TableOf(k)
	p := &plan{table: t, samples: t.Index(samples)}
	for i := range t.Fields {
		name := t.Fields[i].Name
		if kind, ok := fields[name]; ok {
			p.ids, p.kinds = append(p.ids, i), append(p.kinds, kind)
		}
		if slices.Contains(places, name) {
			p.places = append(p.places, i)
		}
	}
	return p
}

// Covers says whether a field of records holds nothing but codes, once they went through a veil.
func Covers(field string) bool { return fields[field] != "" }

// Record puts codes in place of the ids of a record. Records of workers must come before all others. Afterwards Err
// says whether two ids had the same code.
func (v *Veil) Record(r record.Record) {
	p := v.plans[r.Kind()]
	if p == nil {
		p = planOf(r.Kind())
		v.plans[r.Kind()] = p
	}
	set := p.table.Setter(r)
	for n, i := range p.ids {
		id := p.table.Text(r, i)
		if id == "" || p.kinds[n] == Person && slices.Contains(professions, id) || p.kinds[n] == Measurement && isLevel(id) {
			continue
		}
		set.Set(i, v.Code(p.kinds[n], id))
	}
	for _, i := range p.places {
		if c, ok := v.often[Worker][p.table.Text(r, i)]; ok {
			set.Set(i, string(c[:]))
		}
	}
	if p.samples >= 0 {
		set.Set(p.samples, v.samples(p.table.Text(r, p.samples)))
	}
}

// samples puts codes in place of the measurements of a task. What reads as a level stays.
func (v *Veil) samples(text string) string {
	if text == "" {
		return ""
	}
	list := strings.Split(text, ";")
	for i, s := range list {
		if !isLevel(s) {
			list[i] = v.Code(Measurement, s)
		}
	}
	return strings.Join(list, ";")
}

// isLevel says whether a text is a level in dB as people write it. Whether it is one, or a measurement with such an
// id, the records tell only together.
func isLevel(s string) bool {
	db, err := strconv.ParseFloat(s, 64)
	return err == nil && db >= 0 && db <= 150 && (db < 1 || s[0] != '0')
}
