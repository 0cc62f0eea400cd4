package form

import (
	"bytes"
	"encoding/csv"
	"io"
	"strconv"

	"dropcrest/ui/answer"
)

// CSV writes a table by RFC 4180.
func CSV(b *bytes.Buffer, t answer.Table) {
	rows := newCSVRows(b) // a buffer takes everything: no errors
	_ = rows.columns(t.Columns)
	for _, row := range t.Rows {
		_ = rows.row(row)
	}
	_ = rows.close(Sheet{})
}

// csvRows writes by RFC 4180: a line of column names, lines that end with CR LF, a
// field that is empty where a value is absent.
type csvRows struct {
	out    *csv.Writer
	record []string
}

func newCSVRows(w io.Writer) *csvRows {
	out := csv.NewWriter(w)
	out.UseCRLF = true
	return &csvRows{out: out}
}

func (c *csvRows) columns(columns []answer.Column) error {
	c.record = make([]string, len(columns))
	for i, column := range columns {
		c.record[i] = column.Key
	}
	return c.out.Write(c.record)
}

func (c *csvRows) row(row []any) error {
	for i, v := range row {
		c.record[i] = csvField(v)
	}
	return c.out.Write(c.record)
}

func (c *csvRows) close(Sheet) error {
	c.out.Flush()
	return c.out.Error()
}

// csvField writes a number with the digits that read back as the same number.
func csvField(v any) string {
	switch v := v.(type) {
	case float64:
		return strconv.FormatFloat(v, 'g', -1, 64)
	case string:
		return v
	case bool:
		return strconv.FormatBool(v)
	case int:
		return strconv.Itoa(v)
	}
	return ""
}
