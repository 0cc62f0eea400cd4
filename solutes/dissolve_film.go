package solutes

import (
	"math"
	"slices"
	"strings"
)

// Film is what koehler.NewSurfaceActive takes of a recipe: the surface-active
// organic, and the rest of the particle. Several organics of the same constants
// are one, of their mean density and molar mass.
//
// The Solution of the same Dissolved is that of the whole particle with all of the
// organic in the bulk, which counts as ideal in the κ model; its Tension is that of
// pure water: what a particle without a film would do.
type Film struct {
	Share     float64 // of the organic, of the dry volume
	Density   float64 // kg/m³
	MolarMass float64 // kg/mol
	GammaMax  float64 // mol/m²
	K         float64 // m³/mol
	Floor     float64 // N/m; 0: none

	RestShare float64  // of the dry volume, insoluble parts included
	RestKappa float64  // κ of the rest where Rest is nil
	Rest      Solution // nil: κ form. u is water per volume of the rest
}

// film separates the surface-active organic from the rest.
func (d *dissolving) film() error {
	if d.TensionRule != Szyszkowski {
		return nil
	}
	switch {
	case d.Solubility == LimitedSolubility:
		return &RefusedError{inputSolubility, "no published rule joins limited solubility and a surface-active organic: choose complete solubility, or another surface tension"}
	case d.Model == KappaModel && !math.IsNaN(d.Recipe.Kappa):
		return &RefusedError{inputActivity, "one κ for the whole particle cannot be divided between a surface-active organic and the rest: give each component its own"}
	}
	organic, activity, err := d.organics()
	if err != nil {
		return err
	}
	f := &Film{GammaMax: activity.GammaMax.Value, K: activity.K.Value, Floor: activity.Floor.Value}
	mass, moles := 0.0, 0.0
	var names []string
	var rest []Part
	whole := slices.Clone(d.Parts)
	for i, p := range d.Parts {
		if !organic[i] {
			rest = append(rest, p)
			continue
		}
		s, err := p.Substance.molecule(d.waterDensity)
		if err != nil {
			return err
		}
		whole[i].Substance = s
		m := p.Volume * s.Density.Value
		mass, moles, f.Share = mass+m, moles+m/s.MolarMass.Value, f.Share+p.Volume
		names = append(names, s.called())
	}
	f.Density, f.MolarMass = mass/f.Share, mass/moles
	if err := d.restOf(f, rest); err != nil {
		return err
	}
	d.Parts, d.out.Film = whole, f
	d.says("%s: surface-active by Szyszkowski & Langmuir, Γmax %.4g mol/m², K %.4g m³/mol", strings.Join(names, ", "), f.GammaMax, f.K)
	if f.Floor == 0 {
		d.note("no-tension-floor", inputTension,
			"No floor is given for the surface tension: the Szyszkowski equation has none, and falls below that of any organic in a concentrated drop.")
	}
	return nil
}

// molecule returns a substance with the κ of its ideal solution as molecules.
func (s Substance) molecule(waterDensity float64) (Substance, error) {
	if !s.Ions.Known() {
		s.Ions = Datum{Value: 1, Evidence: Computed}
	}
	if err := missing(s); err != nil {
		return s, err
	}
	k := float64(VantHoffKappa(1, s.MolarMass.Value, s.Density.Value, waterDensity))
	s.Kappa = Datum{Value: k, Source: "ideal solution of a surface-active molecule", Evidence: Computed}
	return s, nil
}

// organics tells which parts are surface-active, and their common constants.
func (d *dissolving) organics() (is []bool, activity SurfaceActivity, err error) {
	is = make([]bool, len(d.Parts))
	found := 0
	for i, p := range d.Parts {
		own := p.Substance.SurfaceActivity
		if own == nil {
			continue
		}
		if found > 0 && *own != activity {
			return nil, activity, &RefusedError{inputComponent, "no published rule is at hand for the film of several organics of different constants: keep one of them"}
		}
		is[i], activity = true, *own
		found++
	}
	if found > 0 {
		return is, activity, nil
	}
	if d.Surface == nil {
		return nil, activity, &RefusedError{inputTension, "no component is known to be surface-active: give the constants of the Szyszkowski equation"}
	}
	soluble, last := 0, 0
	for i, p := range d.Parts {
		if is[i] = p.Substance.organic(); is[i] {
			found++
		}
		if !p.Substance.Insoluble() {
			soluble, last = soluble+1, i
		}
	}
	if found == 0 && soluble != 1 {
		return nil, activity, &RefusedError{inputComponent, "which component is the surface-active organic is not clear: give ions=1 to it"}
	}
	if found == 0 {
		is[last] = true
	}
	return is, *d.Surface, nil
}

// organic reports whether a substance dissolves as molecules.
func (s Substance) organic() bool {
	return s.Ion == nil && !isBisulfate(s) && s.Key != "sea_salt" && s.Ions.Known() && s.Ions.Value == 1
}

// restOf makes the solution of what is not surface-active, by itself.
func (d *dissolving) restOf(f *Film, parts []Part) error {
	f.RestShare = math.Max(0, 1-f.Share)
	if len(parts) == 0 {
		f.RestShare = 0
		return nil
	}
	sum := 0.0
	for _, p := range parts {
		sum += p.Volume
	}
	alone := &dissolving{Recipe: d.Recipe, waterDensity: d.waterDensity}
	alone.Parts = nil
	for _, p := range parts {
		alone.Parts = append(alone.Parts, Part{p.Substance, p.Volume / sum})
	}
	if err := alone.activity(); err != nil {
		return err
	}
	if k, ok := alone.out.Solution.(Kappa); ok {
		f.RestKappa = float64(k)
		return nil
	}
	f.Rest, f.RestKappa = alone.out.Solution, math.NaN()
	return nil
}
