package form

import (
	"bufio"
	"bytes"
	"slices"
	"strconv"

	"dropcrest/ui/answer"
)

// jsonLines writes an object a line, all of it known by the names of the columns.
type jsonLines struct {
	out     *bufio.Writer
	keys    [][]byte // with the sign before and the colon behind
	scratch []byte
}

func (j *jsonLines) columns(columns []answer.Column) error {
	for i, c := range columns {
		key, err := marshal(c.Key)
		if err != nil {
			return err
		}
		before := ","
		if i == 0 {
			before = "{"
		}
		j.keys = append(j.keys, slices.Concat([]byte(before), key, []byte(":")))
	}
	return nil
}

func (j *jsonLines) row(row []any) error {
	text, err := j.object(j.scratch[:0], row)
	if err != nil {
		return err
	}
	j.scratch = append(text, '\n')
	_, err = j.out.Write(j.scratch)
	return err
}

func (j *jsonLines) close(Sheet) error { return nil }

// object appends a row as an object.
func (j *jsonLines) object(b []byte, row []any) ([]byte, error) {
	for i, v := range row {
		b = append(b, j.keys[i]...)
		switch v := v.(type) {
		case float64:
			text, _ := answer.Number(v).MarshalJSON() // which never fails
			b = append(b, text...)
		case int:
			b = strconv.AppendInt(b, int64(v), 10)
		default:
			text, err := marshal(v)
			if err != nil {
				return b, err
			}
			b = append(b, text...)
		}
	}
	return append(b, '}'), nil
}

// jsonList writes the rows as the list of an object, and the rest of the object
// behind them.
type jsonList struct {
	out   *bufio.Writer
	key   string
	lines jsonLines
	count int
}

func (j *jsonList) columns(columns []answer.Column) error {
	if _, err := j.out.WriteString("{\n  " + strconv.Quote(j.key) + ": ["); err != nil {
		return err
	}
	return j.lines.columns(columns)
}

func (j *jsonList) row(row []any) error {
	before := ",\n    "
	if j.count == 0 {
		before = before[1:]
	}
	j.count++
	text, err := j.lines.object(append(j.lines.scratch[:0], before...), row)
	j.lines.scratch = text
	if err != nil {
		return err
	}
	_, err = j.out.Write(text)
	return err
}

func (j *jsonList) close(s Sheet) error {
	end := "\n  ],"
	if j.count == 0 {
		end = "],"
	}
	var rest bytes.Buffer
	if err := writeJSON(&rest, s.Question, s.Scenario, s.Answer, s.Version); err != nil {
		return err
	}
	if _, err := j.out.WriteString(end); err != nil {
		return err
	}
	_, err := j.out.Write(rest.Bytes()[1:]) // behind its brace
	return err
}
