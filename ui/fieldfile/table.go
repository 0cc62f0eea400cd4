package fieldfile

import (
	"bytes"
	"io"
)

// tableRows reads the records of both formats.
type tableRows struct {
	f       *File
	parting byte // ',' or ' '
	wrapped bool // records over several lines, NASA Ames
	joined  []byte
}

func (t *tableRows) next(r *row) error {
	for {
		line, err := t.f.lines.next()
		if err != nil {
			return t.f.end(err)
		}
		r.line, r.text = t.f.lines.number, line
		t.split(r, line)
		if len(r.fields) == len(t.f.Columns) {
			return nil
		}
		if len(bytes.TrimSpace(line)) == 0 {
			if err := (&csvRows{f: t.f}).blank(r.line); err != nil {
				return err
			}
			continue
		}
		if t.wrapped && len(r.fields) < len(t.f.Columns) {
			return t.unwrap(r)
		}
		return t.uneven(r)
	}
}

func (t *tableRows) split(r *row, line []byte) {
	if t.parting == ',' {
		r.fields = appendFields(r.fields[:0], line, ',')
		for i, field := range r.fields {
			r.fields[i] = bytes.Trim(field, " ")
		}
		return
	}
	fields := r.fields[:0]
	for i := 0; i < len(line); {
		if line[i] == ' ' || line[i] == '\t' {
			i++
			continue
		}
		start := i
		for i < len(line) && line[i] != ' ' && line[i] != '\t' {
			i++
		}
		fields = append(fields, line[start:i])
	}
	r.fields = fields
}

// unwrap adds lines until the record is complete.
func (t *tableRows) unwrap(r *row) error {
	t.joined = append(t.joined[:0], r.text...)
	for len(r.fields) < len(t.f.Columns) {
		line, err := t.f.lines.next()
		if err == io.EOF {
			return t.uneven(r)
		}
		if err != nil {
			return t.f.end(err)
		}
		t.joined = append(append(t.joined, ' '), line...)
		if len(t.joined) > longestLine {
			return t.uneven(r)
		}
		t.split(r, t.joined)
		r.text = nil
	}
	if len(r.fields) > len(t.f.Columns) {
		return t.uneven(r)
	}
	return nil
}

func (t *tableRows) uneven(r *row) error {
	want := len(t.f.Columns)
	problem := itoa(len(r.fields)) + " values instead of " + itoa(want)
	right := "one value for each variable and the time"
	switch {
	case !t.f.lines.ended && len(r.fields) < want:
		problem += ": the file ends inside a record"
		right = "the complete file"
	case t.parting == ',' && len(r.fields) > want:
		right += "; decimal commas give more: the decimal sign is a point"
	case t.parting == ',' && len(r.fields) == 1:
		right += ", parted by commas (or lenient reading)"
	}
	return t.f.wrongAt(r.line, 0, problem, right)
}
