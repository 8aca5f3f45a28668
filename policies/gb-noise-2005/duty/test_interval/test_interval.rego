# METADATA
# title: Interval between hearing tests (guidance)
# description: >-
#   Guidance, not law. After the baseline test hearing is tested usually every year in the first two years of
#   employment, and every three years after that; more often if a problem is found or the risk is high, which
#   next-test-due asks for. The Irish authority words it as one test within the year after the first. The Regulations set
#   no interval.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram, examination]
#   remedy: Test the hearing of the worker now.
package duty.test_interval

import rego.v2

obligations contains {
	"every": "test_interval_first",
	"until": "test_interval_first_years",
	"then": "test_interval_later",
	"since": hired(spell),
	"during": {"from": max([spell.from, first]), "to": spell.to},
	"by": "test.done",
} if {
	count(tests) > 0
	some spell in spells
}

not_owed contains "exposure was never known to be at or above an upper exposure action value" if count(input.exposed.upper) == 0

not_owed contains "no hearing test is on record yet" if {
	count(input.exposed.upper) > 0
	count(tests) == 0
}

not_owed contains "the first hearing test was made after the exposure had ended" if {
	count(input.exposed.upper) > 0
	count(tests) > 0
	count(spells) == 0
}

spells := [spell | some spell in input.exposed.upper; not over(spell)]

over(spell) if {
	spell.to != null
	spell.to <= first
}

first := min(tests)

tests := [day |
	some day in array.concat(
		[audiogram.date | some audiogram in input.audiograms; audiogram.invalidated == false],
		[e.attended_on | some e in input.examinations; e.kind == "hearing_test"],
	)
	day != null
]

# The start of the employment in which the stretch begins; at the earliest the day on which the guidance begins.
hired(spell) := max(array.concat(
	[data.parameters.test_interval_first_years.values[0].from],
	[stretch.from | some stretch in input.employed; stretch.from <= spell.from],
))
