package command_test

import (
	"encoding/json"
	"math"
	"os"
	"os/exec"
	"path/filepath"
	"slices"
	"testing"
)

// printed starts the program and reads the JSON object that it prints.
func printed(t *testing.T, args ...string) map[string]any {
	t.Helper()
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	demo, err := filepath.Abs("../../testdata/demo")
	if err != nil {
		t.Fatal(err)
	}
	cmd := exec.Cmd{Path: self, Args: slices.Concat([]string{"dropcrest"}, args, []string{"--as", "json"}),
		Env: append(os.Environ(), demoFolder+"="+demo, "XDG_CONFIG_HOME="+t.TempDir())}
	out, err := cmd.Output()
	if err != nil {
		t.Fatalf("dropcrest %q: %v", args, err)
	}
	var object map[string]any
	if err := json.Unmarshal(out, &object); err != nil {
		t.Fatal(err)
	}
	return object
}

// A row of the ledger is the difference of two answers that a person gets by options.
func TestLedgerRowsAreDifferencesOfAnswers(t *testing.T) {
	if testing.Short() {
		t.Skip("starts the program twenty times")
	}
	t.Parallel()
	const sc, wet = "critical_supersaturation_percent", "critical_wet_radius_m"
	modes := []string{"--mode", "N=850/cm3 Dg=45nm gsd=1.6", "--mode", "N=400/cm3 Dg=150nm gsd=1.6"}
	air := slices.Concat([]string{"--updraft", "0.3m/s", "--bins", "40", "--tolerance", "1e-6"},
		[]string{"--mode", "N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3", "--mode", "N=400/cm3 Dg=150nm gsd=1.6 kappa=0.5"})
	salt := []string{"--kelvin", "compressible", "--surface-tension", "solution", "--solution-density", "measured"}
	for name, c := range map[string]struct {
		page             string
		asked            []string // of both pages
		full, simplified []string // besides, on the page
		key              string
		changes          map[string]string // key of the answer, key of the row
	}{
		"constant kappa, 20 nm": {"curve", []string{"--dry-diameter", "20nm"}, salt,
			[]string{"--kelvin", "compressible", "--surface-tension", "solution", "--solution-density", "measured", "--water-activity", "kappa"},
			"constant_kappa", map[string]string{sc: "change_in_critical_supersaturation_percent", wet: "change_in_critical_wet_radius_percent"}},
		"ideal solute, 200 nm, 5 °C": {"curve", []string{"--dry-diameter", "200nm", "--temperature", "5C"}, salt,
			append(slices.Clone(salt), "--water-activity", "vant-hoff"),
			"ideal_solute", map[string]string{sc: "change_in_critical_supersaturation_percent"}},
		"pure water, 50 nm": {"curve", []string{"--dry-diameter", "50nm", "--component", "sodium chloride"}, salt,
			[]string{"--kelvin", "compressible", "--surface-tension", "water", "--solution-density", "measured"},
			"pure_water_surface_tension", map[string]string{sc: "change_in_critical_supersaturation_percent"}},
		"sphere": {"curve", []string{"--dry-diameter", "80nm", "--component", "sodium chloride", "--dry-size-is", "mobility"},
			append(slices.Clone(salt), "--shape-factor", "1.08"), append(slices.Clone(salt), "--shape-factor", "1"),
			"sphere", map[string]string{sc: "change_in_critical_supersaturation_percent", wet: "change_in_critical_wet_radius_percent"}},
		"complete dissolution": {"curve", []string{"--component", "adipic acid", "--kelvin", "compressible"}, nil, []string{"--solubility", "complete", "--water-activity", "kappa"},
			"complete_dissolution", map[string]string{sc: "change_in_critical_supersaturation_percent"}},
		"counts": {"spectrum", append(slices.Clone(modes), "--at-supersaturation", "0.3%"), salt, append(slices.Clone(salt), "--water-activity", "kappa"),
			"constant_kappa", map[string]string{"ccn": "change_in_ccn_percent"}},
		"ascent": {"ascent", air, []string{"--moist-heat", "on"}, []string{"--moist-heat", "on", "--transition", "continuum"},
			"transition_form", map[string]string{"droplets_per_m3": "change_in_droplets_percent", "peak_supersaturation_percent": "change_in_peak_supersaturation_percent"}},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			ask := c.asked
			if c.page == "spectrum" { // that page has several supersaturations
				ask = append(slices.Clone(modes), "--supersaturation", "0.3%")
			}
			full := printed(t, slices.Concat([]string{c.page}, ask, c.full)...)
			simplified := printed(t, slices.Concat([]string{c.page}, ask, c.simplified)...)
			l := printed(t, slices.Concat([]string{"ledger", "--of", c.page}, c.asked, shapeOf(c.full))...)
			row := rowWith(t, l, c.key)
			for answer, change := range c.changes {
				was, is := figureIn(t, full, answer), figureIn(t, simplified, answer)
				want := 100 * (is - was) / was
				got, ok := row[change].(float64)
				tol := 1e-7 // of two crests to 1e-12
				if c.page == "ascent" {
					tol = 1e-3 // of two integrations to 1e-6, one of which follows sizes as well
				}
				if !ok || !(math.Abs(got-want) <= tol) || want == 0 {
					t.Errorf("%s: %v %%, by hand %v", change, row[change], want)
				}
			}
		})
	}
}

// shapeOf is what of the options the ledger cannot know by itself.
func shapeOf(options []string) []string {
	if i := slices.Index(options, "--shape-factor"); i >= 0 {
		return options[i : i+2]
	}
	return nil
}

func rowWith(t *testing.T, ledger map[string]any, key string) map[string]any {
	t.Helper()
	for _, r := range ledger["assumptions"].([]any) {
		if row := r.(map[string]any); row["key"] == key {
			return row
		}
	}
	t.Fatalf("no row %s", key)
	return nil
}

// figureIn is a number of an answer; ccn is that of the only supersaturation.
func figureIn(t *testing.T, answer map[string]any, key string) float64 {
	t.Helper()
	if key == "ccn" {
		answer, key = answer["spectrum"].([]any)[0].(map[string]any), "ccn_per_m3"
	}
	x, ok := answer[key].(float64)
	if !ok {
		t.Fatalf("%s is %v", key, answer[key])
	}
	return x
}
