package kappa

import (
	"math"
	"math/rand/v2"
	"testing"
)

// Whatever is measured, there is a finite κ with a finite uncertainty or an error
// with a sentence.
func TestAnyPointGivesAnAnswerOrASentence(t *testing.T) {
	random := rand.New(rand.NewPCG(1, 2))
	solved := 0
	draw := func(value, spread float64) Measured {
		v := value * math.Exp(spread*random.NormFloat64())
		return Measured{v, 0.1 * v * random.Float64(), 0.1 * v * random.Float64()}
	}
	for i := range 2000 {
		p := Point{
			Method: Method(random.IntN(3)), Dry: draw(60e-9, 1), Supersaturation: draw(0.003, 2),
			Grown: draw(1.4, 0.2), Humidity: draw(0.9, 0.1), Temperature: draw(290, 0.03),
		}
		if i%3 == 0 {
			p.Tension = draw(0.07, 0.1)
		}
		if i%4 == 0 {
			p.Shape = draw(1.1, 0.05)
		}
		if i%5 == 0 {
			p.Transfer = Transfer{Dry: -1.5, Tension: 1.5, Temperature: -0.008, Shape: 0.8}
		}
		e, err := Evaluate(p, 0.95)
		if err != nil {
			if len(err.Error()) < 10 {
				t.Errorf("point %d: %q", i, err)
			}
			continue
		}
		solved++
		if !(e.Kappa >= 0) || math.IsInf(e.Kappa, 0) || math.IsInf(e.Linear.StandardUncertainty, 0) || e.Kappa > 0 && math.IsNaN(e.Linear.StandardUncertainty) {
			t.Errorf("point %d %+v: κ %g, u %g", i, p, e.Kappa, e.Linear.StandardUncertainty)
		}
	}
	if solved < 500 || solved == 2000 {
		t.Errorf("%d of 2000 points have a κ: the test does not see both", solved)
	}
}

// For small s every κ follows the powers of the classic form, whatever the unit or
// the convention: κ ∝ A³ D^-3 s^-2.
func TestPowersOfTheClassicForm(t *testing.T) {
	for _, c := range []Convention{At25C(), {Temperature: 278.15}} {
		a, err := FromActivation(200e-9, 0.0005, c)
		if err != nil {
			t.Fatal(err)
		}
		b, err := FromActivation(400e-9, 0.0005/math.Pow(2, 1.5), c)
		if err != nil {
			t.Fatal(err)
		}
		near(t, "κ at twice the size", b.Kappa/a.Kappa, 1, 2e-3)
		near(t, "classic at twice the size", b.Classic/a.Classic, 1, 1e-3)
		if a.ClassicError() < b.ClassicError() || b.ClassicError() < 0 {
			t.Errorf("error of the classic form %g and at twice the size %g: want it to fall to 0 from above", a.ClassicError(), b.ClassicError())
		}
	}
}
