# METADATA
# title: Certificate of occupational health (ASO)
# description: >-
#   For each clinical examination a certificate of occupational health (ASO, atestado de saúde ocupacional) is
#   made available to the worker. The text sets no time; the record is the day of the certificate.
# custom:
#   cite: NR-7 7.5.19 (secondary source)
#   subject: worker
#   topic: notice
#   severity: minor
#   evidence: [examination]
#   remedy: >-
#     Have the ASO of the examination issued, give it to the worker, and enter its day.
package duty.aso_issued

import rego.v2

obligations contains {
	"key": examination.id,
	"after": examination.attended_on,
	"by": certificate(examination),
	"note": sprintf("clinical examination of %s", [examination.attended_on]),
	"because": [examination.ref],
	"facts": {"purpose": examination.purpose},
} if {
	some examination in clinical
}

clinical := [examination |
	some examination in input.examinations
	examination.kind == "health_appointment"
	examination.attended_on != null
]

certificate(examination) := {"date": examination.certificate_on, "ref": examination.ref} if {
	examination.certificate_on != null
} else := null

not_owed contains "no clinical examination is on record" if count(clinical) == 0
