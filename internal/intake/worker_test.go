package intake

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/calendar"
)

func TestEmploymentMayEndAndBeginOnOneDay(t *testing.T) {
	spell := func(from, to string) calendar.Spell {
		s := calendar.Spell{From: calendar.MustParse(from)}
		if to != "" {
			s.To = calendar.MustParse(to).AddDays(1)
		}
		return s
	}
	for _, c := range []struct {
		name string
		a, b calendar.Spell
		want bool
	}{
		{"apart", spell("2020-01-01", "2020-12-31"), spell("2021-01-01", ""), false},
		{"the day of the move", spell("2020-01-01", "2021-01-01"), spell("2021-01-01", ""), false},
		{"two days", spell("2020-01-01", "2021-01-02"), spell("2021-01-01", ""), true},
		{"within", spell("2020-01-01", ""), spell("2021-01-01", "2021-01-01"), true},
		{"the same day only", spell("2021-01-01", "2021-01-01"), spell("2021-01-01", "2021-01-01"), true},
	} {
		assert.Equal(t, c.want, overlap(c.a, c.b), c.name)
		assert.Equal(t, c.want, overlap(c.b, c.a), c.name)
	}
}
