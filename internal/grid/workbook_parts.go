package grid

import (
	"archive/zip"
	"compress/flate"
	"errors"
	"fmt"
	"io"
	"net/url"
	"path"
	"strings"
)

// limits are the most bytes that a part may have once unpacked. A part is read as a stream, and the sheet
// twice, so what is ever unpacked is bounded by twice the sheet, the texts and three other parts.
type limits struct{ sheet, texts, other int64 }

// workbookLimits have room for a full sheet of 1,048,576 rows with 50 columns.
var workbookLimits = limits{sheet: 2 << 30, texts: 512 << 20, other: 16 << 20}

const saveAnew = "Open the workbook in a spreadsheet program, save it anew as .xlsx and read that"

// parts are the files in the ZIP archive that a workbook is.
type parts map[string]*zip.File

func openParts(r io.ReaderAt, size int64) (parts, error) {
	z, err := zip.NewReader(r, size)
	if err != nil && !errors.Is(err, zip.ErrInsecurePath) {
		return nil, faultf("Fetch or export the file again", "the workbook is damaged or incomplete: it is no whole ZIP archive")
	}
	p := make(parts, len(z.File))
	for _, f := range z.File {
		name := partName(f.Name)
		if p[name] != nil {
			return nil, faultf(saveAnew, "the workbook has two parts with the name %.80q", f.Name)
		}
		if f.Flags&1 != 0 {
			return nil, faultf("Save the workbook without a password and read that", "the workbook is encrypted")
		}
		p[name] = f
	}
	return p, nil
}

// partName is the name by which a part is found: without regard to case, with slashes.
func partName(name string) string {
	return strings.ToLower(strings.TrimPrefix(path.Clean("/"+strings.ReplaceAll(name, `\`, "/")), "/"))
}

// part is the XML of one part, opened for reading.
type part struct {
	*markup
	file io.Closer
}

// open opens a part that may have so many bytes.
func (p parts) open(name string, most int64) (*part, error) {
	f := p[partName(name)]
	if f == nil {
		return nil, faultf(saveAnew, "the workbook has no part %.80q, which it needs", strings.TrimPrefix(name, "/"))
	}
	r, err := f.Open()
	if err != nil {
		return nil, damaged(name, err)
	}
	return &part{newMarkup(&unpacked{r, most, most}), r}, nil
}

// each reads a whole part: it calls do for every start tag, which may read on up to the end of that element.
func (p parts) each(name string, most int64, do func(x *part, name string) error) error {
	x, err := p.open(name, most)
	if err != nil {
		return err
	}
	defer x.file.Close()
	for {
		t, err := x.next()
		if err == nil && t == startTag {
			err = do(x, string(x.name))
		}
		if err == io.EOF {
			return nil
		}
		if err != nil {
			return damaged(name, err)
		}
	}
}

// damaged gives the fault of a part that cannot be read.
func damaged(name string, err error) error {
	if f, ok := errors.AsType[*Fault](err); ok {
		return f
	}
	return faultf(saveAnew, "the part %.80q of the workbook cannot be read: %s", strings.TrimPrefix(name, "/"), reason(err))
}

// reason says in words what an error of the archive or the markup means.
func reason(err error) string {
	_, packed := errors.AsType[flate.CorruptInputError](err)
	switch {
	case packed:
		return "what is packed is damaged"
	case errors.Is(err, zip.ErrChecksum):
		return "its checksum is wrong"
	case errors.Is(err, zip.ErrAlgorithm):
		return "it is packed in a way that no workbook may use"
	case errors.Is(err, io.ErrUnexpectedEOF), errors.Is(err, io.EOF):
		return "it breaks off in the middle"
	}
	return err.Error()
}

// unpacked stops the reading of a part that is longer than it may be.
type unpacked struct {
	r          io.Reader
	left, most int64
}

func (b *unpacked) Read(p []byte) (int, error) {
	n, err := b.r.Read(p)
	if b.left -= int64(n); b.left < 0 {
		return 0, fmt.Errorf("it is longer than %s once unpacked", bytesIn(b.most))
	}
	return n, err
}

func bytesIn(n int64) string {
	if n >= 1<<20 {
		return fmt.Sprintf("%d MiB", n>>20)
	}
	return fmt.Sprintf("%d KiB", n>>10)
}

// related are the parts that a part refers to. A kind is the last word of its address, such as worksheet.
type related struct {
	kinds map[string]string // kind of a part by its name
	names map[string]string // name of a part by the id it is referred to
	first map[string]string // name of the first part of a kind
}

// related reads what the part of that name refers to; an empty name means the workbook as a whole.
func (p parts) related(of string, most int64) (related, error) {
	out := related{map[string]string{}, map[string]string{}, map[string]string{}}
	dir, file := path.Split(of)
	return out, p.each(path.Join(dir, "_rels", file+".rels"), most, func(x *part, name string) error {
		if name != "Relationship" {
			return nil
		}
		var id, kind, target, mode string
		for {
			name, value, ok := x.attr()
			if !ok {
				break
			}
			switch string(name) {
			case "Id":
				id = string(value)
			case "Type":
				kind = path.Base(string(value))
			case "Target":
				target = strings.ReplaceAll(string(value), `\`, "/")
			case "TargetMode":
				mode = string(value)
			}
		}
		if plain, err := url.PathUnescape(target); err == nil {
			target = plain
		}
		if !strings.HasPrefix(target, "/") {
			target = path.Join("/", dir, target)
		}
		if mode != "External" {
			out.names[id], out.kinds[target] = target, kind
			if out.first[kind] == "" {
				out.first[kind] = target
			}
		}
		return nil
	})
}
