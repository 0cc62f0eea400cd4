package command

import (
	"bytes"
	"context"
	"encoding/json"
	"fmt"
	"math"
	"os"
	"slices"
	"strconv"
	"strings"
	"testing"

	"dropcrest/atmos"
)

// The computed files once more, through options and JSON as a script would use
// them: every case, every extremum, its kind and its place.
//
// The tolerance is 1e-9. The reference has R to ten digits, 1.8e-11 off, and so is
// its Kelvin term A/D. Where that cancels against the water activity the error
// counts in full: a supersaturation may differ by 2e-11 of the Kelvin term besides.
// All else is the same to rounding: σ and ρ of water are the same formulas, M_w
// is the same number, the layer of adsorbed water is 0.275 nm in both.
const computedTolerance = 1e-9

// sameS compares supersaturations (fractions) at a wet diameter (m).
func sameS(got, want, wet float64) bool {
	const gasConstant, longest = 2e-11, 2.5e-9 // relative error of R; above every A of the files, m
	return math.Abs(got-want) <= computedTolerance*math.Abs(want)+gasConstant*longest/wet
}

// computedCase is one case; what each file does not have stays zero.
type computedCase struct {
	ID    string
	Input struct {
		Dd, T      float64
		Factor     float64 `json:"sigma_factor"`
		Components []struct {
			Eps, Kappa float64
			C          *float64
		}
		AdsorptionA float64 `json:"A_FHH"`
		AdsorptionB float64 `json:"B_FHH"`
		EpsSoluble  float64 `json:"eps_soluble"`
		Kappa       float64
		Form        string

		EpsSalt   float64 `json:"eps_salt"`
		KappaSalt float64 `json:"kappa_salt"`
		EpsOrg    float64 `json:"eps_org"`
		RhoOrg    float64 `json:"rho_org"`
		MOrg      float64 `json:"M_org"`
		GammaMax  float64 `json:"Gamma_max"`
		K         float64
		D         float64 // a state is asked for and not a crest
	}
	Output json.RawMessage
}

func computedCases(t *testing.T, file string) []computedCase {
	t.Helper()
	text, err := os.ReadFile("../../testdata/computed/" + file)
	if err != nil {
		t.Fatal(err)
	}
	var read struct{ Cases []computedCase }
	if err := json.Unmarshal(text, &read); err != nil {
		t.Fatal(err)
	}
	return read.Cases
}

func (c computedCase) output(t *testing.T, into any) {
	t.Helper()
	if err := json.Unmarshal(c.Output, into); err != nil {
		t.Fatal(err)
	}
}

// extremum is one of the reference or of the answer; x is a wet diameter or radius.
type extremum struct {
	kind string
	x, s float64
}

// curveJSON is what the test reads of the answer.
type curveJSON struct {
	Supersaturation float64 `json:"critical_supersaturation_percent"`
	WetDiameter     float64 `json:"critical_wet_diameter_m"`
	Tension         float64 `json:"surface_tension_at_crest_n_per_m"`
	Activity        float64 `json:"critical_water_activity"`
	Kind            string  `json:"barrier_kind"`
	Position        string  `json:"barrier_position"`
	Extrema         []struct {
		Kind      string
		WetRadius float64 `json:"wet_radius_m"`
		S         float64 `json:"supersaturation_percent"`
	}
	Curve []struct {
		Ratio    float64 `json:"saturation_ratio"`
		Activity float64 `json:"water_activity"`
	}
}

func (a curveJSON) extrema() (out []extremum) {
	for _, e := range a.Extrema {
		out = append(out, extremum{e.Kind, 2 * e.WetRadius, e.S / 100})
	}
	return out
}

// curveOf runs dropcrest curve. A value in an option is exact: %v of a float64
// reads back as the same number.
func curveOf(t *testing.T, c computedCase, options ...string) (a curveJSON) {
	t.Helper()
	args := append([]string{"curve", "--as", "json", "--points", "1",
		"--dry-diameter", unit(c.Input.Dd, "m"), "--temperature", unit(c.Input.T, "K")}, options...)
	var out, complaints bytes.Buffer
	code := run(context.Background(), args, world{in: strings.NewReader(""), out: &out, err: &complaints, env: func(string) string { return "" }})
	if code != done {
		t.Fatalf("%s: exit %d for %q: %s", c.ID, code, args, complaints.String())
	}
	if err := json.Unmarshal(out.Bytes(), &a); err != nil {
		t.Fatal(err)
	}
	return a
}

func unit(x float64, name string) string { return strconv.FormatFloat(x, 'g', -1, 64) + name }

// tensionOf is the tension of water of the reference times its factor.
func tensionOf(c computedCase) string {
	return unit(c.Input.Factor*atmos.SurfaceTension(c.Input.T), "N/m")
}

func close9(got, want float64) bool { return math.Abs(got-want) <= computedTolerance*math.Abs(want) }

// crestAs compares the barrier.
func crestAs(t *testing.T, id string, a curveJSON, wet, s float64) {
	t.Helper()
	if !sameS(a.Supersaturation/100, s, wet) || !close9(a.WetDiameter, wet) {
		t.Errorf("%s: crest %.12g at %.12g m, want %.12g at %.12g m", id, a.Supersaturation/100, a.WetDiameter, s, wet)
	}
}

func extremaAs(t *testing.T, id string, got, want []extremum) {
	t.Helper()
	same := slices.EqualFunc(got, want, func(a, b extremum) bool {
		return a.kind == b.kind && close9(a.x, b.x) && sameS(a.s, b.s, b.x)
	})
	if !same {
		t.Errorf("%s: extrema %v, want %v", id, got, want)
	}
}

// The words of the reference; a kink_none is no extremum.
var kinds = map[string]string{"max": "maximum", "min": "minimum", "kink_min": "kink_minimum", "boundary_max": "boundary_maximum"}

func TestLimitedSolubilityThroughTheCommand(t *testing.T) {
	places := map[string]int{}
	for _, c := range computedCases(t, "limited_solubility.json") {
		var want struct {
			Extrema []struct {
				Kind    string
				D       float64
				Small   float64 `json:"s"`
				Capital float64 `json:"S"` // keeps it from being read as s
			}
			Barrier struct {
				Kind    string
				D       float64
				Small   float64 `json:"s"`
				Capital float64 `json:"S"`
			}
			Place string `json:"barrier_is"`
		}
		c.output(t, &want)
		options := []string{"--water-activity", "kappa", "--solubility", "limited", "--surface-tension", tensionOf(c)}
		for _, p := range c.Input.Components {
			row := fmt.Sprintf("kappa=%v share=%v", p.Kappa, p.Eps)
			if p.C != nil {
				row += fmt.Sprintf(" solubility=%v", *p.C)
			}
			options = append(options, "--component", row)
		}
		a := curveOf(t, c, options...)
		var extrema []extremum
		for _, e := range want.Extrema {
			if kind, ok := kinds[e.Kind]; ok {
				extrema = append(extrema, extremum{kind, e.D, e.Small})
			}
		}
		extremaAs(t, c.ID, a.extrema(), extrema)
		crestAs(t, c.ID, a, want.Barrier.D, want.Barrier.Small)
		if a.Kind != kinds[want.Barrier.Kind] || a.Position != want.Place {
			t.Errorf("%s: barrier %s, %s, want %s, %s", c.ID, a.Kind, a.Position, kinds[want.Barrier.Kind], want.Place)
		}
		places[a.Position]++
	}
	if places["only"] == 0 || places["first"] == 0 || places["last"] == 0 {
		t.Errorf("barriers at %v", places)
	}
}

func TestAdsorptionThroughTheCommand(t *testing.T) {
	forms := map[string]int{}
	for _, c := range computedCases(t, "adsorption.json") {
		var want struct {
			Dc    float64
			Small float64 `json:"sc"`
			Ratio float64 `json:"Sc"`
			Count int     `json:"n_maxima"`
		}
		c.output(t, &want)
		in := c.Input
		isotherm := fmt.Sprintf("A=%v B=%v", in.AdsorptionA, in.AdsorptionB)
		if in.Form == "exp" {
			isotherm += " form=exponential"
		}
		options := []string{"--adsorption", isotherm, "--surface-tension", tensionOf(c)}
		if in.EpsSoluble > 0 {
			options = append(options, "--water-activity", "kappa",
				"--component", fmt.Sprintf("mineral dust share=%v", 1-in.EpsSoluble), "--component", fmt.Sprintf("kappa=%v share=%v", in.Kappa, in.EpsSoluble))
		} else {
			options = append(options, "--component", "mineral dust")
		}
		a := curveOf(t, c, options...)
		crestAs(t, c.ID, a, want.Dc, want.Small)
		if len(a.Extrema) != want.Count || a.Kind != "maximum" || a.Position != "only" {
			t.Errorf("%s: %d extrema, the barrier %s, %s, want %d", c.ID, len(a.Extrema), a.Kind, a.Position, want.Count)
		}
		forms[in.Form]++
	}
	if len(forms) != 3 {
		t.Errorf("forms %v, want bare, exp and κ", forms)
	}
}

// filmState is one way of the reference to treat a film: extrema, or the state
// at a wet diameter.
type filmState struct {
	Dc      float64
	Small   float64 `json:"sc"`
	Ratio   float64 `json:"Sc"` // keeps it from being read as sc
	SigmaC  float64 `json:"sigma_c"`
	ActC    float64 `json:"aw_c"`
	Extrema []struct {
		Kind string
		D, S float64
	}
	Activity float64 `json:"aw"`
	S        float64 `json:"s"`
}

func TestFilmsThroughTheCommand(t *testing.T) {
	several, states := 0, 0
	for _, c := range computedCases(t, "surface_active.json") {
		var want struct {
			None  filmState `json:"no_partitioning"`
			Full  filmState `json:"full_partitioning"`
			Water filmState `json:"water_surface_tension"`
		}
		c.output(t, &want)
		in := c.Input
		salt := []string{"--water-activity", "kappa", "--component", fmt.Sprintf("kappa=%v share=%v", in.KappaSalt, in.EpsSalt)}
		film := append(salt,
			"--component", fmt.Sprintf("density=%s molar-mass=%s ions=1 share=%v", unit(in.RhoOrg, "kg/m3"), unit(in.MOrg, "kg/mol"), in.EpsOrg),
			"--szyszkowski", fmt.Sprintf("gamma-max=%s k=%s", unit(in.GammaMax, "mol/m2"), unit(in.K, "m3/mol")))
		for partitioning, want := range map[string]filmState{"off": want.None, "on": want.Full} {
			options := append(slices.Clone(film), "--partitioning", partitioning)
			id := c.ID + " partitioning " + partitioning
			if in.D > 0 {
				a := curveOf(t, c, append(options, "--from-radius", unit(in.D/2, "m"), "--to-radius", unit(in.D, "m"))...)
				if len(a.Curve) != 1 || !close9(a.Curve[0].Activity, want.Activity) || !sameS(a.Curve[0].Ratio-1, want.S, in.D) {
					t.Errorf("%s: state %v, want aw %.12g, s %.12g", id, a.Curve, want.Activity, want.S)
				}
				states++
				continue
			}
			a := curveOf(t, c, options...)
			crestAs(t, id, a, want.Dc, want.Small)
			if !close9(a.Tension, want.SigmaC) || !close9(a.Activity, want.ActC) {
				t.Errorf("%s: σ %.12g, aw %.12g at the crest, want %.12g and %.12g", id, a.Tension, a.Activity, want.SigmaC, want.ActC)
			}
			var extrema []extremum
			for _, e := range want.Extrema {
				extrema = append(extrema, extremum{kinds[e.Kind], e.D, e.S})
			}
			extremaAs(t, id, a.extrema(), extrema)
			if len(extrema) > 1 {
				several++
			}
		}
		if in.D > 0 {
			continue
		}
		// The same particle with the tension of water: all of the organic counts by the κ
		// of its density and molar mass.
		kappa := in.RhoOrg * atmos.WaterMolarMass / (in.MOrg * atmos.WaterDensity(in.T))
		a := curveOf(t, c, append(salt, "--component", fmt.Sprintf("kappa=%v share=%v", kappa, in.EpsOrg))...)
		crestAs(t, c.ID+" with the tension of water", a, want.Water.Dc, want.Water.Small)
	}
	if several == 0 || states == 0 {
		t.Errorf("%d cases with several extrema, %d states", several, states)
	}
}
