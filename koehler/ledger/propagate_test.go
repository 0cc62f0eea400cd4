package ledger

import (
	"context"
	"errors"
	"math"
	"testing"

	"dropcrest/koehler"
)

// power is y = n^-1.5 d^0.5, whose uncertainty is known in closed form: ln y is
// normal with the width √((1.5 u_n)² + (0.5 u_d)²) where ln n and ln d are.
func power(x *Deviation) Values {
	y := math.Pow(1+x[Sizes], -1.5) * math.Sqrt(1+x[Numbers])
	return Values{y, math.NaN(), 2 * y}
}

func TestPropagate(t *testing.T) {
	inputs := []Input{{Sizes, 1, 0.03, "invented"}, {Numbers, 1, 0.1, "invented"}}
	for _, step := range []float64{0, 0.5} {
		b, err := Propagate(power(&Deviation{}), inputs, power, step)
		if err != nil {
			t.Fatal(err)
		}
		within(t, "by size", b.Contributions[0].Relative(0), -1.5, 2e-3)
		within(t, "by number", b.Contributions[1].Relative(0), 0.5, 2e-3)
		within(t, "combined", b.Combined[0], 100*math.Hypot(1.5*0.03, 0.5*0.1), 0.01)
		within(t, "the same of another scale", b.Combined[2], b.Combined[0], 1e-9)
		if !math.IsNaN(b.Combined[1]) {
			t.Errorf("an outcome that is none has %g %%", b.Combined[1])
		}
		m, err := b.MonteCarlo(context.Background(), Settings{})
		if err != nil {
			t.Fatal(err)
		}
		// second order of the factors: E y = 1 + 15/8 u_n² - 1/8 u_d²
		within(t, "mean", m.Outcomes[0].Mean, 1+1.875*0.0009-0.125*0.01, 1e-3)
		within(t, "by trials", m.Outcomes[0].Percent, b.Combined[0], 0.1)
		if need := b.Reach(0, 3); len(need) != 2 {
			t.Errorf("for 3 %%: %v", need)
		}
	}
}

func TestPropagateErrors(t *testing.T) {
	for name, c := range map[string]struct {
		inputs []Input
		step   float64
	}{
		"twice":         {[]Input{{Sizes, 1, 0.1, ""}, {Sizes, 1, 0.1, ""}}, 0},
		"no value":      {[]Input{{Sizes, 0, 0.1, ""}}, 0},
		"negative":      {[]Input{{Sizes, 1, -0.1, ""}}, 0},
		"negative step": {[]Input{{Sizes, 1, 0.1, ""}}, -1},
	} {
		if _, err := Propagate(Values{1, 1, 1}, c.inputs, power, c.step); !errors.Is(err, koehler.ErrInput) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

// Wanting one outcome changes nothing of it.
func TestOnlyOneOutcome(t *testing.T) {
	_, b := budgetOf(t, asked(t, "ammonium sulfate", 50e-9))
	all, err := b.MonteCarlo(context.Background(), Settings{Trials: 5000})
	if err != nil {
		t.Fatal(err)
	}
	one, err := b.MonteCarlo(context.Background(), Settings{Trials: 5000, Only: []Outcome{CriticalWetSize}})
	if err != nil {
		t.Fatal(err)
	}
	if one.Outcomes[CriticalWetSize] != all.Outcomes[CriticalWetSize] || !math.IsNaN(one.Outcomes[HazeSize].Median) {
		t.Errorf("%+v, with all %+v", one.Outcomes, all.Outcomes[CriticalWetSize])
	}
	if _, err := b.MonteCarlo(context.Background(), Settings{Only: []Outcome{outcomes}}); !errors.Is(err, koehler.ErrInput) {
		t.Errorf("an outcome that there is not: %v", err)
	}
}
