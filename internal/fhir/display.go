package fhir

import (
	"fmt"
	"regexp"
	"strconv"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// earWords are words for an ear in texts beside a code (common practice, no source).
var earWords = map[ear]map[string]bool{
	left:  wordSet("left l lt links linke linkes linken gauche izquierdo izquierda esquerdo esquerda sinistra sinistro"),
	right: wordSet("right r rt rechts rechte rechtes rechten droite droit derecho derecha direito direita destra destro"),
}

// earSigns are signs for an ear in scripts without blanks between words.
var earSigns = map[ear]string{left: "左", right: "右"}

// hearingWords are beginnings of words that tell of hearing tests (common practice, no source).
var hearingWords = []string{"hear", "audio", "ton", "thresh", "hor", "schwell", "seuil", "umbral", "audit", "soglia", "limiar", "聽", "听", "聴"}

var (
	frequencyText = regexp.MustCompile(`(\d+(?:[.,]\d+)?)\s*(khz|hz|k)?`)
	tokenText     = regexp.MustCompile(`[\pL]+`)
)

// disagrees says whether a text beside a code tells of another ear or frequency than the code does, or of something
// else than hearing. A text that is silent on ear or frequency does not disagree for that.
func (t tone) disagrees(display string) bool {
	folded := strings.ToLower(convert.Fold(display))
	if folded == "" {
		return false
	}
	own, other := strings.Contains(folded, earSigns[t.ear]), strings.Contains(folded, earSigns[t.ear.other()])
	hearing := false
	for _, token := range tokenText.FindAllString(folded, -1) {
		own = own || earWords[t.ear][token]
		other = other || earWords[t.ear.other()][token]
		for _, beginning := range hearingWords {
			hearing = hearing || strings.HasPrefix(token, beginning)
		}
	}
	same, different := frequencies(strings.ToLower(display), t.hz)
	if other && !own || different && !same {
		return true
	}
	return !own && !other && !same && !hearing
}

// frequencies says whether a text names a frequency, and another one. A number without a unit counts if audiometers
// have that frequency.
func frequencies(text string, hz int) (same, different bool) {
	for _, m := range frequencyText.FindAllStringSubmatch(text, -1) {
		v, err := strconv.ParseFloat(strings.Replace(m[1], ",", ".", 1), 64)
		if err != nil {
			continue
		}
		if strings.HasPrefix(m[2], "k") {
			v *= 1000
		}
		switch {
		case v == float64(hz):
			same = true
		case m[2] != "" || v == 125 || isTestFrequency(v):
			different = true
		}
	}
	return same, different
}

func isTestFrequency(v float64) bool {
	for _, t := range tones {
		if float64(t.hz) == v {
			return true
		}
	}
	return false
}

// checkNames compares a code with the texts beside it.
func (t tone) checkNames(code string, names []string) *mapping.Fault {
	for _, name := range names {
		if t.disagrees(name) {
			return &mapping.Fault{
				Field: t.field(), Header: "code",
				Why:    fmt.Sprintf("the code %s is that of the %s ear at %d Hz, but the text beside it reads %q", code, t.ear, t.hz, record.Shorten(name)),
				Remedy: "Look up in the system that wrote the file which of the two is right, and correct the other",
			}
		}
	}
	return nil
}

// field gives the name of the field that holds the threshold.
func (t tone) field() string { return t.ear.String() + "." + strconv.Itoa(t.hz) }

// checkSite compares the code with the body site, where that names an ear.
func (t tone) checkSite(n *node) *mapping.Fault {
	var r reader
	site := r.concept(n, "bodySite")
	if r.fault != nil {
		return r.fault
	}
	for _, name := range site.names() {
		own, other := false, false
		for _, token := range tokenText.FindAllString(strings.ToLower(convert.Fold(name)), -1) {
			own = own || earWords[t.ear][token]
			other = other || earWords[t.ear.other()][token]
		}
		if other && !own {
			return &mapping.Fault{
				Field: t.field(), Header: "bodySite",
				Why:    fmt.Sprintf("the code is that of the %s ear, but the body site reads %q", t.ear, record.Shorten(name)),
				Remedy: "Look up in the system that wrote the file which of the two is right, and correct the other",
			}
		}
	}
	return nil
}
