package screen

import (
	"fmt"
	"testing"
)

// hold presses two keys in turn, each followed by its screen.
func hold(b *testing.B, m *model, there, back string) {
	keys := []string{there, back}
	n := 0
	b.ReportAllocs()
	for b.Loop() {
		m.Update(keyOf(keys[n%2]))
		m.View()
		n++
	}
}

// A key that changes the answer, from the key to the finished screen.
func BenchmarkStep(b *testing.B) {
	for _, size := range [][2]int{{80, 24}, {200, 50}} {
		b.Run(fmt.Sprintf("%dx%d", size[0], size[1]), func(b *testing.B) {
			m := opened(onTerminal("colour"), size[0], size[1])
			hold(b, m, "up", "down")
		})
	}
}

// A key that moves the choice: the picture is kept.
func BenchmarkMove(b *testing.B) {
	m := opened(onTerminal("colour"), 80, 24)
	hold(b, m, "right", "left")
}

// A key that goes to the next record of the demo, from the key to the finished
// screen.
func BenchmarkRecord(b *testing.B) {
	m := opened(onTerminal("colour"), 80, 24)
	press(m, "tab")
	hold(b, m, "n", "p")
}

// A key that changes the particle whose answer is taken apart, and one that goes to
// the next row, which keeps what was worked out.
func BenchmarkLedger(b *testing.B) {
	for name, keys := range map[string][2]string{"size": {"up", "down"}, "row": {"n", "p"}} {
		b.Run(name, func(b *testing.B) {
			m := opened(onTerminal("colour"), 80, 24)
			press(m, "l right right")
			hold(b, m, keys[0], keys[1])
		})
	}
}
