package dark

import (
	"go/parser"
	"go/token"
	"reflect"
	"strconv"
	"testing"

	"github.com/charmbracelet/lipgloss"
)

// What makes the package early enough: it needs Lip Gloss only, and its path
// sorts before that of Bubble Tea. Whether no query is sent is shown on a real
// pty in ui/command.
func TestEarlyEnough(t *testing.T) {
	file, err := parser.ParseFile(token.NewFileSet(), "dark.go", nil, parser.ImportsOnly)
	if err != nil {
		t.Fatal(err)
	}
	if len(file.Imports) != 1 || file.Imports[0].Path.Value != strconv.Quote("github.com/charmbracelet/lipgloss") {
		t.Errorf("dark imports more than Lip Gloss: it may become ready after Bubble Tea")
	}
	type here struct{}
	if path := reflect.TypeOf(here{}).PkgPath(); path >= "github.com/charmbracelet/bubbletea" {
		t.Errorf("%s does not sort before Bubble Tea: it would be initialised after it", path)
	}
}

func TestAnswerIsThere(t *testing.T) {
	if !lipgloss.HasDarkBackground() {
		t.Error("Lip Gloss has no answer yet: it would ask the terminal")
	}
}
