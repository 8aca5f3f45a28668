package dossier_test

import (
	"maps"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

func TestSteadyLevelOfALongShift(t *testing.T) {
	// 12 h: 82.08 dBA; 18 h: 79.15 dBA, below the threshold (reference sheet 2.2, computed).
	for minutes, want := range map[float64]string{
		720:  "for information: in a shift of 12 h a steady level of 82.1 dBA reaches 50 %",
		1080: "for information: in a shift of 18 h a steady level of 79.2 dBA reaches 50 %, but levels below 80 dBA do not count",
		480:  "",
	} {
		g := group("g1")
		g.ShiftMinutes = record.Num(minutes)
		d := judge(t, "2024-01-01", g, measured("m1", "g1", "2020-01-10", 60)).group()
		lines := d.Now.Channels["action"].Working
		if want == "" {
			assert.Len(t, lines, 2)
			continue
		}
		assert.Equal(t, want, lines[len(lines)-1])
		assert.Len(t, d.Now.Channels["limit"].Working, 1, "only the channel that enrols has it")
	}
}

func TestTasksOnChannelsOfEveryExchangeRate(t *testing.T) {
	m := osha().Measures
	m.Exposure.Channels = maps.Clone(m.Exposure.Channels)
	m.Exposure.Channels["three"] = dossier.Channel{CriterionDB: 85, ExchangeDB: 3, ThresholdDB: 80}
	m.Exposure.Channels["four"] = dossier.Channel{CriterionDB: 85, ExchangeDB: 4, ThresholdDB: 80}
	m.Exposure.Channels["day"] = dossier.Channel{Kind: dossier.LevelChannel}
	task := func(name string, minutes float64, level string) *record.Task {
		return &record.Task{Group: "g1", Task: name, Date: day("2020-01-10"), Minutes: record.Num(minutes), Samples: record.List{level}}
	}
	// 92 dBA 3 h, 88 dBA 3 h, 79 dBA 2 h (reference sheet, section 2, computed): 77.901, 49.482, 263.988 and
	// 189.202 %, all without the 79 dBA.
	d := asked{asOf: "2024-01-01", measures: m}.judge(t, group("g1"), task("a", 180, "92"), task("b", 180, "88"), task("c", 120, "79")).group()
	for channel, pct := range map[string]float64{"action": 77.901, "limit": 49.482, "three": 263.988, "four": 189.202} {
		assert.InDelta(t, pct, d.Now.Channels[channel].DosePct.Value, 1e-3, channel)
		assert.Equal(t, record.Number{}, d.Now.Channels[channel].LevelDBA)
	}
	assert.InDelta(t, 89.298, d.Now.Channels["day"].LevelDBA.Value, 1e-3) // 10 lg((3·10^9.2 + 3·10^8.8 + 2·10^7.9)/8)
	assert.Equal(t, record.Number{}, d.Now.Channels["day"].DosePct)
	assert.Equal(t, []string{
		"tasks: 180 min at 92 dBA (T = 363.8 min), 180 min at 88 dBA (T = 633.4 min), 120 min at 79 dBA (below 80 dBA, does not count)",
		"D = 100 · Σ C/T = 100 · (180/363.8 + 180/633.4) = 77.9 %", "TWA = 16.61 · lg(77.9/100) + 90 = 88.2 dBA",
	}, d.Now.Channels["action"].Working)
	assert.Equal(t, []string{"task/g1/b", "task/g1/c"}, d.Now.Others)
	quiet := asked{asOf: "2024-01-01", measures: m}.judge(t, group("g1"), task("a", 480, "70")).group()
	assert.Equal(t, "D = 100 · Σ C/T = 100 · (0) = 0 %", quiet.Now.Channels["action"].Working[1])
}
