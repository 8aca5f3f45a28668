package finding

import (
	"encoding/json"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestDecode(t *testing.T) {
	text, err := json.Marshal(made(june, listsSome, found("f-1", Gap, due("2026-05-01"))))
	require.NoError(t, err)
	r, err := Decode(strings.NewReader("\ufeff"+string(text)+"\n"), "1")
	require.NoError(t, err)
	assert.Equal(t, day(june), r.AsOf)
	assert.Equal(t, day("2026-05-01"), r.Findings[0].Due)

	good := string(text)
	for name, c := range map[string]struct{ text, want string }{
		"empty":           {"", "it is no report of hearduty as --format json writes it"},
		"text":            {"Harrow & Slate\nAs of", "it is no report of hearduty"},
		"a list":          {"[]", "it is no report of hearduty"},
		"another object":  {`{"name": 1}`, "it is no report of hearduty"},
		"an empty object": {`{}`, "it is no report of hearduty"},
		"cut off":         {good[:len(good)-20], "it is no report of hearduty"},
		"two reports":     {good + good, "something follows after the report"},
		"a newer version": {strings.Replace(strings.Replace(good, `"version":"1"`, `"version":"9.9"`, 1), `"program"`, `"extra":1,"program"`, 1),
			`it was written by hearduty 9.9, and hearduty 1 cannot read it (unknown field "extra"); compare with the newer of the two versions`},
		"another shape":     {strings.Replace(good, `"as_of":"2026-06-30"`, `"as_of":7`, 1), "it does not fit the schema of reports"},
		"no day":            {strings.Replace(good, `"as_of":"2026-06-30"`, `"as_of":null`, 1), "it lacks the day"},
		"an unknown status": {strings.Replace(good, `"status":"gap","severity"`, `"status":"fine","severity"`, 1), "finding 1 has no id of its own or no status"},
	} {
		_, err := Decode(strings.NewReader(c.text), "1")
		require.Error(t, err, name)
		assert.Contains(t, err.Error(), c.want, name)
		assert.NotContains(t, err.Error(), "json:", name)
	}
	_, err = Decode(strings.NewReader(strings.Replace(good, `"findings":[`, `"findings":[{"id":"f-1","status":"gap"},`, 1)), "1")
	assert.ErrorContains(t, err, "finding 2 has no id of its own")
}
