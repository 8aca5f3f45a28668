# METADATA
# title: Quiet before the baseline test (guidance)
# description: >-
#   Guidance, not law. Sixteen hours without noise go before a baseline test; well-fitted protectors may take their
#   place where that is not possible.
# custom:
#   cite: HSE L108, audiometric testing (guidance)
#   subject: worker
#   topic: audiometry
#   severity: minor
#   evidence: [audiogram]
#   remedy: Repeat the baseline test after a quiet period, or record the hours that went before it.
package duty.baseline_quiet

import rego.v2

obligations contains {
	"value": input.baseline.quiet_hours,
	"at_least": "quiet_period",
	"on": input.baseline.date,
	"note": "hours without noise before the baseline test",
	"missing": ["hours without noise before the test" | input.baseline.quiet_hours == null],
	"because": [input.baseline.ref],
} if {
	owed
	not by_protectors
}

obligations contains {
	"holds": true,
	"on": input.baseline.date,
	"note": "protectors took the place of the quiet period",
	"because": [input.baseline.ref],
} if {
	owed
	by_protectors
}

not_owed contains "no baseline audiogram is on record" if input.baseline == null

not_owed contains "exposure was never known to be at or above an upper exposure action value" if {
	input.baseline != null
	not owed
}

owed if {
	input.baseline != null
	count(input.exposed.upper) > 0
}

by_protectors if input.baseline.quiet_by_protectors == true
