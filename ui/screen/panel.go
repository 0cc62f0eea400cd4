package screen

import (
	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
)

// panel is what lies over picture and finding for a while: an entry, a list of
// words, the rows of a composition, something to read, the prompt for a file.
// One panel is open at a time; a panel that opens another one keeps itself to be
// returned to.
type panel interface {
	// press takes one key and returns the panel that is open afterwards: the same
	// one, another one, or nil. It changes the scenario only through the methods
	// of the model (set, step, edit), so that every change can be undone.
	press(k tea.KeyMsg, m *model) (panel, tea.Cmd)
	// lines is the panel in at most h lines of at most w columns. It never
	// returns more; what does not fit is scrolled to the chosen item.
	lines(w, h int, m *model) []string
	// keys are those of the bindings that act in it, for the help line.
	keys(k keyMap) []key.Binding
}

// sharingPanel is a panel in which the answer changes; the picture stays in sight.
type sharingPanel interface {
	panel
	sharesPicture()
}
