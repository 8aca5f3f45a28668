package convert

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/grid"
)

// Percent reads a share in the unit percent or fraction and gives percent. A percent sign behind the number is
// a problem if the unit is fraction. The format of a workbook's number does not matter, only the unit does.
func (n *Numbers) Percent(c grid.Cell, unit string) (string, *Problem) {
	if unit == "fraction" {
		s, p := n.Read(c)
		if p != nil && c.Kind == grid.Text && strings.HasSuffix(plain(c.Text), "%") {
			return "", problem("the number has a percent sign, but the unit of the column is stated to be fraction", "State the unit percent in the map, if all cells of the column are percent")
		}
		if p != nil || s == "" {
			return "", p
		}
		return hundredfold(s), nil
	}
	return n.Read(c, "%")
}

// hundredfold moves the decimal point of a canonical number by two places.
func hundredfold(s string) string {
	digits, minus := strings.CutPrefix(s, "-")
	whole, fraction, _ := strings.Cut(digits, ".")
	for len(fraction) < 2 {
		fraction += "0"
	}
	whole, fraction = strings.TrimLeft(whole+fraction[:2], "0"), strings.TrimRight(fraction[2:], "0")
	if whole == "" {
		whole = "0"
	}
	if fraction != "" {
		whole += "." + fraction
	}
	if minus {
		return "-" + whole
	}
	return whole
}

// Hertz reads a frequency in the unit hz or khz, or with either unit behind it, and gives Hz. Frequencies that no
// record holds are problems. A comma is read as decimal sign whatever is stated, since only one reading can
// be a frequency that records hold.
func (n *Numbers) Hertz(c grid.Cell, unit string) (string, *Problem) {
	s, p := cell(c, "frequencies")
	if p != nil || s == "" {
		return "", p
	}
	factor := 1.0
	if unit == "khz" {
		factor = 1000
	}
	if c.Kind == grid.Text {
		s, factor = withoutHertz(s, factor)
	}
	text, p := n.Read(grid.Cell{Text: s, Kind: c.Kind})
	if p != nil {
		if text, p = (&Numbers{}).text(strings.Replace(s, ",", ".", 1)); p != nil {
			return "", problem("the cell is not a frequency", "Write a frequency such as 500 or 0.5 kHz")
		}
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		return "", problem("the cell is not a frequency", "Write a frequency such as 500 or 0.5 kHz")
	}
	if hz, ok := tested(v * factor); ok {
		return strconv.Itoa(hz), nil
	}
	return "", unheard(v, factor)
}

// withoutHertz takes the unit off and gives the factor that it means.
func withoutHertz(s string, factor float64) (string, float64) {
	for _, u := range []struct {
		unit   string
		factor float64
	}{{"khz", 1000}, {"k", 1000}, {"hz", 1}} {
		if rest, ok := cutSuffixFold(s, u.unit); ok && endsLikeNumber(rest) {
			return rest, u.factor
		}
	}
	return s, factor
}

// tested gives the audiometric frequency that v is.
func tested(v float64) (int, bool) {
	for _, hz := range audiometry.Frequencies {
		if math.Abs(v-float64(hz)) < 1e-6 {
			return hz, true
		}
	}
	return 0, false
}

// unheard says of a frequency that no record holds it, and which one is near.
func unheard(v, factor float64) *Problem {
	if hz, ok := tested(v * 1e3); ok && factor == 1 {
		return problem(fmt.Sprintf("the frequency is none that records hold, but would be %d Hz if it were in kHz", hz), "State the unit khz for this column in the map, if that is meant")
	}
	if hz, ok := tested(v); ok {
		return problem(fmt.Sprintf("the frequency is none that records hold, but would be %d Hz if it were in Hz", hz), "State the unit hz for this column in the map, if that is meant")
	}
	near := audiometry.Frequencies[0]
	for _, hz := range audiometry.Frequencies {
		if math.Abs(v*factor-float64(hz)) < math.Abs(v*factor-float64(near)) {
			near = hz
		}
	}
	return problem("the frequency is none that records hold",
		fmt.Sprintf("Correct it if %d Hz is meant, the nearest that records hold; else leave rows of this frequency out by rows.only in the map", near))
}
