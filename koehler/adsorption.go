package koehler

import (
	"math"

	"dropcrest/solutes"
)

// WaterLayer is the thickness of one adsorbed layer of water, m, as adsorption
// activation theory takes it (Kumar, Sokolik and Nenes 2009; from memory).
const WaterLayer = 0.275e-9

// SolubleForm names the published form of the soluble share's term.
type SolubleForm int

const (
	// KappaActivity adds ln of the κ-Köhler activity, -ln(1 + ε κ Dd³/(D³ - Dd³)).
	KappaActivity SolubleForm = iota
	// Exponential adds -ε κ Dd³/(D³ - (1-ε) Dd³), the first-order form, which
	// stays finite at the dry size.
	Exponential
)

// Adsorption is water adsorbed on an insoluble particle by the
// Frenkel-Halsey-Hill isotherm, with a soluble share on top if there is one:
//
//	ln S = A/D - A_F θ^(-B_F) + soluble term
//	θ = (D - Dc)/(2 Layer),  Dc = Dd (1 - ε)^(1/3)
//
// (Sorjamaa and Laaksonen, Atmos. Chem. Phys. 7, 6175, 2007; Kumar, Sokolik and
// Nenes, Atmos. Chem. Phys. 9, 2517, 2009, and 11, 3527 and 8661, 2011; from
// memory). θ counts layers of water and coat on the insoluble core. Published
// parameters of minerals: A_F 0.25 to 3, B_F 1 to 2.5; adsorption and activation
// measurements give different ones for clays.
type Adsorption struct {
	A            float64 // A_F, > 0; 0: wettable, adsorbs nothing (Kelvin only)
	B            float64 // B_F, > 0
	Layer        float64 // m; 0: WaterLayer
	SolubleShare float64 // ε, share of the dry volume, 0 ≤ ε < 1
	Kappa        float64 // κ of the soluble share, ≥ 0
	Form         SolubleForm
}

// Check returns nil or a *solutes.UnusableError that says which parameter is
// outside its range and what would be right.
func (p Adsorption) Check() error {
	const model = "adsorption"
	switch {
	case !(p.A >= 0) || math.IsInf(p.A, 1):
		return &solutes.UnusableError{Model: model, Quantity: "A", Value: p.A, Want: "a finite number of at least 0"}
	case !(p.B > 0) || math.IsInf(p.B, 1):
		return &solutes.UnusableError{Model: model, Quantity: "B", Value: p.B, Want: "a finite number above 0"}
	case !(p.Layer >= 0) || math.IsInf(p.Layer, 1):
		return &solutes.UnusableError{Model: model, Quantity: "the layer's thickness", Value: p.Layer, Want: "a length in m, or 0 for 0.275 nm"}
	case !(p.SolubleShare >= 0 && p.SolubleShare < 1):
		return &solutes.UnusableError{Model: model, Quantity: "the soluble share", Value: p.SolubleShare, Want: "at least 0 and below 1"}
	case !(p.Kappa >= 0 && p.Kappa < GreatestLimitedKappa):
		return &solutes.UnusableError{Model: model, Quantity: "kappa", Value: p.Kappa, Want: "at least 0 and below 34.97"}
	}
	return nil
}

// AdsorbedWater is the water activity of an Adsorption on particles of one dry
// size. It is a solutes.Solution: as everywhere it is a function of u, the
// volume of water per volume of dry particle, but of the dry size too.
type AdsorbedWater struct {
	p         Adsorption
	dry       float64 // Dd, m
	gap       float64 // (Dd - Dc)/Dd, the coat
	layers    float64 // Dd/(2 Layer), layers per Dd
	osmotic   float64 // ε κ
	leastThin float64 // x - 1 at one layer
}

// On binds the parameters, which Check must have found usable, to a dry
// diameter (m).
func (p Adsorption) On(dry float64) AdsorbedWater {
	if p.Layer == 0 {
		p.Layer = WaterLayer
	}
	core := math.Cbrt(1 - p.SolubleShare)
	w := AdsorbedWater{
		p:       p,
		dry:     dry,
		gap:     p.SolubleShare / (1 + core*(1+core)),
		layers:  dry / (2 * p.Layer),
		osmotic: p.SolubleShare * p.Kappa,
	}
	w.leastThin = math.Max(0, 1/w.layers-w.gap)
	return w
}

// Particle returns the particle of that dry diameter (m) and temperature (K) that
// the parameters describe. Errors: those of both Checks.
func (p Adsorption) Particle(dry, temperature float64) (Particle, error) {
	if err := p.Check(); err != nil {
		return Particle{}, err
	}
	particle := Particle{DryDiameter: dry, Temperature: temperature, Solution: p.On(dry)}
	return particle, particle.Check()
}

// DryDiameter returns the dry diameter in m that the water belongs to.
func (w AdsorbedWater) DryDiameter() float64 { return w.dry }

// Sized returns the adsorbed water on particles of another dry diameter in m. It
// has no tension of its own.
func (w AdsorbedWater) Sized(dry float64) (solutes.Solution, solutes.Tension) {
	return w.p.On(dry), nil
}

// Layers returns θ, the number of layers on the insoluble core at u.
func (w AdsorbedWater) Layers(u float64) float64 { return w.layers * (thickness(u) + w.gap) }

// LeastWater returns the u of one layer. The isotherm is one of multilayers:
// below that it is outside its range (common practice).
func (w AdsorbedWater) LeastWater() float64 {
	t := w.leastThin
	return t * (3 + t*(3+t))
}

// SeveralMaxima tells whether the curve may have more than one extremum, or none:
// for B_F < 1, see AdsorptionCrest.
func (w AdsorbedWater) SeveralMaxima() bool { return w.p.B < 1 }

// LnActivity returns ln a_w, the adsorption term included, and its derivative by
// ln u. u > 0.
func (w AdsorbedWater) LnActivity(u float64) (lnaw, slope float64) {
	t := thickness(u)
	x := 1 + t
	adsorbed := w.adsorbed(t)
	lnaw = -adsorbed
	if adsorbed > 0 {
		slope = adsorbed * w.p.B * u / (3 * x * x * (t + w.gap))
	}
	if w.osmotic == 0 {
		return lnaw, slope
	}
	if w.p.Form == Exponential {
		d := u + w.p.SolubleShare
		return lnaw - w.osmotic/d, slope + w.osmotic*u/(d*d)
	}
	return lnaw - math.Log1p(w.osmotic/u), slope + w.osmotic/(u+w.osmotic)
}

// DryLnActivity returns the limit of ln a_w at the dry size: finite for the
// Exponential form and for a share without κ, -Inf where a film starts from
// nothing or the κ form is used.
func (w AdsorbedWater) DryLnActivity() float64 {
	switch {
	case w.osmotic > 0 && w.p.Form == KappaActivity:
		return math.Inf(-1)
	case w.osmotic > 0:
		return -w.adsorbed(0) - w.p.Kappa
	}
	return -w.adsorbed(0)
}

// DiluteKappa returns ε κ, which is what is left of the water activity at infinite
// dilution as far as it is a matter of solute.
func (w AdsorbedWater) DiluteKappa() float64 { return w.osmotic }

// adsorbed returns A θ^(-B) at t = x - 1.
func (w AdsorbedWater) adsorbed(t float64) float64 {
	if w.p.A == 0 {
		return 0
	}
	return w.p.A * math.Pow(w.layers*(t+w.gap), -w.p.B)
}
