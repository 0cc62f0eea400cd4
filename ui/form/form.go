// Package form writes an answer in the forms that leave the program: text for a
// reader, CSV and JSON for scripts, figures for papers.
package form

import (
	"bytes"
	"errors"
	"fmt"
	"slices"
	"strings"
	"time"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/figure/print"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// Sheet is an answer together with what it answers.
type Sheet struct {
	Question answer.Question
	Scenario scenario.Scenario
	Answer   answer.Answer
	Frame    figure.Frame // what the first figure is seen through; zero: fitted here
	Version  string
	Width    int  // of text, in columns
	ASCII    bool // of text

	Table, Picture string    // keys of those that are written where only one is; "": the first
	Made           time.Time // when; zero: not said
}

// Formats are the forms that every answer has.
func Formats() []string { return FormatsOf(answer.Question{}) }

// FormatsOf are the forms of the answer to a question.
func FormatsOf(q answer.Question) []string {
	return slices.Concat([]string{"text", "csv", "json"}, q.Formats, print.Formats())
}

// Ending is the ending of the name of a file of that form.
func Ending(format string) string {
	switch format {
	case "text":
		return ".txt"
	case "icartt":
		return ".ict"
	}
	return "." + format
}

// OnePicture reports whether a file of that form holds one picture, OneTable
// whether it holds one table.
func OnePicture(format string) bool { return slices.Contains(print.Formats(), format) }

// OneTable: see OnePicture.
func OneTable(format string) bool { return format == "csv" || format == "jsonl" }

// TellsNotes reports whether a reader of that form is sure to see the notes.
func TellsNotes(format string) bool { return format == "text" || format == "json" }

// Write writes the answer in one of FormatsOf its question. After an error nothing
// of use is in b.
func (s Sheet) Write(b *bytes.Buffer, format string) error {
	switch {
	case format == "text":
		s.writeText(b)
		return nil
	case format == "json":
		return writeJSON(b, s.Question, s.Scenario, s.Answer, s.Version)
	case OneTable(format):
		t, err := s.table()
		if err != nil {
			return err
		}
		return s.writeRows(b, format, t)
	case format == "icartt":
		t, err := s.records()
		if err != nil {
			return err
		}
		return s.writeRows(b, format, t)
	case !OnePicture(format):
		return fmt.Errorf("no form %q: want %s", format, strings.Join(FormatsOf(s.Question), ", "))
	}
	i, err := s.picture()
	if err != nil {
		return err
	}
	return print.Write(b, s.Answer.Figures[i], s.frame(i), format)
}

// table is the one that is written where only one is.
func (s Sheet) table() (answer.Table, error) {
	keys := make([]string, len(s.Answer.Tables))
	for i, t := range s.Answer.Tables {
		if keys[i] = t.Key; t.Key == s.Table || s.Table == "" {
			return t, nil
		}
	}
	if len(keys) == 0 {
		return answer.Table{}, errors.New("this answer has no table")
	}
	return answer.Table{}, &PartError{"table", s.Table, keys}
}

// picture is the number of the one that is written where only one is.
func (s Sheet) picture() (int, error) {
	keys := make([]string, len(s.Answer.Figures))
	for i, f := range s.Answer.Figures {
		if keys[i] = f.Key; f.Key == s.Picture || s.Picture == "" {
			return i, nil
		}
	}
	if len(keys) == 0 {
		return 0, errors.New("this answer has no picture")
	}
	return 0, &PartError{"picture", s.Picture, keys}
}

// PartError says that an answer has no table or picture of that key.
type PartError struct {
	What, Key string
	There     []string
}

func (e *PartError) Error() string {
	return fmt.Sprintf("this answer has no %s %q: want %s", e.What, e.Key, strings.Join(e.There, ", "))
}

// ErrNoRecords: ICARTT has nothing to hold.
var ErrNoRecords = errors.New("ICARTT holds the records of measured data over time, and this answer is of one population")

// RecordsTable is the key of the table of all records.
const RecordsTable = "records"

// records is the table of all records.
func (s Sheet) records() (answer.Table, error) {
	for _, t := range s.Answer.Tables {
		if t.Key == RecordsTable {
			return t, nil
		}
	}
	return answer.Table{}, ErrNoRecords
}

// writeRows writes a table as it would stream.
func (s Sheet) writeRows(b *bytes.Buffer, format string, t answer.Table) error {
	out := NewStream(b, format)
	if err := out.Columns(t.Key, t.Columns); err != nil {
		return err
	}
	for _, row := range t.Rows {
		if err := out.Row(t.Key, row); err != nil {
			return err
		}
	}
	return out.Close(s)
}

// pictureHeight is the height of the picture in text, axis included.
const pictureHeight = 16

// heightOf is the height of a figure in text. On paper there is room for every bar.
func heightOf(f figure.Figure) int {
	if n := len(f.Bars); n > 0 {
		return n
	}
	return pictureHeight
}

func (s Sheet) frame(i int) figure.Frame {
	if i == 0 && s.Frame.Serves() {
		return s.Frame
	}
	fr, _ := s.Question.FrameOf(s.Scenario, s.Answer.Figures[i], figure.Frame{}, pictureHeight)
	return fr
}

// writeText is the answer for a reader: the question in words, the picture, the
// finding, the notes.
func (s Sheet) writeText(b *bytes.Buffer) {
	say := func(text string) { b.WriteString(plain.Wrap(s.text(text), s.Width, "") + "\n") }
	say(s.statement())
	b.WriteByte('\n')
	for i, f := range s.Answer.Figures {
		say(f.Title)
		cells := figure.Text(f, s.frame(i), s.Width, heightOf(f), figure.Style{ASCII: s.ASCII})
		b.WriteString(strings.Join(figure.Lines(cells), "\n") + "\n\n")
	}
	say(strings.Join(s.Answer.Finding, " "))
	var tabled []string
	if s.Question.Tabled != nil {
		tabled = s.Question.Tabled(s.Answer)
	}
	for _, t := range s.Answer.Tables {
		if slices.Contains(tabled, t.Key) {
			if len(t.Rows) == 0 {
				continue
			}
			b.WriteByte('\n')
			say(t.Title)
			heads, rows := Tabulate(filled(t), s.Width, s.text)
			b.WriteString(strings.Join(slices.Concat(heads, rows), "\n") + "\n")
		}
	}
	for i, p := range s.Answer.Account {
		if i == 0 {
			b.WriteByte('\n')
		}
		if ansi.StringWidth(p) > s.Width {
			say(p)
			continue
		}
		b.WriteString(s.text(p) + "\n") // as it is laid out
	}
	gap := "\n"
	for _, n := range s.Answer.Notes {
		if !slices.Contains(s.Answer.Finding, n.Text) { // once is enough
			b.WriteString(gap)
			say("note: " + n.Text)
			gap = ""
		}
	}
}

// text is a text as the text form shows it.
func (s Sheet) text(t string) string {
	t = plain.Clean(t)
	if s.ASCII {
		return plain.ASCII(t)
	}
	return t
}

// filled is a table without the columns that hold nothing.
func filled(t answer.Table) answer.Table {
	out := answer.Table{Key: t.Key, Title: t.Title, Rows: make([][]any, len(t.Rows))}
	for i, c := range t.Columns {
		if slices.ContainsFunc(t.Rows, func(row []any) bool { return row[i] != nil }) {
			out.Columns = append(out.Columns, c)
			for r, row := range t.Rows {
				out.Rows[r] = append(out.Rows[r], row[i])
			}
		}
	}
	return out
}

// statement is the question in prose with its values.
func (s Sheet) statement() string {
	st := scenario.Style{ASCII: s.ASCII}
	lists := scenario.Lists(&s.Scenario)
	value := func(slot string) string {
		for _, l := range lists {
			if l.Key() == slot {
				return l.Show(st)
			}
		}
		if in, ok := scenario.Find(&s.Scenario, scenario.Path(slot)); ok {
			return in.Show(st)
		}
		if scenario.Path(slot) == answer.Further {
			return answer.FurtherWords(s.Question, s.Scenario)
		}
		return slot
	}
	lines := s.Question.Statement(s.Scenario)
	for i, line := range lines {
		lines[i] = answer.Fill(line, value)
	}
	return strings.Join(lines, " ")
}
