package xlsx

import (
	"fmt"
	"strings"

	"github.com/xuri/excelize/v2"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// book is the workbook while it is written.
type book struct {
	file   *excelize.File
	r      *finding.Report
	rows   int // that a sheet holds at most below its head
	sheets int
	styles
}

func newBook(file *excelize.File, r *finding.Report, rows int) (*book, error) {
	s, err := newStyles(file)
	return &book{file: file, r: r, rows: rows, styles: s}, err
}

// sheet is a sheet while its rows are written from top to bottom.
type sheet struct {
	book   *book
	name   string
	out    *excelize.StreamWriter
	row    int
	widths []float64
}

// open begins a sheet with columns of these widths, and sets how it is printed.
func (b *book) open(name string, widths []float64, rows int) (*sheet, error) {
	if b.sheets == 0 {
		if err := b.file.SetSheetName(b.file.GetSheetName(0), name); err != nil {
			return nil, err
		}
	} else if _, err := b.file.NewSheet(name); err != nil {
		return nil, err
	}
	b.sheets++
	if err := b.print(name, len(widths), rows); err != nil {
		return nil, err
	}
	out, err := b.file.NewStreamWriter(name)
	if err != nil {
		return nil, err
	}
	for i, width := range widths {
		if err := out.SetColWidth(i+1, i+1, width); err != nil {
			return nil, err
		}
	}
	return &sheet{book: b, name: name, out: out, widths: widths}, nil
}

const paperA4 = 9

// print sets up the printed page: landscape, as wide as the paper, with what every reader must know at its foot.
func (b *book) print(name string, columns, rows int) error {
	landscape, size, wide, high, fit := "landscape", paperA4, 1, 0, true
	narrow, edge := 0.35, 0.6
	last, err := excelize.CoordinatesToCellName(columns, max(1, rows))
	if err != nil {
		return err
	}
	if err := b.file.SetSheetDimension(name, "A1:"+last); err != nil {
		return err
	}
	if err := b.file.SetSheetProps(name, &excelize.SheetPropsOptions{FitToPage: &fit}); err != nil {
		return err
	}
	if err := b.file.SetPageLayout(name, &excelize.PageLayoutOptions{Orientation: &landscape, Size: &size, FitToWidth: &wide, FitToHeight: &high}); err != nil {
		return err
	}
	if err := b.file.SetPageMargins(name, &excelize.PageLayoutMarginsOptions{Left: &narrow, Right: &narrow, Top: &edge, Bottom: &edge, Header: &narrow, Footer: &narrow}); err != nil {
		return err
	}
	return b.file.SetHeaderFooter(name, &excelize.HeaderFooterOptions{
		OddHeader: "&L" + marginal(b.r.Program, 110) + "&C" + marginal(name, 31) + "&RAs of" + marginal(b.r.AsOf.String(), 11),
		OddFooter: "&L" + marginal(strings.Join(b.r.Cautions[:min(1, len(b.r.Cautions))], ""), 180) + "&RPage &P of &N",
	})
}

// marginal makes a text of so many characters at most for the head or foot of a printed page. There an
// ampersand steers the program, and is written twice to be shown; a digit behind a command would be part of it.
func marginal(text string, most int) string {
	var out []rune
	for _, c := range phrase.Clean(text) {
		next := []rune{c}
		switch {
		case c == '&':
			next = []rune("&&")
		case c > 0xFFFF:
			next = []rune{'\uFFFD'}
		case len(out) == 0 && c >= '0' && c <= '9':
			next = []rune{' ', c}
		}
		if len(out)+len(next) > most {
			return string(out) + "…"
		}
		out = append(out, next...)
	}
	return string(out)
}

// put writes a row of cells. A height of 0 leaves the height to the program that shows it.
func (s *sheet) put(height float64, cells ...any) error {
	s.row++
	return s.out.SetRow(fmt.Sprintf("A%d", s.row), cells, excelize.RowOpts{Height: height})
}

// reference writes a range of a sheet as the names of a workbook want it.
func reference(sheet, from, to string) string {
	return "'" + sheet + "'!" + from + ":" + to
}
