package answer

import (
	"context"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/atmos"
	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

// countOf is the count that the Spectrum page answers at the supersaturation of the
// ledger.
func countOf(t testing.TB, s scenario.Scenario) float64 {
	t.Helper()
	s.Supersaturations = []float64{s.AtSupersaturation}
	a, err := askSpectrum(context.Background(), stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	return float64(a.Facts.(SpectrumFacts).Spectrum[0].Count)
}

func edited(s scenario.Scenario, edits ...func(*scenario.Scenario)) scenario.Scenario {
	s = s.Clone()
	for _, edit := range edits {
		edit(&s)
	}
	return s
}

func compressible(s *scenario.Scenario) { s.Kelvin = "compressible" }
func fuller(s *scenario.Scenario) {
	s.SurfaceTension, s.SolutionDensity = scenario.Measure{Word: "solution"}, "measured"
}

// Each row of a count is the difference of two answers of the Spectrum page.
func TestRowsOfCountsByHand(t *testing.T) {
	modes := ledgerScenes(t)["counts of modes"]
	mixed := withRows(t, modes, "component", "ammonium sulfate share=0.6", "glucose share=0.4")
	mobility := scene(t, "of=spectrum", "dry-size-is=mobility", "shape-factor=1.1")
	spread := edited(ledgerScenes(t)["counts of kappa"], func(s *scenario.Scenario) { s.KappaSpread = 1.4 })
	for name, c := range map[string]struct {
		key        ledger.Key
		full       scenario.Scenario
		simplified func(*scenario.Scenario)
	}{
		"incompressible": {ledger.IncompressibleLiquid, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.Kelvin = "standard" }},
		"constant kappa": {ledger.ConstantKappa, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.WaterActivity = "kappa" }},
		"ideal":          {ledger.IdealSolute, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.WaterActivity = "vant-hoff" }},
		"pure water":     {ledger.PureWaterSurfaceTension, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.SurfaceTension.Word = "water" }},
		"additive":       {ledger.VolumeAdditivity, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.SolutionDensity = "additive" }},
		"convention": {ledger.Convention25C, edited(modes, compressible, fuller), func(s *scenario.Scenario) {
			s.SurfaceTension, s.Temperature = scenario.Measure{Number: 0.072}, 298.15
		}},
		"mobility":       {ledger.Sphere, edited(mobility, compressible), func(s *scenario.Scenario) { s.ShapeFactor = 1 }},
		"spread":         {kappaSpread, edited(spread, compressible), func(s *scenario.Scenario) { s.KappaSpread = 1 }},
		"counter set":    {calibration, edited(modes, compressible, fuller), func(s *scenario.Scenario) { s.AtSupersaturation *= 1.05 }},
		"mixed, ideal":   {ledger.IdealSolute, edited(mixed, compressible, fuller), func(s *scenario.Scenario) { s.WaterActivity = "vant-hoff" }},
		"mixed, density": {ledger.VolumeAdditivity, edited(mixed, compressible, fuller), func(s *scenario.Scenario) { s.SolutionDensity = "additive" }},
	} {
		asked := edited(c.full, func(s *scenario.Scenario) { // the page as it usually is
			s.Kelvin, s.SurfaceTension, s.SolutionDensity = "standard", scenario.Measure{Word: "water"}, "additive"
		})
		asked.Trials.Number = 0
		_, f := takesApart(t, asked)
		full := countOf(t, c.full)
		want := 100 * (countOf(t, edited(c.full, c.simplified))/full - 1)
		within(t, name+", full", f.Reference.CCN/Number(full), 1, 1e-9)
		within(t, name, rowOf(t, f, c.key).CCN, want, 1e-6)
		if want == 0 {
			t.Errorf("%s costs nothing: nothing is compared", name)
		}
	}
	// what is not known is said under a condition
	_, f := takesApart(t, mixed)
	full := edited(mixed, compressible, fuller)
	external := countOf(t, edited(full, func(s *scenario.Scenario) { s.Mixing = "external" }))
	within(t, "external mixture", rowOf(t, f, mixingState).If.CCN, 100*(countOf(t, full)/external-1), 1e-6)
}

// Field reference, section 3 (computed): for κ 0.3 at 0.1 %, 3 % in all diameters raise
// the count by 11.9 % (median 70 nm, width 1.7) and 7.4 % (130 nm, 1.6), 5 % in the
// supersaturation by 13 % and 8 %; field check C32: d ln N/d ln κ. For the wider
// particles the reference prints 0.38 at 0.2 % and 0.02 at 0.8 %; the closed form, written
// out by hand with 72.0 mN/m (critical sizes 104.5 and 41.5 nm), gives 0.374 and 0.015, and
// so does the ledger (0.372, 0.015): these two are off in their last digit and left out.
func TestPublishedSensitivitiesOfCounts(t *testing.T) {
	of := func(mode, at string) LedgerFacts {
		s := withRows(t, scene(t, "of=spectrum", "population=modes", "at-supersaturation="+at), "mode", mode+" kappa=0.3")
		_, f := takesApart(t, s)
		return f
	}
	for _, c := range []struct {
		mode              string
		size, level       float64
		sizeTol, levelTol float64
		at                []string
		byKappa           []float64
		kappaTol          float64
	}{
		{mode: "N=1000/cm3 Dg=70nm gsd=1.7", size: 11.9, sizeTol: 0.05, level: 13, levelTol: 0.5,
			at: []string{"0.1%", "0.2%", "0.4%", "0.8%"}, byKappa: []float64{1.284, 0.834, 0.453, 0.181}, kappaTol: 0.005},
		{mode: "N=1000/cm3 Dg=130nm gsd=1.6", size: 7.4, sizeTol: 0.05, level: 8, levelTol: 0.5,
			at: []string{"0.1%", "0.4%"}, byKappa: []float64{0.82, 0.11}, kappaTol: 0.005},
	} {
		f := of(c.mode, "0.1%")
		within(t, c.mode+", size", rowOf(t, f, sizeError).CCN, c.size, c.sizeTol)
		within(t, c.mode+", level", rowOf(t, f, calibration).CCN, c.level, c.levelTol)
		for i, at := range c.at {
			for _, b := range of(c.mode, at).Budget {
				if b.Input == ledger.Hygroscopicity.Key() {
					within(t, c.mode+", κ at "+at, b.Sensitivity*b.Value, c.byKappa[i], c.kappaTol)
				}
			}
		}
	}
}

// A temperature and the tension that follows it move a count as the question asked
// at another temperature does.
func TestTemperatureOfCounts(t *testing.T) {
	s := ledgerScenes(t)["counts of kappa"]
	_, f := takesApart(t, s)
	const off = 0.5 // K
	at := func(by float64) float64 {
		return countOf(t, edited(s, func(s *scenario.Scenario) { s.Temperature += by }))
	}
	want := math.Log(at(off)/at(-off)) / (2 * off)
	for _, b := range f.Budget {
		if b.Input == ledger.Temperature.Key() {
			within(t, "by temperature", b.Sensitivity, want, 1e-3*math.Abs(want))
		}
	}
}

// Each row of an ascent is the difference of two ascents.
func TestRowsOfAscentsByHand(t *testing.T) {
	if testing.Short() {
		t.Skip("makes hundreds of ascents")
	}
	kappa := edited(modesOfKappa(t, "of=ascent"), func(s *scenario.Scenario) { s.MassAccommodation, s.KappaSpread = 0.6, 1.3 })
	salt := edited(ledgerScenes(t)["ascent of modes"], fuller)
	of := func(s scenario.Scenario) (droplets, peak float64) {
		_, f := rises(t, s)
		return float64(f.Droplets), float64(f.Peak)
	}
	moist := func(s *scenario.Scenario) { s.MoistHeat = "on" }
	for name, c := range map[string]struct {
		key        ledger.Key
		full       scenario.Scenario
		simplified func(*scenario.Scenario)
	}{
		"accommodation": {massAccommodation, edited(kappa, moist), func(s *scenario.Scenario) { s.MassAccommodation = 1 }},
		"spread":        {kappaSpread, edited(kappa, moist), func(s *scenario.Scenario) { s.KappaSpread = 1 }},
		"continuum":     {transitionForm, edited(kappa, moist), func(s *scenario.Scenario) { s.Transition = "continuum" }},
		"heat":          {heatCapacity, edited(kappa, moist), func(s *scenario.Scenario) { s.MoistHeat = "off" }},
		"constant κ":    {ledger.ConstantKappa, edited(salt, moist), func(s *scenario.Scenario) { s.WaterActivity = "kappa" }},
		"ideal":         {ledger.IdealSolute, edited(salt, moist), func(s *scenario.Scenario) { s.WaterActivity = "vant-hoff" }},
		"pure water":    {ledger.PureWaterSurfaceTension, edited(salt, moist), func(s *scenario.Scenario) { s.SurfaceTension.Word = "water" }},
	} {
		c.full.Trials.Number = 0
		_, f := takesApart(t, c.full)
		n, s := of(c.full)
		n1, s1 := of(edited(c.full, c.simplified))
		row := rowOf(t, f, c.key)
		within(t, name+", droplets", row.Droplets, 100*(n1/n-1), 1e-3)
		within(t, name+", peak", row.PeakSupersaturation, 100*(s1/s-1), 1e-3)
		if n1 == n {
			t.Errorf("%s costs nothing: nothing is compared", name)
		}
	}
	// closed forms are those of the page, and the squeezed liquid is compared by itself
	_, page := rises(t, edited(kappa, moist, func(s *scenario.Scenario) { s.KappaSpread = 1 }))
	_, f := takesApart(t, edited(kappa, func(s *scenario.Scenario) { s.KappaSpread = 1 }))
	for _, form := range page.ClosedForms {
		for m, word := range map[ledger.Key]string{"closed_form_twomey": "twomey-1959", "closed_form_abdul_razzak_ghan": "abdul-razzak-ghan-2000", "closed_form_fountoukis_nenes": "fountoukis-nenes-2005"} {
			if form.Method == word {
				within(t, word, rowOf(t, f, m).Droplets, 100*float64(form.Droplets/page.Droplets-1), 1e-3)
			}
		}
	}
}

// Air that started lower holds the same vapour for each kg of air, at the same
// potential temperature, and has the humidity that is asked for.
func TestLowered(t *testing.T) {
	of := (&rising{}).parcel(scene(t, "temperature=10C", "pressure=900hPa", "start-humidity=95%"))
	T, p := lowered(of, 0.85)
	if T < of.Temperature || p < of.Pressure {
		t.Fatalf("%g K, %g Pa is not below", T, p)
	}
	within(t, "potential temperature", Number(T*math.Pow(of.Pressure/p, 287.05/1005)), of.Temperature, 1e-6)
	vapour := func(T, p, humidity float64) float64 { return humidity * atmos.VapourPressure(T) / p }
	within(t, "vapour", Number(vapour(T, p, 0.85)/vapour(of.Temperature, of.Pressure, 0.95)), 1, 1e-9)
}

// What is uncertain of dust, of what dissolves sparingly and of a film stands in the
// budget of a population as in that of one particle.
func TestBudgetsOfAllKinds(t *testing.T) {
	mode := "N=1000/cm3 Dg=100nm gsd=1.6"
	film := withRows(t, scene(t, "of=spectrum", "population=modes", "component=glutaric acid", "szyszkowski=gamma-max=2umol/m2 k=0.5m3/mol", "solubility=complete"), "mode", mode)
	for name, c := range map[string]struct {
		s    scenario.Scenario
		want []ledger.Quantity
	}{
		"dust":        {withRows(t, scene(t, "of=spectrum", "population=modes"), "mode", mode+" substance=Arizona test dust"), []ledger.Quantity{ledger.AdsorptionA, ledger.AdsorptionB}},
		"rising dust": {withRows(t, scene(t, "of=ascent", "population=modes"), "mode", mode+" substance=Arizona test dust"), []ledger.Quantity{ledger.AdsorptionA, ledger.AdsorptionB, ledger.Updraft}},
		"adipic acid": {withRows(t, scene(t, "of=spectrum", "population=modes"), "mode", mode+" substance=adipic acid"), []ledger.Quantity{ledger.Solubility, ledger.Hygroscopicity}},
		"film":        {film, []ledger.Quantity{ledger.FilmExcess, ledger.FilmConstant}},
		"mobility": {scene(t, "of=spectrum", "composition=given", "component=sodium chloride", "dry-size-is=mobility"),
			[]ledger.Quantity{ledger.ShapeFactor, ledger.Hygroscopicity}},
	} {
		c.s.Trials.Number = 0
		_, f := takesApart(t, c.s)
		for _, q := range c.want {
			i := slices.IndexFunc(f.Budget, func(b BudgetRow) bool { return b.Input == q.Key() })
			if i < 0 || !(math.Abs(float64(f.Budget[i].Contribution)) > 0) {
				t.Errorf("%s: no %s in %+v", name, q, f.Budget)
			}
		}
	}
}

// The order of the modes changes nothing, and each kind of particle has its own
// uncertainty.
func TestKindsOfParticles(t *testing.T) {
	a, b := "N=500/cm3 Dg=60nm gsd=1.7 kappa=0.1", "N=500/cm3 Dg=100nm gsd=1.6 substance=ammonium sulfate"
	s := scene(t, "of=spectrum", "population=modes")
	_, ab := takesApart(t, withRows(t, s, "mode", a, b))
	_, ba := takesApart(t, withRows(t, s, "mode", b, a))
	within(t, "combined", ab.CombinedLinear, float64(ba.CombinedLinear), 1e-9)
	alone := func(mode string) (count, byKappa float64) {
		_, f := takesApart(t, withRows(t, s, "mode", mode))
		for _, row := range f.Budget {
			if row.Input == ledger.Hygroscopicity.Key() {
				byKappa = float64(row.Contribution)
			}
		}
		return float64(f.Reference.CCN), byKappa
	}
	nA, kA := alone(a)
	nB, kB := alone(b)
	for _, row := range ab.Budget {
		if row.Input == ledger.Hygroscopicity.Key() {
			// to the second order of 10 % of κ that a central difference over it leaves
			within(t, "by both", row.Contribution, (nA*kA+nB*kB)/(nA+nB), 0.02)
		}
	}
}

// What rises is taken apart about its own answer: the trials lie around it.
func TestTrialsLieAroundTheAnswer(t *testing.T) {
	if testing.Short() {
		t.Skip("makes hundreds of ascents")
	}
	s := withRows(t, scene(t, "of=ascent", "population=modes", "ascent-bins=200"), "mode", "N=1000/cm3 Dg=30nm gsd=1.2 kappa=0.3")
	_, f := takesApart(t, s)
	if ratio := float64(f.MonteCarlo.Median / f.Reference.Droplets); !(math.Abs(ratio-1) < 0.02) {
		t.Errorf("the median of the trials is %g of the answer", ratio)
	}
}

// In rising air that is not at 25 °C the convention is that of the tension alone.
func TestConventionOfRisingAir(t *testing.T) {
	s := edited(modesOfKappa(t, "of=ascent", "temperature=5C"), func(s *scenario.Scenario) { s.MoistHeat = "on" })
	_, f := takesApart(t, s)
	_, full := rises(t, s)
	_, simplified := rises(t, edited(s, func(s *scenario.Scenario) { s.SurfaceTension = scenario.Measure{Number: 0.072} }))
	within(t, "droplets", rowOf(t, f, ledger.Convention25C).Droplets, 100*float64(simplified.Droplets/full.Droplets-1), 1e-3)
}

// A tension that was given does not follow the temperature of rising air.
func TestGivenTensionOfRisingAir(t *testing.T) {
	s := modesOfKappa(t, "of=ascent", "surface-tension=60mN/m", "moist-heat=on", "ascent-bins=24")
	_, f := takesApart(t, s)
	at := func(by float64) float64 {
		_, f := rises(t, edited(s, func(s *scenario.Scenario) { s.Temperature += by }))
		return float64(f.Droplets)
	}
	for _, b := range f.Budget {
		if b.Input == ledger.Temperature.Key() {
			want := math.Log(at(0.25)/at(-0.25)) / 0.5
			within(t, "by temperature", b.Sensitivity, want, 1e-3*math.Abs(want))
		}
	}
}

// Where nothing activates nothing is said of costs, and where all does nothing costs.
func TestCountsOfNothingAndOfAll(t *testing.T) {
	for name, c := range map[string]struct{ mode, at, says string }{
		"nothing": {"N=1000/cm3 Dg=5nm gsd=1.1 kappa=0", "0.01%", "Fewer than one particle per m³ activates"},
		"hardly":  {"N=1000/cm3 Dg=30nm gsd=1.1 kappa=0.3", "0.01%", "Fewer than one particle per m³ activates"},
		"all":     {"N=1000/cm3 Dg=300nm gsd=1.1 kappa=0.3", "5%", "No assumption changes the count"},
	} {
		a, _ := takesApart(t, withRows(t, scene(t, "of=spectrum", "population=modes", "at-supersaturation="+c.at), "mode", c.mode))
		says := strings.Join(a.Finding, " ")
		for _, f := range a.Figures {
			for _, b := range f.Bars {
				says += " " + b.Text
			}
		}
		if !strings.Contains(says, c.says) || strings.Contains(says, "NaN") || strings.Contains(says, "e-") {
			t.Errorf("%s: %s", name, says)
		}
	}
}
