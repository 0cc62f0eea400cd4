package screen

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"time"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/figure"
	"dropcrest/ui/form"
	"dropcrest/ui/scenario"
	"dropcrest/ui/whole"
)

// writer asks for a file name and writes the answer into that file. The ending
// of the name decides the form.
type writer struct {
	field  field
	table  int    // which of several tables goes into .csv
	exists string // the file that a second Enter overwrites
	busy   bool
	wrong  error
}

// nameLeft is where a name is kept that Esc left behind.
const nameLeft scenario.Path = "write"

// newWrite asks for a file name.
func newWrite(m *model) panel { return &writer{field: newField(m.left[nameLeft])} }

// endings are the forms that a file can have, by the ending of its name.
func (m *model) endings() map[string]string {
	of := map[string]string{".toml": "toml"}
	for _, f := range form.FormatsOf(m.question) {
		of[form.Ending(f)] = f
	}
	return of
}

// wanted names the endings with what they stand for.
func (m *model) wanted(table int) string {
	csv, picture := "the table", "the picture"
	if n := len(m.answer.Tables); n > 1 {
		csv = fmt.Sprintf("the table %q (Tab: another one)", m.answer.Tables[min(table, n-1)].Title)
	}
	if len(m.answer.Figures) > 1 {
		picture = "the picture shown"
	}
	for _, f := range m.question.Formats {
		csv += ", " + form.Ending(f)
		if !form.OneTable(f) {
			csv += " all records"
		}
	}
	return ".toml the question, .csv " + csv + ", .json all numbers, .txt text, .svg .png .pdf " + picture
}

func (f *writer) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	switch {
	case hits(k, m.keys.Leave) && f.exists != "":
		f.exists = ""
	case hits(k, m.keys.Leave):
		if name := f.field.String(); !f.busy {
			m.leave(nameLeft, name, m.keys.Write)
		}
		return nil, nil
	case f.busy:
	case hits(k, m.keys.Take):
		return f.take(m)
	case hits(k, m.keys.OtherTable) && len(m.answer.Tables) > 1:
		f.table = (f.table + 1) % len(m.answer.Tables)
	case f.field.press(k, m.keys):
		f.wrong, f.exists = nil, ""
	}
	return f, nil
}

// take checks the name and begins to write. A file that exists is written over
// only after a second Enter.
func (f *writer) take(m *model) (panel, tea.Cmd) {
	typed := f.field.String()
	if typed == "" {
		return nil, nil
	}
	format, ok := m.endings()[strings.ToLower(filepath.Ext(typed))]
	if !ok {
		f.wrong = fmt.Errorf("the ending of %q says no form: want %s", filepath.Base(typed), m.wanted(f.table))
		return f, nil
	}
	if m.work.old {
		f.wrong = errors.New("the answer on the screen is of the question before: wait for the new one")
		return f, nil
	}
	name, err := full(typed)
	if err != nil {
		f.wrong = err
		return f, nil
	}
	if f.exists != name && there(name) {
		f.exists, f.wrong = name, nil
		return f, nil
	}
	f.exists, f.busy, f.wrong = "", true, nil
	return f, f.write(name, format, m.sheet(f.table))
}

// there reports whether there is something at that name that would be lost. What
// cannot be looked at is left to the writing, which says why.
func there(name string) bool {
	_, err := os.Stat(name)
	return err == nil
}

// full is the path that a name means; ~ is the home folder as in a shell.
func full(typed string) (string, error) {
	rest, ok := strings.CutPrefix(typed+string(filepath.Separator), "~"+string(filepath.Separator))
	if !ok {
		return typed, nil
	}
	home, err := os.UserHomeDir()
	if err != nil {
		return "", fmt.Errorf("~ is not known here: %w", err)
	}
	return filepath.Join(home, rest), nil
}

// sheet is what is on the screen, ready to be written: the figure that is shown
// first, and which of the tables a file holds that has one.
func (m *model) sheet(table int) form.Sheet {
	s := form.Sheet{Question: m.question, Scenario: m.scenario, Answer: m.answer,
		Version: m.env.Version, Width: paperWidth, ASCII: m.ascii, Made: time.Now()}
	if len(m.answer.Figures) > 0 {
		at := m.shownFigure()
		s.Frame = m.frames[m.answer.Figures[at].Key]
		s.Answer.Figures = slices.Concat([]figure.Figure{m.figure()}, m.answer.Figures[:at], m.answer.Figures[at+1:])
	}
	if table < len(m.answer.Tables) {
		s.Table = m.answer.Tables[table].Key
	}
	return s
}

// paperWidth is how wide text in a file is.
const paperWidth = 80

// write writes the file outside of Update: a picture takes its time, and so may
// a disk.
func (f *writer) write(name, format string, s form.Sheet) tea.Cmd {
	return func() tea.Msg {
		n, err := writeSheet(name, format, s)
		return report(func(m *model) { f.finish(name, n, err, m) })
	}
}

// writeSheet writes the sheet whole or not at all and returns its size. A fault
// in drawing is an error of this file, not the end of the program.
func writeSheet(name, format string, s form.Sheet) (size int, err error) {
	defer func() {
		if fault := recover(); fault != nil {
			err = fmt.Errorf("this form cannot be made: %v", fault)
		}
	}()
	var b bytes.Buffer
	if format == "toml" {
		err = scenario.Encode(&b, s.Scenario)
	} else {
		err = s.Write(&b, format)
	}
	if err != nil {
		return 0, err
	}
	return b.Len(), whole.Write(name, b.Bytes())
}

// finish says how the writing ended. After an error the panel stays, with the
// name as it was typed; when it was closed meanwhile, the message line says it.
func (f *writer) finish(name string, size int, err error, m *model) {
	f.busy = false
	open := m.panel == panel(f)
	switch {
	case err == nil:
		delete(m.left, nameLeft)
		m.say(fmt.Sprintf("written: %s (%s)", name, bytesText(size)))
		if open {
			m.panel = nil
		}
	case open:
		f.wrong = unwritten(err)
	default:
		m.say(fmt.Sprintf("error: %s: %v", name, unwritten(err)))
	}
}

// unwritten is why a file could not be written, with what to do where that is plain.
func unwritten(err error) error {
	reason := whole.Reason(err)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return errors.New("there is no such folder: give a name in one that exists")
	case errors.Is(err, fs.ErrPermission):
		return fmt.Errorf("%w: nothing may be written there, give a name in another folder", reason)
	}
	return reason
}

func bytesText(n int) string {
	if n < 10_000 {
		return fmt.Sprintf("%d bytes", n)
	}
	return fmt.Sprintf("%d kB", (n+500)/1000)
}

func (f *writer) lines(w, h int, m *model) []string {
	const label = " write to: "
	out := []string{label + m.marked(m.text(f.field.show(w-ansi.StringWidth(label))))}
	switch {
	case f.busy:
		out = append(out, " writing")
	case f.exists != "":
		out = append(out, folded(m.text(filepath.Base(f.exists)+" exists: Enter writes over it, Esc goes back to the name"), w, " ")...)
	case f.wrong != nil:
		out = append(out, m.refused(f.wrong, w)...)
	default:
		for _, l := range folded(m.text("The ending says the form: "+m.wanted(f.table)), w, " ") {
			out = append(out, m.dim(l))
		}
	}
	return fit(out, w, h)
}

func (f *writer) keys(k keyMap) []key.Binding {
	return append([]key.Binding{k.OtherTable}, typing(k)...)
}
