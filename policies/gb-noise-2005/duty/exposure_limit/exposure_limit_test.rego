package duty.exposure_limit_test

import data.duty.exposure_limit as duty
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

levels(daily, weekly, peak) := [{
	"from": "2020-01-01", "to": null, "ref": "measurement/m1",
	"channels": {
		"daily": {"level_dba": daily, "at_least": daily},
		"weekly": {"level_dba": weekly, "at_least": weekly},
		"peak": {"level_dba": peak, "at_least": peak},
	},
}]

muff := {
	"date": "2024-01-10", "ref": "protector_issue/w1", "protector": "muff", "exposure_dba": 97, "under_db": 74, "missing": [],
	"method": "SNR", "working": "97 - 27 + 4 = 74", "mark": "secondary source", "peak_dbc": 142, "peak_under_dbc": 120,
	"information": [{"method": "half", "working": "84"}],
}

worker(change) := object.union(
	{
		"as_of": "2026-06-30", "choices": {"weekly_average": false, "exemption": "none"}, "protection": null, "wear": null,
		"exposures": levels(95, 93, 142),
		"exposed": {"lower": [now], "limit_level": [], "limit_peak": []}, "exposure_unknown": {"limit": []},
	},
	change,
)

loud(change) := worker(object.union({"exposed": {"limit_level": [now]}}, change))

bang(change) := worker(object.union({"exposed": {"limit_peak": [now]}}, change))

seen(worn, day) := {"date": day, "ref": "wear_check/w1", "worn": worn}

test_no_protector if {
	found := obligation(loud({}))
	found.value == 95
	found.at_most == "limit_value"
	found.key == "LEP"
	found.because == ["measurement/m1"]
	found.note == "exposure without protectors, since none is at hand"
	duty.not_owed == set() with input as loud({})
}

test_protector_counts if {
	found := obligation(loud({"protection": muff}))
	found.value == 74
	found.because == ["measurement/m1", "protector_issue/w1", "protector/muff"]
	found.facts.for_information == ["half: 84"]
}

test_only_the_allowance_exceeds_the_limit if {
	found := obligation(loud({"protection": object.union(muff, {"under_db": 90.5})}))
	found.holds == null
	found.facts.at_the_ear_dba == 90.5
	found.note == "estimated exposure with the protector: 90.5 dBA with the allowance of 4 dB for the real world, which is guidance; without it the limit value would not be exceeded"
	obligation(loud({"protection": object.union(muff, {"under_db": 87.1})})).holds == null
	obligation(loud({"protection": object.union(muff, {"under_db": 91})})).holds == null
	obligation(loud({"protection": object.union(muff, {"under_db": 91.1})})).value == 91.1
	obligation(loud({"protection": object.union(muff, {"under_db": 87})})).value == 87
}

test_estimate_missing if {
	found := obligation(loud({"protection": object.union(muff, {"under_db": null, "missing": ["the rating"]})}))
	found.value == null
	found.missing == ["the rating"]
}

test_seen_without_the_protector if {
	found := obligation(loud({"protection": muff, "wear": seen(false, "2024-01-10")}))
	found.value == 95
	found.because == ["measurement/m1", "wear_check/w1"]
	found.note == "exposure without protectors, since the worker was seen without them"
	obligation(bang({"protection": muff, "wear": seen(false, "2025-01-10")})).value == 142
}

test_seen_before_it_was_handed_over_or_with_it if {
	obligation(loud({"protection": muff, "wear": seen(false, "2024-01-09")})).value == 74
	obligation(loud({"protection": muff, "wear": seen(true, "2025-01-09")})).value == 74
	obligation(loud({"protection": muff, "wear": seen(null, "2025-01-09")})).value == 74
}

test_peak if {
	found := obligation(bang({}))
	found.value == 142
	found.at_most == "peak_limit_value"
	found.key == "LCpeak"
	obligation(bang({"protection": muff})).value == 120
	lacking := obligation(bang({"protection": object.union(muff, {"peak_under_dbc": null})}))
	lacking.value == null
	count(lacking.missing) == 1
}

test_weekly_average if {
	weekly := {"choices": {"weekly_average": true, "exemption": "none"}}
	obligation(loud(weekly)).value == 93
	obligation(loud(object.union(weekly, {"protection": muff}))).value == 72
	obligation(loud(object.union(weekly, {"protection": object.union(muff, {"under_db": null})}))).value == null
}

test_known_only_as_at_least if {
	bounds := [{"from": "2020-01-01", "to": null, "ref": null, "channels": {"daily": {"level_dba": null, "at_least": 91}}}]
	obligation(loud({"exposures": bounds})).value == 91
	obligation(loud({"exposures": []})).value == null
}

test_not_known if {
	found := obligation(worker({"exposure_unknown": {"limit": [open]}}))
	found.holds == null
	found.key == "not known"
	quiet(worker({"exposed": {"lower": []}, "exposure_unknown": {"limit": [open]}}))
}

test_exempted if {
	some certificate, cite in {"overall_risk": "reg 11", "emergency_services": "reg 12", "defence": "reg 13"}
	exempted := {"choices": {"weekly_average": false, "exemption": certificate}}
	endswith(obligation(loud(exempted)).cite, cite)
	quiet(worker(exempted))
	quiet(worker(object.union(exempted, {"exposure_unknown": {"limit": [open]}})))
}

test_not_above if {
	quiet(worker({}))
	quiet(worker({"exposed": {"limit_level": [past], "limit_peak": [past]}}))
}
