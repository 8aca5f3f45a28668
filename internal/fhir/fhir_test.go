package fhir

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/mapping"
)

func TestPanelWithComponents(t *testing.T) {
	t.Parallel()
	panel := panelText("A1", `, "component": [`+component("89024-4", level("10"))+","+component("89025-1", level("-5"))+","+component("89016-0", level("12.5"))+`]`)
	for name, text := range map[string]string{
		"bundle":        bundleOf(worker7, panel),
		"patient later": bundleOf(panel, worker7),
		"array":         "[" + worker7 + "," + panel + "]",
	} {
		assert.Contains(t, readAll(t, text, "a.json", mapping.File{}), map[string]string{
			"bundle": "2", "array": "2", "patient later": "1",
		}[name]+": audiogram_id=A1 worker_id=0007 date=2025-03-04 left.500=10 left.1000=12.5 right.500=-5", name)
	}
}

func TestLooseObservationsAreGathered(t *testing.T) {
	t.Parallel()
	got := readAll(t, bundleOf(toneText("o1", "89024-4", level("10"), ""), worker7, toneText("o2", "89025-1", level("15"), "")), "a.json", mapping.File{})
	assert.Equal(t, []string{"2: Patient", "1 3: audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 left.500=10 right.500=15"}, got)
}
