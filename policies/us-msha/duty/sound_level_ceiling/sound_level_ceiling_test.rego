package duty.sound_level_ceiling_test

import data.duty.sound_level_ceiling
import rego.v2

group(highest, reaches) := {"workers": 12, "measurements": [{
	"id": "m1", "ref": "measurement/m1", "date": "2024-03-05",
	"current": true, "max_dba": highest, "reaches_enrolling": reaches,
}]}

test_highest_level_is_held_against_the_ceiling if {
	some o in sound_level_ceiling.obligations with input as group(115.1, true)
	o.value == 115.1
	o.at_most == "sound_level_ceiling"
	o.on == "2024-03-05"
}

test_highest_level_counts_even_below_the_action_level if {
	count(sound_level_ceiling.obligations) == 1 with input as group(96, false)
}

test_noisy_without_highest_level if {
	some o in sound_level_ceiling.obligations with input as group(null, true)
	o.value == null
	o.missing == ["the highest continuous level"]
	count(sound_level_ceiling.not_owed) == 0 with input as group(null, true)
}

test_quiet_without_highest_level if {
	every reaches in [false, null] {
		count(sound_level_ceiling.obligations) == 0 with input as group(null, reaches)
		count(sound_level_ceiling.not_owed) == 1 with input as group(null, reaches)
	}
}

test_level_from_before_a_change_proves_nothing_now if {
	before := object.union(group(117, true).measurements[0], {"current": false})
	some o in sound_level_ceiling.obligations with input as {"workers": 12, "measurements": [before]}
	o.value == null
	o.because == ["measurement/m1"]
	count(sound_level_ceiling.not_owed) == 0 with input as {"workers": 12, "measurements": [before]}
}

test_never_measured if count(sound_level_ceiling.not_owed) == 1 with input as {"workers": 0, "measurements": []}
