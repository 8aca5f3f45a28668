package grid

import (
	"fmt"
	"strings"

	"hearduty/internal/diag"
)

// book is what a workbook says about its sheets.
type book struct {
	parts    parts
	limits   limits
	sheets   []bookSheet
	styles   string // name of the part with the styles, or empty
	texts    string // name of the part with the shared texts, or empty
	date1904 bool   // days count from 1904
	stale    bool   // values of formulas are to be computed when the workbook is opened
}

type bookSheet struct {
	name, part string
	hidden     bool
}

// readBook reads the list of sheets. Sheets that are charts or macros hold no table and are left out; one whose
// part is not there is kept, to be missed when it is read.
func readBook(p parts, l limits) (*book, error) {
	top, err := p.related("", l.other)
	main := top.first["officeDocument"]
	if err != nil || !strings.HasSuffix(main, ".xml") {
		return nil, noWorkbook(p, err)
	}
	to, err := p.related(main[1:], l.other)
	if err != nil {
		return nil, err
	}
	b := &book{parts: p, limits: l, styles: to.first["styles"], texts: to.first["sharedStrings"]}
	err = p.each(main, l.other, func(x *part, name string) error {
		switch {
		case x.depth() == 1 && name != "workbook":
			return noWorkbook(p, nil)
		case x.depth() == 2 && name == "workbookPr":
			b.date1904 = x.flag("date1904")
		case x.depth() == 2 && name == "calcPr":
			b.stale = x.flag("fullCalcOnLoad")
		case x.depth() == 3 && name == "sheet":
			b.addSheet(x, to)
		}
		return nil
	})
	return b, err
}

func (b *book) addSheet(x *part, to related) {
	var s bookSheet
	for {
		name, value, ok := x.attr()
		if !ok {
			break
		}
		switch {
		case string(name) == "name":
			s.name = string(value)
		case string(name) == "state":
			s.hidden = string(value) != "visible"
		case strings.HasSuffix(string(name), ":id"):
			if s.part = to.names[string(value)]; s.part == "" {
				s.part = string(value)
			}
		}
	}
	if kind := to.kinds[s.part]; kind == "worksheet" || kind == "" {
		b.sheets = append(b.sheets, s)
	}
}

// flag tells whether the element that has just started has the attribute and it is true.
func (m *markup) flag(want string) (set bool) {
	for {
		name, value, ok := m.attr()
		if !ok {
			return set
		}
		if string(name) == want {
			set = isTrue(value)
		}
	}
}

func isTrue(value []byte) bool { return string(value) == "1" || string(value) == "true" }

func noWorkbook(p parts, err error) error {
	const remedy = "Save the table as .xlsx or as CSV UTF-8 and read that"
	switch {
	case p["[content_types].xml"] == nil:
		return faultf("Name the file in the archive that is meant, or save the table as .xlsx", "the file is a ZIP archive, but no workbook")
	case p["xl/workbook.bin"] != nil:
		return faultf(remedy, "the file is a binary workbook (.xlsb), which is not read")
	case err != nil:
		return err
	}
	return faultf(remedy, "the file is no workbook, whatever its name says")
}

// choose finds the sheet of that name, or the only visible one if the name is empty.
func (b *book) choose(name string) (bookSheet, error) {
	var all, visible []string
	only := bookSheet{}
	for _, s := range b.sheets {
		if s.name == name && name != "" {
			return s, nil
		}
		all = append(all, s.name)
		if !s.hidden {
			visible, only = append(visible, s.name), s
		}
	}
	switch near := diag.Near(name, all); {
	case len(all) == 0:
		return only, faultf(saveAnew, "the workbook has no sheet with cells")
	case name != "" && near != "":
		return only, faultf(fmt.Sprintf("Write %.40q if that is meant; the sheets are %s", near, quoted(all)), "the workbook has no sheet %.40q", name)
	case name != "":
		return only, faultf("Name one of its sheets: "+quoted(all), "the workbook has no sheet %.40q", name)
	case len(visible) == 0:
		return only, faultf("Name the sheet to be read: "+quoted(all), "all sheets of the workbook are hidden")
	case len(visible) > 1:
		return only, faultf("Name the sheet to be read: "+quoted(visible), "the workbook has %d visible sheets", len(visible))
	}
	return only, nil
}

// quoted lists names, the first twenty if there are many.
func quoted(names []string) string {
	var b strings.Builder
	for i, n := range names {
		if i == 20 {
			fmt.Fprintf(&b, " and %d more", len(names)-i)
			break
		}
		if i > 0 {
			b.WriteString(", ")
		}
		fmt.Fprintf(&b, "%.40q", n)
	}
	return b.String()
}
