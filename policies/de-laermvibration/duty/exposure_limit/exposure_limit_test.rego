package duty.exposure_limit_test

import data.duty.exposure_limit
import rego.v2

stretch := {"from": "2024-01-01", "to": null}

exposure := object.union(stretch, {"ref": "measurement/m1", "channels": {
	"day": {"level_dba": 99, "at_least": 102}, "peak": {"at_least": 145},
}})

worker(level, peak, protection, wear) := {
	"as_of": "2026-06-30", "exposures": [exposure], "protection": protection, "wear": wear,
	"exposed": {
		"ear_level_exceeded": [object.union(stretch, {"current": level})],
		"limit_peak_exceeded": [object.union(stretch, {"current": peak})],
	},
}

muff(under, peak_under) := {
	"date": "2024-01-10", "ref": "protector_issue/p1", "protector": "p1", "under_db": under, "peak_under_dbc": peak_under,
	"missing": ["C-weighted level of the measurement"], "working": "99 - 15 = 84",
}

seen(worn) := {"date": "2025-01-01", "ref": "wear_check/c1", "worn": worn}

obligation(key, dossier) := found if {
	some found in exposure_limit.obligations with input as dossier
	found.key == key
}

test_under_the_protector if {
	o := obligation("level", worker(true, false, muff(84.2, null), null))
	o.value == 84.2
	o.at_most == "limit_level"
	o.missing == []
	o.because == ["protector_issue/p1", "measurement/m1"]
	obligation("level", worker(true, false, muff(84.2, null), seen(true))).value == 84.2
}

test_no_protector if {
	o := obligation("level", worker(true, false, null, null))
	o.value == 99
	o.facts.protector == []
	contains(o.note, "no protector")
}

test_seen_without_the_protector if {
	o := obligation("level", worker(true, false, muff(84.2, null), seen(false)))
	o.value == 99
	o.missing == []
	contains(o.note, "last seen without")
}

test_attenuation_not_known if {
	o := obligation("level", worker(true, false, muff(null, null), null))
	o.value == null
	o.missing == ["C-weighted level of the measurement"]
}

# What is known as at least holds the allowance of the class; the estimate before the change does not.
test_level_known_only_as_at_least if {
	bounded := object.union(stretch, {"ref": "measurement/m1", "channels": {"day": {"level_dba": null, "at_least": 91}, "peak": {"at_least": null}}})
	before := object.union(exposure, {"from": "2023-01-01", "to": "2024-01-01", "channels": {"day": {"level_dba": 88, "at_least": 91}, "peak": {"at_least": null}}})
	obligation("level", object.union(worker(true, false, null, null), {"exposures": [before, bounded]})).value == 88
	lower := object.union(before, {"channels": {"day": {"level_dba": 84, "at_least": 87}, "peak": {"at_least": null}}})
	every exposures in [[bounded], [lower, bounded]] {
		o := obligation("level", object.union(worker(true, false, null, null), {"exposures": exposures}))
		o.value == null
		count(o.missing) == 1
	}
}

test_peak if {
	obligation("peak", worker(false, true, null, null)).value == 145
	obligation("peak", worker(false, true, muff(84, 121), null)).value == 121
	o := obligation("peak", worker(false, true, muff(84, null), null))
	o.value == null
	count(o.missing) == 1
	count(exposure_limit.not_owed) == 0 with input as worker(false, true, null, null)
}

test_not_above_the_limit if {
	found := exposure_limit.obligations with input as worker(false, false, null, null)
	count(found) == 0
	count(exposure_limit.not_owed) == 1 with input as worker(false, false, null, null)
}
