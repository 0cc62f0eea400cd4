package ascent

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/internal/computed"
)

// Without particles T falls as g/c_p, p as a power of T, and S follows from both.
func TestNoAerosol(t *testing.T) {
	p := Parcel{Temperature: 283.15, Pressure: 90000, Humidity: 0.95, Updraft: 1.3}
	got := mustRun(t, p, Options{Height: 500, Tolerance: 1e-7})
	T := p.Temperature - gravity*500/dryAirHeat
	e := p.Humidity * atmos.VapourPressure(p.Temperature)
	vapour := massRatio * e / (p.Pressure - e)
	warmth := virtual(1, vapour)
	pressure := p.Pressure * math.Pow(T/p.Temperature, dryAirHeat/(dryAirGas*warmth))
	S := vapour * pressure / ((massRatio + vapour) * atmos.VapourPressure(T))
	near(t, "T", got.End.Temperature, T, 1e-12)
	near(t, "p", got.End.Pressure, pressure, 1e-9)
	near(t, "S", 1+got.End.Supersaturation, S, 1e-8)
	if got.HasPeak || got.Droplets != 0 || len(got.Notes) == 0 {
		t.Errorf("peak %v, droplets %g, notes %v", got.HasPeak, got.Droplets, got.Notes)
	}
	// near saturation the rate is that of the closed forms
	a := closedAirAt(T, pressure)
	c := climateAt(T, pressure, vapour, 1000, kinetics{Continuum, 1, 1})
	q := point{T: T, p: pressure, climate: c}
	q.dT, q.dp = -gravity/dryAirHeat, -gravity*pressure/(dryAirGas*virtual(T, vapour))
	near(t, "dS/dz", q.rising()/c.S, a.cooling, 1e-2) // virtual temperature left out there
}

// After the peak S comes to where condensation takes up the cooling (Squires 1952):
//
//	s = α w/(4π ρ_w γ G N r̄), and the mean A/r of the drops above it
func TestQuasiSteady(t *testing.T) {
	p := Parcel{Temperature: 288.15, Pressure: 90000, Updraft: 1, Population: []Group{
		{Sizes: aerosol.Mode{Concentration: 200e6, Median: 150e-9, GSD: 1.3}, Kappa: 0.6}}}
	got := mustRun(t, p, Options{Height: 600, Transition: Continuum, ProfileRows: 2, Tolerance: 1e-7})
	end := got.Profile[1]
	a := closedAirAt(end.Temperature, end.Pressure)
	n := end.Droplets * dryDensity(end.State) / dryDensity(got.Profile[0].State)
	s := a.cooling*p.Updraft/(4*math.Pi*a.rho*a.depletion*a.growth*n*end.MeanRadius) + a.kelvin/2/end.MeanRadius
	near(t, "supersaturation", end.Supersaturation, s, 0.015) // α without virtual temperature: 0.7 %
}

// The peak falls with the number of particles and rises with the updraft; the droplets
// rise with both.
func TestPeakByNumberAndUpdraft(t *testing.T) {
	at := func(number, w float64) Result {
		p := continental()
		p.Updraft = w
		scaleNumber(&p, number)
		return mustRun(t, p, Options{Bins: 60, Height: 3000, StopAtPeak: true})
	}
	for _, w := range []float64{0.1, 1, 5} {
		for _, n := range []float64{0.3, 1, 4} {
			a, more, faster := at(n, w), at(1.5*n, w), at(n, 1.5*w)
			if !(more.Peak.Supersaturation < a.Peak.Supersaturation && a.Peak.Supersaturation < faster.Peak.Supersaturation) {
				t.Errorf("N x %g, %g m/s: peaks %g, %g with more, %g with faster", n, w,
					a.Peak.Supersaturation, more.Peak.Supersaturation, faster.Peak.Supersaturation)
			}
			if !(a.Droplets < more.Droplets && a.Droplets < faster.Droplets) {
				t.Errorf("N x %g, %g m/s: droplets %g, %g, %g", n, w, a.Droplets, more.Droplets, faster.Droplets)
			}
		}
	}
}

// powerLaw is a population whose spectrum is c s^k, from 5 nm to 2 µm of κ 0.6.
func powerLaw(t *testing.T, c, k, T float64) Group {
	A := koehler.KelvinLength(atmos.SurfaceTension(T), T)
	edges, counts := []float64{5e-9}, []float64(nil)
	upTo := func(d float64) float64 { return c * math.Pow(koehler.SolveKappa(d, A, 0.6).Supersaturation, k) }
	for i := range 300 {
		edges = append(edges, 5e-9*math.Pow(400, float64(i+1)/300))
		counts = append(counts, upTo(edges[i])-upTo(edges[i+1]))
	}
	grid, err := aerosol.NewGrid(edges)
	if err != nil {
		t.Fatal(err)
	}
	bins, err := aerosol.NewBins(grid, counts, aerosol.Counts)
	if err != nil {
		t.Fatal(err)
	}
	return Group{Sizes: bins, Kappa: 0.6}
}

// Twomey's peak bounds the ascent from above for a true power law, where both use the
// same growth: he lets drops grow from their activation on only. For other spectra it
// does not, as the power law that touches them lies above them.
func TestTwomeyBounds(t *testing.T) {
	for _, w := range []float64{0.2, 1, 5} {
		for _, k := range []float64{0.4, 0.8} {
			c := 300e6 * math.Pow(0.01, -k)
			p := Parcel{Temperature: 283.15, Pressure: 90000, Updraft: w, Population: []Group{powerLaw(t, c, k, 283.15)}}
			got := mustRun(t, p, Options{Transition: Continuum, Height: 1000, StopAtPeak: true}).Peak.Supersaturation
			bound := TwomeyPower(c, k, p.Temperature, p.Pressure, w)
			if !(got < bound && got > 0.6*bound) {
				t.Errorf("w %g, k %g: ascent %g, Twomey %g", w, k, got, bound)
			}
		}
	}
}

// Bins to infinity: of second order.
func TestBinsAreOfSecondOrder(t *testing.T) {
	p := continental()
	at := func(bins int) float64 {
		return mustRun(t, p, Options{Bins: bins, Tolerance: 1e-8, StopAtPeak: true}).Peak.Supersaturation
	}
	best := at(1600)
	coarse, fine := math.Abs(at(100)/best-1), math.Abs(at(400)/best-1)
	if order := math.Log(coarse/fine) / math.Log(4); !(order > 1.6 && order < 2.6) {
		t.Errorf("order %.2f (errors %.3g at 100 bins, %.3g at 400)", order, coarse, fine)
	}
}

// stress runs all combinations and fails for each that has an error or breaks a law.
func stress(t *testing.T, o Options, parcels ...Parcel) {
	n := 0
	for _, base := range parcels {
		for _, w := range []float64{0.01, 0.03, 0.1, 0.5, 2, 5, 10} {
			for _, number := range []float64{0.05, 0.2, 1, 5, 10, 20} {
				n++
				p := base
				p.Population = append([]Group(nil), base.Population...)
				p.Updraft = w
				scaleNumber(&p, number)
				got := mustRun(t, p, o)
				// the most coarse sea salt in the weakest updraft takes up all there is
				if !got.HasPeak && !(w < 0.05 && number > 5 && got.End.Supersaturation < 1e-4) || math.Abs(got.EnergyResidual) > 1e-4 || math.Abs(got.WaterResidual) > 1e-14 ||
					!(got.Droplets >= 0 && got.Droplets <= got.Number) || !(got.Grown <= got.Number) {
					t.Errorf("w %g, N x %g: peak %v at %g m, droplets %g, grown %g of %g, energy %g, water %g", w, number, got.HasPeak,
						got.Peak.Height, got.Droplets, got.Grown, got.Number, got.EnergyResidual, got.WaterResidual)
				}
			}
		}
	}
	if n < 35 {
		t.Errorf("%d combinations", n)
	}
}

func TestStress(t *testing.T) { stress(t, Options{Bins: 40, Height: 1000}, continental()) }

func TestLongStress(t *testing.T) {
	needLong(t)
	var all []Parcel
	for _, c := range computed.Read[computedCase](t, "parcel.json") {
		all = append(all, c.Input.parcel())
	}
	for _, o := range []Options{{}, {Transition: FluxMatching, MassAccommodation: 0.04}, {Transition: Continuum, MoistHeat: true}, {Bins: 13}} {
		o.Height = 1500
		stress(t, o, all...)
	}
}

// anyParcel is an ascent drawn at random from what may be asked.
func anyParcel(r *rand.Rand) (Parcel, Options) {
	between := func(lo, hi float64) float64 { return lo * math.Pow(hi/lo, r.Float64()) }
	p := Parcel{Temperature: 240 + 65*r.Float64(), Pressure: 40000 + 62000*r.Float64(), Humidity: 0.5 + 0.5*r.Float64(), Updraft: between(0.005, 20)}
	for range 1 + r.IntN(3) {
		p.Population = append(p.Population, Group{Kappa: between(0.001, 1.5),
			Sizes: aerosol.Mode{Concentration: between(1e6, 5e10), Median: between(8e-9, 1.5e-6), GSD: 1.1 + 1.6*r.Float64()}})
	}
	o := Options{Bins: 5 + r.IntN(80), MassAccommodation: between(0.01, 1), Transition: Transition(r.IntN(3)), MoistHeat: r.IntN(2) == 0, Height: 1200}
	return p, o
}

func randomAscents(t *testing.T, n int) {
	r := rand.New(rand.NewPCG(20261201, 6))
	for i := range n {
		p, o := anyParcel(r)
		got, err := Run(context.Background(), p, o)
		if err != nil || math.Abs(got.EnergyResidual) > 1e-4 || !(got.Droplets >= 0 && got.Droplets <= got.Number*(1+1e-12)) || got.Steps > 3000 {
			t.Errorf("%d: %v, energy %g, droplets %g of %g, %d steps: %+v %+v", i, err, got.EnergyResidual, got.Droplets, got.Number, got.Steps, p, o)
		}
	}
}

func TestRandomAscents(t *testing.T) { randomAscents(t, 60) }

func TestLongRandomAscents(t *testing.T) {
	needLong(t)
	randomAscents(t, 5000)
}
