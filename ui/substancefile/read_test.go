package substancefile

import (
	"errors"
	"fmt"
	"strings"
	"testing"

	"dropcrest/solutes"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

func read(text string) (*solutes.Catalogue, error) {
	return Extend(solutes.Standard(), "my.toml", strings.NewReader(text))
}

func find(t *testing.T, text, name string) solutes.Substance {
	t.Helper()
	c, err := read(text)
	if err != nil {
		t.Fatal(err)
	}
	s, ok := c.Find(name)
	if !ok {
		t.Fatalf("no %s in the catalogue", name)
	}
	return s
}

// Invented values.
const sample = `
[[substance]]
name = "my acid"
formula = "C9H99O9"
aliases = ["acid of mine"]
molar_mass = "150 g/mol"
density = {value = "1.4 g/cm3", low = "1300 kg/m3", high = 1500, source = "pycnometer"}
ions = 1
kappa = 0.12
solubility = 0.02
deliquescence = "97 %"
efflorescence = 0.5
surface_activity = {gamma_max = "3 umol/m2", k = "20 m3/mol", floor = "36 mN/m"}

[[substance]]
name = "my salt"
source = "my notebook"
density = 2000
molar_mass = 0.1

[substance.ion]
cation_charge = 1
anion_charge = 1
cations = 1
anions = 1
beta0 = 0.08
beta1 = 0.27
c_phi = 0.001
max_molality = 5
`

func TestExtend(t *testing.T) {
	acid := find(t, sample, "acid of mine")
	want := func(what string, got solutes.Datum, value, low, high float64, source string) {
		t.Helper()
		if got != (solutes.Datum{Value: value, Low: low, High: high, Source: source, Evidence: solutes.User}) {
			t.Errorf("%s is %+v", what, got)
		}
	}
	want("molar mass", acid.MolarMass, 0.15, 0, 0, "user")
	want("density", acid.Density, 1400, 1300, 1500, "pycnometer")
	want("deliquescence", acid.Deliquescence, 0.97, 0, 0, "user")
	want("efflorescence", acid.Efflorescence, 0.5, 0, 0, "user")
	want("surface excess", acid.SurfaceActivity.GammaMax, 3e-6, 0, 0, "user")
	want("floor", acid.SurfaceActivity.Floor, 0.036, 0, 0, "user")
	salt := find(t, sample, "my salt")
	want("density", salt.Density, 2000, 0, 0, "my notebook")
	if salt.Ion == nil || salt.Ion.MaxMolality != 5 || salt.Ions.Value != 2 {
		t.Errorf("ion parameters %+v of %g ions", salt.Ion, salt.Ions.Value)
	}
	if _, ok := solutes.Standard().Find("my acid"); ok {
		t.Error("the embedded catalogue has changed")
	}
}

// Nothing in the file is nothing added; a list of inline tables is a list too.
func TestOtherForms(t *testing.T) {
	if c, err := read("# nothing yet\n"); err != nil || len(c.All()) != len(solutes.Standard().All()) {
		t.Errorf("an empty file: %v", err)
	}
	if s := find(t, `substance = [{name = "x0"}, {name = "x1", kappa = 0.2}]`, "x1"); s.Kappa.Value != 0.2 {
		t.Errorf("inline: %+v", s)
	}
	if s := find(t, "[[substance]]\nname = 'x'\ndensity.value = '1.2 g/cm3'\ndensity.source = 'me'\n", "x"); s.Density.Value != 1200 || s.Density.Source != "me" {
		t.Errorf("dotted: %+v", s.Density)
	}
}

// Every error says where it is, what it is about, and what would be right.
func TestErrors(t *testing.T) {
	const head = "[[substance]]\nname = \"x\"\n"
	for name, c := range map[string]struct {
		text string
		want []string
		more bool // there are others
	}{
		"syntax":           {"[[substance]\n", []string{"my.toml:1:"}, false},
		"unknown at top":   {"kappa = 1\n", []string{"my.toml:1:1: kappa: no such key: want [[substance]]"}, false},
		"no list":          {"[substance]\nname = 'x'\n", []string{"my.toml:1:2: substance: no list of tables: want [[substance]]"}, false},
		"no table":         {"substance = [1]\n", []string{"my.toml:1:14: substance: no table"}, false},
		"no name":          {"\n[[substance]]\nkappa = 1\n", []string{"my.toml:2:3: substance 1: name is nothing, should be a name"}, false},
		"unknown key":      {head + "densty = 1400\n", []string{"my.toml:3:1: substance x: densty is not a known key, should be density"}, false},
		"quoted key":       {head + "\"a b\" = 1\n", []string{"my.toml:3:1: substance x: \"a b\" is not a known key"}, false},
		"range":            {head + "density = 1.4\n", []string{"my.toml:3:11: substance x: density is 1.4, should be 100 to 25000 kg/m³"}, false},
		"range of text":    {head + "density = \"1 kg/m3\"\n", []string{"my.toml:3:11: substance x: density is 1, should be 100 to 25000 kg/m³"}, false},
		"no unit":          {head + "density = \"1400\"\n", []string{"my.toml:3:11: density: 1400 has no unit: want a unit, such as 1.4", "kg/m³ without quotes"}, true},
		"wrong unit":       {head + "density = \"1.4 nm\"\n", []string{"my.toml:3:11: density: no unit \"nm\" of density"}, false},
		"unit in table":    {head + "density = {source = 's', value = \"1400\"}\n", []string{"my.toml:3:34: density.value: 1400 has no unit"}, false},
		"bounds":           {head + "[substance.density]\nvalue = 1400\nlow = 1500\n", []string{"my.toml:5:7: substance x: density.low is 1500, should be at most the value 1400"}, false},
		"no value":         {head + "density = {source = 's'}\n", []string{"my.toml:3:11: substance x: density.value is nothing"}, false},
		"nested":           {head + "[substance.ion]\nbeta0 = 1000\n", []string{"my.toml:4:9: substance x: ion.beta0 is 1000, should be -10 to 100 kg/mol", "my.toml:3:12: substance x: ion.cations is nothing"}, true},
		"nested key":       {head + "adsorption = {a = 2, b = 1, c = 3}\n", []string{"my.toml:3:29: substance x: adsorption.c is not a known key"}, false},
		"alias":            {head + "aliases = [\"y\", 3]\n", []string{"my.toml:3:17: substance x: aliases[1] is 3, should be text"}, false},
		"empty list":       {head + "concentrated = {activity = [], max_mass_percent = 40}\n", []string{"my.toml:3:17: substance x: concentrated.activity is []"}, false},
		"kind":             {head + "kappa = true\n", []string{"my.toml:3:9: substance x: kappa is true, should be a number"}, false},
		"not a number":     {head + "kappa = nan\n", []string{"my.toml:3:9: substance x: kappa is NaN"}, false},
		"date":             {head + "kappa = 1979-05-27\n", []string{"my.toml:3:9: substance x: kappa is 1979-05-27"}, false},
		"number as name":   {"[[substance]]\nname = 3\n", []string{"my.toml:2:8: substance 1: name is 3, should be text"}, false},
		"second record":    {head + "[[substance]]\nname = \"y\"\nkappa = -1\n", []string{"my.toml:5:9: substance y: kappa is -1"}, false},
		"control":          {"[[substance]]\nname = \"x\\u001b[31m\"\n", []string{"my.toml:2:8: name: the text holds control characters"}, false},
		"writing turned":   {head + "remarks = [\"a\\u202eb\"]\n", []string{"my.toml:3:12: remarks[0]: the text holds control characters"}, false},
		"of the catalogue": {"[[substance]]\nname = \"NaCl\"\n", []string{"my.toml:2:8: substance NaCl: name is \"NaCl\", should be a name that does not stand for sodium chloride already"}, false},
		"alias taken":      {head + "aliases = [\"salty\", \"halite\"]\n", []string{"my.toml:3:21: substance x: aliases[1] is \"halite\""}, false},
		"key taken":        {"[[substance]]\nname = \"a\"\nkey = \"sucrose\"\n", []string{"my.toml:3:7: substance a: key is \"sucrose\""}, false},
		"twice":            {head + head, []string{"my.toml:4:8: substance x: name is \"x\", should be a name that does not stand for x already"}, false},
		"together":         {head + "deliquescence = 0.4\nefflorescence = 0.5\n", []string{"my.toml:4:17: substance x: efflorescence is 0.5, should be at most the deliquescence humidity 0.4"}, false},
		"several": {head + "densty = 1\nkappa = 99\n[[substance]]\nname = \"sucrose\"\n", []string{
			"my.toml:3:1: substance x: densty", "my.toml:4:9: substance x: kappa", "my.toml:6:8: substance sucrose: name"}, false},
	} {
		_, err := read(c.text)
		var all scenario.FileErrors
		if !errors.As(err, &all) {
			t.Errorf("%s: %v, want errors of the file", name, err)
			continue
		}
		for _, want := range c.want {
			if !strings.Contains(err.Error(), want) {
				t.Errorf("%s: got\n%v\nwant %s", name, err, want)
			}
		}
		if !c.more && len(all) != len(c.want) {
			t.Errorf("%s: %d errors, want %d:\n%v", name, len(all), len(c.want), err)
		}
	}
}

// Files that are far too large, or far too deep, are refused in short.
func TestLimits(t *testing.T) {
	for name, text := range map[string]string{
		"large":       strings.Repeat("# nothing\n", 128<<10/10+1),
		"records":     strings.Repeat("[[substance]]\nname='x'\n", mostRecords+1),
		"deep":        "a = " + strings.Repeat("[", 60000) + strings.Repeat("]", 60000),
		"long key":    strings.Repeat("a.", 60000) + "a = 1",
		"unknown key": "[[substance]]\nname='x'\n" + manyKeys(3000),
	} {
		_, err := read(text)
		if err == nil || len(err.Error()) > 30000 {
			t.Errorf("%s: %.300v", name, err)
		}
	}
	_, err := read("[[substance]]\nname='x'\n" + manyKeys(60))
	var all scenario.FileErrors
	if errors.As(err, &all); len(all) != mostProblems || !strings.HasSuffix(err.Error(), "my.toml:52:1: and 11 more problems from here on") {
		t.Errorf("%d problems, want %d, the last one saying how many more:\n%v", len(all), mostProblems, err)
	}
}

func manyKeys(n int) string {
	var b strings.Builder
	for i := range n {
		fmt.Fprintf(&b, "k%d = 1\n", i)
	}
	return b.String()
}

// Whatever stands in a file: an answer or errors with a place that exists, which
// cannot drive a terminal.
func FuzzExtend(f *testing.F) {
	for _, text := range []string{sample, "substance = [{name = 'a'}]", "[[substance.a]]\n[[substance.a]]\nb = 1", "[[substance]]\n\"\\u001b\" = \"\\u001b\"\nion.beta0 = [[1]]"} {
		f.Add(text)
	}
	f.Fuzz(func(t *testing.T, text string) {
		c, err := read(text)
		if err == nil {
			for _, s := range c.All() {
				if s.Name != plain.Clean(s.Name) || s.Key == "" {
					t.Fatalf("%q got in", s.Name)
				}
			}
			return
		}
		var all scenario.FileErrors
		if !errors.As(err, &all) {
			t.Fatalf("%v has no place", err)
		}
		lines := strings.Count(text, "\n") + 1
		for _, e := range all {
			if e.Line < 1 || e.Line > lines || e.Column < 1 {
				t.Errorf("%v: the text has %d lines", e, lines)
			}
			if said := e.Error(); said != plain.Clean(said) {
				t.Errorf("%q could drive a terminal", said)
			}
		}
	})
}
