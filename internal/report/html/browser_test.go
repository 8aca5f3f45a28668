package html

import (
	"context"
	"encoding/json"
	"fmt"
	"net/url"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/chromedp/cdproto/emulation"
	"github.com/chromedp/cdproto/network"
	"github.com/chromedp/cdproto/runtime"
	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
)

// The tests of a browser need chromium on the path, or its path in HEARDUTY_BROWSER. Without it they are skipped,
// and fail if HEARDUTY_CI is 1.
var chromium struct {
	once sync.Once
	ctx  context.Context
	stop func()
	err  error
}

func TestMain(m *testing.M) {
	code := m.Run()
	if chromium.stop != nil {
		chromium.stop()
	}
	os.Exit(code)
}

// need skips a test that lacks something of the machine.
func need(t *testing.T, err error) {
	t.Helper()
	if err == nil {
		return
	}
	if os.Getenv("HEARDUTY_CI") == "1" {
		t.Fatalf("with HEARDUTY_CI=1 this test must run: %v", err)
	}
	t.Skip(err)
}

// browser starts the one browser of all tests.
func browser(t *testing.T) context.Context {
	t.Helper()
	chromium.once.Do(func() {
		path := os.Getenv("HEARDUTY_BROWSER")
		for _, name := range []string{"chromium", "chromium-browser", "headless-shell"} {
			if path == "" {
				path, _ = exec.LookPath(name)
			}
		}
		if path == "" {
			chromium.err = fmt.Errorf("no chromium on the path; install it, or give its path in HEARDUTY_BROWSER")
			return
		}
		dir, err := os.MkdirTemp("", "hearduty-browser-")
		if err != nil {
			chromium.err = err
			return
		}
		options := append(chromedp.DefaultExecAllocatorOptions[:], chromedp.ExecPath(path), chromedp.NoSandbox, chromedp.UserDataDir(dir),
			chromedp.Flag("disable-component-update", true), chromedp.Flag("disable-quic", true), chromedp.Flag("lang", "en"))
		ctx, stop := chromedp.NewExecAllocator(context.Background(), options...)
		ctx, cancel := chromedp.NewContext(ctx)
		chromium.ctx, chromium.stop = ctx, func() { cancel(); stop(); os.RemoveAll(dir) }
		if err := chromedp.Do(ctx); err != nil {
			chromium.err = fmt.Errorf("chromium does not start: %w", err)
		}
	})
	need(t, chromium.err)
	return chromium.ctx
}

// tab is a page in the browser. When its test ends it asks whether anything was said on the console, and whether
// anything but the file itself was asked for.
type tab struct {
	t    *testing.T
	ctx  context.Context
	file string

	lock     sync.Mutex
	said     []string
	requests []string
}

// written writes a report into a file of its own.
func written(t *testing.T, r *finding.Report) string {
	t.Helper()
	path := filepath.Join(t.TempDir(), "report.html")
	file, err := os.Create(path)
	require.NoError(t, err)
	require.NoError(t, Format{}.Write(file, r))
	require.NoError(t, file.Close())
	return path
}

// show opens a file from disk in a new tab. The fragment is what follows the # of its address.
func show(t *testing.T, path, fragment string, steps ...chromedp.Action[chromedp.Void]) *tab {
	t.Helper()
	ctx, cancel := chromedp.NewContext(browser(t))
	p := &tab{t: t, file: "file://" + (&url.URL{Path: path}).EscapedPath()}
	require.NoError(t, chromedp.Do(ctx))
	require.NoError(t, chromedp.Listen(ctx, p.listen))
	limited, end := context.WithTimeout(ctx, 2*time.Minute)
	p.ctx = limited
	t.Cleanup(func() { end(); cancel(); p.quiet() })
	_, err := chromedp.Call(p.ctx, network.Enable, network.EnableParams{})
	require.NoError(t, err)
	p.do(append([]chromedp.Action[chromedp.Void]{chromedp.EmulateViewport(1200, 900)}, steps...)...)
	address := p.file
	if fragment != "" {
		address += "#" + fragment
	}
	p.do(chromedp.Navigate(address))
	p.until(`document.documentElement.dataset.ready === "yes" && document.readyState === "complete"`)
	return p
}

func (p *tab) listen(event any) {
	p.lock.Lock()
	defer p.lock.Unlock()
	switch e := event.(type) {
	case *network.EventRequestWillBeSent:
		p.requests = append(p.requests, e.Request.URL)
	case *runtime.EventConsoleAPICalled:
		p.said = append(p.said, fmt.Sprint(e.Type))
	case *runtime.EventExceptionThrown:
		p.said = append(p.said, e.ExceptionDetails.Text)
	default:
		if text := fmt.Sprintf("%T %+v", event, event); strings.HasPrefix(text, "*log.EventEntryAdded") {
			p.said = append(p.said, text)
		}
	}
}

// quiet fails the test if the page complained or asked for anything.
func (p *tab) quiet() {
	p.lock.Lock()
	defer p.lock.Unlock()
	assert.Empty(p.t, p.said, "the console is not empty")
	assert.NotEmpty(p.t, p.requests, "requests were not listened to")
	for _, r := range p.requests {
		if at, _, _ := strings.Cut(r, "#"); at != p.file && !strings.HasPrefix(r, "data:") {
			p.t.Errorf("the page asked for %s", r)
		}
	}
}

func (p *tab) do(steps ...chromedp.Action[chromedp.Void]) {
	p.t.Helper()
	require.NoError(p.t, chromedp.Do(p.ctx, steps...))
}

// of evaluates an expression in the page.
func of[T any](p *tab, expression string) T {
	p.t.Helper()
	v, err := chromedp.Run(p.ctx, chromedp.Evaluate[T](expression))
	require.NoError(p.t, err, expression)
	return v
}

// until waits until an expression is true, for thirty seconds at most.
func (p *tab) until(expression string) {
	p.t.Helper()
	for end := time.Now().Add(30 * time.Second); time.Now().Before(end); time.Sleep(5 * time.Millisecond) {
		if of[bool](p, "!!("+expression+")") {
			return
		}
	}
	p.t.Fatalf("this never came true: %s", expression)
}

// look sets the width and the colours of the screen.
func (p *tab) look(width, height int64, theme, media string) {
	p.t.Helper()
	p.do(chromedp.EmulateViewport(width, height))
	_, err := chromedp.Call(p.ctx, emulation.SetEmulatedMedia, emulation.SetEmulatedMediaParams{Media: media, Features: []*emulation.MediaFeature{{Name: "prefers-color-scheme", Value: theme}}})
	require.NoError(p.t, err)
}

// jsText writes a value as a script would.
func jsText(v any) string {
	text, _ := json.Marshal(v)
	return string(text)
}

// address gives the fragment of the page's address.
func (p *tab) address() string { return of[string](p, "location.hash") }
