package html

import (
	"cmp"
	"fmt"
	"slices"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"golang.org/x/text/collate"
	"golang.org/x/text/language"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// sorted orders findings by a head of the register. What has no due day comes last both ways.
func sorted(r *finding.Report, head string, down bool) []*finding.Finding {
	list, titles := filtered(r, filter{}), phrase.TitlesOf(r)
	words := collate.New(language.English, collate.Numeric)
	slices.SortStableFunc(list, func(a, b *finding.Finding) int {
		n := 0
		switch head {
		case "status":
			n = a.Status.Urgency() - b.Status.Urgency()
		case "due":
			if a.Due.Known() != b.Due.Known() {
				return map[bool]int{true: -1, false: 1}[a.Due.Known()]
			}
			n = cmp.Compare(a.Due, b.Due)
		case "subject":
			n = words.CompareString(a.Subject.Kind+" "+a.Subject.ID, b.Subject.Kind+" "+b.Subject.ID)
		case "duty":
			n = words.CompareString(titles.Of(a), titles.Of(b))
		case "cite":
			n = words.CompareString(a.Cite, b.Cite)
		}
		if down {
			return -n
		}
		return n
	})
	return list
}

func TestBrowserSortsByEachHead(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	for _, head := range []string{"status", "due", "subject", "duty", "cite"} {
		for _, down := range []bool{false, true} {
			p.do(chromedp.Click(chromedp.CSS("th[data-sort=" + head + "] button")))
			name, word := head, "ascending"
			if down {
				name, word = "-"+head, "descending"
			}
			assert.Equal(t, "#register?sort="+name, p.address())
			heads := of[map[string]string](p, `Object.fromEntries([...document.querySelectorAll("th[aria-sort]")].map((th) => [th.dataset.sort, th.getAttribute("aria-sort")]))`)
			assert.Equal(t, map[string]string{head: word}, heads)
			require.Equal(t, registerOf(r, sorted(r, head, down)), of[seen](p, seeing).Rows, "%s %s", head, word)
		}
	}
	assert.Equal(t, fmt.Sprintf("%d findings listed: %s.", len(r.Findings), r.Listed), of[seen](p, seeing).Shown)
}
