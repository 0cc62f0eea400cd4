package screen

import (
	"slices"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
)

// alphabet are the keys of FuzzKeys, one a byte. There is no slash: a name that a
// random hand types must stay in the folder of the test.
var alphabet = []string{
	"left", "right", "up", "down", "home", "end", "pgup", "pgdown", "enter", "esc", "tab", "shift+tab", "space", "backspace", "delete",
	"0", "1", "5", "9", ".", "-", "+", "n", "m", "k", "e", "a", "d", "o", "x", "t", "w", "i", "?", "u", "U", "l", "p", "z", "v", "s", ",", "~", "%", "µ", "é", "世",
	"[B", "[", "OB", "50", "paste:0.25 um", "paste:\x1b[31mred\x07", "paste:one\ntwo\ttabs\u202e", "uu", "aaaa", "paste:", "resize", "alt",
}

// Whatever is pressed: no panic, no view beyond the window, and undo leads back
// to the beginning.
func FuzzKeys(f *testing.F) {
	for _, s := range states() {
		var seed []byte
		for name := range strings.FieldsSeq(s.keys) {
			if i := slices.Index(alphabet, name); i >= 0 {
				seed = append(seed, byte(i))
			}
		}
		f.Add(seed)
	}
	f.Add([]byte{2, 12, 6, 1, 3, 8, 3, 8, 34, 34, 35})
	f.Add([]byte{1, 1, 8, 26, 26, 27, 8, 47, 8, 9, 34})
	f.Add([]byte{53, 60, 18, 15, 47, 8, 48, 8, 49, 8, 54, 0, 51, 52})
	f.Fuzz(func(t *testing.T, data []byte) {
		t.Chdir(t.TempDir()) // `w` writes here
		m := opened(onTerminal("ascii"), 80, 24)
		begin := m.scenario.Clone()
		alt := false
		for i := 0; i < len(data) && i < 200; i++ {
			name := alphabet[int(data[i])%len(alphabet)]
			switch {
			case name == "resize" && i+2 < len(data):
				m.Update(tea.WindowSizeMsg{Width: int(data[i+1]), Height: int(data[i+2]) % 80})
				i += 2
			case name == "alt":
				alt = true
			default:
				k := keyOf(name)
				k.Alt, alt = alt, false
				m.Update(k)
			}
			fits(t, m, m.width, max(m.height, 1))
		}
		m.Update(tea.WindowSizeMsg{Width: 80, Height: 24})
		for range 10 {
			press(m, "esc")
		}
		for range len(m.history.Past) {
			press(m, "u")
		}
		if m.panel != nil || len(m.history.Past) != 0 {
			t.Fatalf("after Esc and undo: panel %T, %d entries", m.panel, len(m.history.Past))
		}
		if !m.scenario.Equal(begin) {
			t.Errorf("undo leads to %v", m.scenario)
		}
	})
}
