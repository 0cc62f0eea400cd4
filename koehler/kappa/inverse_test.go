package kappa

import (
	"errors"
	"math"
	"testing"

	"dropcrest/koehler"
)

func TestInverseOfForwardIsIdentity(t *testing.T) {
	for _, T := range []float64{268.15, 298.15} {
		c := Convention{Temperature: T}
		for _, dry := range []float64{20e-9, 100e-9, 400e-9} {
			for _, kappa := range []float64{0.01, 0.3, 1.3} {
				gf, err := GrowthFactor(dry, kappa, 0.9, c)
				if err != nil {
					t.Fatal(err)
				}
				g, err := FromGrowth(dry, gf, 0.9, c)
				if err != nil {
					t.Fatal(err)
				}
				near(t, "κ of growth and back", g.Kappa, kappa, 1e-11*kappa)
				for _, given := range []Given{{DryDiameter: dry}, {Supersaturation: 0.003}, {DryDiameter: dry, Humidity: 0.9}} {
					there, err := Recompute(kappa, given, c, At25C())
					if err != nil {
						t.Fatal(err)
					}
					back, err := Recompute(there.Kappa, given, At25C(), c)
					if err != nil {
						t.Fatal(err)
					}
					if given.Supersaturation == 0 { // dry diameter, κ: the same crest both ways
						near(t, "κ of another convention and back", back.Kappa, kappa, 1e-10*kappa)
					}
					if there.Kappa == kappa {
						t.Errorf("%+v: another convention leaves κ as it is", given)
					}
				}
			}
		}
	}
}

func TestRecomputeFollowsTheRule(t *testing.T) {
	// κ ∝ A³ for small s
	from, to := Convention{Temperature: 283.15}, At25C()
	r, err := Recompute(0.3, Given{Supersaturation: 0.001}, from, to)
	if err != nil {
		t.Fatal(err)
	}
	want := 0.3 * math.Pow(to.Kelvin()/from.Kelvin(), 3)
	near(t, "κ at another convention", r.Kappa, want, 2e-3*want)
}

func TestSpreadOfACurve(t *testing.T) {
	c := At25C()
	// At 0.1 % the classic slope of 3 holds to 1 %
	p, err := FromCurve(Curve{D50: 150e-9, Width: 0.05, TransferWidth: 0.03, Plateau: 0.9}, 0.001, c)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "width of κ", p.WidthOfKappa, 0.04, 1e-15)
	near(t, "spread", p.Spread, 0.12, 0.0012)
	near(t, "insoluble share", p.Insoluble, 0.1, 1e-15)
	if p.Unresolved || !(p.Low < p.Kappa && p.Kappa < p.High) {
		t.Errorf("resolved curve: %+v", p)
	}
	p, err = FromCurve(Curve{D50: 150e-9, Width: 0.02, TransferWidth: 0.03, Plateau: 1}, 0.001, c)
	if err != nil || !p.Unresolved || p.Spread != 0 {
		t.Errorf("a curve narrower than the classifier: %+v, %v", p, err)
	}
}

func TestGrowthDistribution(t *testing.T) {
	c := At25C()
	bins := []Bin{{0.95, 1.05, 10}, {1.3, 1.4, 30}, {1.4, 1.5, 60}}
	got, err := GrowthDistribution(100e-9, 0.9, bins, c)
	if err != nil {
		t.Fatal(err)
	}
	sum := 0.0
	for i, b := range got {
		sum += b.Share
		if bins[i].Low >= 1 {
			g, err := FromGrowth(100e-9, bins[i].Low, 0.9, c)
			if err != nil || g.Kappa != b.Low {
				t.Errorf("edge %g: κ %g, want %g (%v)", bins[i].Low, b.Low, g.Kappa, err)
			}
		}
	}
	near(t, "sum of shares", sum, 1, 1e-15)
	if got[0].Low >= 0 || got[0].High <= 0 {
		t.Errorf("the bin about 1 has κ %g to %g, want it about 0", got[0].Low, got[0].High)
	}
	m := Describe(got)
	if !(m.Low < m.Median && m.Median < m.High && m.Median > got[2].Low && m.Median < got[2].High) {
		t.Errorf("moments %+v", m)
	}
	near(t, "uniform bin", Describe([]Bin{{1, 3, 1}}).StandardDeviation, 2/math.Sqrt(12), 1e-15)
}

func TestInputsWithoutAnAnswer(t *testing.T) {
	c := At25C()
	for name, ask := range map[string]func() error{
		"size of nothing":            func() error { _, err := FromActivation(0, 0.01, c); return err },
		"more active than insoluble": func() error { _, err := FromActivation(20e-9, 0.5, c); return err },
		"growth factor below 1":      func() error { _, err := FromGrowth(1e-7, 0.99, 0.9, c); return err },
		"no humidity":                func() error { _, err := FromGrowth(1e-7, 1.2, 0, c); return err },
		"water activity above 1":     func() error { _, err := FromGrowth(1e-6, 2, 1.01, c); return err },
		"absolute zero":              func() error { _, err := FromActivation(1e-7, 0.01, Convention{}); return err },
		"negative tension":           func() error { _, err := FromActivation(1e-7, 0.01, Convention{298, -1}); return err },
		"negative width":             func() error { _, err := FromCurve(Curve{D50: 1e-7, Width: -1}, 0.001, c); return err },
		"nothing known":              func() error { _, err := Recompute(0.3, Given{}, c, c); return err },
		"bins that overlap": func() error {
			_, err := GrowthDistribution(1e-7, 0.9, []Bin{{1, 1.2, 1}, {1.1, 1.3, 1}}, c)
			return err
		},
		"no particles": func() error { _, err := GrowthDistribution(1e-7, 0.9, []Bin{{1, 1.2, 0}}, c); return err },
	} {
		err := ask()
		if !errors.Is(err, koehler.ErrInput) && !errors.Is(err, koehler.ErrNoSolution) {
			t.Errorf("%s: error %v", name, err)
		}
	}
}
