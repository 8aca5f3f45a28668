package junit

import (
	"bytes"
	"encoding/xml"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

// counts are the attributes in which a reader of such files looks for numbers.
type counts struct {
	Tests    int `xml:"tests,attr"`
	Failures int `xml:"failures,attr"`
	Errors   int `xml:"errors,attr"`
	Skipped  int `xml:"skipped,attr"`
}

type parsed struct {
	XMLName xml.Name `xml:"testsuites"`
	counts
	Suites []struct {
		counts
		Name  string `xml:"name,attr"`
		Cases []struct {
			Class   string    `xml:"classname,attr"`
			Name    string    `xml:"name,attr"`
			Failure *struct{} `xml:"failure"`
			Error   *struct{} `xml:"error"`
			Skipped *struct{} `xml:"skipped"`
		} `xml:"testcase"`
	} `xml:"testsuite"`
}

func read(t *testing.T, r *finding.Report) parsed {
	t.Helper()
	var p parsed
	require.NoError(t, xml.Unmarshal(reporttest.Written(t, Format{}, r), &p))
	return p
}

func TestCountsAgreeWithTheCases(t *testing.T) {
	for name, r := range map[string]*finding.Report{"odd": reporttest.Odd(), "empty": reporttest.Empty(), "demo": reporttest.Demo(t, true)} {
		p := read(t, r)
		var all counts
		named := map[string]bool{}
		for _, s := range p.Suites {
			var got counts
			for _, c := range s.Cases {
				got.Tests++
				got.Failures += given(c.Failure)
				got.Errors += given(c.Error)
				got.Skipped += given(c.Skipped)
				assert.LessOrEqual(t, given(c.Failure)+given(c.Error)+given(c.Skipped), 1)
				id := c.Class + "\x00" + c.Name
				assert.False(t, named[id], "two cases are named %q", id)
				named[id] = true
			}
			assert.Equal(t, got, s.counts, "%s, %s", name, s.Name)
			all = counts{all.Tests + got.Tests, all.Failures + got.Failures, all.Errors + got.Errors, all.Skipped + got.Skipped}
		}
		all.Skipped = 0
		assert.Equal(t, all, p.counts, name)
		assert.Equal(t, len(r.Findings)+len(r.Inputs), all.Tests, name)
	}
}

func given(s *struct{}) int {
	if s == nil {
		return 0
	}
	return 1
}

// What fails in a pipeline is what gives exit code 1 where --fail-on is left out: gap and unproven, unless
// accepted.
func TestFailsAsTheCommandDoes(t *testing.T) {
	r := reporttest.Demo(t, false)
	p := read(t, r)
	assert.Equal(t, r.Totals[finding.Gap], p.Failures)
	assert.Equal(t, r.Totals[finding.Unproven], p.Errors)
	skipped := 0
	for _, s := range p.Suites {
		skipped += s.Skipped
	}
	assert.Equal(t, r.Totals[finding.Opinion]+r.Totals[finding.Due], skipped)

	odd := read(t, reporttest.Odd())
	assert.Equal(t, counts{15, 2, 1, 0}, odd.counts, "two gaps count, and one that is unproven")
	assert.Equal(t, counts{10, 2, 0, 5}, odd.Suites[1].counts, "skipped are an accepted gap, an opinion and three that are due")
	assert.Equal(t, counts{1, 0, 1, 0}, odd.Suites[2].counts)
}

func TestNothingUnfulfilledPasses(t *testing.T) {
	for _, status := range finding.Statuses {
		for _, accepted := range []*finding.Acceptance{nil, {Reason: "a reason"}} {
			v := verdictOf(&finding.Finding{Status: status, Accepted: accepted})
			fulfilled := status == finding.Late || status == finding.Lifted || status == finding.Met
			assert.Equal(t, fulfilled && accepted == nil, v == passed, "%s", status)
		}
	}
	assert.NotEqual(t, passed, verdictOf(&finding.Finding{Status: "of the future"}))
}

// allowed are the attributes and children of each element that the schema junit-10.xsd knows, which strict
// readers apply: https://github.com/jenkinsci/xunit-plugin, src/main/resources/org/jenkinsci/plugins/xunit/types/model/xsd.
var allowed = map[string]struct{ attrs, children string }{
	"testsuites": {"name time tests failures errors", "testsuite"},
	"testsuite":  {"name tests failures errors group time skipped timestamp hostname id package file log url", "testsuite properties testcase system-out system-err"},
	"properties": {"", "property"},
	"property":   {"name value", ""},
	"testcase":   {"name time classname group", "skipped error failure system-out system-err"},
	"skipped":    {"type message", ""},
	"error":      {"type message", ""},
	"failure":    {"type message", ""},
	"system-out": {"", ""},
}

func TestFitsTheStrictestSchema(t *testing.T) {
	d := xml.NewDecoder(bytes.NewReader(reporttest.Written(t, Format{}, reporttest.Odd())))
	var inside []string
	for {
		token, err := d.Token()
		if err == io.EOF {
			break
		}
		require.NoError(t, err)
		switch e := token.(type) {
		case xml.StartElement:
			rule, known := allowed[e.Name.Local]
			require.True(t, known, e.Name.Local)
			if n := len(inside); n > 0 {
				assert.Contains(t, strings.Fields(allowed[inside[n-1]].children), e.Name.Local)
			}
			for _, a := range e.Attr {
				assert.Contains(t, strings.Fields(rule.attrs), a.Name.Local, e.Name.Local)
			}
			inside = append(inside, e.Name.Local)
		case xml.EndElement:
			inside = inside[:len(inside)-1]
		}
	}
}

// XML 1.0 allows tab, line feed and carriage return and no other control character.
func TestIsXMLWithoutControlCharacters(t *testing.T) {
	text := reporttest.Written(t, Format{}, reporttest.Odd())
	for _, c := range string(text) {
		if c < ' ' && c != '\n' || c == '\x7f' || c == '\u202E' {
			t.Fatalf("control character %q", c)
		}
	}
	d := xml.NewDecoder(bytes.NewReader(text))
	for {
		token, err := d.Token()
		if err == io.EOF {
			return
		}
		require.NoError(t, err)
		if c, ok := token.(xml.CharData); ok {
			assert.False(t, strings.ContainsAny(string(c), "\x00\x1b"))
		}
	}
}

func TestSuitesTellOfWhatIsNotListed(t *testing.T) {
	text := string(reporttest.Written(t, Format{}, reporttest.Odd()))
	assert.Contains(t, text, `<property name="audiometry met" value="300"></property>`)
	assert.Contains(t, text, `<testsuite name="larch-street / us-osha-general-industry" tests="0"`)
	assert.Contains(t, text, `<property name="caution" value="A bundle is a reading of the law.`)
}
