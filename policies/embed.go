// Package policies holds the bundles of duties that are built into hearduty.
package policies

import "embed"

// FS holds the bundles, one folder each, and the folder common with the rules that they share.
//
//go:embed all:*
var FS embed.FS
