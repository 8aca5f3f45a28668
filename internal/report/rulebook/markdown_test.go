package rulebook_test

import (
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/report/rulebook"
)

// bars counts the bars of a line that part cells.
func bars(line string) int { return len(regexp.MustCompile(`(^|[^\\])\|`).FindAllString(line, -1)) }

func TestCellsAreEscaped(t *testing.T) {
	book := &rulebook.Book{Title: "T", Sections: []rulebook.Section{{Title: "S", Table: rulebook.Table{
		Columns: []rulebook.Column{{Title: "One"}, {Title: "Two | three"}},
		Rows: [][]string{
			{"a | b", "c\nd"}, {`back\slash|`, "*bold* _em_ a_b `code`"}, {"<script>", "[link](x) &lt; & R&D"}, {"", "~~gone~~"}, {"||", "\x1b[31m"},
		},
	}}}}
	written := markdownOf(t, book)
	lines := strings.Split(strings.TrimSpace(written[strings.Index(written, "| One"):]), "\n")
	assert.Equal(t, []string{
		`| One | Two \| three |`,
		`| --- | --- |`,
		`| a \| b | c d |`,
		`| back\\slash\| | \*bold\* \_em\_ a_b \` + "`code\\`" + ` |`,
		`| &lt;script&gt; | \[link\](x) &amp;lt; & R&D |`,
		`|  | \~\~gone\~\~ |`,
		`| \|\| | ` + "\uFFFD" + `\[31m |`,
	}, lines)
}

// TestEveryTableRowHasItsCells counts the cells of all tables of a book whose texts hold bars.
func TestEveryTableRowHasItsCells(t *testing.T) {
	columns, rows := 0, 0
	for line := range strings.Lines(markdownOf(t, rulebook.Of(small(t), day("2026-06-30")))) {
		if !strings.HasPrefix(line, "|") {
			columns = 0
			continue
		}
		if columns == 0 {
			columns = bars(line)
		}
		require.Equal(t, columns, bars(line), line)
		rows++
	}
	assert.Equal(t, 4+2+3*3, rows) // four parameters and three kinds of paragraphs, each table with two lines of head
}

// TestNothingBecomesMarkup: the beginning of a text is no list, heading or line.
func TestNothingBecomesMarkup(t *testing.T) {
	written := markdownOf(t, &rulebook.Book{Title: "# T", Sections: []rulebook.Section{{Title: "1. S", Notes: []string{"--- n", "> q", "+ p", "# h", "=== u"}, Items: []string{"1) i", "- i", "1910.95(a)", "12"}}}})
	assert.Equal(t, "# \\# T\n\n## 1\\. S\n\n\\--- n\n\n&gt; q\n\n\\+ p\n\n\\# h\n\n\\=== u\n\n- 1\\) i\n- \\- i\n- 1910.95(a)\n- 12\n", written)
}
