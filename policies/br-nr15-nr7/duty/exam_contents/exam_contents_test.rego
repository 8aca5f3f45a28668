package duty.exam_contents_test

import data.duty.exam_contents as duty
import rego.v2

contents := {"values": [{"from": "2022-01-03", "to": null, "value": ["clinical_history", "otological_exam", "audiometry"]}]}

programme(covers) := {"date": "2024-01-10", "ref": "document/d1", "kind": "health_surveillance", "covers": covers}

site(ever, documents) := {"as_of": "2026-06-30", "enrolled_ever": ever, "documents": documents}

holds(s) := found if found := {o.holds | some o in duty.obligations} with input as s with data.parameters.exam_contents as contents

test_all_parts if holds(site(2, [programme(["clinical_history", "otological_exam", "audiometry"])])) == {true}

test_a_part_is_lacking if {
	holds(site(2, [programme(["clinical_history", "audiometry"])])) == {false}
	some o in duty.obligations with input as site(2, [programme(["audiometry"])]) with data.parameters.exam_contents as contents
	o.note == "the medical control programme does not hold: clinical history, otological exam"
}

test_contents_not_recorded if holds(site(2, [programme([])])) == {null}

test_no_programme if holds(site(2, [object.union(programme([]), {"kind": "zone_signs"})])) == {false}

test_nobody_concerned if {
	holds(site(0, [])) == set()
	reasons := duty.not_owed with input as site(0, [])
	count(reasons) == 1
}
