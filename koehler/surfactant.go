package koehler

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// Surfactant is a surface-active organic by the equation of Szyszkowski with the
// isotherm of Langmuir:
//
//	σ = σ_w - Γ_max R T ln(1 + K c)
//	Γ = -(1/RT) dσ/d ln c = Γ_max K c/(1 + K c)        (Gibbs, ideal activity)
//
// c is the bulk concentration, mol per m³ of drop.
type Surfactant struct {
	Share     float64 // ε_org of the dry volume, 0 ≤ ε ≤ 1
	Density   float64 // kg/m³
	MolarMass float64 // kg/mol
	GammaMax  float64 // greatest surface excess, mol/m²; 0: not surface-active
	K         float64 // adsorption constant, m³/mol
	Floor     float64 // N/m, σ falls no lower (micelles, or the pure organic); 0: no floor, σ may even become negative
	// Partitioning takes what is at the surface out of the bulk by mass balance
	// (Sorjamaa et al., Atmos. Chem. Phys. 4, 2107, 2004; from memory). Without
	// it all is in the bulk and at the surface too, which overstates activation.
	Partitioning bool
}

// Check returns nil or a *solutes.UnusableError that says which parameter is
// outside its range and what would be right.
func (p Surfactant) Check() error {
	const model = "surface-active organic"
	positive := func(x float64) bool { return x > 0 && !math.IsInf(x, 1) }
	least0 := func(x float64) bool { return x >= 0 && !math.IsInf(x, 1) }
	switch {
	case !(p.Share >= 0 && p.Share <= 1):
		return &solutes.UnusableError{Model: model, Quantity: "the share of the organic", Value: p.Share, Want: "0 to 1"}
	case !positive(p.Density):
		return &solutes.UnusableError{Model: model, Quantity: "the density", Value: p.Density, Want: "a finite number above 0, in kg/m³"}
	case !positive(p.MolarMass):
		return &solutes.UnusableError{Model: model, Quantity: "the molar mass", Value: p.MolarMass, Want: "a finite number above 0, in kg/mol"}
	case !least0(p.GammaMax):
		return &solutes.UnusableError{Model: model, Quantity: "gamma-max", Value: p.GammaMax, Want: "a finite number of at least 0, in mol/m²"}
	case !least0(p.K):
		return &solutes.UnusableError{Model: model, Quantity: "k", Value: p.K, Want: "a finite number of at least 0, in m³/mol"}
	case !least0(p.Floor):
		return &solutes.UnusableError{Model: model, Quantity: "the floor of the surface tension", Value: p.Floor, Want: "a tension in N/m, or 0 for none"}
	}
	return nil
}

// Salt is what a surface-active particle holds besides its organic.
type Salt struct {
	Share    float64          // of the dry volume, ≥ 0
	Kappa    float64          // its κ, where Solution is nil
	Solution solutes.Solution // nil: κ form. u is water per volume of the salt
}

// SurfaceActive is a surface-active particle of one dry size at one temperature.
// It is a solutes.Solution and a solutes.Tension: functions of u, the volume of
// water per volume of dry particle, but of the dry size too.
//
// Water activity is that of the salt and of the organic that is in the bulk, by
// the rule for mixtures (ZSR: at equal a_w the water contents add up); for a salt
// of κ form this is
//
//	a_w = 1/(1 + κ_eff/u),  κ_eff = ε_salt κ_salt + ε_org f ρ_org M_w/(M_org ρ_w)
//
// f is the share of the organic in the bulk. What is adsorbed keeps its volume
// but has no osmotic effect. The whole drop's volume dilutes the organic.
type SurfaceActive struct {
	p           Surfactant
	salt        Salt
	dry         float64 // m
	pureTension float64 // N/m
	kelvin      float64 // 4 M_w/(R T ρ_w Dd), per N/m
	thermal     float64 // Γ_max R T, N/m
	moles       float64 // n per dry volume, mol/m³
	organic     float64 // ε_org ρ_org M_w/(M_org ρ_w), κ of all of the organic
}

// NewSurfaceActive binds an organic and a salt to a dry diameter (m) and a
// temperature (K); pureTension is that of water (N/m), as atmos.SurfaceTension
// gives it. Shares that add up to less than 1 leave an insoluble rest. Errors
// are of type *solutes.UnusableError.
func NewSurfaceActive(dry, temperature, pureTension float64, p Surfactant, salt Salt) (*SurfaceActive, error) {
	if err := p.Check(); err != nil {
		return nil, err
	}
	const model = "surface-active organic"
	switch {
	case !(salt.Share >= 0 && salt.Share+p.Share <= 1+1e-9):
		return nil, &solutes.UnusableError{Model: model, Quantity: "the salt's share", Value: salt.Share, Want: "at least 0 and, with the organic's, at most 1"}
	case salt.Solution == nil && !(salt.Kappa >= 0 && salt.Kappa < GreatestLimitedKappa):
		return nil, &solutes.UnusableError{Model: model, Quantity: "the salt's kappa", Value: salt.Kappa, Want: "at least 0 and below 34.97"}
	case !(dry > 0) || math.IsInf(dry, 1):
		return nil, &solutes.UnusableError{Model: model, Quantity: "the dry diameter", Value: dry, Want: "a length above 0, in m"}
	case !(temperature > 0) || math.IsInf(temperature, 1):
		return nil, &solutes.UnusableError{Model: model, Quantity: "the temperature", Value: temperature, Want: "a temperature above 0, in K"}
	case p.Floor > pureTension:
		return nil, &solutes.UnusableError{Model: model, Quantity: "the floor of the surface tension", Value: p.Floor, Want: "at most that of water"}
	}
	molarVolume := atmos.WaterMolarVolume(temperature)
	s := &SurfaceActive{
		p: p, salt: salt, dry: dry, pureTension: pureTension,
		kelvin:  4 * molarVolume / (atmos.GasConstant * temperature * dry),
		thermal: p.GammaMax * atmos.GasConstant * temperature,
		moles:   p.Share * p.Density / p.MolarMass,
	}
	s.organic = s.moles * molarVolume
	return s, nil
}

// Particle returns the particle of that dry diameter (m) and temperature (K) with
// the tension of pure water where the organic leaves it alone. Errors: those of
// NewSurfaceActive and of Particle.Check.
func (p Surfactant) Particle(dry, temperature float64, salt Salt) (Particle, error) {
	s, err := NewSurfaceActive(dry, temperature, atmos.SurfaceTension(temperature), p, salt)
	if err != nil {
		return Particle{}, err
	}
	particle := Particle{DryDiameter: dry, Temperature: temperature, Solution: s, Tension: s}
	return particle, particle.Check()
}

// DryDiameter returns the dry diameter in m that the drop belongs to.
func (s *SurfaceActive) DryDiameter() float64 { return s.dry }

// Sized returns the same matter of another dry diameter in m.
func (s *SurfaceActive) Sized(dry float64) (solutes.Solution, solutes.Tension) {
	sized := *s
	sized.dry = dry
	sized.kelvin *= s.dry / dry
	return &sized, &sized
}

// SurfaceState is a surface-active drop at one wet size.
type SurfaceState struct {
	Water          float64 // u
	WetDiameter    float64 // m
	Concentration  float64 // c in the bulk, mol/m³
	BulkShare      float64 // f
	SurfaceExcess  float64 // Γ, mol/m²
	SurfaceTension float64 // σ, N/m
	AtFloor        bool    // σ is held at its floor
	Kappa          float64 // κ_eff: (1/a_w - 1) u
	LnActivity     float64
	LnSaturation   float64
	Slope          float64 // d ln S/d ln u
	tensionSlope   float64 // dσ/d ln u
	activitySlope  float64 // d ln a_w/d ln u
}

// At returns the drop at u > 0. Its slopes are exact; at the u where σ reaches
// its floor they are those of the larger drop.
func (s *SurfaceActive) At(u float64) SurfaceState {
	x := math.Cbrt(1 + u)
	v := u / (1 + u) // d ln V/d ln u
	state := SurfaceState{Water: u, WetDiameter: s.dry * x}
	share, shareSlope := 1.0, 0.0
	if s.moles > 0 {
		b := s.partition(u, x)
		share, shareSlope = b.share, b.share*(b.logSlope+v)
		kc := s.p.K * b.concentration
		state.Concentration = b.concentration
		state.SurfaceExcess = s.p.GammaMax * kc / (1 + kc)
		state.SurfaceTension = s.pureTension - s.thermal*math.Log1p(kc)
		state.tensionSlope = -s.thermal * kc / (1 + kc) * b.logSlope
	} else {
		state.SurfaceTension = s.pureTension
	}
	if s.p.Floor > 0 && state.SurfaceTension < s.p.Floor {
		state.SurfaceTension, state.tensionSlope, state.AtFloor = s.p.Floor, 0, true
	}
	state.BulkShare = share
	state.LnActivity, state.activitySlope = s.activity(u, s.organic*share, s.organic*shareSlope)
	state.Kappa = u * math.Expm1(-state.LnActivity)
	curvature := s.kelvin / x
	state.LnSaturation = curvature*state.SurfaceTension + state.LnActivity
	state.Slope = curvature*(state.tensionSlope-state.SurfaceTension*v/3) + state.activitySlope
	return state
}

// LnSaturation returns ln S and its derivative by ln u, with the standard Kelvin
// term 4 σ M_w/(R T ρ_w D).
func (s *SurfaceActive) LnSaturation(u float64) (lnS, slope float64) {
	state := s.At(u)
	return state.LnSaturation, state.Slope
}

// LnActivity implements solutes.Solution.
func (s *SurfaceActive) LnActivity(u float64) (lnaw, slope float64) {
	state := s.At(u)
	return state.LnActivity, state.activitySlope
}

// SurfaceTension implements solutes.Tension.
func (s *SurfaceActive) SurfaceTension(u float64) (sigma, slope float64) {
	state := s.At(u)
	return state.SurfaceTension, state.tensionSlope
}

// LeastWater returns the u at which the salt leaves its range, taken with all of
// the organic in the bulk, which is the safe side; 0 for a salt of κ form.
func (s *SurfaceActive) LeastWater() float64 {
	if s.salt.Solution == nil || s.salt.Share == 0 {
		return 0
	}
	w := s.salt.Solution.LeastWater()
	if w == 0 {
		return 0
	}
	lnaw, _ := s.salt.Solution.LnActivity(w)
	return s.salt.Share*w + s.organic/math.Expm1(-lnaw)
}

// SeveralMaxima is true: a curve of two maxima is common with partitioning.
func (s *SurfaceActive) SeveralMaxima() bool { return true }
