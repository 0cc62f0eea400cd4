//go:build unix && !race

package command_test

import "testing"

// The Kappa page of the whole program: it says what the command says, a long Monte
// Carlo tells how far it is, and Esc keeps what there is.
func TestKappaOnScreen(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	s.sees("dry particle")
	s.types("\t\t")
	seen := s.sees(`activation κ is ([0-9.]+) ± ([0-9.]+)`)

	var answer struct {
		Kappa    float64 `json:"kappa"`
		Standard float64 `json:"standard_uncertainty"`
	}
	u.facts(t, "kappa", &answer)
	agrees(t, seen[1], answer.Kappa)
	agrees(t, seen[2], answer.Standard)

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
