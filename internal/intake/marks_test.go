package intake

import (
	"encoding/binary"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// Marks keep the first value of each key, as a map would.
func TestMarks(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var m marks[sum, int]
		first := map[sum]int{}
		for i, n := range rapid.SliceOfN(rapid.Uint64Range(1, 300), 0, 2000).Draw(t, "keys") {
			key := sum(n << rapid.IntRange(0, 1).Draw(t, "shift")) // keys that crowd and keys that do not
			got, double := m.mark(key, i)
			want, known := first[key]
			if !known {
				first[key], want = i, i
			}
			require.Equal(t, known, double)
			require.Equal(t, want, got)
		}
		require.Equal(t, len(first), m.used)
	})
}

func TestDigests(t *testing.T) {
	require.Equal(t, digestOf([]byte("A-1")), digestOf([]byte("A-1")))
	require.NotEqual(t, digestOf([]byte("A-1")), digestOf([]byte("A-2")))
	a, b := sum(offset).text("ab").text("c"), sum(offset).text("a").text("bc")
	require.NotEqual(t, a, b, "where a text ends counts")
	d := digestOf([]byte("A-1"))
	require.Equal(t, binary.LittleEndian.Uint64(d[:]), d.hash())
	require.NotZero(t, sum(0).hash())
}
