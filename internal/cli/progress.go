package cli

import (
	"context"
	"fmt"
	"strings"
	"time"
	"unicode"

	"hearduty/internal/intake"
)

// When the progress of reading is told.
const (
	quietFirst = time.Second
	quietSince = 200 * time.Millisecond
)

// progress tells on stderr how far the reading is, if that is a terminal on which nothing else is written.
func (r *run) progress(ctx context.Context, toStdout bool) context.Context {
	if r.Terminal == nil || r.Now == nil {
		return ctx
	}
	columns, ok := r.Terminal(r.stderr)
	if _, shared := r.Terminal(r.stdout); !ok || shared && toStdout {
		return ctx
	}
	line := progressLine{run: r, columns: columns, next: r.Now().Add(quietFirst)}
	return intake.WithProgress(ctx, line.tell)
}

// progressLine is the line on which the progress stands.
type progressLine struct {
	*run
	columns int
	next    time.Time
	shown   bool
}

func (p *progressLine) tell(file string, rows int) {
	if file == "" {
		if p.shown {
			fmt.Fprint(p.stderr, "\r\x1b[K")
			p.shown = false
		}
		return
	}
	now := p.Now()
	if now.Before(p.next) {
		return
	}
	p.next, p.shown = now.Add(quietSince), true
	text := []rune(fmt.Sprintf("reading %s: %d rows", printable(file), rows))
	if most := max(p.columns-1, 20); len(text) > most {
		text = text[len(text)-most:]
	}
	fmt.Fprintf(p.stderr, "\r\x1b[K%s", string(text))
}

// printable leaves out of a name what could steer a terminal.
func printable(s string) string {
	return strings.Map(func(c rune) rune {
		if unicode.IsControl(c) || unicode.In(c, unicode.Bidi_Control) {
			return -1
		}
		return c
	}, s)
}
