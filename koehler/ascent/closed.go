package ascent

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

// Method names a closed form.
type Method int

const (
	Twomey1959        Method = iota // the power law that touches the population's spectrum at its own peak
	AbdulRazzakGhan00               // Abdul-Razzak & Ghan 2000
	FountoukisNenes05               // Fountoukis & Nenes 2005, population splitting
)

// String returns the word that scripts see.
func (m Method) String() string {
	switch m {
	case Twomey1959:
		return "twomey-1959"
	case AbdulRazzakGhan00:
		return "abdul-razzak-ghan-2000"
	case FountoukisNenes05:
		return "fountoukis-nenes-2005"
	}
	return "unknown"
}

// Source returns author, journal, volume and page.
func (m Method) Source() string {
	switch m {
	case Twomey1959:
		return "Twomey, Geofis. Pura Appl. 43 (1959) 243"
	case AbdulRazzakGhan00:
		return "Abdul-Razzak & Ghan, J. Geophys. Res. 105 (2000) 6837"
	case FountoukisNenes05:
		return "Fountoukis & Nenes, J. Geophys. Res. 110 (2005) D11212; Nenes & Seinfeld, J. Geophys. Res. 108 (2003) 4415"
	}
	return ""
}

// Limits says in one sentence what the form leaves out.
func (m Method) Limits() string {
	switch m {
	case Twomey1959:
		return "A power law for the whole spectrum, every drop grown from its activation on as if it had no size before: no kinetic limit, accommodation of 1, no haze water. It bounds the peak from above for a true power law only; where the spectrum bends, the touching power law lies above it and the peak comes out too low."
	case AbdulRazzakGhan00:
		return "Fitted to a parcel model; diffusivity without kinetic correction, accommodation of 1; too few droplets where many small particles compete, with giant particles beside small ones, or in weak updraft."
	case FountoukisNenes05:
		return "Drops below their critical size by the splitting alone; no haze water of unactivated particles; one mean diffusivity for all drops; too low a peak with many coarse particles."
	}
	return ""
}

// ClosedForm is what a closed form says of a parcel.
type ClosedForm struct {
	Method   Method
	Peak     float64   // supersaturation
	Droplets float64   // 1/m³ of the air at the start
	ByGroup  []float64 // the same, one a group
}

// ClosedForms returns all closed forms of a parcel, and for each that cannot be had
// the reason in its place of errs.
func ClosedForms(p Parcel, o Options) (forms []ClosedForm, errs []error) {
	for m := Twomey1959; m <= FountoukisNenes05; m++ {
		f, err := Closed(m, p, o)
		forms, errs = append(forms, f), append(errs, err)
	}
	return forms, errs
}

// Closed returns what one closed form says. The groups must be lognormal modes
// (aerosol.Mode or aerosol.Modes); of Matter and of κ by size the crest at the median
// is taken. Of the options only the mass accommodation counts, and that for
// Fountoukis & Nenes only.
func Closed(m Method, p Parcel, o Options) (ClosedForm, error) {
	p, o, err := completed(p, o)
	if err != nil {
		return ClosedForm{}, err
	}
	modes, err := closedModes(p)
	if err != nil {
		return ClosedForm{}, err
	}
	if len(modes) == 0 {
		return ClosedForm{}, fmt.Errorf("%w: a closed form needs particles that take up water", ErrInput)
	}
	air := closedAirAt(p.Temperature, p.Pressure)
	peak := 0.0
	switch m {
	case Twomey1959:
		peak = twomeyOf(modes, air, p.Updraft)
	case AbdulRazzakGhan00:
		peak = razzakGhan(modes, air, p.Updraft)
	case FountoukisNenes05:
		peak = nenes(modes, air, p.Updraft, o.MassAccommodation)
	default:
		return ClosedForm{}, unusable("closed form", -1, float64(m), "one of the named methods")
	}
	f := ClosedForm{Method: m, Peak: peak, ByGroup: make([]float64, len(p.Population))}
	for _, mode := range modes {
		n := mode.activated(peak)
		f.ByGroup[mode.group] += n
		f.Droplets += n
	}
	return f, nil
}

// closedAir is what the closed forms need of the air at the start.
type closedAir struct {
	T, p        float64
	rho         float64 // water, kg/m³
	kelvin      float64 // A for a diameter, m
	cooling     float64 // α, 1/m: ds/dz by cooling
	depletion   float64 // γ, m³/kg: -ds per condensed water in a m³
	growth      float64 // G for r dr/dt = G s, without kinetic correction, m²/s
	diffusivity float64 // m²/s
}

// closedAirAt works out the coefficients as Abdul-Razzak & Ghan do:
//
//	α = g M_w L/(c_p R T²) - g M_a/(R T)
//	γ = R T/(e_s M_w) + M_w L²/(c_p p M_a T)
//	G = 1/[ρ_w R T/(e_s D_v M_w) + (L ρ_w/(k_a T))(L M_w/(R T) - 1)]
func closedAirAt(T, p float64) closedAir {
	const R, Mw, Md = atmos.GasConstant, atmos.WaterMolarMass, atmos.DryAirMolarMass
	L, es, rho := atmos.LinearLatentHeat(T), atmos.VapourPressure(T), atmos.WaterDensity(T)
	D := atmos.VapourDiffusivity(T, p)
	c := climateAt(T, p, massRatio*es/(p-es), rho, kinetics{Continuum, 1, 1})
	return closedAir{
		T: T, p: p, rho: rho, kelvin: 2 * c.kelvin,
		cooling:     gravity*Mw*L/(dryAirHeat*R*T*T) - gravity*Md/(R*T),
		depletion:   R*T/(es*Mw) + Mw*L*L/(dryAirHeat*p*Md*T),
		growth:      1 / (c.diffusion + c.conduction),
		diffusivity: D,
	}
}

// closedMode is a lognormal mode with the crest of its median.
type closedMode struct {
	aerosol.Mode
	group int
	crest float64 // supersaturation of the median, in the dilute form
}

// activated counts the particles with s_c ≤ s, where s_c goes with D^-3/2.
func (m closedMode) activated(s float64) float64 {
	u := 2 * math.Log(m.crest/s) / (3 * math.Sqrt2 * math.Log(m.GSD))
	return m.Concentration / 2 * math.Erfc(u)
}

func closedModes(p Parcel) ([]closedMode, error) {
	var out []closedMode
	for i, g := range p.Population {
		c := cohort{Group: g}
		orDefault(&c.Share, 1)
		orDefault(&c.TensionFactor, 1)
		if err := c.check(); err != nil {
			return nil, &GroupError{Group: i, Err: err}
		}
		var modes aerosol.Modes
		switch s := g.Sizes.(type) {
		case aerosol.Mode:
			modes = aerosol.Modes{s}
		case aerosol.Modes:
			modes = s
		default:
			return nil, &GroupError{Group: i, Err: fmt.Errorf("%w: closed forms need lognormal modes; fit some to the bins", ErrInput)}
		}
		if c.isInert() {
			continue
		}
		for _, m := range modes {
			crest, err := c.medianCrest(m.Median, p.Temperature)
			if err != nil {
				return nil, &GroupError{Group: i, Err: err}
			}
			m.Concentration *= c.Share
			if m.Concentration > 0 {
				out = append(out, closedMode{m, i, crest})
			}
		}
	}
	return out, nil
}

// medianCrest is the crest of the median; of κ in the dilute form √(4A³/(27 κ D³)) that
// all closed forms use.
func (c *cohort) medianCrest(d, T float64) (float64, error) {
	if c.Matter != nil {
		crest, err := c.particle(d, T).Crest()
		if err == nil && !(crest.Supersaturation > 0) {
			err = koehler.ErrNoCrest
		}
		return crest.Supersaturation, err
	}
	A := c.kelvinLength(T, atmos.WaterDensity(T))
	return math.Sqrt(4 * A * A * A / (27 * c.kappaAt(d) * d * d * d)), nil
}

// rootSteps halve the decades between the two ends of rising below rounding.
const rootSteps = 80

// rising returns the s between lo and hi at which f, which rises with s, is zero.
func risingRoot(lo, hi float64, f func(s float64) float64) float64 {
	a, b := math.Log(lo), math.Log(hi)
	for range rootSteps {
		if mid := (a + b) / 2; f(math.Exp(mid)) < 0 {
			a = mid
		} else {
			b = mid
		}
	}
	return math.Exp((a + b) / 2)
}
