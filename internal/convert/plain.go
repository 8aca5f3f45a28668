package convert

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"golang.org/x/text/unicode/norm"
	"golang.org/x/text/width"
)

// plain writes a text with plain signs: digits of all scripts and full-width characters as ASCII, all kinds
// of blanks as blanks and none at the ends, the minus and dashes as hyphens, curly apostrophes straight, and no
// invisible characters. A text in the form ="text", with which exports keep a spreadsheet from changing it,
// gives what stands between the quotes.
func plain(s string) string {
	s = strings.TrimSpace(s)
	if !isASCII(s) {
		s = strings.TrimSpace(strings.Map(plainRune, width.Fold.String(s)))
	}
	return unwrap(s)
}

func isASCII(s string) bool {
	for i := range len(s) {
		if s[i] >= utf8.RuneSelf {
			return false
		}
	}
	return true
}

func plainRune(r rune) rune {
	switch {
	case r < utf8.RuneSelf:
		return r
	case unicode.IsSpace(r) || unicode.Is(unicode.Zs, r):
		return ' '
	case unicode.Is(unicode.Cf, r):
		return -1
	}
	switch r {
	case '\u2212', '\u2010', '\u2011', '\u2013': // minus, hyphen, no-break hyphen, en dash
		return '-'
	case '\u2018', '\u2019', '\u02bc': // as some locales write between thousands
		return '\''
	}
	if d, ok := digit(r); ok {
		return '0' + d
	}
	return r
}

// digit gives the value of a decimal digit of any script. Unicode puts the ten digits of a script in order,
// zero first, and its table of digits has them in stretches of whole tens.
func digit(r rune) (rune, bool) {
	if !unicode.Is(unicode.Nd, r) {
		return 0, false
	}
	for _, t := range unicode.Nd.R16 {
		if rune(t.Lo) <= r && r <= rune(t.Hi) {
			return (r - rune(t.Lo)) % 10, true
		}
	}
	for _, t := range unicode.Nd.R32 {
		if rune(t.Lo) <= r && r <= rune(t.Hi) {
			return (r - rune(t.Lo)) % 10, true
		}
	}
	return 0, false
}

// unwrap takes ="text" off.
func unwrap(s string) string {
	if len(s) >= 3 && s[0] == '=' && s[1] == '"' && s[len(s)-1] == '"' {
		return strings.TrimSpace(s[2 : len(s)-1])
	}
	return s
}

// tidy writes a text that stays text: full-width characters are made plain, all blanks are blanks and none
// stands at the ends, letters and their accents are one character, and nothing is invisible. Dashes and digits of
// other scripts are kept.
func tidy(s string) string {
	s = strings.TrimSpace(s)
	if !isASCII(s) {
		s = strings.TrimSpace(norm.NFC.String(strings.Map(tidyRune, width.Fold.String(s))))
	}
	return unwrap(s)
}

func tidyRune(r rune) rune {
	switch {
	case unicode.Is(unicode.Zs, r):
		return ' '
	case unicode.Is(unicode.Cf, r):
		return -1
	}
	return r
}

// onlyDigits says whether s is made of ASCII digits, one at least.
func onlyDigits(s string) bool {
	for i := range len(s) {
		if s[i] < '0' || s[i] > '9' {
			return false
		}
	}
	return s != ""
}
