package ascent

import "math"

// razzakGhan is the peak of Abdul-Razzak & Ghan (2000), from memory and held by
// computed values:
//
//	s = [Σ S_m⁻² (f (ζ/η)^(3/2) + g (S_m²/(η + 3ζ))^(3/4))]^(-1/2)
//	f = exp(2.5 ln² σ)/2, g = 1 + ln σ/4
//	ζ = (2A/3) √(α w/G), η = (α w/G)^(3/2)/(2π ρ_w γ N)
//
// with A for a radius and the crest S_m of the median.
func razzakGhan(modes []closedMode, a closedAir, w float64) float64 {
	x := a.cooling * w / a.growth
	zeta := 2 * (a.kelvin / 2) / 3 * math.Sqrt(x)
	sum := 0.0
	for _, m := range modes {
		width := math.Log(m.GSD)
		eta := math.Pow(x, 1.5) / (2 * math.Pi * a.rho * a.depletion * m.Concentration)
		f, g := 0.5*math.Exp(2.5*width*width), 1+0.25*width
		s2 := m.crest * m.crest
		sum += (f*math.Pow(zeta/eta, 1.5) + g*math.Pow(s2/(eta+3*zeta), 0.75)) / s2
	}
	return 1 / math.Sqrt(sum)
}
