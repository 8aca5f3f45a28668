package bundle

import (
	"strings"
	"testing"
	"testing/fstest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
)

// extended is the small bundle of bundletest with one that extends it.
func extended(about, parameters, paragraphs string) fstest.MapFS {
	fsys := bundletest.Small()
	put := func(file, text string) { fsys[file] = &fstest.MapFile{Data: []byte(text)} }
	put("over/.manifest", `{"revision": "7", "roots": ["about", "parameters"]}`)
	put("over/about/data.yaml", "id: over\ntitle: Over\nauthority: nobody\ncountry: XX\nkind: company\nextends: [small]\ninstruments: [{name: Rule, cite: R}]\nin_force: \"2000-01-01\"\nchecked_on: \"2026-01-01\"\ncautions: [made up]\n"+about)
	if parameters != "" {
		put("over/parameters/data.yaml", parameters)
	}
	if paragraphs != "" {
		put("over/paragraphs/data.yaml", paragraphs)
	}
	return fsys
}

func TestLayersTakeWhatTheyDoNotSay(t *testing.T) {
	fsys := extended("", "posting_time: {about: sooner, values: [{from: \"2010-01-01\", value: {days: 10}, cite: R 1, seen: text}]}\n", "")
	b, problems := Load(fsys, "over")
	require.False(t, problems.Failed(), problems)
	assert.Equal(t, "over", b.ID)
	assert.Equal(t, "7", b.Revision)
	assert.Equal(t, []string{"small"}, b.Extends)
	d, ok := b.Duty("posting")
	require.True(t, ok, "the duty is inherited")
	assert.Equal(t, "small", d.From)
	v, ok := b.Parameters["posting_time"].At(calendar.MustParse("2020-01-01"))
	require.True(t, ok)
	interval, _ := v.Interval()
	assert.Equal(t, 10, interval.Count, "its own value replaces the other")
	_, ok = b.Parameters["posting_time"].At(calendar.MustParse("2005-01-01"))
	assert.False(t, ok, "a parameter is replaced as a whole, with the days on which it holds")
	assert.Contains(t, b.Parameters, "dose")
	assert.Contains(t, b.Paragraphs, "N 1")
	assert.Equal(t, "action", b.Measures.Exposure.Enrols)
	assert.Equal(t, []Instrument{{Name: "Rule", Cite: "R"}, {Name: "Note", Cite: "N"}}, b.About.Instruments, "what must be known of the extended bundle is known here")

	plain, problems := Load(fsys, "small")
	require.Empty(t, problems)
	before := b.SHA256
	bundletest.Change(fsys, "small/duty/posting/posting.rego", "The note is posted.", "The note is posted now.")
	b, problems = Load(fsys, "over")
	require.False(t, problems.Failed())
	assert.NotEqual(t, before, b.SHA256, "the digest covers what is extended")
	assert.NotEqual(t, plain.SHA256, b.SHA256)
}

func TestLayersReplaceADutyAndMeasures(t *testing.T) {
	fsys := extended("", "", "\"R 1\": {says: post it well, checked: [posting]}\n")
	own := strings.NewReplacer("Posting", "Posting with care", "cite: N 1", "cite: R 1").Replace(string(fsys["small/duty/posting/posting.rego"].Data))
	fsys["over/duty/posting/posting.rego"] = &fstest.MapFile{Data: []byte(own)}
	fsys["over/measures/data.yaml"] = &fstest.MapFile{Data: []byte("exposure: {several: highest}\nhearing: {required: [2000, 4000]}\n")}
	b, problems := Load(fsys, "over")
	require.False(t, problems.Failed(), problems)
	d, _ := b.Duty("posting")
	assert.Equal(t, "Posting with care", d.Title)
	assert.Equal(t, "over", d.From)
	require.Len(t, b.Duties, 1)
	assert.Equal(t, []int{2000, 4000}, b.Measures.Hearing.Required)
	assert.Equal(t, []int{2000}, b.Measures.Hearing.Shift.Frequencies, "what is not said stays")
}

func TestLayersDrop(t *testing.T) {
	b, problems := Load(extended("drops: [posting]\n", "", ""), "over")
	require.Nil(t, b, "a bundle without a duty is none")
	assert.Contains(t, problems.Error(), "the bundle has no duties")

	fsys := extended("drops: [posting]\n", "", "\"R 1\": {says: show it, checked: [showing]}\n")
	text := strings.NewReplacer("duty.posting", "duty.showing", "cite: N 1", "cite: R 1").Replace(string(fsys["small/duty/posting/posting.rego"].Data))
	fsys["over/duty/showing/showing.rego"] = &fstest.MapFile{Data: []byte(text)}
	b, problems = Load(fsys, "over")
	require.False(t, problems.Failed(), problems)
	require.Len(t, b.Duties, 1)
	assert.Equal(t, "showing", b.Duties[0].ID)
	assert.Equal(t, "dropped by over", b.Paragraphs["N 1"].Outside)
}

func TestLayersAreRefusedWithTheirPlace(t *testing.T) {
	for name, c := range map[string]struct {
		about string
		want  string
	}{
		"drops nothing":      {"drops: [postign]\n", `over/about/data.yaml:11:9: the bundle drops "postign", which it does not inherit. Did you mean "posting"?`},
		"unknown base":       {"", `over/about/data.yaml:6:11: the bundle extends "smal", which does not exist. Did you mean "small"?`},
		"circle":             {"", `small/about/data.yaml:10:11: the bundles extend each other in a circle: over, small, over.`},
		"drops with no base": {"", `small/about/data.yaml:10:9: the bundle drops "posting" but extends nothing`},
	} {
		t.Run(name, func(t *testing.T) {
			fsys := extended(c.about, "", "")
			switch name {
			case "unknown base":
				bundletest.Change(fsys, "over/about/data.yaml", "[small]", "[smal]")
			case "circle":
				bundletest.Change(fsys, "small/about/data.yaml", "cautions: [made up]\n", "cautions: [made up]\nextends: [over]\n")
			case "drops with no base":
				bundletest.Change(fsys, "small/about/data.yaml", "cautions: [made up]\n", "cautions: [made up]\ndrops: [posting]\n")
			}
			b, problems := Load(fsys, "over")
			assert.Nil(t, b)
			assert.Contains(t, problems.Error(), c.want)
		})
	}
}

func TestLayersSideBySideMustAgree(t *testing.T) {
	fsys := extended("", "", "")
	for _, file := range []string{".manifest", "about/data.yaml", "parameters/data.yaml", "choices/data.yaml", "paragraphs/data.yaml", "measures/data.yaml"} {
		text := strings.Replace(string(fsys["small/"+file].Data), "id: small", "id: other", 1)
		fsys["other/"+file] = &fstest.MapFile{Data: []byte(text)}
	}
	fsys["other/duty/hanging/hanging.rego"] = &fstest.MapFile{Data: []byte(strings.ReplaceAll(string(fsys["small/duty/posting/posting.rego"].Data), "duty.posting", "duty.hanging"))}
	bundletest.Change(fsys, "other/paragraphs/data.yaml", "[posting]", "[hanging]")
	bundletest.Change(fsys, "over/about/data.yaml", "[small]", "[small, other]")
	_, problems := Load(fsys, "over")
	assert.Contains(t, problems.Error(), "over/about/data.yaml:6:18: the parameter dose stands in small and in other, and they cannot both hold. Give the bundle its own, or drop it.")
}

func TestLooserParametersAreToldWithTheirPlace(t *testing.T) {
	const own = "posting_time: {about: time, values: [{from: \"2000-01-01\", value: {days: %s}, cite: R 1, seen: text}]}\n"
	load := func(stricter, days string) string {
		fsys := extended("", strings.Replace(own, "%s", days, 1), "")
		if stricter != "" {
			bundletest.Change(fsys, "small/parameters/data.yaml", "{about: time to post,", "{about: time to post, stricter: "+stricter+",")
		}
		b, problems := Load(fsys, "over")
		require.NotNil(t, b, problems)
		return problems.Error()
	}
	assert.Empty(t, load("lower", "29"))
	assert.Empty(t, load("lower", "30"), "the same is not looser")
	assert.Contains(t, load("lower", "31"), "over/parameters/data.yaml:1:1: posting_time asks for less than the bundle that is extended")
	assert.Contains(t, load("higher", "29"), "asks for less")
	assert.Empty(t, load("higher", "31"))
	assert.Contains(t, load("", "31"), "cannot be told")
}
