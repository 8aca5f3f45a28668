package fhir

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/mapping"
)

func reportText(id, status, more string) string {
	return `{"resourceType": "DiagnosticReport", "id": "` + id + `", "status": "` + status + `", "subject": {"reference": "Patient/p7"}` + more + `}`
}

func members(key string, refs ...string) string {
	for i, r := range refs {
		refs[i] = `{"reference": "` + r + `"}`
	}
	return `, "` + key + `": [` + strings.Join(refs, ",") + `]`
}

const whose = "worker_id=0007 date=2025-03-04 "

func TestGrouping(t *testing.T) {
	t.Parallel()
	l, r := toneText("l", "89024-4", level("10"), ""), toneText("r", "89025-1", level("20"), "")
	withdrawn := func(s string) string { return strings.Replace(s, `"final"`, `"entered-in-error"`, 1) }
	status := func(s, status string) string { return strings.Replace(s, `"final"`, `"`+status+`"`, 1) }
	for name, c := range map[string]struct {
		resources []string
		want      []string
	}{
		"members before and after": {
			[]string{l, panelText("A1", members("hasMember", "Observation/l", "Observation/r")), r},
			[]string{"2 1 3: audiogram_id=A1 " + whose + "left.500=10 right.500=20"},
		},
		"report": {
			[]string{l, reportText("R1", "final", members("result", "Observation/l", "Observation/r")), r},
			[]string{"2 1 3: audiogram_id=R1 " + whose + "left.500=10 right.500=20"},
		},
		"panel before report": {
			[]string{reportText("R1", "final", members("result", "Observation/A1", "Observation/l")), l, panelText("A1", members("hasMember", "Observation/l"))},
			[]string{"1: DiagnosticReport", "3 2: audiogram_id=A1 " + whose + "left.500=10"},
		},
		"panels of another code": {
			[]string{l, strings.Replace(panelText("A1", members("hasMember", "Observation/l", "Observation/x")), panelCode, "98418-7", 1), strings.Replace(toneText("x", "89024-4", level("1"), ""), "89024-4", "98420-3", 1)},
			[]string{"2 1: audiogram_id=A1 " + whose + "left.500=10", "3: another observation | : observations with the code 98420-3 were passed over: it is none of the air conduction thresholds of 89015-2"},
		},
		"two panels name one": {
			[]string{l, panelText("A1", members("hasMember", "Observation/l")), panelText("A2", members("hasMember", "Observation/l"))},
			[]string{"2 1: fault : another panel or report names the same observation", "3: fault : another panel or report names the same observation"},
		},
		"circle": {
			[]string{panelText("A1", members("hasMember", "Observation/A2")), panelText("A2", members("hasMember", "Observation/A1", "Observation/A2"))},
			[]string{"1: fault : the test holds no hearing threshold", "2: fault : the test holds no hearing threshold"},
		},
		"nowhere": {
			[]string{l, panelText("A1", members("hasMember", "Observation/l", "Observation/gone"))},
			[]string{"2 1: fault : the panel names observations that are not in the file"},
		},
		"report nowhere": {
			[]string{l, reportText("R1", "final", members("result", "Observation/l", "Observation/gone"))},
			[]string{"2 1: audiogram_id=R1 " + whose + "left.500=10 | : reports name results that are not in the file"},
		},
		"withdrawn member": {
			[]string{withdrawn(l), r, panelText("A1", members("hasMember", "Observation/l", "Observation/r"))},
			[]string{"1: entered in error", "3 2: audiogram_id=A1 " + whose + "right.500=20"},
		},
		"withdrawn panel": {
			[]string{l, withdrawn(panelText("A1", members("hasMember", "Observation/l")))},
			[]string{"2: entered in error", "1: fault : the panel or report that gathers the observations was withdrawn, but they were not"},
		},
		"preliminary panel": {
			[]string{l, status(panelText("A1", members("hasMember", "Observation/l")), "preliminary")},
			[]string{"2: preliminary result | : results of status preliminary were passed over", "1: preliminary result"},
		},
		"preliminary report": {
			[]string{l, reportText("R1", "partial", members("result", "Observation/l"))},
			[]string{"2 1: audiogram_id=R1 " + whose + "left.500=10 | : the report is not final yet, but its observations are"},
		},
		"panel without values": {
			[]string{panelText("A1", ""), panelText("A2", `, "dataAbsentReason": {"text": "x"}`)},
			[]string{"1: fault : the test holds no hearing threshold", "2: test without a result"},
		},
		"other person": {
			[]string{l, strings.Replace(r, "Patient/p7", "Patient/p8", 1), strings.ReplaceAll(strings.Replace(worker7, "p7", "p8", 1), "0007", "0008"), panelText("A1", members("hasMember", "Observation/l", "Observation/r"))},
			[]string{"3: Patient", "2 1 4: fault worker_id: the resources of one test are about several patients"},
		},
		"other day": {
			[]string{l, strings.Replace(r, "03-04", "03-05", 1), panelText("A1", members("hasMember", "Observation/l", "Observation/r"))},
			[]string{"2 1 3: fault date: the resources of one test were observed on several days"},
		},
		"panel without person and day": {
			[]string{l, strings.NewReplacer(`"subject": {"reference": "Patient/p7"}, "effectiveDateTime": "2025-03-04"`, `"x": 1`).Replace(panelText("A1", members("hasMember", "Observation/l")))},
			[]string{"2 1: audiogram_id=A1 " + whose + "left.500=10"},
		},
		"two days": {
			[]string{l, strings.Replace(r, "03-04", "03-05", 1)},
			[]string{"1: audiogram_id=0007-2025-03-04 " + whose + "left.500=10", "2: audiogram_id=0007-2025-03-05 worker_id=0007 date=2025-03-05 right.500=20"},
		},
		"two encounters of a day": {
			[]string{toneText("l", "89024-4", level("10"), `, "encounter": {"reference": "Encounter/1"}`), toneText("l2", "89024-4", level("5"), `, "encounter": {"reference": "Encounter/2"}`)},
			[]string{"1: audiogram_id=0007-2025-03-04 " + whose + "left.500=10", "2: audiogram_id=0007-2025-03-04-2 " + whose + "left.500=5"},
		},
		"fault of one costs the test": {
			[]string{l, toneText("r", "89025-1", level("500"), "")},
			[]string{"2 1: fault right.500: the value is no level from -20 to 130 dB with one decimal at most"},
		},
		"contained in a report": {
			[]string{reportText("R1", "final", members("result", "#l", "#p")+`, "effectiveDateTime": "2025-03-04", "contained": [`+
				strings.Replace(toneText("l", "89024-4", level("10"), ""), `"effectiveDateTime": "2025-03-04",`, "", 1)+`,
				{"resourceType": "Observation", "id": "p", "status": "final", "hasMember": [{"reference": "#p"}, {"reference": "#l"}], "component": [`+component("89025-1", level("20"))+`]},
				{"resourceType": "Observation", "id": "q", "status": "final"}]`)},
			[]string{"1: audiogram_id=R1 " + whose + "left.500=10 right.500=20 | : contained observations that nothing refers to were passed over"},
		},
		"contained, but not all of it": {
			[]string{reportText("R1", "final", members("result", "#l", "#gone")+`, "effectiveDateTime": "2025-03-04", "contained": [`+l+`]`)},
			[]string{"1: fault : the panel or report names a contained observation that is not there"},
		},
		"contained on several days": {
			[]string{reportText("R1", "final", members("result", "#l", "#r")+`, "contained": [`+l+`,`+strings.Replace(r, "03-04", "03-05", 1)+`]`)},
			[]string{"1: fault date: the resources of one test were observed on several days"},
		},
		"contained and withdrawn": {
			[]string{reportText("R1", "final", members("result", "#l", "#r")+`, "contained": [`+l+`,`+withdrawn(r)+`]`)},
			[]string{"1: audiogram_id=R1 " + whose + "left.500=10 | : contained observations were passed over, since they were withdrawn"},
		},
	} {
		got := readAll(t, bundleOf(append(c.resources, worker7)...), "a.json", mapping.File{})
		var rest []string
		for _, line := range got {
			if !strings.HasSuffix(line, ": Patient") || name == "other person" && strings.HasPrefix(line, "3") {
				rest = append(rest, line)
			}
		}
		assert.Equal(t, c.want, rest, name)
	}
}

func TestStatuses(t *testing.T) {
	t.Parallel()
	for status, want := range map[string]string{
		"final":            "2: audiogram_id=0007-2025-03-04 " + whose + "left.500=10",
		"amended":          "2: audiogram_id=0007-2025-03-04 " + whose + "left.500=10",
		"corrected":        "2: audiogram_id=0007-2025-03-04 " + whose + "left.500=10",
		"entered-in-error": "2: entered in error",
		"cancelled":        "2: cancelled result",
		"registered":       "2: registered result | : results of status registered were passed over",
		"preliminary":      "2: preliminary result | : results of status preliminary were passed over",
		"unknown":          `2: fault : the status "unknown" does not tell whether the result counts`,
		"":                 "2: fault : the resource has no status, so it is not known whether it counts",
	} {
		got := readAll(t, bundleOf(worker7, strings.Replace(toneText("l", "89024-4", level("10"), ""), `"final"`, `"`+status+`"`, 1)), "a.json", mapping.File{})
		assert.Equal(t, want, got[1], status)
	}
}

func TestVersions(t *testing.T) {
	t.Parallel()
	version := func(level10, meta string) string {
		return toneText("l", "89024-4", level(level10), `, "meta": {`+meta+`}`)
	}
	const read = "audiogram_id=0007-2025-03-04 " + whose + "left.500="
	for name, c := range map[string]struct{ one, two, want1, want2 string }{
		"updated":   {version("10", `"lastUpdated": "2025-04-01T00:00:00Z"`), version("20", `"lastUpdated": "2025-05-01T00:00:00Z"`), "1: earlier version", "2: " + read + "20"},
		"reversed":  {version("20", `"lastUpdated": "2025-05-01T00:00:00Z"`), version("10", `"lastUpdated": "2025-04-01T00:00:00Z"`), "2: earlier version", "1: " + read + "20"},
		"numbered":  {version("10", `"versionId": "2"`), version("20", `"versionId": "10"`), "1: earlier version", "2: " + read + "20"},
		"repeated":  {version("10", ``), version("10", ``), "2: repeated resource", "1: " + read + "10"},
		"contested": {version("10", ``), version("20", ``), "1: fault : the resource stands in the file several times with different content, and nothing tells which is the latest", "2: fault : the resource stands in the file several times with different content, and nothing tells which is the latest"},
	} {
		got := readAll(t, bundleOf(c.one, c.two, worker7), "a.json", mapping.File{})
		assert.Contains(t, got, c.want1, name)
		assert.Contains(t, got, c.want2, name)
		assert.Len(t, got, 3, name)
	}
	newest := strings.Replace(version("20", `"versionId": "2"`), `"final"`, `"entered-in-error"`, 1)
	assert.ElementsMatch(t, []string{"1: earlier version", "2: entered in error", "3: Patient"}, readAll(t, bundleOf(version("10", `"versionId": "1"`), newest, worker7), "a.json", mapping.File{}))
}

func TestThresholdsThatStandSeveralTimes(t *testing.T) {
	t.Parallel()
	amended := func(s string) string { return strings.Replace(s, `"final"`, `"amended"`, 1) }
	at := func(s, clock string) string { return strings.Replace(s, `"2025-03-04"`, `"2025-03-04T`+clock+`"`, 1) }
	panel := func(components ...string) []string {
		return []string{panelText("A1", `, "component": [`+strings.Join(components, ",")+`]`)}
	}
	const loose, again = "audiogram_id=0007-2025-03-04 " + whose, ": the threshold stands in the test several times, with "
	for name, c := range map[string]struct {
		resources []string
		want      string
	}{
		"repeated at 1000 Hz":     {panel(component("89016-0", level("10")), component("89016-0", level("15"))), "audiogram_id=A1 " + whose + "left.1000=10 left.repeat_1000=15"},
		"three times at 1000 Hz":  {panel(component("89016-0", level("10")), component("89016-0", level("15")), component("89016-0", level("5"))), "fault left.1000" + again + "different values"},
		"by the clock":            {[]string{at(toneText("a", "89017-8", level("15"), ""), "10:05:00Z"), at(toneText("b", "89017-8", level("10"), ""), "10:01:00Z")}, loose + "right.1000=10 right.repeat_1000=15"},
		"no clock":                {[]string{toneText("a", "89017-8", level("15"), ""), toneText("b", "89017-8", level("10"), "")}, "fault right.1000" + again + "different values"},
		"other frequency":         {panel(component("89024-4", level("10")), component("89024-4", level("15"))), "fault left.500" + again + "different values"},
		"same value":              {panel(component("89024-4", level("10")), component("89024-4", level("10"))), "audiogram_id=A1 " + whose + "left.500=10 | left.500" + again + "the same value"},
		"amended under a new id":  {[]string{toneText("a", "89024-4", level("15"), ""), amended(toneText("b", "89024-4", level("10"), ""))}, loose + "left.500=10 | left.500: the threshold stands in the test several times; the amended or corrected one was taken"},
		"amended at 1000 Hz":      {[]string{toneText("a", "89016-0", level("15"), ""), amended(toneText("b", "89016-0", level("10"), ""))}, loose + "left.1000=10 | left.1000: the threshold stands in the test several times; the amended or corrected one was taken"},
		"absent and then present": {[]string{toneText("a", "89024-4", `"dataAbsentReason": {"text": "error"}`, ""), toneText("b", "89024-4", level("10"), "")}, loose + "left.500=10 | left.500: the value is absent for the reason a text, so nothing was recorded"},
	} {
		got := readAll(t, bundleOf(append(c.resources, worker7)...), "a.json", mapping.File{Dates: &mapping.Dates{Zone: "as_written"}})
		_, rest, _ := strings.Cut(got[len(got)-1], ": ")
		if rest == "Patient" {
			_, rest, _ = strings.Cut(got[0], ": ")
		}
		assert.Equal(t, c.want, rest, name)
	}
}

func TestPanelNotesAndComponents(t *testing.T) {
	t.Parallel()
	for more, want := range map[string]string{
		`, "note": [{"text": "NR at 8000 left"}], "component": [` + component("89024-4", level("10")) + `]`:       `fault : a note of the panel holds the word "NR", but does not belong to one threshold`,
		`, "component": [` + component("89024-4", level("10")) + `, {"code": {"coding": [{"code": "89025-1"}]}}]`: "fault : the code 89025-1 stands without its code system",
		`, "component": [` + component("89024-4", level("10")) + `, ` + component("91377-2", level("10")) + `]`:   "audiogram_id=A1 " + whose + "left.500=10 | : thresholds at 5000 Hz were passed over, since no record holds them",
		`, "component": [` + component("89024-4", level("10")) + `, {"code": {"text": "Bone conduction"}}]`:       "audiogram_id=A1 " + whose + "left.500=10 | : observations without a code were passed over",
		`, "component": {}`: "fault : component is an object, not a list",
		`, "component": [` + component("89024-4", level("10")) + `, {"modifierExtension": [], "code": {}}]`: "fault : a component has an extension that changes its meaning",
	} {
		got := readAll(t, bundleOf(worker7, panelText("A1", more)), "a.json", wordsMap)
		assert.Equal(t, "2: "+want, got[1], more)
	}
}

func TestMembersThatNameOtherDevices(t *testing.T) {
	t.Parallel()
	l := toneText("l", "89024-4", level("10"), `, "device": {"display": "AUD-1"}`)
	r := toneText("r", "89025-1", level("20"), `, "device": {"display": "AUD-2"}`)
	got := readAll(t, bundleOf(l, r, panelText("A1", members("hasMember", "Observation/l", "Observation/r")), worker7), "a.json", mapping.File{})
	assert.Equal(t, "3 1 2: audiogram_id=A1 "+whose+"left.500=10 right.500=20 | audiometer_id: the resources of one test name several audiometers, so audiometer_id was left empty", got[0])
}
