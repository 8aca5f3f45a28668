package sample

import "sort"

// Allocate divides n files among strata of these sizes, in proportion to them, by the largest remainders; of equal
// ones the earlier stratum comes first. A stratum that would get none although it is not empty gets one on top, so
// that the numbers can add up to a little more than n.
func Allocate(sizes []int, n int) []int {
	total := 0
	for _, size := range sizes {
		total += size
	}
	out := make([]int, len(sizes))
	if total == 0 {
		return out
	}
	n = min(n, total)
	left, order := n, make([]int, len(sizes))
	for i, size := range sizes {
		out[i], order[i] = n*size/total, i
		left -= out[i]
	}
	sort.SliceStable(order, func(a, b int) bool { return n*sizes[order[a]]%total > n*sizes[order[b]]%total })
	for _, i := range order[:left] {
		out[i]++
	}
	for i, size := range sizes {
		if size > 0 && out[i] == 0 {
			out[i] = 1
		}
	}
	return out
}
