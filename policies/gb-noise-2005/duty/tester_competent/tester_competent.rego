# METADATA
# title: Competent testers (guidance)
# description: >-
#   Guidance, not law. Hearing is tested by a doctor, a trained nurse or a trained technician with access to an
#   occupational-health professional, after a course in industrial audiometry approved by the British Society of
#   Audiology or with equivalent competence.
# custom:
#   cite: HSE, Health surveillance for noise (guidance)
#   subject: tester
#   topic: test-quality
#   severity: minor
#   evidence: [tester, audiogram]
#   remedy: Let only trained people test, and record their course or competence.
package duty.tester_competent

import data.common
import rego.v2

obligations contains object.union(verdict, {
	"because": common.refs([input.first_test, input.last_test]),
	"facts": {"tests": input.tests, "workers": input.workers, "certificate": input.certificate},
}) if {
	has_tested
}

not_owed contains "no hearing test on record" if not has_tested

has_tested if input.tests > 0

verdict := {"holds": null, "note": "the person who tested is not in the tester records", "missing": ["the tester and the qualification"]} if {
	input.registered == false
} else := {"holds": null, "note": "the records do not say what the tester is", "missing": ["the qualification"]} if {
	input.qualification == null
} else := {"holds": true, "note": "an occupational-health professional"} if {
	input.qualification in data.measures.hearing.professionals
} else := {"holds": true, "note": "a technician with a course or shown competence"} if {
	trained
} else := {"holds": false, "note": "neither a course in industrial audiometry nor equivalent competence is on record"}

trained if input.certificate != null

trained if input.competence_shown == true
