package demo

import (
	"embed"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
)

// The demo program stands a second time in its folder, as the exports of the systems that an employer may have:
// exports.yaml names them, each with the map that reads it. Both program files give the same findings.

//go:embed maps
var mapFiles embed.FS

const exportsProgram = `
# The demo program again, from exports as employers have them: each file needs the map beside it. The findings are
# the same as those of program.yaml.
program: Harrow & Slate hearing conservation
as_of: 2026-06-30
accepted: accepted.yaml
` + demoSites + `records:
  - {file: exports/roster.csv, map: maps/roster.yaml}
  - {file: exports/units.json, map: maps/units.yaml}
  - {file: exports/dosimetry.txt, map: maps/dosimetry.yaml}
  - {file: exports/Kiln Hill hearing tests.xlsx, sheet: Tests, map: maps/tests-wide.yaml}
  - {file: exports/Larch Street hearing tests.csv, map: maps/tests-by-ear.yaml}
  - {file: exports/follow-ups.csv, map: maps/follow-ups.yaml}
  - {file: exports/training.csv, map: maps/training.yaml}
  - {file: exports/protectors-out.csv, map: maps/protectors-out.yaml}
  - {file: exports/checks.ndjson, map: maps/checks.yaml}
  - {file: exports/protection.xlsx, sheet: fit_tests, kind: fit_test}
  - {file: exports/protection.xlsx, sheet: wear_checks, kind: wear_check}
  - {file: exports/notices.yaml}
  - exports/registers.zip
`

// writeExports writes the exports with their maps and exports.yaml.
func (b *book) writeExports(dir string) error {
	folder := filepath.Join(dir, "exports")
	if err := os.Mkdir(folder, 0o755); err != nil {
		return err
	}
	for name, write := range map[string]func(*book, string) error{
		"roster.csv": (*book).exportRoster, "units.json": (*book).exportUnits, "dosimetry.txt": (*book).exportDosimetry,
		"Kiln Hill hearing tests.xlsx": (*book).exportTestsWide, "Larch Street hearing tests.csv": (*book).exportTestsByEar,
		"follow-ups.csv": (*book).exportFollowUps, "training.csv": (*book).exportTraining, "protectors-out.csv": (*book).exportIssues,
		"checks.ndjson": (*book).exportChecks, "protection.xlsx": (*book).exportProtection, "notices.yaml": (*book).exportNotices,
		"registers.zip": (*book).exportRegisters,
	} {
		if err := write(b, filepath.Join(folder, name)); err != nil {
			return err
		}
	}
	if err := copyMaps(filepath.Join(dir, "maps")); err != nil {
		return err
	}
	return os.WriteFile(filepath.Join(dir, "exports.yaml"), []byte(strings.TrimPrefix(exportsProgram, "\n")+abroadFiles()), 0o644)
}

func copyMaps(dir string) error {
	maps, err := fs.Sub(mapFiles, "maps")
	if err != nil {
		return err
	}
	return os.CopyFS(dir, maps)
}
