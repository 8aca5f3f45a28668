# METADATA
# title: Training certified
# description: >-
#   The operator certifies the date and type of training given to each miner and keeps the latest certificate while the
#   miner is enrolled and at least 6 months after that. The latest session of a miner in the program is looked at.
# custom:
#   cite: 30 CFR 62.180(b)
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training]
#   remedy: Certify date and type of the training, keep the certificate, and record it.
package duty.training_certified

import data.common
import rego.v2

obligations contains {
	"on": input.training.date,
	"holds": input.training.certified,
	"note": said[input.training.certified],
	"missing": common.missing(input.training.certified, "whether the training was certified"),
	"because": [input.training.ref],
} if {
	in_program
	input.training != null
}

said := {
	true: null,
	false: "date and type of the latest training were not certified",
	null: "the record of the latest training does not say whether it was certified",
}

in_program if common.any_current(input.enrolled)

not_owed contains "the miner is not in the program now" if not in_program

not_owed contains "there is no training yet" if input.training == null
