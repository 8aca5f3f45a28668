# METADATA
# title: Altered reference exam
# description: >-
#   A reference exam is within acceptable limits if no threshold is above 25 dB HL. If the highest of the
#   thresholds at 3000, 4000 and 6000 Hz is above that and above those at all other frequencies tested, it is
#   suggestive of PAINPSE (hearing loss by high sound pressure levels), in one ear or both; else the alteration
#   does not fit that pattern, and the occupational physician looks for other causes, has the worker examined
#   further, and defines fitness. Suggestive is no diagnosis: the diagnosis, and fitness, are the physician's.
# custom:
#   cite: NR-7 Annex II items 5 and 10 (secondary source)
#   subject: worker
#   topic: follow-up
#   severity: major
#   evidence: [audiogram, follow_up]
#   remedy: >-
#     Ask the occupational physician to interpret the reference exam and to define fitness, and enter the opinion
#     (medical_opinion) with the exam it is about.
package duty.reference_interpreted

import data.common
import rego.v2

obligations contains {
	"key": exam.id,
	"ask": "What alters this reference exam, is further examination needed, and is the worker fit for the job?",
	"of": "occupational physician",
	"by": opinion(exam),
	"on": exam.date,
	"note": sprintf("reference exam of %s: %s", [exam.date, concat("; ", said(exam))]),
	"because": [exam.ref],
} if {
	some exam in references
	count(said(exam)) > 0
}

obligations contains {
	"key": exam.id,
	"holds": true,
	"on": exam.date,
	"note": "all thresholds of the reference exam are within acceptable limits",
	"because": [exam.ref],
} if {
	some exam in references
	exam.schemes.above_acceptable.left == false
	exam.schemes.above_acceptable.right == false
}

obligations contains {
	"key": exam.id,
	"holds": null,
	"on": exam.date,
	"note": "whether the reference exam is within acceptable limits cannot be told",
	"missing": ["thresholds of the reference exam at all seven frequencies"],
	"because": [exam.ref],
} if {
	some exam in references
	count(said(exam)) == 0
	some ear in {"left", "right"}
	exam.schemes.above_acceptable[ear] == null
}

# The first reference exam since the rule is in force, of workers who are or were above the action level. What a later one shows is the matter
# of change-assessed.
references := [exam |
	input.baseline != null
	input.baseline.in_program
	some exam in input.audiograms
	exam.ref == input.baseline.ref
	common.at(data.parameters.acceptable_level, exam.date) != null
]

said(exam) := [sprintf("%s ear %s", [ear, pattern(exam.schemes.noise_pattern[ear])]) |
	some ear in ["left", "right"]
	exam.schemes.above_acceptable[ear] == true
]

pattern(fits) := "suggestive of PAINPSE" if {
	fits == true
} else := "altered, not in the pattern of PAINPSE" if {
	fits == false
} else := "altered, and the thresholds do not show in which pattern"

opinion(exam) := {"date": given[0].date, "ref": given[0].ref} if {
	given := [done |
		some done in exam.follow_ups
		done.kind == "medical_opinion"
		done.by_is in data.measures.hearing.physicians
	]
	count(given) > 0
} else := null

not_owed contains "there is no reference exam of a worker above the action level" if count(references) == 0
