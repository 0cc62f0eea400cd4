package answer

import (
	"context"
	"encoding/json"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/ascent"
	"dropcrest/ui/scenario"
)

// modesOfKappa are the two invented modes with κ of 0.3 and 0.5, few bins.
func modesOfKappa(t testing.TB, values ...string) scenario.Scenario {
	s := scene(t, append([]string{"population=modes", "ascent-bins=40"}, values...)...)
	return withRows(t, s, "mode", "N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3", "N=400/cm3 Dg=150nm gsd=1.6 kappa=0.5")
}

func setInput(t testing.TB, s *scenario.Scenario, key, text string) {
	t.Helper()
	in, ok := scenario.Find(s, scenario.Path(key))
	if !ok {
		t.Fatalf("no input %q", key)
	}
	if err := in.Set(text); err != nil {
		t.Fatal(err)
	}
}

func rises(t testing.TB, s scenario.Scenario) (Answer, AscentFacts) {
	t.Helper()
	env := stationEnv()
	env.Workers = 2
	a, err := askAscent(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	f, ok := a.Facts.(AscentFacts)
	if !ok {
		t.Fatalf("facts are %T", a.Facts)
	}
	return a, f
}

// direct is the ascent of modesOfKappa without a scenario.
func direct(t testing.TB, change func(*ascent.Parcel, *ascent.Options)) ascent.Result {
	t.Helper()
	p := ascent.Parcel{Temperature: 298.15, Pressure: 90000, Humidity: 0.95, Updraft: 0.5, Population: []ascent.Group{
		{Sizes: aerosol.Mode{Concentration: 850e6, Median: 45e-9, GSD: 1.6}, Kappa: 0.3},
		{Sizes: aerosol.Mode{Concentration: 400e6, Median: 150e-9, GSD: 1.6}, Kappa: 0.5}}}
	o := ascent.Options{Bins: 40}
	if change != nil {
		change(&p, &o)
	}
	r, err := ascent.Run(context.Background(), p, o)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// Every input reaches the ascent: the answer is that of the package asked directly.
func TestAscentIsWhatIsAsked(t *testing.T) {
	type change = func(*ascent.Parcel, *ascent.Options)
	toStart := aerosol.StandardAir().To(aerosol.Air{Temperature: 298.15, Pressure: 90000})
	for name, c := range map[string]struct {
		values []string
		change change
	}{
		"default":       {nil, nil},
		"updraft":       {[]string{"updraft=2m/s"}, func(p *ascent.Parcel, _ *ascent.Options) { p.Updraft = 2 }},
		"pressure":      {[]string{"pressure=700hPa"}, func(p *ascent.Parcel, _ *ascent.Options) { p.Pressure = 70000 }},
		"temperature":   {[]string{"temperature=5C"}, func(p *ascent.Parcel, _ *ascent.Options) { p.Temperature = 278.15 }},
		"humidity":      {[]string{"start-humidity=98%"}, func(p *ascent.Parcel, _ *ascent.Options) { p.Humidity = 0.98 }},
		"mass":          {[]string{"mass-accommodation=0.06"}, func(_ *ascent.Parcel, o *ascent.Options) { o.MassAccommodation = 0.06 }},
		"thermal":       {[]string{"thermal-accommodation=0.5"}, func(_ *ascent.Parcel, o *ascent.Options) { o.ThermalAccommodation = 0.5 }},
		"flux matching": {[]string{"transition=flux-matching"}, func(_ *ascent.Parcel, o *ascent.Options) { o.Transition = ascent.FluxMatching }},
		"continuum":     {[]string{"transition=continuum"}, func(_ *ascent.Parcel, o *ascent.Options) { o.Transition = ascent.Continuum }},
		"moist heat":    {[]string{"moist-heat=on"}, func(_ *ascent.Parcel, o *ascent.Options) { o.MoistHeat = true }},
		"tolerance":     {[]string{"tolerance=1e-7"}, func(_ *ascent.Parcel, o *ascent.Options) { o.Tolerance = 1e-7 }},
		"height":        {[]string{"height=150m"}, func(_ *ascent.Parcel, o *ascent.Options) { o.Height = 150 }},
		"surface tension": {[]string{"surface-tension=60mN/m"}, func(p *ascent.Parcel, _ *ascent.Options) {
			for i := range p.Population {
				p.Population[i].TensionFactor = 0.06 / atmos.SurfaceTension(298.15)
			}
		}},
		"standard air": {[]string{"mode[0].air=stp", "mode[1].air=stp"}, func(p *ascent.Parcel, _ *ascent.Options) {
			for i := range p.Population {
				p.Population[i].Share = toStart
			}
		}},
	} {
		t.Run(name, func(t *testing.T) {
			s := modesOfKappa(t)
			for _, v := range c.values {
				key, text, _ := strings.Cut(v, "=")
				setInput(t, &s, key, text)
			}
			_, f := rises(t, s)
			want := direct(t, c.change)
			for what, pair := range map[string][2]float64{
				"peak":        {float64(f.Peak), 100 * want.Peak.Supersaturation},
				"height":      {float64(f.HeightOfPeak), want.Peak.Height},
				"temperature": {float64(f.TemperatureAtPeak), want.Peak.Temperature},
				"droplets":    {float64(f.Droplets), want.Droplets},
				"at the peak": {float64(f.DropletsAtPeak), want.DropletsAtPeak},
				"STP":         {float64(f.DropletsSTP), want.DropletsSTP},
				"grown":       {float64(f.Grown), want.Grown},
				"particles":   {float64(f.Particles), want.Number},
				"liquid":      {float64(f.LiquidWater), want.End.LiquidWater},
				"mode 2":      {float64(f.ByMode[1].Droplets), want.ByGroup[1].Droplets},
			} {
				// Sizes that are followed change the steps, by less than the tolerance.
				if got, want := pair[0], pair[1]; !(math.Abs(got/want-1) <= 5e-5) {
					t.Errorf("%s %.8g, want %.8g", what, got, want)
				}
			}
		})
	}
}

// Scripts rely on these keys.
func TestAscentKeys(t *testing.T) {
	a, _ := rises(t, modesOfKappa(t))
	text, err := json.Marshal(a.Facts)
	if err != nil {
		t.Fatal(err)
	}
	var all map[string]any
	if err := json.Unmarshal(text, &all); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"peak_supersaturation_percent", "height_of_peak_m", "temperature_at_peak_k", "droplets_per_m3", "droplets_at_peak_per_m3",
		"droplets_stp_per_m3", "grown_droplets_per_m3", "liquid_water_kg_per_kg_at_end", "total_water_residual", "steps"} {
		if _, ok := all[key].(float64); !ok {
			t.Errorf("%s is no number in %s", key, text[:200])
		}
	}
	for list, keys := range map[string][]string{
		"by_mode":      {"mode", "particles_per_m3", "droplets_per_m3"},
		"closed_forms": {"method", "peak_supersaturation_percent", "droplets_per_m3"},
		"profile":      {"height_m", "supersaturation_percent", "temperature_k", "liquid_water_kg_per_kg", "mean_radius_m"},
		"updrafts":     {"updraft_m_per_s", "droplets_per_m3"},
		"followed":     {"dry_diameter_m", "grown"},
	} {
		rows, ok := all[list].([]any)
		if !ok || len(rows) == 0 {
			t.Errorf("%s is %v", list, all[list])
			continue
		}
		for _, key := range keys {
			if _, ok := rows[0].(map[string]any)[key]; !ok {
				t.Errorf("no %s in %v", key, rows[0])
			}
		}
	}
	for _, key := range []string{"updraft_distribution", "sweep"} {
		if v, ok := all[key]; !ok || v != nil {
			t.Errorf("%s is %v, want null", key, v)
		}
	}
}

// The demo has droplets, a peak and closed forms.
func TestAscentOfDemo(t *testing.T) {
	a, f := rises(t, scenario.Default())
	if !(f.Droplets > 0.1*f.Particles && f.Droplets < f.Particles) || !f.PeakReached {
		t.Errorf("%g of %g particles, peak reached %v", f.Droplets, f.Particles, f.PeakReached)
	}
	for _, c := range f.ClosedForms {
		// The largest known deviations of the forms are some 30 % (Method.Limits).
		if c.Problem != nil || !(math.Abs(float64(c.DropletsDeviation)) < 0.35) {
			t.Errorf("%s: %g droplets, %v", c.Method, c.Droplets, c.Problem)
		}
	}
	if says := strings.Join(a.Finding, " "); !strings.Contains(says, "the supersaturation peaks at") || !strings.Contains(says, "Twomey 1959 gives") ||
		!strings.Contains(says, "found for fresh smoke") {
		t.Errorf("finding %q", says)
	}
	if !slices.Contains(codes(a), "closed-forms-of-fitted-modes") {
		t.Errorf("notes %q", codes(a))
	}
	explained(t, a)
	if a.Record != 1 || a.Records < 10 {
		t.Errorf("record %d of %d", a.Record, a.Records)
	}
	// Measured numbers are of standard air.
	bins := f.ByMode[0].Particles
	if !(math.Abs(float64(f.Particles/bins)-1) < 1e-12) {
		t.Errorf("%g particles, %g of them in the bins", f.Particles, bins)
	}
	o, _, err := oneRecord(context.Background(), stationEnv(), scenario.Default(), 1)
	if err != nil {
		t.Fatal(err)
	}
	want := o.sizes.Number() * 90000 / 101325 * 273.15 / 298.15
	if !(math.Abs(float64(f.Particles)/want-1) < 1e-9) {
		t.Errorf("%g particles per m³ at the start, want %g", f.Particles, want)
	}
}

// Of a distribution the ascent with the mean number is shown.
func TestAscentOfUpdrafts(t *testing.T) {
	for _, weight := range []string{"number", "flux"} {
		s := modesOfKappa(t, "updraft=0", "updraft-spread=0.4m/s", "updraft-weighting="+weight)
		a, f := rises(t, s)
		d := f.Distribution
		if d == nil {
			t.Fatal("no distribution")
		}
		// The mean of half a Gaussian is σ √(2/π); weighted by flux σ √(π/2).
		want := 0.4 * math.Sqrt(2/math.Pi)
		if weight == "flux" {
			want = 0.4 * math.Sqrt(math.Pi/2)
		}
		if !(math.Abs(float64(d.MeanUpdraft)/want-1) < 1e-4) { // 16 points up to 5 σ
			t.Errorf("%s: mean updraft %g, want %g", weight, d.MeanUpdraft, want)
		}
		if f.Updraft != d.Characteristic || !(math.Abs(float64(f.Droplets/d.Droplets)-1) < 0.01) { // read off between points
			t.Errorf("%s: the ascent at %g m/s has %g droplets, the mean is %g", weight, f.Updraft, f.Droplets, d.Droplets)
		}
		if !strings.Contains(a.Finding[1], "Over all updrafts") {
			t.Errorf("finding %q", a.Finding)
		}
	}
}
