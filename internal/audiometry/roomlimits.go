package audiometry

import "fmt"

// octaves are the bands of the American tables, in Hz.
var octaves = [5]float64{500, 1000, 2000, 4000, 8000}

// thirds are the bands of ISO 8253-1, in Hz.
var thirds = [25]float64{
	31.5, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400, 500, 630, 800,
	1000, 1250, 1600, 2000, 2500, 3150, 4000, 5000, 6300, 8000,
}

// TableD1 gives the highest background levels of 29 CFR 1910.95 App. D, Table D-1, which 49 CFR 227 App. D
// repeats for supra-aural earphones.
func TableD1() BandSet {
	return octaveSet("29 CFR 1910.95 App. D, Table D-1", "supra_aural", 40, 40, 47, 57, 62)
}

// RailInsert gives the highest background levels of 49 CFR 227 App. D for insert earphones.
func RailInsert() BandSet {
	return octaveSet("49 CFR 227 App. D", "insert", 50, 47, 49, 50, 56)
}

func octaveSet(name, earphones string, dB ...float64) BandSet {
	return BandSet{Name: name, Width: Octave, Earphones: earphones, Source: name, Bands: bandsOf(octaves[:], dB)}
}

func bandsOf(hz, dB []float64) []Band {
	bands := make([]Band, len(hz))
	for i := range hz {
		bands[i] = Band{hz[i], dB[i]}
	}
	return bands
}

// from630 are the limits for air conduction from 630 Hz up, which all sets share, in dB.
var from630 = []float64{18, 20, 23, 25, 27, 30, 32, 34, 36, 35, 34, 33}

// below630 are the limits for air conduction below 630 Hz by the lowest test tone in Hz, in dB.
var below630 = map[int][]float64{
	125: {56, 52, 47, 42, 38, 33, 28, 23, 20, 19, 18, 18, 18},
	250: {66, 62, 57, 52, 48, 43, 39, 30, 20, 19, 18, 18, 18},
	500: {78, 73, 68, 64, 59, 55, 51, 47, 42, 37, 33, 24, 18},
}

// ISO8253Air gives the highest background levels for air-conduction tests down to 0 dB HL with supra-aural
// earphones, with the threshold raised by 2 dB at most, by the lowest test tone: 125, 250 or 500 Hz (ISO
// 8253-1:2010 Table 2, secondary source). It returns false for another tone.
func ISO8253Air(lowestHz int) (BandSet, bool) {
	low, ok := below630[lowestHz]
	if !ok {
		return BandSet{}, false
	}
	return BandSet{
		Name: fmt.Sprintf("ISO 8253-1 air conduction from %d Hz", lowestHz), Width: ThirdOctave, Earphones: "supra_aural",
		Source: "ISO 8253-1:2010 Table 2, secondary source", Bands: bandsOf(thirds[:], append(low[:len(low):len(low)], from630...)),
	}, true
}

// bone holds the limits for bone conduction by the lowest test tone in Hz, in dB.
var bone = map[int][]float64{
	125: {55, 47, 41, 35, 30, 25, 20, 17, 15, 13, 11, 9, 8, 8, 7, 7, 7, 8, 8, 6, 4, 2, 4, 9, 15},
	250: {63, 56, 49, 44, 39, 35, 28, 21, 15, 13, 11, 9, 8, 8, 7, 7, 7, 8, 8, 6, 4, 2, 4, 9, 15},
}

// ISO8253Bone gives the highest background levels for bone-conduction tests with open ears, by the lowest test
// tone: 125 or 250 Hz (ISO 8253-1:2010 Table 4, secondary source). It returns false for another tone.
func ISO8253Bone(lowestHz int) (BandSet, bool) {
	dB, ok := bone[lowestHz]
	if !ok {
		return BandSet{}, false
	}
	return BandSet{
		Name: fmt.Sprintf("ISO 8253-1 bone conduction from %d Hz", lowestHz), Width: ThirdOctave, Earphones: "open_ear",
		Source: "ISO 8253-1:2010 Table 4, secondary source", Bands: bandsOf(thirds[:], dB),
	}, true
}

// attenuations holds the sound attenuation of earphones in dB, in the bands of thirds (ISO 8253-1:2010 Table 3,
// secondary source). The circumaural row begins at 63 Hz.
var attenuations = map[string][]float64{
	"supra_aural": {0, 0, 0, 1, 1, 2, 3, 4, 5, 5, 5, 6, 7, 9, 11, 15, 18, 21, 26, 28, 31, 32, 29, 26, 24},
	"insert":      {33, 33, 33, 33, 33, 33, 33, 34, 35, 36, 37, 37, 38, 37, 37, 37, 35, 34, 33, 35, 37, 40, 41, 42, 43},
	"circumaural": {17, 16, 15, 15, 15, 16, 16, 18, 20, 23, 25, 27, 29, 30, 31, 32, 37, 41, 46, 45, 45, 44},
}

// EarphoneAttenuation gives the sound attenuation in dB of earphones ("supra_aural", "insert" or "circumaural")
// in third-octave bands; circumaural ones have no value below 63 Hz. It returns false for other earphones.
func EarphoneAttenuation(earphones string) (BandSet, bool) {
	dB, ok := attenuations[earphones]
	if !ok {
		return BandSet{}, false
	}
	return BandSet{
		Name: "attenuation of earphones", Width: ThirdOctave, Earphones: earphones,
		Source: "ISO 8253-1:2010 Table 3, secondary source", Bands: bandsOf(thirds[len(thirds)-len(dB):], dB),
	}, true
}

// ForEarphones gives limits in third-octave bands, made for supra-aural earphones, for other earphones: each
// limit rises by what they attenuate more, and falls by what they attenuate less (ISO 8253-1:2010, secondary
// source). A band without a value for the earphones keeps its limit (ours). It fails for other limits and for
// earphones without values.
func (limits BandSet) ForEarphones(earphones string) (BandSet, error) {
	if limits.Width != ThirdOctave || limits.Earphones != "supra_aural" {
		return BandSet{}, fmt.Errorf("only limits in third-octave bands for supra-aural earphones can be turned into those for others")
	}
	other, ok := EarphoneAttenuation(earphones)
	if !ok {
		return BandSet{}, fmt.Errorf("there are no values for the attenuation of earphones %q; use supra_aural, circumaural or insert", earphones)
	}
	supra, _ := EarphoneAttenuation("supra_aural")
	out := limits.Raised(0)
	out.Earphones = earphones
	for i, b := range out.Bands {
		more, known := other.at(b.Hz)
		less, alsoKnown := supra.at(b.Hz)
		if known && alsoKnown {
			out.Bands[i].DB += more - less
		}
	}
	return out, nil
}
