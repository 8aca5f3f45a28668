package grid

// Bounds of lists of objects.
const (
	maxKeys   = 10_000   // different keys of all objects, each of which is a column
	maxDepth  = 16       // objects within objects
	maxObject = 16 << 20 // bytes that are held to find the end of an object
)

// objectSource gives the objects of a list, one after the other.
type objectSource interface {
	// next reads the next object. At the end it returns io.EOF.
	next(*object) error
	about() About
}

// object is one object: its members, nested ones with dotted keys, or its fault. One without members is blank.
type object struct {
	line    int
	members []pair
	seen    map[string]bool
	fault   *Fault
}

type pair struct {
	key  string
	cell Cell
}

func (o *object) reset(line int) {
	o.line, o.members, o.fault = line, o.members[:0], nil
	if o.seen == nil {
		o.seen = map[string]bool{}
	}
	clear(o.seen)
}

// add adds a member.
func (o *object) add(key string, c Cell) *Fault {
	if o.seen[key] {
		return faultf("Keep one of the two", "the key %q stands twice", shorten(key))
	}
	o.seen[key] = true
	o.members = append(o.members, pair{key, c})
	return nil
}

// fail makes what is wrong the fault of the object.
func (o *object) fail(f *Fault) {
	if f != nil {
		f.Line = o.line
		o.members, o.fault = o.members[:0], f
	}
}

// objects gives a list of objects as rows. The first, of line 0, is a made header: all keys in the order in
// which the file has them first. The file is read twice.
type objects struct {
	source  objectSource
	keys    []string
	columns map[string]int
	headed  bool
	object  object
}

func newObjects(f *File, o Options) (Rows, error) {
	rows := &objects{columns: map[string]int{}}
	source, err := f.objects(o)
	if err != nil {
		return nil, err
	}
	if err := rows.findKeys(source); err != nil {
		return nil, err
	}
	rows.source, err = f.objects(o)
	return rows, err
}

func (f *File) objects(o Options) (objectSource, error) {
	switch f.Format {
	case JSON:
		return newArray(f, o.Encoding)
	case Lines:
		return newLines(f, o.Encoding)
	}
	return newYAML(f, o.Encoding)
}

// findKeys reads all objects for their keys. Where it cannot go on, reading the rows will not either, and will say so.
func (r *objects) findKeys(source objectSource) error {
	for source.next(&r.object) == nil {
		for _, m := range r.object.members {
			if _, known := r.columns[m.key]; known {
				continue
			}
			if len(r.keys) == maxKeys {
				return faultf("Write each record as one object with its fields as keys", "the objects have more than %d different keys", maxKeys)
			}
			r.columns[m.key] = len(r.keys)
			r.keys = append(r.keys, m.key)
		}
	}
	return nil
}

func (r *objects) Next(row *Row) error {
	*row = Row{Cells: row.Cells[:0]}
	if !r.headed {
		r.headed = true
		for _, k := range r.keys {
			row.Cells = append(row.Cells, Cell{Text: k})
		}
		return nil
	}
	if err := r.source.next(&r.object); err != nil {
		return err
	}
	row.Line, row.Last, row.Fault = r.object.line, r.object.line, r.object.fault
	for _, m := range r.object.members {
		at, known := r.columns[m.key]
		if !known {
			return faultf("Read the file again once nothing writes to it", "the file has changed while it was read")
		}
		for len(row.Cells) <= at {
			row.Cells = append(row.Cells, Cell{})
		}
		row.Cells[at] = m.cell
	}
	return nil
}

func (r *objects) About() About { return r.source.about() }

func (r *objects) Close() error { return nil }
