package scenario

import (
	"errors"
	"math"
	"slices"
	"strings"
	"testing"
)

// at finds an input that must be there.
func at(t *testing.T, s *Scenario, p Path) Input {
	t.Helper()
	in, ok := Find(s, p)
	if !ok {
		t.Fatalf("no input %q", p)
	}
	return in
}

// Values with units are converted exactly: the number is the one that the
// decimal text in SI stands for.
func TestValues(t *testing.T) {
	for _, c := range []struct {
		path Path
		text string
		si   float64
		show string
	}{
		{"dry-diameter", "100nm", 1e-7, "100 nm"},
		{"dry-diameter", " 100 nm ", 1e-7, "100 nm"},
		{"dry-diameter", "0.1um", 1e-7, "100 nm"},
		{"dry-diameter", "0.1 µm", 1e-7, "100 nm"},
		{"dry-diameter", "0.1 μm", 1e-7, "100 nm"}, // Greek mu
		{"dry-diameter", "1e-7m", 1e-7, "100 nm"},
		{"dry-diameter", "1E2nm", 1e-7, "100 nm"},
		{"dry-diameter", "137.25nm", 137.25e-9, "137.25 nm"},
		{"dry-diameter", "10um", 1e-5, "10000 nm"},
		{"temperature", "20C", 293.15, "20.0 °C"},
		{"temperature", "20 °C", 293.15, "20.0 °C"},
		{"temperature", "293.15K", 293.15, "20.0 °C"},
		{"temperature", "-5C", 268.15, "-5.0 °C"},
		{"relative-humidity", "95%", 0.95, "95.0 %"},
		{"relative-humidity", "99.95 percent", 0.9995, "99.95 %"},
		{"relative-humidity", "0.95%", 0.0095, "0.95 %"},
		{"surface-tension", "72mN/m", 0.072, "72.0 mN/m"},
		{"surface-tension", "0.072N/m", 0.072, "72.0 mN/m"},
		{"surface-tension", "72 dyn/cm", 0.072, "72.0 mN/m"},
		{"kappa", "0.61", 0.61, "0.61"},
		{"kappa", "+.5", 0.5, "0.5"},
		{"shape-factor", "1.08", 1.08, "1.08"},
		{"points", "400", 400, "400"},
		{"component[0].density", "1.77g/cm3", 1770, "1.77 g/cm³"},
		{"component[0].density", "1770kg/m3", 1770, "1.77 g/cm³"},
		{"component[0].molar-mass", "132.14g/mol", 0.13214, "132.14 g/mol"},
	} {
		s := Default()
		in := at(t, &s, c.path)
		if err := in.SetWithUnit(c.text); err != nil {
			t.Errorf("%s %q: %v", c.path, c.text, err)
			continue
		}
		want := c.si
		if strings.HasSuffix(string(c.path), "humidity") {
			want = s.RelativeHumidity * 100
			if s.RelativeHumidity != c.si {
				t.Errorf("%q is the fraction %v, want %v", c.text, s.RelativeHumidity, c.si)
			}
		}
		if _, got := in.SI(); math.Abs(got.(float64)-want) > 1e-15*want {
			t.Errorf("%s %q is %v, want %v", c.path, c.text, got, want)
		}
		if got := in.Show(Style{}); got != c.show {
			t.Errorf("%s %q is shown as %q, want %q", c.path, c.text, got, c.show)
		}
	}
}

func TestRefusedValues(t *testing.T) {
	for _, c := range []struct {
		path Path
		text string
		says string // part of the problem
		want string // part of what would be right
	}{
		{"dry-diameter", "", "no value", "such as 100 nm"},
		{"dry-diameter", "100", "has no unit", "nm"},
		{"dry-diameter", "100parsec", `no unit "parsec" of length`, "nm"},
		{"dry-diameter", "0nm", "too small", "1 to 10000 nm"},
		{"dry-diameter", "-100nm", "too small", "1 to 10000 nm"},
		{"dry-diameter", "20um", "too large", "1 to 10000 nm"},
		{"dry-diameter", "1e300m", "no number that can be used", "nm"},
		{"dry-diameter", "1e999999999nm", "no number", "nm"},
		{"dry-diameter", "NaN", "no number", "nm"},
		{"dry-diameter", "Inf nm", "no number", "nm"},
		{"dry-diameter", "0,1um", "decimal sign", "nm"},
		{"dry-diameter", "1..2nm", "no number", "nm"},
		{"dry-diameter", "0x10nm", "no unit", "nm"},
		{"dry-diameter", "\x1b[2J100nm", "control characters", "nm"},
		{"dry-diameter", strings.Repeat("9", 5000) + "nm", "no number", "nm"},
		{"relative-humidity", "0.95", "no unit", "%"},
		{"relative-humidity", "0%", "too small", "more than 0"},
		{"relative-humidity", "120%", "too large", "110"},
		{"temperature", "20", "no unit", "°C"},
		{"temperature", "500C", "too large", "-40 to 50 °C"},
		{"kappa", "0.3nm", `no unit "nm"`, "catalogue"},
		{"kappa", "-0.1", "too small", "0 to 3"},
		{"points", "2.5", "no whole number", "100000"},
		{"points", "0", "too small", "100000"},
		{"water-activity", "kapa", "none of its words", "kappa, vant-hoff, ion-interaction"},
		{"component[0].substance", "amonium sulfat", "in the catalogue", "ammonium sulfate"},
		{"component[0].substance", "", "no name", "name"},
		{"component[0].share", "0", "too small", "more than 0"},
	} {
		s := Default()
		before := s.Clone()
		err := at(t, &s, c.path).SetWithUnit(c.text)
		var v *ValueError
		if !errors.As(err, &v) {
			t.Errorf("%s %.40q: error %v, want a *ValueError", c.path, c.text, err)
			continue
		}
		if v.Path != c.path || !strings.Contains(v.Problem, c.says) || !strings.Contains(v.Right, c.want) {
			t.Errorf("%s %.40q: %s: %v; want %q and %q", c.path, c.text, v.Path, err, c.says, c.want)
		}
		if len(err.Error()) > 300 {
			t.Errorf("%s: the message has %d bytes", c.path, len(err.Error()))
		}
		if !s.Equal(before) {
			t.Errorf("%s %.40q: refused, and the scenario is another one", c.path, c.text)
		}
	}
}

// On the screen a bare number is in the unit that stands there; a humidity that
// may be meant as a fraction is asked about.
func TestBareNumbers(t *testing.T) {
	s := Default()
	if err := at(t, &s, "dry-diameter").Set("140"); err != nil || s.DryDiameter != 140e-9 {
		t.Errorf("140 is %v m, %v", s.DryDiameter, err)
	}
	if err := at(t, &s, "relative-humidity").Set("90"); err != nil || s.RelativeHumidity != 0.9 {
		t.Errorf("90 is %v, %v", s.RelativeHumidity, err)
	}
	if err := at(t, &s, "relative-humidity").Set("0"); err == nil || !strings.Contains(err.Error(), "too small") {
		t.Errorf("0: %v", err) // it is the same in either unit
	}
	for _, text := range []string{"0.95", "1", "1.05"} {
		err := at(t, &s, "relative-humidity").Set(text)
		if err == nil || !strings.Contains(err.Error(), text+"%") {
			t.Errorf("%s: %v", text, err)
		}
	}
}

// What a file keeps is the number to the last bit.
func TestExact(t *testing.T) {
	for _, q := range []*quantity{drySize, wetRadius, kappaValue, airTemperature, humidity, tension, massDensity, molarMass, share} {
		span := q.max - q.min
		for i := range 2000 {
			x := q.min + span*math.Pow(float64(i+1)/2001, 3)
			text := q.exact(x)
			back, err := q.read(text, false)
			if err != nil || back != x {
				t.Fatalf("%s: %v is kept as %q and read as %v, %v", q.says, x, text, back, err)
			}
		}
	}
	if got := drySize.exact(1e-7); got != "100 nm" {
		t.Errorf("100 nm is kept as %q", got)
	}
}

// Steps lead to round numbers, stay in the range, end with a word, and a step
// back leads back.
func TestSteps(t *testing.T) {
	for _, in := range func() []Input { s := Default(); return Inputs(&s)[:len(fields)] }() {
		if in.Kind() != Number || in.Key() == "record" || in.Key() == "seed" { // a thousand million single steps
			continue
		}
		for _, big := range []bool{false, true} {
			s := Default()
			in := at(t, &s, in.Path())
			shown := map[string]bool{}
			for in.Step(1, big) == nil {
				now := in.Show(Style{})
				if shown[now] {
					t.Fatalf("%s: %s comes twice on the way up", in.Path(), now)
				}
				shown[now] = true
				if len(shown) > 5000 {
					t.Fatalf("%s does not end", in.Path())
				}
			}
			if err := in.Step(1, big); err == nil || !strings.Contains(err.Error(), "ends") {
				t.Errorf("%s: at its end: %v", in.Path(), err)
			}
			for in.Step(-1, big) == nil {
				if in.(slot[Scenario]).isWord() || in.Step(-1, big) != nil {
					continue // the number that follows a word may lie between two steps
				}
				before := in.Show(Style{})
				if before == "0" && in.Kind() == Number {
					continue // up from nothing leads to the usual value
				}
				if in.Step(1, big) != nil || in.Step(-1, big) != nil {
					t.Errorf("%s: no way back at %s", in.Path(), before)
				}
				if after := in.Show(Style{}); after != before {
					t.Fatalf("%s: up and down lead from %s to %s", in.Path(), before, after)
				}
			}
		}
	}
}

func TestStepTargets(t *testing.T) {
	for _, c := range []struct {
		path     Path
		from     string
		dir      int
		big      bool
		want     string
		wantBack string
	}{
		{"dry-diameter", "100nm", 1, false, "110 nm", "100 nm"},
		{"dry-diameter", "100nm", -1, false, "95 nm", "100 nm"},
		{"dry-diameter", "100nm", 1, true, "200 nm", "100 nm"},
		{"dry-diameter", "137nm", 1, false, "140 nm", "130 nm"},
		{"dry-diameter", "137nm", -1, false, "130 nm", "140 nm"},
		{"dry-diameter", "1nm", 1, false, "1.1 nm", "1 nm"},
		{"temperature", "25C", 1, false, "26.0 °C", "25.0 °C"},
		{"temperature", "25.4C", 1, false, "26.0 °C", "25.0 °C"},
		{"temperature", "-1C", 1, false, "0.0 °C", "-1.0 °C"},
		{"relative-humidity", "95%", 1, true, "100.0 %", "95.0 %"},
		{"kappa", "0.6", 1, false, "0.61", "0.6"},
		{"points", "200", 1, false, "220", "200"},
		{"surface-tension", "72mN/m", -1, false, "71.0 mN/m", "72.0 mN/m"},
		{"water-activity", "kappa", -1, false, "van 't Hoff", "kappa"},
		{"surface-tension", "solution", -1, false, "72.0 mN/m", "73.0 mN/m"},
		{"kappa", "catalogue", 1, false, "0.3", "0.29"},
	} {
		s := Default()
		in := at(t, &s, c.path)
		if err := in.SetWithUnit(c.from); err != nil {
			t.Fatal(err)
		}
		if err := in.Step(c.dir, c.big); err != nil {
			t.Fatal(err)
		}
		if got := in.Show(Style{}); got != c.want {
			t.Errorf("%s: from %s to %s, want %s", c.path, c.from, got, c.want)
		}
		if err := in.Step(-c.dir, c.big); err != nil {
			t.Fatal(err)
		}
		if got := in.Show(Style{}); got != c.wantBack {
			t.Errorf("%s: from %s and back to %s, want %s", c.path, c.from, got, c.wantBack)
		}
	}
}

func TestSeveralNumbers(t *testing.T) {
	for text, want := range map[string][]float64{
		"0.1%,0.2%,0.5%":  {0.001, 0.002, 0.005},
		"0.1, 0.2, 0.5 %": {0.001, 0.002, 0.005},
		"1%":              {0.01},
	} {
		s := Default()
		in := at(t, &s, "supersaturation")
		if err := in.SetWithUnit(text); err != nil || !slices.Equal(s.Supersaturations, want) {
			t.Errorf("%q is %v, %v; want %v", text, s.Supersaturations, err, want)
		}
	}
	s := Default()
	in := at(t, &s, "supersaturation")
	for text, want := range map[string]string{"0.1,0.2": "no unit", "0.1%,,0.2%": "no value", "0.1%,20%": "too large", "": "no value"} {
		if err := in.SetWithUnit(text); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
	if got := in.Show(Style{}); got != "0.1, 0.2, 0.4, 0.6, 1 %" {
		t.Errorf("shown as %q", got)
	}
}
