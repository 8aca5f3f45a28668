package html

import (
	"encoding/xml"
	"html"
	"io"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

var drawings = regexp.MustCompile(`(?s)<svg.*?</svg>`)

// fitsItsBox reads every drawing as XML and looks whether all it draws lies in its view box.
func fitsItsBox(t require.TestingT, page string) {
	for _, svg := range drawings.FindAllString(page, -1) {
		d := xml.NewDecoder(strings.NewReader(svg))
		d.Strict = true
		var w, h float64
		inside := func(what string, x, y float64) {
			if x < 0 || y < 0 || x > w || y > h {
				assert.Fail(t, "outside the box", "%s at %v, %v of %v by %v\n%s", what, x, y, w, h, svg)
			}
		}
		dx, dy, factor := 0.0, 0.0, 1.0
		for {
			token, err := d.Token()
			if err == io.EOF {
				break
			}
			require.NoError(t, err, svg)
			if end, ok := token.(xml.EndElement); ok && end.Name.Local == "g" {
				dx, dy, factor = 0, 0, 1
			}
			start, ok := token.(xml.StartElement)
			if !ok {
				continue
			}
			at := map[string]string{}
			for _, a := range start.Attr {
				at[a.Name.Local] = a.Value
			}
			n := func(name string) float64 {
				v, err := strconv.ParseFloat(at[name], 64)
				require.NoError(t, err, "%s of %s", name, start.Name.Local)
				return v
			}
			switch start.Name.Local {
			case "svg":
				box := strings.Fields(at["viewBox"])
				require.Len(t, box, 4)
				w, _ = strconv.ParseFloat(box[2], 64)
				h, _ = strconv.ParseFloat(box[3], 64)
				require.Positive(t, w)
				require.Positive(t, h)
			case "g":
				numbers := coordinates.FindAllString(at["transform"], -1)
				require.Len(t, numbers, 3)
				dx, _ = strconv.ParseFloat(numbers[0], 64)
				dy, _ = strconv.ParseFloat(numbers[1], 64)
				factor, _ = strconv.ParseFloat(numbers[2], 64)
				inside("group", dx, dy)
				inside("group", dx+16*factor, dy+16*factor)
			case "text":
				inside("text", n("x"), n("y"))
			case "path":
				walk(t, at["d"], func(x, y float64) { inside("path "+at["class"], dx+x*factor, dy+y*factor) })
			}
		}
	}
}

var (
	commands    = regexp.MustCompile(`[MLHVZmlhvaz][^MLHVZmlhvaz]*`)
	coordinates = regexp.MustCompile(`-?(?:\d+\.?\d*|\.\d+)`)
)

// walk follows path data and visits every point.
func walk(t require.TestingT, d string, visit func(x, y float64)) {
	require.Equal(t, d, strings.Join(commands.FindAllString(d, -1), ""), "an unknown command")
	x, y, x0, y0 := 0.0, 0.0, 0.0, 0.0
	for _, c := range commands.FindAllString(d, -1) {
		var v []float64
		for _, s := range coordinates.FindAllString(c[1:], -1) {
			f, err := strconv.ParseFloat(s, 64)
			require.NoError(t, err)
			_, decimals, _ := strings.Cut(s, ".")
			require.LessOrEqual(t, len(decimals), 2, "decimals of %s", s)
			v = append(v, f)
		}
		step := map[byte]int{'M': 2, 'L': 2, 'm': 2, 'l': 2, 'H': 1, 'V': 1, 'h': 1, 'v': 1, 'a': 7, 'z': 1, 'Z': 1}[c[0]]
		if c[0] == 'z' || c[0] == 'Z' {
			x, y = x0, y0
			continue
		}
		require.Zero(t, len(v)%step, "numbers of %s", c)
		for ; len(v) > 0; v = v[step:] {
			switch c[0] {
			case 'M', 'L':
				x, y = v[0], v[1]
			case 'm', 'l':
				x, y = x+v[0], y+v[1]
			case 'H':
				x = v[0]
			case 'h':
				x += v[0]
			case 'V':
				y = v[0]
			case 'v':
				y += v[0]
			case 'a':
				x, y = x+v[5], y+v[6]
			}
			if c[0] == 'M' || c[0] == 'm' {
				x0, y0 = x, y
			}
			visit(x, y)
		}
	}
}

func drawDay(t *rapid.T, name string) calendar.Date {
	if rapid.IntRange(0, 9).Draw(t, name+" is not known") == 0 {
		return 0
	}
	return onDay("2005-01-01").AddDays(rapid.IntRange(0, 9000).Draw(t, name))
}

var words = rapid.StringMatching(`[a-z<>&"' :,-]{0,20}`)

func TestEverythingStandsInTheTable(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := &finding.Portrait{Subject: finding.Subject{Kind: rapid.SampledFrom([]string{"worker", "group", "instrument", "site"}).Draw(t, "kind"), ID: words.Draw(t, "id")}}
		for range rapid.IntRange(0, 12).Draw(t, "spells") {
			p.Spells = append(p.Spells, finding.Spell{Lane: rapid.SampledFrom([]string{"employment", "exposure", "protector", "group", "other"}).Draw(t, "lane"), From: drawDay(t, "from"), To: drawDay(t, "to"),
				Label: words.Draw(t, "label"), Grade: rapid.SampledFrom([]string{"plain", "action", "limit", "unknown", "?"}).Draw(t, "grade")})
		}
		for range rapid.IntRange(0, 60).Draw(t, "events") {
			p.Events = append(p.Events, finding.Event{Date: drawDay(t, "day"), Lane: rapid.SampledFrom([]string{"test", "calibration", "document", "protector", "x"}).Draw(t, "lane"), Label: words.Draw(t, "label"),
				State: rapid.SampledFrom([]string{"plain", "good", "bad", "?"}).Draw(t, "state"), Record: words.Draw(t, "record"), File: words.Draw(t, "file"), Row: rapid.IntRange(0, 999).Draw(t, "row")})
		}
		var deadlines []*finding.Finding
		for range rapid.IntRange(0, 12).Draw(t, "deadlines") {
			deadlines = append(deadlines, &finding.Finding{ID: "f-1", Duty: words.Draw(t, "duty"), Status: rapid.SampledFrom(finding.Statuses).Draw(t, "status"), Due: drawDay(t, "due")})
		}
		got := string(figureOf(p, deadlines, drawDay(t, "as of")))
		require.NotContains(t, got, "alarm")
		fitsItsBox(t, got)
		if got == "" {
			return
		}
		_, table, _ := strings.Cut(got, "<tbody>")
		require.Equal(t, len(p.Spells)+len(p.Events)+len(deadlines), strings.Count(table, "<tr>"))
		table = html.UnescapeString(table)
		for _, e := range p.Events {
			require.Contains(t, table, "<td>"+dayOr(e.Date)+"<td>"+e.Label)
			if e.Record+placeOf(&e) != "" {
				require.Contains(t, table, "<td>"+e.Record+"<td>"+placeOf(&e))
			}
		}
		for _, s := range p.Spells {
			require.Contains(t, table, "<td>"+spellDays(&s)+"<td>")
			require.Contains(t, table, s.Label)
		}
	})
}

func TestEveryThresholdStandsInTheTable(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := &finding.Portrait{Subject: finding.Subject{Kind: "worker", ID: words.Draw(t, "id")}}
		ear := func() (levels []finding.Level) {
			for _, hz := range []int{125, 500, 750, 2000, 6000, 12500} {
				if rapid.Bool().Draw(t, "has") {
					levels = append(levels, finding.Level{Hz: hz, DB: float64(rapid.IntRange(-30, 140).Draw(t, "dB")), State: rapid.SampledFrom([]string{"measured", "no_response", "not_tested"}).Draw(t, "state")})
				}
			}
			return levels
		}
		for range rapid.IntRange(1, 5).Draw(t, "tests") {
			x := finding.Test{Date: drawDay(t, "day"), Record: words.Draw(t, "record"), Left: ear(), Right: ear()}
			if rapid.Bool().Draw(t, "compared") {
				x.LeftShift = &finding.Shift{DB: 12, Significant: rapid.Bool().Draw(t, "significant"), Hz: []int{2000, 3000}, AgeDB: float64(rapid.IntRange(0, 2).Draw(t, "age"))}
				x.LeftBaseline = p.Subject.ID
			}
			p.Tests = append(p.Tests, x)
		}
		got := string(figureOf(p, nil, madeDay))
		require.NotContains(t, got, "alarm")
		fitsItsBox(t, got)
		_, table, _ := strings.Cut(got, "<tbody>")
		rows := strings.Split(table, "<tr>")[1:]
		require.Len(t, rows, 2*len(p.Tests))
		wanted := 0
		for _, x := range p.Tests {
			wanted += len(x.Left) + len(x.Right)
		}
		filled := 0
		for _, row := range rows {
			cells := strings.Split(row, `<td class="n">`)[1:]
			for _, c := range cells {
				c, _, _ = strings.Cut(c, "<")
				if c = strings.TrimSpace(c); c != "" && !strings.HasSuffix(c, "dB") {
					filled++
				}
			}
		}
		require.Equal(t, wanted, filled, table)
	})
}

// Marks of a lane never hide each other: they stand apart or are one mark with a number.
func TestMarksStandApart(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := &drawing{scale: scale{onDay("2020-01-01"), onDay("2026-01-01"), stripEdge, stripWidth - stripEdge}, seen: map[string]bool{}}
		var list []finding.Event
		for _, n := range rapid.SliceOfN(rapid.IntRange(0, 2190), 1, dense).Draw(t, "days") {
			list = append(list, finding.Event{Date: d.scale.from.AddDays(n), State: rapid.SampledFrom([]string{"plain", "good", "bad"}).Draw(t, "state")})
		}
		slices.SortStableFunc(list, func(a, b finding.Event) int { return int(a.Date - b.Date) })
		d.events("test", list, len(list))
		var at []float64
		for _, s := range d.Shapes {
			for _, c := range strings.Split(s.D, "M")[1:] {
				x, _ := strconv.ParseFloat(coordinates.FindString(c), 64)
				if s.Class == "e good" {
					x += 3.2
				}
				at = append(at, x)
			}
		}
		for i, a := range at {
			for _, b := range at[:i] {
				require.GreaterOrEqual(t, abs(a-b), 8.9)
			}
		}
		shown := len(at)
		for _, n := range d.Texts {
			v, err := strconv.Atoi(n.Text)
			require.NoError(t, err)
			shown += v - 1
		}
		require.Equal(t, len(list), shown)
	})
}

func TestSpread(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		in := rapid.SliceOfN(rapid.Float64Range(0, 100), 0, 12).Draw(t, "places")
		out := spread(in, 10, 0, 100)
		require.Len(t, out, len(in))
		gap := 10.0
		if len(in) > 1 {
			gap = min(gap, 100/float64(len(in)-1))
		}
		for i, a := range out {
			require.True(t, a >= -1e-9 && a <= 100+1e-9, out)
			for j, b := range out[:i] {
				require.GreaterOrEqual(t, abs(a-b), gap-1e-9)
				require.False(t, in[i] > in[j] && a < b || in[i] < in[j] && a > b, "the order is kept")
			}
		}
	})
}

func TestNumber(t *testing.T) {
	for v, want := range map[float64]string{0: "0", -0.001: "0", 1.005: "1", 12.345: "12.35", .5: ".5", -.25: "-.25", 10.5: "10.5", 100: "100", -10: "-10"} {
		assert.Equal(t, want, number(v))
	}
}

func abs(v float64) float64 { return max(v, -v) }
