package fieldfile

import (
	"bytes"
	"encoding/binary"
	"io"
	"math"
	"math/bits"
)

// csvRows reads records by RFC 4180. Lines without a quote, nearly all, are
// split where they lie.
type csvRows struct {
	f      *File
	comma  byte
	width  int
	joined []byte // a record with quotes, its quotes taken away
}

// openCSV reads the line of names, or counts the columns where there is none.
func (f *File) openCSV() error {
	c := &csvRows{f: f, comma: ','}
	f.Format, f.rows = CSV, c
	line, err := c.firstLine()
	if err != nil {
		return err
	}
	if f.opt.Lenient && bytes.IndexByte(line, ',') < 0 {
		if s := otherComma(line); s != 0 {
			c.comma = s
			f.notes.add("parted", f.lines.number, "fields are parted by %q", string(s))
		}
	}
	f.lines.again()
	if err := c.split(&f.row); err != nil {
		return err
	}
	if s := otherComma(line); len(f.row.fields) == 1 && s != 0 && !f.opt.Lenient {
		return f.wrongAt(f.lines.number, 0, "fields are parted by "+quoted(string(s)), "commas (RFC 4180) and a point as the decimal sign, or lenient reading")
	}
	c.width = len(f.row.fields)
	if c.isData() {
		f.notes.add("no_header", f.row.line, "the first line holds values: columns are called column1 to column%d", c.width)
		for i := range c.width {
			f.Columns = append(f.Columns, newColumn("column"+itoa(i+1)))
		}
		f.lines.again()
		return nil
	}
	for i, name := range f.row.fields {
		col := newColumn(clean(name))
		if col.Name == "" {
			col.Name = "column" + itoa(i+1)
		}
		col.Unit, col.time = csvUnit(col.Name)
		f.Columns = append(f.Columns, col)
	}
	return nil
}

func newColumn(name string) Column {
	nan := math.NaN()
	return Column{Name: name, Scale: 1, Lower: nan, Upper: nan, Uncertainty: nan, flag: -1, missing: nan}
}

// firstLine is the first one that says something.
func (c *csvRows) firstLine() ([]byte, error) {
	for {
		line, err := c.f.lines.next()
		if err == io.EOF {
			return nil, c.f.wrongAt(c.f.lines.number+1, 0, "the file ends before the names", "a line of names and records")
		}
		if err != nil {
			return nil, c.f.broken(err)
		}
		switch {
		case len(bytes.TrimSpace(line)) == 0:
		case line[0] == '#' && c.f.opt.Lenient:
			c.f.Comments = append(c.f.Comments, clean(line[1:]))
		case line[0] == '#':
			return nil, c.f.wrongAt(c.f.lines.number, 1, "a # line before the names", "the line of names first (RFC 4180), or lenient reading")
		case bytes.IndexByte(line, '\r') >= 0:
			return nil, c.f.wrongAt(c.f.lines.number, 1+bytes.IndexByte(line, '\r'), "a CR inside a line", "lines that end with LF or CR LF")
		default:
			return line, nil
		}
	}
}

// otherComma is what parts the fields of a line that has no comma.
func otherComma(line []byte) byte {
	for _, s := range []byte{';', '\t'} {
		if bytes.IndexByte(line, s) >= 0 {
			return s
		}
	}
	return 0
}

// isData reports whether the first line holds values instead of names.
func (c *csvRows) isData() bool {
	values := 0
	for _, field := range c.f.row.fields {
		field = bytes.TrimSpace(field)
		if len(field) == 0 {
			continue
		}
		_, ok := number(field)
		if !ok {
			var ck clock
			_, ok = ck.read(field)
		}
		if !ok {
			return false
		}
		values++
	}
	return values > 0 && !c.areDiameters()
}

// areDiameters: a first line of rising numbers after a name that is empty can
// be the sizes of bins, with the corner left empty.
func (c *csvRows) areDiameters() bool { return len(bytes.TrimSpace(c.f.row.fields[0])) == 0 }

func (c *csvRows) next(r *row) error {
	for {
		err := c.split(r)
		if err != nil {
			return err
		}
		if len(r.fields) == c.width {
			return nil
		}
		if len(bytes.TrimSpace(r.text)) == 0 && r.text != nil {
			if err := c.blank(r.line); err != nil {
				return err
			}
			continue
		}
		return c.uneven(r)
	}
}

// blank takes empty lines at the end, and if lenient everywhere.
func (c *csvRows) blank(line int) error {
	for {
		text, err := c.f.lines.next()
		if err != nil {
			return c.f.end(err)
		}
		if len(bytes.TrimSpace(text)) == 0 {
			continue
		}
		if !c.f.opt.Lenient {
			return c.f.wrongAt(line, 1, "an empty line between records", "a record, or lenient reading")
		}
		c.f.lines.again()
		return nil
	}
}

func (c *csvRows) uneven(r *row) error {
	problem := itoa(len(r.fields)) + " fields instead of " + itoa(c.width)
	right := "as many fields as there are names"
	switch {
	case !c.f.lines.ended && len(r.fields) < c.width:
		problem += ": the file ends inside a record"
		right = "the complete file"
	case len(r.fields) > c.width && c.comma == ',':
		right += "; a decimal comma, or text with a comma and no quotes, gives more"
	}
	return c.f.wrongAt(r.line, 0, problem, right)
}

// split reads one record into its fields.
func (c *csvRows) split(r *row) error {
	line, err := c.f.lines.next()
	if err != nil {
		return c.f.end(err)
	}
	r.line, r.text = c.f.lines.number, line
	if bytes.IndexByte(line, '"') >= 0 {
		return c.splitQuoted(r, line)
	}
	r.fields, r.quoted = appendFields(r.fields[:0], line, c.comma), false
	return nil
}

// appendFields parts a line without quotes. It looks at eight bytes at a time:
// with x the eight bytes, each exclusive-or the comma, the mask has the top bit
// of every byte that is zero, and carries nothing from byte to byte.
func appendFields(fields [][]byte, line []byte, comma byte) [][]byte {
	const ones, sevens, step = 0x0101010101010101, 0x7f7f7f7f7f7f7f7f, 8
	start, i := 0, 0
	for ; i+step <= len(line); i += step {
		x := binary.LittleEndian.Uint64(line[i:]) ^ ones*uint64(comma)
		for mask := ^((x&sevens + sevens) | x | sevens); mask != 0; mask &= mask - 1 {
			end := i + bits.TrailingZeros64(mask)/8
			fields = append(fields, line[start:end])
			start = end + 1
		}
	}
	for ; i < len(line); i++ {
		if line[i] == comma {
			fields = append(fields, line[start:i])
			start = i + 1
		}
	}
	return append(fields, line[start:])
}
