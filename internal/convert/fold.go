package convert

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"golang.org/x/text/unicode/norm"
)

// Fold gives a text in the form in which headers and words are compared: NFKC, lower case, without accents, with
// one blank for each run of blanks and signs, and none at the ends. 0.5k and 0.5 kHz stay distinct from 5k.
//
// A point or comma before a digit is kept as a point where a number can have it, and so are signs of comparison
// and of negative numbers at the beginning of a text. A text of signs only, such as + or the sign of a sex,
// keeps them. Accents are taken from Latin and Greek letters only; in other scripts they make other letters.
func Fold(s string) string {
	if folded(s) {
		return s
	}
	text := []rune(strings.TrimSpace(norm.NFKC.String(lower(norm.NFKC.String(s)))))
	var b strings.Builder
	b.Grow(len(s))
	gap := false
	start := leading(text)
	for _, r := range text[:start] {
		b.WriteRune(plainRune(r))
	}
	for i, r := range text {
		point := i >= start && (r == '.' || r == ',') && pointAt(text, i)
		if i < start || !point && !isWord(r) {
			gap = i >= start
			continue
		}
		if gap && b.Len() > start {
			b.WriteByte(' ')
		}
		gap = false
		switch {
		case !point:
			b.WriteRune(r)
		case digitAt(text, i-1):
			b.WriteByte('.')
		default:
			b.WriteString("0.")
		}
	}
	if b.Len() == 0 {
		return strings.Join(strings.Fields(string(text)), " ")
	}
	return b.String()
}

// folded says whether an ASCII text is in the form of Fold already. It may miss some that are.
func folded(s string) bool {
	for i := range len(s) {
		c := s[i]
		switch {
		case 'a' <= c && c <= 'z' || '0' <= c && c <= '9':
		case c == ' ' && i > 0 && i < len(s)-1 && s[i-1] != ' ':
		default:
			return false
		}
	}
	return true
}

// lower makes letters small and takes the accents off Latin and Greek ones.
func lower(s string) string {
	var b strings.Builder
	b.Grow(len(s))
	for _, r := range s {
		switch {
		case r < utf8.RuneSelf:
			b.WriteRune(unicode.ToLower(r))
			continue
		case isAccent(r) || unicode.Is(unicode.Cf, r):
			continue
		case unicode.In(r, unicode.Latin, unicode.Greek):
			for _, d := range norm.NFD.String(string(r)) {
				if !isAccent(d) {
					b.WriteString(letter(unicode.ToLower(d)))
				}
			}
			continue
		}
		if d, ok := digit(r); ok {
			r = '0' + d
		}
		b.WriteRune(unicode.ToLower(r))
	}
	return b.String()
}

func isAccent(r rune) bool { return 0x300 <= r && r <= 0x36f }

// letter writes letters that have no accent to take off as they are commonly written without them.
func letter(r rune) string {
	switch r {
	case 'ß':
		return "ss"
	case 'ı':
		return "i"
	case 'ł':
		return "l"
	case 'ø':
		return "o"
	case 'đ', 'ð':
		return "d"
	case 'æ':
		return "ae"
	case 'œ':
		return "oe"
	case 'þ':
		return "th"
	case 'ς':
		return "σ"
	}
	return string(r)
}

func isWord(r rune) bool { return unicode.In(r, unicode.L, unicode.M, unicode.N) }

func digitAt(text []rune, i int) bool {
	return i >= 0 && i < len(text) && '0' <= text[i] && text[i] <= '9'
}

// pointAt says whether the point or comma at i belongs to a number, as in 0.5 and .5, but not in R.500.
func pointAt(text []rune, i int) bool {
	return digitAt(text, i+1) && (i == 0 || digitAt(text, i-1) || !isWord(text[i-1]))
}

// leading counts the signs that belong to a number at the beginning of a text, as in -1, <80 or >=100.
func leading(text []rune) int {
	for i := 0; i < len(text); i++ {
		if digitAt(text, i) || text[i] == '.' && digitAt(text, i+1) {
			return i
		}
		if !strings.ContainsRune("-+<>=≤≥\u2212±~", text[i]) {
			break
		}
	}
	return 0
}
