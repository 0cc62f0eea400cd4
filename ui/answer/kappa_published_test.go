package answer

import (
	"math"
	"strings"
	"testing"

	"dropcrest/koehler"
	"dropcrest/koehler/kappa"
)

// A published κ under another convention: the crest that it was computed from is
// the one that the recomputed κ gives with the water of the question, and its dry
// size activates at the measured supersaturation.
func TestPublishedKappa(t *testing.T) {
	s := points(t, []string{"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel"},
		"published-kappa=0.3", "temperature=5C", "trials=0")
	a, f := implies(t, s)
	if f.Published == nil || len(f.Published.Points) != 1 {
		t.Fatalf("published %+v", f.Published)
	}
	r := f.Published.Points[0]
	here := conventionOf(s)
	crest := koehler.SolveKappa(60e-9, here.Kelvin(), float64(r.Recomputed)).Supersaturation
	within(t, "crest of the recomputed one", percentNumber(crest), float64(r.Supersaturation), 1e-9)
	within(t, "crest of the published one", r.Supersaturation, 100*koehler.SolveKappa(60e-9, kappa.At25C().Kelvin(), 0.3).Supersaturation, 1e-9)
	within(t, "crest of its dry size", Number(koehler.SolveKappa(float64(r.Dry), kappa.At25C().Kelvin(), 0.3).Supersaturation), 0.004, 1e-9)
	// for small supersaturations κ goes with (σ/T)³
	rule := 0.3 * math.Pow(here.SurfaceTension()/here.Temperature/(0.072/298.15), 3)
	within(t, "rule of thumb", r.Recomputed, rule, 0.01)
	if last := a.Finding[len(a.Finding)-1]; !strings.Contains(last, "The published 0.3 is ") || !strings.Contains(last, "activates from") {
		t.Errorf("the finding ends with %q", last)
	}
	if lines := a.Figures[0].Lines; lines[len(lines)-1].Says != "published 0.3" {
		t.Errorf("the last line is %q", lines[len(lines)-1].Says)
	}
}

// The growth factor of a published κ gives that κ back.
func TestPublishedKappaOfGrowth(t *testing.T) {
	_, f := implies(t, points(t, []string{"dry-diameter=100nm growth-factor=1.4 relative-humidity=90%"}, "published-kappa=0.3", "trials=0"))
	r := f.Published.Points[0]
	g, err := kappa.FromGrowth(100e-9, float64(r.Growth), 0.9, kappa.At25C())
	if err != nil {
		t.Fatal(err)
	}
	within(t, "κ of its growth factor", Number(g.Kappa), 0.3, 1e-9)
	if !math.IsNaN(float64(r.Dry)) || r.Problem != nil {
		t.Errorf("a growth factor activates: %+v", r)
	}
}

// Nothing of it stands where nothing is compared, and a κ without an answer says why.
func TestPublishedKappaAbsent(t *testing.T) {
	a, f := implies(t, points(t, []string{"dry-diameter=60nm supersaturation=0.40%"}, "trials=0"))
	if f.Published != nil || strings.Contains(strings.Join(a.Finding, " "), "published") || len(a.Figures[0].Lines) != len(isolines) {
		t.Errorf("published %+v, finding %q", f.Published, a.Finding)
	}
	s := points(t, []string{"dry-diameter=1nm supersaturation=10%"}, "published-kappa=0", "temperature=5C", "trials=0")
	if _, f := implies(t, s); f.Published.Points[0].Problem == nil && math.IsNaN(float64(f.Published.Points[0].Recomputed)) {
		t.Errorf("without a word: %+v", f.Published.Points[0])
	}
}

// As many trials as are needed: fewer than the most, and stable by the procedure.
func TestAdaptiveTrials(t *testing.T) {
	a, f := implies(t, points(t, []string{"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel"}, "trials=adaptive"))
	mc := f.Points[0].MonteCarlo
	if !f.Adaptive || mc == nil || mc.Stable == nil || !*mc.Stable || mc.Trials >= adaptiveTrials || f.Trials != mc.Trials || !(mc.Within > 0) {
		t.Fatalf("adaptive %v, %+v", f.Adaptive, mc)
	}
	within(t, "the fixed number gives the same", f.Relative, 0.138, 0.02) // 13.8 %: the published check of koehler/kappa
	if !strings.Contains(strings.Join(a.Why, " "), "until two digits") {
		t.Errorf("%q", a.Why)
	}
}
