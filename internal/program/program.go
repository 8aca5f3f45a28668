// Package program reads the program file: the sites of an employer's hearing-conservation program, the
// bundles that judge them, and the files that hold the records.
package program

import (
	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// FileName is the name of the program file in a program's folder.
const FileName = "program.yaml"

// File is the form of the program file. Its JSON Schema is generated from here. An item of records is
// a RecordFile, or only the path of a canonical file.
type File struct {
	Program  string       `json:"program" doc:"title of the hearing-conservation program"`
	Sites    []FileSite   `json:"sites" doc:"sites of the program, each under its own law"`
	Records  []RecordFile `json:"records" doc:"files with the records; the path alone, if the file is canonical and its name tells the kind"`
	Same     string       `json:"same_person,omitempty" doc:"YAML file that says which worker ids are one person, and which id stood for several"`
	AsOf     string       `json:"as_of,omitempty" doc:"day on which the program is judged, YYYY-MM-DD; the flag --as-of comes before it, and without either it is today"`
	Accepted string       `json:"accepted,omitempty" doc:"YAML file with the gaps that the employer has accepted"`
}

// FileSite is one site as the program file states it.
type FileSite struct {
	ID      string         `json:"id" doc:"id of the site, as the records use it"`
	Name    string         `json:"name,omitempty" doc:"name of the site"`
	Country string         `json:"country,omitempty" doc:"country, ISO 3166-1 code of two letters"`
	Region  string         `json:"region,omitempty" doc:"state, province or region"`
	Bundles []string       `json:"bundles" doc:"ids of the bundles that judge the site"`
	Choices map[string]any `json:"choices,omitempty" doc:"what the employer elects where the law leaves a choice"`
}

// RecordFile is one item of records as the program file states it.
type RecordFile struct {
	File     string `json:"file" doc:"path of the file, relative to the program file; an asterisk stands for any part of a name"`
	Member   string `json:"member,omitempty" doc:"file within a ZIP archive; if left out, each member with a canonical name is read"`
	Kind     string `json:"kind,omitempty" doc:"record kind; needed unless the map or the file name tells it"`
	Sheet    string `json:"sheet,omitempty" doc:"sheet of a workbook; may be left out if only one is visible"`
	Encoding string `json:"encoding,omitempty" doc:"code page of the text, such as windows-1252 or cp850; UTF-8 and UTF-16 are recognized"`
	Map      string `json:"map,omitempty" doc:"YAML file that says how the columns of an export become fields"`
}

// Program is a program file that was read and checked.
type Program struct {
	Title    string
	File     string        // the program file, as the user would type it
	Dir      string        // folder of the program file
	Digest   string        // SHA-256 of the program file, in hex
	AsOf     calendar.Date // day on which the program is judged, or not known
	Sites    []Site
	Sources  []Source
	Accepted Path    // the file of accepted gaps, if any
	Aliases  []Alias // ids of people with several, as the same_person file says
}

// Path is a file that the program file names. The zero Path names none.
type Path struct {
	Open  string // path that can be opened
	Shown string // path relative to the program's folder, with slashes
}

// Site is one site of the program.
type Site struct {
	ID, Name, Country, Region string
	Bundles                   []string
	Choices                   map[string]any // bool, int, float64, string, nil, or lists and maps of them
	At                        diag.Position
	BundlesAt                 []diag.Position          // where each of Bundles stands
	ChoicesAt                 map[string]diag.Position // where each of Choices stands
}

// Source is one table of records: a file, a member of a ZIP archive, or a sheet of a workbook.
type Source struct {
	Path     string      // path that can be opened
	Shown    string      // path relative to the program's folder, with slashes; that of the archive goes before a member's name
	Member   string      // file within the ZIP archive at Path, or empty
	Kind     record.Kind // empty if the map must tell it
	Map      Path        // map of an export; none for a canonical file
	Sheet    string      // of a workbook, or empty
	Encoding string      // code page, or empty
	At       diag.Position
}

// Site gives the site of an id. It returns false if the program names no such site.
func (p *Program) Site(id string) (*Site, bool) {
	for i := range p.Sites {
		if p.Sites[i].ID == id {
			return &p.Sites[i], true
		}
	}
	return nil, false
}

// CheckBundles names each bundle of a site that is not among the known ones.
func (p *Program) CheckBundles(known []string) diag.List {
	var out diag.List
	for _, site := range p.Sites {
		for i, id := range site.Bundles {
			if !contains(known, id) {
				out.Errorf(site.BundlesAt[i], suggest(id, known, "bundles"), "site %s names the bundle %q, which does not exist", site.ID, id)
			}
		}
	}
	return out
}
