package solutes

// Solution is the water activity of the solution that water makes with a dry
// particle, as a function of u, the volume of water per volume of dry particle.
//
// LnActivity returns ln a_w and its derivative by ln u. It must be smooth,
// increasing in u, and go to 0 from below for u → ∞. Below LeastWater the model
// is outside its published range: it still returns a finite value, and whoever
// shows it says so.
type Solution interface {
	LnActivity(u float64) (lnaw, slope float64)
	LeastWater() float64 // u down to which the model is valid; 0: no limit
}

// Swelling is the volume of the wet drop per volume of dry particle.
//
// Swell returns v(u) and its derivative by ln u. A nil Swelling stands for
// additive volumes, v = 1 + u.
type Swelling interface {
	Swell(u float64) (v, slope float64)
}

// Tension is the surface tension of the drop in N/m.
//
// SurfaceTension returns σ(u) and its derivative by ln u.
type Tension interface {
	SurfaceTension(u float64) (sigma, slope float64)
}
