package mapping

import (
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
)

// TestWordSet checks that the look at the first byte changes nothing.
func TestWordSet(t *testing.T) {
	words := []string{"n/a", "Na", "-", "", " x", "=y", "31/12/9999", "\u2212", "ÉTÉ", "9", "#N/A", "\uff2e"}
	texts := append([]string{"N/A", "n/A ", "nA", "\t-", "\u00a0-", "=\"n/a\"", "=\"-\"", "été", "Ete", "\uff19", "9.0", "X", "x", "y", "=y", "", " ", "n", "31/12/9999"}, words...)
	for _, w := range words {
		set := newWordSet([]string{w})
		for _, text := range texts {
			_, want := set.words.Find(grid.Cell{Text: text})
			require.Equal(t, want, set.has(text), "%q among %q", text, w)
		}
	}
	var none wordSet
	require.False(t, none.has(""))
}
