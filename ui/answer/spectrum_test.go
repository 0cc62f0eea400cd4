package answer

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

func askedSpectrum(t testing.TB, s scenario.Scenario) (Answer, SpectrumFacts) {
	t.Helper()
	a, err := spectrumQuestion().Ask(context.Background(), Env{Substances: solutes.Standard()}, s)
	if err != nil {
		t.Fatal(err)
	}
	f, ok := a.Facts.(SpectrumFacts)
	if !ok {
		t.Fatalf("facts are %T", a.Facts)
	}
	return a, f
}

// ofKappas are two modes, each of a κ of its own.
func ofKappas(t testing.TB, values ...string) scenario.Scenario {
	return withRows(t, scene(t, append(values, "population=modes")...), "mode",
		"N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3", "N=400/cm3 Dg=150nm gsd=1.6 kappa=0.5")
}

// Counts are what an independent sum gives: over narrow bins of a lognormal density
// written out here, of all sizes whose crest lies at or below the supersaturation.
func TestSpectrumAgainstSlowSum(t *testing.T) {
	s := ofKappas(t, "surface-tension=72", "supersaturation=0.07, 0.1, 0.2, 0.5, 1.5")
	_, f := askedSpectrum(t, s)
	kelvin := koehler.KelvinLength(0.072, 298.15)
	for _, row := range f.Spectrum {
		want := 0.0
		for _, m := range []struct{ n, median, kappa float64 }{{850e6, 45e-9, 0.3}, {400e6, 150e-9, 0.5}} {
			const step = 1e-4 // in ln D: the sum is off by half a bin at its edge, 4e-5
			width := math.Log(1.6)
			for x := -6.0; x < 6; x += step {
				if crest := koehler.SolveKappa(m.median*math.Exp(x), kelvin, m.kappa); 100*crest.Supersaturation <= float64(row.Supersaturation) {
					want += m.n / (math.Sqrt(2*math.Pi) * width) * math.Exp(-x*x/(2*width*width)) * step
				}
			}
		}
		if got := float64(row.Count); !(math.Abs(got/want-1) < 2e-4) {
			t.Errorf("at %g %%: %.8g per m³, want %.8g", row.Supersaturation, got, want)
		}
	}
}

// Mixing and spread of κ keep what they must keep.
func TestSpectrumMixing(t *testing.T) {
	both := []string{"population=modes", "water-activity=kappa", "component=ammonium sulfate share=0.25", "component=succinic acid share=0.75"}
	count := func(values ...string) []SpectrumRow {
		_, f := askedSpectrum(t, scene(t, values...))
		return f.Spectrum
	}
	internal, external := count(both...), count(append(both, "mixing=external")...)
	salt, acid := count(append(both[:2:2], "component=ammonium sulfate")...), count(append(both[:2:2], "component=succinic acid")...)
	for i := range internal {
		want := 0.25*float64(salt[i].Count) + 0.75*float64(acid[i].Count)
		if got := float64(external[i].Count); !(math.Abs(got/want-1) < 1e-12) {
			t.Errorf("externally mixed %.10g, want the sum of the parts %.10g", got, want)
		}
		if internal[i].Count == external[i].Count {
			t.Errorf("at %g %% mixing makes no difference", internal[i].Supersaturation)
		}
	}
	for name, values := range map[string][]string{
		"kappa":           {"population=modes", "water-activity=kappa", "kappa=0.3"},
		"ion interaction": {"population=modes"},
		"external":        append(both, "mixing=external"),
	} {
		without, little, much := count(values...), count(append(values, "kappa-spread=1.001")...), count(append(values, "kappa-spread=3")...)
		differs := false
		for i := range without {
			if got, want := float64(little[i].Count), float64(without[i].Count); !(math.Abs(got/want-1) < 1e-5) {
				t.Errorf("%s: with hardly any spread %.8g, want %.8g", name, got, want)
			}
			differs = differs || math.Abs(float64(much[i].Count/without[i].Count)-1) > 1e-3
		}
		if !differs {
			t.Errorf("%s: a spread of 3 changes nothing", name)
		}
	}
}

// The diameter given for a mixture is the one above which there are as many
// particles as activate, and that of sharp particles is the same.
func TestSpectrumCriticalDiameter(t *testing.T) {
	for name, values := range map[string][]string{
		"kappa":  {"population=modes", "water-activity=kappa", "kappa=0.3"},
		"spread": {"population=modes", "water-activity=kappa", "kappa=0.3", "kappa-spread=2"},
		"salt":   {"population=modes"},
	} {
		_, f := askedSpectrum(t, scene(t, values...))
		for _, row := range f.Spectrum {
			if got := inventedModes().Above(float64(row.Critical)); !(math.Abs(got/float64(row.Count)-1) < 1e-9) {
				t.Errorf("%s at %g %%: %.8g per m³ are wider than %g m, want %.8g", name, row.Supersaturation, got, row.Critical, row.Count)
			}
		}
	}
	_, f := askedSpectrum(t, scene(t, "population=modes", "water-activity=kappa", "kappa=0.3"))
	kelvin := koehler.KelvinLength(atmos.SurfaceTension(298.15), 298.15)
	if got, want := 100*koehler.SolveKappa(float64(f.Spectrum[0].Critical), kelvin, 0.3).Supersaturation, 0.1; !(math.Abs(got-want) < 1e-9) {
		t.Errorf("the crest of the critical diameter lies at %.10g %%, want %g", got, want)
	}
}

// A mode's own matter counts for it and for no other.
func TestSpectrumModesOfTheirOwn(t *testing.T) {
	count := func(rows ...string) float64 {
		_, f := askedSpectrum(t, withRows(t, scene(t, "population=modes", "supersaturation=0.2"), "mode", rows...))
		return float64(f.Spectrum[0].Count)
	}
	const small, wide = "N=850/cm3 Dg=45nm gsd=1.6 ", "N=400/cm3 Dg=150nm gsd=1.6 "
	for _, c := range []struct{ a, b string }{
		{"kappa=0.3", "kappa=0.6"},
		{"", "kappa=0.1"},
		{"substance=sodium chloride", ""},
		{"substance=sodium chloride", "substance=ammonium sulfate"},
	} {
		got, want := count(small+c.a, wide+c.b), count(small+c.a)+count(wide+c.b)
		if !(math.Abs(got/want-1) < 1e-12) {
			t.Errorf("%q and %q: %.10g, want the sum %.10g", c.a, c.b, got, want)
		}
	}
	if a, b := count(small+"substance=ammonium sulfate"), count(small); a != b {
		t.Errorf("named or not, ammonium sulfate counts %g and %g", a, b)
	}
}

// Scripts rely on these keys.
func TestSpectrumKeys(t *testing.T) {
	a, _ := askedSpectrum(t, ofKappas(t, "fit=power"))
	text, err := json.Marshal(a.Facts)
	if err != nil {
		t.Fatal(err)
	}
	var all map[string]json.RawMessage
	if err := json.Unmarshal(text, &all); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"spectrum", "measured", "closure", "fits", "rejected", "record", "particles_per_m3", "kappa"} {
		if _, ok := all[key]; !ok {
			t.Errorf("no %q in %s", key, text)
		}
	}
	var rows []map[string]any
	if err := json.Unmarshal(all["spectrum"], &rows); err != nil {
		t.Fatal(err)
	}
	for _, key := range []string{"supersaturation_percent", "ccn_per_m3", "critical_dry_diameter_m"} {
		if _, ok := rows[0][key].(float64); !ok {
			t.Errorf("%q is no number in %v", key, rows[0])
		}
	}
}

// What cannot be answered names the input that is wrong and the mode.
func TestSpectrumErrors(t *testing.T) {
	for name, c := range map[string]struct {
		s           scenario.Scenario
		input, says string
	}{
		"substance of a mode": {scenario.Scenario{}, "component", "mode 2: no substance"},
		"no kappa":            {scene(t, "population=modes", "water-activity=kappa", "component=density=1.5g/cm3"), "component", "kappa"},
	} {
		if c.s.Population == "" {
			c.s = scene(t, "population=modes")
			c.s.Modes[1].Matter.Substance = "unobtainium"
		}
		_, err := askSpectrum(context.Background(), Env{}, c.s)
		var in *InputError
		if !errors.As(err, &in) || in.Input != c.input || !strings.Contains(in.Text, c.says) {
			t.Errorf("%s: %v, want one of %s that says %q", name, err, c.input, c.says)
		}
	}
}

// The forms recover what the counts were made of.
func TestSpectrumFits(t *testing.T) {
	s := withRows(t, scene(t, "population=modes", "fit=erf", "supersaturation=0.1, 0.15, 0.2, 0.3, 0.5, 0.8, 1.2"), "mode", "N=850/cm3 Dg=80nm gsd=1.6 kappa=0.3")
	a, f := askedSpectrum(t, s)
	kelvin := koehler.KelvinLength(atmos.SurfaceTension(298.15), 298.15)
	want := map[string]float64{
		"step_1_count_per_m3":   850e6,
		"step_1_centre_percent": 100 * koehler.SolveKappa(80e-9, kelvin, 0.3).Supersaturation,
		"step_1_width":          3 * math.Log(1.6) / math.Sqrt2, // physics: s_c falls with D^-3/2
	}
	if len(f.Fits) != 1 || f.Fits[0].Problem != nil {
		t.Fatalf("fits %+v", f.Fits)
	}
	for _, p := range f.Fits[0].Parameters {
		if got := float64(p.Value); !(math.Abs(got/want[p.Key]-1) < 0.01) { // the conversion is good to 1 %
			t.Errorf("%s %g, want %g", p.Key, got, want[p.Key])
		}
	}
	if !slices.ContainsFunc(a.Why, func(w string) bool { return strings.Contains(w, "is a mode of 8") }) {
		t.Errorf("the mode is not among %q", a.Why)
	}
	if _, f = askedSpectrum(t, ofKappas(t, "fit=erf2", "supersaturation=0.2, 0.3")); f.Fits[0].Problem == nil {
		t.Errorf("two counts fitted %+v", f.Fits[0])
	}
}
