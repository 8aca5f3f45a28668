package draft

import "unicode"

// textScore is higher the more the characters beyond ASCII look like those of a language.
func textScore(s string) int {
	score := 0
	before := ' '
	for _, r := range s {
		switch {
		case r < 0x80 && !(latinLetter(r) && eastern(before)):
		case r == unicode.ReplacementChar, r >= 0x2500 && r < 0x2600, r >= 0x80 && r < 0xa0:
			score -= 5
		case eastern(r) && latinLetter(before), latinLetter(r) && eastern(before):
			score -= 3
		case unicode.Is(unicode.Han, r), unicode.Is(unicode.Hiragana, r), unicode.Is(unicode.Katakana, r) && r < 0xff00:
			score += 2
		case unicode.IsUpper(r) && unicode.IsLower(before):
			score -= 3
		case unicode.Is(unicode.Latin, r), unicode.Is(unicode.Cyrillic, r):
			score++
		case r != '°' && r != 'º' && r != 'ª' && r != '\u00a0':
			score--
		}
		before = r
	}
	return score
}

func latinLetter(r rune) bool { return r < 0x80 && unicode.IsLetter(r) }

func eastern(r rune) bool { return unicode.In(r, unicode.Han, unicode.Hiragana, unicode.Katakana) }
