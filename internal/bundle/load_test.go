package bundle

import (
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle/bundletest"
)

func TestSmallBundleLoads(t *testing.T) {
	b, problems := Load(bundletest.Small(), "small")
	require.NoError(t, problems.Err())
	require.Len(t, b.Duties, 1)
	assert.Equal(t, "posting", b.Duties[0].ID)
}

func TestLoaderRefuses(t *testing.T) {
	const rule = "small/duty/posting/posting.rego"
	obligation := `{"holds": input.enrolled_now == 0}`
	for name, c := range map[string]struct {
		file, old, new string
		says           string
	}{
		"a module without rego.v2":                 {rule, "import rego.v2\n", "", "does not import rego.v2"},
		"a misspelt fact":                          {rule, "input.enrolled_now", "input.enroled_now", "undefined ref: input.enroled_now"},
		"an unknown parameter":                     {rule, obligation, `{"by": null, "after": input.as_of, "within": "posting_tim"}`, `no parameter "posting_tim". Did you mean "posting_time"?`},
		"a parameter of the wrong kind":            {rule, obligation, `{"value": input.workers, "at_most": "posting_time"}`, "does not fit at_most"},
		"an unknown series":                        {rule, obligation, `{"by": "document.any", "after": input.as_of}`, `no series of records "document.any"`},
		"a missing set":                            {rule, "not_owed contains \"never\" if false\n", "", "has no set not_owed"},
		"a duty without citation":                  {rule, "#   cite: N 1\n", "", "has no cite"},
		"a duty without remedy":                    {rule, "#   remedy: Post it.\n", "", "has no remedy"},
		"an unknown topic":                         {rule, "topic: information", "topic: posters", `the topic "posters"`},
		"another package":                          {rule, "package duty.posting", "package duty.other", "the folder is posting"},
		"a network call":                           {rule, obligation, `{"holds": http.send({"method": "get", "url": "http://localhost"}).status_code == 1}`, "undefined function http.send"},
		"a clock":                                  {rule, obligation, `{"holds": time.now_ns() == 0}`, "undefined function time.now_ns"},
		"the environment":                          {rule, obligation, `{"holds": opa.runtime() == {}}`, "undefined function opa.runtime"},
		"chance":                                   {rule, obligation, `{"holds": rand.intn("x", 2) == 0}`, "undefined function rand.intn"},
		"an unused variable":                       {rule, obligation, "{\"holds\": true} if x := 1", "assigned var x unused"},
		"unconfirmed shifts that no duty reads":    {"small/measures/data.yaml", "shift: {rule: mean,", "shift: {confirm: true, rule: mean,", "no duty looks at shifts that wait for one"},
		"a syntax error":                           {rule, "obligations contains", "obligations contain", "posting.rego:1"},
		"a paragraph without account":              {"small/paragraphs/data.yaml", ", checked: [posting]", "", "is not accounted for"},
		"a paragraph with an unknown duty":         {"small/paragraphs/data.yaml", "[posting]", "[posting, poster]", `checked by "poster"`},
		"a level with an unknown parameter":        {"small/measures/data.yaml", "at_least: dose", "at_least: doze", `names the parameter "doze"`},
		"samples without a strategy":               {"small/measures/data.yaml", "several: highest", "several: sampled", "names no strategy"},
		"a shift without amount":                   {"small/measures/data.yaml", "at_least: shift, ", "", "hearing.shift needs either at_least or above"},
		"a shift of a level":                       {"small/measures/data.yaml", "shift: {rule", "shift: {of: level, rule", "but a shift is a change"},
		"another scheme with an unknown parameter": {"small/measures/data.yaml", "professionals: []", "others: [{name: warning, rule: any, frequencies: [2000], at_least: shifty}], professionals: []", `hearing.others.warning names the parameter "shifty"`},
		"two schemes of one name":                  {"small/measures/data.yaml", "professionals: []", "others: [{name: a, rule: any, frequencies: [2000], above: shift}, {name: a, of: level, rule: any, frequencies: [2000], above: shift}], professionals: []", "has the name a twice"},
		"a scheme without name":                    {"small/measures/data.yaml", "professionals: []", "others: [{rule: any, frequencies: [2000], at_least: shift}], professionals: []", "scheme 1 of hearing.others has no name"},
		"a scheme that cannot be judged":           {"small/measures/data.yaml", "professionals: []", "others: [{name: a, rule: adjacent, frequencies: [2000], at_least: shift}], professionals: []", "two neighbours but has one frequency"},
		"ears confirmed by another test":           {"small/measures/data.yaml", "professionals: []", "others: [{name: a, of: ears, confirm: true, rule: any, frequencies: [2000], at_least: shift}], professionals: []", "cannot be confirmed"},
		"two values on one day":                    {"small/parameters/data.yaml", "cite: N 2, seen: text}", "cite: N 2, seen: text}, {from: \"2000-01-01\", value: 60, cite: N 2, seen: text}", "two values on 2000-01-01"},
		"a value without citation":                 {"small/parameters/data.yaml", "cite: N 1, ", "", "cite"},
		"an unknown mark":                          {"small/parameters/data.yaml", "cite: N 1, seen: text", "cite: N 1, seen: rumour", "seen"},
		"an impossible date":                       {"small/parameters/data.yaml", "2000-01-01", "2000-02-30", "2000-02-30"},
		"a key twice":                              {"small/about/data.yaml", "title: Small", "title: Small\ntitle: Small", "title"},
		"another id":                               {"small/about/data.yaml", "id: small", "id: tiny", `lies in the folder "small"`},
		"no revision":                              {"small/.manifest", `"revision": "1", `, "", "no revision"},
	} {
		t.Run(name, func(t *testing.T) {
			b, problems := Load(bundletest.Change(bundletest.Small(), c.file, c.old, c.new), "small")
			require.Error(t, problems.Err())
			assert.Nil(t, b)
			assert.Contains(t, problems.Error(), c.says)
			assert.Contains(t, problems.Error(), "small/", "the sentence names the file")
		})
	}
}

func TestBundleWithoutDutiesIsRefused(t *testing.T) {
	fsys := bundletest.Small()
	delete(fsys, "small/duty/posting/posting.rego")
	_, problems := Load(fsys, "small")
	require.ErrorContains(t, problems.Err(), "has no duties")
}

func TestMissingFileIsRefused(t *testing.T) {
	for _, name := range []string{"about", "parameters", "choices", "paragraphs", "measures"} {
		fsys := bundletest.Small()
		delete(fsys, "small/"+name+"/data.yaml")
		_, problems := Load(fsys, "small")
		require.ErrorContains(t, problems.Err(), "has no "+name)
	}
}

func TestDigestFollowsEveryFile(t *testing.T) {
	first, problems := Load(bundletest.Small(), "small")
	require.NoError(t, problems.Err())
	second, problems := Load(bundletest.Change(bundletest.Small(), "small/about/data.yaml", "made up", "made up again"), "small")
	require.NoError(t, problems.Err())
	assert.NotEqual(t, first.SHA256, second.SHA256)
	assert.Len(t, first.SHA256, 64)
}

// TestParagraphsOfTheSheet holds the paragraph table of general industry to the list of paragraphs of the
// instrument, kept apart from it in testdata.
func TestParagraphsOfTheSheet(t *testing.T) {
	library, err := Embedded()
	require.NoError(t, err)
	content, err := os.ReadFile("testdata/us-osha-general-industry.paragraphs.txt")
	require.NoError(t, err)
	table := library["us-osha-general-industry"].Paragraphs
	listed := map[string]bool{}
	for line := range strings.Lines(string(content)) {
		line = strings.TrimSpace(line)
		if line == "" || strings.HasPrefix(line, "#") {
			continue
		}
		listed[line] = true
		assert.Contains(t, table, line, "the paragraph is not accounted for")
	}
	for name := range table {
		assert.True(t, listed[name], "the paragraph %s is not in the list of the instrument", name)
	}
}

// TestMisspeltSchemeIsACompileError: a rule may ask for the schemes that the measures name, and for no other.
func TestMisspeltSchemeIsACompileError(t *testing.T) {
	const rule = "small/duty/posting/posting.rego"
	for name, ok := range map[string]bool{"warning": true, "warnin": false} {
		fsys := bundletest.Change(bundletest.Small(), "small/measures/data.yaml", "professionals: []", "others: [{name: warning, rule: any, frequencies: [2000], at_least: shift}], professionals: []")
		fsys = bundletest.Change(fsys, rule, "subject: site", "subject: worker")
		fsys = bundletest.Change(fsys, rule, "obligations contains {\"holds\": input.enrolled_now == 0}", "obligations contains {\"holds\": test.schemes."+name+".left} if some test in input.audiograms")
		_, problems := Load(fsys, "small")
		if ok {
			require.NoError(t, problems.Err())
		} else {
			require.ErrorContains(t, problems.Err(), "undefined ref: test.schemes.warnin")
		}
	}
}
