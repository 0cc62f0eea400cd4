// Package form writes an answer in the forms that leave the program: text for a
// reader, CSV and JSON for scripts, figures for papers.
package form

import (
	"bytes"
	"errors"
	"fmt"
	"slices"
	"strings"

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
}

// Formats are the forms that Write knows.
func Formats() []string { return append([]string{"text", "csv", "json"}, print.Formats()...) }

// TellsNotes reports whether a reader of that form is sure to see the notes.
func TellsNotes(format string) bool { return format == "text" || format == "json" }

// Write writes the answer in one of Formats. After an error nothing of use is in b.
func (s Sheet) Write(b *bytes.Buffer, format string) error {
	switch {
	case format == "text":
		s.writeText(b)
		return nil
	case format == "json":
		return writeJSON(b, s.Question, s.Scenario, s.Answer, s.Version)
	case format == "csv" && len(s.Answer.Tables) == 0:
		return errors.New("this answer has no table")
	case format == "csv":
		CSV(b, s.Answer.Tables[0])
		return nil
	case !slices.Contains(print.Formats(), format):
		return fmt.Errorf("no form %q: want %s", format, strings.Join(Formats(), ", "))
	case len(s.Answer.Figures) == 0:
		return errors.New("this answer has no picture")
	}
	return print.Write(b, s.Answer.Figures[0], s.frame(0), format)
}

// pictureHeight is the height of the picture in text, axis included.
const pictureHeight = 16

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
	say := func(text string) {
		text = plain.Clean(text)
		if s.ASCII {
			text = plain.ASCII(text)
		}
		b.WriteString(plain.Wrap(text, s.Width, "") + "\n")
	}
	say(s.statement())
	b.WriteByte('\n')
	for i, f := range s.Answer.Figures {
		say(f.Title)
		cells := figure.Text(f, s.frame(i), s.Width, pictureHeight, figure.Style{ASCII: s.ASCII})
		b.WriteString(strings.Join(figure.Lines(cells), "\n") + "\n\n")
	}
	say(strings.Join(s.Answer.Finding, " "))
	gap := "\n"
	for _, n := range s.Answer.Notes {
		if !slices.Contains(s.Answer.Finding, n.Text) { // once is enough
			b.WriteString(gap)
			say("note: " + n.Text)
			gap = ""
		}
	}
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
