# METADATA
# title: Noise reduction programme (Lärmminderungsprogramm)
# description: >-
#   Where one of the upper action values is exceeded, the employer works out and carries out a programme of technical
#   and organisational measures to reduce the exposure.
# custom:
#   cite: LärmVibrationsArbSchV § 7(5)
#   subject: group
#   topic: controls
#   severity: major
#   evidence: [document, measurement]
#   remedy: Work out the programme, and record what it holds and how it is carried out.
package duty.control_programme

import data.common
import rego.v2

obligations contains {
	"holds": count(papers) > 0,
	"note": said,
	"because": common.refs(papers),
	"facts": {"workers": input.workers},
} if {
	upper_exceeded_now
}

not_owed contains "the records do not show exposure above the upper action values now" if not upper_exceeded_now

upper_exceeded_now if common.any_current(input.exposed.upper_exceeded)

papers := [paper | some paper in input.documents; paper.kind == "control_programme"]

said := "no programme of technical or organisational measures is on record" if count(papers) == 0

else := null
