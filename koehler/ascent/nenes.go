package ascent

import (
	"math"

	"dropcrest/atmos"
)

// Fitted constants of Fountoukis & Nenes (2005) and Nenes & Seinfeld (2003), from
// memory; computed values hold the rest of the form, its integrals were derived
// again.
const (
	nenesLow      = 0.207683e-6 // m, smallest drop of the mean diffusivity at α_c = 1
	nenesLowPower = -0.33048
	nenesHigh     = 5e-6 // m, the largest
	nenesFit      = 2e7  // of the partition where no drop is limited by its growth
	nenesFitPower = -0.3824
)

// splitting is the method of population splitting at one state of the air.
type splitting struct {
	kelvin  float64 // A for a diameter, m
	growth  float64 // of D dD/dt = G s, m²/s
	forcing float64 // α w, 1/s
}

// nenes is the peak of Fountoukis & Nenes (2005): the s at which condensation,
// π/2 γ ρ_w G s (I₁ + I₂), takes up the cooling α w.
func nenes(modes []closedMode, a closedAir, w, accommodation float64) float64 {
	s := splitting{a.kelvin, a.nenesGrowth(accommodation), a.cooling * w}
	factor := math.Pi * a.depletion * a.rho * s.growth / (2 * s.forcing)
	return risingRoot(leastPeak, mostPeak, func(peak float64) float64 {
		sum := 0.0
		for _, m := range modes {
			sum += s.uptake(m, peak)
		}
		return factor*peak*sum - 1
	})
}

// nenesGrowth is 4 G with the diffusivity averaged over the sizes of drops.
func (a closedAir) nenesGrowth(accommodation float64) float64 {
	const R, Mw = atmos.GasConstant, atmos.WaterMolarMass
	jump := 2 * a.diffusivity / accommodation * math.Sqrt(2*math.Pi*Mw/(R*a.T))
	low, high := nenesLow*math.Pow(accommodation, nenesLowPower), nenesHigh
	mean := a.diffusivity
	if low < high {
		mean *= 1 - jump/(high-low)*math.Log((high+jump)/(low+jump))
	}
	c := climateAt(a.T, a.p, massRatio*0.01, a.rho, kinetics{Continuum, 1, 1})
	return 4 / (c.diffusion*a.diffusivity/mean + c.conduction)
}

// partition is the crest below which growth and not the crest says how large a drop
// is.
func (s splitting) partition(peak float64) float64 {
	p2 := peak * peak
	delta := p2*p2 - 16*s.kelvin*s.kelvin*s.forcing/(9*s.growth)
	if delta >= 0 {
		return peak * math.Sqrt(0.5*(1+math.Sqrt(delta)/p2))
	}
	return peak * math.Min(nenesFit*s.kelvin/3*math.Pow(peak, nenesFitPower), 1)
}

// uptake is I₁ + I₂ of one mode.
func (s splitting) uptake(m closedMode, peak float64) float64 {
	width := math.Log(m.GSD)
	argument := func(at float64) float64 { return 2 * math.Log(m.crest/at) / (3 * math.Sqrt2 * width) }
	up, most := argument(s.partition(peak)), argument(peak)
	ratio := m.crest / peak
	grown := m.Concentration / 2 * math.Sqrt(s.growth/s.forcing) * peak *
		(math.Erfc(up) - 0.5*ratio*ratio*math.Exp(4.5*width*width)*math.Erfc(up+3*width/math.Sqrt2))
	shift := 3 * width / (2 * math.Sqrt2)
	limited := s.kelvin * m.Concentration / (3 * m.crest) * math.Exp(9./8*width*width) *
		(math.Erf(up-shift) - math.Erf(most-shift))
	return grown + limited
}
