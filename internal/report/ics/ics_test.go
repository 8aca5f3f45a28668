package ics

import (
	"bufio"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

// property is a content line, unfolded, cut at its first colon.
type property struct{ name, value string }

// unfold reads content lines by the rules of RFC 5545, section 3.1, and complains of what breaks them.
func unfold(t require.TestingT, s string) []property {
	require.True(t, utf8.ValidString(s))
	require.True(t, strings.HasSuffix(s, "\r\n"))
	require.Equal(t, strings.Count(s, "\n"), strings.Count(s, "\r\n"))
	require.Equal(t, strings.Count(s, "\r"), strings.Count(s, "\r\n"))
	var whole []string
	for l := range strings.SplitSeq(strings.TrimSuffix(s, "\r\n"), "\r\n") {
		require.LessOrEqual(t, len(l), 75, l)
		require.True(t, utf8.ValidString(l), "a fold cuts a character: %q", l)
		if more, ok := strings.CutPrefix(l, " "); ok {
			whole[len(whole)-1] += more
			continue
		}
		whole = append(whole, l)
	}
	var out []property
	for _, l := range whole {
		name, value, ok := strings.Cut(l, ":")
		require.True(t, ok, l)
		out = append(out, property{name, value})
	}
	return out
}

// unescape undoes the escapes of a text, RFC 5545, section 3.3.11, and complains of any other.
func unescape(t require.TestingT, s string) string {
	var b strings.Builder
	for i := 0; i < len(s); i++ {
		switch c := s[i]; {
		case c == '\\':
			i++
			require.Less(t, i, len(s))
			require.Contains(t, `\;,nN`, string(s[i]))
			b.WriteString(map[bool]string{true: "\n", false: string(s[i])}[s[i] == 'n' || s[i] == 'N'])
		default:
			require.NotContains(t, ";,", string(c))
			b.WriteByte(c)
		}
	}
	return b.String()
}

// events reads a calendar back.
func events(t *testing.T, r *finding.Report) []map[string]string {
	t.Helper()
	var out []map[string]string
	depth := []string{}
	for _, p := range unfold(t, string(reporttest.Written(t, Format{}, r))) {
		switch p.name {
		case "BEGIN":
			depth = append(depth, p.value)
			if p.value == "VEVENT" {
				out = append(out, map[string]string{})
			}
		case "END":
			require.Equal(t, depth[len(depth)-1], p.value)
			depth = depth[:len(depth)-1]
		default:
			if len(depth) == 2 {
				require.Empty(t, out[len(out)-1][p.name], "%s twice", p.name)
				out[len(out)-1][p.name] = p.value
			}
		}
	}
	require.Empty(t, depth)
	return out
}

func TestAnEventForEachFindingThatIsDue(t *testing.T) {
	for name, r := range map[string]*finding.Report{"odd": reporttest.Odd(), "demo": reporttest.Demo(t, false), "empty": reporttest.Empty()} {
		got := events(t, r)
		i := 0
		for _, f := range r.Findings {
			if f.Status != finding.Due {
				continue
			}
			e := got[i]
			i++
			assert.Equal(t, f.ID+"@hearduty", e["UID"])
			assert.Equal(t, strings.ReplaceAll(f.Due.String(), "-", ""), e["DTSTART;VALUE=DATE"])
			assert.Equal(t, "20260630T000000Z", e["DTSTAMP"], "the stamp is the as-of day, not the clock")
			assert.Contains(t, unescape(t, e["DESCRIPTION"]), f.ID)
			for _, needed := range []string{"SUMMARY", "DTEND;VALUE=DATE", "SEQUENCE", "CATEGORIES", "CLASS"} {
				assert.NotEmpty(t, e[needed], "%s of %s", needed, name)
			}
		}
		assert.Len(t, got, i, name)
	}
}

func TestWordsOfAnEvent(t *testing.T) {
	e := events(t, reporttest.Odd())[0]
	assert.Equal(t, "Annual audiogram due: worker 000124 (kiln-hill)", unescape(t, e["SUMMARY"]))
	assert.Equal(t, "Not yet done; the last day is 2026-07-15, in 15 days.\n"+
		"What to do: @do <it> now; \"please\".\n"+
		"29 CFR 1910.95, for a test (us-osha-general-industry)\n"+
		"Record: audiogram/A-0225 records/audiograms.csv:367\n"+
		"As of 2026-06-30; finding f-2f67bb9523ff0bba.\n"+
		"A bundle is a reading of the law. Local codes govern, and licensed professionals decide.", unescape(t, e["DESCRIPTION"]))
	assert.Equal(t, "20260716", e["DTEND;VALUE=DATE"], "the end is the day after")
	assert.Contains(t, unescape(t, events(t, reporttest.Odd())[2]["DESCRIPTION"]), "Accepted by the employer")
}

func TestADayThatIsNotKnownGivesNoEvent(t *testing.T) {
	r := reporttest.Odd()
	for i := range r.Findings {
		r.Findings[i].Due = calendar.Date(0)
	}
	assert.Empty(t, events(t, r))
}

func TestALaterRunKeepsTheIdentifiers(t *testing.T) {
	r := reporttest.Odd()
	before := events(t, r)[0]
	r.AsOf = r.AsOf.AddDays(1)
	r.Findings[5].Evidence[0].Row++
	after := events(t, r)[0]
	assert.Equal(t, before["UID"], after["UID"])
	assert.Less(t, before["DTSTAMP"], after["DTSTAMP"])
}

func TestAnyTextComesBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		list := rapid.SliceOfN(rapid.String(), 1, 4).Draw(t, "texts")
		var b strings.Builder
		out := &lines{bufio.NewWriter(&b)}
		out.line("DESCRIPTION", paragraphs(list))
		require.NoError(t, out.w.Flush())
		got := unfold(t, b.String())
		require.Len(t, got, 1)
		back := strings.Split(unescape(t, got[0].value), "\n")
		require.Len(t, back, len(list))
		for i, s := range list {
			require.Equal(t, utf8.RuneCountInString(s), utf8.RuneCountInString(back[i]))
			if !strings.ContainsFunc(s, func(c rune) bool { return c != ' ' && (c < '!' || c > '~') }) {
				require.Equal(t, s, back[i])
			}
			require.False(t, strings.ContainsFunc(back[i], func(c rune) bool { return c < ' ' || c == 0x7f }))
		}
	})
}

func TestFoldsAreFull(t *testing.T) {
	var b strings.Builder
	out := &lines{bufio.NewWriter(&b)}
	out.line("X", strings.Repeat("a", 73))
	out.line("X", strings.Repeat("a", 74))
	out.line("X", strings.Repeat("é", 73))
	require.NoError(t, out.w.Flush())
	var lengths []int
	for l := range strings.SplitSeq(strings.TrimSuffix(b.String(), "\r\n"), "\r\n") {
		lengths = append(lengths, len(l))
	}
	assert.Equal(t, []int{75, 75, 2, 74, 75}, lengths)
}
