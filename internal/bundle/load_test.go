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
		"a module without rego.v2":          {rule, "import rego.v2\n", "", "does not import rego.v2"},
		"a misspelt fact":                   {rule, "input.enrolled_now", "input.enroled_now", "undefined ref: input.enroled_now"},
		"an unknown parameter":              {rule, obligation, `{"by": null, "after": input.as_of, "within": "posting_tim"}`, `no parameter "posting_tim". Did you mean "posting_time"?`},
		"a parameter of the wrong kind":     {rule, obligation, `{"value": input.workers, "at_most": "posting_time"}`, "does not fit at_most"},
		"an unknown series":                 {rule, obligation, `{"by": "document.any", "after": input.as_of}`, `no series of records "document.any"`},
		"a missing set":                     {rule, "not_owed contains \"never\" if false\n", "", "has no set not_owed"},
		"a duty without citation":           {rule, "#   cite: N 1\n", "", "has no cite"},
		"a duty without remedy":             {rule, "#   remedy: Post it.\n", "", "has no remedy"},
		"an unknown topic":                  {rule, "topic: information", "topic: posters", `the topic "posters"`},
		"another package":                   {rule, "package duty.posting", "package duty.other", "the folder is posting"},
		"a network call":                    {rule, obligation, `{"holds": http.send({"method": "get", "url": "http://localhost"}).status_code == 1}`, "undefined function http.send"},
		"a clock":                           {rule, obligation, `{"holds": time.now_ns() == 0}`, "undefined function time.now_ns"},
		"the environment":                   {rule, obligation, `{"holds": opa.runtime() == {}}`, "undefined function opa.runtime"},
		"chance":                            {rule, obligation, `{"holds": rand.intn("x", 2) == 0}`, "undefined function rand.intn"},
		"an unused variable":                {rule, obligation, "{\"holds\": true} if x := 1", "assigned var x unused"},
		"a syntax error":                    {rule, "obligations contains", "obligations contain", "posting.rego:1"},
		"a paragraph without account":       {"small/paragraphs/data.yaml", ", checked: [posting]", "", "is not accounted for"},
		"a paragraph with an unknown duty":  {"small/paragraphs/data.yaml", "[posting]", "[posting, poster]", `checked by "poster"`},
		"a level with an unknown parameter": {"small/measures/data.yaml", "at_least: dose", "at_least: doze", `names the parameter "doze"`},
		"two values on one day":             {"small/parameters/data.yaml", "cite: N 2, seen: text}", "cite: N 2, seen: text}, {from: \"2000-01-01\", value: 60, cite: N 2, seen: text}", "two values on 2000-01-01"},
		"a value without citation":          {"small/parameters/data.yaml", "cite: N 1, ", "", "cite"},
		"an unknown mark":                   {"small/parameters/data.yaml", "cite: N 1, seen: text", "cite: N 1, seen: rumour", "seen"},
		"an impossible date":                {"small/parameters/data.yaml", "2000-01-01", "2000-02-30", "2000-02-30"},
		"a key twice":                       {"small/about/data.yaml", "title: Small", "title: Small\ntitle: Small", "title"},
		"another id":                        {"small/about/data.yaml", "id: small", "id: tiny", `lies in the folder "small"`},
		"no revision":                       {"small/.manifest", `"revision": "1", `, "", "no revision"},
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
