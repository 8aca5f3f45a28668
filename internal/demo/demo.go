// Package demo writes programs of invented firms: the demo program of Harrow & Slate, which shows every
// status a finding can have, and programs of any size for measuring speed.
//
// The demo program is first made without a fault (firm.go, roster.go, career.go, clinic.go, papers.go).
// Then each fault of the table in faults.go and each oddity of faults_integrity.go is planted at Kiln Hill. No
// name of a person or brand occurs, no clock is read, and every random number comes from a fixed seed, so that
// two runs write the same bytes.
package demo

import (
	"os"
	"path/filepath"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Date is short for calendar.Date.
type Date = calendar.Date

// day is a date written in code.
func day(s string) Date { return calendar.MustParse(s) }

// asOf is the day on which the demo programs are judged; no record is later.
var asOf = day("2026-06-30")

// Write writes the demo program into dir: program.yaml and one canonical CSV file a record kind. The
// folder is made if there is none; one that holds anything is refused and left as it is.
func Write(dir string) error {
	return publish(dir, func(temporary string) error {
		return planted().write(temporary)
	})
}

// planted makes the program with all faults and oddities.
func planted() *book {
	b := harrowAndSlate()
	for _, f := range faults {
		f.plant(b)
	}
	for _, o := range oddities {
		if o.plant != nil { // some come with another
			o.plant(b)
		}
	}
	return b
}

const demoProgram = `# The demo program of hearduty: an invented firm, invented workers, invented numbers.
# Kiln Hill has trouble of every kind; Larch Street does everything in time that the law asks, and the company's own
# standard asks for more. The works abroad are small, stand under laws of their own, and have trouble with them.
program: Harrow & Slate hearing conservation
as_of: 2026-06-30
accepted: accepted.yaml
` + demoSites

// demoSites are the sites of the demo program.
const demoSites = `sites:
  - {id: kiln-hill, name: Kiln Hill foundry, country: US, region: OH, bundles: [us-osha-general-industry], choices: {age_correction: false}}
  - {id: larch-street, name: Larch Street joinery, country: US, region: OH, bundles: [us-osha-general-industry, company-example], choices: {age_correction: false}}
  - {id: brook-end, name: Brook End foundry, country: GB, bundles: [gb-noise-2005]}
  - {id: ahornweg, name: Werk Ahornweg, country: DE, bundles: [de-laermvibration]}
  - {id: ipe, name: Ipê foundry, country: BR, region: SP, bundles: [br-nr15-nr7], choices: {risk_degree: "3-4"}}
  - {id: elmwood, name: Elmwood foundry, country: CA, region: AB, bundles: [ca-ab]}
  - {id: tamarack, name: Tamarack foundry, country: CA, region: QC, bundles: [ca-qc]}
`

// kinds lists the record kinds that a program of this package holds. What was offered, and what came of it, is kept
// apart from hearing tests only where the law asks about offers, which that of these sites does not.
func kinds() []record.Kind {
	return slices.DeleteFunc(record.Kinds(), func(k record.Kind) bool { return k == "examination" })
}

// writeProgram writes program.yaml: the head, the record files of all kinds, and more of them.
func writeProgram(dir, head, more string) error {
	var text strings.Builder
	text.WriteString(head + "records:\n")
	for _, k := range kinds() {
		text.WriteString("  - records/" + csvName(k) + "\n")
	}
	text.WriteString(more)
	return os.WriteFile(filepath.Join(dir, "program.yaml"), []byte(text.String()), 0o644)
}
