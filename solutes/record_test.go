package solutes

import (
	"encoding/json"
	"errors"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"
)

var evidence = regexp.MustCompile(`"evidence":"[a-z]+"`)

// withoutEvidence is a substance as JSON with all evidence alike.
func withoutEvidence(t testing.TB, s Substance) string {
	t.Helper()
	text, err := json.Marshal(s)
	if err != nil {
		t.Fatal(err)
	}
	return evidence.ReplaceAllString(string(text), `"evidence":"user"`)
}

func embeddedRecords(t testing.TB) []map[string]any {
	t.Helper()
	var records []map[string]any
	if err := json.Unmarshal(catalogueJSON, &records); err != nil {
		t.Fatal(err)
	}
	return records
}

// A user's record knows the same keys as the embedded catalogue: every embedded
// record is a usable one, and the substance made of it is the embedded one.
func TestEmbeddedRecordsAreUserRecords(t *testing.T) {
	for i, fields := range embeddedRecords(t) {
		got, err := NewSubstance("", fields)
		if err != nil {
			t.Errorf("%v: %v", fields["key"], err)
			continue
		}
		if got, want := withoutEvidence(t, got), withoutEvidence(t, Standard().All()[i]); got != want {
			t.Errorf("got  %s\nwant %s", got, want)
		}
	}
}

// Every value of a user's record is a user's.
func TestRecordEvidence(t *testing.T) {
	for _, fields := range embeddedRecords(t) {
		s, _ := NewSubstance("", fields)
		for field, d := range datums(s) {
			if d.Known() && d.Evidence != User {
				t.Errorf("%s %s: evidence %q", s.Key, field, d.Evidence)
			}
		}
	}
}

func TestShortRecord(t *testing.T) {
	s, err := NewSubstance("1", map[string]any{
		"name": "My Salt", "aliases": []any{"ms"}, "molar_mass": 0.1, "density": int64(1500), "ions": 0.0, "kappa": int64(0),
		"efflorescence": map[string]any{"value": 0.3, "low": 0.2, "source": "our trap"}, "source": "our laboratory",
	})
	if err != nil {
		t.Fatal(err)
	}
	if s.Key != "my_salt" || s.Name != "My Salt" || !slices.Equal(s.Aliases, []string{"ms"}) || !s.Insoluble() {
		t.Errorf("%+v", s)
	}
	for _, c := range []struct{ got, want Datum }{
		{s.Density, Datum{Value: 1500, Source: "our laboratory", Evidence: User}},
		{s.Kappa, Datum{Value: 0, Source: "our laboratory", Evidence: User}},
		{s.Efflorescence, Datum{Value: 0.3, Low: 0.2, Source: "our trap", Evidence: User}},
		{s.Deliquescence, Datum{}},
	} {
		if c.got != c.want {
			t.Errorf("%+v, want %+v", c.got, c.want)
		}
	}
	plain, err := NewSubstance("1", map[string]any{"name": "acid", "solubility": 0.025, "density": 1360.})
	if err != nil || plain.Density.Source != "user" {
		t.Errorf("%+v, %v", plain.Density, err)
	}
	near(t, "C of adipic acid by its solubility", plain.VolumeSolubility.Value, 0.0183, 2e-3)
}

func saltRecord(change func(map[string]any)) map[string]any {
	r := map[string]any{
		"name": "salt", "molar_mass": 0.132, "density": 1770.,
		"ion": map[string]any{"cation_charge": int64(1), "anion_charge": int64(2), "cations": int64(2), "anions": int64(1),
			"beta0": 0.04, "beta1": 0.66, "c_phi": -0.001, "max_molality": 5.5},
		"concentrated": map[string]any{"activity": []any{-2.715e-3, 3.113e-5, -2.336e-6, 1.412e-8}, "max_mass_percent": int64(78),
			"join_low": 3., "join_high": 5.},
	}
	change(r)
	return r
}

func inside(table string, key string, value any) func(map[string]any) {
	return func(r map[string]any) {
		if table != "" {
			r = r[table].(map[string]any)
		}
		if value == nil {
			delete(r, key)
			return
		}
		r[key] = value
	}
}

func TestRecordErrors(t *testing.T) {
	if _, err := NewSubstance("1", saltRecord(func(map[string]any) {})); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		name   string
		change func(map[string]any)
		want   RecordError
	}{
		{"g/cm³", inside("", "density", 1.77), RecordError{"salt", "density", "1.77", "100 to 25000 kg/m³"}},
		{"g/mol", inside("", "molar_mass", 132.14), RecordError{"salt", "molar_mass", "132.14", "0.001 to 10 kg/mol"}},
		{"percent", inside("", "deliquescence", 79.9), RecordError{"salt", "deliquescence", "79.9", "0 to 1"}},
		{"text for a number", inside("", "density", "heavy"), RecordError{"salt", "density", `"heavy"`, "a number, 100 to 25000 kg/m³"}},
		{"NaN", inside("", "kappa", math.NaN()), RecordError{"salt", "kappa", "NaN", "0 to 10"}},
		{"typing error", inside("", "densty", 1770.), RecordError{"salt", "densty", "not a known key", "density"}},
		{"in a table", inside("ion", "beta", 1.), RecordError{"salt", "ion.beta", "not a known key", "beta0"}},
		{"gap in a table", inside("ion", "beta0", nil), RecordError{"salt", "ion.beta0", "nothing", "-10 to 100 kg/mol"}},
		{"half an ion", inside("ion", "cations", 1.5), RecordError{"salt", "ion.cations", "1.5", "a whole number from 1 to 4"}},
		{"charges", inside("ion", "anions", int64(2)), RecordError{"salt", "ion.anions", "2", "such that charges balance: 2 of charge 1 against 2 of charge 2 do not"}},
		{"2-2 salt", func(r map[string]any) {
			ion := r["ion"].(map[string]any)
			ion["cation_charge"], ion["cations"], r["ions"] = int64(2), int64(1), 2.
		}, RecordError{"salt", "ion.anion_charge", "2", "1 beside a cation of charge 2"}},
		{"ions", inside("", "ions", 2.), RecordError{"salt", "ions", "2", "3, as the ion parameters say"}},
		{"no table", inside("", "ion", 3.), RecordError{"salt", "ion", "3", "a table"}},
		{"five coefficients", inside("concentrated", "activity", []any{1., 1., 1., 1., 1.}), RecordError{"salt", "concentrated.activity", "[1 1 1 1 1]", "a list of 1 to 4 numbers"}},
		{"a word among them", inside("concentrated", "activity", []any{1., "x"}), RecordError{"salt", "concentrated.activity[1]", `"x"`, "a number, a finite number"}},
		{"join upside down", inside("concentrated", "join_high", 2.), RecordError{"salt", "concentrated.join_high", "2", "above join_low, 3 mol/kg, which is above 0"}},
		{"join beyond the ions", inside("concentrated", "join_high", 6.), RecordError{"salt", "concentrated.join_high", "6", "at most 5.5 mol/kg, where the ion parameters end"}},
		{"rising activity", inside("concentrated", "activity", []any{0.01}), RecordError{"salt", "concentrated",
			"such that the water activity does not fall with concentration", "checked against its source"}},
		{"rising activity in the cold", inside("ion", "temperature", map[string]any{"low": 230., "high": 300., "beta0": []any{0., 0., 0.1, 0.}}),
			RecordError{"salt", "ion", "such that the water activity does not fall with concentration at", "checked against its source"}},
		{"adsorbing salt", inside("", "adsorption", map[string]any{"a": 1., "b": 1.}), RecordError{"salt", "ions", "3", "0, insoluble, where adsorption is given"}},
		{"half an isotherm", inside("", "adsorption", map[string]any{"a": 1.}), RecordError{"salt", "adsorption.b", "nothing", "a number"}},
		{"bounds", inside("", "kappa", map[string]any{"value": 0.5, "low": 0.6}), RecordError{"salt", "kappa.low", "0.6", "at most the value 0.5"}},
		{"branches", func(r map[string]any) { r["deliquescence"], r["efflorescence"] = 0.5, 0.6 },
			RecordError{"salt", "efflorescence", "0.6", "at most the deliquescence humidity 0.5"}},
		{"law without a value", inside("", "deliquescence_law", map[string]any{"exponent": 30., "low": 273., "high": 300.}),
			RecordError{"salt", "deliquescence", "nothing", "the humidity at 25 °C that its law starts from"}},
		{"escape sequence", inside("", "formula", "\x1b[2J"), RecordError{"salt", "formula", `"\x1b[2J"`, "text of at most 400 characters without control characters"}},
		{"alias", inside("", "aliases", []any{" "}), RecordError{"salt", "aliases[0]", `" "`, "a name"}},
		{"no name", inside("", "name", nil), RecordError{"1", "name", "nothing", `a name, such as "my salt"`}},
	} {
		_, err := NewSubstance("1", saltRecord(c.change))
		var got *RecordError
		if !errors.As(err, &got) {
			t.Errorf("%s: %v", c.name, err)
			continue
		}
		if got.Record != c.want.Record || got.Field != c.want.Field || !strings.HasPrefix(got.Given, c.want.Given) || !strings.HasPrefix(got.Right, c.want.Right) {
			t.Errorf("%s: %+v, want %+v", c.name, *got, c.want)
		}
	}
}

// All that is wrong comes at once.
func TestRecordErrorsAreJoined(t *testing.T) {
	_, err := NewSubstance("1", map[string]any{"name": "x", "density": 1., "kappa": -1., "zz": 0})
	all, ok := err.(interface{ Unwrap() []error })
	if !ok || len(all.Unwrap()) != 3 {
		t.Errorf("%v, want three errors", err)
	}
}

func TestGaps(t *testing.T) {
	for _, c := range []struct {
		name string
		want []string
	}{
		{"NaCl", nil},
		{"soot", []string{"parameters of adsorption"}},
		{"quartz", []string{"molar mass"}},
		{"pinic acid", []string{"dry density", "κ from growth factors", "solubility at 25 °C", "solubility C at 25 °C",
			"deliquescence humidity at 25 °C", "efflorescence humidity", "rise of surface tension",
			"water activity beyond a constant κ", "constants of surface activity"}},
	} {
		if got := find(t, c.name).Gaps(); !slices.Equal(got, c.want) {
			t.Errorf("%s: %q, want %q", c.name, got, c.want)
		}
	}
}

func TestExtend(t *testing.T) {
	mine, err := NewSubstance("1", map[string]any{"name": "my salt", "kappa": 0.7})
	if err != nil {
		t.Fatal(err)
	}
	c, err := Standard().Extend([]Substance{mine})
	if err != nil {
		t.Fatal(err)
	}
	if s, ok := c.Find("My-Salt"); !ok || s.Kappa.Value != 0.7 || s.Kappa.Evidence != User {
		t.Errorf("%+v, %v", s, ok)
	}
	if _, ok := Standard().Find("my salt"); ok {
		t.Error("the embedded catalogue has changed")
	}
	for _, c := range []struct {
		name   string
		change func(*Substance)
		field  string
	}{
		{"key", func(s *Substance) { s.Key = "sucrose" }, "key"},
		{"name", func(s *Substance) { s.Name = "Soot" }, "name"},
		{"formula", func(s *Substance) { s.Formula = "NaCl" }, "formula"},
		{"alias with a formula", func(s *Substance) { s.Formula = "X"; s.Aliases = []string{"y", "halite"} }, "aliases[1]"},
		{"alias without", func(s *Substance) { s.Aliases = []string{"halite"} }, "aliases[0]"},
		{"no key", func(s *Substance) { s.Key = "-" }, "key"},
	} {
		s := mine
		c.change(&s)
		_, err := Standard().Extend([]Substance{s})
		var got *RecordError
		if !errors.As(err, &got) || got.Field != c.field || got.Record != s.Name {
			t.Errorf("%s: %v, want field %s", c.name, err, c.field)
		}
	}
}

// FuzzRecord reads any JSON object as a record: it must not panic, and what is
// accepted must serve every model without harm.
func FuzzRecord(f *testing.F) {
	for _, fields := range embeddedRecords(f) {
		text, _ := json.Marshal(fields)
		f.Add(string(text))
	}
	f.Add(`{"name": "x", "ion": {"cations": 1}}`)
	f.Fuzz(func(t *testing.T, text string) {
		var fields map[string]any
		if json.Unmarshal([]byte(text), &fields) != nil {
			return
		}
		s, err := NewSubstance("1", fields)
		if err != nil {
			return
		}
		for _, model := range []Model{KappaModel, VantHoff, IonInteraction} {
			r := Recipe{Parts: []Part{{s, 1}}, Model: model, Kappa: math.NaN(), VantHoffFactor: math.NaN(),
				DensityRule: Measured, TensionRule: SolutionRule, Temperature: 283.15}
			d, _, err := Dissolve(r)
			if err != nil {
				continue
			}
			for _, u := range []float64{0.01, 1, 100, 1e6} {
				if l, slope := d.Solution.LnActivity(u); math.IsNaN(l) || l > 0 || slope < 0 {
					t.Errorf("%v: ln a_w(%g) = %g, slope %g", model, u, l, slope)
				}
			}
		}
	})
}
