// Package bundletest holds a small bundle for tests.
package bundletest

import (
	"strings"
	"testing/fstest"
)

// Small is a bundle with one duty about sites. Its facts are invented; a test spoils or replaces one place of it.
func Small() fstest.MapFS {
	files := map[string]string{
		"small/.manifest":            `{"revision": "1", "roots": ["about", "parameters", "choices", "paragraphs", "measures", "duty"]}`,
		"small/about/data.yaml":      "id: small\ntitle: Small\nauthority: nobody\ncountry: XX\nkind: company\ninstruments: [{name: Note, cite: N}]\nin_force: \"2000-01-01\"\nchecked_on: \"2026-01-01\"\ncautions: [made up]\n",
		"small/parameters/data.yaml": "posting_time: {about: time to post, values: [{from: \"2000-01-01\", value: {days: 30}, cite: N 1, seen: text}]}\ndose: {about: dose, unit: \"%\", values: [{from: \"2000-01-01\", value: 50, cite: N 2, seen: text}]}\nshift: {about: shift, unit: dB, values: [{from: \"2000-01-01\", value: 10, cite: N 3, seen: text}]}\n",
		"small/choices/data.yaml":    "{}\n",
		"small/paragraphs/data.yaml": "\"N 1\": {says: post it, checked: [posting]}\n",
		"small/measures/data.yaml":   "exposure: {channels: {action: {criterion_db: 90, exchange_db: 5, threshold_db: 80, cite: N 2}}, levels: {action: {channel: action, at_least: dose}}, enrols: action, several: highest}\nhearing: {required: [2000], shift: {rule: mean, frequencies: [2000], at_least: shift, retest: posting_time}, professionals: [], physicians: [], licensed: []}\nprotection: {rating: nrr, channel: action}\ntraining: {topics_over: {months: 12}}\n",
		"small/duty/posting/posting.rego": `# METADATA
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

obligations contains {"holds": input.enrolled_now == 0}

not_owed contains "never" if false
`,
		"common/.manifest": `{"revision": "1", "roots": ["common"]}`,
	}
	out := fstest.MapFS{}
	for p, text := range files {
		out[p] = &fstest.MapFile{Data: []byte(text)}
	}
	return out
}

// Change puts a new text in the place of an old one in a file of the bundle. It panics if the old text is not there.
func Change(fsys fstest.MapFS, file, old, new string) fstest.MapFS {
	text := string(fsys[file].Data)
	if !strings.Contains(text, old) {
		panic("the file " + file + " has no " + old)
	}
	fsys[file] = &fstest.MapFile{Data: []byte(strings.Replace(text, old, new, 1))}
	return fsys
}
