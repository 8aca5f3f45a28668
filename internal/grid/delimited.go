package grid

// delimited gives the rows of delimited text.
type delimited struct {
	text    *Decoded
	scanner *Scanner
}

func newDelimited(f *File, o Options) (Rows, error) {
	text, err := f.Text(o.Encoding)
	if err != nil {
		return nil, err
	}
	return &delimited{text, NewScanner(text, ScanOptions{Delimiter: o.Delimiter, Lenient: o.Lenient})}, nil
}

func (d *delimited) Next(r *Row) error {
	got, err := d.scanner.Next()
	if err != nil {
		return err
	}
	*r = Row{Line: got.Line, Last: got.Last, Cells: r.Cells[:0], Fault: got.Fault, NotData: got.NotData}
	for _, text := range got.Cells {
		r.Cells = append(r.Cells, Cell{Text: text})
	}
	return nil
}

func (d *delimited) About() About {
	a := d.text.About()
	a.Format, a.Delimiter = Delimited, d.scanner.Delimiter()
	return a
}

func (d *delimited) Close() error { return nil }
