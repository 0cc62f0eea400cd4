package answer

import (
	"reflect"
	"slices"
	"sync"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// Kept keeps what the last particles were made of. Acids and mixed salts take
// milliseconds to make, and most keys change something else: dry size, humidity.
// It is safe for concurrent use.
type Kept struct {
	mu      sync.Mutex
	matters []*matter // the last one used first
	data    *keptData // nil: none
	rising  keptAscent

	costs       last[costs]      // of the last ledger
	calibration last[calibrated] // the last one of the counter
}

// askedKey is what an answer that takes long depends on.
type askedKey struct {
	of        scenario.Scenario
	catalogue *solutes.Catalogue
	files     string // when measured files were changed
}

func (key askedKey) equal(other askedKey) bool {
	return key.catalogue == other.catalogue && key.files == other.files && key.of.Equal(other.of)
}

// last keeps what was worked out last. A nil one keeps nothing.
type last[T any] struct {
	mu   sync.Mutex
	key  askedKey
	kept *T // nil: nothing yet
}

// of is what was kept under that key; nil: nothing.
func (l *last[T]) of(key askedKey) *T {
	if l == nil {
		return nil
	}
	l.mu.Lock()
	defer l.mu.Unlock()
	if l.kept == nil || !l.key.equal(key) {
		return nil
	}
	return l.kept
}

func (l *last[T]) keep(key askedKey, made *T) {
	if l == nil {
		return
	}
	l.mu.Lock()
	defer l.mu.Unlock()
	l.key, l.kept = key, made
}

// lastCosts is where the costs of a ledger are kept; nil: nowhere.
func (k *Kept) lastCosts() *last[costs] {
	if k == nil {
		return nil
	}
	return &k.costs
}

// lastCalibration is where the calibration of a counter is kept; nil: nowhere.
func (k *Kept) lastCalibration() *last[calibrated] {
	if k == nil {
		return nil
	}
	return &k.calibration
}

// mostKept is enough to go back and forth between neighbouring values.
const mostKept = 4

// matter is what the dry particles of a scenario are made of. It is not changed
// once it is made.
type matter struct {
	of        scenario.Scenario // blank where it does not matter
	catalogue *solutes.Catalogue
	parts     []solutes.Part
	dissolved solutes.Dissolved
	notes     []atmos.Note // on the recipe
	more      []atmos.Note // on the solution
}

// matter is what the particles of a scenario are made of, kept from before if
// possible. What cannot be made is not kept.
func (env Env) matter(s scenario.Scenario) (*matter, error) {
	of := onlyMatter(s)
	if env.Kept != nil {
		if m := env.Kept.find(of, env.catalogue()); m != nil {
			return m, nil
		}
	}
	recipe, notes, err := newRecipe(env, s)
	if err != nil {
		return nil, err
	}
	dissolved, more, err := dissolve(recipe, s)
	if err != nil {
		return nil, recipeError(err)
	}
	m := &matter{of, env.catalogue(), recipe.Parts, dissolved, notes, more}
	if env.Kept != nil {
		env.Kept.add(m)
	}
	return m, nil
}

func (k *Kept) find(of scenario.Scenario, catalogue *solutes.Catalogue) *matter {
	k.mu.Lock()
	defer k.mu.Unlock()
	for i, m := range k.matters {
		if m.catalogue == catalogue && reflect.DeepEqual(m.of, of) {
			k.matters = slices.Insert(slices.Delete(k.matters, i, i+1), 0, m)
			return m
		}
	}
	return nil
}

func (k *Kept) add(m *matter) {
	k.mu.Lock()
	defer k.mu.Unlock()
	k.matters = slices.Insert(k.matters, 0, m)
	k.matters = k.matters[:min(len(k.matters), mostKept)]
}

// onlyMatter blanks what the matter of the particles does not depend on. All that
// is not named here counts, so that a new quantity is not forgotten.
func onlyMatter(s scenario.Scenario) scenario.Scenario {
	s = s.Clone()
	s.DryDiameter, s.DrySizeIs, s.ShapeFactor = 0, "", 0
	s.Partitioning, s.TolmanLength, s.Kelvin = "", 0, ""
	s.RelativeHumidity, s.HumidityHistory = 0, ""
	s.Points, s.FromRadius, s.ToRadius = 0, scenario.Measure{}, scenario.Measure{}
	s.Population, s.Bins, s.Modes, s.Data, s.Map = "", "", nil, nil, nil
	s.Record, s.Every, s.Average, s.Composition = scenario.Measure{}, scenario.Measure{}, "", ""
	s.Mixing, s.KappaSpread, s.Supersaturations, s.Fit, s.Axes = "", 0, nil, "", ""
	return scenario.WithoutLedger(withoutAscent(s))
}
