package koehler

// At returns the drop of that wet diameter (m, larger than the dry one).
func (p Particle) At(wet float64) State { panic("not written yet") }

// AtWater returns the drop that holds u volumes of water per dry volume.
func (p Particle) AtWater(u float64) State { panic("not written yet") }

// Crest returns the barrier. An error says why there is none.
func (p Particle) Crest() (Crest, error) { panic("not written yet") }

// Extrema returns all extrema in the order of their wet size.
func (p Particle) Extrema() ([]Extremum, error) { panic("not written yet") }

// Haze returns the wet sizes in equilibrium at saturation ratio S: the stable
// branch below the crest and, for S > 1, the unstable branch above it.
func (p Particle) Haze(S float64) (stable State, unstable State, err error) { panic("not written yet") }

// Textbook returns the crest of the cubic form s = A/D - B/D³ of this particle.
func (p Particle) Textbook() (Crest, error) { panic("not written yet") }

// ActivatedDryDiameter returns the dry diameter of this composition whose crest
// lies at supersaturation s.
func (p Particle) ActivatedDryDiameter(s float64) (float64, error) { panic("not written yet") }

// KelvinLength returns A = 4 σ M_w/(R T ρ_w) in m.
func KelvinLength(sigma, temperature float64) float64 { panic("not written yet") }

// KappaCrest is the crest of the closed κ form.
type KappaCrest struct {
	GrowthFactor    float64
	Supersaturation float64
	WaterActivity   float64
}

// SolveKappa returns the crest for dry diameter and Kelvin length (m) and κ.
func SolveKappa(dry, kelvin, kappa float64) KappaCrest { panic("not written yet") }

// KappaOf returns the κ of a particle of that dry diameter whose crest lies at s.
func KappaOf(dry, kelvin, s float64) (float64, error) { panic("not written yet") }

// DryOf returns the dry diameter at which a particle of that κ activates at s.
func DryOf(kappa, kelvin, s float64) (float64, error) { panic("not written yet") }
