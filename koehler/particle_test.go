package koehler

import (
	"errors"
	"math"
	"testing"

	"dropcrest/solutes"
)

// extended is a pitzerSalt that goes on with the slope of its end below its
// least water, as the contract of solutes.Solution asks.
type extended struct{ pitzerSalt }

func (e extended) LnActivity(u float64) (lnaw, slope float64) {
	if least := e.LeastWater(); u < least {
		lnaw, slope = e.pitzerSalt.LnActivity(least)
		return lnaw + slope*math.Log(u/least), slope
	}
	return e.pitzerSalt.LnActivity(u)
}

func ammoniumSulfate() extended {
	s, _ := referenceSalt("ammonium_sulfate", "pitzer", atmosDensity(298.15))
	return extended{s}
}

// particles are the models that all property checks share.
func particles() map[string]Particle {
	of := func(s solutes.Solution) Particle {
		return Particle{DryDiameter: 80e-9, Temperature: 298.15, Solution: s}
	}
	salt := ammoniumSulfate()
	all := map[string]Particle{
		"kappa": of(solutes.Kappa(0.61)), "ion interaction": of(salt), "ideal": of(solutes.IdealOsmotic(0.73)),
		"salt tension": of(salt), "pure vapour": of(salt), "compressible": of(salt),
		"kappa pure vapour": of(solutes.Kappa(0.3)), "scanned tension": of(salt), "swelling": of(salt),
		"constant tension": of(salt), "Tolman": of(salt), "Tolman, salt tension": of(salt), "Tolman, kappa": of(solutes.Kappa(0.61)),
	}
	with := func(name string, change func(*Particle)) {
		p := all[name]
		change(&p)
		all[name] = p
	}
	with("salt tension", func(p *Particle) { p.Tension = saltTension{0.072, salt.perWater, 2.17e-3} })
	with("scanned tension", func(p *Particle) { p.Tension = unknownTension{saltTension{0.072, salt.perWater, 2.17e-3}} })
	with("pure vapour", func(p *Particle) { p.Kelvin = PureVapour })
	with("kappa pure vapour", func(p *Particle) { p.Kelvin = PureVapour })
	with("compressible", func(p *Particle) { p.Kelvin = Compressible })
	with("swelling", func(p *Particle) { p.Swelling = shrinking{} })
	with("constant tension", func(p *Particle) { p.Tension = solutes.ConstantTension(0.06) })
	with("Tolman", func(p *Particle) { p.TolmanLength = 0.1e-9 })
	with("Tolman, salt tension", func(p *Particle) {
		p.Tension, p.TolmanLength = saltTension{0.072, salt.perWater, 2.17e-3}, -0.056e-9
	})
	with("Tolman, kappa", func(p *Particle) { p.TolmanLength, p.Swelling = -0.1e-9, shrinking{} })
	return all
}

// unknownTension hides that its curve has one maximum.
type unknownTension struct{ solutes.Tension }

// shrinking is a drop that is up to 5 % smaller than its parts.
type shrinking struct{}

func (shrinking) Swell(u float64) (v, slope float64) {
	return 1 + u - 0.05*u/(1+u), u - 0.05*u/((1+u)*(1+u))
}

func TestLnSaturationSlope(t *testing.T) {
	for name, p := range particles() {
		for _, u := range []float64{0.3, 2, 30, 1e3, 1e5} {
			const h = 1e-4
			up, _ := p.LnSaturation(u * math.Exp(h))
			down, _ := p.LnSaturation(u * math.Exp(-h))
			_, slope := p.LnSaturation(u)
			if got := (up - down) / (2 * h); math.Abs(got-slope) > 1e-6*math.Abs(slope)+1e-11 {
				t.Errorf("%s, u = %g: slope %.9g, from differences %.9g", name, u, slope, got)
			}
		}
	}
}

func TestCrestIsTheHighestPoint(t *testing.T) {
	for name, p := range particles() {
		for _, dry := range []float64{5e-9, 30e-9, 200e-9, 2e-6} {
			p.DryDiameter = dry
			crest, err := p.Crest()
			if err != nil {
				t.Errorf("%s %g: %v", name, dry, err)
				continue
			}
			if _, slope := p.LnSaturation(crest.Water); math.Abs(slope) > 1e-9*crest.Supersaturation {
				t.Errorf("%s %g: slope %g at the crest", name, dry, slope)
			}
			// brute force: no point of the curve lies higher
			for x := math.Log(math.Max(0.5, p.Solution.LeastWater())); x < math.Log(1e9); x += 0.01 {
				if y, _ := p.LnSaturation(math.Exp(x)); y > math.Log1p(crest.Supersaturation)*(1+1e-12) {
					t.Errorf("%s %g: ln S %g at u = %g is above the crest %g", name, dry, y, math.Exp(x), crest.Supersaturation)
					break
				}
			}
		}
	}
}

func TestInverseOfForwardIsIdentity(t *testing.T) {
	for name, p := range particles() {
		for _, dry := range []float64{20e-9, 100e-9, 500e-9} {
			p.DryDiameter = dry
			crest, err := p.Crest()
			if err != nil {
				t.Fatal(name, err)
			}
			got, err := p.ActivatedDryDiameter(crest.Supersaturation)
			if err != nil {
				t.Errorf("%s: %v", name, err)
			}
			checkClose(t, name, got, dry, 1e-11)
		}
	}
}

func TestHaze(t *testing.T) {
	for name, p := range particles() {
		crest, err := p.Crest()
		if err != nil {
			t.Fatal(name, err)
		}
		for _, S := range []float64{0.5, 0.9, 0.999, 1, 1 + crest.Supersaturation/2, 1 + crest.Supersaturation*(1-1e-6)} {
			stable, unstable, err := p.Haze(S)
			if err != nil {
				t.Errorf("%s S = %g: %v", name, S, err)
				continue
			}
			checkClose(t, name+" stable", stable.SaturationRatio, S, 1e-14)
			if stable.WetDiameter >= crest.WetDiameter {
				t.Errorf("%s S = %g: the stable drop lies beyond the crest", name, S)
			}
			if (S > 1) != (unstable.WetDiameter > crest.WetDiameter) {
				t.Errorf("%s S = %g: unstable %g, crest %g", name, S, unstable.WetDiameter, crest.WetDiameter)
			}
			if S > 1 {
				checkClose(t, name+" unstable", unstable.SaturationRatio, S, 1e-14)
			}
		}
		if _, _, err := p.Haze(crest.SaturationRatio); !errors.Is(err, ErrAboveCrest) {
			t.Errorf("%s: at the crest: %v", name, err)
		}
	}
	p := particles()["kappa"]
	if s, _, err := p.Haze(1e-3); err != nil || math.Abs(s.SaturationRatio-1e-3) > 1e-15 {
		t.Errorf("S = 0.001: %v %v", s, err)
	}
	p.Solution = solutes.Kappa(0)
	if _, _, err := p.Haze(0.9); !errors.Is(err, ErrNoHaze) {
		t.Errorf("without solute: %v", err)
	}
}

func TestSampleHoldsTheCrest(t *testing.T) {
	for name, p := range particles() {
		crest, _ := p.Crest()
		states := p.Sample(nil, p.DryDiameter*1.1, crest.WetDiameter*10, 50)
		if len(states) != 51 {
			t.Errorf("%s: %d states, want 50 and the crest", name, len(states))
		}
		best := 0.0
		for i, s := range states {
			best = math.Max(best, s.Supersaturation)
			if i > 0 && !(s.WetDiameter > states[i-1].WetDiameter) {
				t.Errorf("%s: sizes not rising at %d", name, i)
			}
			checkClose(t, name+" At", p.At(s.WetDiameter).SaturationRatio, s.SaturationRatio, 1e-12)
		}
		if best != crest.Supersaturation {
			t.Errorf("%s: highest sample %g, crest %g", name, best, crest.Supersaturation)
		}
	}
}

// wavy has two maxima: a soluble share that dissolves late.
type wavy struct{}

func (wavy) LnActivity(u float64) (lnaw, slope float64) {
	z := math.Log(u) - math.Log(40)
	k := 0.02 + 0.6/(1+math.Exp(-8*z))
	dk := 0.6 * 8 / (math.Exp(4*z) + math.Exp(-4*z)) / (math.Exp(4*z) + math.Exp(-4*z))
	return -math.Log1p(k / u), (k - dk) / (u + k)
}
func (wavy) LeastWater() float64 { return 0 }
func (wavy) SeveralMaxima() bool { return true }

func TestSeveralMaxima(t *testing.T) {
	p := Particle{DryDiameter: 50e-9, Temperature: 298.15, Solution: wavy{}}
	extrema, err := p.Extrema()
	if err != nil || len(extrema) != 3 {
		t.Fatalf("extrema %v, error %v", extrema, err)
	}
	for i, want := range []Kind{Maximum, Minimum, Maximum} {
		if extrema[i].Kind != want {
			t.Errorf("extremum %d is %v, want %v", i, extrema[i].Kind, want)
		}
	}
	crest, err := p.Crest()
	if err != nil || crest.Supersaturation != math.Max(extrema[0].Supersaturation, extrema[2].Supersaturation) {
		t.Errorf("crest %v, error %v", crest, err)
	}
}

func TestBadInput(t *testing.T) {
	good := particles()["ion interaction"]
	for name, change := range map[string]func(*Particle){
		"zero size":   func(p *Particle) { p.DryDiameter = 0 },
		"NaN size":    func(p *Particle) { p.DryDiameter = math.NaN() },
		"cold":        func(p *Particle) { p.Temperature = 0 },
		"no solution": func(p *Particle) { p.Solution = nil },
		"kappa":       func(p *Particle) { p.Solution = solutes.Kappa(-1) },
		"tension":     func(p *Particle) { p.Tension = solutes.ConstantTension(0) },
		"Tolman":      func(p *Particle) { p.TolmanLength = -p.DryDiameter / 4 },
		"Tolman NaN":  func(p *Particle) { p.TolmanLength = math.NaN() },
		"Tolman Inf":  func(p *Particle) { p.TolmanLength = math.Inf(1) },
	} {
		p := good
		change(&p)
		if _, err := p.Crest(); !errors.Is(err, ErrInput) {
			t.Errorf("%s: %v", name, err)
		}
	}
	if _, _, err := good.Haze(math.NaN()); !errors.Is(err, ErrInput) {
		t.Error("NaN humidity", err)
	}
	if _, err := good.ActivatedDryDiameter(-0.1); !errors.Is(err, ErrInput) {
		t.Error("negative supersaturation", err)
	}
	if _, err := KappaOf(20e-9, 2.1e-9, 0.2); !errors.Is(err, ErrNoSolution) {
		t.Error("above the Kelvin limit", err)
	}
}

func TestTextbookIsTheDiluteLimit(t *testing.T) {
	p := particles()["ideal"]
	p.DryDiameter = 20e-6
	full, _ := p.Crest()
	book, err := p.Textbook()
	if err != nil {
		t.Fatal(err)
	}
	checkClose(t, "s_c", book.Supersaturation, full.Supersaturation, 1e-4)
	checkClose(t, "D_c", book.WetDiameter, full.WetDiameter, 1e-4)
}
