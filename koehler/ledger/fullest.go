package ledger

import (
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// An upgrade takes one simplification out of what was asked.
type upgrade struct {
	of    Key
	apply func(a *Asked)
}

// upgrades lead from what was asked to the fullest model. What a person measured
// and gave stays: one κ for the whole particle, a surface tension other than that
// of the convention, constants of a film or an isotherm.
func upgrades() []upgrade {
	return []upgrade{
		{IncompressibleLiquid, func(a *Asked) { a.Kelvin = koehler.Compressible }},
		{ConstantKappa, func(a *Asked) {
			if r := (recipe{a.Recipe}); !r.hasOneKappa() && r.hasDetail() {
				a.Recipe.Model = solutes.IonInteraction
			}
		}},
		{CompleteDissolution, func(a *Asked) { a.Recipe.Solubility = solutes.LimitedSolubility }},
		{Sphere, func(a *Asked) {
			if known := (recipe{a.Recipe}).shape(); a.Mobility && a.ShapeFactor <= 1 && known > 0 {
				a.ShapeFactor = known
			}
		}},
		{PureWaterSurfaceTension, func(a *Asked) {
			r := recipe{a.Recipe}
			if r.TensionRule != solutes.PureWater && !r.takesConvention() {
				return
			}
			a.Recipe.TensionRule, a.Recipe.Tension = solutes.PureWater, 0
			if r.hasIncrement() {
				a.Recipe.TensionRule = solutes.SolutionRule
			}
		}},
		{VolumeAdditivity, func(a *Asked) { a.Recipe.DensityRule = solutes.Measured }},
	}
}

// fullest is the fullest model at hand, with the reason of each upgrade that the
// particle does not allow.
func (a Asked) fullest(plain made) (made, map[Key]error) {
	best, refused := a.upgraded(plain)
	if !isKept(best.dissolved) { // so that a row that takes a simpler activity keeps to it
		best.asked.Recipe.Solubility = solutes.Complete
	}
	return best, refused
}

func (a Asked) upgraded(plain made) (made, map[Key]error) {
	all := a
	for _, u := range upgrades() {
		u.apply(&all)
	}
	if m, err := all.make(); err == nil {
		return m, nil
	}
	best, refused := plain, map[Key]error{}
	for _, u := range upgrades() {
		next := best.asked
		u.apply(&next)
		m, err := next.make()
		if err != nil {
			refused[u.of] = err
			if u.of == PureWaterSurfaceTension && (recipe{next.Recipe}).TensionRule == solutes.SolutionRule {
				best = best.pureWater()
			}
			continue
		}
		best = m
	}
	return best, refused
}

// pureWater drops the tension of the convention where that of the solution is
// refused.
func (m made) pureWater() made {
	if !(recipe{m.asked.Recipe}).takesConvention() {
		return m
	}
	next := m.asked
	next.Recipe.TensionRule, next.Recipe.Tension = solutes.PureWater, 0
	if w, err := next.make(); err == nil {
		return w
	}
	return m
}
