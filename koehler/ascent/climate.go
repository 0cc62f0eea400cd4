package ascent

import (
	"math"

	"dropcrest/atmos"
)

const (
	dryAirHeat = 1005.0 // c_p of dry air, J/(kg K); common practice
	vapourHeat = 1850.0 // c_p of water vapour, J/(kg K); common practice, 1 % below that of steam tables
	// of liquid water, J/(kg K): by Kirchhoff's law with the latent heat. 4220 is that at 0 °C
	liquidHeat = vapourHeat - atmos.LinearLatentHeatSlope

	massRatio = atmos.WaterMolarMass / atmos.DryAirMolarMass
	dryAirGas = atmos.GasConstant / atmos.DryAirMolarMass // R_d, J/(kg K)
)

// climate is what all drops share at one temperature, pressure and vapour, with
// the derivatives that the Jacobian needs. r F(r) is diffusion Q_v + conduction Q_k with
// the films' Q.
type climate struct {
	S, byT, byP, byVapour float64 // saturation ratio; its derivatives

	latent        float64 // J/kg
	kelvin        float64 // A/2: ln of the Kelvin factor times r, m
	kelvinSlope   float64 // d ln kelvin/dT
	diffusion     float64 // F in the continuum is diffusion + conduction, s/m²
	conduction    float64
	diffusionT    float64 // d/dT
	conductionT   float64
	diffusionP    float64 // d/dp
	diffuse, warm film
}

// film is the correction of a diffusivity or conductivity at the surface of a drop:
// the continuum's value over the corrected one, times r, is
//
//	Q(r) = (r² + c1 r + c2)/(r + l)
//
// c1, l go with the mean free path and c2 with its square, whose logarithmic
// derivatives are lnT and lnP.
type film struct{ c1, c2, l, lnT, lnP float64 }

func (f film) at(r float64) (q, byRadius float64) {
	q = (r*(r+f.c1) + f.c2) / (r + f.l)
	return q, (2*r + f.c1 - q) / (r + f.l)
}

// byPath is dQ/d ln λ.
func (f film) byPath(r, q float64) float64 { return (f.c1*r + 2*f.c2 - q*f.l) / (r + f.l) }

// kinetics is what of the films does not change within a run.
type kinetics struct {
	form          Transition
	mass, thermal float64 // accommodation
}

// film makes the correction from D/c̄ or its like, where the mean free path is
// 3 D/c̄, and flux matching has a length D √(2π M/(R T))/α = 4 D/(α c̄).
func (k kinetics) film(perSpeed, accommodation, lnT, lnP float64) film {
	switch k.form {
	case FuchsSutugin:
		path, a := 3*perSpeed, 4/(3*accommodation)
		return film{(a + 0.377) * path, a * path * path, path, lnT, lnP}
	case FluxMatching:
		return film{4 * perSpeed / accommodation, 0, 0, lnT, lnP}
	}
	return film{}
}

// climateAt works out the climate. The density of water is rho in kg/m³.
func climateAt(T, p, vapour, rho float64, k kinetics) (c climate) {
	const R, Mw, Md = atmos.GasConstant, atmos.WaterMolarMass, atmos.DryAirMolarMass
	saturation := atmos.VapourPressure(T)
	saturationT := atmos.VapourPressureLogSlope(T)
	c.S = vapour * p / ((massRatio + vapour) * saturation)
	c.byT, c.byP = -c.S*saturationT, c.S/p
	c.byVapour = c.S * (1/vapour - 1/(massRatio+vapour))

	tensionT := atmos.SurfaceTensionLogSlope(T)
	c.kelvin = 2 * atmos.SurfaceTension(T) * Mw / (R * T * rho)
	c.kelvinSlope = tensionT - 1/T

	L, LT := atmos.LinearLatentHeat(T), atmos.LinearLatentHeatSlope
	c.latent = L
	D, DT := atmos.VapourDiffusivity(T, p), atmos.VapourDiffusivityLogSlope(T)
	K := atmos.AirConductivity(T)
	KT := atmos.AirConductivitySlope / K
	c.diffusion = rho * R * T / (saturation * D * Mw)
	c.diffusionT = c.diffusion * (1/T - saturationT - DT)
	c.diffusionP = c.diffusion / p // D falls with p
	front, back := L*rho/(K*T), L*Mw/(R*T)-1
	c.conduction = front * back
	c.conductionT = front*(LT/L-KT-1/T)*back + front*(back+1)*(LT/L-1/T)

	c.diffuse = k.film(D/math.Sqrt(8*R*T/(math.Pi*Mw)), k.mass, DT-0.5/T, -1/p)
	density := p / (dryAirGas * T)
	c.warm = k.film(K/(density*dryAirHeat*math.Sqrt(8*R*T/(math.Pi*Md))), k.thermal, KT+0.5/T, -1/p)
	return c
}

// conductance is 1/(r F): dr/dt per S - S_eq, in m/s.
func (c *climate) conductance(r float64) float64 {
	qv, _ := c.diffuse.at(r)
	qk, _ := c.warm.at(r)
	return 1 / (c.diffusion*qv + c.conduction*qk)
}
