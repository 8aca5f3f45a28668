package duty.rest_facilities_test

import data.duty.rest_facilities
import rego.v2

site(ever, documents) := {"enrolled_ever": ever, "enrolled_now": ever, "documents": documents}

paper(day) := {"kind": "rest_facilities", "date": day, "ref": sprintf("document/%s", [day])}

test_nobody_has_answered if {
	some o in rest_facilities.obligations with input as site(4, [])
	o.by == null
	count(rest_facilities.not_owed) == 0 with input as site(4, [])
}

test_the_latest_answer_counts if {
	some o in rest_facilities.obligations with input as site(4, [paper("2023-02-01"), paper("2024-05-02"), {"kind": "advice", "date": "2025-01-01", "ref": "document/x"}])
	o.by == {"date": "2024-05-02", "ref": "document/2024-05-02"}
}

test_nobody_in_noise if {
	found := rest_facilities.obligations with input as site(0, [paper("2024-05-02")])
	count(found) == 0
	count(rest_facilities.not_owed) == 1 with input as site(0, [])
}
