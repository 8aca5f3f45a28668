# METADATA
# title: Type of the instrument
# description: >-
#   Noise exposure is measured with an instrument of Type 2 or better: a dosimeter by ANSI S1.25 or IEC 61252, or a
#   sound level meter of the type named.
# custom:
#   cite: OHS Code, s. 219(2)
#   subject: instrument
#   topic: monitoring
#   severity: minor
#   evidence: [instrument, measurement]
#   remedy: Record the type of the instrument; measure with one of Type 2 or better.
package duty.instrument_type

import data.common
import rego.v2

obligations contains {
	"holds": suitable,
	"note": said[suitable],
	"missing": common.missing(suitable, "the type of the instrument"),
	"because": [input.noise_measurements[0].ref],
	"facts": {"class": input.class, "measurements_with_it": count(input.noise_measurements)},
} if {
	used
}

not_owed contains "no noise exposure was measured with it" if not used

used if {
	not input.kind in ["audiometer", "calibrator"]
	count(input.noise_measurements) > 0
}

suitable := null if {
	input.class == null
} else if {
	input.class in common.at(data.parameters.instrument_types, input.as_of)
} else := false

said := {
	true: null,
	false: "the type of the instrument is not among those required",
	null: "the type of the instrument is not on record",
}
