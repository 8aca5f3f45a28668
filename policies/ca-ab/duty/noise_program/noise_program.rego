# METADATA
# title: Noise management program
# description: >-
#   Where workers are exposed to excess noise the employer has a noise management program: education of workers,
#   measuring and monitoring, methods of control, protectors, hearing tests with their records, and its review. That
#   testing and review belong to it was read in the regulator's bulletin; the rest of the list is from memory.
# custom:
#   cite: OHS Code, s. 221
#   subject: site
#   topic: records
#   severity: major
#   evidence: [document]
#   remedy: Write the noise management program, and record what it covers.
package duty.noise_program

import data.common
import rego.v2

obligations contains {
	"key": "program",
	"holds": false,
	"note": "no noise management program is on record",
	"facts": {"workers_in_noise": input.enrolled_now},
} if {
	owed
	count(papers) == 0
}

obligations contains {
	"key": "contents",
	"holds": null,
	"note": "it is not known what the program covers",
	"missing": ["what the program covers"],
	"because": common.refs(papers),
} if {
	owed
	count(papers) > 0
	count(covered) == 0
}

obligations contains {
	"key": content,
	"holds": content in covered,
	"note": note(content),
	"because": common.refs(papers),
} if {
	owed
	count(covered) > 0
	some content in common.at(data.parameters.program_contents, input.as_of)
}

not_owed contains "nobody is known to be exposed to excess noise now" if not owed

owed if input.enrolled_now > 0

covered := common.covered(papers)

note(content) := sprintf("the program holds nothing on %s", [replace(content, "_", " ")]) if {
	not content in covered
} else := null

papers := [paper |
	some paper in input.documents
	paper.kind in ["hearing_conservation_programme", "written_program"]
]
