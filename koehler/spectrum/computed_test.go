package spectrum

import (
	"errors"
	"math"
	"testing"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/internal/computed"
)

// computedCase is one case of ../../testdata/computed, described in the README
// there.
type computedCase[I, O any] struct {
	ID, Family string
	Input      I
	Output     O
}

func near(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if d := math.Abs(got - want); !(d <= tol*math.Abs(want)) && got != want {
		t.Errorf("%s = %.17g, want %.17g (relative %.2g, tolerance %.2g)", what, got, want, d/math.Abs(want), tol)
	}
}

// referenceKelvin is the Kelvin length with the reference's own R.
func referenceKelvin(T, factor float64) float64 {
	const R, Mw = 8.314462618, 0.01801528
	return 4 * factor * atmos.SurfaceTension(T) * Mw / (R * T * atmos.WaterDensity(T))
}

type spectraInput struct {
	Modes []struct {
		N, Dg, Sg, Kg, Sk float64
		Components        [][2]float64
	}
	Edges       []float64
	DNdlog10D   []float64
	Kappa, T    float64
	SigmaFactor float64 `json:"sigma_factor"`
	S           []float64
}

// population makes the population of a computed case.
func (in spectraInput) population(t *testing.T) Population {
	A := referenceKelvin(in.T, in.SigmaFactor)
	var p Population
	for _, m := range in.Modes {
		sizes := aerosol.Mode{Concentration: m.N, Median: m.Dg, GSD: m.Sg}
		var mix External
		for _, c := range m.Components {
			mix = append(mix, Part{c[0], Kappa{c[1], A}})
		}
		if mix != nil {
			p = append(p, Group{sizes, 1, mix})
		}
		if m.Sk > 0 {
			p = append(p, Group{sizes, 1, Spread{m.Kg, m.Sk, A}})
		}
	}
	if in.Edges != nil {
		g, err := aerosol.NewGrid(in.Edges)
		if err != nil {
			t.Fatal(err)
		}
		b, err := aerosol.NewBins(g, in.DNdlog10D, aerosol.PerLog10)
		if err != nil {
			t.Fatal(err)
		}
		p = append(p, Group{b, 1, Kappa{in.Kappa, A}})
	}
	return p
}

func TestSpectraAgainstComputed(t *testing.T) {
	type output struct {
		N      []float64
		NTotal float64 `json:"N_total"`
	}
	seen := map[string]int{}
	for _, c := range computed.Read[computedCase[spectraInput, output]](t, "spectra.json") {
		seen[c.Family]++
		tol := 1e-9
		if c.Family == "kappa_spread" {
			tol = 1e-7 // what the reference states for its quadrature
		}
		p := c.Input.population(t)
		got, err := p.Counts(nil, c.Input.S)
		if err != nil {
			t.Errorf("%s: %v", c.ID, err)
			continue
		}
		for i, want := range c.Output.N {
			near(t, c.ID+" "+c.Family, got[i], want, tol)
		}
		if c.Output.NTotal > 0 {
			near(t, c.ID+" number", p.Number(), c.Output.NTotal, 1e-13)
		}
	}
	for _, family := range []string{"internal_mixture", "external_mixture", "kappa_spread", "binned"} {
		if seen[family] == 0 {
			t.Errorf("no case of family %s", family)
		}
	}
}

// The inverse cases through counts: of two bins that meet at the dry diameter,
// the upper one is counted.
func TestKappaOfCountAgainstComputed(t *testing.T) {
	type input struct {
		Dd, Sc, T, Kappa float64
		SigmaFactor      float64 `json:"sigma_factor"`
	}
	type output struct{ Kappa, Dd float64 }
	n := 0
	for _, c := range computed.Read[computedCase[input, output]](t, "inverse.json") {
		A := referenceKelvin(c.Input.T, c.Input.SigmaFactor)
		kappa, dry, tol := c.Output.Kappa, c.Input.Dd, 1e-9
		switch {
		case c.Family == "kappa_from_Dd_sc":
		case c.Family == "Dd_from_kappa_sc" && c.Input.Kappa > 0:
			// κ amplifies the rounding of Dd, the more the nearer it is to insoluble
			kappa, dry, tol = c.Input.Kappa, c.Output.Dd, 1e-9
		default:
			continue
		}
		n++
		g, err := aerosol.NewGrid([]float64{dry / 2, dry, 2 * dry})
		if err != nil {
			t.Fatal(err)
		}
		b, err := aerosol.NewBins(g, []float64{3e8, 1e8}, aerosol.Counts)
		if err != nil {
			t.Fatal(err)
		}
		got, err := KappaOfCount(b, 1e8, c.Input.Sc, A)
		if err != nil {
			t.Errorf("%s: %v", c.ID, err)
			continue
		}
		near(t, c.ID+" Dd", got.CriticalDiameter, dry, 1e-13)
		near(t, c.ID+" kappa", got.Kappa, kappa, tol)
	}
	if n < 20 {
		t.Errorf("%d cases of inverse.json used, want 20 or more", n)
	}
}

// Where there is no κ, the reason is said; where there is, how much it rests on.
func TestWhyACountHasNoKappa(t *testing.T) {
	g, _ := aerosol.NewGrid([]float64{20e-9, 40e-9, 80e-9, 160e-9})
	b, _ := aerosol.NewBins(g, []float64{4e8, 2e8, 1e8}, aerosol.Counts)
	const A = 2.1e-9
	for _, c := range []struct {
		count, s float64
		want     Reason
	}{
		{7.1e8, 0.002, MoreThanSized}, {math.Inf(1), 0.002, MoreThanSized},
		{0, 0.002, NothingCounted}, {-1, 0.002, NothingCounted}, {math.NaN(), 0.002, NothingCounted},
		{1e8, 0, NotSuper}, {1e8, math.NaN(), NotSuper},
		{1e7, 0.05, BelowInsoluble}, {7e8, 0.0004, KappaTooLarge},
	} {
		_, err := KappaOfCount(b, c.count, c.s, A)
		var why *UnsolvedError
		if !errors.As(err, &why) || why.Reason != c.want || !errors.Is(err, ErrUnsolved) {
			t.Errorf("%g at %g: %v, want %s", c.count, c.s, err, c.want)
		}
	}
	// the sensitivities are those of the result itself
	at := func(count, s, wider float64) float64 {
		moved, err := b.Resized(func(d float64) float64 { return d * wider })
		if err != nil {
			t.Fatal(err)
		}
		k, err := KappaOfCount(moved, count, s, A)
		if err != nil {
			t.Fatal(err)
		}
		return k.Kappa
	}
	got, err := KappaOfCount(b, 2e8, 0.004, A)
	if err != nil {
		t.Fatal(err)
	}
	const h = 1e-4
	near(t, "by count", got.ByCount, math.Log(at(2e8*(1+h), 0.004, 1)/at(2e8*(1-h), 0.004, 1))/(2*h), 1e-6)
	near(t, "by diameter", got.ByDiameter, math.Log(at(2e8, 0.004, 1+h)/at(2e8, 0.004, 1-h))/(2*h), 1e-6)
	near(t, "by supersaturation", got.BySupersaturation, math.Log(at(2e8, 0.004*(1+h), 1)/at(2e8, 0.004*(1-h), 1))/(2*h), 1e-6)
	if math.Abs(got.ByDiameter+3) > 0.1 || math.Abs(got.BySupersaturation+2) > 0.1 || got.ByCount < 0 {
		t.Errorf("sensitivities far from those of small s: %+v", got)
	}
	for _, c := range []struct {
		count           float64
		bin             int
		atFirst, atLast bool
	}{{5e7, 2, false, true}, {2e8, 1, false, false}, {5e8, 0, true, false}} {
		got, err := KappaOfCount(b, c.count, 0.004, A)
		if err != nil || got.Bin != c.bin || got.AtFirst != c.atFirst || got.AtLast != c.atLast {
			t.Errorf("%g: %+v, %v", c.count, got, err)
		}
	}
}
