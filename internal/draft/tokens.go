package draft

import (
	"strings"
	"unicode"

	"golang.org/x/text/unicode/norm"
)

// plainLetters writes letters that no accent can be taken from as they are commonly written without it.
var plainLetters = strings.NewReplacer("ø", "o", "ł", "l", "ß", "ss", "æ", "ae", "œ", "oe")

// token is a run of letters or a number in a name.
type token struct {
	text   string
	number bool
	joined bool // nothing stands between it and the token before
	point  bool // a point stands right before it
}

// tokens cuts a name into runs of letters and numbers, in small letters without accents.
func tokens(name string) []token {
	var out []token
	var run []rune
	number, gap, point := false, true, false
	flush := func() {
		if len(run) > 0 {
			out = append(out, token{string(run), number, !gap, point})
			gap, point = false, false
		}
		run = run[:0]
	}
	text := []rune(plainLetters.Replace(strings.ToLower(norm.NFD.String(norm.NFKC.String(name)))))
	for i, c := range text {
		digit := '0' <= c && c <= '9'
		decimal := (c == '.' || c == ',') && number && len(run) > 0 && i+1 < len(text) && '0' <= text[i+1] && text[i+1] <= '9'
		switch {
		case unicode.Is(unicode.Mn, c):
		case digit || unicode.IsLetter(c):
			if len(run) > 0 && digit != number {
				flush()
			}
			run, number = append(run, c), digit
		case decimal:
			run = append(run, '.')
		default:
			flush()
			gap, point = true, c == '.'
		}
	}
	flush()
	return out
}
