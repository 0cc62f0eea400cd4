package answer

import (
	"math"
	"slices"
	"testing"

	"dropcrest/atmos"
	"dropcrest/ui/figure"
)

// Whatever ends of the wet radius are asked for, the picture has a frame and the
// line runs through all of it that drops can have; that it has none is said.
func TestAskedRadii(t *testing.T) {
	for _, c := range []struct {
		name   string
		values []string
		rows   int // of the table
		says   string
	}{
		{"beyond the frame", []string{"from-radius=100um"}, 200, ""},
		{"far beyond the crest", []string{"from-radius=500um", "to-radius=5000um"}, 200, ""},
		{"around everything", []string{"from-radius=0.01um", "to-radius=10000um"}, 200, ""},
		{"below the dry size", []string{"to-radius=0.01um"}, 0, "frame-below-particle"},
		{"measured density", []string{"from-radius=0.051um", "solution-density=measured"}, 200, ""},
	} {
		s := scene(t, c.values...)
		a := asked(t, c.values...)
		frame, _ := CurveFrame(s, a.Figures[0], figure.Frame{}, 24)
		if !frame.Serves() {
			t.Errorf("%s: no frame: %+v", c.name, frame)
		}
		if got := len(a.Tables[0].Rows); got != c.rows {
			t.Errorf("%s: %d rows, want %d", c.name, got, c.rows)
		}
		said := slices.ContainsFunc(a.Notes, func(n atmos.Note) bool { return n.Code == "frame-below-particle" })
		if said != (c.says != "") {
			t.Errorf("%s: notes %v", c.name, a.Notes)
		}
		x := a.Figures[0].Lines[0].X
		dry := s.DryDiameter / 2 * micro
		if x[len(x)-1] < frame.XMax*(1-1e-9) || x[0] > math.Max(frame.XMin, 1.05*dry) {
			t.Errorf("%s: the line runs from %v to %v µm in a frame from %v to %v", c.name, x[0], x[len(x)-1], frame.XMin, frame.XMax)
		}
	}
}
