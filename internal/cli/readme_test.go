package cli

import (
	"bytes"
	"os"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// TestReadmeShowsRealOutput holds the sample in the README to what its first command prints, and the
// finding that it explains to the program.
func TestReadmeShowsRealOutput(t *testing.T) {
	t.Chdir("../..")
	readme, err := os.ReadFile("README.md")
	require.NoError(t, err)
	blocks := regexp.MustCompile("(?s)```\\w*\n(.*?)```").FindAllStringSubmatch(string(readme), -1)
	require.Greater(t, len(blocks), 2)
	commands, sample, explain := blocks[0][1], blocks[1][1], blocks[2][1]

	require.Contains(t, commands, "go run ./cmd/hearduty check testdata/demo\n")
	printed, code := runHere(t, "check", "testdata/demo")
	assert.Equal(t, exitFound, code)
	for line := range strings.Lines(sample) {
		if strings.TrimSpace(line) != "..." {
			assert.Contains(t, printed, line, "the README shows a line that the program does not print")
		}
	}

	id := regexp.MustCompile(`explain (f-[0-9a-f]+) testdata/demo`).FindStringSubmatch(explain)
	require.NotNil(t, id)
	assert.Contains(t, sample, id[1])
	printed, code = runHere(t, "explain", id[1], "testdata/demo")
	assert.Equal(t, exitClean, code)
	assert.Contains(t, printed, "What the duty asks")
}

// TestReadmeNamesRealCommands asks for every command and flag that the README names.
func TestReadmeNamesRealCommands(t *testing.T) {
	readme, err := os.ReadFile("../../README.md")
	require.NoError(t, err)
	app := (&run{Env: OS()}).app()
	var flags []string
	for _, c := range app.Commands {
		for _, f := range c.Flags {
			flags = append(flags, f.Names()...)
		}
	}
	for _, m := range regexp.MustCompile("`hearduty ([a-z]+)").FindAllStringSubmatch(string(readme), -1) {
		assert.NotNil(t, app.Command(m[1]), m[0])
	}
	for _, m := range regexp.MustCompile("--([a-z][a-z-]*)").FindAllStringSubmatch(string(readme), -1) {
		assert.Contains(t, flags, m[1])
	}
}

func runHere(t *testing.T, args ...string) (stdout string, code int) {
	t.Helper()
	var out, errs bytes.Buffer
	code = Main(append([]string{"hearduty"}, args...), strings.NewReader(""), &out, &errs, Env{
		Getenv: func(string) string { return "" }, Today: OS().Today,
		Terminal: OS().Terminal,
	})
	return out.String(), code
}
