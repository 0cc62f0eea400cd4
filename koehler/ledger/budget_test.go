package ledger

import (
	"context"
	"errors"
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/koehler/internal/chunk"
	"dropcrest/solutes"
)

func budgetOf(t testing.TB, a Asked) (Ledger, Budget) {
	t.Helper()
	l := ledgerOf(t, a)
	b, err := NewBudget(&l, l.Inputs())
	if err != nil {
		t.Fatal(err)
	}
	return l, b
}

func contribution(t testing.TB, b Budget, q Quantity) Contribution {
	t.Helper()
	for _, c := range b.Contributions {
		if c.Quantity == q {
			return c
		}
	}
	t.Fatalf("no contribution of %s", q)
	return Contribution{}
}

// For a κ particle of 300 nm the crest follows size, tension and κ by the powers of
// the classic form, s ∝ (A/D)^1.5 κ^-0.5 and D_c ∝ (κ D³/A)^0.5 (field reference,
// section 6), to within what the form is off by itself.
func TestPowersOfTheClassicForm(t *testing.T) {
	_, b := budgetOf(t, oneKappa(0.6, 300e-9, 298.15))
	for q, want := range map[Quantity][2]float64{
		DryDiameter: {-1.5, 1.5}, SurfaceTension: {1.5, -0.5}, Hygroscopicity: {-0.5, 0.5},
	} {
		c := contribution(t, b, q)
		within(t, q.String()+", crest", c.Relative(CriticalSupersaturation), want[0], 0.003)
		within(t, q.String()+", wet size", c.Relative(CriticalWetSize), want[1], 0.003)
	}
	// field reference, section 6: 3 % of size make 4.5 %, 1 % of tension 1.5 %
	within(t, "3 % of the size", contribution(t, b, DryDiameter).Percent[CriticalSupersaturation], -4.5, 0.01)
}

// The combined uncertainty with the tension and the temperature as correlated inputs
// (JCGM 100:2008, 5.2.2, eq. 13) is that of the budget, which takes the tension's
// own error and all that the temperature does as independent.
func TestCorrelationOfTensionAndTemperature(t *testing.T) {
	_, b := budgetOf(t, asked(t, "ammonium sulfate", 30e-9))
	tension, temperature := contribution(t, b, SurfaceTension), contribution(t, b, Temperature)
	follows := (atmos.SurfaceTension(298.16) - atmos.SurfaceTension(298.14)) / 0.02
	// the solute's rise of the tension does not follow the temperature
	all := math.Hypot(tension.StandardUncertainty, follows*temperature.StandardUncertainty)
	within(t, "correlation", b.Correlation, follows*temperature.StandardUncertainty/all, 1e-4)
	for _, o := range Outcomes() {
		byTension := 100 * tension.Sensitivity[o] * all
		byTemperature := 100 * b.FixedTension[o] * temperature.StandardUncertainty
		variance := byTension*byTension + byTemperature*byTemperature + 2*b.Correlation*byTension*byTemperature
		for _, c := range b.Contributions {
			if c.Quantity != SurfaceTension && c.Quantity != Temperature {
				variance += c.Percent[o] * c.Percent[o]
			}
		}
		within(t, o.String(), math.Sqrt(variance), b.Combined[o], 1e-4*b.Combined[o])
	}
	a := asked(t, "ammonium sulfate", 30e-9)
	a.Recipe.TensionRule, a.Recipe.Tension = solutes.FixedTension, 0.065
	if _, b := budgetOf(t, a); b.Correlation != 0 || b.FixedTension != contribution(t, b, Temperature).Sensitivity {
		t.Errorf("a given tension follows the temperature: correlation %v", b.Correlation)
	}
}

// Holding the water activity at the temperature asked for is no error that counts:
// with all of it at the other temperature the sensitivity differs by less than 3 %.
func TestHeldActivity(t *testing.T) {
	for _, name := range []string{"ammonium sulfate", "sodium chloride", "sea salt"} {
		a := asked(t, name, 50e-9)
		_, b := budgetOf(t, a)
		at := func(T float64) float64 {
			a.Recipe.Temperature = T
			return math.Log(ledgerOf(t, a).Fullest.Values[CriticalSupersaturation])
		}
		whole := (at(300.15) - at(296.15)) / 4
		held := contribution(t, b, Temperature).Sensitivity[CriticalSupersaturation]
		within(t, name, held, whole, 0.03*math.Abs(whole))
	}
}

// The contribution of each kind of input is that of a particle asked for with the
// other value.
func TestContributionsByAsking(t *testing.T) {
	scaled := func(d *solutes.Datum, f float64) { d.Value *= f }
	for _, c := range []struct {
		name, substance string
		quantity        Quantity
		change          func(a *Asked, f float64)
	}{
		{"size of a salt", "ammonium sulfate", DryDiameter, func(a *Asked, f float64) { a.DryDiameter *= f }},
		{"size of dust", "mineral dust", DryDiameter, func(a *Asked, f float64) { a.DryDiameter *= f }},
		{"κ of an acid", "adipic acid", Hygroscopicity, func(a *Asked, f float64) { scaled(&a.Recipe.Parts[0].Substance.Kappa, f) }},
		{"solubility", "adipic acid", Solubility, func(a *Asked, f float64) { scaled(&a.Recipe.Parts[0].Substance.VolumeSolubility, f) }},
		{"κ of an organic", "alpha_pinene_soa", Hygroscopicity, func(a *Asked, f float64) { scaled(&a.Recipe.Parts[0].Substance.Kappa, f) }},
	} {
		a := asked(t, c.substance, 80e-9)
		_, b := budgetOf(t, a)
		at := func(f float64) float64 {
			moved := a
			moved.Recipe.Parts = append([]solutes.Part(nil), a.Recipe.Parts...)
			c.change(&moved, f)
			return math.Log(ledgerOf(t, moved).Fullest.Values[CriticalSupersaturation])
		}
		want := (at(1.0005) - at(0.9995)) / 0.001
		within(t, c.name, contribution(t, b, c.quantity).Relative(CriticalSupersaturation), want, 1e-4*math.Abs(want)+1e-6)
	}
	// the isotherm's constants
	a := asked(t, "mineral dust", 80e-9)
	_, b := budgetOf(t, a)
	given := func(A, B float64) float64 {
		g := a
		g.Recipe.Adsorption, g.Recipe.AdsorptionA, g.Recipe.AdsorptionB = solutes.GivenAdsorption, A, B
		return math.Log(ledgerOf(t, g).Fullest.Values[CriticalSupersaturation])
	}
	within(t, "A", contribution(t, b, AdsorptionA).Sensitivity[0], (given(2.251, 1.2)-given(2.249, 1.2))/0.002, 1e-4)
	within(t, "B", contribution(t, b, AdsorptionB).Sensitivity[0], (given(2.25, 1.201)-given(2.25, 1.199))/0.002, 1e-3)
}

func TestInputsOfKinds(t *testing.T) {
	l := ledgerOf(t, asked(t, "alpha_pinene_soa", 100e-9))
	for _, in := range l.Inputs() {
		if in.Quantity == Hygroscopicity { // 0.10 ± 0.04, all between equally likely
			within(t, "κ of SOA", in.StandardUncertainty/in.Value, 0.04/math.Sqrt(3)/0.1, 1e-9)
		}
	}
	a := asked(t, "alpha_pinene_soa", 100e-9)
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	a.Recipe.Parts = []solutes.Part{{Substance: a.Recipe.Parts[0].Substance, Volume: 0.7}, {Substance: salt, Volume: 0.3}}
	_, b := budgetOf(t, a)
	mean := 0.7*0.1 + 0.3*0.61
	shares := contribution(t, b, Shares)
	within(t, "shares", shares.StandardUncertainty/shares.Value, 0.1*math.Hypot(0.7*(0.1-mean), 0.3*(0.61-mean))/mean, 1e-9)
	k := contribution(t, b, Hygroscopicity)
	within(t, "κ of a mixture", k.StandardUncertainty/k.Value, math.Hypot(0.7*0.04/math.Sqrt(3), 0.3*0.61*0.02)/mean, 1e-9)
}

// Trials by the polynomial against trials that are solved, of other random numbers.
func TestMonteCarlo(t *testing.T) {
	for _, name := range []string{"ammonium sulfate", "adipic acid", "mineral dust"} {
		l, b := budgetOf(t, asked(t, name, 60e-9))
		m, err := b.MonteCarlo(context.Background(), Settings{})
		if err != nil {
			t.Fatal(err)
		}
		if m.Direct != (name == "mineral dust") {
			t.Errorf("%s: direct %t, deviation %v %%", name, m.Direct, m.Deviation)
		}
		random := chunk.Generator(77)
		z := make([]float64, len(l.Inputs()))
		var sum, square float64
		const trials = 4000
		for range trials {
			y := b.solved(l.Inputs(), normal(random, z))[CriticalSupersaturation]/b.Answer.Values[CriticalSupersaturation] - 1
			sum, square = sum+y, square+y*y
		}
		d := m.Outcomes[CriticalSupersaturation]
		solved := 100 * math.Sqrt((square-sum*sum/trials)/(trials-1))
		// of 4000 trials a standard deviation is known to 1/√(2·4000) = 1.1 %
		if got := d.Percent; math.Abs(got/solved-1) > 0.05 {
			t.Errorf("%s: %v %%, solved one by one %v %%", name, got, solved)
		}
		if !(d.Low < d.Median && d.Median < d.High && d.Mean > d.Low) || d.Lost > 0 {
			t.Errorf("%s: %+v", name, d)
		}
		if name == "ammonium sulfate" { // nearly linear: both ways agree
			within(t, "linear and trials", d.Percent, b.Combined[CriticalSupersaturation], 0.02*d.Percent)
			within(t, "interval", (d.High-d.Low)/2/1.96, d.StandardUncertainty, 0.01*d.StandardUncertainty)
		}
	}
}

func TestMonteCarloRepeats(t *testing.T) {
	_, b := budgetOf(t, asked(t, "ammonium sulfate", 60e-9))
	run := func(s Settings) MonteCarlo {
		m, err := b.MonteCarlo(context.Background(), s)
		if err != nil {
			t.Fatal(err)
		}
		return m
	}
	first := run(Settings{Seed: 5, Trials: 20001, Workers: 1})
	if again := run(Settings{Seed: 5, Trials: 20001, Workers: 3}); again != first {
		t.Errorf("three workers: %+v, one %+v", again, first)
	}
	if other := run(Settings{Seed: 6, Trials: 20001}); other == first {
		t.Error("another seed gives the same trials")
	}
	ended, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := b.MonteCarlo(ended, Settings{}); !errors.Is(err, context.Canceled) {
		t.Errorf("error %v of an ended context", err)
	}
}

func TestRanked(t *testing.T) {
	random := chunk.Generator(3)
	for _, n := range []int{1, 2, 3, 10, 101} {
		y := make([]float64, n)
		for i := range y {
			y[i] = float64(random.IntN(n)) // with ties
		}
		for k := range y {
			below, equal := 0, 0
			got := ranked(append([]float64(nil), y...), k)
			for _, x := range y {
				if x < got {
					below++
				} else if x == got {
					equal++
				}
			}
			if k < below || k >= below+equal {
				t.Errorf("%d values, rank %d: %v has %d below and %d equal", n, k, got, below, equal)
			}
		}
	}
}

// With what is needed the combined uncertainty is the one that was asked for.
func TestReach(t *testing.T) {
	l, b := budgetOf(t, asked(t, "sea salt", 60e-9))
	now := b.Combined[CriticalSupersaturation]
	if needs := b.Reach(CriticalSupersaturation, now*1.001); needs != nil {
		t.Errorf("needs %v for what is there already", needs)
	}
	most := 0
	for _, target := range []float64{0.99 * now, 4, 2, 1, 0.3, 0.01} {
		needs := b.Reach(CriticalSupersaturation, target)
		inputs := l.Inputs()
		for _, n := range needs {
			for i := range inputs {
				if inputs[i].Quantity == n.Quantity {
					inputs[i].StandardUncertainty = n.Needed
				}
			}
			if n.Needed > n.StandardUncertainty || n.Needed <= 0 {
				t.Errorf("%v %%: %s needs %v, has %v", target, n, n.Needed, n.StandardUncertainty)
			}
		}
		better, err := NewBudget(&l, inputs)
		if err != nil {
			t.Fatal(err)
		}
		within(t, "reached", better.Combined[CriticalSupersaturation], target, 1e-9)
		if len(needs) < most || needs[0].Quantity != DryDiameter {
			t.Errorf("%v %%: %d needs, the first is %s", target, len(needs), needs[0])
		}
		most = len(needs)
	}
	if most != len(l.Inputs()) {
		t.Errorf("0.01 %% is reached by %d inputs", most)
	}
	if b.Reach(CriticalSupersaturation, 0) != nil || b.Reach(CriticalSupersaturation, math.NaN()) != nil {
		t.Error("0 % can be reached")
	}
}

func TestBudgetRefuses(t *testing.T) {
	l := ledgerOf(t, asked(t, "ammonium sulfate", 60e-9))
	for name, inputs := range map[string][]Input{
		"negative":   {{DryDiameter, 60e-9, -1e-9, ""}},
		"infinite":   {{DryDiameter, 60e-9, math.Inf(1), ""}},
		"no value":   {{DryDiameter, 0, 1e-9, ""}},
		"twice":      {{DryDiameter, 60e-9, 1e-9, ""}, {DryDiameter, 60e-9, 1e-9, ""}},
		"no such":    {{quantities, 1, 0.1, ""}},
		"not number": {{Temperature, math.NaN(), 0.1, ""}},
	} {
		if _, err := NewBudget(&l, inputs); !errors.Is(err, koehler.ErrInput) {
			t.Errorf("%s: error %v", name, err)
		}
	}
	b, _ := NewBudget(&l, nil)
	if b.Combined != (Values{}) {
		t.Errorf("no inputs leave %v %%", b.Combined)
	}
	for _, s := range []Settings{{Trials: 5}, {Coverage: 1}, {Coverage: math.NaN()}} {
		if _, err := b.MonteCarlo(context.Background(), s); !errors.Is(err, koehler.ErrInput) {
			t.Errorf("%+v: error %v", s, err)
		}
	}
}

// A film's budget: its constants and the tension of water move the crest as they do
// in a particle that is asked for with the other value.
func TestBudgetOfAFilm(t *testing.T) {
	_, b := budgetOf(t, filmOf(t, 0.5))
	at := func(k float64) float64 {
		return math.Log(ledgerOf(t, filmOf(t, k)).Fullest.Values[CriticalSupersaturation])
	}
	got := contribution(t, b, FilmConstant).Relative(CriticalSupersaturation)
	want := (at(0.5*1.001) - at(0.5*0.999)) / 0.002
	within(t, "K", got, want, 0.01*math.Abs(want))
	for _, c := range b.Contributions {
		if p := c.Percent[CriticalSupersaturation]; !(math.Abs(p) < 20) || p == 0 {
			t.Errorf("%s contributes %v %%", c, p)
		}
	}
}
