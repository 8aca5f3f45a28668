package duty.protectors_provided_test

import data.duty.protectors_provided as duty
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
		"as_of": "2026-06-30", "choices": {"exemption": "none"}, "protection": null,
		"exposed": {"lower": [now], "upper": []}, "exposure_unknown": {"upper": []},
		"exposures": [{"from": "2020-01-01", "to": null, "ref": "measurement/m1"}, {"from": "2019-01-01", "to": "2020-01-01", "ref": "measurement/m0"}],
	},
	change,
)

muff := {"date": "2024-01-10", "ref": "protector_issue/w1"}

test_none_at_hand if {
	found := obligation(worker({"exposed": {"upper": [now]}}))
	found.holds == false
	found.because == ["measurement/m1"]
}

test_at_hand if {
	found := obligation(worker({"exposed": {"upper": [now]}, "protection": muff}))
	found.holds == true
	found.because == ["protector_issue/w1"]
}

test_not_known if {
	unknown := {"exposure_unknown": {"upper": [open]}}
	obligation(worker(unknown)).holds == null
	quiet(worker(object.union(unknown, {"protection": muff})))
	quiet(worker(object.union(unknown, {"choices": {"exemption": "defence"}})))
	quiet(worker(object.union(unknown, {"exposed": {"lower": []}})))
}

test_exempted if {
	endswith(obligation(worker({"exposed": {"upper": [now]}, "choices": {"exemption": "emergency_services"}})).cite, "reg 12")
}

test_below if quiet(worker({"exposed": {"upper": [past]}}))
