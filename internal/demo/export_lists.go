package demo

import (
	"archive/zip"
	"bytes"
	"encoding/json"
	"errors"
	"os"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"
	"gopkg.in/yaml.v3"

	"hearduty/internal/audiometry"
	"hearduty/internal/intake"
	"hearduty/internal/record"
)

// exportFollowUps writes what a clinic of German-speaking staff notes.
func (b *book) exportFollowUps(path string) error {
	rows := [][]string{{"Personalnummer", "Test", "Seite", "Datum", "Maßnahme", "Ergebnis", "Durch"}}
	for _, f := range b.followUps {
		rows = append(rows, []string{f.WorkerID, f.AudiogramID, replaced(f.Ear, "left", "links", "right", "rechts", "both", "beide"), dotted(f.Date),
			replaced(f.Type, "referral", "Überweisung", "refitting", "Neuanpassung", "fitting", "Anpassung"),
			replaced(f.Result, "work_related", "arbeitsbedingt", "not_work_related", "nicht arbeitsbedingt"), f.By})
	}
	return os.WriteFile(path, delimited(';', rows), 0o644)
}

// exportTraining writes a list whose topics are letters.
func (b *book) exportTraining(path string) error {
	rows := [][]string{{"id", "when", "topics", "lang", "trainer"}}
	for _, t := range b.trainings {
		var topics []string
		for _, topic := range t.Topics {
			topics = append(topics, replaced(topic, "noise_effects", "N", "protectors", "P", "audiometry", "A"))
		}
		rows = append(rows, []string{t.WorkerID, american(t.Date), strings.Join(topics, "+"), t.Language, t.By})
	}
	return os.WriteFile(path, append([]byte("# training list, month first\r\n"), delimited('|', rows)...), 0o644)
}

// exportIssues writes the list of protectors handed out; its dates settle their order by themselves.
func (b *book) exportIssues(path string) error {
	rows := [][]string{{"Worker", "Model", "Out", "Back", "Models shown", "Fitted by", "Must wear"}}
	for _, i := range b.issues {
		rows = append(rows, []string{i.WorkerID, i.ProtectorID, american(i.Date), american(i.ReturnedOn), i.ChoicesOffered.String(), i.FittedBy, word(i.Required, "x", "o")})
	}
	return os.WriteFile(path, delimited(',', rows), 0o644)
}

// exportChecks writes the log of instruments as one JSON object a line.
func (b *book) exportChecks(path string) error {
	var out bytes.Buffer
	encoder := json.NewEncoder(&out)
	for _, c := range b.calibrations {
		o := map[string]any{"device": c.InstrumentID, "day": c.Date.String(), "what": c.Type, "ok": replaced(c.Result, "pass", "+", "fail", "-", "adjusted", "~"), "who": c.By}
		if c.Deviation != nil {
			db := map[string]float64{}
			for i, hz := range audiometry.Frequencies {
				if n := c.Deviation[i]; n.Known {
					db[strconv.Itoa(hz)] = n.Value
				}
			}
			o["db"] = db
		}
		if err := encoder.Encode(o); err != nil {
			return err
		}
	}
	return os.WriteFile(path, out.Bytes(), 0o644)
}

// exportProtection writes two canonical tables as sheets of one workbook.
func (b *book) exportProtection(path string) error {
	f := excelize.NewFile()
	defer f.Close()
	s := &sheet{file: f, name: "fit_tests"}
	s.do(f.SetSheetName("Sheet1", s.name))
	canonical(s, b.fitTests)
	_, err := f.NewSheet("wear_checks")
	s.do(err)
	other := &sheet{file: f, name: "wear_checks", err: s.err}
	canonical(other, b.wearChecks)
	return other.save(path)
}

func canonical[R record.Record](s *sheet, list []R) {
	t, _ := record.TableOf(list[0].Kind())
	columns := intake.UsedColumns(t, list)
	head := make([]any, len(columns))
	for i, name := range columns {
		head[i] = name
	}
	s.row(head...)
	for _, r := range list {
		row := make([]any, len(columns))
		for i, name := range columns {
			row[i] = t.Text(r, t.Index(name))
		}
		s.row(row...)
	}
}

// exportNotices writes canonical records as YAML.
func (b *book) exportNotices(path string) error {
	t, _ := record.TableOf("notice")
	list := make([]map[string]string, len(b.notices))
	for i, n := range b.notices {
		list[i] = map[string]string{}
		for at, name := range t.Names() {
			if text := t.Text(n, at); text != "" {
				list[i][name] = text
			}
		}
	}
	text, err := yaml.Marshal(list)
	if err != nil {
		return err
	}
	return os.WriteFile(path, text, 0o644)
}

// exportRegisters writes the small canonical files into one ZIP archive.
func (b *book) exportRegisters(path string) error {
	var out bytes.Buffer
	z := zip.NewWriter(&out)
	err := errors.Join(member(z, b.groups), member(z, b.tasks), member(z, b.changes), member(z, b.protectors), member(z, b.instruments),
		member(z, b.roomSurveys), member(z, b.testers), member(z, b.documents), member(z, b.controls), z.Close())
	if err != nil {
		return err
	}
	return os.WriteFile(path, out.Bytes(), 0o644)
}

func member[R record.Record](z *zip.Writer, list []R) error {
	t, _ := record.TableOf(list[0].Kind())
	w, err := z.Create("registers/" + t.FileName() + ".csv")
	if err != nil {
		return err
	}
	c := intake.NewCSVWriter(w, t, intake.UsedColumns(t, list))
	for _, r := range list {
		if err := c.Write(r); err != nil {
			return err
		}
	}
	return c.Flush()
}
