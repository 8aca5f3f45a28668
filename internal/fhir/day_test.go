package fhir

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/mapping"
)

func TestDays(t *testing.T) {
	t.Parallel()
	const noZone = "fault date: the time has a zone, so the day depends on where it is taken"
	for _, c := range []struct{ effective, zone, want string }{
		{`"effectiveDateTime": "2025-03-04"`, "", "2025-03-04"},
		{`"effectiveDateTime": "2025-03-04T23:30:00-05:00"`, "", noZone},
		{`"effectiveDateTime": "2025-03-04T23:30:00Z"`, "", noZone},
		{`"effectiveDateTime": "2025-03-04T23:30:00-05:00"`, "as_written", "2025-03-04"},
		{`"effectiveDateTime": "2025-03-04T23:30:00-05:00"`, "America/New_York", "2025-03-04"},
		{`"effectiveDateTime": "2025-03-04T23:30:00-05:00"`, "Europe/Berlin", "2025-03-05"},
		{`"effectiveDateTime": "2025-03-04T23:30:00.123Z"`, "Europe/Berlin", "2025-03-05"},
		{`"effectiveDateTime": "2025-03-04T23:30:00"`, "", "2025-03-04"},
		{`"effectiveInstant": "2025-03-04T12:00:00Z"`, "as_written", "2025-03-04"},
		{`"effectivePeriod": {"start": "2025-03-04", "end": "2025-03-05"}`, "", "2025-03-04"},
		{`"effectivePeriod": {"end": "2025-03-05"}`, "", "fault date: the resource does not say when it was observed"},
		{`"effectivePeriod": "2025-03-05"`, "", "fault date: effectivePeriod is a text, not an object"},
		{`"effectiveDateTime": "2025-03-04", "effectiveInstant": "2025-03-04T12:00:00Z"`, "", "fault date: both effectiveDateTime and effectiveInstant are stated"},
		{`"effectiveDateTime": "2025-03"`, "", "fault date: the date has no day"},
		{`"effectiveDateTime": "2025"`, "", "fault date: the date has no day"},
		{`"effectiveDateTime": "04.03.2025"`, "", "fault date: this is no date as FHIR writes it"},
		{`"effectiveDateTime": 20250304`, "", "fault date: effectiveDateTime is a number, not a text"},
		{`"issued": "2025-03-04"`, "", "fault date: the resource does not say when it was observed"},
	} {
		f := mapping.File{}
		if c.zone != "" {
			f.Dates = &mapping.Dates{Zone: c.zone}
		}
		text := strings.Replace(toneText("l", "89024-4", level("10"), ""), `"effectiveDateTime": "2025-03-04"`, c.effective, 1)
		got := readAll(t, bundleOf(worker7, text), "a.json", f)
		if !strings.HasPrefix(c.want, "fault") {
			c.want = "audiogram_id=0007-" + c.want + " worker_id=0007 date=" + c.want + " left.500=10"
		}
		assert.Equal(t, "2: "+c.want, got[1], c.effective+c.zone)
	}
}
