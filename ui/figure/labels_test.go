package figure

import (
	"fmt"
	"strings"
	"testing"
)

// Labels may cover blank cells, the zero line and, at the edge, lines; never a
// mark, a letter or each other.
func TestLabelsCoverNoMarks(t *testing.T) {
	f := pictures()["others"]
	for h := 8; h <= 40; h++ {
		for w := 50; w <= 140; w += 3 {
			fr, _ := Fit(f, Frame{}, h)
			cells := Text(f, fr, w, h, Style{})
			text := strings.Join(Lines(cells), "\n")
			for _, want := range []string{"◆", "▼", "A", "B", "0.094 %"} {
				if strings.Count(text, want) != 1 {
					t.Fatalf("%dx%d: %q is there %d times\n%s", w, h, want, strings.Count(text, want), text)
				}
			}
			if n := strings.Count(text, "haze 0.157 µm at 95.0 %"); n != 1 && w > 60 {
				t.Fatalf("%dx%d: the edge mark has no label\n%s", w, h, text)
			}
		}
	}
}

// A name stands for its own line; it must not cut the current one.
func TestNamesCoverNoOtherLine(t *testing.T) {
	with := pictures()["others"]
	without := with
	without.Lines = nil
	for _, l := range with.Lines {
		l.Says = ""
		without.Lines = append(without.Lines, l)
	}
	for h := 6; h <= 40; h++ {
		for w := 30; w <= 140; w += 3 {
			fr, _ := Fit(with, Frame{}, h)
			a, b := Text(with, fr, w, h, Style{}), Text(without, fr, w, h, Style{})
			for i := range a {
				for j := range a[i] {
					if was := b[i][j]; a[i][j] != was && was.Role != Blank && was.Role != ZeroRole && was.Role != OtherRole {
						t.Fatalf("%dx%d: a name covers %q\n%s", w, h, was.Rune, strings.Join(Lines(a), "\n"))
					}
				}
			}
		}
	}
}

func TestManyPointsStayInTheirCells(t *testing.T) {
	f := Figure{X: Axis{Unit: "%"}}
	for i := range 50 {
		f.Marks = append(f.Marks, Mark{Kind: PointMark, X: float64(i % 10), Y: float64(i / 10)})
	}
	fr, _ := Fit(f, Frame{}, 12)
	c := newCanvas(100, 10, 8, Style{})
	c.place(fr, false)
	want := map[string]bool{}
	for _, m := range f.Marks {
		want[fmt.Sprintf("%.0f %.0f", c.col(m.X), c.row(m.Y))] = true
	}
	got := strings.Count(strings.Join(Lines(Text(f, fr, 100, 12, Style{})), ""), "●")
	if got != len(want) {
		t.Errorf("%d points, want %d", got, len(want))
	}
}
