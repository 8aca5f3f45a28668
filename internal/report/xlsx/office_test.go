package xlsx

import (
	"context"
	"encoding/csv"
	"os"
	"os/exec"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
	"hearduty/internal/report/reporttest"
)

// allSheets asks for all sheets as UTF-8 with commas, quotes around texts, and cells as they are shown
// (help of the office suite, "CSV Filter Parameters", tokens 1 to 12).
const allSheets = `csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1`

// converted opens workbooks in an office suite and gives their sheets, NAME-SHEET, as that shows them.
func converted(t *testing.T, reports map[string]*finding.Report) map[string][]map[string]string {
	t.Helper()
	office, err := exec.LookPath("soffice")
	if err != nil {
		const why = "soffice was not found, so no other program has opened the workbook; install libreoffice-calc"
		if os.Getenv("HEARDUTY_CI") == "1" {
			t.Fatal(why)
		}
		t.Skip(why)
	}
	dir := t.TempDir()
	arguments := []string{"-env:UserInstallation=file://" + filepath.Join(dir, "profile"), "--headless", "--convert-to", allSheets, "--outdir", dir}
	for _, name := range sorted(reports) {
		path := filepath.Join(dir, name+".xlsx")
		require.NoError(t, os.WriteFile(path, reporttest.Written(t, Format{}, reports[name]), 0o644))
		arguments = append(arguments, path)
	}
	ctx, cancel := context.WithTimeout(t.Context(), 3*time.Minute)
	defer cancel()
	command := exec.CommandContext(ctx, office, arguments...)
	command.WaitDelay = 10 * time.Second
	said, err := command.CombinedOutput()
	require.NoError(t, err, string(said))
	paths, err := filepath.Glob(filepath.Join(dir, "*.csv"))
	require.NoError(t, err)
	sheets := map[string][]map[string]string{}
	for _, path := range paths {
		sheets[strings.TrimSuffix(filepath.Base(path), ".csv")] = rowsOf(t, path)
	}
	return sheets
}

func rowsOf(t *testing.T, path string) (rows []map[string]string) {
	t.Helper()
	file, err := os.Open(path)
	require.NoError(t, err)
	defer file.Close()
	reader := csv.NewReader(file)
	reader.FieldsPerRecord = -1
	all, err := reader.ReadAll()
	require.NoError(t, err, path)
	for _, cells := range all[1:] {
		row := map[string]string{}
		for i, cell := range cells {
			row[all[0][i]] = cell
		}
		rows = append(rows, row)
	}
	return rows
}

// Another program reads the same rows, days and texts.
func TestAnotherProgramReadsTheSame(t *testing.T) {
	reports := map[string]*finding.Report{"sample": sample(), "demo": reporttest.Demo(t, false)}
	sheets := converted(t, reports)
	for name, r := range reports {
		rows := sheets[name+"-Register"]
		require.Len(t, rows, len(r.Findings), name)
		for i, x := range byAcceptance(r.Findings) {
			for column, want := range map[string]string{"Id": x.ID, "Status": string(x.Status), "Subject": phrase.Clean(x.Subject.ID), "Due": x.Due.String(), "Fulfilled on": x.Done.String(),
				"Finding": phrase.Sentence(x.Message), "Accepted": yesNo(x.Accepted != nil), "Evidence": clean(evidenceOf(x.Evidence)...)} {
				assert.Equal(t, want, rows[i][column], "%s, row %d, %s", name, i+2, column)
			}
		}
		files, law := sheets[name+"-Files"], sheets[name+"-Law"]
		require.Len(t, files, len(r.Inputs))
		for i, in := range r.Inputs {
			assert.Equal(t, []string{in.SHA256, strconv.Itoa(in.Rows)}, []string{files[i]["SHA-256"], files[i]["Rows"]})
		}
		require.Len(t, law, len(r.Parameters))
		for i, p := range r.Parameters {
			assert.Equal(t, []string{p.From, p.To}, []string{law[i]["In force from"], law[i]["No longer from"]})
		}
	}
}
