package xlsx

import (
	"bytes"
	"errors"
	"flag"
	"maps"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func sorted[V any](m map[string]V) []string { return slices.Sorted(maps.Keys(m)) }

// The golden files are the cells of workbooks, since the packed bytes may change with the compiler. The flag is
// that of reporttest.
func TestGolden(t *testing.T) {
	for name, r := range map[string]*finding.Report{"sample": sample(), "empty": reporttest.Empty()} {
		got, path := dumped(t, reporttest.Written(t, Format{}, r)), filepath.Join("testdata", name+".cells.txt")
		if flag.Lookup("update").Value.String() == "true" {
			require.NoError(t, os.WriteFile(path, got, 0o644))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.True(t, bytes.Equal(want, got), "%s differs; look at it and run go test with -update\n%s", path, got)
	}
}

func TestPrivate(t *testing.T) { reporttest.Private(t, bare{t: t}) }

// reports are those that most tests look at.
func reports(t *testing.T) map[string]*finding.Report {
	return map[string]*finding.Report{"sample": sample(), "empty": reporttest.Empty(), "health": reporttest.WithHealth(), "demo": reporttest.Demo(t, true)}
}

func TestSameBytes(t *testing.T) {
	first := reporttest.Written(t, Format{}, sample())
	for range 8 {
		require.True(t, bytes.Equal(first, reporttest.Written(t, Format{}, sample())))
	}
}

// serial gives the number that stands for a day, or nothing.
func serial(d calendar.Date) string {
	if !d.Known() {
		return ""
	}
	return strconv.Itoa(int(d - calendar.MustParse("1899-12-30")))
}

func TestEveryFindingIsThereWithTypedDays(t *testing.T) {
	for name, r := range reports(t) {
		f := opened(t, reporttest.Written(t, Format{}, r))
		_, raw := read(t, f, "Register", true)
		_, shown := read(t, f, "Register", false)
		if len(r.Findings) == 0 {
			require.Len(t, raw, 1)
			assert.Contains(t, raw[0]["Status"], "does not mean that all is well")
			continue
		}
		require.Len(t, raw, len(r.Findings), name)
		at := map[string]int{}
		for i, row := range raw {
			at[row["Id"]] = i
		}
		require.Len(t, at, len(r.Findings))
		for _, x := range r.Findings {
			i, ok := at[x.ID]
			require.True(t, ok, x.ID)
			assert.Equal(t, string(x.Status), raw[i]["Status"])
			assert.Equal(t, yesNo(x.Accepted != nil), raw[i]["Accepted"])
			assert.Equal(t, serial(x.Due), raw[i]["Due"])
			assert.Equal(t, serial(x.Done), raw[i]["Fulfilled on"])
			assert.Equal(t, x.Due.String(), shown[i]["Due"])
			assert.Equal(t, x.Done.String(), shown[i]["Fulfilled on"])
			assert.Equal(t, len(x.Evidence), strings.Count(raw[i]["Evidence"], "\n")+min(1, len(x.Evidence)))
			for _, e := range x.Evidence {
				assert.Contains(t, raw[i]["Evidence"], e.Record)
			}
			for _, empty := range []string{"Assigned to", "Done on", "Remark"} {
				assert.Empty(t, raw[i][empty])
			}
		}
	}
}

func TestAcceptedFindingsStandApart(t *testing.T) {
	_, rows := read(t, opened(t, reporttest.Written(t, Format{}, sample())), "Register", false)
	n := len(rows)
	for i, row := range rows {
		assert.Equal(t, yesNo(i >= n-2), row["Accepted"])
	}
	assert.Equal(t, "2026-08-31", rows[n-2]["Accepted until"])
	assert.Equal(t, "plant manager", rows[n-2]["Accepted by"])
	assert.Equal(t, "gap", rows[n-2]["Status"], "acceptance changes no status")
	assert.Empty(t, rows[n-1]["Accepted until"], "accepted without an end")
}

func TestWhatFallsDueStandsByDay(t *testing.T) {
	_, rows := read(t, opened(t, reporttest.Written(t, Format{}, sample())), "Due", false)
	var got [][]string
	for _, row := range rows {
		got = append(got, []string{row["Due"], row["Days left"], row["Within"], row["Accepted"]})
	}
	assert.Equal(t, [][]string{{"2026-07-15", "15", "30 days", "no"}, {"2026-08-01", "32", "60 days", "yes"}, {"2026-12-31", "184", "later", "no"}}, got)
	assert.Equal(t, []string{"30 days", "30 days", "60 days", "90 days", "later"}, []string{within(0), within(30), within(31), within(90), within(91)})
}

func TestHearingHasAColumnOnlyIfTheReportHasIt(t *testing.T) {
	head, _ := read(t, opened(t, reporttest.Written(t, Format{}, sample())), "Register", false)
	assert.NotContains(t, head, "Hearing figures")
	_, rows := read(t, opened(t, reporttest.Written(t, Format{}, reporttest.WithHealth())), "Register", false)
	assert.Equal(t, "left: 11.7 dB\nworking: left: (20 + 25 + 25) / 3 = 23.3 dB", rows[0]["Hearing figures"])
	assert.Empty(t, rows[1]["Hearing figures"])
}

// Four rows a sheet: nothing is lost where a sheet is full.
func TestManyRowsGoToFurtherSheets(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, write(&b, sample(), 4))
	f := opened(t, b.Bytes())
	var ids []string
	for _, sheet := range []string{"Register", "Register 2", "Register 3"} {
		head, rows := read(t, f, sheet, false)
		require.Equal(t, "Status", head[0])
		for _, row := range rows {
			ids = append(ids, row["Id"])
		}
	}
	want := []string{}
	for _, x := range byAcceptance(sample().Findings) {
		want = append(want, x.ID)
	}
	assert.Equal(t, want, ids)
	assert.NotContains(t, f.GetSheetList(), "Register 4")
}

// broken is a writer that takes nothing.
type broken struct{}

func (broken) Write([]byte) (int, error) { return 0, errors.New("the disk is full") }

func TestAFailureToWriteIsTold(t *testing.T) {
	assert.Equal(t, "xlsx", Format{}.Name())
	assert.ErrorContains(t, Format{}.Write(broken{}, sample()), "the disk is full")
}
