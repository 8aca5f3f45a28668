# METADATA
# title: Physician or fonoaudiólogo
# description: >-
#   The audiometric exam is made by a physician or a speech-language pathologist and audiologist (médico ou
#   fonoaudiólogo), as their federal councils allow. A fonoaudiólogo is an audiologist in the records; certificate
#   holds the registration with the regional council.
# custom:
#   cite: NR-7 Annex II item 3.3 (from memory)
#   subject: tester
#   topic: test-quality
#   severity: major
#   evidence: [tester, audiogram]
#   remedy: >-
#     Let only a physician or fonoaudiólogo test, record the registration number, and have such a professional
#     look at the exams in question.
package duty.tester_qualified

import data.common
import rego.v2

obligations contains object.union(qualification, {
	"key": "qualification",
	"because": common.refs([input.first_outside, input.first_test, input.last_test]),
	"facts": {"exams": input.tests, "workers": input.workers, "exams_outside_validity": input.tests_outside_validity},
}) if {
	has_tested
}

not_owed contains "no exam on record" if not has_tested

has_tested if input.tests > 0

professions := ["audiologist", "otolaryngologist", "physician"]

# The first of these that fits.
qualification := {"holds": null, "note": "the person who tested is not in the tester records", "missing": ["the tester and the profession"]} if {
	input.registered == false
} else := {"holds": null, "note": "the records do not say what the tester is", "missing": ["the profession"]} if {
	input.qualification == null
} else := {"holds": false, "note": "the tester is neither physician nor fonoaudiólogo"} if {
	not input.qualification in professions
} else := {"holds": false, "note": "exams were made on days outside the validity of the registration"} if {
	input.tests_outside_validity > 0
} else := {"holds": null, "note": "the registration with the regional council is not on record", "missing": ["the registration number"]} if {
	input.certificate == null
} else := {"holds": true}
