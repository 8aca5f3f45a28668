# METADATA
# title: Audiometric technician
# description: >-
#   Tests are made by an audiometric technician who works in consultation with a designated physician, audiologist or
#   occupational health nurse. Who is a technician, the definitions say; a certificate on record is asked for. One of
#   these professionals may test as well.
# custom:
#   cite: OHS Code, s. 223(2)(a)
#   subject: tester
#   topic: test-quality
#   severity: major
#   evidence: [tester, audiogram]
#   remedy: Let only audiometric technicians test; record the certificate, its validity and the professional whom the technician consults.
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
	"key": "consultation",
	"because": common.refs([input.first_test, input.last_test]),
	"facts": {"tests": input.tests, "workers": input.workers, "supervisor": input.supervisor},
}) if {
	has_tested
	input.qualification == "technician"
}

not_owed contains "no hearing test on record" if not has_tested

has_tested if input.tests > 0

# The occupational health nurse of the law is a licensed_professional of the records.
professionals := ["audiologist", "otolaryngologist", "physician", "licensed_professional"]

# The first of these that fits.
qualification := {"holds": null, "note": "the person who tested is not in the tester records", "missing": ["the tester and the qualification"]} if {
	input.registered == false
} else := {"holds": null, "note": "the records do not say what the tester is", "missing": ["the qualification"]} if {
	input.qualification == null
} else := {"holds": false, "note": "tests were made on days outside the validity of the certificate"} if {
	input.tests_outside_validity > 0
} else := {"holds": true} if {
	input.qualification in professionals
} else := {"holds": true} if {
	input.qualification == "technician"
	input.certificate != null
} else := {"holds": null, "note": "no certificate of the technician is on record", "missing": ["the certificate of the audiometric technician"]} if {
	input.qualification == "technician"
} else := {"holds": false, "note": "the tester is neither an audiometric technician nor a professional of the paragraph"}

supervision := {"holds": false, "note": "the technician works in consultation with no professional on record"} if {
	input.supervisor == null
} else := {"holds": null, "note": "the profession of whom the technician consults is not known", "missing": ["the qualification of whom the technician consults"]} if {
	input.supervisor_is == null
} else := {"holds": true} if {
	input.supervisor_is in professionals
} else := {"holds": false, "note": "whom the technician consults is neither physician, audiologist nor occupational health nurse"}
