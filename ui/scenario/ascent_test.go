package scenario

import (
	"errors"
	"math"
	"strings"
	"testing"
)

func TestAscentInputs(t *testing.T) {
	s := Default()
	for _, c := range []struct {
		path, text, shown string
		si                float64
	}{
		{"updraft", "50cm/s", "0.5 m/s", 0.5},
		{"updraft-spread", "0.3m/s", "0.3 m/s", 0.3},
		{"pressure", "900hPa", "900 hPa", 90000},
		{"pressure", "85000Pa", "850 hPa", 85000},
		{"start-humidity", "95%", "95.0 %", 0.95},
		{"mass-accommodation", "0.06", "0.06", 0.06},
		{"tolerance", "1e-6", "0.000001", 1e-6},
		{"height", "0.3km", "300 m", 300},
	} {
		in := at(t, &s, Path(c.path))
		if err := in.SetWithUnit(c.text); err != nil {
			t.Errorf("%s=%s: %v", c.path, c.text, err)
			continue
		}
		if got := in.Show(Style{}); got != c.shown {
			t.Errorf("%s=%s is shown as %q, want %q", c.path, c.text, got, c.shown)
		}
		if _, got := in.SI(); math.Abs(got.(float64)/c.si-1) > 1e-12 && math.Abs(got.(float64)/(100*c.si)-1) > 1e-12 {
			t.Errorf("%s=%s is %v, want %g", c.path, c.text, got, c.si)
		}
	}
	for _, c := range []struct{ path, text, want string }{
		{"updraft", "-1m/s", "too small"},
		{"pressure", "900", "has no unit"},
		{"start-humidity", "0.95", "has no unit"},
		{"start-humidity", "101%", "too large"},
		{"tolerance", "1e-3", "too large"}, // not safe: DEVELOPERS.md
		{"transition", "fuchs", "none of its words"},
		{"sweep", "updraft", "a sweep of 1 quantity"},
	} {
		err := at(t, &s, Path(c.path)).SetWithUnit(c.text)
		if err == nil || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s=%s: %v, want %q", c.path, c.text, err, c.want)
		}
	}
}

// A copy shares no sizes that are followed, and they count in comparison.
func TestFollowIsCloned(t *testing.T) {
	a := Default()
	b := a.Clone()
	b.Follow[0] = 1e-9
	if a.Follow[0] == 1e-9 {
		t.Error("a change of the copy changes the original")
	}
	if a.Equal(b) {
		t.Error("other sizes are followed, and both are equal")
	}
}

// The ending of a number says of which air it is, and survives a file.
func TestNumberAtStandardAir(t *testing.T) {
	for text, want := range map[string]Mode{
		"N=850/cm3 Dg=45nm gsd=1.6":         {Number: 850e6, Air: "start"},
		"N=850/cm3stp Dg=45nm gsd=1.6":      {Number: 850e6, Air: "stp"},
		"N=850/cm³ STP Dg=45nm gsd=1.6":     {Number: 850e6, Air: "stp"},
		"N=850/cm3 air=stp Dg=45nm gsd=1.6": {Number: 850e6, Air: "stp"},
	} {
		s := Default()
		if err := SetRow(&s, "mode", text, true); err != nil {
			t.Errorf("%s: %v", text, err)
			continue
		}
		if m := s.Modes[0]; m.Number != want.Number || m.Air != want.Air {
			t.Errorf("%s: %g per m³ of air %q, want %g of %q", text, m.Number, m.Air, want.Number, want.Air)
		}
		if back := decoded(t, encoded(t, s)); !back.Equal(s) {
			t.Errorf("%s comes back as %+v", text, back.Modes)
		}
		if got := strings.Contains(Lists(&s)[3].Show(Style{}), "STP"); got != (want.Air == "stp") {
			t.Errorf("%s is shown as %q", text, Lists(&s)[3].Show(Style{}))
		}
	}
	s := Default()
	if err := SetRow(&s, "mode", "N=850/cm3ntp Dg=45nm gsd=1.6", true); err == nil || !strings.Contains(err.Error(), `no unit "/cm3ntp"`) {
		t.Errorf("another state of the air: %v", err)
	}
}

func TestParseSweep(t *testing.T) {
	axes, err := ParseSweep("updraft=0.05..5m/s:20:log number=100..10000/cm3:3:log")
	if err != nil {
		t.Fatal(err)
	}
	x, y := axes[0], axes[1]
	if x.Path != "updraft" || len(x.Values) != 20 || x.Values[0] != 0.05 || x.Values[19] != 5 || !x.Log || x.Key() != "updraft_m_per_s" {
		t.Errorf("across: %+v", x)
	}
	if y.Path != NumberOfAll || len(y.Values) != 3 || y.Values[0] != 100e6 || math.Abs(y.Values[1]/1000e6-1) > 1e-12 || y.Values[2] != 10000e6 {
		t.Errorf("down: %+v", y)
	}
	axes, err = ParseSweep("temperature=0..20C:5 mode[1].Dg=50nm..0.2um:2:lin")
	if err != nil {
		t.Fatal(err)
	}
	if got := axes[0].Values; got[0] != 273.15 || got[4] != 293.15 || math.Abs(got[1]-278.15) > 1e-9 {
		t.Errorf("temperatures %v", got)
	}
	if got := axes[1].Values; got[0] != 50e-9 || got[1] != 200e-9 {
		t.Errorf("sizes %v", got)
	}
	s := Default()
	for i, want := range []func() float64{func() float64 { return s.Temperature }, func() float64 { return s.Modes[1].Median }} {
		if err := axes[i].Set(&s, axes[i].Values[1]); err != nil || want() != axes[i].Values[1] {
			t.Errorf("%s is set to %g: %v", axes[i].Path, want(), err)
		}
	}
}

// What is wrong with a sweep is said with its place.
func TestSweepErrors(t *testing.T) {
	const good = "updraft=0.05..5m/s:20:log "
	for text, want := range map[string]string{
		"updraft=0.05..5m/s:20:log":                    "a sweep of 1 quantity",
		good + "updrft":                                `"updrft", from character 27 on: no sign =`,
		good + "updrft=1..2:3":                         "no quantity \"updrft\"",
		good + "number=100..1000:3":                    "100 has no unit",
		good + "number=100-1000/cm3:3":                 "has no .. in it",
		good + "number=100..1e9/cm3:3":                 "too large",
		good + "number=100..1000/cm3":                  "not of the form",
		good + "number=100..1000/cm3:1":                `"1" is no number of points`,
		good + "number=100..1000/cm3:3:lgo":            `"lgo" is no spacing`,
		good + "number=100..100/cm3:3":                 "both ends are",
		good + "updraft=1..2m/s:3":                     "both quantities are updraft",
		"updraft=0..5m/s:20:log kappa=0.1..0.5:3":      "from character 1 on: logarithmic from 0",
		"updraft=1..5m/s:1000 kappa=0.1..0.5:1000":     "1000000 cells",
		good + "mode[9].N=100..1000/cm3:3":             "no quantity",
		good + "substance=1..2:3":                      "no quantity",
		good + "follow=1..2nm:3":                       "no quantity",
		good + "\x1b[31mnumber=100..1000/cm3:3":        "no quantity",
		"updraft=0.05..5m/s:20:log:x number=1..2/m3:3": "not of the form",
	} {
		_, err := ParseSweep(text)
		var v *ValueError
		if !errors.As(err, &v) || !strings.Contains(err.Error(), want) || v.Right == "" || v.Path != "sweep" {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
	}
}

func FuzzSweep(f *testing.F) {
	f.Add("updraft=0.05..5m/s:20:log number=100..10000/cm3:20:log")
	f.Add("temperature=0..20C:5 mode[1].Dg=50nm..0.2um:2:lin")
	f.Add("a=..:: mode[].=..")
	f.Fuzz(func(t *testing.T, text string) {
		axes, err := ParseSweep(text)
		if err != nil {
			if strings.ContainsAny(err.Error(), "\x1b\x07\x00") {
				t.Errorf("the message can drive a terminal: %q", err)
			}
			return
		}
		for _, a := range axes {
			s := Default()
			for _, x := range a.Values {
				if math.IsNaN(x) || math.IsInf(x, 0) {
					t.Fatalf("%q has %g", text, x)
				}
				if a.Path == NumberOfAll {
					continue
				}
				if err := a.Set(&s, x); err != nil && !strings.HasPrefix(string(a.Path), "mode[") {
					t.Errorf("%q: %v", text, err)
				}
			}
		}
	})
}

func TestCases(t *testing.T) {
	base := Default()
	base.Population = "modes"
	c, err := NewCases(&base, []string{"case", "updraft", "start_humidity_percent", " mode[0].N", "mode[1].dg_m", "transition", "temperature_k"})
	if err != nil {
		t.Fatal(err)
	}
	s, label, err := c.Row(base, []string{"first", "0.3 m/s", "97.5", "500/cm3stp", "1.2e-7", "continuum", "280"})
	if err != nil {
		t.Fatal(err)
	}
	if label != "first" || s.Updraft != 0.3 || s.StartHumidity != 0.975 || s.Modes[0].Number != 500e6 || s.Modes[0].Air != "stp" ||
		s.Modes[1].Median != 120e-9 || s.Transition != "continuum" || s.Temperature != 280 {
		t.Errorf("%q %+v", label, s)
	}
	if base.Modes[0].Number == 500e6 {
		t.Error("a row changes what it started from")
	}
	if s, _, err = c.Row(base, []string{"", "", "", "", "", "", ""}); err != nil || !s.Equal(base) {
		t.Errorf("an empty row: %v", err)
	}
	for name, bad := range map[string]struct {
		cells []string
		want  string
	}{
		"no unit": {[]string{"", "0.3", "", "", "", "", ""}, "column 2, updraft: 0.3 has no unit"},
		"range":   {[]string{"", "", "130", "", "", "", ""}, "column 3, start_humidity_percent: 130% is too large"},
		"word":    {[]string{"", "", "", "", "", "fast", ""}, "column 6, transition: \"fast\" is none of its words"},
		"cells":   {[]string{"", ""}, "2 cells: want 7"},
	} {
		if _, _, err := c.Row(base, bad.cells); err == nil || !strings.Contains(err.Error(), bad.want) {
			t.Errorf("%s: %v, want %q", name, err, bad.want)
		}
	}
	for names, want := range map[string]string{
		"updrft":                  "column 1, updrft: no quantity has this name: did you mean updraft?",
		"updraft;updraft_m_per_s": "column 2, updraft_m_per_s: the quantity stands twice",
		"case;case":               "column 2, case: no quantity",
		"mode[7].N":               "no quantity has this name",
	} {
		if _, err := NewCases(&base, strings.Split(names, ";")); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: %v, want %q", names, err, want)
		}
	}
}
