// Package policies holds the bundles of duties that are built into hearduty. Beside each lies its book, BOOK.md, made
// from it for readers who do not program.
package policies

import "embed"

//go:generate go run hearduty/internal/report/rulebook/generate

// FS holds the bundles, one folder each, and the folder common with the rules that they share. The pattern leaves out
// the books, which nothing reads.
//
//go:embed all:*/[^B]*
var FS embed.FS
