package answer

import (
	"bytes"
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"testing"

	"dropcrest/koehler/kappa"
	"dropcrest/ui/scenario"
)

// The measurements of the demo station are invented. Behind them: κ 0.30 of
// activation and 0.25 of growth, a classifier 1 % too large and a counter 1.5 % too
// high at all points, and independent noise of the uncertainties that the file gives.
const (
	demoKappa, demoGrowthKappa         = 0.30, 0.25
	demoSizing, demoCounting           = 1.01, 1.015
	demoSizeNoise, demoSuperNoise      = 0.02, 0.03 // relative
	demoFactorNoise, demoHumidityNoise = 0.015, 0.006
)

// demoMeasurements writes them.
func demoMeasurements(t testing.TB) []byte {
	t.Helper()
	rng := rand.New(rand.NewPCG(2026, 317))
	noisy := func(x, u float64) float64 { return x * (1 + u*rng.NormFloat64()) }
	var b bytes.Buffer
	b.WriteString("# invented: the demo station, no real measurements\n" +
		"sample,dry_diameter_nm,dry_diameter_uncertainty_percent,dry_diameter_common_uncertainty_percent," +
		"supersaturation_percent,supersaturation_relative_uncertainty_percent,supersaturation_common_relative_uncertainty_percent," +
		"growth_factor,growth_factor_uncertainty,rh_percent,rh_absolute_uncertainty_percent\n")
	for i, s := range []float64{0.1, 0.15, 0.2, 0.3, 0.4, 0.6, 0.8, 1.0} {
		dry, err := kappa.DryDiameter(demoKappa, s/100, kappa.Convention{Temperature: 298.15})
		if err != nil {
			t.Fatal(err)
		}
		fmt.Fprintf(&b, "counter %d,%.2f,2,1,%.4f,3,1.5,,,,\n", i+1, noisy(dry.Diameter*demoSizing*1e9, demoSizeNoise), noisy(s*demoCounting, demoSuperNoise))
	}
	for i, dry := range []float64{60, 100, 150} {
		humidity := 0.9 + demoHumidityNoise*rng.NormFloat64()
		g, err := kappa.GrowthFactor(dry*1e-9, demoGrowthKappa, humidity, kappa.Convention{Temperature: 298.15})
		if err != nil {
			t.Fatal(err)
		}
		fmt.Fprintf(&b, "growth %d,%.2f,2,1,,,,%.3f,%.3f,90,%.1f\n", i+1, noisy(dry*demoSizing, demoSizeNoise), g+demoFactorNoise*rng.NormFloat64(),
			demoFactorNoise, 100*demoHumidityNoise)
	}
	return b.Bytes()
}

// The file of the demo is what the program above writes. To write it anew:
// DROPCREST_WRITE_DEMO=1 go test -run TestDemoPoints ./ui/answer
func TestDemoPoints(t *testing.T) { isInDemo(t, demoPoints, demoMeasurements(t)) }

// The truth behind the demo is recovered within twice the uncertainty that is
// given for it, both kinds on their own.
func TestDemoKappa(t *testing.T) {
	s := scenario.Default()
	s.PointsFile, s.Trials.Number = scenario.DemoData, 20000
	a, err := askKappa(context.Background(), Env{Demo: os.DirFS(stationFolder)}, s)
	if err != nil {
		t.Fatal(err)
	}
	f := a.Facts.(KappaFacts)
	if len(f.Points) != 11 || len(f.Means) != 2 || f.Mean != nil {
		t.Fatalf("%d points, %d means, one mean %v", len(f.Points), len(f.Means), f.Mean)
	}
	for i, want := range []float64{demoKappa, demoGrowthKappa} {
		m := f.Means[i]
		t.Logf("%s: κ %.4g ± %.2g, want %g, χ² %.3g with %d degrees of freedom", m.Method, m.Kappa, m.Standard, want, m.ChiSquare, m.Freedom)
		if off := math.Abs(float64(m.Kappa) - want); off > 2*float64(m.Standard) || float64(m.Standard) > 0.15*want || m.Probability < 0.01 {
			t.Errorf("%s: κ %v ± %v, probability %v, want %g", m.Method, m.Kappa, m.Standard, m.Probability, want)
		}
	}
}
