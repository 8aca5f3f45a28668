package acoustics

// Sufficiency says how well the level under a protector fits an action level.
type Sufficiency string

// The bands of the level under a protector, from loud to quiet.
const (
	TooLittle Sufficiency = "too little"
	JustSo    Sufficiency = "enough, but little"
	Good      Sufficiency = "good"
	Much      Sufficiency = "enough, but much"
	TooMuch   Sufficiency = "too much" // speech and warnings may go unheard
)

// ResidualBands are the bounds of the level under a protector. A level at a bound belongs to the better side.
type ResidualBands struct {
	ActionLevel float64 // dB(A); above it the protector does too little
	GoodBelow   float64 // dB under the action level where good begins
	GoodAbove   float64 // dB under the action level where good ends
	TooMuch     float64 // dB under the action level beyond which the protector does too much
}

// EN458Bands gives the bounds of EN 458 for an action level in dB(A): good from 5 to 10 dB under it, too much
// from 15 dB under it (from memory).
func EN458Bands(actionLevel float64) ResidualBands {
	return ResidualBands{ActionLevel: actionLevel, GoodBelow: 5, GoodAbove: 10, TooMuch: 15}
}

// Judge says which band a level in dB(A) under a protector lies in. It returns false if the level or a bound
// is not a finite number or the bounds are not in order.
func (b ResidualBands) Judge(level float64) (Sufficiency, bool) {
	if !finite(level) || !finite(b.ActionLevel) || !finite(b.TooMuch) || !(0 <= b.GoodBelow && b.GoodBelow <= b.GoodAbove && b.GoodAbove <= b.TooMuch) {
		return "", false
	}
	below := b.ActionLevel - level
	switch {
	case below < -levelSlack:
		return TooLittle, true
	case below > b.TooMuch+levelSlack:
		return TooMuch, true
	case below < b.GoodBelow-levelSlack:
		return JustSo, true
	case below > b.GoodAbove+levelSlack:
		return Much, true
	}
	return Good, true
}
