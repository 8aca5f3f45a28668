package template_test

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/rehearse"
	"hearduty/internal/template"
)

// rehearsed takes a bundle as a check takes it, and rehearses it.
func rehearsed(t *testing.T, dir string) *rehearse.Result {
	t.Helper()
	source, err := bundle.OpenSource(dir, nil)
	require.NoError(t, err)
	shelf, err := bundle.NewShelf(source)
	require.NoError(t, err)
	id := source.IDs[0]
	library, err := shelf.Take(id)
	require.NoError(t, err)
	r, err := rehearse.Run(t.Context(), library[id], rehearse.Options{})
	require.NoError(t, err)
	for _, f := range r.Failures {
		t.Error(f.String())
	}
	return r
}

func TestWrittenBundleRehearsesGreen(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "quiet-company")
	id, err := template.Bundle(dir, "2026-06-30", []string{"other"})
	require.NoError(t, err)
	assert.Equal(t, "quiet-company", id)
	r := rehearsed(t, dir)
	assert.Equal(t, rehearse.Count{Run: 5}, r.Cases)
	assert.Equal(t, "2026-06-30", r.Bundle.Revision)
	require.Len(t, r.Duties, 1)
	d := r.Duties[0]
	assert.Equal(t, "hearing-test-repeated", d.ID)
	assert.Equal(t, []int{2, 3, 4}, []int{d.Fires, d.Quiet, d.Boundary})
	assert.Empty(t, r.Bundle.Warnings)
}

// TestWrittenDutiesRehearseGreen writes a duty about each kind of subject, one after the other into one bundle.
func TestWrittenDutiesRehearseGreen(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "quiet-company")
	_, err := template.Bundle(dir, "2026-06-30", nil)
	require.NoError(t, err)
	for _, kind := range dossier.Kinds {
		w, err := template.Duty(dir, "about-"+kind, kind, "records")
		require.NoError(t, err, kind)
		assert.Empty(t, w.Paragraph)
		assert.Equal(t, filepath.Join(dir, "duty", "about_"+kind), w.Folder)
		for _, file := range []string{w.Cases, filepath.Join(w.Folder, "about_"+kind+".rego"), filepath.Join(w.Folder, "about_"+kind+"_test.rego"), w.Table} {
			text, err := os.ReadFile(file)
			require.NoError(t, err)
			assert.Contains(t, string(text), template.Mark, file)
		}
	}
	r := rehearsed(t, dir)
	assert.Equal(t, rehearse.Count{Run: 5 + len(dossier.Kinds)}, r.Cases)
	for _, d := range r.Duties[1:] {
		if strings.HasPrefix(d.ID, "about-") {
			assert.Equal(t, []int{1, 0, 0, 1}, []int{d.Fires, d.Quiet, d.Boundary, d.Lacks}, d.ID)
		}
	}
	for _, kind := range dossier.Kinds {
		d, ok := r.Bundle.Duty("about-" + kind)
		require.True(t, ok)
		assert.Equal(t, kind, d.Subject)
		assert.Equal(t, []string{d.ID}, r.Bundle.Paragraphs["CHANGE ME about-"+kind].Checked)
	}
}

func TestNothingIsOverwritten(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "mine")
	_, err := template.Bundle(dir, "2026-06-30", nil)
	require.NoError(t, err)
	_, err = template.Bundle(dir, "2026-06-30", nil)
	require.ErrorContains(t, err, "is not empty")
	_, err = template.Duty(dir, "hearing-test-repeated", "worker", "records")
	require.ErrorContains(t, err, filepath.Join("duty", "hearing_test_repeated")+" is there already")
	cases := filepath.Join(dir, "cases", "mine.yaml")
	require.NoError(t, os.WriteFile(cases, []byte("[]\n"), 0o644))
	_, err = template.Duty(dir, "mine", "worker", "records")
	require.ErrorContains(t, err, cases+" is there already")
	_, err = os.Stat(filepath.Join(dir, "duty", "mine"))
	require.ErrorIs(t, err, os.ErrNotExist, "then nothing is written")
}

// TestTableThatCannotTakeAnEntryIsLeftAlone: the entry is handed back to be added by hand.
func TestTableThatCannotTakeAnEntryIsLeftAlone(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "mine")
	_, err := template.Bundle(dir, "2026-06-30", nil)
	require.NoError(t, err)
	table := filepath.Join(dir, "paragraphs", "data.yaml")
	const flow = `{"A 1": {says: x, checked: [hearing-test-repeated]}}` + "\n"
	require.NoError(t, os.WriteFile(table, []byte(flow), 0o644))
	w, err := template.Duty(dir, "mine", "worker", "records")
	require.NoError(t, err)
	assert.Equal(t, "\"CHANGE ME mine\":\n  says: \"CHANGE ME: what the paragraph asks, in a few words\"\n  checked: [mine]\n", w.Paragraph)
	text, err := os.ReadFile(table)
	require.NoError(t, err)
	assert.Equal(t, flow, string(text))
	require.NoError(t, os.Remove(table))
	w, err = template.Duty(dir, "second", "worker", "records")
	require.NoError(t, err)
	assert.Empty(t, w.Paragraph)
	text, err = os.ReadFile(table)
	require.NoError(t, err)
	assert.True(t, strings.HasPrefix(string(text), "\"CHANGE ME second\":\n"), "the table is begun")
	require.NoError(t, os.WriteFile(table, []byte("A 1: {says: x, outside: y}"), 0o644))
	_, err = template.Duty(dir, "third", "worker", "records")
	require.NoError(t, err)
	text, err = os.ReadFile(table)
	require.NoError(t, err)
	assert.True(t, strings.HasPrefix(string(text), "A 1: {says: x, outside: y}\n\n\"CHANGE ME third\":\n"), "also where the last line has no end")
}

func TestNamesAreRefused(t *testing.T) {
	base := t.TempDir()
	for name, want := range map[string]string{"Mine": "cannot be one", "a b": "cannot be one", "common": "there is a bundle common already", "taken": "there is a bundle taken already", "x_y": "cannot be one"} {
		_, err := template.Bundle(filepath.Join(base, name), "2026-06-30", []string{"taken"})
		require.ErrorContains(t, err, want, name)
		assert.NoDirExists(t, filepath.Join(base, name))
	}
	dir := filepath.Join(base, "good")
	_, err := template.Bundle(dir, "2026-06-30", nil)
	require.NoError(t, err)
	for _, name := range []string{"", "Mine", "../x", "a b", "1st", "a--b", "a/b", "-a"} {
		_, err := template.Duty(dir, name, "worker", "records")
		require.ErrorContains(t, err, "a duty cannot be called", name)
	}
	_, err = template.Duty(dir, "a", "walker", "records")
	require.ErrorContains(t, err, `there is no kind of subject "walker"`)
	_, err = template.Duty(base, "a", "worker", "records")
	require.ErrorContains(t, err, "is no bundle, for it holds no .manifest")
}
