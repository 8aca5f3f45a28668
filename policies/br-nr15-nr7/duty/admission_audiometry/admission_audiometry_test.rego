package duty.admission_audiometry_test

import data.duty.admission_audiometry as duty
import rego.v2

open(day) := {"from": day, "to": null, "current": true}

closed(from, to) := {"from": from, "to": to, "current": false}

exam_of(id, day) := {"id": id, "ref": sprintf("audiogram/%s", [id]), "date": day, "invalidated": false, "ears_with_result": 2}

worker(employed, enrolled, tests) := {"employed": employed, "enrolled": enrolled, "audiograms": tests, "examinations": []}

by(w) := found if found := {[o.key, o.by] | some o in duty.obligations} with input as w

link(id, day) := {"date": day, "ref": sprintf("audiogram/%s", [id])}

hired := worker([open("2024-03-01")], [open("2024-03-01")], [])

test_no_exam if {
	by(hired) == {["2024-03-01", null]}
	some o in duty.obligations with input as hired
	o.within == "admission_time"
	o.after == "2024-03-01"
	reasons := duty.not_owed with input as hired
	count(reasons) == 0
}

test_earliest_exam if {
	two := object.union(hired, {"audiograms": [exam_of("a1", "2024-02-20"), exam_of("a2", "2025-02-20")]})
	by(two) == {["2024-03-01", link("a1", "2024-02-20")]}
}

test_invalid_exam_does_not_count if {
	invalid := object.union(exam_of("a1", "2024-02-20"), {"invalidated": true})
	empty := object.union(exam_of("a2", "2024-02-21"), {"ears_with_result": 0})
	by(object.union(hired, {"audiograms": [invalid, empty]})) == {["2024-03-01", null]}
}

test_outcome_only if {
	examination := {"kind": "hearing_test", "ref": "examination/e1", "attended_on": "2024-02-20"}
	missed := {"kind": "hearing_test", "ref": "examination/e2", "attended_on": null}
	other := {"kind": "health_appointment", "ref": "examination/e3", "attended_on": "2024-02-01"}
	dossier := object.union(hired, {"examinations": [missed, other, examination]})
	by(dossier) == {["2024-03-01", {"date": "2024-02-20", "ref": "examination/e1"}]}
}

test_each_employment_begins_anew if {
	again := worker(
		[closed("2018-01-01", "2020-01-01"), open("2024-03-01")],
		[closed("2018-01-01", "2020-01-01"), open("2024-03-01")],
		[exam_of("a1", "2017-12-20"), exam_of("a2", "2024-03-05")],
	)
	by(again) == {["2018-01-01", link("a1", "2017-12-20")], ["2024-03-01", link("a2", "2024-03-05")]}
}

test_first_stretch_only if {
	twice := worker([open("2020-01-01")], [closed("2021-01-01", "2022-01-01"), open("2023-01-01")], [])
	by(twice) == {["2021-01-01", null]}
}

test_before_the_rule if {
	old := worker([closed("1992-01-01", "1998-04-22"), open("1999-03-01")], [open("1994-12-29")], [])
	count(by(old)) == 0
	still_there := worker([open("1990-01-01")], [open("1994-12-29")], [exam_of("a1", "1996-03-01")])
	by(still_there) == {["1994-12-29", link("a1", "1996-03-01")]}
	some o in duty.obligations with input as still_there
	o.after == "1998-04-22"
}

test_never_above if {
	quiet := worker([open("2020-01-01")], [], [])
	by(quiet) == set()
	reasons := duty.not_owed with input as quiet
	count(reasons) == 1
}
