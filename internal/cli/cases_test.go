package cli

import (
	"bytes"
	"encoding/json"
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

var update = flag.Bool("update", false, "rewrite the golden files")

const intakeCases = "../../testdata/intake"

// TestObservedCases checks those cases of exports whose matter the check observes, not the intake: what is observed,
// and what findings and remarks there are of it, is in the golden file observed.txt of each.
func TestObservedCases(t *testing.T) {
	t.Parallel()
	goldens, err := filepath.Glob(filepath.Join(intakeCases, "*", "observed.txt"))
	require.NoError(t, err)
	require.NotEmpty(t, goldens)
	for _, file := range goldens {
		t.Run(filepath.Base(filepath.Dir(file)), func(t *testing.T) {
			_, out, problems := call("check", filepath.Dir(file), "--all", "--format", "json")
			var r struct {
				Observations []struct {
					Kind, Ear, File, Text string
					Row                   int
					Subject               struct{ Kind, ID string }
				}
				Remarks []string
			}
			require.NoError(t, json.Unmarshal([]byte(out), &r), problems)
			var b bytes.Buffer
			for _, o := range r.Observations {
				fmt.Fprintf(&b, "%s:%d %s %s: %s", o.File, o.Row, o.Subject.Kind, o.Subject.ID, o.Kind)
				if o.Ear != "" {
					fmt.Fprintf(&b, " (%s)", o.Ear)
				}
				fmt.Fprintf(&b, ": %s\n", o.Text)
			}
			for _, text := range r.Remarks {
				fmt.Fprintf(&b, "remark: %s\n", text)
			}
			if *update {
				require.NoError(t, os.WriteFile(file, b.Bytes(), 0o600))
			}
			want, err := os.ReadFile(file)
			require.NoError(t, err)
			require.Equal(t, string(want), b.String())
		})
	}
}

// TestCasesShowNothingPrivate is case 27 of the exports: no report of check repeats a name, a date of birth or a threshold,
// whatever is wrong with their cells and columns.
func TestCasesShowNothingPrivate(t *testing.T) {
	t.Parallel()
	private := map[string][]string{
		"27_private_cells": {
			"PERSON", "1980-01-02", "31/11/1971", "17-05-92", "1992-05-17", "2031-05-17", "1979-08-21", "1978-08-22", // names and dates of birth
			"173", "117", "1O", "37x", "37.77", "73x", "41000", " 41", ": 43", " 47", " 53", " 59", " 61", " 67", " 71", " 83", // thresholds, and a frequency
		},
		"03_reused_id":   {"PERSON", "1959-07-01", "1994-03-02"},
		"b2_1_wide_rows": {"PERSON", "1980-01-02", "1971-11-30", "1992-05-17", "02/01/1980", "30/11/1971", "17/05/1992"},
	}
	for name, texts := range private {
		dir := filepath.Join(intakeCases, name)
		for _, args := range [][]string{{"--format", "text"}, {"--format", "json"}, {"--format", "text", "--all"}, {"--format", "json", "--all"}} {
			code, out, problems := call(append([]string{"check", dir, "--width", "1000"}, args...)...)
			require.Contains(t, []int{0, 1}, code, problems)
			records, _, _ := strings.Cut(out, "\nCautions\n")
			if args[1] == "json" {
				records = ownParts(t, out)
			}
			records = digests.ReplaceAllString(records, "")
			require.Contains(t, records, ".csv")
			for _, text := range texts {
				require.NotContains(t, records+problems, text, "%s %v", name, args)
			}
		}
	}
}

// digests are made of digits that may look like a threshold.
var digests = regexp.MustCompile(`"sha256": ?"[0-9a-f]*"|\bf-[0-9a-f]+`)

// ownParts takes what a report says of the law out of it, since numbers of the law may look like a threshold.
func ownParts(t *testing.T, report string) string {
	t.Helper()
	var parts map[string]json.RawMessage
	require.NoError(t, json.Unmarshal([]byte(report), &parts))
	var b strings.Builder
	for _, name := range []string{"inputs", "rejects", "remarks", "observations", "findings"} {
		b.Write(parts[name])
	}
	return b.String()
}
