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

// The Kappa page of the whole program: it says what the command says, a long Monte
// Carlo tells how far it is, and Esc keeps what there is.
func TestKappaOnScreen(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	s.sees("dry particle")
	s.types("\t\t")
	seen := s.sees(`activation κ is ([0-9.]+) ± ([0-9.]+)`)

	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	out, err := (&exec.Cmd{Path: self, Args: []string{"dropcrest", "kappa", "--as", "json"}, Env: u.env()}).Output()
	if err != nil {
		t.Fatal(err)
	}
	var answer struct {
		Kappa    float64 `json:"kappa"`
		Standard float64 `json:"standard_uncertainty"`
	}
	if err := json.Unmarshal(out, &answer); err != nil {
		t.Fatal(err)
	}
	for i, x := range []float64{answer.Kappa, answer.Standard} {
		decimals := len(seen[i+1]) - strings.Index(seen[i+1], ".") - 1
		if want := fmt.Sprintf("%.*f", decimals, x); seen[i+1] != want {
			t.Errorf("the screen says %s, the command %v", seen[i+1], x)
		}
	}

	s.types(right + right + right + right + right)
	s.sees(`<100000>`)
	s.types("10000000" + enter)
	s.sees(`working +[0-9]+ % \[`)
	s.types(escape)
	s.sees(`stopped; this is what there is so far`)
	s.sees(`activation κ is ` + seen[1])
	s.types("q")
	s.ends(0)
	s.restored()
}
