# METADATA
# title: Audiometric booth
# description: >-
#   The exam is made in an audiometric booth (cabina audiométrica) whose levels keep ISO 8253-1, or in an
#   acoustically treated room that does. Where neither is possible, whoever is responsible tests two persons with
#   known thresholds in a quiet room, which serves if no threshold differs by more than 5 dB (from memory). The
#   record is a certificate, or the note of that check, as a document of kind booth_certificate.
# custom:
#   cite: NR-7 Annex II items 3.1, 3.1.1 and 3.2.1.1
#   subject: site
#   topic: test-quality
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Get the certificate of the booth or room in which the exams are made, from the clinic if need be, and file
#     it.
package duty.booth

import rego.v2

obligations contains {
	"holds": true,
	"on": latest.date,
	"note": "a certificate of the booth or room is on record; it does not say here which exams were made in it",
	"because": [latest.ref],
	"facts": {"covers": latest.covers},
} if {
	tested
	count(certificates) > 0
}

obligations contains {
	"holds": false,
	"note": "workers are above the action level and no certificate of a booth or room is on record",
	"facts": {"workers_above_the_action_level": input.enrolled_ever},
} if {
	tested
	count(certificates) == 0
}

not_owed contains "no worker of the site is known to be above the action level" if not tested

tested if input.enrolled_ever > 0

certificates := [document | some document in input.documents; document.kind == "booth_certificate"]

latest := certificates[count(certificates) - 1]
