package answer

import (
	"errors"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/koehler/ledger"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// composed is which particles of a size distribution activate, and how that is
// known.
type composed struct {
	of     spectrum.Composition
	kappa  float64 // of all particles, the median where they differ; NaN: it is no one number
	kelvin float64 // m, with the surface tension of a dilute drop
	isOne  bool    // all particles of one size activate at one supersaturation
	models []string
	notes  []atmos.Note

	ledgers []*ledger.Ledger // of its particles, where assumptions are asked for
}

// anySize stands for the dry size of a particle whose composition alone matters.
const anySize = 100e-9

// compose makes the composition that a scenario gives its particles: of all
// components together, or of each in particles of its own.
func (env Env) compose(s scenario.Scenario) (composed, error) {
	alike := len(s.Components) < 2 || s.WaterActivity == "kappa" && s.Kappa.Word == ""
	if s.Mixing != "external" || alike {
		return env.composeOne(s)
	}
	recipe, notes, err := newRecipe(env, s)
	if err != nil {
		return composed{}, err
	}
	out := composed{kappa: math.NaN(), notes: notes}
	var mixture spectrum.External
	for i, part := range recipe.Parts {
		own := s.Clone()
		own.Components = own.Components[i : i+1]
		one, err := env.composeOne(own)
		if err != nil {
			return composed{}, err
		}
		// Particles of one size have one volume: a share of the volume is one of the number.
		mixture = append(mixture, spectrum.Part{Share: part.Volume, Of: one.of})
		out.kelvin = one.kelvin
		out.ledgers = append(out.ledgers, one.ledgers...)
		out.models = append(out.models, one.models...)
		out.notes = append(out.notes, one.notes...)
	}
	out.of, out.notes = mixture, distinct(out.notes)
	return out, nil
}

// composeOne makes the composition of particles of all components.
func (env Env) composeOne(s scenario.Scenario) (composed, error) {
	made, err := env.matter(s)
	if err != nil {
		return composed{}, err
	}
	p, err := newParticle(made.dissolved, s, anySize)
	if err != nil {
		return composed{}, recipeError(err)
	}
	out := composed{kappa: made.dissolved.Kappa, models: made.dissolved.Models,
		notes: distinct(slices.Concat(made.notes, waterNotes(s), made.more))}
	if err := env.makeOf(&out, s, p); err != nil {
		return composed{}, err
	}
	if _, closed := out.of.(spectrum.Kappa); !closed {
		out.kappa = math.NaN() // the model in use has none
	}
	if m, ok := out.of.(*spectrum.Matter); ok {
		out.of = &held{m, map[float64]float64{}}
	}
	out.of, out.isOne = spreadOf(out.of, s.KappaSpread, out.kelvin)
	return out, nil
}

// held is matter that holds its critical diameters: many records ask for the same
// ones. It belongs to one answer.
type held struct {
	of    *spectrum.Matter
	known map[float64]float64 // m, by supersaturation
}

// mostHeld bounds what is held, where each record has supersaturations of its own.
const mostHeld = 4096

// Critical returns that of the matter.
func (h *held) Critical(s float64) (float64, error) {
	if d, ok := h.known[s]; ok {
		return d, nil
	}
	d, err := h.of.Critical(s)
	if err == nil && len(h.known) < mostHeld {
		h.known[s] = d
	}
	return d, err
}

// AddCounts implements spectrum.Composition.
func (h *held) AddCounts(dst, s []float64, sizes spectrum.Sizes, share float64) error {
	return addWider(h, dst, s, sizes, share)
}

// addWider counts where all particles wider than one diameter activate.
func addWider(of spectrum.Composition, dst, s []float64, sizes spectrum.Sizes, share float64) error {
	for i, x := range s {
		d, err := of.Critical(x)
		if err != nil {
			return err
		}
		dst[i] += share * sizes.Above(d)
	}
	return nil
}

// composeKappa makes the composition of particles of which nothing but κ is known,
// such as measured ones. Films and adsorption are of components, which are not known.
func (env Env) composeKappa(s scenario.Scenario, kappa float64) (composed, error) {
	s = onlyKappa(s, kappa)
	return env.composeOne(s)
}

func onlyKappa(s scenario.Scenario, kappa float64) scenario.Scenario {
	s.Components, s.Szyszkowski, s.Adsorption = nil, nil, nil
	s.WaterActivity, s.Kappa = "kappa", scenario.Measure{Number: kappa}
	return s
}

// sharp is the composition of a particle: in closed form where there is one.
func sharp(p koehler.Particle) (spectrum.Composition, float64) {
	sigma, isConstant := atmos.SurfaceTension(p.Temperature), p.Tension == nil
	if t, ok := p.Tension.(solutes.ConstantTension); ok {
		sigma, isConstant = float64(t), true
	} else if p.Tension != nil {
		sigma, _ = p.Tension.SurfaceTension(endlessWater)
	}
	kelvin := koehler.KelvinLength(sigma, p.Temperature)
	kappa, isKappa := p.Solution.(solutes.Kappa)
	if isKappa && isConstant && p.Swelling == nil && p.Kelvin == koehler.Standard && p.TolmanLength == 0 {
		return spectrum.Kappa{Value: float64(kappa), KelvinLength: kelvin}, kelvin
	}
	return &spectrum.Matter{Particle: p}, kelvin
}

// endlessWater per dry volume makes any solution dilute.
const endlessWater = 1e12

// spreadOf lets κ differ among the particles; particles without any do not differ.
func spreadOf(of spectrum.Composition, gsd, kelvin float64) (spectrum.Composition, bool) {
	if !(gsd > 1) {
		return of, true
	}
	if k, ok := of.(spectrum.Kappa); ok {
		if k.Value > 0 {
			return spectrum.Spread{Median: k.Value, GSD: gsd, KelvinLength: kelvin}, false
		}
		return of, true
	}
	return spreadMatter{of, gsd, kelvin}, false
}

// spreadMatter is particles of any kind whose κ differs about the one that they
// have at activation: that of a particle of the critical diameter, as a count
// would tell it.
type spreadMatter struct {
	of     spectrum.Composition
	gsd    float64
	kelvin float64
}

// Critical returns that of the median particles.
func (m spreadMatter) Critical(s float64) (float64, error) { return m.of.Critical(s) }

// AddCounts implements spectrum.Composition.
func (m spreadMatter) AddCounts(dst, s []float64, sizes spectrum.Sizes, share float64) error {
	for i, x := range s {
		d, err := m.of.Critical(x)
		if err != nil {
			return err
		}
		of := m.of
		kappa, err := koehler.KappaOf(d, m.kelvin, x)
		switch {
		case errors.Is(err, koehler.ErrNoSolution) || err != nil && (d == 0 || math.IsInf(d, 1)):
		case err != nil:
			return err
		case kappa > 0:
			of = spectrum.Spread{Median: kappa, GSD: m.gsd, KelvinLength: m.kelvin}
		}
		if err := of.AddCounts(dst[i:i+1], s[i:i+1], sizes, share); err != nil {
			return err
		}
	}
	return nil
}
