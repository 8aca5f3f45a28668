package cli

import (
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// TestComparisonHoldsNoAudiometricFigures, even of reports that hold them.
func TestComparisonHoldsNoAudiometricFigures(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	births, figures := privateTexts(t, dir)
	old, latest := filepath.Join(t.TempDir(), "old.json"), filepath.Join(t.TempDir(), "new.json")
	for file, day := range map[string]string{old: "2025-09-30", latest: "2026-06-30"} {
		_, _, _ = call("check", dir, "--as-of", day, "--all", "--format", "json", "--health-detail", "--out", file)
	}
	for _, format := range []string{"text", "json", "html"} {
		code, out, errs := call("compare", old, latest, "--format", format, "--width", "1000")
		require.Equal(t, exitFound, code, errs)
		require.Greater(t, strings.Count(out, "shift-notice"), 0)
		assert.Empty(t, audiometric.FindString(out), format)
		for _, text := range append(births, figures...) {
			if text != "" && strings.Contains(out, text) {
				t.Errorf("the comparison as %s shows %q", format, text)
			}
		}
	}
}
