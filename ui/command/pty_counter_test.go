//go:build unix && !race

package command_test

import (
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"strings"
	"testing"
)

// The Counter page of the whole program: it says what the command says, its three
// pictures come one after the other, a long bootstrap tells how far it is, and Esc
// keeps what there is.
func TestCounterOnScreen(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	s.sees("dry particle")
	s.types("\t\t\t")
	seen := s.sees(`S = \(([0-9.]+) ± ([0-9.]+)\) %/K`)
	s.types("v")
	s.sees("activated fraction against mobility diameter")
	s.types("v")
	s.sees("scan less line")

	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	out, err := (&exec.Cmd{Path: self, Args: []string{"dropcrest", "counter", "--as", "json"}, Env: u.env()}).Output()
	if err != nil {
		t.Fatal(err)
	}
	var answer struct {
		Line struct {
			Slope float64 `json:"slope_percent_per_k"`
		} `json:"line"`
	}
	if err := json.Unmarshal(out, &answer); err != nil {
		t.Fatal(err)
	}
	decimals := len(seen[1]) - strings.Index(seen[1], ".") - 1
	if want := fmt.Sprintf("%.*f", decimals, answer.Line.Slope); seen[1] != want {
		t.Errorf("the screen says %s, the command %v", seen[1], answer.Line.Slope)
	}

	const end = "\x1b[F"
	s.types(end + left + enter)
	s.sees(`bootstrap +\[1000\]`)
	s.types("\t\t\t1")
	s.sees(`bootstrap +<1`)
	s.types("000000" + enter)
	s.sees(`<1000000>`)
	s.types(escape)
	s.sees(`working +[0-9]+ % \[`)
	s.types(escape)
	s.sees(`stopped; this is what there is so far`)
	s.sees(`S = \(` + seen[1])
	s.types("q")
	s.ends(0)
	s.restored()
}
