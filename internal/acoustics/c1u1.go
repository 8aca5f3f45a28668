package acoustics

// The axes and cells of ISO 9612:2009 Table C.4, seen in a secondary source: rows are numbers of samples,
// columns the standard deviation u1 in dB, cells c1u1 in dB. The rows of 3 and 4 samples are meant for full
// days only. Land's exact limit of the energy mean gives 147 of the 180 cells when rounded, and no other
// differs by more than 0.16 dB.
var (
	samplingRows    = [15]float64{3, 4, 5, 6, 7, 8, 9, 10, 12, 14, 16, 18, 20, 25, 30}
	samplingColumns = [13]float64{0, 0.5, 1, 1.5, 2, 2.5, 3, 3.5, 4, 4.5, 5, 5.5, 6}
	samplingTable   = [15][13]float64{
		{0, 0.6, 1.6, 3.1, 5.2, 8.0, 11.5, 15.7, 20.6, 26.1, 32.2, 39.0, 46.5},
		{0, 0.4, 0.9, 1.6, 2.5, 3.6, 5.0, 6.7, 8.6, 10.9, 13.4, 16.1, 19.2},
		{0, 0.3, 0.7, 1.2, 1.7, 2.4, 3.3, 4.4, 5.6, 6.9, 8.5, 10.2, 12.1},
		{0, 0.3, 0.6, 0.9, 1.4, 1.9, 2.6, 3.3, 4.2, 5.2, 6.3, 7.6, 8.9},
		{0, 0.2, 0.5, 0.8, 1.2, 1.6, 2.2, 2.8, 3.5, 4.3, 5.1, 6.1, 7.2},
		{0, 0.2, 0.5, 0.7, 1.1, 1.4, 1.9, 2.4, 3.0, 3.6, 4.4, 5.2, 6.1},
		{0, 0.2, 0.4, 0.7, 1.0, 1.3, 1.7, 2.1, 2.6, 3.2, 3.9, 4.6, 5.4},
		{0, 0.2, 0.4, 0.6, 0.9, 1.2, 1.5, 1.9, 2.4, 2.9, 3.5, 4.1, 4.8},
		{0, 0.2, 0.3, 0.5, 0.8, 1.0, 1.3, 1.7, 2.0, 2.5, 2.9, 3.5, 4.0},
		{0, 0.1, 0.3, 0.5, 0.7, 0.9, 1.2, 1.5, 1.8, 2.2, 2.6, 3.0, 3.5},
		{0, 0.1, 0.3, 0.5, 0.6, 0.8, 1.1, 1.3, 1.6, 2.0, 2.3, 2.7, 3.2},
		{0, 0.1, 0.3, 0.4, 0.6, 0.8, 1.0, 1.2, 1.5, 1.8, 2.1, 2.5, 2.9},
		{0, 0.1, 0.3, 0.4, 0.5, 0.7, 0.9, 1.1, 1.4, 1.7, 2.0, 2.3, 2.6},
		{0, 0.1, 0.2, 0.3, 0.5, 0.6, 0.8, 1.0, 1.2, 1.4, 1.7, 2.0, 2.3},
		{0, 0.1, 0.2, 0.3, 0.4, 0.6, 0.7, 0.9, 1.1, 1.3, 1.5, 1.7, 2.0},
	}
)

// SamplingUncertainty gives c1u1 in dB, what the sampling adds to the uncertainty of a job-based or full-day
// result, for a number of samples and their standard deviation u1 in dB (ISO 9612:2009 Table C.4, secondary
// source). Between rows and columns it interpolates linearly in both; u1 = 0 gives 0. Clamped says that the
// table ends before: more than 30 samples are taken as 30, which gives too much, and a u1 above 6 dB as 6,
// which gives too little. It returns false below 3 samples, or if u1 is negative or not a finite number.
func SamplingUncertainty(samples int, u1 float64) (c1u1 float64, clamped, ok bool) {
	if samples < 3 || !finite(u1) || u1 < 0 {
		return 0, false, false
	}
	row, down, clampedRow := place(samplingRows[:], float64(samples))
	column, right, clampedColumn := place(samplingColumns[:], u1)
	upper := between(samplingTable[row][column], samplingTable[row][column+1], right)
	lower := between(samplingTable[row+1][column], samplingTable[row+1][column+1], right)
	return between(upper, lower, down), clampedRow || clampedColumn, true
}

// place gives the index of the interval of an axis that x lies in and how far into it, 0 to 1. Past the end
// of the axis it gives the end.
func place(axis []float64, x float64) (i int, share float64, clamped bool) {
	last := len(axis) - 1
	if x > axis[last] {
		return last - 1, 1, true
	}
	for i < last-1 && x >= axis[i+1] {
		i++
	}
	return i, (x - axis[i]) / (axis[i+1] - axis[i]), false
}

// between gives a at share 0 and b at share 1, both exactly.
func between(a, b, share float64) float64 {
	return a*(1-share) + b*share
}
