package rulebook_test

import (
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/report/rulebook"
)

// told lists every text of a book.
func told(b *rulebook.Book) []string {
	out := []string{b.Title}
	rows := func(list []rulebook.Row) {
		for _, r := range list {
			out = append(append(out, r.Label), r.Texts...)
		}
	}
	var section func(rulebook.Section)
	section = func(s rulebook.Section) {
		out = append(append(append(out, s.Title), s.Notes...), s.Items...)
		rows(s.Rows)
		for _, e := range s.Entries {
			out = append(out, e.Title)
			rows(e.Rows)
		}
		for _, cells := range s.Table.Rows {
			out = append(out, cells...)
		}
		for _, part := range s.Parts {
			section(part)
		}
	}
	rows(b.Head)
	for _, s := range b.Sections {
		section(s)
	}
	return out
}

func squeezed(s string) string { return strings.Join(strings.Fields(s), "") }

// shown is a Markdown text as a reader sees it, without blanks.
func shown(s string) string {
	s = regexp.MustCompile("\\\\([^a-zA-Z0-9 ])").ReplaceAllString(s, "$1")
	return squeezed(strings.NewReplacer("&lt;", "<", "&gt;", ">", "&amp;", "&").Replace(s))
}

// TestBothFormsSayAll holds the forms to the book: whatever it says stands in each of them.
func TestBothFormsSayAll(t *testing.T) {
	books := map[string]*rulebook.Book{"small": rulebook.Of(small(t), day("2026-06-30"))}
	library := embedded(t)
	for id, b := range library {
		books[id] = rulebook.Of(b, day("2026-06-30"))
	}
	for id, book := range books {
		printed, written := strings.ToLower(squeezed(textOf(t, book, 80))), shown(markdownOf(t, book))
		for _, s := range told(book) {
			require.Contains(t, printed, strings.ToLower(squeezed(s)), id)
			require.Contains(t, written, squeezed(s), id)
		}
	}
}

// TestBookIsWhole asks the book of every embedded bundle for all that the bundle holds.
func TestBookIsWhole(t *testing.T) {
	library := embedded(t)
	for id, b := range library {
		book := rulebook.Of(b, day("2026-06-30"))
		all := strings.Join(told(book), "\n")
		want := []string{b.ID, b.About.Title, b.About.Authority, b.About.InForce, b.About.CheckedOn, b.Revision, b.SHA256}
		want = append(append(want, b.Extends...), b.About.Drops...)
		for _, x := range b.About.Instruments {
			want = append(want, x.Name, x.Cite)
		}
		want = append(want, b.About.Cautions...)
		for _, r := range b.About.Readings {
			want = append(want, strings.TrimSuffix(r.Point, "?"), r.Reading, r.Source)
		}
		for name, c := range b.Choices {
			want = append(want, name, c.About, c.Cite)
		}
		for _, p := range b.Paragraphs {
			want = append(want, strings.TrimSuffix(p.Says, "."), p.Attested, p.Outside, strings.Join(p.Checked, ", "))
		}
		for name, c := range b.Measures.Exposure.Channels {
			want = append(want, name, c.Cite)
		}
		for _, s := range want {
			assert.Contains(t, strings.ToLower(all), strings.ToLower(s), id)
		}
		holdDuties(t, b, book)
		holdTables(t, b, book)
	}
}

// holdDuties asks for every duty, with each parameter that its rule names in any way.
func holdDuties(t *testing.T, b *bundle.Bundle, book *rulebook.Book) {
	entries, when := map[string]string{}, map[string]string{}
	for _, s := range book.Sections {
		for _, part := range s.Parts {
			for _, e := range part.Entries {
				for _, r := range e.Rows {
					if r.Label == "When and how much" {
						when[e.Title] = strings.Join(r.Texts, "\n")
					}
					entries[e.Title] += r.Label + ": " + strings.Join(r.Texts, "\n") + "\n"
				}
			}
		}
	}
	for _, d := range b.Duties {
		entry := entries[d.Title+" ("+d.ID+")"]
		for _, s := range []string{d.Description, d.Cite, d.Remedy, "Severity: " + d.Severity, "Of whom: the employer, for each "} {
			assert.Contains(t, entry, s, d.ID)
		}
		if d.From != b.ID {
			assert.Contains(t, entry, "Comes from: "+d.From, d.ID)
		}
		for name := range b.Parameters {
			named := strings.Contains(d.Text, `"`+name+`"`) || regexp.MustCompile(`data\.parameters\.`+name+`\b`).MatchString(d.Text)
			assert.Equal(t, named, regexp.MustCompile(`\(`+name+`[;)]|no value of `+name+` `).MatchString(when[d.Title+" ("+d.ID+")"]), "%s: %s", d.ID, name)
		}
	}
}

// holdTables asks for a row of every parameter and of every paragraph.
func holdTables(t *testing.T, b *bundle.Bundle, book *rulebook.Book) {
	first := map[string][]string{}
	ways := 0
	for _, s := range book.Sections {
		for _, table := range append([]rulebook.Section{s}, s.Parts...) {
			for _, cells := range table.Table.Rows {
				require.Len(t, cells, len(table.Table.Columns))
				first[cells[0]] = cells
				if table.Table.Columns[0].Title == "Paragraph" {
					ways++
				}
			}
		}
	}
	for name, p := range b.Parameters {
		require.Contains(t, first, name)
		row := strings.Join(first[name], "|")
		for _, v := range p.Values {
			assert.Contains(t, row, v.Cite, name)
			assert.Contains(t, row, v.From, name)
		}
	}
	want := 0
	for name, p := range b.Paragraphs {
		assert.Contains(t, first, name)
		for _, given := range []bool{len(p.Checked) > 0, p.Attested != "", p.Outside != ""} {
			if given {
				want++
			}
		}
	}
	assert.Equal(t, want, ways)
}

// TestDoubtsAreListed asks for every value that was not read in the official text.
func TestDoubtsAreListed(t *testing.T) {
	library := embedded(t)
	library["small"] = small(t)
	for id, b := range library {
		book := rulebook.Of(b, day("2026-06-30"))
		i := slices.IndexFunc(book.Sections, func(s rulebook.Section) bool {
			return strings.HasPrefix(s.Title, "What rests on memory or on a secondary source")
		})
		require.GreaterOrEqual(t, i, 0, id)
		assert.True(t, book.Sections[i].Doubt)
		list := strings.Join(book.Sections[i].Items, "\n")
		for name, p := range b.Parameters {
			for _, v := range p.Values {
				line := regexp.MustCompile(`(?m)^The parameter ` + name + `, .*; in force from ` + v.From + `[,)]`)
				assert.Equal(t, v.Seen != "text", line.MatchString(list), "%s of %s", name, id)
			}
		}
	}
}

// TestAgeTables holds the printed tables of the correction for age to the values that tests are corrected by.
func TestAgeTables(t *testing.T) {
	seen := 0
	for id, b := range embedded(t) {
		a := b.Measures.Hearing.AgeCorrection
		if a == nil {
			continue
		}
		for _, s := range rulebook.Of(b, day("2026-06-30")).Sections {
			for _, part := range s.Parts {
				if !part.Table.Figures {
					continue
				}
				sex, _, _ := strings.Cut(strings.TrimPrefix(part.Title, "Correction for age, "), ":")
				for i, row := range part.Table.Rows {
					want := []string{strconv.Itoa(a.FromAge + i)}
					for _, c := range part.Table.Columns[1:] {
						hz, err := strconv.Atoi(c.Title)
						require.NoError(t, err)
						want = append(want, strconv.Itoa(a.Values[sex][hz][i]))
					}
					assert.Equal(t, want, row, "%s, %s", id, sex)
					seen += len(row) - 1
				}
			}
		}
		for _, values := range a.Values {
			for _, of := range values {
				seen -= len(of)
			}
		}
	}
	assert.Zero(t, seen, "values that no table shows")
}
