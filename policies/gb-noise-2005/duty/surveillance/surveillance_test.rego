package duty.surveillance_test

import data.duty.surveillance as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

worker(change) := object.union(
	{
		"exposed": {"lower": [now], "upper": [now]}, "audiograms": [], "examinations": [],
		"exposures": [{"to": "2020-01-01", "ref": "measurement/m0"}, {"to": null, "ref": "measurement/m1"}],
	},
	change,
)

audiogram(invalid) := {"date": "2024-02-01", "ref": "audiogram/a1", "invalidated": invalid}

examination(kind, damage) := {"ref": "examination/e1", "kind": kind, "damage": damage}

test_nothing_offered if {
	found := obligation(worker({}))
	found.holds == false
	found.facts.exposed_since == "2020-01-01"
	found.because == ["measurement/m1"]
}

test_tested if {
	obligation(worker({"audiograms": [audiogram(false)]})).because == ["audiogram/a1"]
	obligation(worker({"audiograms": [audiogram(true)]})).holds == false
}

test_offered if {
	obligation(worker({"examinations": [examination("hearing_test", null)]})).holds == true
	obligation(worker({"examinations": [examination("health_appointment", null)]})).holds == false
}

test_damage_below_the_upper_value if {
	below := {"exposed": {"upper": [past]}}
	obligation(worker(object.union(below, {"examinations": [examination("hearing_test", true)]}))).holds == true
	quiet(worker(object.union(below, {"examinations": [examination("hearing_test", false)]})))
	quiet(worker({"exposed": {"lower": [past], "upper": []}, "examinations": [examination("hearing_test", true)]}))
}
