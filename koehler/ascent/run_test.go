package ascent

import (
	"context"
	"errors"
	"math"
	"strings"
	"testing"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
)

func TestBadInput(t *testing.T) {
	nan := math.NaN()
	for name, c := range map[string]struct {
		change func(*Parcel, *Options)
		says   string
	}{
		"cold":            {func(p *Parcel, _ *Options) { p.Temperature = 150 }, "temperature 150"},
		"no temperature":  {func(p *Parcel, _ *Options) { p.Temperature = nan }, "temperature"},
		"vacuum":          {func(p *Parcel, _ *Options) { p.Pressure = 1000 }, "pressure"},
		"humidity 95":     {func(p *Parcel, _ *Options) { p.Humidity = 95 }, "start humidity"},
		"downdraft":       {func(p *Parcel, _ *Options) { p.Updraft = -1 }, "updraft"},
		"accommodation":   {func(_ *Parcel, o *Options) { o.MassAccommodation = 2 }, "mass accommodation"},
		"thermal":         {func(_ *Parcel, o *Options) { o.ThermalAccommodation = -1 }, "thermal accommodation"},
		"tolerance":       {func(_ *Parcel, o *Options) { o.Tolerance = 1 }, "tolerance"},
		"bins":            {func(_ *Parcel, o *Options) { o.Bins = -1 }, "bins"},
		"height":          {func(_ *Parcel, o *Options) { o.Height = -5 }, "height"},
		"transition":      {func(_ *Parcel, o *Options) { o.Transition = 9 }, "transition"},
		"one profile row": {func(_ *Parcel, o *Options) { o.ProfileRows = 1 }, "profile rows"},
		"probes":          {func(_ *Parcel, o *Options) { o.Probes = -1 }, "probes"},
		"tracer's group":  {func(_ *Parcel, o *Options) { o.Follow = []Tracer{{7, 1e-7}} }, "group of followed size"},
		"tracer's size":   {func(_ *Parcel, o *Options) { o.Follow = []Tracer{{1, -1}} }, "followed dry diameter"},
		"inert tracer":    {func(p *Parcel, o *Options) { p.Population[1].Kappa = 0; o.Follow = []Tracer{{1, 1e-7}} }, "group 2"},
		"kappa":           {func(p *Parcel, _ *Options) { p.Population[1].Kappa = -1 }, "group 2: kappa"},
		"share":           {func(p *Parcel, _ *Options) { p.Population[0].Share = -1 }, "group 1: share"},
		"factor":          {func(p *Parcel, _ *Options) { p.Population[0].TensionFactor = nan }, "group 1: factor of the surface tension"},
		"limits":          {func(p *Parcel, _ *Options) { p.Population[0].From = 1e-3 }, "group 1: lower limit"},
		"mode": {func(p *Parcel, _ *Options) {
			p.Population[0].Sizes = aerosol.Mode{Concentration: 1, Median: 1e-7, GSD: 1}
		}, "group 1: gsd"},
		"no sizes":          {func(p *Parcel, _ *Options) { p.Population[0].Sizes = nil }, "group 1"},
		"vapour's own term": {func(p *Parcel, _ *Options) { p.Population[0].Matter = &koehler.Particle{Kelvin: koehler.PureVapour} }, "group 1"},
	} {
		p, o := continental(), Options{Bins: 5}
		c.change(&p, &o)
		_, err := Run(context.Background(), p, o)
		if !errors.Is(err, ErrInput) || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestStopped(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	calls := 0
	_, err := Run(ctx, continental(), Options{Progress: func(height, last float64) {
		if calls++; height > 0 && last == 300 {
			cancel()
		}
	}})
	var stopped *StoppedError
	if !errors.Is(err, context.Canceled) || !errors.As(err, &stopped) {
		t.Fatalf("cancelled: %v", err)
	}
	if s := stopped.State; !(s.Height > 0 && s.Height < 300) || stopped.Steps == 0 || calls != 1 || !strings.Contains(err.Error(), "stopped at") {
		t.Errorf("stopped at %+v after %d steps and %d calls: %v", s, stopped.Steps, calls, err)
	}
	p := continental()
	p.Temperature, p.Updraft = 210, 10
	_, err = Run(context.Background(), p, Options{Height: 3000, Bins: 20})
	if !errors.Is(err, ErrCold) || !errors.As(err, &stopped) || !(stopped.State.Temperature > 200) {
		t.Errorf("cold: %v", err)
	}
}

// Matter of constant κ comes out as κ itself.
func TestMatterOfKappa(t *testing.T) {
	p := continental()
	o := Options{Bins: 60, Tolerance: 1e-7, ProfileRows: 5, Sizes: true, Probes: 4, Follow: []Tracer{{1, 5e-8}, {0, 2e-7}}}
	want := mustRun(t, p, o)
	for i := range p.Population {
		p.Population[i].Matter = &koehler.Particle{Solution: solutes.Kappa(p.Population[i].Kappa)}
	}
	got := mustRun(t, p, o)
	near(t, "peak", got.Peak.Supersaturation, want.Peak.Supersaturation, 1e-8)
	// crests of Matter are those of its own temperature's density of water
	near(t, "droplets", got.Droplets, want.Droplets, 1e-4)
	near(t, "grown", got.Grown, want.Grown, 1e-8)
	near(t, "liquid", got.End.LiquidWater, want.End.LiquidWater, 1e-8)
	for i := range got.Drops {
		near(t, "drop", got.Drops[i].WetDiameter, want.Drops[i].WetDiameter, 1e-6)
		near(t, "critical", got.Drops[i].CriticalDiameter, want.Drops[i].CriticalDiameter, 1e-4)
	}
	for i := range got.Profile {
		for k := range o.Follow {
			near(t, "followed", got.Profile[i].Followed[k], want.Profile[i].Followed[k], 1e-6)
		}
	}
}

// Particles of every smooth kind rise, and differ from what they resemble as their
// crests do.
func TestOtherMatter(t *testing.T) {
	dissolve := func(name string, tension solutes.TensionRule) *koehler.Particle {
		substance, ok := solutes.Standard().Find(name)
		if !ok {
			t.Fatalf("no %s", name)
		}
		d, _, err := solutes.Dissolve(solutes.Recipe{Parts: []solutes.Part{{Substance: substance, Volume: 1}},
			Model: solutes.IonInteraction, TensionRule: tension, DensityRule: solutes.Measured, Temperature: 283.15})
		if err != nil {
			t.Fatal(err)
		}
		return &koehler.Particle{Solution: d.Solution, Tension: d.Tension, Swelling: d.Swelling}
	}
	organic := koehler.Surfactant{Share: 0.5, Density: 1100, MolarMass: 0.3, GammaMax: 3e-6, K: 20, Partitioning: true}
	active, err := organic.Particle(1e-7, 283.15, koehler.Salt{Share: 0.5, Kappa: 0.61})
	if err != nil {
		t.Fatal(err)
	}
	dust, err := koehler.Adsorption{A: 2.25, B: 1.2, SolubleShare: 0.1, Kappa: 0.5}.Particle(1e-7, 283.15)
	if err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct {
		matter *koehler.Particle
		like   float64 // κ
		tol    float64 // of the peak
	}{
		"ammonium sulfate":           {dissolve("ammonium sulfate", solutes.PureWater), 0.61, 0.05},
		"sodium chloride, tension":   {dissolve("sodium chloride", solutes.SolutionRule), 1.28, 0.05},
		"organic at the surface":     {&active, 0.305, 0.2},
		"dust that adsorbs":          {&dust, 0.05, 0.9},
		"ammonium sulfate as kappa":  {&koehler.Particle{Solution: solutes.Kappa(0.61), Tension: solutes.ConstantTension(atmos.SurfaceTension(283.15))}, 0.61, 1e-6},
		"compressible drop of kappa": {&koehler.Particle{Solution: solutes.Kappa(0.61), Kelvin: koehler.Compressible}, 0.61, 1e-3},
	} {
		p := Parcel{Temperature: 283.15, Pressure: 90000, Updraft: 0.5, Population: []Group{
			{Sizes: aerosol.Mode{Concentration: 600e6, Median: 90e-9, GSD: 1.6}, Kappa: c.like}}}
		o := Options{Bins: 40, Tolerance: 1e-6}
		plain := mustRun(t, p, o)
		p.Population[0].Matter = c.matter
		got := mustRun(t, p, o)
		near(t, name+": peak", got.Peak.Supersaturation, plain.Peak.Supersaturation, c.tol)
		if got.Steps > 3*plain.Steps {
			t.Errorf("%s: %d steps, %d of kappa", name, got.Steps, plain.Steps)
		}
		// the number is that of the population's own spectrum at the peak
		matter := c.matter.Sized(1e-7)
		matter.Temperature = got.Peak.Temperature
		if constant, ok := matter.Tension.(solutes.ConstantTension); ok && float64(constant) == atmos.SurfaceTension(283.15) {
			matter.Tension = nil
		}
		want, err := spectrum.Population{{Sizes: p.Population[0].Sizes, Share: 1, Of: &spectrum.Matter{Particle: matter}}}.Count(got.Peak.Supersaturation)
		if err != nil {
			t.Fatal(err)
		}
		near(t, name+": droplets", got.Droplets, want, 1e-4)
	}
	limited, err := solutes.NewLimited([]solutes.LimitedPart{{Volume: 1, Kappa: 0.2, Solubility: 0.01}})
	if err != nil {
		t.Fatal(err)
	}
	p := continental()
	p.Population[0].Matter = &koehler.Particle{Solution: limited}
	if _, err := Run(context.Background(), p, Options{}); !errors.Is(err, ErrInput) || !strings.Contains(err.Error(), "smooth") {
		t.Errorf("limited solubility: %v", err)
	}
}

// anySizes hides what a distribution is.
type anySizes struct{ spectrum.Sizes }

// Groups that are the same together give the same: modes as one group or as two, a
// share twice, bins of a mode.
func TestSamePopulations(t *testing.T) {
	p := continental()
	for i := range p.Population {
		p.Population[i].Kappa = 0.3
	}
	o := Options{Bins: 400, Tolerance: 1e-6}
	want := mustRun(t, p, o)
	a, b := p.Population[0].Sizes.(aerosol.Mode), p.Population[1].Sizes.(aerosol.Mode)
	edges := make([]float64, 301)
	for i := range edges {
		edges[i] = 5e-9 * math.Pow(200, float64(i)/300)
	}
	grid, err := aerosol.NewGrid(edges)
	if err != nil {
		t.Fatal(err)
	}
	table, err := aerosol.NewTable([]float64{1e-8, 1e-6}, []float64{0.3, 0.3})
	if err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct {
		population []Group
		tol        float64
	}{
		"modes in one":  {[]Group{{Sizes: aerosol.Modes{a, b}, Kappa: 0.3}}, 1e-4},
		"unknown kind":  {[]Group{{Sizes: anySizes{aerosol.Modes{a, b}}, Kappa: 0.3}}, 1e-4},
		"two halves":    {[]Group{{Sizes: aerosol.Modes{a, b}, Kappa: 0.3, Share: 0.5}, {Sizes: aerosol.Modes{a, b}, Share: 0.5, KappaBySize: table}}, 1e-4},
		"measured bins": {[]Group{{Sizes: aerosol.Modes{a, b}.Bins(grid), Kappa: 0.3}}, 1e-3},
	} {
		p.Population = c.population
		got := mustRun(t, p, o)
		near(t, name+": peak", got.Peak.Supersaturation, want.Peak.Supersaturation, c.tol)
		near(t, name+": droplets", got.Droplets, want.Droplets, c.tol)
		s, err := Sensitivities(context.Background(), 0, p, Options{Bins: 60})
		if err != nil || !(s.Number > 0.5 && s.Number < 1) || (s.Size > 0) != (name != "two halves" && name != "unknown kind") {
			t.Errorf("%s: sensitivities %+v, %v", name, s, err)
		}
	}
}

func TestResult(t *testing.T) {
	p := continental()
	p.Population = append(p.Population, Group{Sizes: aerosol.Mode{Concentration: 50e6, Median: 80e-9, GSD: 1.8}})
	o := Options{ProfileRows: 13, Sizes: true, Follow: []Tracer{{1, 30e-9}, {1, 200e-9}}, Probes: 8}
	got := mustRun(t, p, o)
	near(t, "droplets at the peak", got.DropletsAtPeak, got.Droplets*dryDensity(got.Peak)/dryDensity(got.Profile[0].State), 1e-12)
	near(t, "droplets at STP", got.DropletsSTP, got.Droplets*101325*283.15/(90000*273.15), 1e-12)
	first, last := got.Profile[0], got.Profile[len(got.Profile)-1]
	if first.Height != 0 || last.State != got.End || len(got.Profile) != 13 {
		t.Errorf("profile from %+v to %+v", first, last)
	}
	if !(last.Followed[0] < 1e-6 && last.Followed[1] > 3e-6) {
		t.Errorf("30 nm and 200 nm end at radii %g", last.Followed)
	}
	if !(last.Droplets > 0.5*got.Grown && last.MeanRadius > 3e-6 && last.SpreadRadius < last.MeanRadius) {
		t.Errorf("last row %+v", last)
	}
	if a, b := got.Tracers[0], got.Tracers[1]; a.Grown || !b.Grown || !(a.CriticalRadius < b.CriticalRadius) {
		t.Errorf("followed: %+v", got.Tracers)
	}
	number := 0.0
	for _, d := range got.Drops {
		number += d.Number
	}
	near(t, "number of the drops", number, got.Number-got.ByGroup[2].Number, 1e-9)
	if len(got.Notes) != 1 || got.Notes[0].Code != "stays-dry" {
		t.Errorf("notes %v", got.Notes)
	}
	// soot of 80 nm has its crest at 2.7 %: none
	if g := got.ByGroup[2]; g.Droplets > 0.01*g.Number || g.Grown != 0 {
		t.Errorf("soot: %+v", g)
	}
}

// Any humidity up to 1 makes a start: the peak falls a little as it rises, as large
// particles are larger from the beginning.
func TestStartHumidity(t *testing.T) {
	last := math.Inf(1)
	for _, rh := range []float64{0.2, 0.6, 0.9, 0.99, 0.9999, 1} {
		p := continental()
		p.Humidity = rh
		got := mustRun(t, p, Options{Height: 3000, StopAtPeak: true, Bins: 100})
		near(t, "start", got.Number, 1500e6, 1e-3)
		if s := got.Peak.Supersaturation; !(s < last*1.001 && s > 0.0022) || math.Abs(got.EnergyResidual) > 1e-4 {
			t.Errorf("start at %g: peak %g after %g, energy %g", rh, s, last, got.EnergyResidual)
		} else {
			last = s
		}
	}
}

// κ that falls with size so steeply that wider particles activate later.
func TestKappaBySize(t *testing.T) {
	table, err := aerosol.NewTable([]float64{30e-9, 60e-9, 90e-9, 200e-9}, []float64{0.6, 0.6, 0.05, 0.05})
	if err != nil {
		t.Fatal(err)
	}
	mode := aerosol.Mode{Concentration: 800e6, Median: 60e-9, GSD: 1.6}
	p := Parcel{Temperature: 283.15, Pressure: 90000, Updraft: 1, Population: []Group{{Sizes: mode, KappaBySize: table}}}
	got := mustRun(t, p, Options{})
	k, err := spectrum.NewKappaTable([]float64{30e-9, 60e-9, 90e-9, 200e-9}, []float64{0.6, 0.6, 0.05, 0.05},
		(&cohort{Group: Group{TensionFactor: 1}}).kelvinLength(got.Peak.Temperature, atmos.WaterDensity(283.15)))
	if err != nil {
		t.Fatal(err)
	}
	want, err := spectrum.Population{{Sizes: mode, Share: 1, Of: k}}.Count(got.Peak.Supersaturation)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "droplets", got.Droplets, want, 2e-3)
}
