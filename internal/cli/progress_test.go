package cli

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// reading reads a program of many rows while a clock goes on by step at each look, and gives what stderr shows.
func reading(t *testing.T, step time.Duration, terminal func(w, stderr io.Writer) bool, args ...string) string {
	t.Helper()
	dir := t.TempDir()
	require.NoError(t, os.WriteFile(filepath.Join(dir, "program.yaml"), []byte("program: P\nas_of: 2026-06-30\nsites: [{id: a, bundles: [us-osha-general-industry]}]\nrecords: [tasks.csv]\n"), 0o600))
	var b strings.Builder
	b.WriteString("group,task,minutes\n")
	for i := range 5000 {
		fmt.Fprintf(&b, "g,task %d,10\n", i)
	}
	require.NoError(t, os.WriteFile(filepath.Join(dir, "tasks.csv"), []byte(b.String()), 0o600))
	var out, errs bytes.Buffer
	now := time.Unix(0, 0)
	env := testEnv()
	env.Now = func() time.Time { now = now.Add(step); return now }
	env.Terminal = func(w io.Writer) (int, bool) { return 80, terminal(w, &errs) }
	env.Context = context.Background()
	line := append([]string{"hearduty", args[0], dir}, args[1:]...)
	for i := range line {
		line[i] = strings.ReplaceAll(line[i], "DIR", dir)
	}
	Main(line, strings.NewReader(""), &out, &errs, env)
	return errs.String()
}

func TestProgress(t *testing.T) {
	everywhere := func(_, _ io.Writer) bool { return true }
	stderrOnly := func(w, stderr io.Writer) bool { return w == stderr }
	const clear = "\r\x1b[K"

	got := reading(t, 300*time.Millisecond, stderrOnly, "intake")
	// Looks at the clock: the start at 0.3 s, then one each 1024 rows. The first line may come at 1.3 s.
	assert.Equal(t, clear+"reading tasks.csv: 3072 rows"+clear+"reading tasks.csv: 4096 rows"+clear, got[:strings.LastIndex(got, clear)+len(clear)], "told, told again, and cleared")
	assert.NotContains(t, got[strings.LastIndex(got, clear):], "reading")

	got = reading(t, 700*time.Millisecond, stderrOnly, "check", "--fail-on", "none")
	assert.Equal(t, 4, strings.Count(got, "rows"), "each of the looks after the first second")
	assert.Empty(t, reading(t, 100*time.Millisecond, stderrOnly, "check", "--fail-on", "none"), "nothing within the first second")
	assert.NotContains(t, reading(t, time.Hour, func(_, _ io.Writer) bool { return false }, "intake"), clear, "nothing into a pipe")
	assert.NotContains(t, reading(t, time.Hour, everywhere, "intake"), clear, "nothing where the records are written")
	assert.Contains(t, reading(t, time.Hour, everywhere, "intake", "--out", "DIR/r.ndjson"), clear)
}
