package form

import (
	"bufio"
	"bytes"
	"io"
	"slices"
	"time"

	"dropcrest/ui/answer"
)

// Streams reports whether the rows of an answer can be written in that form while
// the answer is being found.
func Streams(format string) bool {
	return slices.Contains([]string{"csv", "jsonl", "json", "icartt"}, format)
}

// Stream writes an answer in one of the forms that Streams names. Rows go out as
// they come, so that a campaign of any length takes no memory; only ICARTT holds
// them, because its header names the columns. An answer without rows is written
// at the end.
type Stream struct {
	out    *bufio.Writer
	format string
	table  string // the one whose rows are written, "" before Columns
	rows   rowWriter
	count  int
	last   time.Time // of the last flush
}

// rowWriter writes the rows of one table.
type rowWriter interface {
	columns(columns []answer.Column) error
	row(row []any) error
	close(s Sheet) error
}

// NewStream writes to w in that form.
func NewStream(w io.Writer, format string) *Stream {
	return &Stream{out: bufio.NewWriterSize(w, 1<<16), format: format}
}

// Columns begins a table; env.Columns of an answer. Rows of the first table are
// written, those of others are not.
func (s *Stream) Columns(table string, columns []answer.Column) error {
	if s.table != "" {
		return nil
	}
	s.table = table
	switch s.format {
	case "csv":
		s.rows = newCSVRows(s.out)
	case "jsonl":
		s.rows = &jsonLines{out: s.out}
	case "json":
		s.rows = &jsonList{out: s.out, key: table}
	case "icartt":
		s.rows = &icarttRows{out: s.out}
	}
	return s.rows.columns(columns)
}

// flushAfter is how long rows may wait for more of them.
const flushAfter = 100 * time.Millisecond

// lookEvery is how many rows pass between two looks at the clock.
const lookEvery = 64

// Row writes a row of the table; env.Row of an answer.
func (s *Stream) Row(table string, row []any) error {
	if table != s.table {
		return nil
	}
	if err := s.rows.row(row); err != nil {
		return err
	}
	if s.count++; s.count%lookEvery == 0 {
		if now := time.Now(); now.Sub(s.last) > flushAfter {
			s.last = now
			return s.out.Flush()
		}
	}
	return nil
}

// Close writes what is left of the answer.
func (s *Stream) Close(sheet Sheet) error {
	if s.rows == nil {
		var b bytes.Buffer
		if err := sheet.Write(&b, s.format); err != nil {
			return err
		}
		if _, err := s.out.Write(b.Bytes()); err != nil {
			return err
		}
	} else if err := s.rows.close(sheet); err != nil {
		return err
	}
	return s.out.Flush()
}
