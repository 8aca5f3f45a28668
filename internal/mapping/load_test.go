package mapping_test

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/mapping"
)

const head = "map: x\nkind: training\n"

// TestLoadProblems holds what each mistake in a map is told as, with its place.
func TestLoadProblems(t *testing.T) {
	const fine = head + "fields: {worker_id: ID, date: Date}\n"
	require.Empty(t, problems(t, fine))
	for _, c := range []struct{ name, text, want string }{
		{"no title", "kind: training\nfields: {worker_id: ID, date: Date}\n", `m.yaml:1:1: the file has no map. Add it: title of the map: which export of which system it reads.`},
		{"unknown kind", "map: x\nkind: audiogramm\nfields: {date: D}\n", `m.yaml:2:7: kind cannot be "audiogramm". Write audiogram if that is meant; the words are worker, assignment, group, measurement, task, change, notice, audiogram, follow_up, training, protector, protector_issue, fit_test, wear_check, instrument, calibration, room_survey, tester, document, control, examination.`},
		{"unknown key", fine + "row: {skip: [1]}\n", `m.yaml:4:1: the file has no key "row". Write rows if that is meant; the keys are blank, dates, delimiter, ear, encoding, fhir, fields, format, frequency, head, ignore, kind, map, numbers, records, rows, sheet, thresholds.`},
		{"unknown field", head + "fields:\n  worker_id: ID\n  date: Date\n  topic: T\n", `m.yaml:6:3: training records have no field "topic". Write topics if that is meant; the fields are worker_id, date, topics, language, by, certified.`},
		{"unknown key of a column", head + "fields: {worker_id: {colum: ID}, date: Date}\n", `m.yaml:3:22: worker_id has no key "colum". Write column if that is meant; the keys are above, blank, case, column, constant, make, order, others, pad, position, prefix, split, strip, unit, values.`},
		{"no origin", head + "fields: {worker_id: {pad: 6}, date: Date}\n", `m.yaml:3:21: the map does not say where the field comes from. Write one of column, position, above, constant and make.`},
		{"two origins", head + "fields: {worker_id: {column: ID, constant: \"1\"}, date: Date}\n", `m.yaml:3:21: the field comes from several places: column, constant. Write one of column, position, above, constant and make.`},
		{"empty column", head + "fields: {worker_id: , date: Date}\n", `m.yaml:3:21: worker_id is not of a form that is allowed here. Write the name of a column, or keys such as column: TestDate.`},
		{"positions only", head + "fields: {worker_id: {position: 1}, date: {position: 2}}\n", `m.yaml:3:9: all columns are given by position, so that the header cannot be told from data. Write none: true under head if there is no header, or row with its number.`},
		{"no fields", head, `m.yaml: the map names no fields. List under fields where each field of the record comes from.`},
		{"required missing", head + "fields: {worker_id: ID}\n", `m.yaml:3:9: every training needs date, but the map does not say where it comes from. Name its column, write it as constant, or make it of other fields.`},
		{"useless key", head + "fields: {worker_id: {constant: A, pad: 6}, date: Date}\n", `m.yaml:3:35: pad has no use beside constant. Remove the key.`},
		{"others alone", head + "fields: {worker_id: {column: ID, others: keep}, date: Date}\n", `m.yaml:3:34: others has no use without values. List the values, or remove the key.`},
		{"order of no date", head + "fields: {worker_id: {column: ID, order: day_month_year}, date: Date}\n", `m.yaml:3:34: worker_id holds no date. Remove the key.`},
		{"pad of a date", head + "fields: {worker_id: ID, date: {column: Date, pad: 3}}\n", `m.yaml:3:46: pad is for ids, but date holds none. Remove the key.`},
		{"split of no list", head + "fields: {worker_id: {column: ID, split: +}, date: Date}\n", `m.yaml:3:34: worker_id holds no list. Remove the key.`},
		{"unit of a text", head + "fields: {worker_id: {column: ID, unit: hours}, date: Date}\n", `m.yaml:3:40: worker_id cannot be in the unit hours. Remove the key; the number must be in the unit of the field: id of the worker.`},
		{"wrong unit", "map: x\nkind: group\nfields: {group: G, site: S, shift_minutes: {column: M, unit: percent}}\n", `m.yaml:3:62: shift_minutes cannot be in the unit percent. Write one of minutes, hours, clock, day_fraction.`},
		{"bad value", "map: x\nkind: worker\nfields:\n  worker_id: ID\n  site: S\n  hired_on: H\n  sex: {column: Sex, values: {H: homme, F: female}}\n", `m.yaml:7:34: sex: "homme" is not one of the words allowed here. Write one of female, male, unspecified.`},
		{"bad answer", "map: x\nkind: worker\nfields:\n  worker_id: ID\n  site: S\n  hired_on: H\n  in_program: {column: P, values: {J: ja}}\n", `m.yaml:7:39: in_program: "ja" is neither yes nor no. Write yes or no, and leave the cell empty if it is not known.`},
		{"bad constant", head + "fields: {worker_id: ID, date: {constant: 04/03/2025}}\n", `m.yaml:3:42: date: "04/03/2025" is not a date of the form YYYY-MM-DD. State it as YYYY-MM-DD; the order of day and month is never guessed.`},
		{"unusual word", head + "fields: {worker_id: ID, date: Date, topics: {column: T, values: {N: noise_effect}}}\n", `m.yaml:3:69: topics: "noise_effect" is not a word that the bundles look for, but noise_effects is. Write noise_effects if that is meant; otherwise nothing needs to be done.`},
		{"contradicting values", head + "fields: {worker_id: ID, date: Date, language: {column: L, values: {D: de, d: da}}}\n", `m.yaml:3:67: the words D and d are the same apart from case, accents or blanks, but mean different things. Keep one of them, or give both the same meaning.`},
		{"value and blank", head + "blank: [x]\nfields: {worker_id: ID, date: Date, language: {column: L, values: {X: de}}}\n", `m.yaml:4:68: the word "X" stands under values and under blank. Keep it in one of the two.`},
		{"made of nothing", head + "fields: {worker_id: {make: [by, dat]}, date: Date, by: B}\n", `m.yaml:3:33: worker_id is made of "dat", which the map does not have. Write date if that is meant.`},
		{"made of itself", head + "fields: {worker_id: {make: [by]}, date: Date, by: {make: [language]}, language: {make: [by]}}\n", `m.yaml:3:58: by is made of itself. Name other fields.
m.yaml:3:88: language is made of itself. Name other fields.`},
		{"above without lines", head + "fields: {worker_id: {above: Worker}, date: Date}\n", `m.yaml:3:29: the field comes from a line above the header, but the map does not say that there are such lines. Write above: key_value under head.`},
		{"names without header", head + "head: {none: true}\nfields: {worker_id: ID, date: {position: 2}}\n", `m.yaml:4:21: a column is named, but the map says that there is no header. Write position with the number of the column.`},
		{"header and none", head + "head: {none: true, row: 2}\nfields: {worker_id: {position: 1}, date: {position: 2}}\n", `m.yaml:3:8: the map says that there is no header, and where it stands. Remove one of the two.`},
		{"transposed with row", head + "head: {transposed: true, row: 2}\nfields: {worker_id: ID, date: Date}\n", `m.yaml:3:8: in a transposed table the names stand in the first column, so that no other header can be described. Remove the other keys under head.`},
		{"three header rows", head + "head: {rows: 3}\nfields: {worker_id: ID, date: Date}\n", `m.yaml:3:14: rows is 3. Write 2 or less.`},
		{"header of objects", fine + "format: json\nhead: {row: 1}\n", `m.yaml:5:1: a list of objects has no header. Remove the key; columns are named as the keys of the objects.`},
		{"skipped header", fine + "head: {row: 3}\nrows: {skip: [1, 3]}\n", `m.yaml:5:14: row 3 is said to be the header and to be passed over. Take it out of skip, or correct head.row.`},
		{"condition of nothing", fine + "rows: {only: [{column: T}]}\n", `m.yaml:4:15: the condition does not say what the cell must be. Write is, is_not or filled.`},
		{"condition of two", fine + "rows: {only: [{column: T, position: 3, filled: true}]}\n", `m.yaml:4:15: exactly one of column and position is needed. Write either column with a name, or position with a number.`},
		{"delimiter of a workbook", fine + "format: workbook\ndelimiter: tab\nencoding: utf-8\n", `m.yaml:5:1: only delimited text has a delimiter. Remove the key, or correct the format.
m.yaml:6:1: a workbook has no encoding that could be stated. Remove the key.`},
		{"sheet of text", fine + "format: delimited\nsheet: S\nrows: {hidden: skip}\n", `m.yaml:5:1: only a workbook has sheets. Remove the key, or correct the format.
m.yaml:6:8: only a workbook has hidden rows. Remove the key, or correct the format.`},
		{"unknown delimiter", fine + "delimiter: \":\"\n", `m.yaml:4:12: delimiter cannot be ":". Write , if that is meant; the words are ,, ;, tab, pipe.`},
		{"unknown encoding", fine + "encoding: windows-1225\n", `m.yaml:4:11: "windows-1225" is no encoding that is known. Write windows-1250 if that is meant, or the name of another code page.`},
		{"unknown zone", fine + "dates: {zone: Europe/Berlim}\n", `m.yaml:4:15: "Europe/Berlim" is no time zone that is known. Write a zone such as Europe/Berlin or America/Chicago, or as_written.`},
		{"local zone", fine + "dates: {zone: Local}\n", `m.yaml:4:15: "Local" is no time zone that is known. Write a zone such as Europe/Berlin or America/Chicago, or as_written.`},
		{"two points", fine + "numbers: {thousands: .}\n", `m.yaml:4:22: the decimal sign and the sign between thousands are the same. Write decimal: "," if the comma is the decimal sign, or correct thousands.`},
		{"two commas", fine + "numbers: {thousands: \",\", decimal: \",\"}\n", `m.yaml:4:22: the decimal sign and the sign between thousands are the same. Write decimal: "," if the comma is the decimal sign, or correct thousands.`},
		{"used and ignored", fine + "ignore: [Other, \"  date \"]\n", `m.yaml:4:17: the column "  date " is both used and ignored. Take it out of ignore, or remove what uses it.`},
		{"thresholds of a training", fine + "thresholds: {not_tested: [DNT]}\n", `m.yaml:4:1: training records have no hearing threshold levels. Remove the key.`},
		{"ear of a training", fine + "ear: {column: Ear, left: [L], right: [R]}\n", `m.yaml:4:1: the map says which column tells the ear, but nothing that belongs to one ear. Name fields such as ear.500, or add frequency.
m.yaml:4:1: training records have no fields for each ear. Remove the key.`},
		{"fhir without format", fine + "fhir: {pad: 6}\n", `m.yaml:4:1: the map says how FHIR resources are read, but its format is not fhir. Write format: fhir, or remove the key.`},
		{"fhir with fields", "map: x\nformat: fhir\nkind: training\nfields: {date: D}\n", `m.yaml:3:7: training records are not read from FHIR. Write kind: audiogram.
m.yaml:4:1: fields has no use for FHIR, which has neither rows nor columns. Remove it; what can be said of FHIR stands under fhir.`},
		{"fhir constants", "map: x\nformat: fhir\nkind: audiogram\nfhir:\n  constants: {mobil: yes, mobile: ja}\n  no_response: {words: [NR]}\n  purposes: [{code: a, purpose: exit}, {code: a, purpose: other}]\n", `m.yaml:5:15: audiogram records have no field "mobil". Write mobile if that is meant; the fields are audiogram_id, worker_id, date, purpose, left.<Hz>, left.repeat_1000, left.stated_shift, right.<Hz>, right.repeat_1000, right.stated_shift, masked, earphones, fine_steps, audiometer_id, room_id, tester_id, quiet_hours, quiet_by_protectors, mobile, determined_on, received_on, reviewer, reviewed_on.
m.yaml:5:35: mobile: "ja" is neither yes nor no. Write yes or no, and leave the cell empty if it is not known.
m.yaml:6:16: the words for no response do not say what the highest level presented was. Write limit, in dB HL, or limits by frequency.
m.yaml:7:40: item 1 of purposes gives the same code another meaning. Keep one of the two.`},
		{"alias", head + "fields: {worker_id: &a {column: ID, pad: 6, unit: hours}, date: Date, by: *a}\n", `m.yaml:3:51: by cannot be in the unit hours. Remove the key; the number must be in the unit of the field: id of the trainer.
m.yaml:3:51: worker_id cannot be in the unit hours. Remove the key; the number must be in the unit of the field: id of the worker.`},
		{"not UTF-8", "map: \xff\n", `m.yaml: the file is not UTF-8 text. Save the file as UTF-8.`},
		{"broken", "map: [\n", `m.yaml:1: the YAML cannot be read: did not find expected node content. Check indentation, quotes and brackets here and in the line before.`},
		{"empty", "# nothing\n", `m.yaml: the file is empty. Fill it in or remove it.`},
	} {
		t.Run(c.name, func(t *testing.T) { require.Equal(t, c.want, problems(t, c.text)) })
	}
}

func TestLoadHearingProblems(t *testing.T) {
	const audiogram = "map: x\nkind: audiogram\nfields:\n  audiogram_id: A\n  worker_id: W\n  date: D\n"
	require.Empty(t, problems(t, audiogram+"  left.500: L5\n"))
	for _, c := range []struct{ name, text, want string }{
		{"misspelt frequency", audiogram + "  left.5000: L5\n", `m.yaml:7:3: audiogram records have no field "left.5000". Write left.500 if that is meant; the fields are audiogram_id, worker_id, date, purpose, left.<Hz>, left.repeat_1000, left.stated_shift, right.<Hz>, right.repeat_1000, right.stated_shift, masked, earphones, fine_steps, audiometer_id, room_id, tester_id, quiet_hours, quiet_by_protectors, mobile, determined_on, received_on, reviewer, reviewed_on.`},
		{"ear without ear", audiogram + "  ear.500: L5\n", `m.yaml:7:3: the field ear.500 needs to know the ear of a row. Say under ear which column tells the ear, or name the fields left.500, right.500 and so on.`},
		{"unknown ear field", audiogram + "  ear.5000: L5\near: {column: E, left: [L], right: [R]}\n", `m.yaml:7:3: audiogram records have no field "ear.5000". Write ear.500 if that is meant; the fields are audiogram_id, worker_id, date, purpose, left.<Hz>, left.repeat_1000, left.stated_shift, right.<Hz>, right.repeat_1000, right.stated_shift, masked, earphones, fine_steps, audiometer_id, room_id, tester_id, quiet_hours, quiet_by_protectors, mobile, determined_on, received_on, reviewer, reviewed_on, ear.<Hz>, ear.repeat_1000, ear.stated_shift.`},
		{"ear without fields", audiogram + "ear: {column: E, left: [L], right: [R]}\n", `m.yaml:7:1: the map says which column tells the ear, but nothing that belongs to one ear. Name fields such as ear.500, or add frequency.`},
		{"both ears", audiogram + "  ear.500: L5\near: {column: E, left: [L, B], right: [R, b]}\n", `m.yaml:8:39: a word stands for the left ear as well as for the right one. Keep each word in one of the two.`},
		{"ear twice", audiogram + "  ear.500: L5\n  left.500: L6\near: {position: 3, left: [L], right: [R]}\n", `m.yaml:8:3: left.500 comes from ear.500 as well. Keep one of the two.`},
		{"ear without column", audiogram + "  ear.500: L5\near: {left: [L], right: [R]}\n", `m.yaml:8:6: exactly one of column and position is needed. Write either column with a name, or position with a number.`},
		{"frequency without ear", audiogram + "frequency: {frequency: F, threshold: T}\n", `m.yaml:7:1: rows of one frequency need to know the ear. Say under ear which column tells the ear.`},
		{"frequency and tones", audiogram + "  left.500: L5\n  masked: M\near: {column: E, left: [L], right: [R]}\nfrequency: {frequency: {column: F, unit: hours, values: {a: 5000}}, threshold: {constant: 5}, masked: M}\n", `m.yaml:7:3: the thresholds come from the columns under frequency. Remove it here.
m.yaml:8:3: masked comes both from fields and from frequency. Keep one of the two.
m.yaml:10:42: a frequency cannot be in the unit hours. Write hz or khz.
m.yaml:10:61: this is no frequency that records hold. Write a frequency in Hz such as 4000.
m.yaml:10:80: this must come from a column of each row. Name the column.`},
		{"words without limit", audiogram + "  left.500: L5\nthresholds: {no_response: {words: [NR]}}\n", `m.yaml:8:27: the words for no response do not say what the highest level presented was. Write limit, in dB HL, or limits by frequency.`},
		{"limits with a hole", audiogram + "  left.500: L5\n  right.repeat_1000: R\n  left.2000: L2\nthresholds: {no_response: {words: [NR], limits: {500: 100, 900: 100}}}\n", `m.yaml:10:49: the highest level presented at 1000 Hz is not stated. Add it, or write limit for all other frequencies.
m.yaml:10:49: the highest level presented at 2000 Hz is not stated. Add it, or write limit for all other frequencies.
m.yaml:10:60: "900" is no frequency that records hold. Write a frequency in Hz such as 4000.`},
		{"neither words nor marks", audiogram + "  left.500: L5\nthresholds: {no_response: {limit: 100}}\n", `m.yaml:8:27: the map says neither by which words nor by which marks no response is written. List the words or the marks.`},
		{"one word, two meanings", audiogram + "  left.500: L5\nblank: [\"-\"]\nthresholds: {no_response: {words: [nr, 666], limit: 100}, not_tested: [NR, \"-\"]}\n", `m.yaml:9:36: the word "nr" stands under thresholds.not_tested as well. Keep it in one of the two.
m.yaml:9:76: the word "-" stands under blank as well. Keep it in one of the two.`},
		{"limit", audiogram + "  left.500: L5\nthresholds: {no_response: {words: [nr], limit: 200}}\n", `m.yaml:8:48: limit is 200. Write 130 or less.`},
		{"parts with ear", audiogram + "  ear.500: L5\near: {column: E, left: [L], right: [R]}\nrecords: [{fields: {purpose: {constant: exit}}}]\n", `m.yaml:9:1: several records of one row cannot be combined with rows of one ear. Keep one of the two.`},
		{"part without date", strings.Replace(audiogram, "  date: D\n", "", 1) + "records: [{fields: {date: D}}, {fields: {purpose: {constant: exitt}}}]\n", `m.yaml:6:41: every audiogram needs date, but the map does not say where it comes from. Name its column, write it as constant, or make it of other fields.
m.yaml:6:62: purpose: "exitt" is not one of the words allowed here. Write exit if that is meant; the words allowed are baseline, periodic, retest, exit, other.`},
	} {
		t.Run(c.name, func(t *testing.T) { require.Equal(t, c.want, problems(t, c.text)) })
	}
}

func problems(t testing.TB, text string) string {
	t.Helper()
	m, list := load(t, text)
	require.Equal(t, list.Failed(), m == nil)
	if list == nil {
		return ""
	}
	return list.Error()
}

func TestLoadRefusesFiles(t *testing.T) {
	dir := t.TempDir()
	_, list := mapping.Load(filepath.Join(dir, "none.yaml"), "none.yaml")
	require.EqualError(t, list, "none.yaml: there is no such map. Correct the path, or put the map there.")
	_, list = mapping.Load(dir, "dir")
	require.EqualError(t, list, "dir: the map cannot be read: is a directory. Check the path and its permissions.")
	big := filepath.Join(dir, "big.yaml")
	require.NoError(t, os.WriteFile(big, make([]byte, 1<<20+1), 0o600))
	_, list = mapping.Load(big, "big.yaml")
	require.EqualError(t, list, "big.yaml: the file is larger than a map can be (1 MiB). Name the map file; exports belong in files of their own.")
}

// TestShortForms reads what may be written shorter, or as a number where a text is meant.
func TestShortForms(t *testing.T) {
	m := good(t, "\ufeffmap: 2025\nkind: audiogram\nfields:\n  audiogram_id: {column: Id}\n  worker_id: {column: [A, 7]}\n  date: D\n  left.500: 500\n  mobile: {constant: yes}\n  purpose: {column: P, values: {1: exit, yes: other}}\nthresholds: {not_tested: [888, NT]}\nhead: {row: 1e1}\n")
	f := m.File
	require.Equal(t, "2025", f.Map)
	require.Equal(t, mapping.Names{"Id"}, f.Fields["audiogram_id"].Column)
	require.Equal(t, mapping.Names{"A", "7"}, f.Fields["worker_id"].Column)
	require.Equal(t, mapping.Names{"500"}, f.Fields["left.500"].Column)
	require.Equal(t, "yes", f.Fields["mobile"].Constant)
	require.Equal(t, map[string]string{"1": "exit", "yes": "other"}, f.Fields["purpose"].Values)
	require.Equal(t, []string{"888", "NT"}, f.Thresholds.NotTested)
	require.Equal(t, 10, f.Head.Row)
}
