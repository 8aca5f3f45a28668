package rulebook_test

import (
	"testing"
	"testing/fstest"

	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
)

var day = calendar.MustParse

// small loads the small bundle of bundletest with more to tell: a value that changes twice, one from memory, a choice, and
// paragraphs of every kind. All of it is invented.
func small(t *testing.T, change ...func(fstest.MapFS)) *bundle.Bundle {
	t.Helper()
	files := bundletest.Small()
	put := func(name, text string) { files["small/"+name] = &fstest.MapFile{Data: []byte(text)} }
	put("about/data.yaml", `id: small
title: Small rule of the Harrow office
authority: Harrow & Slate, works council
country: XX
region: N
kind: practice
instruments: [{name: Note on *noise*, cite: N}]
in_force: "2000-01-01"
checked_on: "2026-01-01"
seen_note: the second edition
cautions: [made up, "numbers below 3 | 4 are from memory"]
readings:
  - {point: "Who posts?", reading: whoever comes first, source: from memory}
  - {point: Where, reading: at the door}
`)
	put("parameters/data.yaml", `posting_time:
  about: Time to post
  stricter: lower
  values:
    - {from: "2000-01-01", to: "2010-01-01", value: {months: 2}, cite: N 1, seen: text}
    - {from: "2010-01-01", value: {days: 30}, cite: "N 1 | new", seen: secondary}
    - {from: "2030-01-01", value: {working_days: 10}, cite: N 1, seen: text}
dose:
  about: Dose at which the note is posted
  unit: "%"
  values: [{from: "2000-01-01", value: 50, cite: N 2, seen: text}]
shift:
  about: Shift of hearing
  unit: dB
  values: [{from: "2000-01-01", value: 10, cite: N 3, seen: memory}]
words:
  about: What the note says
  values: [{from: "2020-01-01", value: [keep_out, "a_b_"], cite: N 4, seen: text}]
`)
	put("choices/data.yaml", `by_mail: {about: whether the note comes by mail, values: [false, true], default: false, cite: N 5}
`)
	put("paragraphs/data.yaml", `N 1: {says: post it, checked: [posting]}
N 10: {says: keep it, attested: "note_file: the file of notes"}
N 2: {says: be quiet, outside: "because <quiet> is no record"}
`)
	put("duty/posting/posting.rego", `# METADATA
# title: Posting
# description: The note is posted.
# custom:
#   cite: N 1
#   subject: site
#   topic: information
#   severity: minor
#   evidence: [document]
#   remedy: Post it.
package duty.posting

import rego.v2

obligations contains {
	"after": input.as_of,
	"within": "posting_time",
	"by": null,
} if {
	input.enrolled_now > 0
	input.choices.by_mail == false
}

obligations contains {"lifted": "the post office posts it", "cite": "N 5"} if input.choices.by_mail == true

obligations contains {"ask": "Is the note true?", "of": "works council"} if count(words) > 99

words := [w | some period in data.parameters.words.values; some w in period.value]

not_owed contains "nobody is in the program" if input.enrolled_now == 0

not_owed contains sprintf("there are %d in it", [input.enrolled_now]) if input.enrolled_now > 99999
`)
	for _, c := range change {
		c(files)
	}
	b, problems := bundle.Load(files, "small")
	require.NoError(t, problems.Err())
	return b
}
