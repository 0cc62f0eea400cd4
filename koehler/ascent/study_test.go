package ascent

import (
	"context"
	"errors"
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
)

// For N going with w^(3k/(2k+4)), Twomey's, the characteristic updraft of a half-Gaussian
// is 0.621 σ at k = 0.5 (Morales & Nenes 2010 for the concept; computed for the project).
func TestHalfGaussian(t *testing.T) {
	power := func(_ context.Context, w float64) (float64, error) { return 1e8 * math.Pow(w, 0.3), nil }
	for _, c := range []struct {
		name               string
		u                  Updrafts
		want, mean, tolOfW float64
	}{
		{"number", Updrafts{Spread: 0.7}, 0.621 * 0.7, 0.7 * math.Sqrt(2/math.Pi), 5e-3},
		// ∫w^1.3 exp(-w²/2)/∫w exp(-w²/2) = 2^0.15 Γ(1.15), to the power 1/0.3
		{"flux", Updrafts{Spread: 0.7, ByFlux: true}, 0.7 * math.Pow(math.Pow(2, 0.15)*math.Gamma(1.15), 1/0.3), 0.7 * math.Sqrt(math.Pi/2), 5e-3},
		{"far above 0", Updrafts{Mean: 2, Spread: 0.05}, 2, 2, 1e-3},
	} {
		got, err := c.u.Average(context.Background(), 2, power)
		if err != nil {
			t.Fatal(err)
		}
		near(t, c.name+": characteristic updraft", got.Characteristic, c.want, c.tolOfW)
		near(t, c.name+": mean updraft", got.MeanUpdraft, c.mean, 3e-5)
	}
	// the quadrature itself: E w^0.3 = σ^0.3 2^0.15 Γ(0.65)/√π
	got, err := Updrafts{Spread: 0.7}.Average(context.Background(), 0, power)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "mean number", got.Mean, 1e8*math.Pow(0.7, 0.3)*math.Pow(2, 0.15)*math.Gamma(0.65)/math.Sqrt(math.Pi), 1e-4)
}

func TestUpdraftsOfAParcel(t *testing.T) {
	p, o := continental(), Options{Bins: 40}
	got, err := Updrafts{Spread: 0.5}.Droplets(context.Background(), 0, p, o)
	if err != nil {
		t.Fatal(err)
	}
	p.Updraft, o.Height, o.StopAtPeak = got.Characteristic, 3000, true
	same := mustRun(t, p, o)
	near(t, "droplets at the characteristic updraft", same.Droplets, got.Mean, 1e-2)
	if !(got.Characteristic < got.MeanUpdraft) {
		t.Errorf("characteristic updraft %g, mean %g: droplets bend downwards with w", got.Characteristic, got.MeanUpdraft)
	}
	_, err = Updrafts{Spread: -1}.Droplets(context.Background(), 0, p, o)
	if !errors.Is(err, ErrInput) {
		t.Errorf("negative spread: %v", err)
	}
	if p.Pressure = 1; true {
		if _, err = (Updrafts{Spread: 1}).Droplets(context.Background(), 0, p, o); !errors.Is(err, ErrInput) {
			t.Errorf("pressure of 1 Pa: %v", err)
		}
	}
}

func TestSensitivities(t *testing.T) {
	p, o := continental(), Options{Bins: 60}
	got, err := Sensitivities(context.Background(), 0, p, o)
	if err != nil {
		t.Fatal(err)
	}
	for name, x := range map[string]float64{"number": got.Number, "updraft": got.Updraft, "kappa": got.Kappa, "size": got.Size} {
		if !(x > 0 && x < 1.5) {
			t.Errorf("%s: %g", name, x)
		}
	}
	// of Twomey's power law N_d ~ N^(2/(k+2)) w^(3k/(2k+4)): the first and two thirds of the
	// second add up to 1
	near(t, "number and updraft", got.Number+got.Updraft*2/3, 1, 0.03)
	// κ and size come by s_c ~ κ^(-1/2) D^(-3/2)
	if !(got.Size > 2*got.Kappa && got.Size < 5*got.Kappa) {
		t.Errorf("size %g, kappa %g", got.Size, got.Kappa)
	}
	wide := p
	wide.Updraft *= 1.2
	o.Height, o.StopAtPeak, o.Tolerance = 3000, true, 1e-6
	near(t, "updraft 20 % up", mustRun(t, wide, o).Droplets, got.Droplets*math.Pow(1.2, got.Updraft), 2e-2)
	p.Population[0].KappaBySize, _ = aerosol.NewTable([]float64{1e-8, 1e-6}, []float64{0.1, 0.4})
	if got, err = Sensitivities(context.Background(), 0, p, Options{Bins: 20}); err != nil || !math.IsNaN(got.Kappa) || !math.IsNaN(got.Size) || math.IsNaN(got.Number) {
		t.Errorf("kappa by size: %+v, %v", got, err)
	}
}

// Reutter et al. 2009, with the limits as published.
func TestRegimes(t *testing.T) {
	for _, c := range []struct {
		w, perCm3 float64
		want      Regime
	}{{2, 1000, AerosolLimited}, {0.5, 1000, Transitional}, {0.05, 1000, UpdraftLimited}, {1.01, 1000, AerosolLimited}, {0.99, 1000, Transitional}} {
		if got := RegimeOf(c.w, c.perCm3*1e6); got != c.want {
			t.Errorf("%g m/s, %g per cm3: %v, want %v", c.w, c.perCm3, got, c.want)
		}
	}
	// and the regimes mean what they say: κ 0.2, one mode of 120 nm, σ 1.5, as remembered
	at := func(w, n float64) Result {
		return mustRun(t, Parcel{Temperature: 285.2, Pressure: 95000, Updraft: w, Population: []Group{
			{Sizes: aerosol.Mode{Concentration: n, Median: 120e-9, GSD: 1.5}, Kappa: 0.2}}}, Options{Bins: 60, Height: 2000, StopAtPeak: true})
	}
	if r := at(10, 1000e6); !(r.Droplets > 0.9*r.Number && r.Peak.Supersaturation > 0.005) {
		t.Errorf("aerosol-limited: %g of %g at %g", r.Droplets, r.Number, r.Peak.Supersaturation)
	}
	if r := at(0.5, 20000e6); !(r.Droplets < 0.2*r.Number && r.Peak.Supersaturation < 0.002) {
		t.Errorf("updraft-limited: %g of %g at %g", r.Droplets, r.Number, r.Peak.Supersaturation)
	}
}
