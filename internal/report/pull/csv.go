package pull

import (
	"encoding/csv"
	"io"
	"strconv"
	"strings"

	"hearduty/internal/report/phrase"
)

// The columns that are read again once the sheet is ticked.
const (
	numberColumn     = "number"
	faultyColumn     = "faulty"
	foundColumn      = "file_found"
	siteColumn       = "site"
	exposureColumn   = "exposure_band"
	drawnColumn      = "sample"
	populationColumn = "population"
	confidenceColumn = "confidence_percent"
	tolerableColumn  = "tolerable_percent"
)

// writeCSV writes the sheet for a spreadsheet, a row a file: the columns to fill in are empty. Each row says from how
// many files how many were drawn, so that the ticked sheet needs nothing beside it.
func writeCSV(w io.Writer, s *Sheet, _ int) error {
	if _, err := io.WriteString(w, "\ufeff"); err != nil {
		return err
	}
	out := csv.NewWriter(w)
	out.UseCRLF = true
	header := []string{numberColumn, siteColumn, exposureColumn, "worker", "record"}
	for _, t := range topics {
		header = append(header, t.Column)
	}
	header = append(header, foundColumn, faultyColumn, "remark", drawnColumn, populationColumn, confidenceColumn, tolerableColumn, "seed", "as_of")
	if err := out.Write(header); err != nil {
		return err
	}
	same := []string{strconv.Itoa(len(s.Files)), strconv.Itoa(s.Population), strings.TrimSuffix(plainPercent(s.Goal.Confidence), unit),
		strings.TrimSuffix(plainPercent(s.Goal.Tolerable), unit), strconv.FormatUint(s.Seed, 10), s.AsOf.String()}
	for _, f := range s.Files {
		row := []string{strconv.Itoa(f.Number), guard(f.Site), bandWords[f.Band], guard(f.Worker), guard(phrase.Place(f.Record.File, f.Record.Sheet, f.Record.Row))}
		row = append(row, make([]string, len(topics)+3)...)
		if err := out.Write(append(row, same...)); err != nil {
			return err
		}
	}
	out.Flush()
	return out.Error()
}

// guard puts an apostrophe before a text that a spreadsheet program could run as a formula.
func guard(text string) string {
	text = phrase.Clean(text)
	rest := strings.TrimLeft(text, " \u00a0\u3000'\uFFFD")
	if rest != "" && strings.ContainsRune("=+-@＝＋－＠", []rune(rest)[0]) {
		return "'" + text
	}
	return text
}
