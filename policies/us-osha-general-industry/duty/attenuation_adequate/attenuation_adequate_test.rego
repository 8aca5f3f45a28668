package duty.attenuation_adequate_test

import data.duty.attenuation_adequate
import rego.v2

now := [{"from": "2024-01-01", "to": null, "current": true}]

formerly := [{"from": "2022-01-01", "to": "2023-01-01", "current": false}]

protection := {
	"date": "2024-01-10", "ref": "protector_issue/P1", "protector": "P1", "exposure_dba": 100, "under_db": 88,
	"halved_db": 94, "par_db": null, "method": "Appendix B(ii)", "missing": [], "working": "100 - (19 - 7) = 88 dBA", "information": [
		{"method": "half the attenuation", "level_db": 94, "working": "100 - 6 = 94 dB", "mark": null},
		{"method": "worn for 50 % of the time", "level_db": 97.3, "working": "97.3 dBA", "mark": "from memory"},
	],
}

worker(limit, shift) := {
	"as_of": "2026-06-30", "enrolled": now, "protection": protection, "after_shift": shift,
	"exposed": {"limit": limit}, "exposure_unknown": {"limit": []},
}

obligation(dossier) := o if some o in attenuation_adequate.obligations with input as dossier

reasons(dossier) := found if found := attenuation_adequate.not_owed with input as dossier

test_above_the_limit if {
	obligation(worker(now, [])).at_most == "attenuation_target"
	obligation(worker(now, [])).value == 88
	count(reasons(worker(now, []))) == 0
}

test_after_a_shift_the_lower_target_counts_alone if {
	{o.at_most | some o in attenuation_adequate.obligations} == {"attenuation_target_after_shift"} with input as worker(now, now)
	obligation(worker([], now)).at_most == "attenuation_target_after_shift"
}

test_half_the_attenuation_is_only_shown if {
	obligation(worker(now, [])).facts.with_half_the_attenuation_dba == 94
	{o.value | some o in attenuation_adequate.obligations} == {88} with input as worker(now, [])
}

test_other_methods_are_only_shown if {
	every shift in [[], now] {
		obligation(worker(now, shift)).value == 88
		obligation(worker(now, shift)).facts.for_information == [
			"half the attenuation: 100 - 6 = 94 dB",
			"worn for 50 % of the time: 97.3 dBA (from memory)",
		]
	}
}

test_no_estimate if {
	dossier := object.union(worker(now, []), {"protection": {"under_db": null, "missing": ["the rating of the protector"]}})
	obligation(dossier).value == null
	obligation(dossier).missing == ["the rating of the protector"]
}

test_exposure_not_known if {
	dossier := object.union(worker([], []), {"exposure_unknown": {"limit": [{"from": "2025-01-01", "to": null, "reason": "not measured"}]}})
	obligation(dossier).at_most == "attenuation_target"
	count(reasons(dossier)) == 0
}

test_neither_above_the_limit_nor_after_a_shift if {
	every past in [[], formerly] {
		not obligation(worker(past, past))
		count(reasons(worker(past, past))) == 1
	}
}

test_no_protector if {
	dossier := object.union(worker(now, []), {"protection": null})
	not obligation(dossier)
	count(reasons(dossier)) == 1
}

test_not_in_the_program_now if {
	dossier := object.union(worker([], []), {"enrolled": formerly})
	not obligation(dossier)
	count(reasons(dossier)) == 1
}
