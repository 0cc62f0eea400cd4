package koehler

import (
	"math"
	"testing"

	"dropcrest/solutes"
)

// sulfate is ammonium sulfate by ion interaction, as the catalogue has it.
func sulfate(t testing.TB, T float64) solutes.Solution {
	t.Helper()
	salt, ok := solutes.Standard().Find("ammonium sulfate")
	if !ok {
		t.Fatal("no ammonium sulfate")
	}
	made, _, err := solutes.Dissolve(solutes.Recipe{
		Parts: []solutes.Part{{Substance: salt, Volume: 1}}, Model: solutes.IonInteraction, Temperature: T,
	})
	if err != nil {
		t.Fatal(err)
	}
	return made.Solution
}

// Without an organic the particle is the salt alone; with one that is neither
// surface-active nor hygroscopic to speak of, the salt is diluted by volume.
func TestSurfaceActiveWithSulfate(t *testing.T) {
	const dry, T = 60e-9, 298.15
	salt := sulfate(t, T)
	alone, err := Particle{DryDiameter: dry, Temperature: T, Solution: salt}.Crest()
	if err != nil {
		t.Fatal(err)
	}
	none := strong
	none.Share = 0
	crest, place, err := mustSurface(t, dry, T, none, Salt{Share: 1, Solution: salt}).Crest()
	if err != nil || place != Only || apart(crest.Supersaturation, alone.Supersaturation) > 1e-11 || apart(crest.Water, alone.Water) > 1e-7 {
		t.Errorf("no organic: %+v %v, want %+v", crest, err, alone)
	}
	heavy := Surfactant{Share: 0.5, Density: 1000, MolarMass: 1e9}
	half, _, err := mustSurface(t, dry, T, heavy, Salt{Share: 0.5, Solution: salt}).Crest()
	if err != nil {
		t.Fatal(err)
	}
	mixture, err := solutes.NewMixture([]solutes.MixturePart{{Volume: 0.5, Solution: salt}})
	if err != nil {
		t.Fatal(err)
	}
	want, err := Particle{DryDiameter: dry, Temperature: T, Solution: mixture}.Crest()
	if err != nil || apart(half.Supersaturation, want.Supersaturation) > 1e-9 {
		t.Errorf("half an insoluble organic: %+v, want %+v", half, want)
	}
}

// Slopes stay exact through the mixing rule, and the range is the salt's.
func TestSurfaceActiveSulfateSlopes(t *testing.T) {
	s := mustSurface(t, 60e-9, 298.15, strong, Salt{Share: 0.5, Solution: sulfate(t, 298.15)})
	least := s.LeastWater()
	if !(least > 0) {
		t.Fatalf("least water %v, want that of the salt", least)
	}
	const h = 1e-5
	for y := math.Log(least) + 2*h; y < 18; y += 0.31 {
		got := s.At(math.Exp(y))
		up, down := s.At(math.Exp(y+h)), s.At(math.Exp(y-h))
		fd := (up.LnSaturation - down.LnSaturation) / (2 * h)
		// differences of ln S lose about 1e-16/h = 1e-11
		if math.Abs(fd-got.Slope) > 1e-8*got.activitySlope+1e-10 {
			t.Errorf("ln u = %v: slope %v, difference %v", y, got.Slope, fd)
		}
		if got.activitySlope <= 0 {
			t.Errorf("ln u = %v: a_w does not rise", y)
		}
	}
}

func BenchmarkSurfaceCrestSulfate(b *testing.B) {
	s := mustSurface(b, 60e-9, 298.15, strong, Salt{Share: 0.5, Solution: sulfate(b, 298.15)})
	b.ReportAllocs()
	for b.Loop() {
		if _, _, err := s.Crest(); err != nil {
			b.Fatal(err)
		}
	}
}
