package html

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/intake"
)

// short gives the beginning of a digest.
func short(digest string) string { return digest[:min(len(digest), 12)] }

func spaced(name string) string { return strings.ReplaceAll(name, "_", " ") }

// choices writes what a site has elected, as it stands in the program file.
func choices(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		parts = append(parts, fmt.Sprintf("%s = %v", key, m[key]))
	}
	if len(parts) == 0 {
		return "none"
	}
	return strings.Join(parts, ", ")
}

// notData says how many rows of a file are no data, and what they are.
func notData(in finding.Input) string {
	if in.NotData == 0 {
		return "0"
	}
	return fmt.Sprintf("%d (%s)", in.NotData, intake.Declared(in.Declared))
}
