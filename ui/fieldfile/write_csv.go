package fieldfile

import (
	"bufio"
	"encoding/csv"
	"io"
)

// CSVWriter writes records by RFC 4180: names with units, lines that end with CR
// LF, nothing where a value is missing, "<0.5" and ">1000" for the limits. It
// holds one record at a time.
type CSVWriter struct {
	out     *csv.Writer
	buffer  *bufio.Writer
	columns []Output
	units   []unit
	fields  []string
	scratch []byte
}

// NewCSVWriter writes the line of names: start_time and end_time, then the
// columns. Whoever opened w sees to it that the file appears whole or not at all.
func NewCSVWriter(w io.Writer, columns []Output) (*CSVWriter, error) {
	c := &CSVWriter{buffer: bufio.NewWriter(w), columns: columns}
	c.out = csv.NewWriter(c.buffer)
	c.out.UseCRLF = true
	c.fields = append(c.fields, StartTime.String(), EndTime.String())
	for _, o := range columns {
		u, _, _ := o.unit()
		c.units = append(c.units, u)
		c.fields = append(c.fields, o.name())
	}
	return c, c.out.Write(c.fields)
}

// Write writes a record of which only the times, the cells and, for columns of
// text, the texts count; both in the order of the columns.
func (c *CSVWriter) Write(rec *Record) error {
	c.fields[0] = string(stampOf(c.scratch[:0], rec.Start))
	c.fields[1] = string(stampOf(c.scratch[:0], rec.End))
	for i, o := range c.columns {
		if declared[o.Role.Quantity].kind == asText {
			c.fields[i+2] = ""
			if i < len(rec.Text) {
				c.fields[i+2] = rec.Text[i]
			}
			continue
		}
		c.fields[i+2] = c.field(rec.Cells[i], c.units[i])
	}
	return c.out.Write(c.fields)
}

func (c *CSVWriter) field(x Cell, u unit) string {
	b := c.scratch[:0]
	switch x.State {
	case Missing:
		return ""
	case Below:
		b = append(b, '<')
	case Above:
		b = append(b, '>')
	}
	if x.X != x.X { // a limit that nobody gave: the state cannot be written with it
		return ""
	}
	c.scratch = digits(b, u.fromSI(x.X))
	return string(c.scratch)
}

// Flush writes what is left. It must be called once at the end.
func (c *CSVWriter) Flush() error {
	c.out.Flush()
	if err := c.out.Error(); err != nil {
		return err
	}
	return c.buffer.Flush()
}
