package acoustics

import "math"

// TimeLimit is a law that allows a time a day for each level.
type TimeLimit struct {
	Criterion float64 // dB(A), allowed for 480 minutes
	Exchange  float64 // dB, the rise that halves the time; 0 = equal energy, a tenth of the time for 10 dB
	None      float64 // dB(A) above which no time is allowed; 0 = no such level
	NoneAt    bool    // no time is allowed at None itself either
}

// Minutes gives the time allowed at a level, in minutes from 0 to 1440: 480 / 2^((L - criterion)/exchange)
// or, by equal energy, 480 * 10^((criterion - L)/10). Printed tables round it: the 87 dB table of Canada's
// federal law follows equal energy, those of Yukon and New Brunswick halve every 3 dB. It returns false if
// the level is not a finite number.
func (t TimeLimit) Minutes(level float64) (float64, bool) {
	if !finite(level) {
		return 0, false
	}
	if t.None != 0 && (level > t.None || t.NoneAt && level == t.None) {
		return 0, true
	}
	minutes := criterionMinutes * energyRatio(t.Criterion, level)
	if t.Exchange > 0 {
		minutes = Scale{Criterion: t.Criterion, Exchange: t.Exchange}.ReferenceMinutes(level)
	}
	return min(minutes, dayMinutes), true
}

// ImpactLimit is a law that allows a number of impacts in 24 hours for each peak level.
type ImpactLimit struct {
	Peak     float64 // dB, the peak level that Count belongs to
	Count    float64 // impacts in 24 hours
	Exchange float64 // dB, the rise that halves the number; above 0
	None     float64 // dB above which no impact is allowed; 0 = no such level
}

// Impacts gives the number of impacts allowed at a peak level in dB, count / 2^((L - peak)/exchange), not
// rounded. The table of Yukon (Occupational Health Regulations s. 4) is 14400 at 118 dB halving every 3 dB,
// except that it prints 90 at 140 dB, where the rule gives 89.3. It returns false if the level is not a
// finite number or there is no exchange.
func (t ImpactLimit) Impacts(peak float64) (float64, bool) {
	if !finite(peak) || !(t.Exchange > 0) {
		return 0, false
	}
	if t.None != 0 && peak > t.None {
		return 0, true
	}
	return t.Count / math.Exp2((peak-t.Peak)/t.Exchange), true
}
