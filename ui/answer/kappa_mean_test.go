package answer

import (
	"math"
	"slices"
	"strings"
	"testing"
)

// What temperature, tension and shape factor contribute is common to all points. κ
// goes with the Kelvin length cubed: 1 % of the tension is 3 % of κ, also of a mean.
func TestKappaOfUncertainWater(t *testing.T) {
	rows := []string{"dry-diameter=100nm±3%rel supersaturation=0.2%", "dry-diameter=110nm±3%rel supersaturation=0.18%"}
	_, f := implies(t, points(t, rows, "surface-tension=72mN/m", "surface-tension-uncertainty=0.72mN/m", "trials=0"))
	within(t, "tension in the mean", f.Linear.Common/f.Kappa, 0.03, 3e-4)
	_, f = implies(t, points(t, rows[:1], "surface-tension=72mN/m", "temperature-uncertainty=2.98K", "trials=20000"))
	within(t, "1 % of the temperature alone", f.Linear.Common/f.Kappa, 0.0277, 6e-4) // -3 of T and +0.23 of ρ_w
	within(t, "the same by Monte Carlo", f.MonteCarlo.Relative/f.Linear.Relative, 1, 0.03)
	_, f = implies(t, points(t, rows[:1], "dry-size-is=mobility", "shape-factor=1.08", "shape-factor-uncertainty=0.02", "trials=0"))
	if c := f.Contributions[1]; c.Quantity != "shape factor" || !c.Common || !(c.Signed > 0) {
		t.Errorf("contributions %+v, want the shape factor among them", f.Contributions)
	}
}

// Several points of one kind have a mean at the top of the facts; both kinds stand
// side by side and the top is null.
func TestKappaMeans(t *testing.T) {
	activation := []string{
		"dry-diameter=60nm±3%rel±2%rel common supersaturation=0.40%±5%rel",
		"dry-diameter=80nm±3%rel±2%rel common supersaturation=0.27%±5%rel",
		"dry-diameter=120nm±3%rel±2%rel common supersaturation=0.14%±5%rel",
	}
	growth := "dry-diameter=100nm±3%rel growth-factor=1.4±0.02 relative-humidity=90%±1%abs"

	a, f := implies(t, points(t, activation, "trials=20000"))
	if f.Mean == nil || len(f.Points) != 3 || len(f.Means) != 1 || f.Mean.Kappa != f.Kappa || f.Mean.Freedom != 2 {
		t.Fatalf("means %+v", f.Means)
	}
	if !(f.Mean.Linear.Standard < f.Points[0].Linear.Standard) || !(f.Mean.Linear.Common > 0.05*f.Kappa) {
		t.Errorf("u of the mean %v, common %v; 2 %% of size common to all is 6 %% of κ", f.Mean.Linear.Standard, f.Mean.Linear.Common)
	}
	sum, low, high := 0.0, math.Inf(1), 0.0
	for _, c := range f.Contributions {
		sum += float64(c.Share)
	}
	for _, p := range f.Points {
		low, high = math.Min(low, float64(p.Under25C)), math.Max(high, float64(p.Under25C))
	}
	within(t, "sum of shares", Number(sum), 1, 1e-12)
	if k := float64(f.Under25C); !(low < k && k < high) {
		t.Errorf("mean under the common convention %g is not between %g and %g", k, low, high)
	}
	if all := strings.Join(a.Finding, " "); !strings.Contains(all, "weighted mean of 3 points") || !strings.Contains(all, "χ²") {
		t.Errorf("finding %q", all)
	}

	a, f = implies(t, points(t, append(activation, growth), "trials=20000"))
	if f.Mean != nil || !math.IsNaN(float64(f.Kappa)) || len(f.Means) != 2 {
		t.Errorf("growth and activation are merged: %+v", f.KappaRow)
	}
	if all := strings.Join(a.Finding, " "); !strings.Contains(all, "From activation") || !strings.Contains(all, "From growth factors (1 point) κ is 0.223") || !slices.Contains(codes(a), "methods-not-merged") {
		t.Errorf("finding %q, notes %q", all, codes(a))
	}
	letters := map[rune]int{}
	for _, p := range a.Figures[0].Points {
		letters[p.Letter]++
	}
	if letters[0] != 3 || letters[growthLetter] != 1 {
		t.Errorf("points of the picture by letter: %v", letters)
	}
}

// A curve of κ that spreads lognormally by σ is wider by σ/3 in ln D (classic form;
// the exact slope at this size is within 1 %); the classifier's width is taken out in
// quadrature.
func TestKappaSpread(t *testing.T) {
	const row = "dry-diameter=100nm±3%rel supersaturation=0.2%±5%rel "
	a, f := implies(t, points(t, []string{row + "width=0.13 transfer-width=0.05 plateau=0.88"}, "trials=0"))
	s := f.Points[0].Spread
	if s == nil || s.Unresolved {
		t.Fatalf("spread %+v", s)
	}
	within(t, "width of κ", s.Width, 0.12, 1e-12)
	within(t, "spread of ln κ", s.LnKappa, 0.36, 4e-3)
	within(t, "inactive", s.Inactive, 0.12, 1e-12)
	if all := strings.Join(a.Finding, " "); !strings.Contains(all, "Between the particles κ spreads from") || !strings.Contains(all, "12 % of them never activate") {
		t.Errorf("finding %q", all)
	}
	a, f = implies(t, points(t, []string{row + "width=0.05 transfer-width=0.05"}, "trials=0"))
	if !f.Points[0].Spread.Unresolved || !strings.Contains(strings.Join(a.Finding, " "), "as narrow as the classifier's") {
		t.Errorf("spread %+v, finding %q", f.Points[0].Spread, a.Finding)
	}
	if _, f = implies(t, points(t, []string{row}, "trials=0")); f.Points[0].Spread != nil {
		t.Errorf("a spread from nowhere: %+v", f.Points[0].Spread)
	}
	fromFile, _, err := readPoints(opening("d50_nm,ss_percent,width,transfer_width,plateau\n100,0.2,0.13,0.05,0.88\n100,0.2,,,\n"), fromFile())
	if err != nil || fromFile[0].Width != 0.13 || fromFile[0].TransferWidth != 0.05 || fromFile[0].Plateau != 0.88 || fromFile[1].Plateau != 1 {
		t.Errorf("from a file: %+v, error %v", fromFile, err)
	}
}
