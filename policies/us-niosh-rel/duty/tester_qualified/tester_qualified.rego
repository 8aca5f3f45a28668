# METADATA
# title: Qualified testers (recommended)
# description: >-
#   Hearing tests are made by a physician or an audiologist, or by a certified occupational hearing conservationist
#   under their supervision.
# custom:
#   cite: NIOSH 98-126, 1.6.1
#   subject: tester
#   topic: test-quality
#   severity: minor
#   evidence: [tester, audiogram]
#   remedy: >-
#     Let only a physician, an audiologist or a certified conservationist under them test; record certificate, its
#     validity and the supervisor.
package duty.tester_qualified

import data.common
import rego.v2

obligations contains object.union(qualification, {
	"key": "qualification",
	"because": common.refs([input.first_outside, input.first_test, input.last_test]),
	"facts": {
		"tests": input.tests,
		"workers": input.workers,
		"certificate": input.certificate,
		"tests_outside_validity": input.tests_outside_validity,
	},
}) if {
	has_tested
}

obligations contains object.union(supervision, {
	"key": "supervision",
	"because": common.refs([input.first_test, input.last_test]),
	"facts": {"tests": input.tests, "workers": input.workers, "supervisor": input.supervisor},
}) if {
	has_tested
	input.qualification == "technician"
}

not_owed contains "no hearing test on record" if not has_tested

has_tested if input.tests > 0

professionals := ["audiologist", "otolaryngologist", "physician"]

# The first of these that fits.
qualification := {"holds": null, "note": "the person who tested is not in the tester records", "missing": ["the tester and the qualification"]} if {
	input.registered == false
} else := {"holds": null, "note": "the records do not say what the tester is", "missing": ["the qualification"]} if {
	input.qualification == null
} else := {"holds": false, "note": "tests were made on days outside the validity of the certificate or licence"} if {
	input.tests_outside_validity > 0
} else := {"holds": true} if {
	input.qualification in professionals
} else := {"holds": true} if {
	input.qualification == "technician"
	input.certificate != null
} else := {"holds": null, "note": "no certificate of the technician is on record", "missing": ["the certificate"]} if {
	input.qualification == "technician"
} else := {"holds": false, "note": "the tester is neither physician, audiologist nor technician"}

supervision := {"holds": false, "note": "the technician is under the supervision of no professional on record"} if {
	input.supervisor == null
} else := {"holds": null, "note": "the profession of the technician's supervisor is not known", "missing": ["the supervisor's qualification"]} if {
	input.supervisor_is == null
} else := {"holds": true} if {
	input.supervisor_is in professionals
} else := {"holds": false, "note": "the technician's supervisor is neither physician nor audiologist"}
