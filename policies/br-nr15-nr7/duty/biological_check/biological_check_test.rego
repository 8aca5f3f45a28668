package duty.biological_check_test

import data.duty.biological_check as duty
import rego.v2

year(unchecked, first) := {
	"year": "2024", "last": "2024-11-20", "days": 12, "unchecked_days": unchecked,
	"first_unchecked": first, "tests_unchecked": 9, "workers_unchecked": 8, "ref": "audiogram/a1",
}

obligation(registered, years) := o if some o in duty.obligations with input as {"registered": registered, "years": years}

test_one_day_without_check if {
	o := obligation(true, [year(1, "2024-03-05")])
	o.holds == false
	o.key == "2024"
	o.note == "no biological check is on record for 1 of 12 days of use in 2024"
}

test_every_day_checked if {
	obligation(true, [year(0, null)]).holds == true
	obligation(true, [year(0, null)]).note == null
}

test_unregistered_audiometer if {
	obligation(false, [year(1, "2024-03-05")]).holds == null
	obligation(false, [year(1, "2024-03-05")]).missing == ["which audiometer was used, and its checks"]
}

test_no_exam if {
	not obligation(true, [])
	count(duty.not_owed) == 1 with input as {"years": []}
}
