package rulebook_test

import (
	"testing/fstest"

	"bytes"
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/diag"
	"hearduty/internal/report/rulebook"
	"hearduty/internal/report/text"
	"hearduty/policies"
)

var update = flag.Bool("update", false, "write the golden files anew")

// embedded loads the bundles that are built in. One that is broken fails the test and does not hide the others.
func embedded(t *testing.T) bundle.Library {
	t.Helper()
	ids, err := bundle.Folders(policies.FS)
	require.NoError(t, err)
	out := bundle.Library{}
	for _, id := range ids {
		if one, err := bundle.Embedded(id); assert.NoError(t, err) {
			out[id] = one[id]
		}
	}
	return out
}

func textOf(t *testing.T, b *rulebook.Book, width int) string {
	t.Helper()
	var out bytes.Buffer
	require.NoError(t, text.Book(&out, b, text.Format{Width: width}))
	return out.String()
}

func markdownOf(t *testing.T, b *rulebook.Book) string {
	t.Helper()
	var out bytes.Buffer
	require.NoError(t, b.Markdown(&out))
	return out.String()
}

func TestBookGolden(t *testing.T) {
	b := small(t)
	b.SHA256 = "0123456789abcdef" // the digest changes with every word of the bundle
	book := rulebook.Of(b, day("2026-06-30"))
	for name, got := range map[string]string{
		"small.80.txt": textOf(t, book, 80), "small.40.txt": textOf(t, book, 40), "small.md": markdownOf(t, book),
	} {
		file := filepath.Join("testdata", name)
		if *update {
			require.NoError(t, os.MkdirAll("testdata", 0o755))
			require.NoError(t, os.WriteFile(file, []byte(got), 0o644))
		}
		want, err := os.ReadFile(file)
		require.NoError(t, err)
		assert.Equal(t, string(want), got, name)
	}
}

func TestTextFitsItsWidth(t *testing.T) {
	library := embedded(t)
	for _, id := range library.IDs() {
		for _, width := range []int{40, 80} {
			for line := range strings.Lines(textOf(t, rulebook.Of(library[id], day("2026-06-30")), width)) {
				line = strings.TrimSuffix(line, "\n")
				require.LessOrEqual(t, utf8.RuneCountInString(line), width, line)
				require.Equal(t, strings.TrimRight(line, " "), line)
			}
		}
	}
}

// TestBooksAreCurrent holds the books in the folders of the bundles to what the bundles say.
func TestBooksAreCurrent(t *testing.T) {
	library := embedded(t)
	for _, id := range library.IDs() {
		book, err := rulebook.Kept(library[id])
		require.NoError(t, err)
		kept, err := os.ReadFile(filepath.Join("../../../policies", id, rulebook.FileName))
		if err != nil || string(kept) != markdownOf(t, book) {
			t.Errorf("policies/%s/%s is stale: run go generate ./policies", id, rulebook.FileName)
		}
	}
}

// TestValueOnTheDay looks at a value on the day before a change and on the day of it.
func TestValueOnTheDay(t *testing.T) {
	b := small(t)
	for on, want := range map[string]struct{ when, inForce string }{
		"2009-12-31": {"within 2 months: time to post (posting_time)", "posting_time: 2 months"},
		"2010-01-01": {"within 30 days: time to post (posting_time; N 1 | new; read in a secondary source, not in the official text)", "posting_time: 30 days"},
		"2029-12-31": {"within 30 days: time to post (posting_time; N 1 | new; read in a secondary source, not in the official text)", "posting_time: 30 days"},
		"2030-01-01": {"within 10 working days: time to post (posting_time)", "posting_time: 10 working days"},
	} {
		printed := textOf(t, rulebook.Of(b, day(on)), 1000)
		assert.Contains(t, printed, "- "+want.when+"\n", on)
		assert.Contains(t, printed, "  "+want.inForce+"\n", on)
		assert.Contains(t, printed, "Shown as of: "+on+";")
	}
	printed := textOf(t, rulebook.Of(b, day("1999-12-31")), 1000)
	assert.Contains(t, printed, "- no value of posting_time is in force on 1999-12-31, so the duty is unproven: time to post\n")
	assert.Contains(t, printed, "  posting_time: no value is in force; what rests on it is unproven\n")
	assert.Contains(t, printed, "On other days: from 2000-01-01 to 2009-12-31: 2 months (N 1; read in the official text); from 2010-01-01 to 2029-12-31: 30 days (N 1 | new; read in a secondary source, not in the official text); from 2030-01-01: 10 working days (N 1; read in the official text).")
}

// TestKeptBookStaysTheSame: the book in the folder has the numbers of the day on which the bundle was checked, and no digest.
func TestKeptBookStaysTheSame(t *testing.T) {
	b := small(t)
	kept, err := rulebook.Kept(b)
	require.NoError(t, err)
	printed := markdownOf(t, kept)
	assert.Contains(t, printed, "- **Shown as of:** 2026-01-01;")
	assert.NotContains(t, printed, b.SHA256)
	assert.Contains(t, markdownOf(t, rulebook.Of(b, day("2026-01-01"))), "- **SHA-256:** "+b.SHA256+"\n")
}

// TestCalendarYears tells years that end on 31 December from other years.
func TestCalendarYears(t *testing.T) {
	for count, want := range map[string]map[string]string{
		"1": {"every": "at least once in each calendar year", "within": "by the end of the calendar year after", "for": "until the end of the calendar year after"},
		"2": {"every": "at least once in every 2 calendar years", "within": "by the end of the 2nd calendar year after", "for": "until the end of the 2nd calendar year after"},
		"3": {"within": "by the end of the 3rd calendar year after"},
		"5": {"for": "until the end of the 5th calendar year after"},
		"0": {"within": "by the end of the calendar year:"},
	} {
		for role, words := range want {
			fields := map[string]string{
				"every": `"during": {"from": input.as_of, "to": null}, "by": [], "every"`, "within": `"after": input.as_of, "by": null, "within"`, "for": `"holds": true, "for"`,
			}[role]
			b := small(t, func(files fstest.MapFS) {
				bundletest.Change(files, "small/parameters/data.yaml", "value: {days: 30}", "value: {calendar_years: "+count+"}")
				bundletest.Change(files, "small/duty/posting/posting.rego", "\"after\": input.as_of,\n\t\"within\": \"posting_time\",\n\t\"by\": null,\n", fields+": \"posting_time\",\n")
			})
			assert.Contains(t, whenOf(t, rulebook.Of(b, day("2026-06-30")))[0], words)
		}
	}
}

// TestOddBundles looks at what no embedded bundle has.
func TestOddBundles(t *testing.T) {
	b := small(t)
	b.About.Kind, b.About.Drops, b.Extends = "treaty", []string{"old-duty", "old_number"}, []string{"base"}
	b.Warnings.Warnf(diag.Position{}, "", "dose asks for less than the bundle that is extended: from 2000-01-01 90 in place of 50")
	b.Measures.Hearing.Shift.Retest = ""
	duty := *b.Duties[0]
	duty.Subject, duty.Evidence, duty.From, duty.Text = "vessel", []string{"new_kind"}, "base", "package duty.posting\n\nobligations contains {"
	b.Duties = []*bundle.Duty{&duty}
	printed := textOf(t, rulebook.Of(b, day("2026-06-30")), 1000)
	for _, want := range []string{
		"\nKind: treaty\n", "\nDrops: old-duty, old_number; asked by a bundle that is extended, but not here\n",
		"\nExtends: base; what is asked there holds here, too, unless this bundle says otherwise\n",
		"Where it may ask for less than a bundle that it extends\n-------------------------------------------------------\n- Dose asks for less than the bundle that is extended: from 2000-01-01 90 in place of 50.\n",
		"Of whom: the employer, for each vessel\n", "Proven by: new kind\n", "Comes from: base, which this bundle extends\n", "When and how much: its rule cannot be read: ",
	} {
		assert.Contains(t, printed, want)
	}
	assert.NotContains(t, printed, "Retest:")
	b.About.CheckedOn = "soon"
	_, err := rulebook.Kept(b)
	assert.Error(t, err)
}

// TestBookIsNoPartOfItsBundle: the book lies in the bundle's folder and changes nothing there.
func TestBookIsNoPartOfItsBundle(t *testing.T) {
	without := small(t)
	beside := small(t, func(files fstest.MapFS) { files["small/"+rulebook.FileName] = &fstest.MapFile{Data: []byte("# Book")} })
	assert.Equal(t, without.SHA256, beside.SHA256)
}
