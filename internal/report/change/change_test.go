package change

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/report/text"
	"hearduty/internal/schema"
)

var update = flag.Bool("update", false, "write the golden files")

// standing is how a finding stands.
func standing(s finding.Status, message string) *finding.Standing {
	return &finding.Standing{Status: s, Due: calendar.MustParse("2026-05-01"), Message: message}
}

// sample is a comparison with a change of every kind, and texts that are meant to do harm.
func sample() *finding.Comparison {
	gap, due := standing(finding.Gap, "No record that it was done"), standing(finding.Due, "Not yet done")
	accepted := standing(finding.Gap, "The saw is not enclosed")
	accepted.Accepted = &finding.Acceptance{Reason: "It is ordered", ApprovedBy: "plant manager", Until: calendar.MustParse("2026-12-31"), File: "accepted.yaml", Row: 3}
	c := &finding.Comparison{
		Tool: finding.Tool{Name: "hearduty", Version: "1.0"}, Cautions: []string{"A bundle is a reading of the law; licensed professionals decide."},
		Old:   finding.Side{Program: "Harrow & Slate", AsOf: calendar.MustParse("2026-03-31"), Version: "1.0", Listed: "all findings", Totals: map[finding.Status]int{finding.Gap: 3}, AcceptedTotals: map[finding.Status]int{}},
		New:   finding.Side{Program: "Harrow & Slate <script>", AsOf: calendar.MustParse("2026-06-30"), Version: "1.0", Listed: "all findings", Totals: map[finding.Status]int{finding.Gap: 4}, AcceptedTotals: map[finding.Status]int{finding.Gap: 2}},
		Notes: []string{"The bundle b changed from revision 1 to 2."}, Apart: []finding.Apart{{Site: "z", Bundle: "b", In: "new", Open: 2}}, Numbers: map[finding.ChangeKind]int{},
	}
	add := func(kind finding.ChangeKind, id, worker string, before, after *finding.Standing, why ...finding.Cause) {
		c.Numbers[kind]++
		c.Changes = append(c.Changes, finding.Change{Kind: kind, ID: id, Site: "kiln-hill", Bundle: "b", Duty: "annual-training", Topic: "training",
			Subject: finding.Subject{Kind: "worker", ID: worker}, Severity: "major", Cite: "29 CFR 1910.95(k)(2)", Remedy: "Train the worker",
			Before: before, After: after, Why: append([]finding.Cause{}, why...)})
	}
	passed := finding.Cause{Kind: "date_passed", Text: "Its last day, 2026-05-01, passed between the reports."}
	record := finding.Cause{Kind: "record_arrived", Text: "The record training/K3@2026-06-01 (t.csv:9) counts now and did not before.", Record: "training/K3@2026-06-01", File: "t.csv", Row: 9}
	add(finding.Opened, "f-0000000000000001", "K1", due, gap, passed, passed, passed, passed, passed, passed)
	add(finding.Opened, "f-0000000000000002", "\x1b[31mK2", nil, gap, passed)
	add(finding.Worsened, "f-1000000000000001", "K2", standing(finding.Unproven, "Not known"), gap, record)
	add(finding.NoLongerAccepted, "f-2000000000000001", "K1", accepted, gap, finding.Cause{Kind: "acceptance", Text: "The acceptance ended on 2026-05-31."})
	add(finding.Unclear, "f-3000000000000001", "K1", gap, nil)
	add(finding.NewlyLate, "f-4000000000000001", "K1", due, standing(finding.Late, "Done late"), record)
	add(finding.NewlyDue, "f-5000000000000001", "K1", nil, due)
	add(finding.NewlyDue, "f-5000000000000002", "K2", nil, due)
	add(finding.NewlyAccepted, "f-6000000000000001", "K1", gap, accepted)
	add(finding.Eased, "f-7000000000000001", "K1", due, nil)
	add(finding.Closed, "f-8000000000000001", "K1", gap, standing(finding.Met, "Done"), record)
	add(finding.StillAccepted, "f-9000000000000001", "K1", accepted, accepted)
	add(finding.StillOpen, "f-a000000000000001", "K1", gap, gap)
	add(finding.StillOpen, "f-a000000000000002", "K2", standing(finding.Unproven, ""), standing(finding.Unproven, ""))
	return c
}

func empty() *finding.Comparison {
	c := sample()
	c.Notes, c.Apart, c.Changes, c.Numbers = []string{}, []finding.Apart{}, []finding.Change{}, map[finding.ChangeKind]int{}
	return c
}

func written(t *testing.T, c *finding.Comparison, name string, style text.Format) string {
	t.Helper()
	var b bytes.Buffer
	require.NoError(t, Write(&b, c, name, style))
	return b.String()
}

// style is the look of the page, which is that of the reports.
var style = regexp.MustCompile(`(?s)<style>.*</style>`)

func TestGolden(t *testing.T) {
	for name, c := range map[string]*finding.Comparison{"sample": sample(), "empty": empty()} {
		for _, form := range Names {
			path := filepath.Join("testdata", name+"."+form)
			got := style.ReplaceAllString(written(t, c, form, text.Format{}), "<style></style>")
			if *update {
				require.NoError(t, os.MkdirAll("testdata", 0o755))
				require.NoError(t, os.WriteFile(path, []byte(got), 0o644))
			}
			want, err := os.ReadFile(path)
			require.NoError(t, err)
			if got != string(want) {
				t.Errorf("%s differs; look at it and run go test ./internal/report/change -update\n%s", path, got)
			}
		}
	}
	require.Error(t, Write(&bytes.Buffer{}, sample(), "pdf", text.Format{}))
}

func TestJSONFitsItsSchema(t *testing.T) {
	for _, c := range []*finding.Comparison{sample(), empty()} {
		var value any
		require.NoError(t, json.Unmarshal([]byte(written(t, c, "json", text.Format{})), &value))
		problems := schema.Validate("comparison", value, func(p string) diag.Position { return diag.Position{File: p} })
		require.Empty(t, problems)
	}
}

func TestTextIsSafeAndFits(t *testing.T) {
	for _, width := range []int{40, 80, 200} {
		for line := range strings.SplitSeq(written(t, sample(), "text", text.Format{Width: width}), "\n") {
			assert.LessOrEqual(t, len([]rune(line)), width, line)
			assert.False(t, strings.ContainsFunc(line, unicode.IsControl), "%q", line)
		}
	}
	plain, coloured := written(t, sample(), "text", text.Format{}), written(t, sample(), "text", text.Format{Colour: true})
	assert.NotEqual(t, plain, coloured)
	assert.Equal(t, plain, regexp.MustCompile(`\x1b\[[0-9;]*m`).ReplaceAllString(coloured, ""), "colour only repeats what the words say")
}

// TestPageAsksNothingOfANetwork and holds no script, whatever stands in the reports.
func TestPageAsksNothingOfANetwork(t *testing.T) {
	page := written(t, sample(), "html", text.Format{})
	assert.NotRegexp(t, `https?://|//[a-z]|url\(|@import|<script|<iframe|<img`, page)
	assert.Contains(t, page, "Harrow &amp; Slate &lt;script&gt;")
	for _, k := range finding.ChangeKinds {
		assert.Contains(t, page, `<section id="`+string(k)+`"`)
	}
	for _, m := range regexp.MustCompile(`href="#([^"]+)"`).FindAllStringSubmatch(page, -1) {
		assert.Contains(t, page, `id="`+m[1]+`"`)
	}
}
