package demo

import (
	"os"
	"path/filepath"
	"strings"
)

// acceptedGaps are the gaps that the invented firm has accepted. Two entries are in force, one has expired, and one
// fits nothing any more: the last two are findings of their own.
const acceptedGaps = `
# Gaps that the employer has accepted for a time. They stay gaps: a report shows them apart and never counts them
# as met. An entry whose day is over, or that fits nothing, becomes a finding itself.
- id: f-00e5e45f
  reason: The enclosed cut-off saw is ordered, and delivery is confirmed for the autumn.
  approved_by: plant manager
  since: 2026-04-01
  until: 2026-10-31
- match: {site: kiln-hill, duty: test-room-background, subject: "RV-*"}
  reason: The old test van was sold in 2022, so that its background survey cannot be repeated.
  approved_by: safety office
  until: 2026-12-31
- match: {site: kiln-hill, duty: personal-sampling, subject: kh-melt}
  reason: Dosimeters were promised for the melt shop by the end of the winter.
  approved_by: plant manager
  until: 2026-03-31
- match: {site: kiln-hill, duty: training-content, subject: K0199}
  reason: The course was given in two parts, and the second was still to come.
  approved_by: safety office
  until: 2026-12-31
`

func writeAccepted(dir string) error {
	return os.WriteFile(filepath.Join(dir, "accepted.yaml"), []byte(strings.TrimPrefix(acceptedGaps, "\n")), 0o644)
}
