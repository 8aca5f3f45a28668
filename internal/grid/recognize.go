package grid

import (
	"archive/zip"
	"bytes"
	"io"
	"path"
	"strings"
)

// endings are the formats by the endings of names. What a workbook is called is a workbook only by its bytes.
var endings = map[string]Format{
	".csv": Delimited, ".tsv": Delimited, ".tab": Delimited, ".psv": Delimited, ".txt": Delimited, ".dat": Delimited, ".asc": Delimited,
	".xlsx": Delimited, ".xlsm": Delimited, ".xls": Delimited,
	".json": JSON, ".ndjson": Lines, ".jsonl": Lines, ".yaml": YAML, ".yml": YAML,
}

const export = "Export the table as CSV UTF-8 or as a workbook (.xlsx) and name that file"

// foreign are the beginnings of files that are no tables, and what they are.
var foreign = []struct{ begin, what, remedy string }{
	{"\xd0\xcf\x11\xe0", "an old workbook (.xls) or a workbook with a password, whatever its name says", "Save it as a workbook (.xlsx) without a password, or export the table as CSV UTF-8, and name that file"},
	{"\x1f\x8b", "packed (gzip)", "Unpack it and name the file that comes out"},
	{"7z\xbc\xaf\x27\x1c", "a packed archive (7z)", "Unpack it and name the files in it"},
	{"Rar!\x1a\x07", "a packed archive (RAR)", "Unpack it and name the files in it"},
	{"BZh", "packed (bzip2)", "Unpack it and name the file that comes out"},
	{"\xfd7zXZ\x00", "packed (xz)", "Unpack it and name the file that comes out"},
	{"%PDF-", "a PDF document", "Ask for the table itself, as CSV UTF-8 or as a workbook (.xlsx)"},
	{"{\\rtf", "a formatted text (RTF)", export},
	{"\xff\xfe\x00\x00", "UTF-32 text", "Save the file as UTF-8 and name that"},
	{"\x00\x00\xfe\xff", "UTF-32 text", "Save the file as UTF-8 and name that"},
}

// webPages are the beginnings of web pages, which some systems write in place of a workbook, in small letters.
var webPages = []string{"<!doctype", "<html", "<head", "<meta", "<style", "<table"}

// recognize tells the format by the first bytes, else by the ending of the name.
func (f *File) recognize() (Format, error) {
	head := f.survey.head
	if bytes.HasPrefix(head, []byte("PK\x03\x04")) || bytes.HasPrefix(head, []byte("PK\x05\x06")) {
		return f.recognizeArchive()
	}
	for _, k := range foreign {
		if bytes.HasPrefix(head, []byte(k.begin)) {
			return "", faultf(k.remedy, "the file is %s", k.what)
		}
	}
	text := f.plainHead()
	const save = "Open it in a spreadsheet, save it as a workbook (.xlsx) or as CSV UTF-8, and name that file"
	for _, begin := range webPages {
		if beginsWith(text, begin) {
			return "", faultf(save, "the file is a web page, as some systems write it in place of a workbook")
		}
	}
	if beginsWith(text, "<?xml") {
		return "", faultf(save, "the file is XML, as some systems write it in place of a workbook")
	}
	ending := strings.ToLower(path.Ext(f.Name))
	format, known := endings[ending]
	switch {
	case !known && ending == "":
		return "", faultf("Give it the ending of what it is: .csv, .xlsx, .json, .ndjson or .yaml", "the name of the file has no ending, so its format is not known")
	case !known:
		return "", faultf("Export the table as CSV UTF-8, a workbook (.xlsx), JSON, NDJSON or YAML and name that file", "files that end in %s cannot be read", shorten(ending))
	case format == JSON && looksLikeLines(text):
		return Lines, nil
	}
	return format, nil
}

func beginsWith(text, begin string) bool {
	return len(text) >= len(begin) && strings.EqualFold(text[:len(begin)], begin)
}

// plainHead is the beginning of the text without mark and blanks, for looking at its ASCII characters.
func (f *File) plainHead() string {
	head := f.survey.head
	if f.survey.wide != "" {
		head = bytes.ReplaceAll(head, []byte{0}, nil)
	}
	if f.survey.marked {
		head = bytes.TrimLeft(head, "\xef\xbb\xbf\xff\xfe")
	}
	return string(bytes.TrimLeft(head, " \t\r\n"))
}

// looksLikeLines says whether JSON text begins with two lines of an object each.
func looksLikeLines(text string) bool {
	first, rest, _ := strings.Cut(text, "\n")
	return strings.HasPrefix(first, "{") && strings.HasSuffix(strings.TrimSpace(first), "}") && strings.HasPrefix(strings.TrimLeft(rest, " \t\r\n"), "{")
}

// recognizeArchive tells a workbook from any other ZIP archive.
func (f *File) recognizeArchive() (Format, error) {
	size, err := f.r.Seek(0, io.SeekEnd)
	if err != nil {
		return "", cannotRead(err)
	}
	z, err := openArchive(f.r, size)
	if err != nil {
		return "", err
	}
	var types, sheets, binary bool
	for _, m := range z.File {
		switch {
		case m.Name == "[Content_Types].xml":
			types = true
		case m.Name == "xl/workbook.bin":
			binary = true
		case strings.HasPrefix(m.Name, "xl/"):
			sheets = true
		}
	}
	switch {
	case types && binary:
		return "", faultf("Save it as a workbook (.xlsx) and name that file", "the file is a binary workbook (.xlsb)")
	case types && sheets:
		return Workbook, nil
	case types:
		return "", faultf(export, "the file is an office document, but no workbook")
	case isOpenDocument(z):
		return "", faultf("Save it as a workbook (.xlsx) and name that file", "the file is an OpenDocument file (.ods)")
	}
	return "", faultf("State member: with one of its files"+listed(z), "the file is a ZIP archive")
}

func isOpenDocument(z *zip.Reader) bool {
	for _, m := range z.File {
		if m.Name == "META-INF/manifest.xml" {
			return true
		}
	}
	return false
}
