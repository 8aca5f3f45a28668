package draft

import (
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
)

// tone is what the name of a column of thresholds says.
type tone struct {
	ear     string // left, right, one of the letters of earLetters, or empty
	hz      int
	kilo    bool   // the frequency is taken for kHz without the name saying so
	reading int    // 1 or 2 if the name numbers the readings at this frequency
	part    string // baseline, current, previous or empty
	bone    bool   // bone conduction
}

// kept says whether records have a place for the frequency.
func (t tone) kept() bool { return slices.Contains(audiometry.Frequencies[:], t.hz) }

// Words in names of columns, without accents. Common practice, no source.
var (
	rightWords = words("right rt re ad rechts rechte rechtes rechter droite droit od derecho derecha direita direito destra destro dx prawe prawy prawego hoger hojre hoyre rechteroor 右 右耳")
	leftWords  = words("left lt le as oi links linke linkes linker li gauche og izquierdo izquierda esquerda esquerdo oe sinistra sinistro sx lewe lewy lewego vanster venstre linkeroor 左 左耳")
	earLetters = words("r l d g s i e h v p") // which ear they mean, the pair tells
	fillers    = words("ear ohr oreille oido orecchio ouvido orelha ucho oor ora ore thr threshold thresholds htl hl db dbhl hearing level levels seuil umbral soglia limiar prog schwelle horschwelle drempel ac air lc lluft luft conduction freq frequency frequenz frequence frecuencia frequenza f at of x the aux auxu audio audiogram tone pure result ht")
	boneWords  = words("bc bone kl knochen knochenleitung oss osseuse osea ossea bot")
	secondly   = words("retest again repeat rpt repeated second 2nd wdh wiederholung rep zweite nochmals deuxieme")
	partWords  = map[string]string{
		"bl": "baseline", "base": "baseline", "baseline": "baseline", "basis": "baseline", "ref": "baseline", "reference": "baseline", "referenz": "baseline", "initial": "baseline",
		"cur": "current", "curr": "current", "current": "current", "akt": "current", "aktuell": "current", "actual": "current", "latest": "current", "actuel": "current",
		"prev": "previous", "previous": "previous", "prior": "previous", "vorher": "previous", "precedent": "previous",
	}
)

func words(list string) map[string]bool {
	m := map[string]bool{}
	for _, w := range strings.Fields(list) {
		m[w] = true
	}
	return m
}

// parseTone reads a column name such as R500, Right_0.5k or BL_L4000. It returns false if the name holds
// anything else than ear, frequency and words around them.
func parseTone(name string) (tone, bool) {
	var t tone
	list := tokens(name)
	if len(list) > 12 {
		return t, false
	}
	for i := 0; i < len(list); i++ {
		w := list[i]
		if w.number {
			var next string
			if i+1 < len(list) && !list[i+1].number {
				next = list[i+1].text
			}
			rest, ok := t.number(w, next)
			if !ok {
				return t, false
			}
			if rest != next {
				i++
				if rest != "" && !t.words(rest) {
					return t, false
				}
			}
			continue
		}
		if !t.words(w.text) {
			return t, false
		}
	}
	return t, t.hz > 0
}

// number reads a frequency, or the number of a reading behind one. Of the word that follows, it takes a unit away.
func (t *tone) number(w token, next string) (rest string, ok bool) {
	v, err := strconv.ParseFloat(w.text, 64)
	if err != nil {
		return next, false
	}
	if t.hz > 0 {
		if t.reading != 0 || v != 1 && v != 2 {
			return next, false
		}
		t.reading = int(v)
		return next, true
	}
	rest, unit := cutUnit(next)
	switch {
	case unit == "k":
		v *= 1000
	case v >= 125:
	case unit == "" && w.point && (w.text == "5" || w.text == "25" || w.text == "75"):
		for v >= 1 {
			v /= 10
		}
		v, t.kilo = v*1000, true
	case unit == "":
		v, t.kilo = v*1000, true
	}
	t.hz = int(v + 0.5)
	return rest, common(t.hz)
}

// common says whether hearing is commonly tested at the frequency in Hz (ISO 8253-1 and the extended range).
func common(hz int) bool {
	switch hz {
	case 125, 9000, 10000, 11200, 12500, 14000, 16000:
		return true
	}
	return tone{hz: hz}.kept()
}

// cutUnit takes the unit of a frequency from the beginning of a word, if an ear or nothing follows it.
func cutUnit(word string) (rest, unit string) {
	for _, u := range []struct{ text, unit string }{{"khz", "k"}, {"kilohertz", "k"}, {"hertz", "hz"}, {"hz", "hz"}, {"k", "k"}} {
		rest, ok := strings.CutPrefix(word, u.text)
		if ok && (rest == "" || rightWords[rest] || leftWords[rest] || earLetters[rest] || secondly[rest]) {
			return rest, u.unit
		}
	}
	return word, ""
}

// maxRun is the number of letters up to which a run is taken apart.
const maxRun = 24

// words reads a run of letters: a word, or several without anything between them.
func (t *tone) words(run string) bool {
	if t.word(run) {
		return true
	}
	runes := []rune(run)
	if len(runes) > maxRun {
		return false
	}
	for cut := len(runes) - 1; cut > 1; cut-- {
		head, saved := string(runes[:cut]), *t
		if (fillers[head] || partWords[head] != "") && t.word(head) && t.words(string(runes[cut:])) {
			return true
		}
		*t = saved
	}
	return false
}

func (t *tone) word(w string) bool {
	switch {
	case rightWords[w]:
		return t.setEar("right")
	case leftWords[w]:
		return t.setEar("left")
	case earLetters[w]:
		return t.setEar(w)
	case boneWords[w]:
		t.bone = true
	case secondly[w]:
		t.reading = 2
	case partWords[w] != "":
		if t.part != "" && t.part != partWords[w] {
			return false
		}
		t.part = partWords[w]
	default:
		return fillers[w]
	}
	return true
}

func (t *tone) setEar(ear string) bool {
	if t.ear != "" && t.ear != ear {
		return false
	}
	t.ear = ear
	return true
}

// pairs are the letters that stand for right and left in one language, right first.
var pairs = [][2]string{{"r", "l"}, {"d", "g"}, {"d", "s"}, {"d", "i"}, {"d", "e"}, {"h", "v"}, {"p", "l"}}

// settleLetters says which ears single letters mean. It returns nil if they form no known pair.
func settleLetters(letters map[string]bool) map[string]string {
	switch {
	case len(letters) == 1 && letters["r"]:
		return map[string]string{"r": "right"}
	case len(letters) != 2:
		return nil
	}
	for _, p := range pairs {
		if letters[p[0]] && letters[p[1]] {
			return map[string]string{p[0]: "right", p[1]: "left"}
		}
	}
	return nil
}

// splitPart takes the word for baseline, current or previous from the beginning or end of a name.
func splitPart(name string) (part, rest string) {
	list := tokens(name)
	if len(list) < 2 {
		return "", name
	}
	texts := make([]string, len(list))
	for i, w := range list {
		texts[i] = w.text
	}
	last := len(texts) - 1
	if p := partWords[texts[0]]; p != "" {
		return p, strings.Join(texts[1:], " ")
	}
	if p := partWords[texts[last]]; p != "" {
		return p, strings.Join(texts[:last], " ")
	}
	return "", name
}
