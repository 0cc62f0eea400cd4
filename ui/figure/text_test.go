package figure

import (
	"fmt"
	"testing"
)

func TestShow(t *testing.T) {
	f := withHaze(withHeld(crestFigure(140, 0.61), 'A', 100, 0.61), 95)
	g := withOthers(f, 140, 0.61)
	for _, f := range []Figure{f, g, withHeld(withHeld(withHeld(crestFigure(100,.61),'A',100,.61),'B',90,.61),'C', 30,.1)} {
		fr, _ := Fit(f, Frame{}, 11)
		fmt.Println(fr)
		for _, st := range []Style{{}, {true}} {
			for _, l := range Lines(Text(f, fr, 79, 11, st)) {
				fmt.Println(l)
			}
		}
		fr, _ = Fit(f, Frame{}, 24)
		for _, st := range []Style{{}, {true}} {
			for _, l := range Lines(Text(f, fr, 100, 24, st)) {
				fmt.Println(l)
			}
		}
		fmt.Println(Words(f))
	}
}
