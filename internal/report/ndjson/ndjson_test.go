package ndjson

import (
	"bytes"
	"encoding/json"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	whole "hearduty/internal/report/json"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

func reports(t *testing.T) map[string]*finding.Report {
	return map[string]*finding.Report{
		"odd": reporttest.Odd(), "empty": reporttest.Empty(), "health": reporttest.WithHealth(), "demo": reporttest.Demo(t, true),
	}
}

// read gives the lines, each by its key.
func read(t *testing.T, text []byte) (keys []string, values []json.RawMessage) {
	t.Helper()
	require.True(t, bytes.HasSuffix(text, []byte("\n")))
	for l := range strings.SplitSeq(strings.TrimSuffix(string(text), "\n"), "\n") {
		var object map[string]json.RawMessage
		require.NoError(t, json.Unmarshal([]byte(l), &object))
		require.Len(t, object, 1)
		for key, value := range object {
			keys, values = append(keys, key), append(values, value)
		}
	}
	return keys, values
}

// The lines hold together what the form json writes.
func TestSaysTheSameAsTheFormJSON(t *testing.T) {
	for name, r := range reports(t) {
		keys, values := read(t, reporttest.Written(t, Format{}, r))
		require.Equal(t, []string{"report", "end"}, []string{keys[0], keys[len(keys)-1]}, name)
		got := map[string]any{}
		require.NoError(t, json.Unmarshal(values[0], &got))
		assert.NotContains(t, got, "findings")
		lists := map[string][]any{"finding": {}, "observation": {}}
		for i, key := range keys[1 : len(keys)-1] {
			var value any
			require.NoError(t, json.Unmarshal(values[i+1], &value))
			lists[key] = append(lists[key], value)
		}
		got["findings"], got["observations"] = lists["finding"], lists["observation"]
		written, err := json.Marshal(got)
		require.NoError(t, err)
		assert.JSONEq(t, string(reporttest.Written(t, whole.Format{}, r)), string(written), name)
	}
}

func TestTheEndTellsHowManyLinesThereAre(t *testing.T) {
	for name, r := range reports(t) {
		keys, values := read(t, reporttest.Written(t, Format{}, r))
		var got end
		require.NoError(t, json.Unmarshal(values[len(values)-1], &got))
		assert.Equal(t, end{len(r.Findings), len(r.Observations)}, got, name)
		assert.Len(t, keys, 2+got.Findings+got.Observations, name)
	}
}

func TestAFileCutOffHasNoEnd(t *testing.T) {
	text := reporttest.Written(t, Format{}, reporttest.Odd())
	for i := range len(text) - 1 {
		cut := text[:i]
		last := cut[bytes.LastIndexByte(cut, '\n')+1:]
		assert.False(t, json.Valid(last) && bytes.HasPrefix(last, []byte(`{"end"`)))
	}
}

func TestHealthOnlyIfTheReportHasIt(t *testing.T) {
	assert.NotContains(t, string(reporttest.Written(t, Format{}, reporttest.Odd())), "left_db")
	assert.Contains(t, string(reporttest.Written(t, Format{}, reporttest.WithHealth())), "left_db")
}
