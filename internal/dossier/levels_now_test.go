package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// TestLevelsNow: the site knows at which levels a worker is today, not at which one was.
func TestLevelsNow(t *testing.T) {
	at := func(today string, dose float64) []string {
		return judge(t, today, hired("2020-01-01", "2023-12-31"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", dose)).siteDossier().LevelsNow
	}
	assert.Equal(t, []string{"action"}, at("2023-12-31", 75))
	assert.Equal(t, []string{}, at("2023-12-31", 49))
	assert.Equal(t, []string{}, at("2024-01-01", 75), "the worker has left")
}
