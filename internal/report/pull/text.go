package pull

import (
	"bufio"
	"fmt"
	"io"
	"strings"
	"unicode/utf8"

	"hearduty/internal/report/phrase"
)

const defaultWidth = 80

// lines writes wrapped text. The first error of the writer stays with the buffer.
type lines struct {
	*bufio.Writer
	width int
}

func newLines(w io.Writer, width int) *lines {
	if width <= 0 {
		width = defaultWidth
	}
	return &lines{bufio.NewWriter(w), max(width, 40)}
}

// put writes a text: the first line behind a mark, the others as far in as the mark is wide.
func (l *lines) put(mark, text string) { l.units(mark, strings.Split(text, " ")) }

// units writes texts that are not broken within, with a blank between them. A no-break space becomes a plain one.
func (l *lines) units(mark string, units []string) {
	line := mark
	for i, unit := range units {
		unit = strings.ReplaceAll(unit, "\u00a0", " ")
		switch {
		case i == 0:
			line += unit
		case utf8.RuneCountInString(line)+1+utf8.RuneCountInString(unit) <= l.width:
			line += " " + unit
		default:
			l.WriteString(line + "\n")
			line = strings.Repeat(" ", utf8.RuneCountInString(mark)) + unit
		}
	}
	l.WriteString(strings.TrimRight(line, " ") + "\n")
}

func (l *lines) heading(text string) { l.WriteString("\n" + text + "\n") }

func writeText(w io.Writer, s *Sheet, width int) error {
	l := newLines(w, width)
	l.put("", "Worker files to pull by hand: "+phrase.Clean(s.Program))
	l.put("", "As of "+s.AsOf.String())
	l.heading("The sample")
	l.put("  ", fmt.Sprintf("%s, drawn at random from %s", files(len(s.Files)), s.population()))
	l.put("  ", s.promise())
	l.put("  ", s.seed())
	l.heading("From where")
	for _, of := range s.Strata {
		l.put("  - ", fmt.Sprintf("%s, %s: %d of %d", phrase.Clean(of.Site), bandWords[of.Band], of.Drawn, of.Size))
	}
	l.heading("What to check in each file")
	for _, t := range topics {
		l.put("  - ", fmt.Sprintf("%s: %s.", t.Word, t.Ask))
	}
	l.heading("The files")
	next := 0
	for _, of := range s.Strata {
		l.put("  ", fmt.Sprintf("%s (%s), %s", phrase.Clean(of.Site), s.SiteName(of.Site), bandWords[of.Band]))
		for range of.Drawn {
			l.file(&s.Files[next])
			next++
		}
	}
	l.heading("Before you conclude")
	for _, text := range s.cautions() {
		l.put("  - ", text)
	}
	l.put("  - ", "Once every file is looked at: hearduty sample --found FILE, with the ticked sheet in the format csv, or with the numbers: "+
		fmt.Sprintf("hearduty sample --faulty N --of %d --population %d.", len(s.Files), s.Population))
	return l.Flush()
}

// file writes a file with its boxes.
func (l *lines) file(f *File) {
	l.put(fmt.Sprintf("  %3d. ", f.Number), fmt.Sprintf("worker %s (%s)", phrase.Clean(f.Worker), phrase.Place(f.Record.File, f.Record.Sheet, f.Record.Row)))
	var boxes []string
	for _, t := range topics {
		boxes = append(boxes, "[ ] "+strings.ToLower(t.Word))
	}
	l.units("       ", append(boxes, "[ ] file found", "[ ] faulty"))
}
