package answer

import (
	"context"
	"slices"
	"testing"

	"dropcrest/ui/scenario"
)

// Clauses fit a line, and their slots are inputs that count.
func TestKappaStatement(t *testing.T) {
	long := "dry-diameter=80nm±3%rel±2%rel common supersaturation=0.25%±5%rel±2%rel common"
	for name, s := range map[string]scenario.Scenario{
		"default":  scenario.Default(),
		"common":   points(t, []string{long}, "dry-size-is=mobility"),
		"growth":   points(t, []string{"dry-diameter=80nm±3%rel±2%rel common growth-factor=1.4±1.43%rel±1.01%rel common relative-humidity=90%±1.11%rel±1.11%rel common"}, "trials=10000000"),
		"spread":   points(t, []string{"dry-diameter=80nm growth-factor=1.4 relative-humidity=90%"}, "growth-factors=growth.csv"),
		"several":  points(t, []string{long, long}, "dry-size-is=mobility"),
		"linear":   points(t, []string{long}, "trials=0"),
		"mobility": points(t, []string{long, long}, "dry-size-is=mobility", "trials=0"),
	} {
		clausesServe(t, name, kappaQuestion(), s, usualBudget)
	}
}

// The picture has what a reader of it needs: lines with their κ, points with bars.
func TestKappaPicture(t *testing.T) {
	a, _ := implies(t, points(t, []string{"dry-diameter=60nm±3%rel supersaturation=0.40%±5%rel"}, "trials=0"))
	f := a.Figures[0]
	var says []string
	for _, l := range f.Lines {
		says = append(says, l.Says)
		for i := 1; i < len(l.Y); i++ {
			if !(l.X[i] > l.X[i-1] && l.Y[i] < l.Y[i-1] && l.Y[i] > 0) {
				t.Fatalf("%s does not fall with size at %g nm", l.Says, l.X[i])
			}
		}
	}
	if !slices.Equal(says, []string{"κ 0.01", "κ 0.03", "κ 0.1", "κ 0.3", "κ 1"}) || !f.X.Log || !f.Y.Log {
		t.Errorf("lines %q, logarithmic %v %v", says, f.X.Log, f.Y.Log)
	}
	p := f.Points[0]
	for what, pair := range map[string][2]float64{"x": {p.X, 60}, "low x": {p.XLow, 58.2}, "high x": {p.XHigh, 61.8}, "y": {p.Y, 0.4}, "low y": {p.YLow, 0.38}, "high y": {p.YHigh, 0.42}} {
		within(t, what, Number(pair[0]), pair[1], 1e-9)
	}
}

func TestKappaIsLive(t *testing.T) {
	q := kappaQuestion()
	s := scenario.Default()
	if !q.IsLive(s) {
		t.Error("the default is not answered at once")
	}
	s.Trials.Number = 1000000
	if q.IsLive(s) {
		t.Error("a million trials would be made within a frame")
	}
	s.Trials.Number, s.PointsFile = 0, "points.csv"
	if q.IsLive(s) {
		t.Error("a file would be read within a frame")
	}
}

// The question as the screen asks it at every key.
func BenchmarkKappa(b *testing.B) {
	for name, trials := range map[string]int{"100000 trials": 100000, "linear": 0} {
		s := scenario.Default()
		s.Trials.Number = float64(trials)
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := askKappa(context.Background(), Env{Workers: 2}, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
