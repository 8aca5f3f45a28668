package cli

import (
	"bytes"
	"context"
	"io"
	"slices"
	"strings"
	"testing"

	"hearduty/internal/calendar"
)

func testEnv() Env {
	return Env{Context: context.Background(), Today: func() calendar.Date { return calendar.MustParse("2026-06-30") }, Getenv: func(string) string { return "" }}
}

func call(args ...string) (code int, stdout, stderr string) {
	var out, err bytes.Buffer
	code = Main(append([]string{"hearduty"}, args...), strings.NewReader(""), &out, &err, testEnv())
	return code, out.String(), err.String()
}

func TestPermute(t *testing.T) {
	app := (&run{Env: testEnv()}).app()
	for _, c := range [][2]string{
		{"check DIR --site A --all", "check --site A --all -- DIR"},
		{"check --site A DIR --site=B", "check --site A --site=B -- DIR"},
		{"check --all DIR", "check --all -- DIR"},
		{"check -- --all", "check -- --all"},
		{"check DIR --site", "check --site"},
		{"check - --what", "check --what -- -"},
		{"chek DIR --all", "chek DIR --all"},
		{"check", "check --"},
		{"check DIR --all -h --what", "check --help"},
		{"check --site --help", "check --site --help --"},
	} {
		got := permute(app, append([]string{"hearduty"}, strings.Fields(c[0])...))
		if want := append([]string{"hearduty"}, strings.Fields(c[1])...); !slices.Equal(got, want) {
			t.Errorf("%s: got %v, want %v", c[0], got, want)
		}
	}
}

// TestComplete completes every prefix of many lines; nothing may panic, and each line must be reachable.
func TestComplete(t *testing.T) {
	app := (&run{Env: testEnv()}).app()
	var lines []string
	for _, c := range app.Commands {
		lines = append(lines, c.Name)
		for _, f := range c.Flags {
			lines = append(lines, c.Name+" --"+f.Names()[0])
		}
	}
	lines = append(lines, "check --format json", "compare --format html", "sample --format csv", "check --fail-on gap,unproven", "check DIR --fail-on none", "bundle us-osha-general-industry",
		"check --bundle us-osha-general-industry", "completion bash", "help check", "--version", "--help")
	for _, line := range lines {
		words := strings.Split(line, " ")
		last := words[len(words)-1]
		from := 0 // flags are offered after their first dash, statuses one at a time
		if strings.HasPrefix(last, "-") {
			from = 1
		}
		from += strings.LastIndex(last, ",") + 1
		for n := from; n <= len(last); n++ {
			_, out, _ := call(append(append([]string{completeCommand}, words[:len(words)-1]...), last[:n])...)
			if !slices.Contains(strings.Split(out, "\n"), last) {
				t.Errorf("%q: %q is not offered for %q", line, last, last[:n])
			}
		}
	}
	for _, odd := range []string{"", "check -", "check --", "check -- -", "nothing --", "check --fail-on gap,gap,", "check --site \x00", "check -- --fail-on g", "check --all=true --f"} {
		call(append([]string{completeCommand}, strings.Split(odd, " ")...)...)
	}
	call(completeCommand)
}

// TestColour is on only for a terminal that may have it.
func TestColour(t *testing.T) {
	for _, c := range []struct {
		terminal      bool
		noColor, term string
		want          bool
	}{{true, "", "xterm", true}, {true, "1", "xterm", false}, {true, "", "dumb", false}, {false, "", "xterm", false}} {
		env := testEnv()
		env.Terminal = func(io.Writer) (int, bool) { return 100, c.terminal }
		env.Getenv = func(name string) string { return map[string]string{"NO_COLOR": c.noColor, "TERM": c.term}[name] }
		var out, err bytes.Buffer
		code := Main([]string{"hearduty", "bundle", "us-osha-general-industry", "--as-of", "2026-06-30"}, nil, &out, &err, env)
		if code != 0 || strings.Contains(out.String(), "\x1b[") != c.want {
			t.Errorf("%+v: exit code %d, %s", c, code, err.String())
		}
	}
}

// cancelled is a context that has ended already, as after an interrupt.
func cancelled() context.Context {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	return ctx
}
