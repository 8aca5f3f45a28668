package html

import (
	"bytes"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

var pdfPage = regexp.MustCompile(`/Type\s*/Page\b[^s]`)

func TestBrowserPrints(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	pdf, err := chromedp.Run(p.ctx, chromedp.PrintToPDF(chromedp.PDFPreferCSSPageSize()))
	require.NoError(t, err)
	pages := len(pdfPage.FindAll(pdf, -1))
	t.Logf("%d pages, %d kB", pages, len(pdf)>>10)
	require.True(t, bytes.HasPrefix(pdf, []byte("%PDF-")))
	assert.Greater(t, pages, 20)
	assert.Contains(t, string(pdf), "/StructTreeRoot", "the print is not accessible")
	if dir := os.Getenv("HEARDUTY_SHOTS"); dir != "" {
		require.NoError(t, os.WriteFile(filepath.Join(dir, "report.pdf"), pdf, 0o644))
	}
	text := pdfText(t, pdf)
	if text == "" {
		return
	}
	for _, f := range r.Findings {
		assert.Contains(t, text, f.ID, "a finding is not in print")
	}
	_, register, _ := strings.Cut(text, "Register of findings")
	register, _, _ = strings.Cut(register, "Subjects with findings")
	for sheet := range strings.SplitSeq(register, "\f") {
		if strings.Contains(sheet, "29 CFR") {
			assert.Contains(t, sheet, "Duty and what was found", "a page of the register lacks the heads")
		}
	}
	assert.Greater(t, strings.Count(register, "\f"), 5)
	assert.Contains(t, strings.Join(strings.Fields(text), " "), "It does not say that the law is met.")
}

// pdfText gives the text of a PDF, or nothing if the machine has no pdftotext.
func pdfText(t *testing.T, pdf []byte) string {
	t.Helper()
	if _, err := exec.LookPath("pdftotext"); err != nil {
		t.Log("without pdftotext the text of the print is not looked at")
		return ""
	}
	cmd := exec.Command("pdftotext", "-layout", "-", "-")
	cmd.Stdin = bytes.NewReader(pdf)
	text, err := cmd.Output()
	require.NoError(t, err)
	return string(text)
}

// Paper is white, whatever the screen is, and holds what the screen folds away.
func TestBrowserPrintIsLightAndWhole(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	p.look(794, 1123, "dark", "")
	assert.NotEqual(t, "rgb(255, 255, 255)", of[string](p, "getComputedStyle(document.body).backgroundColor"))
	p.look(794, 1123, "dark", "print")
	of[int](p, `(dispatchEvent(new Event("beforeprint")), 0)`)
	assert.Equal(t, "rgb(255, 255, 255)", of[string](p, "getComputedStyle(document.body).backgroundColor"))
	assert.Equal(t, "rgb(0, 0, 0)", of[string](p, "getComputedStyle(document.body).color"))
	assert.Equal(t, "table-header-group", of[string](p, `getComputedStyle(document.querySelector(".register thead")).display`))
	assert.Equal(t, "none", of[string](p, `getComputedStyle(document.querySelector(".filter")).display`))
	assert.Equal(t, len(r.Findings), of[int](p, `document.querySelectorAll("#rows > tr").length`))
	assert.Zero(t, of[int](p, `document.querySelectorAll("details.subject:not([open])").length`))
	of[int](p, `(dispatchEvent(new Event("afterprint")), 0)`)
	assert.Equal(t, min(shownAtOnce, len(r.Findings)), of[int](p, `document.querySelectorAll("#rows > tr").length`))
	assert.Zero(t, of[int](p, `document.querySelectorAll("details.subject[open]").length`))
}
