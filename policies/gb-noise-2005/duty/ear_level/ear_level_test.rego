package duty.ear_level_test

import data.duty.ear_level as duty
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

muff(under, missing) := {
	"date": "2024-01-10", "ref": "protector_issue/w1", "protector": "muff", "exposure_dba": 97, "under_db": under,
	"missing": missing, "method": "SNR", "working": "97 - 27 + 4 = 74", "mark": null,
}

worker(spells, protection) := {"exposed": {"upper": spells, "upper_level": spells}, "protection": protection}

test_both_ends if {
	found := {o.key: o | some o in duty.obligations} with input as worker([now], muff(74, []))
	found.enough.below == "ear_level_ceiling"
	found.enough.value == 74
	found["not too much"].at_least == "ear_level_floor"
	count(found) == 2
	duty.not_owed == set() with input as worker([now], muff(74, []))
}

test_peaks_alone_show_no_over_protection if {
	by_peak := object.union(worker([now], muff(60, [])), {"exposed": {"upper": [now], "upper_level": []}})
	obligation(by_peak).key == "enough"
}

test_not_estimated if {
	found := obligation(worker([now], muff(null, ["the rating"])))
	found.key == "enough"
	found.value == null
	found.missing == ["the rating"]
}

test_no_protector if quiet(worker([now], null))

test_below if quiet(worker([past], muff(74, [])))
