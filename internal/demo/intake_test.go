package demo

import (
	"context"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// sources lists the record files of a program that this package has written.
func sources(dir string, sites ...string) *program.Program {
	p := &program.Program{Dir: dir}
	for _, id := range sites {
		p.Sites = append(p.Sites, program.Site{ID: id, Country: "US", Region: "OH"})
	}
	for _, k := range kinds() {
		shown := "records/" + csvName(k)
		p.Sources = append(p.Sources, program.Source{Path: filepath.Join(dir, shown), Shown: shown, Kind: k})
	}
	return p
}

func TestIntakeTakesEveryRow(t *testing.T) {
	scale := filepath.Join(t.TempDir(), "scale")
	require.NoError(t, WriteScale(scale, 120))
	for name, p := range map[string]*program.Program{
		"demo":  sources(testdata, "kiln-hill", "larch-street"),
		"scale": sources(scale, "site-001"),
	} {
		t.Run(name, func(t *testing.T) {
			ledger, err := intake.Read(context.Background(), p, func(record.Record) error { return nil })
			require.NoError(t, err)
			require.Empty(t, ledger.Rejects)
			require.Empty(t, ledger.Remarks)
			for _, in := range ledger.Inputs {
				require.Equal(t, in.Rows, in.Accepted+in.NotData, in.File)
			}
		})
	}
}
