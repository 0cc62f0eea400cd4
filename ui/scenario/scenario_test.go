package scenario

import (
	"reflect"
	"strings"
	"testing"
)

// Every input says what a person needs to know of it.
func TestInputsSayEverything(t *testing.T) {
	s := Default()
	seen := map[Path]bool{}
	for _, in := range Inputs(&s) {
		if seen[in.Path()] {
			t.Errorf("%s stands twice", in.Path())
		}
		seen[in.Path()] = true
		for what, text := range map[string]string{"name": in.Says(), "help": in.Help(), "origin": in.Origin(), "range": in.Range(), "value": in.Show(Style{})} {
			if strings.TrimSpace(text) == "" {
				t.Errorf("%s has no %s", in.Path(), what)
			}
		}
		if !in.IsDefault() && !strings.HasPrefix(string(in.Path()), "mode[") { // two invented modes, a new one is a third
			t.Errorf("%s is not at its default in the default scenario", in.Path())
		}
		if got := in.Show(Style{ASCII: true}); strings.ContainsFunc(got, func(r rune) bool { return r > 127 }) {
			t.Errorf("%s is shown as %q in ASCII", in.Path(), got)
		}
	}
	// A field that no input declares would be lost in files and in undo.
	declared := reflect.TypeOf(Scenario{}).NumField() - 2 // the two unexported ones
	if got := len(fields) + len(Lists(&s)); got != declared {
		t.Errorf("%d quantities are declared, the scenario has %d", got, declared)
	}
	if got := len(componentFields); got != reflect.TypeOf(Component{}).NumField() {
		t.Errorf("%d quantities of a component are declared", got)
	}
}

func TestRows(t *testing.T) {
	for text, want := range map[string]Component{
		"ammonium sulfate":                            {Substance: "ammonium sulfate", Share: 1},
		"ammonium sulfate share=0.6":                  {Substance: "ammonium sulfate", Share: 0.6},
		"share=0.6 substance=ammonium sulfate":        {Substance: "ammonium sulfate", Share: 0.6},
		"share=0.6 substance=NaCl kappa=1.2":          {Substance: "sodium chloride", Share: 0.6, Kappa: Measure{Number: 1.2}},
		"kappa=0.1 density=1.4 g/cm3 share=2":         {Share: 2, Kappa: Measure{Number: 0.1}, Density: Measure{Number: 1400}},
		"  sodium   chloride  ions=2 kappa=catalogue": {Substance: "sodium chloride", Share: 1, Ions: Measure{Number: 2}},
	} {
		s := Default()
		if err := SetRow(&s, "component", text, true); err != nil {
			t.Errorf("%q: %v", text, err)
			continue
		}
		full := defaultComponent(want.Substance)
		full.Share = want.Share
		for to, from := range map[*Measure]Measure{&full.Kappa: want.Kappa, &full.Density: want.Density, &full.MolarMass: want.MolarMass, &full.Ions: want.Ions} {
			if from != (Measure{}) {
				*to = from
			}
		}
		if len(s.Components) != 1 || s.Components[0] != full {
			t.Errorf("%q is %+v, want %+v", text, s.Components, full)
		}
	}
	for text, want := range map[string]string{
		"":                                  "no value",
		"amonium sulfat":                    "ammonium sulfate",
		"ammonium sulfate share=-1":         "share=-1: -1 is too small",
		"ammonium sulfate shar=1":           `no key "shar"`,
		"ammonium sulfate share=1 share=2":  "share stands twice",
		"NaCl substance=KCl substance=NaCl": "stands twice",
		"ammonium sulfate density=1.77":     "has no unit",
		"\x1b[2J":                           "control characters",
	} {
		s := Default()
		err := SetRow(&s, "component", text, true)
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", text, err, want)
		}
		if !s.Equal(Default()) {
			t.Errorf("%q: refused, and the scenario is another one", text)
		}
	}
	s := Default()
	for range 3 {
		if err := SetRow(&s, "component", "NaCl", false); err != nil {
			t.Fatal(err)
		}
	}
	if len(s.Components) != 4 {
		t.Errorf("%d components after three were added to one", len(s.Components))
	}
}

func TestRowList(t *testing.T) {
	s := Default()
	l := Lists(&s)[0]
	if err := l.Drop(0); err == nil {
		t.Error("the last row is dropped")
	}
	if err := l.Add(); err != nil || l.Len() != 2 {
		t.Fatal(l.Len(), err)
	}
	if got := l.Show(Style{}); got != "ammonium sulfate 0.50, sodium chloride 0.50" {
		t.Errorf("two components are shown as %q", got)
	}
	for l.Add() == nil {
	}
	if l.Len() != componentList.most || l.Show(Style{}) != "20 components" {
		t.Errorf("%d rows, shown as %q", l.Len(), l.Show(Style{}))
	}
	if err := l.Drop(0); err != nil || s.Components[0].Substance != "sodium chloride" {
		t.Errorf("after the first is dropped the first is %q, %v", s.Components[0].Substance, err)
	}
	if err := l.Drop(99); err == nil {
		t.Error("a row that is not there is dropped")
	}
}

func TestCloneSharesNothing(t *testing.T) {
	a := Default()
	b := a.Clone()
	b.Components[0].Share = 0.5
	if a.Components[0].Share != 1 {
		t.Error("a change of the copy changes the original")
	}
}

func TestHistory(t *testing.T) {
	var h History
	s := Default()
	step := func(p Path, dir int) {
		before := s.Clone()
		if err := at(t, &s, p).Step(dir, false); err != nil {
			t.Fatal(err)
		}
		h.Add(p, before, s, true)
	}
	step("dry-diameter", 1)
	step("dry-diameter", 1)
	step("dry-diameter", 1)
	if len(h.Past) != 1 || h.Past[0].Says != "dry size 100 nm → 130 nm" {
		t.Fatalf("three steps are %d entries: %+v", len(h.Past), h.Past)
	}
	step("temperature", 1)
	step("dry-diameter", -1)
	if len(h.Past) != 3 {
		t.Errorf("steps on three slots in turn are %d entries", len(h.Past))
	}
	e, ok := h.Undo()
	if !ok || e.Says != "dry size 130 nm → 120 nm" || e.Before.DryDiameter != 130e-9 {
		t.Errorf("undone %+v", e)
	}
	s = e.Before.Clone()
	if e, ok = h.Redo(); !ok || e.After.DryDiameter != 120e-9 {
		t.Errorf("redone %+v", e)
	}
	s = e.After.Clone()
	step("dry-diameter", -1)
	if len(h.Past) != 4 {
		t.Error("a step after undo goes on with the run before")
	}
	step("dry-diameter", 1)
	if len(h.Past) != 3 {
		t.Errorf("a run that ends where it began leaves %d entries, want 3", len(h.Past))
	}
	for range 3 {
		h.Undo()
	}
	if _, ok := h.Undo(); ok || len(h.Future) != 3 {
		t.Errorf("nothing is left to undo, %d to redo", len(h.Future))
	}
	s = Default()
	step("temperature", 1)
	if len(h.Future) != 0 {
		t.Error("a change keeps what could be redone")
	}
}

func TestChanges(t *testing.T) {
	a, b := Default(), Default()
	if got := Changes(a, b); got != nil {
		t.Errorf("no change is %q", got)
	}
	b.Temperature = 293.15
	b.SurfaceTension = Measure{Number: 0.072}
	b.Components[0].Substance = "sodium chloride"
	want := []string{"surface tension pure water → 72.0 mN/m", "temperature 25.0 °C → 20.0 °C", "substance ammonium sulfate → sodium chloride"}
	if got := Changes(a, b); !reflect.DeepEqual(got, want) {
		t.Errorf("changes %q, want %q", got, want)
	}
	if err := Lists(&b)[0].Add(); err != nil {
		t.Fatal(err)
	}
	if got := strings.Join(Changes(a, b), "; "); !strings.Contains(got, "composition ammonium sulfate → sodium chloride 0.50, ammonium sulfate 0.50") {
		t.Errorf("changes %q", got)
	}
}
