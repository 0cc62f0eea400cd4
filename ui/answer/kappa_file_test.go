package answer

import (
	"context"
	"errors"
	"io"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// opening is what may be used where there is one file.
func opening(text string) Env {
	return Env{Open: func(string) (io.ReadCloser, error) { return io.NopCloser(strings.NewReader(text)), nil }}
}

// fromFile is the scenario that asks for a file of points, without trials.
func fromFile() scenario.Scenario {
	s := scenario.Default()
	s.PointsFile, s.Trials.Number = "points.csv", 0
	return s
}

func TestPointsFile(t *testing.T) {
	const nm, percent = 1e-9, 1e-2
	uncertain := func(value, own, common float64) scenario.Uncertain {
		return scenario.Uncertain{Value: value, Own: own, Common: common}
	}
	activation := scenario.Point{Dry: uncertain(60*nm, 1.8*nm, 0.6*nm), Supersaturation: uncertain(0.4*percent, 0.02*percent, 0)}
	for name, c := range map[string]struct {
		text string
		want []scenario.Point
	}{
		"columns of uncertainties": {"dry_diameter_nm,dry_diameter_uncertainty_percent,dry_diameter_common_uncertainty_nm,supersaturation_percent,supersaturation_relative_uncertainty_percent\n" +
			"60,3,0.6,0.4,5\n", []scenario.Point{activation}},
		"as options":          {"dry diameter,supersaturation\n60nm±3%rel±1%rel common,0.4% ± 5%rel\n", []scenario.Point{activation}},
		"units in the header": {"Dry diameter (µm),SS [%]\r\n0.06±3%±0.0006 common,0.4±0.02%abs\r\n", []scenario.Point{activation}},
		"semicolons, comments, mark of UTF-8": {"\uFEFF# measured on the roof\nD50, nm;Sc, %;site\n60+-1.8+-0.6 common;0.4+-5%rel;here\n",
			[]scenario.Point{activation}},
		"growth beside activation": {"dry_diameter_nm,supersaturation_percent,growth_factor,growth_factor_uncertainty,rh_percent,rh_absolute_uncertainty_percent\n" +
			"80,0.25,,,,\n100,,1.4,0.02,90,1\n", []scenario.Point{
			{Dry: uncertain(80*nm, 0, 0), Supersaturation: uncertain(0.25*percent, 0, 0)},
			{Dry: uncertain(100*nm, 0, 0), Growth: uncertain(1.4, 0.02, 0), Humidity: uncertain(0.9, 0.01, 0)}}},
	} {
		got, _, err := readPoints(opening(c.text), fromFile())
		if err != nil || len(got) != len(c.want) {
			t.Errorf("%s: %d points, error %v", name, len(got), err)
			continue
		}
		for i, m := range got {
			if !alike(m.Point, c.want[i]) {
				t.Errorf("%s: point %d is %+v, want %+v", name, i+1, m.Point, c.want[i])
			}
		}
	}
}

// alike compares to rounding.
func alike(a, b scenario.Point) bool {
	numbers := func(p scenario.Point) []float64 {
		var out []float64
		for _, u := range []scenario.Uncertain{p.Dry, p.Supersaturation, p.Growth, p.Humidity} {
			out = append(out, u.Value, u.Own, u.Common)
		}
		return out
	}
	return slices.EqualFunc(numbers(a), numbers(b), func(x, y float64) bool { return math.Abs(x-y) <= 1e-12*math.Abs(x) })
}

// Names, the water of each point and columns that are not used.
func TestPointsFileBesides(t *testing.T) {
	a, err := askKappa(context.Background(), opening("sample,dry_diameter_nm,wet_diameter_nm,supersaturation_percent,temperature_c,surface_tension_mn_per_m\n"+
		"north\x1b[2J,80,300,0.25,20,\nsouth,80,300,0.25,25,72\n"), fromFile())
	if err != nil {
		t.Fatal(err)
	}
	f := a.Facts.(KappaFacts)
	if !strings.HasPrefix(f.Points[0].Name, "north") || strings.ContainsRune(f.Points[0].Name, '\x1b') || f.Points[1].Name != "south" {
		t.Errorf("names %q, %q", f.Points[0].Name, f.Points[1].Name)
	}
	if f.Points[0].Temperature != 293.15 || f.Points[1].Tension != 0.072 || !(f.Points[0].Kappa > 1.07*f.Points[1].Kappa) {
		t.Errorf("waters %+v, %+v; κ %v, %v", f.Points[0].WaterRow, f.Points[1].WaterRow, f.Points[0].Kappa, f.Points[1].Kappa)
	}
	within(t, "κ of both under the common convention", f.Points[0].Under25C, float64(f.Points[1].Under25C), 1e-12)
	for _, code := range []string{"water-of-points", "columns-unused"} {
		if !slices.Contains(codes(a), code) {
			t.Errorf("notes %q, want %s among them", codes(a), code)
		}
	}
}

// A wrong file is told where it is wrong and what would be right.
func TestPointsFileErrors(t *testing.T) {
	const head = "dry_diameter_nm,supersaturation_percent\n"
	for name, c := range map[string]struct{ text, want string }{
		"empty":                   {"", "points.csv:1: no header"},
		"no rows":                 {head, "no measurements below the header"},
		"no size":                 {"supersaturation_percent\n0.2\n", "points.csv:1: no column of the dry diameter"},
		"nothing measured":        {"dry_diameter_nm\n80\n", "points.csv:1: no column of a supersaturation or a growth factor"},
		"no number":               {head + "80,0.2\n80,abc\n", `points.csv:3:4: "abc" is no number`},
		"decimal comma":           {"dry_diameter_nm;supersaturation_percent\n80;0,2\n", "points.csv:2:4: "},
		"too large":               {head + "80000000,0.2\n", "points.csv:2:1: 80000000nm is too large: want 1 to 10000 nm"},
		"behind ±":                {head + "80±2,x\n", `points.csv:2:6: "x" is no number`},
		"no unit anywhere":        {"diameter,ss_percent\n80,0.2\n", "points.csv:2:1: 80 has no unit"},
		"unit of something else":  {"diameter_k,ss_percent\n80,0.2\n", `points.csv:2:1: no unit "K" of length`},
		"short row":               {head + "80\n", "points.csv:2: 1 values where the header has 2 names"},
		"quote":                   {head + "\"80,0.2\n", "points.csv:2:"},
		"two of a kind":           {"dry_diameter_nm,d50_nm,ss_percent\n80,80,0.2\n", `points.csv:1:17: "d50_nm" holds the same as "dry_diameter_nm"`},
		"relative or absolute":    {"d50_nm,ss_percent,ss_uncertainty_percent\n80,0.2,5\n", `points.csv:1:19: "ss_uncertainty_percent" may be relative or absolute`},
		"relative without %":      {"d50_nm,ss_percent,ss_relative_uncertainty\n80,0.2,0.05\n", "points.csv:1:19: "},
		"uncertainty no number":   {"d50_nm,d50_unc_nm,ss_percent\n80,?,0.2\n", `points.csv:2:4: "?" is no number`},
		"nothing in a row":        {head + "80,\n", "points.csv:2: neither a supersaturation nor a growth factor"},
		"growth without humidity": {"d50_nm,gf\n80,1.4\n", "points.csv:2: a growth factor without its humidity"},
		"both in a row":           {"d50_nm,gf,rh_percent,ss_percent\n80,1.4,90,0.2\n", "kappa from growth and from activation are kept apart"},
		"Latin-1":                 {head + "80\xb12,0.2\n", "points.csv:2: no UTF-8"},
		"huge":                    {strings.Repeat("#", largestPoints+1), "larger than 1 MiB"},
	} {
		_, err := askKappa(context.Background(), opening(c.text), fromFile())
		var file *fieldfile.Error
		if !errors.As(err, &file) || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %v, want %q", name, err, c.want)
		}
	}
	_, err := askKappa(context.Background(), Env{Open: func(string) (io.ReadCloser, error) { return nil, errors.New("no such file") }}, fromFile())
	var input *InputError
	if !errors.As(err, &input) || input.Input != "points-file" {
		t.Errorf("a file that is not there: %v", err)
	}
}

// No file ends the program, and one that is taken gives points that are whole.
func FuzzPointsFile(f *testing.F) {
	for _, text := range []string{
		"dry_diameter_nm,supersaturation_percent\n80,0.25\n", "d50 (nm);gf;rh (%)\n80±3%;1.4;90±1%abs\n", "name,dp_um,ss\n\"a\nb\",0.1,0.2%\n", "#\n\n,\n", "\uFEFFd50_nm,ss_pct\n±,±\n",
	} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		points, _, err := readPoints(opening(text), fromFile())
		if err != nil {
			return
		}
		for _, m := range points {
			if wrong := checkMeasurement(m.Point); wrong != nil || !(m.Dry.Value > 0) || !(m.Dry.Own >= 0) {
				t.Errorf("%q is taken as %+v", text, m.Point)
			}
		}
	})
}
