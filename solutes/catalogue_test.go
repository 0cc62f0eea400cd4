package solutes

import (
	"reflect"
	"slices"
	"testing"
)

// datums returns every Datum of a substance by the name of its field.
func datums(s Substance) map[string]Datum {
	found := map[string]Datum{}
	v := reflect.ValueOf(s)
	for i := range v.NumField() {
		if d, ok := v.Field(i).Interface().(Datum); ok {
			found[v.Type().Field(i).Name] = d
		}
	}
	if s.Adsorption != nil {
		found["Adsorption.A"], found["Adsorption.B"] = s.Adsorption.A, s.Adsorption.B
	}
	return found
}

func TestEveryValueHasASource(t *testing.T) {
	allowed := []Evidence{Read, Memory, Computed}
	for _, s := range Standard().All() {
		for field, d := range datums(s) {
			switch {
			case !d.Known() && d != (Datum{}):
				t.Errorf("%s %s: a value without evidence: %+v", s.Key, field, d)
			case d.Known() && (d.Source == "" || !slices.Contains(allowed, d.Evidence)):
				t.Errorf("%s %s: source %q, evidence %q", s.Key, field, d.Source, d.Evidence)
			case d.Low != 0 && d.Low > d.Value, d.High != 0 && d.High < d.Value:
				t.Errorf("%s %s: %g outside its bounds %g to %g", s.Key, field, d.Value, d.Low, d.High)
			}
		}
		check := func(field, source string, e Evidence) {
			if source == "" || !slices.Contains(allowed, e) {
				t.Errorf("%s %s: source %q, evidence %q", s.Key, field, source, e)
			}
		}
		if s.Ion != nil {
			check("Ion", s.Ion.Source, s.Ion.Evidence)
			if x := s.Ion.Temperature; x != nil {
				check("Ion.Temperature", x.Source, x.Evidence)
			}
			if x := s.Ion.PerKelvin; x != nil {
				check("Ion.PerKelvin", x.Source, x.Evidence)
			}
			if x := s.Ion.Extended; x != nil {
				check("Ion.Extended", x.Source, x.Evidence)
			}
			if got := float64(s.Ion.Number()); got != s.Ions.Value {
				t.Errorf("%s: ions %g, ion parameters have %g", s.Key, s.Ions.Value, got)
			}
			if s.Ion.Cations*s.Ion.CationCharge != s.Ion.Anions*s.Ion.AnionCharge {
				t.Errorf("%s: charges do not balance", s.Key)
			}
		}
		if x := s.Concentrated; x != nil {
			check("Concentrated", x.Source, x.Evidence)
		}
		if x := s.DeliquescenceLaw; x != nil {
			check("DeliquescenceLaw", x.Source, x.Evidence)
		}
	}
}

func TestFindEveryName(t *testing.T) {
	c := Standard()
	keys := map[string]bool{}
	for _, s := range c.All() {
		if keys[s.Key] {
			t.Errorf("key %s is there twice", s.Key)
		}
		keys[s.Key] = true
		for _, name := range s.names() {
			if got, ok := c.Find(name); !ok || got.Key != s.Key {
				t.Errorf("Find(%q) = %q, %v; want %q", name, got.Key, ok, s.Key)
			}
		}
	}
	if len(keys) < 42 {
		t.Errorf("%d substances, want 42", len(keys))
	}
	for name, want := range map[string]string{
		"Ammonium-Sulphate": "ammonium_sulfate", " NACL ": "sodium_chloride", "(nh4)2so4": "ammonium_sulfate",
		"alpha pinene soa": "alpha_pinene_soa", "Soot": "black_carbon",
	} {
		if got, ok := c.Find(name); !ok || got.Key != want {
			t.Errorf("Find(%q) = %q, want %q", name, got.Key, want)
		}
	}
	for _, name := range []string{"", "unobtainium", "-"} {
		if got, ok := c.Find(name); ok {
			t.Errorf("Find(%q) = %q, want nothing", name, got.Key)
		}
	}
}

func TestNear(t *testing.T) {
	for asked, want := range map[string]string{
		"amonium sulfate": "ammonium sulfate", "sodium cloride": "sodium chloride",
		"levoglucosane": "levoglucosan", "black carbn": "black carbon", "soott": "black carbon",
	} {
		got := Standard().Near(asked, 3)
		if len(got) == 0 || len(got) > 3 || got[0] != want {
			t.Errorf("Near(%q) = %q, want %q first", asked, got, want)
		}
	}
	if got := Standard().Near("zzzzqqqqxxxx", 3); got != nil {
		t.Errorf("Near of nonsense = %q", got)
	}
}

// Dry densities of the CRC Handbook of Chemistry and Physics, from memory.
func TestCRCDensities(t *testing.T) {
	for name, want := range map[string]float64{
		"NaCl": 2165, "(NH4)2SO4": 1770, "H2SO4": 1830, "NH4NO3": 1725, "NaNO3": 2261, "Na2SO4": 2700, "KCl": 1988,
		"K2SO4": 2660, "KNO3": 2105, "MgCl2": 2325, "CaCl2": 2150, "Ca(NO3)2": 2500, "NH4Cl": 1519, "CH3SO3H": 1481,
		"sucrose": 1580, "glucose": 1562, "succinic acid": 1572, "adipic acid": 1360, "oxalic acid": 1900,
	} {
		s, _ := Standard().Find(name)
		if s.Density.Value != want {
			t.Errorf("density of %s %g, want %g", name, s.Density.Value, want)
		}
	}
}

// κ 0.90 of sulfuric acid is right near a water activity of 0.9 only.
func TestSulfuricAcidKappaAtActivation(t *testing.T) {
	s, _ := Standard().Find("H2SO4")
	if k := s.Kappa.Value; k < 0.70 || k > 0.77 {
		t.Errorf("κ of H2SO4 at activation %g, want that of the model, 0.704 to 0.760", k)
	}
}

func TestGapsStayGaps(t *testing.T) {
	for _, name := range []string{"ammonium methanesulfonate", "sodium methanesulfonate", "pinic acid"} {
		if s, ok := Standard().Find(name); !ok || s.Density.Known() {
			t.Errorf("%s: found %v, density %+v, want a gap", name, ok, s.Density)
		}
	}
}

func TestNewCatalogueRefuses(t *testing.T) {
	for name, list := range map[string][]Substance{
		"same name twice": {{Key: "a", Name: "salt"}, {Key: "b", Name: "Salt"}},
		"no key":          {{Name: "salt"}},
	} {
		if _, err := NewCatalogue(list); err == nil {
			t.Errorf("%s: no error", name)
		}
	}
}
