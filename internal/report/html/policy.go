package html

import (
	"crypto/sha256"
	"encoding/base64"
)

// style is the whole style sheet of the page.
func style() string { return styleText + figureStyle }

// policy lets the browser load nothing, and run and apply only this page's own script and style sheet, which it
// knows by their digests.
func policy() string {
	return "default-src 'none'; script-src " + digest(scriptText) + "; style-src " + digest(style()) + "; img-src data:; base-uri 'none'; form-action 'none'"
}

func digest(text string) string {
	sum := sha256.Sum256([]byte(text))
	return "'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "'"
}
