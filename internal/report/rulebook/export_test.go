package rulebook

import (
	"reflect"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
)

// Told gives, for tests, the fields that the book tells in words of its own, by type.
func Told() map[reflect.Type]string { return told }

// Rest tells, for tests, the other fields of a struct.
func Rest(b *bundle.Bundle, day calendar.Date, of any) []Row {
	return (&maker{Bundle: b, day: day}).rest(of)
}
