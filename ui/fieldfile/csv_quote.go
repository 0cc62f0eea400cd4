package fieldfile

import (
	"bytes"
	"io"
)

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
	r.text, r.quoted = text, true
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
