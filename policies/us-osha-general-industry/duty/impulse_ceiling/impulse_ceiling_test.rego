package duty.impulse_ceiling_test

import data.duty.impulse_ceiling
import rego.v2

measurement(peak) := {
	"id": "m1", "ref": "measurement/m1", "date": "2024-03-05",
	"current": true, "peak_db": peak, "peak_weighting": "C",
}

group(varied, peak) := {"workers": 12, "varied": varied, "measurements": [measurement(peak)]}

obligation(dossier) := o if some o in impulse_ceiling.obligations with input as dossier

reasons(dossier) := found if found := impulse_ceiling.not_owed with input as dossier

test_peak_is_held_against_the_ceiling if {
	obligation(group(null, 141)).value == 141
	obligation(group(null, 141)).at_most == "impulse_ceiling"
	obligation(group(null, 141)).facts.peak_weighting == "C"
	count(reasons(group(null, 141))) == 0
}

test_impulses_may_matter_and_no_peak if {
	obligation(group(true, null)).value == null
	obligation(group(true, null)).missing == ["a peak level"]
}

test_one_peak_is_enough if {
	dossier := {"workers": 12, "varied": true, "measurements": [measurement(null), measurement(135)]}
	{o.value | some o in impulse_ceiling.obligations} == {135} with input as dossier
}

test_no_impulses if {
	every varied in [false, null] {
		not obligation(group(varied, null))
		count(reasons(group(varied, null))) == 1
	}
}

test_peak_from_before_a_change_proves_nothing_now if {
	before := object.union(measurement(141), {"current": false})
	dossier := {"workers": 12, "varied": false, "measurements": [before]}
	obligation(dossier).value == null
	count(reasons(dossier)) == 0
}

test_varied_and_never_measured if {
	obligation({"workers": 12, "varied": true, "measurements": []}).value == null
}
