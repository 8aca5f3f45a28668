package sample

import (
	"crypto/sha256"
	"encoding/binary"
	"hash/fnv"
	"io"
	"math"
	"math/rand/v2"
	"slices"
)

// Draw draws n of the ids of a stratum at random. The result is sorted, and depends on nothing but the seed, the name
// of the stratum and the set of ids.
//
// Anybody can redo it: sort the ids as bytes; take the generator PCG-DXSM with 128 bits of state, as Go's math/rand/v2
// seeds it with two numbers, here the seed and the FNV-1a hash (64 bits) of the stratum's name; then for i from 0 to
// n-1 exchange the i-th id with the one r places behind it, r below the number of ids from there on. Each r is the
// next output of the generator modulo that number, and outputs in the last, incomplete round of it are thrown away.
func Draw(seed uint64, stratum string, ids []string, n int) []string {
	ids = slices.Clone(ids)
	slices.Sort(ids)
	h := fnv.New64a()
	_, _ = io.WriteString(h, stratum) // a hash takes everything
	g := rand.NewPCG(seed, h.Sum64())
	n = min(n, len(ids))
	for i := range n {
		j := i + int(below(g, uint64(len(ids)-i)))
		ids[i], ids[j] = ids[j], ids[i]
	}
	out := ids[:n:n]
	slices.Sort(out)
	return out
}

// below gives a number below n, each with the same chance.
func below(g *rand.PCG, n uint64) uint64 {
	whole := math.MaxUint64 - math.MaxUint64%n // a multiple of n
	for {
		if x := g.Uint64(); x < whole {
			return x % n
		}
	}
}

// seeds is the number of seeds that Seed gives; they are short enough to be typed.
const seeds = 1_000_000_000

// Seed makes a seed of texts, such as the digest of the program file and the as-of day.
func Seed(texts ...string) uint64 {
	h := sha256.New()
	for _, text := range texts {
		_, _ = io.WriteString(h, text+"\x00")
	}
	return binary.BigEndian.Uint64(h.Sum(nil)) % seeds
}
