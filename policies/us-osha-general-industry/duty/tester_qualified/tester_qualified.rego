# METADATA
# title: Qualified testers
# description: >-
#   Hearing tests are made by a licensed or certified audiologist, otolaryngologist or other physician, or by a technician
#   who is certified by the Council of Accreditation in Occupational Hearing Conservation or has shown competence in giving
#   tests, obtaining valid audiograms, and using, maintaining and checking audiometers. A technician who runs a
#   microprocessor audiometer need not be certified. Every technician is responsible to an audiologist,
#   otolaryngologist or physician.
# custom:
#   cite: 29 CFR 1910.95(g)(3)
#   subject: tester
#   topic: test-quality
#   severity: major
#   evidence: [tester, audiogram]
#   remedy: Let only qualified people test; record certificate, its validity and the professional to whom the technician is responsible, and have a professional look at the tests in question.
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
} else := {"holds": true} if {
	input.qualification == "technician"
	input.competence_shown == true
} else := {"holds": false, "note": "tests were made on days outside the validity of the certificate or licence"} if {
	input.tests_outside_validity > 0
} else := {"holds": true} if {
	input.qualification in professionals
} else := {"holds": true} if {
	input.qualification == "technician"
	input.certificate != null
} else := {"holds": null, "note": "neither a certificate nor shown competence is on record", "missing": ["the certificate, shown competence, or that only microprocessor audiometers were used"]} if {
	input.qualification == "technician"
} else := {"holds": false, "note": "the tester's profession is not among those that the paragraph names"}

supervision := {"holds": false, "note": "the technician is responsible to no professional on record"} if {
	input.supervisor == null
} else := {"holds": null, "note": "the profession of the technician's supervisor is not known", "missing": ["the supervisor's qualification"]} if {
	input.supervisor_is == null
} else := {"holds": true} if {
	input.supervisor_is in professionals
} else := {"holds": false, "note": "the technician's supervisor is neither audiologist, otolaryngologist nor physician"}
