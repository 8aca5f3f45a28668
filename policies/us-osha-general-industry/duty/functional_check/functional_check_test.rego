package duty.functional_check_test

import data.duty.functional_check
import rego.v2

year(unchecked, first) := {
	"year": "2024", "last": "2024-11-20", "days": 12, "unchecked_days": unchecked,
	"first_unchecked": first, "tests_unchecked": 9, "workers_unchecked": 8, "ref": "audiogram/a1",
}

obligation(years) := o if some o in functional_check.obligations with input as {"registered": true, "years": years}

test_one_day_without_check if {
	o := obligation([year(1, "2024-03-05")])
	o.holds == false
	o.key == "2024"
	o.facts.tests_on_those_days == 9
	o.note == "no functional check is on record for 1 of 12 days of use in 2024"
}

test_every_day_checked if {
	obligation([year(0, null)]).holds == true
	obligation([year(0, null)]).note == null
}

test_unregistered_audiometer if {
	some o in functional_check.obligations with input as {"registered": false, "years": [year(1, "2024-03-05")]}
	o.holds == null
	count(o.missing) == 1
	{x.holds | some x in functional_check.obligations} == {true} with input as {"registered": false, "years": [year(0, null)]}
}

test_each_year_on_its_own if {
	next := object.union(year(0, null), {"year": "2025"})
	{[o.key, o.holds] | some o in functional_check.obligations} == {["2024", false], ["2025", true]} with input as {"registered": true, "years": [year(1, "2024-03-05"), next]}
}

test_no_hearing_test_with_it if {
	not obligation([])
	count(functional_check.not_owed) == 1 with input as {"years": []}
	count(functional_check.not_owed) == 0 with input as {"years": [year(0, null)]}
}
