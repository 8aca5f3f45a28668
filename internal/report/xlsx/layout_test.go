package xlsx

import (
	"encoding/xml"
	"io"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestLayout(t *testing.T) {
	file := reporttest.Written(t, Format{}, sample())
	f := opened(t, file)
	assert.Equal(t, []string{"Summary", "Register", "Due", "Rejects", "Observations", "Observations listed", "Rates", "Law", "Duties", "Files"}, f.GetSheetList())
	names := map[string]string{}
	for _, n := range f.GetDefinedName() {
		names[n.Scope+" "+n.Name] = n.RefersTo
	}
	assert.Equal(t, "'Register'!$A$1:$P$12", names["Register _xlnm.Print_Area"])
	for i, sheet := range f.GetSheetList() {
		layout, err := f.GetPageLayout(sheet)
		require.NoError(t, err)
		assert.Equal(t, []any{"landscape", 9, 1, 0}, []any{*layout.Orientation, *layout.Size, *layout.FitToWidth, *layout.FitToHeight}, sheet)
		foot, err := f.GetHeaderFooter(sheet)
		require.NoError(t, err)
		assert.Contains(t, foot.OddFooter, "reading of the law")
		props, err := f.GetSheetProps(sheet)
		require.NoError(t, err)
		assert.True(t, *props.FitToPage, sheet)
		part := unzipped(t, file)["xl/worksheets/sheet"+strconv.Itoa(i+1)+".xml"]
		if sheet == "Summary" {
			assert.NotContains(t, part, "<autoFilter")
			continue
		}
		panes, err := f.GetPanes(sheet)
		require.NoError(t, err)
		assert.True(t, panes.Freeze && panes.YSplit == 1, sheet)
		assert.Contains(t, part, `<autoFilter ref="$A$1:`)
		assert.Equal(t, "'"+sheet+"'!$1:$1", names[sheet+" _xlnm.Print_Titles"])
	}
}

// Dimensions that are too small make some programs read too little.
func TestDimensionsHoldAllCells(t *testing.T) {
	f := opened(t, reporttest.Written(t, Format{}, sample()))
	for _, sheet := range f.GetSheetList() {
		dimension, err := f.GetSheetDimension(sheet)
		require.NoError(t, err)
		_, last, _ := strings.Cut(dimension, ":")
		columns, rows, err := excelize.CellNameToCoordinates(last)
		require.NoError(t, err)
		all, err := f.GetRows(sheet)
		require.NoError(t, err)
		assert.Len(t, all, rows, sheet)
		for _, row := range all {
			assert.LessOrEqual(t, len(row), columns, sheet)
		}
	}
}

var someTime = regexp.MustCompile(`20\d\d-\d\d-\d\dT[^<"]*`)

func TestPropertiesComeFromTheReport(t *testing.T) {
	for _, c := range []struct {
		r   *finding.Report
		day string
	}{{sample(), "2026-06-30"}, {&finding.Report{}, "2000-01-01"}} {
		parts := unzipped(t, reporttest.Written(t, Format{}, c.r))
		times := someTime.FindAllString(parts["docProps/core.xml"], -1)
		assert.Equal(t, []string{c.day + "T00:00:00Z", c.day + "T00:00:00Z"}, times)
	}
	parts := unzipped(t, reporttest.Written(t, Format{}, sample()))
	assert.Contains(t, parts["docProps/app.xml"], "<Application>hearduty</Application>")
	assert.Contains(t, parts["docProps/core.xml"], "Harrow &amp; Slate &lt;hearing conservation&gt;")
}

// Every part is XML, and nothing points out of the file or runs.
func TestPartsAreHarmless(t *testing.T) {
	for name, r := range reports(t) {
		for part, text := range unzipped(t, reporttest.Written(t, Format{}, r)) {
			assert.NotContains(t, text, "TargetMode", "%s %s", name, part)
			assert.NotRegexp(t, `(?i)vba|macro|externalLink|hyperlink|connections`, part)
			decoder := xml.NewDecoder(strings.NewReader(text))
			for {
				token, err := decoder.Token()
				if err == io.EOF {
					break
				}
				require.NoError(t, err, "%s %s", name, part)
				if start, ok := token.(xml.StartElement); ok {
					require.NotContains(t, []string{"f", "hyperlink", "ddeLink", "oleObject"}, start.Name.Local, "%s %s", name, part)
				}
			}
		}
	}
}
