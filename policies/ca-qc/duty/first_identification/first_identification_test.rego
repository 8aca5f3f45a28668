package duty.first_identification_test

import data.duty.first_identification
import rego.v2

site(day, papers) := {"as_of": day, "documents": papers}

old := {"kind": "noise_evaluation", "date": "2022-02-01", "ref": "document/noise_evaluation"}

new := {"kind": "noise_register", "date": "2023-06-16", "ref": "document/noise_register"}

test_owed_since_the_first_day if {
	some o in first_identification.obligations with input as site("2023-06-16", [])
	o.after == "2023-06-16"
	o.within == "first_identification_time"
	o.by == ["document.noise_register", "document.noise_evaluation"]
	o.note == null
	count(first_identification.not_owed) == 0 with input as site("2023-06-16", [])
}

test_earlier_evaluation_is_told if {
	some o in first_identification.obligations with input as site("2024-06-16", [old, new])
	o.because == ["document/noise_evaluation"]
	contains(o.note, "former limits")
}

test_not_in_force_yet if {
	count(first_identification.obligations) == 0 with input as site("2023-06-15", [])
	count(first_identification.not_owed) == 1 with input as site("2023-06-15", [])
}
