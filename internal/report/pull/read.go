package pull

import (
	"errors"
	"fmt"
	"io"
	"regexp"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/grid"
)

var percentForm = regexp.MustCompile(`^\d{1,2}(\.\d{1,4})?$`)

// Read reads a ticked sheet, as CSV or saved as a workbook. Of each row the columns faulty and, if it is filled in,
// file_found count; both hold yes or no.
func Read(path string) (*Result, error) {
	f, err := grid.Open(path, "")
	if err != nil {
		return nil, faulted(path, err)
	}
	defer f.Close()
	rows, err := f.Rows(grid.Options{})
	if err != nil {
		return nil, faulted(path, err)
	}
	defer rows.Close()
	t := ticked{path: path, numbers: map[string]bool{}, result: &Result{}}
	var row grid.Row
	for {
		err := rows.Next(&row)
		if err == io.EOF {
			return t.done()
		}
		if err == nil && row.Fault != nil {
			err = row.Fault
		}
		if err != nil {
			return nil, faulted(path, err)
		}
		if row.NotData != "" || row.Blank() {
			continue
		}
		if err := t.take(&row); err != nil {
			return nil, err
		}
	}
}

func faulted(path string, err error) error {
	var f *grid.Fault
	if errors.As(err, &f) && f.Remedy != "" {
		return fmt.Errorf("%s cannot be read: %s. %s", path, f.Problem, f.Remedy)
	}
	return fmt.Errorf("%s cannot be read: %w", path, err)
}

// ticked is a sheet that is being read.
type ticked struct {
	path    string
	columns map[string]int // nil before the header
	numbers map[string]bool
	open    int // files that nobody has decided on
	result  *Result
}

func (t *ticked) take(row *grid.Row) error {
	if t.columns == nil {
		return t.header(row)
	}
	number := t.cell(row, numberColumn)
	if t.numbers[number] {
		return t.wrong(row, "the number %s stands there twice; keep one row for each file that was drawn", number)
	}
	t.numbers[number] = true
	if err := t.same(row); err != nil {
		return err
	}
	faulty, ok := answer(t.cell(row, faultyColumn))
	found, known := answer(t.cell(row, foundColumn))
	if !ok || !known {
		return t.wrong(row, "%s and %s hold yes or no; correct the cell", faultyColumn, foundColumn)
	}
	if found == "no" {
		t.result.NotFound++
		faulty = "yes"
	}
	words := strings.Trim(t.cell(row, siteColumn)+", "+t.cell(row, exposureColumn), ", ")
	i := slices.IndexFunc(t.result.Parts, func(p Part) bool { return p.Words == words })
	if i < 0 {
		i = len(t.result.Parts)
		t.result.Parts = append(t.result.Parts, Part{Words: words})
	}
	t.result.Parts[i].Drawn++
	switch faulty {
	case "yes":
		t.result.Faulty++
		t.result.Parts[i].Faulty++
	case "":
		t.open++
	}
	return nil
}

// header finds the columns.
func (t *ticked) header(row *grid.Row) error {
	t.columns = map[string]int{}
	for i, text := range row.Texts() {
		t.columns[strings.ToLower(strings.TrimSpace(text))] = i
	}
	for _, name := range []string{numberColumn, faultyColumn, drawnColumn, populationColumn, confidenceColumn, tolerableColumn} {
		if _, ok := t.columns[name]; !ok {
			return fmt.Errorf("%s has no column %s; give the sheet that hearduty sample --format csv has written, with its columns", t.path, name)
		}
	}
	return nil
}

func (t *ticked) cell(row *grid.Row, column string) string {
	i, ok := t.columns[column]
	if !ok || i >= len(row.Cells) {
		return ""
	}
	return strings.TrimSpace(row.Cells[i].Text)
}

// same reads what every row repeats of the draw.
func (t *ticked) same(row *grid.Row) error {
	drawn, err1 := strconv.Atoi(t.cell(row, drawnColumn))
	population, err2 := strconv.Atoi(t.cell(row, populationColumn))
	confidence, ok1 := Percent(pointed(t.cell(row, confidenceColumn)))
	tolerable, ok2 := Percent(pointed(t.cell(row, tolerableColumn)))
	if err1 != nil || err2 != nil || !ok1 || !ok2 || confidence.Sign() == 0 {
		return t.wrong(row, "%s, %s, %s and %s are not as they were drawn; take them from the sheet before it was changed", drawnColumn, populationColumn, confidenceColumn, tolerableColumn)
	}
	r := t.result
	if len(t.numbers) == 1 {
		r.Drawn, r.Population, r.Goal.Confidence, r.Goal.Tolerable = drawn, population, confidence, tolerable
		return nil
	}
	if r.Drawn != drawn || r.Population != population || r.Goal.Confidence.Cmp(confidence) != 0 || r.Goal.Tolerable.Cmp(tolerable) != 0 {
		return t.wrong(row, "the row is of another draw than the first one; give the sheet of one draw")
	}
	return nil
}

// pointed writes a decimal point where a spreadsheet wrote a comma.
func pointed(s string) string { return strings.Replace(s, ",", ".", 1) }

func (t *ticked) wrong(row *grid.Row, format string, args ...any) error {
	return fmt.Errorf("%s, row %d: %s", t.path, row.Line, fmt.Sprintf(format, args...))
}

// done gives the result of a sheet that is complete.
func (t *ticked) done() (*Result, error) {
	switch n := len(t.numbers); {
	case n == 0:
		return nil, fmt.Errorf("%s holds no files; give the sheet that hearduty sample --format csv has written", t.path)
	case n != t.result.Drawn:
		return nil, fmt.Errorf("%s holds %s, but %d were drawn; every one of them counts, also one that was not found (faulty: yes)", t.path, files(n), t.result.Drawn)
	case t.open > 0:
		return nil, fmt.Errorf("in %s the column %s is empty for %s; write yes or no for each, since a sample of which a part was looked at shows nothing", t.path, faultyColumn, files(t.open))
	}
	return t.result, t.result.Check()
}

// answer reads yes or no, also as a spreadsheet may have made of it.
func answer(text string) (string, bool) {
	switch strings.ToLower(text) {
	case "":
		return "", true
	case "yes", "true", "x":
		return "yes", true
	case "no", "false":
		return "no", true
	}
	return "", false
}
