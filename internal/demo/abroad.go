package demo

import (
	"embed"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// The sites abroad are canonical files written by hand, so that whoever knows a law can read and change them. Both
// program files of the demo name them.

//go:embed abroad
var abroad embed.FS

// abroadFiles names them as a program file does.
func abroadFiles() string {
	var text strings.Builder
	entries, _ := fs.ReadDir(abroad, "abroad") // an embedded folder can be read
	for _, e := range entries {
		text.WriteString("  - abroad/" + e.Name() + "\n")
	}
	return text.String()
}

// writeAbroad copies them into the folder of a program.
func writeAbroad(dir string) error {
	files, err := fs.Sub(abroad, "abroad")
	if err != nil {
		return err
	}
	return os.CopyFS(filepath.Join(dir, "abroad"), files)
}
