package dossier_test

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// many are full-shift levels of g1, one a day.
func many(levels ...float64) []record.Record {
	out := []record.Record{group("g1")}
	for i, level := range levels {
		out = append(out, leveled(fmt.Sprintf("m%d", i), fmt.Sprintf("2020-01-%02d", i+1), level))
	}
	return out
}

func TestStatistics(t *testing.T) {
	s := byLevel(85).judge(t, many(81, 82, 83, 84, 85, 86)...).group().Statistics
	// t of 95 % with 5 degrees of freedom is 2.015, k of 95/95 for 6 values 3.708 (tables in textbooks); s² is 3.5.
	assert.Equal(t, 6, s.Number)
	assert.InDelta(t, 83.5, s.Mean.Value, 1e-9)
	assert.InDelta(t, 1.870829, s.SD.Value, 1e-6)
	assert.InDelta(t, 83.5+2.015*1.870829/2.449490, s.MeanLimit.Value, 1e-3)
	assert.InDelta(t, 83.5+3.708*1.870829, s.ToleranceLimit.Value, 1e-2)
	assert.InDelta(t, 21.13, s.Exceedance.Value, 0.01) // above 0.8018 standard deviations
	assert.Greater(t, s.ExceedanceLimit.Value, s.Exceedance.Value)
	assert.Empty(t, s.Warnings)
	assert.Equal(t, []string{
		"n = 6 levels L_EX,8h: 81.0, 82.0, 83.0, 84.0, 85.0, 86.0 dBA", "mean = 83.50 dBA, s = 1.87 dB",
		"upper 95 % limit of the mean = mean + t · s / √n = 83.50 + t · 1.87 / √6 = 85.04 dBA",
		"upper 95/95 tolerance limit = mean + k · s = 83.50 + 3.708 · 1.87 = 90.44 dBA",
		"share above 85.0 dBA = 1 − Φ((85.0 − 83.50) / 1.87) = 21.1 %, with 95 % confidence at most 50.6 %",
		"energy mean = 10 lg of the mean of 10^(L/10) = 83.83 dBA",
	}, s.Working)
}

func TestStatisticsOfFewOrEqualLevels(t *testing.T) {
	stats := func(levels ...float64) *dossier.Statistics {
		return byLevel(85).judge(t, many(levels...)...).group().Statistics
	}
	assert.Nil(t, stats())
	one := stats(84)
	assert.Equal(t, []record.Number{record.Num(84), {}, {}, {}, {}}, []record.Number{one.Mean, one.SD, one.MeanLimit, one.ToleranceLimit, one.Exceedance})
	assert.Equal(t, []string{"fewer than 3 levels: no limit can be given"}, one.Warnings)
	two := stats(84, 86)
	assert.Equal(t, record.Num(85), two.Mean)
	assert.InDelta(t, 1.414214, two.SD.Value, 1e-6)
	assert.False(t, two.ToleranceLimit.Known)
	assert.Equal(t, []string{"fewer than 6 levels: every limit is wide"}, stats(80, 81, 85).Warnings)
	same := stats(86, 86, 86)
	assert.Equal(t, []string{"fewer than 6 levels: every limit is wide", "all levels are the same, which real ones seldom are"}, same.Warnings)
	assert.Equal(t, []record.Number{record.Num(100), record.Num(100), record.Num(86)}, []record.Number{same.Exceedance, same.ExceedanceLimit, same.ToleranceLimit})
	assert.Contains(t, same.Working, "share above 85.0 dBA = 100 %, with 95 % confidence at most 100.0 %")
}

func TestStatisticsOfDosesAndSamples(t *testing.T) {
	d := judge(t, "2024-01-01", group("g1"), measured("m1", "g1", "2020-01-10", 50), measured("m2", "g1", "2020-01-11", 100), measured("m3", "g1", "2020-01-12", 200),
		measured("m4", "g1", "2020-01-13", 0), threshold(measured("m5", "g1", "2020-01-14", 300), 90),
		&record.Task{Group: "g1", Task: "a", Date: day("2020-01-15"), Minutes: record.Num(480), Samples: record.List{"99"}}).group()
	assert.Equal(t, 3, d.Statistics.Number, "neither a dose of nothing, nor a bound, nor a day of tasks")
	assert.InDelta(t, 90, d.Statistics.Mean.Value, 1e-9)
	assert.InDelta(t, 85, d.Statistics.Limit.Value, 1e-3)
	assert.Contains(t, d.Statistics.Warnings, "1 × a dose of 0 % has no level and is left out")

	a := readAnnexes(t)
	records := samplesOf(a.Job, record.No)
	for _, rec := range records[2:] {
		rec.(*record.Measurement).RunMinutes = record.Num(60)
	}
	d = byLevel(85, sampled("job", "")).judge(t, append(records, hired("2020-01-01"), assigned("g1", "2020-01-01"))...).group()
	assert.Equal(t, 6, d.Statistics.Number)
	assert.Empty(t, d.Statistics.Warnings, "one worker needs 5 h, and 6 h were sampled")
	for _, rec := range records[2:] {
		rec.(*record.Measurement).RunMinutes = record.Num(15)
	}
	d = byLevel(85, sampled("job", "")).judge(t, append(records, hired("2020-01-01"), assigned("g1", "2020-01-01"))...).group()
	assert.Equal(t, []string{"ISO 9612 finds wanting: the samples last 1.5 h together; a group of 1 needs at least 5 h"}, d.Statistics.Warnings)
}

func TestDoubtsOfAMeasurement(t *testing.T) {
	base := measured("m1", "g1", "2020-01-10", 60)
	for name, c := range map[string]struct {
		rows []record.Record
		want []string
	}{
		"none":                         {[]record.Record{base, threshold(but(base, func(m *record.Measurement) { m.DosePct = record.Num(40) }), 90)}, []string{}},
		"more from a higher threshold": {[]record.Record{base, threshold(but(base, func(m *record.Measurement) { m.DosePct = record.Num(61) }), 90)}, []string{"the dose of 61 % counted from 90 dB is above the 60 % counted from 80 dB, which cannot be"}},
		"an average of another dose":   {[]record.Record{but(base, func(m *record.Measurement) { m.TWADBA = record.Num(90) })}, []string{"a dose of 60 % has a time-weighted average of 86.3 dB, but 90 dB is reported"}},
		"an average of the run": {[]record.Record{but(base, func(m *record.Measurement) { m.TWADBA, m.RunMinutes = record.Num(91.3), record.Num(240) })},
			[]string{"91.3 dB is the average of the 240 minutes the instrument ran; a dose of 60 % has a time-weighted average of 86.3 dB over 8 hours"}},
		"an unknown threshold says nothing": {[]record.Record{base, threshold(but(base, func(m *record.Measurement) { m.DosePct = record.Num(61) }), -1)}, []string{}},
	} {
		d := judge(t, "2024-01-01", append(c.rows, group("g1"))...).group()
		require.Len(t, d.Measurements, 1)
		assert.Equal(t, c.want, d.Measurements[0].Doubts, name)
		assert.Equal(t, "reached", verdictOn(d), "%s: doubts decide nothing", name)
	}
}

// TestMoreIsKnownButNeverTheContrary measures one day on several scales: whatever the rows together tell, fewer of them
// never tell the contrary.
func TestMoreIsKnownButNeverTheContrary(t *testing.T) {
	m := osha().Measures
	m.Exposure.Channels = map[string]dossier.Channel{"action": {CriterionDB: 90, ExchangeDB: 5, ThresholdDB: 80}, "day": {Kind: dossier.LevelChannel}}
	m.Exposure.Levels = map[string]dossier.Threshold{"action": {Channel: "action", AtLeast: "action_dose"}, "level": {Channel: "day", AtLeast: "action_level"}}
	how := asked{asOf: "2024-01-01", measures: m, law: limits{osha(), 85}}
	rapid.Check(t, func(t *rapid.T) {
		var day []acoustics.Segment
		for range rapid.IntRange(1, 5).Draw(t, "segments") {
			day = append(day, acoustics.Segment{Level: rapid.Float64Range(65, 95).Draw(t, "level"), Minutes: 96})
		}
		var rows []*record.Measurement
		for _, exchange := range []float64{5, 3} {
			for _, from := range []float64{0, 70, 80, 85, 90} {
				pct, err := acoustics.Scale{Criterion: 90, Exchange: exchange, Threshold: from}.Dose(day)
				require.NoError(t, err)
				rows = append(rows, but(threshold(measured("m1", "g1", "2020-01-10", pct), from), func(m *record.Measurement) {
					m.ExchangeDB, m.ShiftMinutes = record.Num(exchange), record.Num(96*float64(len(day)))
				}))
			}
		}
		order := rapid.Permutation(rows).Draw(t, "order")
		n := rapid.IntRange(1, len(order)).Draw(t, "n")
		verdicts := func(rows []*record.Measurement) [2]string {
			records := []record.Record{group("g1")}
			for _, row := range rows {
				copied := *row
				records = append(records, &copied)
			}
			g := how.judge(t, records...).group()
			var out [2]string
			for i, level := range []string{"action", "level"} {
				switch {
				case len(open(g.Unknown[level])) > 0:
				case len(g.Exposed[level]) > 0:
					out[i] = "yes"
				default:
					out[i] = "no"
				}
			}
			return out
		}
		few, all := verdicts(order[:n]), verdicts(order)
		for i := range few {
			if few[i] != "" {
				require.Equal(t, few[i], all[i])
			}
		}
	})
}

// BenchmarkOwnMeasurements makes the dossier of a worker with 5 own measurements, under a law of doses and one of
// levels, beside that of a worker with none.
func BenchmarkOwnMeasurements(b *testing.B) {
	for name, how := range map[string]asked{"doses": {asOf: "2024-01-01"}, "levels": byLevel(85)} {
		for _, n := range []int{0, 5} {
			records := []record.Record{hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), measured("m0", "g1", "2019-12-01", 40), leveled("m9", "2019-12-01", 80)}
			for i := range n {
				m := own(fmt.Sprintf("o%d", i), fmt.Sprintf("202%d-01-01", i), 60)
				m.LAeqDBA, m.ShiftMinutes = record.Num(84), record.Num(480)
				records = append(records, m)
			}
			builder, worker := how.builder(b, records...)
			b.Run(fmt.Sprintf("%s/%d", name, n), func(b *testing.B) {
				b.ReportAllocs()
				for b.Loop() {
					builder.Worker(worker)
				}
			})
		}
	}
}

// builder gives the builder of s1 and the one worker of the records.
func (a asked) builder(b *testing.B, records ...record.Record) (*dossier.Builder, *dossier.WorkerRecords) {
	store := dossier.NewStore()
	b.Cleanup(func() { store.Close() })
	for _, rec := range records {
		require.NoError(b, store.Add(rec))
	}
	if a.law == nil {
		a.measures, a.law = osha().Measures, osha()
	}
	registers, err := store.Registers()
	require.NoError(b, err)
	for i := range store.Shards() {
		workers, err := store.Shard(i)
		require.NoError(b, err)
		if len(workers) > 0 {
			return dossier.NewGround(registers, a.measures, a.law, day(a.asOf)).Builder(dossier.Place{ID: "s1"}, osha().ChoicesOf(nil)), workers[0]
		}
	}
	return nil, nil
}
