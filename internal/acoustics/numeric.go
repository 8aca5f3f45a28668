package acoustics

import (
	"math"
	"sync"

	"gonum.org/v1/gonum/integrate/quad"
)

const (
	reach      = 14  // widths of the mode beyond which a log-concave density holds nothing worth adding
	panelWidth = 2.0 // widths of the mode in one panel of the quadrature
	nodeCount  = 24
)

var legendre = sync.OnceValue(func() (n struct{ x, w [nodeCount]float64 }) {
	quad.Legendre{}.FixedLocations(n.x[:], n.w[:], -1, 1)
	return n
})

// integrate takes an integral by Gauss-Legendre quadrature in panels not wider than twice the width. It gives
// 0 if the interval is empty.
func integrate(f func(float64) float64, from, to, width float64) float64 {
	if !(from < to) {
		return 0
	}
	nodes := legendre()
	panels := int(math.Ceil((to - from) / (panelWidth * width)))
	half := (to - from) / float64(2*panels)
	var sum float64
	for i := range panels {
		middle := from + half*float64(2*i+1)
		for j, x := range nodes.x {
			sum += nodes.w[j] * f(middle+half*x)
		}
	}
	return sum * half
}

// bracket looks for two arguments around start between which a falling function crosses zero, in steps that
// begin with width and double. It returns false if there are none within a million.
func bracket(f func(float64) float64, start, width float64) (low, high float64, ok bool) {
	const widest = 1e6
	low, high = start, start
	for step := width; f(low) < 0; step *= 2 {
		if step > widest {
			return 0, 0, false
		}
		high, low = low, low-step
	}
	for step := width; f(high) > 0; step *= 2 {
		if step > widest {
			return 0, 0, false
		}
		low, high = high, high+step
	}
	return low, high, true
}

// bisect finds where a falling function crosses zero between low and high, to about 12 figures.
func bisect(f func(float64) float64, low, high float64) float64 {
	for range 200 {
		middle := low + (high-low)/2
		if high-low < 1e-12*(1+math.Abs(middle)) || middle <= low || middle >= high {
			break
		}
		if f(middle) > 0 {
			low = middle
		} else {
			high = middle
		}
	}
	return low + (high-low)/2
}

// noncentralT gives the chance that a variable of the noncentral t distribution is at most t: the normal
// distribution function at t x / sqrt(nu) - delta, averaged over the chi distribution of x with nu of 2 or more
// degrees of freedom (definition). Unlike the usual series it holds for any noncentrality.
func noncentralT(t, nu, delta float64) float64 {
	gamma, _ := math.Lgamma(nu / 2)
	scale := (1-nu/2)*math.Ln2 - gamma
	slope := t / math.Sqrt(nu)
	normal := func(x float64) float64 { return math.Erfc((delta-slope*x)/math.Sqrt2) / 2 }
	f := func(x float64) float64 {
		return normal(x) * math.Exp(scale+(nu-1)*math.Log(x)-x*x/2)
	}
	mode := math.Sqrt(nu - 1)
	from, to := max(0, mode-reach), mode+reach
	// The normal distribution function rises where its argument is near 0; elsewhere it is flat.
	rise, width := from, 1.0
	if slope != 0 {
		rise, width = min(max(delta/slope, from), to), 1/math.Abs(slope)
	}
	left, right := max(from, rise-reach*width), min(to, rise+reach*width)
	return integrate(f, from, left, 1) + integrate(f, left, right, min(1, width)) + integrate(f, right, to, 1)
}
