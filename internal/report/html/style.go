package html

import (
	"html/template"

	"hearduty/internal/finding"
)

// Style is the look of all pages, for forms beside the report.
func Style() template.CSS { return template.CSS(styleText) }

// Mark gives the sign of a status. It is decoration: the word always stands beside it.
func Mark(s finding.Status) template.HTML { return mark(s) }
