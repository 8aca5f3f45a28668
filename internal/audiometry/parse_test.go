package audiometry_test

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

func TestParseThreshold(t *testing.T) {
	measured := func(tenths int16) audiometry.Threshold {
		return audiometry.Threshold{Tenths: tenths, State: audiometry.Measured}
	}
	noResponse := func(tenths int16) audiometry.Threshold {
		return audiometry.Threshold{Tenths: tenths, State: audiometry.NoResponse}
	}
	for text, want := range map[string]struct {
		threshold audiometry.Threshold
		written   string
	}{
		"":           {audiometry.Threshold{}, ""},
		"  ":         {audiometry.Threshold{}, ""},
		"0":          {measured(0), "0"},
		"-0":         {measured(0), "0"},
		"25":         {measured(250), "25"},
		" 25 ":       {measured(250), "25"},
		"025":        {measured(250), "25"},
		"-5":         {measured(-50), "-5"},
		"\u22125":    {measured(-50), "-5"},
		"-0.5":       {measured(-5), "-0.5"},
		"12.5":       {measured(125), "12.5"},
		"12.50":      {measured(125), "12.5"},
		"12.0":       {measured(120), "12"},
		"-20":        {measured(-200), "-20"},
		"130":        {measured(1300), "130"},
		"NT":         {audiometry.Threshold{State: audiometry.NotTested}, "NT"},
		"nt":         {audiometry.Threshold{State: audiometry.NotTested}, "NT"},
		"NR>100":     {noResponse(1000), "NR>100"},
		"nr>92.5":    {noResponse(925), "NR>92.5"},
		"NR>\u22125": {noResponse(-50), "NR>-5"},
	} {
		got, err := audiometry.ParseThreshold(text)
		require.NoError(t, err, "%q", text)
		assert.Equal(t, want.threshold, got, "%q", text)
		assert.Equal(t, want.written, got.String(), "%q", text)
	}
}

func TestParseThresholdErrors(t *testing.T) {
	const (
		letterO  = "it has the letter O where the digit 0 belongs"
		outside  = "is outside -20 to 130 dB HL; check it for a slipped digit"
		comma    = "write the decimals after a point, not a comma"
		decimals = "write a number with one decimal at most"
		response = "write no response up to 100 dB as NR>100"
		level    = "does not name the highest level presented; write it like NR>100"
		other    = "write a number such as 25, NR>100 for no response, NT for not tested, or nothing"
	)
	for text, want := range map[string]string{
		"1O": letterO, "o": letterO, "-1o.5": letterO, "NR>1OO": letterO,
		"200": outside, "-20.1": outside, "130.1": outside, "250": outside, "NR>200": outside,
		"99999999999999999999999": outside, "-99999999999999999999999": outside,
		"12,5":  comma,
		"12.55": decimals,
		"100+":  response, ">100": response,
		"NR": level, "NR>": level, "NR100": level, "NR > 100": level,
		"DNT": other, "--5": other, "+5": other, "5.": other, ".5": other, ".": other, "-": other,
		"1e1": other, "0x10": other, "NaN": other, "1 0": other, "NR>NT": other, "5\u2212": other, "\xff": other,
	} {
		got, err := audiometry.ParseThreshold(text)
		if assert.Error(t, err, "%q", text) {
			assert.Contains(t, err.Error(), want, "%q", text)
			assert.NotContains(t, err.Error(), "\n", "%q", text)
			assert.False(t, strings.HasSuffix(err.Error(), "."), "%q", text)
		}
		assert.Zero(t, got, "%q", text)
	}
}

func TestEveryLevelRoundTrips(t *testing.T) {
	for _, state := range []audiometry.State{audiometry.Measured, audiometry.NoResponse} {
		for tenths := int16(-200); tenths <= 1300; tenths++ {
			want := audiometry.Threshold{Tenths: tenths, State: state}
			got, err := audiometry.ParseThreshold(want.String())
			require.NoError(t, err)
			require.Equal(t, want, got)
		}
	}
}

func FuzzParseThreshold(f *testing.F) {
	for _, seed := range []string{"", "25", "-5", "\u22125", "12.5", "NR>100", "NT", "1O", "200", "NR", "100+", "12,5", "\xff"} {
		f.Add(seed)
	}
	f.Fuzz(func(t *testing.T, text string) {
		got, err := audiometry.ParseThreshold(text)
		if err != nil {
			assert.Zero(t, got)
			return
		}
		again, err := audiometry.ParseThreshold(got.String())
		require.NoError(t, err)
		require.Equal(t, got, again)
	})
}
