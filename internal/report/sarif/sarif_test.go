package sarif

import (
	"bytes"
	"encoding/json"
	"net/url"
	"os"
	"strings"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

// official compiles the schema of the standard; testdata/SOURCES.md says where it comes from.
func official(t *testing.T) *jsonschema.Schema {
	t.Helper()
	text, err := os.ReadFile("testdata/sarif-schema-2.1.0.json")
	require.NoError(t, err)
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(text))
	require.NoError(t, err)
	c := jsonschema.NewCompiler()
	c.AssertFormat()
	require.NoError(t, c.AddResource("sarif.json", doc))
	s, err := c.Compile("sarif.json")
	require.NoError(t, err)
	return s
}

func reports(t *testing.T) map[string]*finding.Report {
	return map[string]*finding.Report{
		"odd": reporttest.Odd(), "empty": reporttest.Empty(), "health": reporttest.WithHealth(), "demo": reporttest.Demo(t, true),
	}
}

func TestFitsTheOfficialSchema(t *testing.T) {
	s := official(t)
	for name, r := range reports(t) {
		value, err := jsonschema.UnmarshalJSON(bytes.NewReader(reporttest.Written(t, Format{}, r)))
		require.NoError(t, err, name)
		assert.NoError(t, s.Validate(value), name)
	}
}

// The schema is of use only if it refuses what is wrong.
func TestOfficialSchemaRefuses(t *testing.T) {
	s := official(t)
	text := string(reporttest.Written(t, Format{}, reporttest.Odd()))
	for from, to := range map[string]string{
		`"kind": "open"`: `"kind": "unproven"`, `"level": "error"`: `"level": "bad"`, `"ruleId"`: `"ruleID"`,
		`"startLine": 118`: `"startLine": 0`, `"uri": "records/`: `"uri": "%zz/`, `"columnKind": "unicodeCodePoints"`: `"columnKind": "bytes"`,
	} {
		broken := strings.Replace(text, from, to, 1)
		require.NotEqual(t, text, broken, from)
		value, err := jsonschema.UnmarshalJSON(strings.NewReader(broken))
		require.NoError(t, err)
		assert.Error(t, s.Validate(value), to)
	}
}

// read reads a written log back.
func read(t *testing.T, r *finding.Report) run {
	t.Helper()
	var l log
	require.NoError(t, json.Unmarshal(reporttest.Written(t, Format{}, r), &l))
	require.Len(t, l.Runs, 1)
	return l.Runs[0]
}

func TestRulesOfTheStandardThatItsSchemaDoesNotHold(t *testing.T) {
	for name, r := range reports(t) {
		got := read(t, r)
		require.Len(t, got.Results, len(r.Findings), name)
		seen := map[string]bool{}
		for i, res := range got.Results {
			f := &r.Findings[i]
			assert.Equal(t, res.RuleID, got.Tool.Driver.Rules[res.RuleIndex].ID)
			assert.Equal(t, res.Kind != "fail", res.Level == "none", "level of a %s", f.Status)
			assert.Equal(t, f.ID, res.PartialFingerprints["findingId/v1"])
			assert.False(t, seen[f.ID], "fingerprint twice")
			seen[f.ID] = true
			require.Len(t, res.Locations, 1)
			for n, at := range append(res.Locations, res.RelatedLocations...) {
				if n > 0 {
					require.NotNil(t, at.ID)
					assert.Equal(t, n, *at.ID)
				}
				if p := at.PhysicalLocation; p != nil {
					checkAddress(t, p.ArtifactLocation, got)
				}
			}
			assert.True(t, strings.HasSuffix(res.Message.Text, ".") || strings.HasSuffix(res.Message.Text, "?"), res.Message.Text)
		}
		for _, n := range got.Invocations[0].ToolExecutionNotifications {
			assert.Equal(t, n.Descriptor.ID, got.Tool.Driver.Notifications[n.Descriptor.Index].ID)
		}
	}
}

func checkAddress(t *testing.T, l artifactLocation, in run) {
	t.Helper()
	u, err := url.Parse(l.URI)
	require.NoError(t, err)
	assert.Empty(t, u.RawQuery+u.Fragment, l.URI)
	if !u.IsAbs() {
		assert.Contains(t, in.OriginalURIBaseIDs, l.URIBaseID)
	}
	if l.Index != nil {
		assert.Equal(t, l.URI, in.Artifacts[*l.Index].Location.URI)
	}
}

func TestStatusesInTheWordsOfTheStandard(t *testing.T) {
	got := map[string]bool{}
	for i, res := range read(t, reporttest.Odd()).Results {
		f := &reporttest.Odd().Findings[i]
		got[string(f.Status)+" "+f.Severity+" "+res.Kind+" "+res.Level] = true
	}
	for _, want := range []string{"gap major fail error", "gap minor fail warning", "unproven major open none", "opinion major review none",
		"due major informational none", "late major fail note", "lifted major notApplicable none", "met minor pass none"} {
		assert.True(t, got[want], want)
	}
}

func TestAcceptedIsSuppressedAndStillAGap(t *testing.T) {
	results := read(t, reporttest.Odd()).Results
	for i, f := range reporttest.Odd().Findings {
		require.NotNil(t, results[i].Suppressions, "one result with suppressions asks for them at all")
		assert.Equal(t, f.Accepted != nil, len(*results[i].Suppressions) == 1)
	}
	s := (*results[1].Suppressions)[0]
	assert.Equal(t, "fail", results[1].Kind)
	assert.Equal(t, []string{"external", "accepted"}, []string{s.Kind, s.Status})
	assert.Equal(t, "accepted%20gaps.yaml", s.Location.PhysicalLocation.ArtifactLocation.URI)
	assert.Equal(t, 4, s.Location.PhysicalLocation.Region.StartLine)

	r := reporttest.Odd()
	for i := range r.Findings {
		r.Findings[i].Accepted = nil
	}
	for _, res := range read(t, r).Results {
		assert.Nil(t, res.Suppressions)
	}
}

func TestPlaces(t *testing.T) {
	results := read(t, reporttest.Odd()).Results
	where := results[1].Locations[0].PhysicalLocation
	assert.Equal(t, "exports/Pr%C3%BCfungen%20%232,%20100%25%3F.csv", where.ArtifactLocation.URI)
	assert.Equal(t, 544, where.Region.StartLine)

	book := results[2].Locations[0]
	assert.Nil(t, book.PhysicalLocation.Region, "a workbook has no lines")
	assert.Equal(t, logicalLocation{"Year 2026!7", "Year 2026!7", "row"}, book.LogicalLocations[0])
	assert.Equal(t, "kiln-hill/worker/000123", book.LogicalLocations[1].FullyQualifiedName)

	list := results[2].RelatedLocations[0]
	assert.Nil(t, list.PhysicalLocation.Region, "a list has places, not lines")
	assert.Equal(t, "/2", list.LogicalLocations[0].FullyQualifiedName)

	assert.Nil(t, results[3].Locations[0].PhysicalLocation, "without a record there is only the subject")
	assert.Len(t, results[3].Locations[0].LogicalLocations, 1)
}

func TestFingerprintDoesNotFollowTheLine(t *testing.T) {
	r := reporttest.Odd()
	before := read(t, r).Results[0]
	r.Findings[0].Evidence[0].Row++
	after := read(t, r).Results[0]
	assert.NotEqual(t, before.Locations, after.Locations)
	assert.Equal(t, before.PartialFingerprints, after.PartialFingerprints)
}

func TestAddresses(t *testing.T) {
	for file, want := range map[string]artifactLocation{
		"a/b c.csv":       {URI: "a/b%20c.csv", URIBaseID: base},
		`a\b.csv`:         {URI: "a/b.csv", URIBaseID: base},
		"12:30.csv":       {URI: "./12:30.csv", URIBaseID: base},
		"../x.csv":        {URI: "../x.csv", URIBaseID: base},
		"/data/x y.csv":   {URI: "file:///data/x%20y.csv"},
		`C:\data\x.csv`:   {URI: "file:///C:/data/x.csv"},
		"a\n\x00\xff.csv": {URI: "a%0A%00%FF.csv", URIBaseID: base},
	} {
		assert.Equal(t, want, fileLocation(file), file)
	}
}

func TestMessagesHoldNoPlaceholderAndNoLink(t *testing.T) {
	text := read(t, reporttest.Odd()).Results[3].Message.Text
	assert.Contains(t, text, "{{0}}")
	assert.NotContains(t, text, "](")
	for _, r := range text {
		assert.False(t, r < ' ', "control character in %q", text)
	}
}

func TestHealthOnlyIfTheReportHasIt(t *testing.T) {
	assert.NotContains(t, string(reporttest.Written(t, Format{}, reporttest.Odd())), "left_db")
	assert.Contains(t, string(reporttest.Written(t, Format{}, reporttest.WithHealth())), "left_db")
}

func TestRejectedRowsAreNotifications(t *testing.T) {
	var got []string
	for _, n := range read(t, reporttest.Odd()).Invocations[0].ToolExecutionNotifications {
		got = append(got, n.Descriptor.ID+" "+n.Level)
	}
	assert.Equal(t, []string{"rejected-row warning", "rejected-row warning", "refused-file error", "remark note", "caution note", "caution note"}, got)
}
