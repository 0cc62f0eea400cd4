package form

import (
	"bytes"
	"encoding/csv"
	"strconv"

	"dropcrest/ui/answer"
)

// CSV writes a table by RFC 4180: a line of column names, lines that end
// with CR LF, a field that is empty where a value is absent.
func CSV(b *bytes.Buffer, t answer.Table) {
	names := make([]string, len(t.Columns))
	for i, c := range t.Columns {
		names[i] = c.Key
	}
	out := csv.NewWriter(b) // a buffer takes everything: no errors
	out.UseCRLF = true
	_ = out.Write(names)
	record := make([]string, len(names))
	for _, row := range t.Rows {
		for i, v := range row {
			record[i] = csvField(v)
		}
		_ = out.Write(record)
	}
	out.Flush()
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
