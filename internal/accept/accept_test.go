package accept

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

var day = calendar.MustParse

const rest = "reason: The order is placed.\n  approved_by: plant manager\n  until: 2026-12-31\n"

func parsed(t *testing.T, text string) *List {
	t.Helper()
	l, problems := Parse([]byte(text), "dir/accepted.yaml", "accepted.yaml")
	require.Empty(t, problems)
	return l
}

func TestEntry(t *testing.T) {
	l := parsed(t, "\ufeff# a comment\n- id: f-0123456789abcdef\n  "+rest+"- {match: {site: a, subject: \"K*\"}, reason: ' Nobody can mend it. ', until: 2026-03-01, since: 2026-02-01, approved_by: }\n")
	require.Len(t, l.Entries, 2)
	assert.Equal(t, Entry{ID: "f-0123456789abcdef", Reason: "The order is placed.", ApprovedBy: "plant manager", Until: day("2026-12-31"), Line: 2}, l.Entries[0])
	assert.Equal(t, Entry{Match: Match{Site: "a", Subject: "K*"}, Reason: "Nobody can mend it.", Since: day("2026-02-01"), Until: day("2026-03-01"), Line: 6}, l.Entries[1])
	assert.Equal(t, &finding.Acceptance{Reason: "The order is placed.", ApprovedBy: "plant manager", Until: day("2026-12-31"), File: "accepted.yaml", Row: 2}, l.Acceptance(0))
	assert.Equal(t, "site=a subject=K* until 2026-03-01 since 2026-02-01", l.Entries[1].Key())
}

func TestMistakes(t *testing.T) {
	for name, c := range map[string]struct{ text, want string }{
		"empty":             {"", "accepted.yaml: the file is empty"},
		"no list":           {"id: f-01234567\n", "accepted.yaml:1:1: the file is keys with values. Write a list"},
		"unknown key":       {"- {id: f-01234567, resaon: x}\n", `accepted.yaml:1:20: item 1 has no key "resaon". Write reason if that is meant`},
		"no reason":         {"- {id: f-01234567, until: 2026-12-31}\n", "accepted.yaml:1:3: item 1 has no reason"},
		"short reason":      {"- {id: f-01234567, reason: 'because  ', until: 2026-12-31}\n", "accepted.yaml:1:3: the reason is too short to tell anybody why"},
		"no day":            {"- {id: f-01234567, reason: The order is placed.}\n", "item 1 has no until. Add it: the last day on which it counts"},
		"impossible day":    {"- {id: f-01234567, reason: The order is placed., until: 2026-02-30}\n", `accepted.yaml:1:57: until is not a day of the calendar: "2026-02-30"`},
		"year 0":            {"- {id: f-01234567, reason: The order is placed., until: 0000-01-01}\n", `until is not a day of the calendar: "0000-01-01"`},
		"since after":       {"- {id: f-01234567, reason: The order is placed., until: 2026-01-01, since: 2026-01-02}\n", "since lies after until"},
		"short id":          {"- {id: f-0123456, reason: The order is placed., until: 2026-01-01}\n", "accepted.yaml:1:8: id is not as it should be"},
		"id as a number":    {"- {id: 12345678, reason: The order is placed., until: 2026-01-01}\n", "id is a number"},
		"neither":           {"- {reason: The order is placed., until: 2026-01-01}\n", "the entry does not say what is accepted"},
		"both":              {"- {id: f-01234567, match: {site: a}, reason: The order is placed., until: 2026-01-01}\n", "has both id and match"},
		"everything":        {"- {match: {}, reason: The order is placed., until: 2026-01-01}\n", "match names no site, no duty and no subject"},
		"every subject":     {"- {match: {subject: '**', status: late}, reason: The order is placed., until: 2026-01-01}\n", "match names no site, no duty and no subject"},
		"a status too many": {"- {match: {site: a, status: due}, reason: The order is placed., until: 2026-01-01}\n", `status cannot be "due"`},
		"a topic unknown":   {"- {match: {site: a, topic: trainng}, reason: The order is placed., until: 2026-01-01}\n", "Write training if that is meant"},
		"twice":             {"- {id: f-01234567, reason: The order is placed., until: 2026-01-01}\n- {id: f-01234567, reason: Another reason here., until: 2026-01-01}\n", "accepted.yaml:2:3: the entry accepts the same until the same day as that of line 1"},
		"broken":            {"- {id: [\n", "the YAML cannot be read"},
		"not text":          {"\xff\xfe", "the file is not UTF-8 text"},
	} {
		t.Run(name, func(t *testing.T) {
			l, problems := Parse([]byte(c.text), "accepted.yaml", "accepted.yaml")
			require.Nil(t, l)
			require.Contains(t, problems.Error(), c.want)
			for _, d := range problems {
				assert.NotEmpty(t, d.Remedy, d.Problem)
			}
		})
	}
}

func TestLoad(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "accepted.yaml")
	_, problems := Load(path, "accepted.yaml")
	require.Contains(t, problems.Error(), "accepted.yaml: there is no such file of accepted gaps")
	_, problems = Load(dir, "accepted.yaml")
	require.Contains(t, problems.Error(), "cannot be read")
	require.NoError(t, os.WriteFile(path, []byte(strings.Repeat("#", maxFile+1)), 0o600))
	_, problems = Load(path, "accepted.yaml")
	require.Contains(t, problems.Error(), "larger than a list of accepted gaps can be")
	require.NoError(t, os.WriteFile(path, []byte("[]\n"), 0o600))
	l, problems := Load(path, "accepted.yaml")
	require.NoError(t, problems.Err())
	require.Empty(t, l.Entries)
}

func TestStateOnTheBoundaryDays(t *testing.T) {
	e := Entry{ApprovedBy: "plant manager", Since: day("2026-02-01"), Until: day("2026-03-01")}
	for text, want := range map[string]State{"2026-01-31": Waiting, "2026-02-01": InForce, "2026-03-01": InForce, "2026-03-02": Expired} {
		assert.Equal(t, want, e.On(day(text)), text)
	}
	e.ApprovedBy = ""
	assert.Equal(t, Unapproved, e.On(day("2026-02-15")))
	assert.Equal(t, Expired, e.On(day("2026-03-02")))
}

func TestFor(t *testing.T) {
	f := finding.Finding{ID: "f-0123456789abcdef", Site: "a", Bundle: "b", Duty: "annual-training", Topic: "training", Status: finding.Gap,
		Subject: finding.Subject{Kind: "worker", ID: "K0128"}}
	for selector, fits := range map[string]bool{
		"id: f-0123456789abcdef": true, "id: f-01234567": true, "id: f-0123456788": false, "id: f-11234567": false,
		"match: {site: a}": true, "match: {site: A}": false, "match: {duty: annual-training, status: gap}": true, "match: {duty: annual-training, status: late}": false,
		"match: {site: a, bundle: c}": false, "match: {site: a, topic: notice}": false, "match: {site: a, subject_kind: group}": false,
		"match: {subject: K0128}": true, "match: {subject: K012}": false, "match: {subject: 'K*'}": true, "match: {subject: '*28'}": true, "match: {subject: 'K*2*8'}": true,
		"match: {subject: 'K0128*'}": true, "match: {subject: 'K0128*8'}": false, "match: {subject: 'K*9*8'}": false, "match: {subject: 'L*'}": false,
		"match: {bundle: b, site: a, duty: annual-training, topic: training, subject_kind: worker, subject: 'K01*', status: gap}": true,
	} {
		l := parsed(t, "- "+selector+"\n  "+rest)
		assert.Equal(t, fits, len(l.For(&f)) == 1, selector)
	}
	l := parsed(t, "- match: {site: a}\n  "+rest+"- id: f-01234567\n  "+rest)
	assert.Equal(t, []int{0, 1}, l.For(&f), "in the order of the file")
	for _, s := range finding.Statuses {
		f.Status = s
		assert.Equal(t, s == finding.Gap || s == finding.Unproven || s == finding.Opinion || s == finding.Late, len(l.For(&f)) > 0, s)
	}
}

func BenchmarkFor(b *testing.B) {
	var text strings.Builder
	for i := range 2000 {
		text.WriteString("- id: f-" + strings.Repeat("0", 4) + string("0123456789abcdef"[i%16]) + string("0123456789abcdef"[i/16%16]) + string("0123456789abcdef"[i/256%16]) + "0\n  " + rest)
	}
	text.WriteString("- match: {site: z, subject: 'K*'}\n  " + rest)
	l, problems := Parse([]byte(text.String()), "", "")
	if problems.Failed() {
		b.Fatal(problems)
	}
	f := finding.Finding{ID: "f-0123456789abcdef", Site: "a", Status: finding.Gap}
	for b.Loop() {
		l.For(&f)
	}
}
