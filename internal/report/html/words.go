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

// spaced writes the name of something as words.
func spaced(name any) string { return strings.ReplaceAll(fmt.Sprint(name), "_", " ") }

// choices writes what a site has elected.
func choices(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		parts = append(parts, spaced(key)+": "+spaced(finding.Words(m[key])))
	}
	if len(parts) == 0 {
		return "none"
	}
	return strings.Join(parts, "; ")
}

// place says where something stands.
func place(file, sheet string, row int) string {
	if sheet != "" {
		file += ", sheet " + sheet
	}
	if row > 0 {
		file += fmt.Sprintf(", row %d", row)
	}
	return file
}

// accepted says in short that the employer has accepted a finding, and until when.
func accepted(a *finding.Acceptance) string {
	if a.Until.Known() {
		return "accepted until " + a.Until.String()
	}
	return "accepted"
}

// notData says how many rows of a file are no data, and what they are.
func notData(in finding.Input) string {
	if in.NotData == 0 {
		return "0"
	}
	return fmt.Sprintf("%d (%s)", in.NotData, intake.Declared(in.Declared))
}
