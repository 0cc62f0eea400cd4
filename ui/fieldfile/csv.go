package fieldfile

import (
	"bytes"
	"io"
	"math"
	"strings"
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
		if err != nil {
			return nil, c.f.end(err)
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
	fields, starts, start := r.fields[:0], r.starts[:0], 0
	for i, b := range line {
		if b == c.comma {
			fields, starts = append(fields, line[start:i]), append(starts, start)
			start = i + 1
		}
	}
	r.fields, r.starts = append(fields, line[start:]), append(starts, start)
	return nil
}

// splitQuoted reads a record with quotes, which may hold commas, doubled quotes
// and line breaks.
func (c *csvRows) splitQuoted(r *row, line []byte) error {
	c.joined = append(c.joined[:0], line...)
	quotes := bytes.Count(line, []byte{'"'})
	for added := line; ; {
		// an odd number of quotes cannot end a record, but the first line is tried
		// for a quote in a wrong place
		if quotes%2 == 0 || len(added) == len(c.joined) {
			if done, err := c.unquote(r, c.joined); err != nil || done {
				return err
			}
		}
		if len(c.joined) > longestLine {
			return c.unclosed(r)
		}
		var err error
		added, err = c.f.lines.next()
		if err == io.EOF {
			return c.unclosed(r)
		}
		if err != nil {
			return c.f.end(err)
		}
		quotes += bytes.Count(added, []byte{'"'})
		c.joined = append(append(c.joined, '\n'), added...)
	}
}

func (c *csvRows) unclosed(r *row) error {
	return c.f.wrongAt(r.line, r.columnOf(len(r.starts)-1), "a quote that does not end", `a closing "`)
}

// unquote splits a record. It reports false where the record goes on in the next
// line; the text is left as it was then.
func (c *csvRows) unquote(r *row, text []byte) (done bool, err error) {
	r.fields, r.starts = r.fields[:0], r.starts[:0]
	r.text = text
	for at := 0; ; {
		r.starts = append(r.starts, at)
		if at >= len(text) || text[at] != '"' {
			end := bytes.IndexByte(text[at:], c.comma)
			field := text[at:]
			if end >= 0 {
				field = text[at : at+end]
			}
			if q := bytes.IndexByte(field, '"'); q >= 0 {
				r.starts[len(r.starts)-1] = at + q
				return false, c.f.wrongAt(r.line, r.columnOf(len(r.starts)-1), "a quote inside a field", `the whole field in quotes, inner quotes doubled: "a ""b"" c"`)
			}
			r.fields = append(r.fields, field)
			if end < 0 {
				return true, nil
			}
			at += end + 1
			continue
		}
		field, next, ended := quotedField(text, at+1)
		if !ended {
			return false, nil
		}
		r.fields = append(r.fields, field)
		if next == len(text) {
			return true, nil
		}
		if text[next] != c.comma {
			r.starts[len(r.starts)-1] = next
			return false, c.f.wrongAt(r.line, r.columnOf(len(r.starts)-1), "text after a closing quote", "a comma or the end of the line")
		}
		at = next + 1
	}
}

// quotedField reads from behind the opening quote to behind the closing one.
func quotedField(text []byte, from int) (field []byte, next int, ended bool) {
	doubled := false
	for i := from; i < len(text); i++ {
		if text[i] != '"' {
			continue
		}
		if i+1 < len(text) && text[i+1] == '"' {
			doubled = true
			i++
			continue
		}
		field = text[from:i]
		if doubled {
			field = bytes.ReplaceAll(field, []byte(`""`), []byte(`"`))
		}
		return field, i + 1, true
	}
	return nil, 0, false
}

// csvUnit finds the unit in a column's name: "ccn (cm-3)", "ccn [cm-3]", "ccn,
// cm-3" or, as this program writes, "ccn_per_cm3", "diameter_nm". What follows
// "seconds since" is the unit of a time.
func csvUnit(name string) (unit, time string) {
	for _, pair := range []string{"()", "[]"} {
		if i := strings.LastIndexByte(name, pair[0]); i >= 0 && strings.HasSuffix(name, pair[1:]) {
			unit = strings.TrimSpace(name[i+1 : len(name)-1])
		}
	}
	if unit == "" {
		if i := strings.LastIndex(name, ", "); i >= 0 && isUnit(name[i+1:]) {
			unit = strings.TrimSpace(name[i+1:])
		}
	}
	if unit == "" {
		unit = suffixUnit(name)
	}
	if _, ok := parseTimeUnit(unit); ok {
		return unit, unit
	}
	return unit, ""
}

// suffixes of names that are units.
var suffixes = []string{"_per_cm3", "_cm-3", "_cm3", "_per_m3", "_m-3", "_percent", "_pct", "_nm", "_um", "_hpa", "_pa", "_mbar",
	"_degc", "_c", "_k", "_ug_per_m3", "_ugm3", "_ug_m3", "_m_per_s", "_l_per_min", "_lpm", "_m", "_s"}

// suffixUnit is the unit at the end of a name. "_cm3" and "_m3" behind a number
// concentration leave out the "per".
func suffixUnit(name string) string {
	switch longest := strings.ToLower(suffixOf(name)); longest {
	case "":
		return ""
	case "_cm3":
		return "1/cm3"
	case "_ugm3", "_ug_m3", "_ug_per_m3":
		return "ug/m3"
	case "_per_m3":
		return "1/m3"
	case "_per_cm3":
		return "1/cm3"
	case "_m_per_s":
		return "m/s"
	case "_l_per_min":
		return "L/min"
	}
	return suffixOf(name)[1:]
}

// suffixOf is the longest suffix of a name that is a unit.
func suffixOf(name string) string {
	longest := 0
	for _, s := range suffixes {
		if n := len(name) - len(s); n >= 0 && strings.EqualFold(name[n:], s) {
			longest = max(longest, len(s))
		}
	}
	return name[len(name)-longest:]
}
