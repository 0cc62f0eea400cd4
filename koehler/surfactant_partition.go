package koehler

import "math"

// bulk is what of the organic is dissolved in the drop's volume.
type bulk struct {
	concentration float64 // c, mol/m³
	logSlope      float64 // d ln c/d ln u
	share         float64 // f = c V/n
}

// partition shares the organic between the volume V = (π/6)D³ and the surface
// Ar = πD² of the drop. Per volume, with c_t = n/V and Ar/V = 6/D, the balance is
//
//	c_t = c + (6/D) Γ_max K c/(1 + K c)
//	⇔  K c² + β c - c_t = 0,  β = 1 + K (6 Γ_max/D - c_t)
//
// which has one positive root, c = 2 c_t/(β + √(β² + 4 K c_t)), taken as
// (√(β² + 4 K c_t) - β)/(2 K) where β < 0, so that no digits cancel.
func (s *SurfaceActive) partition(u, x float64) bulk {
	total := s.moles / (1 + u)
	v := u / (1 + u) // d ln V/d ln u
	if !s.p.Partitioning || s.p.GammaMax == 0 || s.p.K == 0 {
		return bulk{total, -v, 1}
	}
	k := s.p.K
	area := 6 / (s.dry * x) // per volume
	beta := 1 + k*(area*s.p.GammaMax-total)
	root := math.Sqrt(beta*beta + 4*k*total)
	var c float64
	if beta < 0 {
		c = (root - beta) / (2 * k)
	} else {
		c = 2 * total / (beta + root)
	}
	// Differentiate the balance by ln u: dc_t = -v c_t, d(6/D) = -(v/3)(6/D).
	film := area * s.p.GammaMax * k / (1 + k*c) // adsorbed, per c
	logSlope := -v * (1 + film*2/3) / (1 + film/(1+k*c))
	return bulk{c, logSlope, c / total}
}

// floorWater returns the u at which σ leaves its floor as the drop grows, and
// whether there is one. At the floor c is known, K c = exp((σ_w - floor)/(Γ_max R
// T)) - 1, and the balance is a polynomial in x = D/Dd that rises for x > 0:
//
//	c x³ + (6 Γ/Dd) x² = n per dry volume
func (s *SurfaceActive) floorWater() (u float64, found bool) {
	if s.p.Floor == 0 || s.thermal == 0 || s.p.K == 0 || s.moles == 0 {
		return 0, false
	}
	kc := math.Expm1((s.pureTension - s.p.Floor) / s.thermal)
	c, film := kc/s.p.K, 0.0
	if s.p.Partitioning {
		film = 6 * s.p.GammaMax * kc / ((1 + kc) * s.dry)
	}
	if c == 0 || c+film >= s.moles {
		return 0, false // at the floor nowhere, or already left at the dry size
	}
	x := math.Cbrt(s.moles / c) // above the root, where Newton's method falls monotonically
	for range mostRootSteps {
		step := ((c*x+film)*x*x - s.moles) / ((3*c*x + 2*film) * x)
		x -= step
		if step <= 1e-15*x {
			break
		}
	}
	t := x - 1
	return t * (3 + t*(3+t)), t > 0
}
