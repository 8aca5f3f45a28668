package convert

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
)

// The full names as they are written, common practice, no source.
var fullNames = map[string]string{
	"English":                "January February March April May June July August September October November December",
	"French":                 "janvier février mars avril mai juin juillet août septembre octobre novembre décembre",
	"German":                 "Januar Februar März April Mai Juni Juli August September Oktober November Dezember",
	"Austrian":               "Jänner Feber März April Mai Juni Juli August September Oktober November Dezember",
	"Spanish":                "enero febrero marzo abril mayo junio julio agosto septiembre octubre noviembre diciembre",
	"Portuguese":             "janeiro fevereiro março abril maio junho julho agosto setembro outubro novembro dezembro",
	"Italian":                "gennaio febbraio marzo aprile maggio giugno luglio agosto settembre ottobre novembre dicembre",
	"Dutch":                  "januari februari maart april mei juni juli augustus september oktober november december",
	"Polish":                 "stycznia lutego marca kwietnia maja czerwca lipca sierpnia września października listopada grudnia",
	"Polish too":             "styczeń luty marzec kwiecień maj czerwiec lipiec sierpień wrzesień październik listopad grudzień",
	"Danish":                 "januar februar marts april maj juni juli august september oktober november december",
	"Norwegian":              "januar februar mars april mai juni juli august september oktober november desember",
	"Swedish":                "januari februari mars april maj juni juli augusti september oktober november december",
	"Thai":                   "มกราคม กุมภาพันธ์ มีนาคม เมษายน พฤษภาคม มิถุนายน กรกฎาคม สิงหาคม กันยายน ตุลาคม พฤศจิกายน ธันวาคม",
	"abbreviated English":    "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec",
	"abbreviated French":     "janv. févr. mars avr. mai juin juil. août sept. oct. nov. déc.",
	"abbreviated German":     "Jan. Feb. Mrz. Apr. Mai Jun. Jul. Aug. Sept. Okt. Nov. Dez.",
	"abbreviated Spanish":    "ene feb mar abr may jun jul ago sep oct nov dic",
	"abbreviated Portuguese": "jan fev mar abr mai jun jul ago set out nov dez",
	"abbreviated Italian":    "gen feb mar apr mag giu lug ago set ott nov dic",
	"abbreviated Dutch":      "jan. feb. mrt. apr. mei jun. jul. aug. sep. okt. nov. dec.",
	"abbreviated Polish":     "sty lut mar kwi maj cze lip sie wrz paź lis gru",
	"abbreviated Thai":       "ม.ค. ก.พ. มี.ค. เม.ย. พ.ค. มิ.ย. ก.ค. ส.ค. ก.ย. ต.ค. พ.ย. ธ.ค.",
}

func TestMonthNames(t *testing.T) {
	for language, names := range fullNames {
		list := strings.Fields(names)
		require.Len(t, list, 12, language)
		for i, name := range list {
			for _, form := range []string{"4 %s 2025", "04-%s-2025", "4. %s 2025", "%s 4, 2025", "2025 %s 4"} {
				got, p := (&Dates{}).Read(grid.Cell{Text: fmt.Sprintf(form, name)})
				require.Nil(t, p, "%s in %s: %v", name, language, p)
				assert.Equal(t, fmt.Sprintf("2025-%02d-04", i+1), got, name)
			}
			_, p := (&Dates{}).Read(grid.Cell{Text: "4 " + strings.ToUpper(name) + " 2025"})
			assert.Nil(t, p, name)
		}
	}
}

// A word that could be two months, or a month and a day of the week, would be a guess.
func TestNamesMeanOneThing(t *testing.T) {
	for _, lists := range [][][]string{monthNames[:], dayNames[:]} {
		owner := map[string]int{}
		for i, words := range lists {
			for _, w := range words {
				if known, ok := owner[Fold(w)]; ok {
					assert.Equal(t, known, i, w)
				}
				owner[Fold(w)] = i
			}
		}
	}
	for w := range weekdays {
		assert.Zero(t, months[w], w)
		assert.False(t, between[w] || endings[w], w)
	}
	for w := range months {
		assert.False(t, between[w] || endings[w], w)
	}
	for i := range eras[1:] {
		assert.Equal(t, eras[i].next, eras[i+1].first)
		assert.Equal(t, eras[i+1].first.Year(), eras[i+1].year)
	}
}

// The table of digits in Unicode must have them in whole tens, zero first.
func TestDigits(t *testing.T) {
	for zero, nine := range map[rune]rune{'0': '9', '٠': '٩', '๐': '๙', '०': '९', '０': '９', '𝟎': '𝟗', '𝟶': '𝟿'} {
		a, ok := digit(zero)
		assert.True(t, ok)
		assert.Equal(t, rune(0), a)
		b, _ := digit(nine)
		assert.Equal(t, rune(9), b)
	}
	_, ok := digit('²')
	assert.False(t, ok)
}
