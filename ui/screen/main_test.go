package screen

import (
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/lipgloss"
	"github.com/muesli/termenv"

	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// TestMain fixes what the terminal can show: it would be asked otherwise, and the
// pictures would differ from one machine to the next.
func TestMain(m *testing.M) {
	lipgloss.SetColorProfile(termenv.ANSI)
	os.Exit(m.Run())
}

// terminals by name: what the environment says of them.
var terminals = map[string]map[string]string{
	"colour": {"LANG": "C.UTF-8", "TERM": "xterm"},
	"plain":  {"LANG": "C.UTF-8", "TERM": "xterm", "NO_COLOR": "1"},
	"ascii":  {"LANG": "C", "TERM": "xterm", "NO_COLOR": "1"},
}

func onTerminal(name string) Options {
	return Options{
		Scenario: scenario.Default(),
		Env:      answer.Env{Substances: solutes.Standard(), Demo: demo},
		Getenv:   func(key string) string { return terminals[name][key] },
	}
}

// demo are the files of the invented station, wherever a test works.
var demo = func() fs.FS {
	dir, err := filepath.Abs("../../testdata/demo")
	if err != nil {
		panic(err)
	}
	return os.DirFS(dir)
}()

// opened is the screen in a window.
func opened(o Options, w, h int) *model {
	m := newModel(o)
	m.Update(tea.WindowSizeMsg{Width: w, Height: h})
	return m
}

// keyOf is a key by its name in named, or space, ctrl+c; "paste:..." is pasted
// text, anything else the characters that arrive at once.
func keyOf(name string) tea.KeyMsg {
	if typ, ok := named[name]; ok {
		return tea.KeyMsg{Type: typ}
	}
	switch name {
	case "space":
		return tea.KeyMsg{Type: tea.KeySpace, Runes: []rune(" ")}
	case "ctrl+c":
		return tea.KeyMsg{Type: tea.KeyCtrlC}
	}
	text, pasted := strings.CutPrefix(name, "paste:")
	return tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(text), Paste: pasted}
}

// press presses keys, separated by blanks, and returns the last command.
func press(m *model, keys string) tea.Cmd {
	var cmd tea.Cmd
	for name := range strings.FieldsSeq(keys) {
		_, cmd = m.Update(keyOf(name))
		m.View() // as Bubble Tea does
	}
	return cmd
}

// quits reports whether a command ends the program.
func quits(cmd tea.Cmd) bool {
	if cmd == nil {
		return false
	}
	switch msg := cmd().(type) {
	case tea.QuitMsg:
		return true
	case tea.BatchMsg:
		for _, c := range msg {
			if quits(c) {
				return true
			}
		}
	}
	return false
}
