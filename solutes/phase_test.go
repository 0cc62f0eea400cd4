package solutes

import (
	"math"
	"testing"
)

// Greenspan 1977, J. Res. Natl. Bur. Stand. 81A, 89, % at 0, 5, ... 40 °C, from
// memory; 0: not given. tol is how far the law is from it, % humidity.
var greenspan = []struct {
	name     string
	tol      float64
	humidity [9]float64
}{
	{"NaCl", 0.4, [9]float64{75.51, 75.65, 75.67, 75.61, 75.47, 75.29, 75.09, 74.87, 74.68}},
	{"KCl", 0.7, [9]float64{88.61, 87.67, 86.77, 85.92, 85.11, 84.34, 83.62, 82.95, 82.32}},
	// The references disagree by 1.1 at 25 °C; the difference does not grow.
	{"(NH4)2SO4", 1.11, [9]float64{82.77, 82.42, 82.06, 81.70, 81.34, 80.99, 80.63, 80.27, 79.91}},
	{"NaNO3", 0.95, [9]float64{0, 78.57, 77.53, 76.46, 75.36, 74.25, 73.14, 72.06, 71.00}},
	{"K2SO4", 0.5, [9]float64{98.77, 98.48, 98.18, 97.89, 97.59, 97.30, 97.00, 96.71, 96.41}},
	{"KNO3", 2.8, [9]float64{96.33, 96.27, 95.96, 95.41, 94.62, 93.58, 92.31, 90.79, 89.03}},
	{"MgCl2", 1.05, [9]float64{33.66, 33.60, 33.47, 33.30, 33.07, 32.78, 32.44, 32.05, 31.60}},
}

func TestDeliquescenceAgainstGreenspan(t *testing.T) {
	for _, c := range greenspan {
		s := find(t, c.name)
		worst := 0.0
		for i, want := range c.humidity {
			if want == 0 {
				continue
			}
			got, ok := s.DeliquescenceHumidity(273.15 + 5*float64(i))
			worst = math.Max(worst, math.Abs(100*got-want))
			if !ok || math.Abs(100*got-want) > c.tol {
				t.Errorf("%s at %d °C: %.2f %%, Greenspan %.2f ± %g", c.name, 5*i, 100*got, want, c.tol)
			}
		}
		if worst < 0.8*c.tol {
			t.Errorf("%s: largest difference %.3f, the tolerance %g is loose", c.name, worst, c.tol)
		}
	}
}

// The solubility n = A + B T + C T² of the law at 298.15 K against the tabulated
// one in the same table (from memory): the coefficients are typed right.
func TestSolubilityOfTheLaw(t *testing.T) {
	for name, want := range map[string]float64{
		"(NH4)2SO4": 0.104, "Na2SO4": 0.065, "NaNO3": 0.194, "NH4NO3": 0.475, "KCl": 0.086, "NaCl": 0.111,
	} {
		n := find(t, name).DeliquescenceLaw.Solubility
		if got := n[0] + room*(n[1]+room*n[2]); math.Abs(got-want) > 0.002 {
			t.Errorf("%s: %.4f mol per mol of water, want %.3f ± 0.002", name, got, want)
		}
	}
}

// ln DRH% = 723.7/T + 1.6954 (Stelson & Seinfeld 1982, from memory) and 3.54
// exp(853 K/T) % (CRC Handbook, read) are two other laws for NH4NO3: within the
// range of its own it agrees with the first to 0.8 %; the second is up to 2.3 %
// above at 5 °C, as it is above the first.
func TestAmmoniumNitrateAgainstOtherLaws(t *testing.T) {
	s := find(t, "NH4NO3")
	for _, T := range []float64{278.15, 288.15, 298.15, 303.15} {
		got, _ := s.DeliquescenceHumidity(T)
		if want := math.Exp(723.7/T + 1.6954); math.Abs(100*got-want) > 1 {
			t.Errorf("%g K: %.2f %%, Stelson & Seinfeld %.2f", T, 100*got, want)
		}
		if want := 3.54 * math.Exp(853/T); math.Abs(100*got-want) > 2.3 {
			t.Errorf("%g K: %.2f %%, CRC %.2f", T, 100*got, want)
		}
	}
}

func TestPhaseHumidities(t *testing.T) {
	for _, c := range []struct {
		name     string
		T        float64
		drh, erh float64 // NaN: not known
		notes    string
	}{
		{"NaCl", room, 0.75297, 0.445, ""},
		{"NaCl", 283.15, 0.75631, 0.445, "efflorescence-25c"},
		{"NaCl", 253.15, 0.76420, 0.445, "deliquescence-extrapolated efflorescence-25c"},
		{"AS", room, 0.79889, 0.35, "deliquescence-disputed"},
		{"H2SO4", 250, 0, 0, ""},
		{"letovicite", 283.15, 0.69, 0.35, "deliquescence-25c efflorescence-25c"},
		{"Na2SO4", 298, 0.842, 0.575, ""},
		{"NH4NO3", room, 0.61702, 0, ""},
		{"SOA", room, math.NaN(), math.NaN(), ""},
		{"soot", room, math.NaN(), math.NaN(), ""},
	} {
		s := find(t, c.name)
		drh, known := s.DeliquescenceHumidity(c.T)
		erh, crystallises := s.EfflorescenceHumidity(c.T)
		if known == math.IsNaN(c.drh) || known && math.Abs(drh-c.drh) > 2e-5 {
			t.Errorf("%s at %g K: DRH %g, %v, want %g", c.name, c.T, drh, known, c.drh)
		}
		if crystallises == math.IsNaN(c.erh) || crystallises && erh != c.erh {
			t.Errorf("%s: ERH %g, %v, want %g", c.name, erh, crystallises, c.erh)
		}
		if got := codes(s.PhaseNotes(c.T)); got != c.notes {
			t.Errorf("%s at %g K: notes %q, want %q", c.name, c.T, got, c.notes)
		}
	}
}

// No particle crystallises at the humidity where it deliquesces or above, and the
// two stay humidities from -40 to 50 °C.
func TestPhasesAreOrdered(t *testing.T) {
	for _, s := range Standard().All() {
		for T := 233.15; T < 324; T += 10 {
			drh, known := s.DeliquescenceHumidity(T)
			erh, crystallises := s.EfflorescenceHumidity(T)
			if known && !(drh >= 0 && drh <= 1) || known && crystallises && !(erh <= drh) {
				t.Errorf("%s at %g K: DRH %g, ERH %g", s.Key, T, drh, erh)
			}
		}
	}
}

func TestPhasesOf(t *testing.T) {
	for _, c := range []struct {
		name   string
		parts  []any
		uptake float64 // NaN: not known
		notes  string
	}{
		{"salt", []any{"NaCl", 1.}, 0.75297, ""},
		{"salt twice", []any{"NaCl", .5, "NaCl", .5}, 0.75297, ""},
		{"salt on soot", []any{"NaCl", .5, "soot", .5}, 0.75297, "efflorescence-pure"},
		{"eutonic pair", []any{"NaNO3", .5, "NaCl", .5}, 0.679, "mutual-deliquescence"},
		{"any pair", []any{"AS", .5, "NaCl", .5}, math.NaN(), "mutual-deliquescence-not-known"},
		{"organic", []any{"SOA", 1.}, math.NaN(), "deliquescence-not-known"},
		{"soot", []any{"soot", 1.}, math.NaN(), ""},
	} {
		p, notes := PhasesOf(recipe(t, KappaModel, c.parts...).Parts, room)
		if same := math.Abs(p.Uptake-c.uptake) < 1e-5 || math.IsNaN(p.Uptake) && math.IsNaN(c.uptake); !same || codes(notes) != c.notes {
			t.Errorf("%s: %+v with %q, want %g with %q", c.name, p, codes(notes), c.uptake, c.notes)
		}
	}
	_, notes := PhasesOf(recipe(t, KappaModel, "AS", .5, "NaCl", .5).Parts, room)
	want := "The deliquescence humidity of this mixture is not known; it lies below that of sodium chloride alone, 75.3 %."
	if notes[0].Text != want {
		t.Errorf("%q, want %q", notes[0].Text, want)
	}
}

func TestBranch(t *testing.T) {
	nan := math.NaN()
	salt, pair, none := Phases{0.75, 0.75, 0.45}, Phases{0.68, nan, nan}, Phases{nan, nan, nan}
	for _, c := range []struct {
		name    string
		phases  Phases
		aw      float64
		history History
		want    Branch
	}{
		{"wetted below deliquescence", salt, 0.7, Rising, CrystalBranch},
		{"wetted above", salt, 0.75, Rising, SolutionBranch},
		{"dried to hysteresis", salt, 0.5, Falling, SolutionBranch},
		{"dried below efflorescence", salt, 0.45, Falling, CrystalBranch},
		{"dried, never crystallises", Phases{0.6, 0.6, 0}, 0.01, Falling, SolutionBranch},
		{"acid wetted", Phases{0, 0, 0}, 0.01, Rising, SolutionBranch},
		{"pair below", pair, 0.6, Rising, CrystalBranch},
		{"pair above", pair, 0.7, Rising, PartlyDissolved},
		{"pair dried", pair, 0.7, Falling, BranchUnknown},
		{"nothing known", none, 0.7, Rising, BranchUnknown},
	} {
		if got := c.phases.Branch(c.aw, c.history); got != c.want {
			t.Errorf("%s: %v, want %v", c.name, got, c.want)
		}
	}
}
