package duty.auditory_rest_test

import data.duty.auditory_rest as duty
import rego.v2

audiogram(hours) := {
	"id": "a1", "ref": "audiogram/a1", "date": "2024-05-02", "in_program": true,
	"quiet_hours": hours, "quiet_by_protectors": null,
}

obligation(tests) := o if some o in duty.obligations with input as {"audiograms": tests}

reasons(tests) := found if found := duty.not_owed with input as {"audiograms": tests}

test_hours_are_handed_over if {
	o := obligation([audiogram(14)])
	o.value == 14
	o.at_least == "quiet_period"
	o.on == "2024-05-02"
	o.missing == []
	reasons([audiogram(14)]) == set()
}

test_hours_not_recorded if {
	obligation([audiogram(null)]).value == null
	obligation([audiogram(null)]).missing == ["the hours of auditory rest before the exam"]
}

test_exam_from_before_the_rule if {
	obligation([object.union(audiogram(14), {"date": "1998-04-22"})]).value == 14
	before := object.union(audiogram(14), {"date": "1998-04-21"})
	not obligation([before])
	count(reasons([before])) == 1
}

test_exam_outside_the_program if {
	outside := object.union(audiogram(2), {"in_program": false})
	not obligation([outside])
	count(reasons([outside])) == 1
	count(reasons([])) == 1
}
