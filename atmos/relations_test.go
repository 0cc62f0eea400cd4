package atmos

import (
	"math"
	"slices"
	"strings"
	"testing"

	"gonum.org/v1/gonum/floats/scalar"
)

func TestRelations(t *testing.T) {
	seen := map[string]bool{}
	for _, r := range Relations() {
		if r.Key == "" || r.Name == "" || r.Unit == "" || r.Quality == "" || r.Source == "" {
			t.Errorf("incomplete: %+v", r)
		}
		if seen[r.Key] {
			t.Errorf("%s is listed twice", r.Key)
		}
		seen[r.Key] = true
		if !(r.Temperature.Min < r.Temperature.Max) {
			t.Errorf("%s: range %v", r.Key, r.Temperature)
		}
		checkSmooth(t, r)
	}
}

// checkSmooth: positive and finite all over the range, without jumps. No
// property here changes by more than 30 % over 1/400 of its range, the vapour
// pressure at 123 K excepted, where ln e changes by 0.42 per kelvin; and
// surface tension falls to zero at the end of its range.
func checkSmooth(t *testing.T, r Relation) {
	t.Helper()
	last := math.NaN()
	sweep(r.Temperature, 400, func(T float64) {
		y := r.At(T, 9e4)
		atCritical := r.Key == "surface-tension" && T > 640
		if math.IsInf(y, 0) || !(y > 0) && !atCritical {
			t.Errorf("%s at %v K: %v", r.Key, T, y)
		}
		if change := math.Abs(math.Log(y / last)); change > 0.3 && !atCritical {
			t.Errorf("%s at %v K: jumps from %v to %v", r.Key, T, last, y)
		}
		last = y
	})
}

func TestWaterNotes(t *testing.T) {
	codes := func(T float64) string {
		var all []string
		for _, n := range WaterNotes(T) {
			if n.Input != "temperature" || n.Text == "" || strings.Contains(n.Text, "\n") {
				t.Errorf("at %v K: note %+v", T, n)
			}
			all = append(all, n.Code)
		}
		return strings.Join(all, " ")
	}
	const density, tension, vapour = "water-density-extrapolated", "surface-tension-extrapolated", "vapour-pressure-extrapolated"
	for _, c := range []struct {
		name string
		T    float64
		want string
	}{
		{"25 °C", 298.15, ""},
		{"-25 °C, the end of surface tension", 248.15, ""},
		{"-26 °C", 247.15, tension},
		{"-40 °C", 233.15, density + " " + tension},
		{"60 °C", 333.15, vapour},
		{"400 °C", 673.15, density + " " + tension + " " + vapour},
		{"NaN", math.NaN(), density + " " + tension + " " + vapour},
	} {
		if got := codes(c.T); got != c.want {
			t.Errorf("%s: got %q, want %q", c.name, got, c.want)
		}
	}
}

func TestNotesOf(t *testing.T) {
	for _, c := range []struct {
		key  string
		T    float64
		want string
	}{{"compressibility", 243.15, ""}, {"compressibility", 243.1, "compressibility-extrapolated"}, {"air-viscosity", 200, "air-viscosity-extrapolated"}, {"no such property", 1, ""}} {
		notes := NotesOf(c.key, c.T)
		if len(notes) > 1 || (len(notes) == 1) != (c.want != "") || len(notes) == 1 && notes[0].Code != c.want {
			t.Errorf("%s at %v K: %+v, want %q", c.key, c.T, notes, c.want)
		}
	}
}

func TestRangeContains(t *testing.T) {
	r := Range{1, 2}
	for x, want := range map[float64]bool{1: true, 2: true, 1.5: true, 0.99: false, 2.01: false, math.Inf(1): false} {
		if r.Contains(x) != want {
			t.Errorf("Contains(%v) = %v", x, !want)
		}
	}
	if r.Contains(math.NaN()) {
		t.Error("a range contains NaN")
	}
}

func TestConstants(t *testing.T) {
	all := Constants()
	var keys []string
	for _, c := range all {
		if c.Key == "" || c.Name == "" || c.Unit == "" || c.Source == "" || !(c.Value > 0) {
			t.Errorf("incomplete: %+v", c)
		}
		if slices.Contains(keys, c.Key) {
			t.Errorf("%s is listed twice", c.Key)
		}
		keys = append(keys, c.Key)
	}
	if !scalar.EqualWithinRel(Boltzmann*Avogadro, GasConstant, 1e-15) {
		t.Errorf("k N_A = %.17g, R = %.17g", Boltzmann*Avogadro, GasConstant)
	}
	all[0].Value = 0
	if Constants()[0].Value == 0 {
		t.Error("the table can be changed from outside")
	}
}
