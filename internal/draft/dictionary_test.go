package draft

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gopkg.in/yaml.v3"

	"hearduty/internal/record"
)

// TestDictionaryNamesFields looks for misspelt kinds and fields, of which a draft would be silent.
func TestDictionaryNamesFields(t *testing.T) {
	for name, targets := range known.names {
		for _, to := range targets {
			if to.kind == "audiogram" && (to.field == "ear" || to.field == "frequency" || to.field == "threshold") {
				continue
			}
			found := false
			for _, k := range record.Kinds() {
				table, _ := record.TableOf(k)
				found = found || (to.kind == k || to.kind == "") && table.Index(to.field) >= 0
			}
			assert.True(t, found, "%s stands for %s.%s, which no record has", name, to.kind, to.field)
		}
	}
	var sections map[string]yaml.Node
	require.NoError(t, yaml.Unmarshal(dictionaryText, &sections))
	for name := range sections {
		_, isKind := record.TableOf(record.Kind(name))
		assert.True(t, isKind || name == "any" || name == "personal" || name == "derived" || name == "unneeded", name)
	}
	for to := range vocabularies {
		table, ok := record.TableOf(to.kind)
		require.True(t, ok, to.kind)
		assert.GreaterOrEqual(t, table.Index(to.field), 0, to.field)
	}
}

// TestWordsAreUnambiguous holds the word lists to one meaning a word, to no single letters that differ between
// languages, and to words that the field knows.
func TestWordsAreUnambiguous(t *testing.T) {
	var vocabularies map[string]yaml.Node
	require.NoError(t, yaml.Unmarshal(wordsText, &vocabularies))
	for vocabulary, node := range vocabularies {
		if node.Kind != yaml.MappingNode {
			continue
		}
		var meanings map[string][]string
		require.NoError(t, node.Decode(&meanings))
		seen := map[string]string{}
		for meaning, list := range meanings {
			for _, w := range list {
				key := compact(w)
				require.NotEmpty(t, key, w)
				assert.True(t, seen[key] == "" || seen[key] == meaning, "%s: %q means %s and %s", vocabulary, w, seen[key], meaning)
				assert.False(t, len(key) < 2 && (vocabulary == "sex" || vocabulary == "ear" || vocabulary == "answer"), "%s: %q", vocabulary, w)
				seen[key] = meaning
			}
		}
	}
	for to, vocabulary := range vocabulariesByField() {
		table, _ := record.TableOf(to.kind)
		f := table.Fields[table.Index(to.field)]
		allowed := append(append([]string{}, f.One...), f.Like...)
		for _, meaning := range known.wordOrder[vocabulary] {
			assert.Contains(t, allowed, meaning, vocabulary)
		}
	}
}

func vocabulariesByField() map[target]string { return vocabularies }

func TestDictionaryFindsNames(t *testing.T) {
	for _, c := range []struct {
		name string
		want target
	}{
		{"EmpNo", target{"", "worker_id"}}, {"EMP_NO", target{"", "worker_id"}}, {"Matrícula", target{"", "worker_id"}}, {"社員番号", target{"", "worker_id"}},
		{"Geb.-Datum", target{"worker", "birth_date"}}, {"Płeć", target{"worker", "sex"}}, {"Datum in dienst", target{"worker", "hired_on"}},
		{"Dose (%)", target{"measurement", "dose_pct"}}, {"Run time (min)", target{"measurement", "run_minutes"}}, {"Gehörschutz", target{"", "protector_id"}},
		{"Kön", target{"worker", "sex"}}, {"Høreværn", target{"", "protector_id"}}, {"left.stated_shift", target{"audiogram", "left.stated_shift"}},
	} {
		found, _ := known.fields(c.name)
		assert.Contains(t, found, c.want, c.name)
	}
	assert.Equal(t, personal, known.why("Prénom"))
	assert.Equal(t, derived, known.why("STS_R"))
	assert.Equal(t, unneeded, known.why("Next Due"))
	assert.Empty(t, known.why("Flurblings"))
}
