# METADATA
# title: Baseline test before exposure (guidance)
# description: >-
#   Guidance, not law. The first hearing test is ideally made before exposure starts; with people who are exposed
#   already it may start at any time. Asked of workers who came to the site, or moved into the noise from another
#   group, after the Regulations came into force, and who have been tested at all.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram, examination]
#   remedy: Test new starters and those who change jobs before they are exposed.
package duty.baseline_before_exposure

import rego.v2

obligations contains {
	"key": start,
	"before": start,
	"by": "test.done",
	"note": sprintf("exposure at or above an upper exposure action value began on %s", [start]),
} if {
	count(tests) > 0
	under_the_law
}

not_owed contains "exposure was never known to be at or above an upper exposure action value, or no hearing test is on record" if {
	count(tests) == 0
}

not_owed contains "the worker may have been exposed before the Regulations came into force" if {
	count(tests) > 0
	not under_the_law
}

start := min([spell.from | some spell in input.exposed.upper])

tests := [test |
	count(input.exposed.upper) > 0
	some test in array.concat(
		[audiogram.ref | some audiogram in input.audiograms; audiogram.invalidated == false],
		[e.ref | some e in input.examinations; e.kind == "hearing_test"; e.attended_on != null],
	)
]

first_day := data.parameters.upper_action_value.values[0].from

under_the_law if input.employed[0].from > first_day

# Who was there already and moved into the noise from another group, which is known to be below.
under_the_law if {
	start > first_day
	some earlier in input.exposures
	earlier.to == start
	some later in input.exposures
	later.from == start
	earlier.group != later.group
	count([stretch | some stretch in input.exposure_unknown.upper; stretch.to == start]) == 0
}
