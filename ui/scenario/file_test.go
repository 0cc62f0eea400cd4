package scenario

import (
	"bytes"
	"errors"
	"strings"
	"testing"

	"dropcrest/solutes"
)

func decoded(t *testing.T, text string) Scenario {
	t.Helper()
	s, err := Decode("test.toml", strings.NewReader(text))
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func encoded(t *testing.T, s Scenario) string {
	t.Helper()
	var b bytes.Buffer
	if err := Encode(&b, s); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// Every input can be written and read back, whatever its value.
func TestFileKeepsEverything(t *testing.T) {
	s := Default()
	if back := decoded(t, encoded(t, s)); !back.Equal(s) {
		t.Errorf("the default comes back as %+v", back)
	}
	if err := SetRow(&s, "component", "sodium chloride share=0.25 kappa=1.1", false); err != nil {
		t.Fatal(err)
	}
	if err := SetRow(&s, "component", "kappa=0.1 density=1.4g/cm3 molar-mass=150g/mol ions=1 share=0.3333333333333333", false); err != nil {
		t.Fatal(err)
	}
	for _, in := range Inputs(&s) {
		if err := in.Step(1, false); err != nil {
			if err := in.Step(-1, false); err != nil && in.Kind() != Name && in.Kind() != File && in.Kind() != Numbers {
				t.Errorf("%s cannot be stepped: %v", in.Path(), err)
			}
		}
	}
	s.ToRadius.Number *= 2                                                          // above the first radius
	s.Measurements[0].Growth, s.Measurements[0].Humidity = Uncertain{}, Uncertain{} // beside a supersaturation
	if back := decoded(t, encoded(t, s)); !back.Equal(s) {
		t.Errorf("written %+v\nread    %+v\nas %s", s, back, encoded(t, s))
	}
}

func TestFileDefaults(t *testing.T) {
	if got := decoded(t, ""); !got.Equal(Default()) {
		t.Errorf("an empty file asks %+v", got)
	}
	s := decoded(t, "dry-diameter = '50 nm'\nkappa = 0.5\npoints = 1_000\n\n[[component]]\nsubstance = \"NaCl\"\n\n[[component]]\nkappa = 0.1\nshare = 2\n")
	if s.DryDiameter != 50e-9 || s.Points != 1000 || len(s.Components) != 2 || s.Components[0].Substance != "sodium chloride" ||
		s.Components[1].Share != 2 || s.Components[1].Kappa.Number != 0.1 || s.Components[1].Substance != "" {
		t.Errorf("read %+v", s)
	}
}

// Everything that is wrong is said, with its place.
func TestFileProblems(t *testing.T) {
	for name, c := range map[string]struct{ text, want string }{
		"unknown key":      {"temperature = '20 C'\ndry-diamter = '50 nm'", `f.toml:2:1: dry-diamter: no such key: did you mean dry-diameter?`},
		"no TOML":          {"this is prose", `f.toml:1:6: no TOML`},
		"range":            {"relative-humidity = '120 %'", `f.toml:1:21: relative-humidity: 120 % is too large`},
		"no unit":          {"dry-diameter = 100", `f.toml:1:16: dry-diameter: 100 has no unit`},
		"comma":            {"kappa = 0,5", `f.toml:1:10: `},
		"twice":            {"kappa = 0.5\nkappa = 0.6", `f.toml:2:1: `},
		"table":            {"[dry]\nx = 1", `f.toml:1:2: dry: no table "dry": want [[component]]`},
		"plain table":      {"[component]\nsubstance = 'NaCl'", `f.toml:1:2: component: no table`},
		"inline":           {"component = [{substance = 'NaCl'}]", `f.toml:1:1: component: no such key`},
		"bool":             {"kappa = true", `f.toml:1:9: kappa: neither text nor a number`},
		"hex":              {"points = 0x10", `f.toml:1:10: points: 0x10 is no decimal number`},
		"nan":              {"kappa = nan", `f.toml:1:9: kappa: "nan" is no number`},
		"substance":        {"[[component]]\nsubstance = 'sodium clorid'", `f.toml:2:13: substance: no substance "sodium clorid"`},
		"escape":           {"water-activity = \"\\u001b[2Jkappa\"", `f.toml:1:18: water-activity: `},
		"newer":            {"dropcrest-scenario = 2", `f.toml:1:22: dropcrest-scenario: version 2`},
		"contradiction":    {"to-radius = '1 um'\nfrom-radius = '2 um'", `f.toml:2:15: from-radius: the first wet radius`},
		"dotted":           {"kappa.x = 1", `f.toml:1:1: kappa.x: no such key`},
		"after components": {"[[component]]\nsubstance = 'NaCl'\ntemperature = '20 C'", `f.toml:3:1: temperature: no such key`},
	} {
		_, err := Decode("f.toml", strings.NewReader(c.text))
		var f *FileError
		if !errors.As(err, &f) {
			t.Errorf("%s: error %v, want a *FileError", name, err)
			continue
		}
		if !strings.HasPrefix(err.Error(), c.want) {
			t.Errorf("%s: %v\nwant %s", name, err, c.want)
		}
	}
	_, err := Decode("f.toml", strings.NewReader("kappa = 9\npoints = 0\nx = 1"))
	if got := strings.Count(err.Error(), "\n"); got != 2 {
		t.Errorf("three problems are said as %q", err)
	}
	if _, err := Decode("f.toml", strings.NewReader(strings.Repeat("#", largest+1))); err == nil || !strings.Contains(err.Error(), "128 KiB") {
		t.Errorf("a huge file: %v", err)
	}
}

// What a session has kept is read though a substance is not there any more.
func TestUnknownSubstanceOfASession(t *testing.T) {
	text := "[[component]]\nsubstance = 'my own organics'\n"
	s, err := DecodeUsing(nil, "f.toml", strings.NewReader(text))
	if err != nil || s.Components[0].Substance != "my own organics" {
		t.Errorf("%v, %v", s.Components, err)
	}
	if _, err := DecodeUsing(solutes.Standard(), "f.toml", strings.NewReader(text)); err == nil {
		t.Error("a substance that is not in the catalogue is taken")
	}
}

func FuzzDecode(f *testing.F) {
	f.Add("")
	f.Add("dropcrest-scenario = 1\ndry-diameter = '50 nm'\n[[component]]\nsubstance = 'NaCl'\nshare = 0.5\n")
	f.Add("kappa = 0x10\n[a.b]\n\"\\u001b\" = 1")
	f.Add("points = 1_0\nto-radius = '1 um'\r\nfrom-radius = \"\"\"2 um\"\"\"")
	f.Fuzz(func(t *testing.T, text string) {
		s, err := Decode("fuzz.toml", strings.NewReader(text))
		if err != nil {
			if strings.ContainsAny(err.Error(), "\x1b\x07\x00") {
				t.Errorf("the message can drive a terminal: %q", err)
			}
			return
		}
		if back := decoded(t, encoded(t, s)); !back.Equal(s) {
			t.Errorf("%+v comes back as %+v", s, back)
		}
	})
}

func FuzzValue(f *testing.F) {
	for _, text := range []string{"100nm", "0.95", "1e-7 m", "water", "72mN/m", "-5 °C", "1e400", "ammonium sulfate share=0.5 kappa=1", "\x1b[2J"} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s := Default()
		for _, in := range Inputs(&s) {
			err := in.SetWithUnit(text)
			if bareErr := in.Set(text); err == nil && bareErr != nil {
				t.Errorf("%s: %q is right with its unit and wrong without", in.Path(), text)
			}
		}
		if err := SetRow(&s, "component", text, true); err != nil && strings.ContainsAny(err.Error(), "\x1b\x07\x00") {
			t.Errorf("the message can drive a terminal: %q", err)
		}
		s.ToRadius = Measure{Word: "frame"} // not below the first radius
		if back := decoded(t, encoded(t, s)); !back.Equal(s) {
			t.Errorf("%q: %+v comes back as %+v", text, s, back)
		}
	})
}

// A population in a file: modes, files with offsets, lines of a mapping.
func TestPopulationFile(t *testing.T) {
	s := Default()
	for _, row := range []struct{ list, text string }{
		{"mode", "N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3"},
		{"data", "my sizes.csv offset=-90s"},
		{"map", "N_* (cm-3)=dN/dlog10D @*nm"},
	} {
		if err := SetRow(&s, row.list, row.text, true); err != nil {
			t.Fatal(err)
		}
	}
	if s.Modes[0].Number != 850e6 || s.Modes[0].Median != 45e-9 || s.Modes[0].Matter.Kappa.Number != 0.3 ||
		s.Data[0] != (DataFile{"my sizes.csv", -90}) || s.Map[0].Text != "N_* (cm-3)=dN/dlog10D @*nm" {
		t.Errorf("read %+v %+v %+v", s.Modes, s.Data, s.Map)
	}
	if back := decoded(t, encoded(t, s)); !back.Equal(s) {
		t.Errorf("written %+v\nread    %+v\nas %s", s, back, encoded(t, s))
	}
}
