package verify

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// koehlerChecks recomputes what is published about droplets. Arguments: S
// (saturation ratio), s (supersaturation, a fraction), T (K), dry and wet
// diameters d and D (m), mass of salt (kg), kappa, A (Kelvin length, m), and of
// adsorbed films a, b and the share of a soluble coat.
func koehlerChecks() map[string]Check {
	return map[string]Check{
		"kelvin-length": func(a Args) (float64, error) {
			sigma, T := a.Number("sigma"), a.Number("T")
			return 4 * sigma * atmos.WaterMolarMass / (atmos.GasConstant * T * a.Number("density")), nil
		},
		"kelvin-radius":    func(a Args) (float64, error) { return kelvinRadius(a), nil },
		"kelvin-molecules": kelvinMolecules,
		"kelvin-excess":    kelvinExcess,
		"kappa-of": func(a Args) (float64, error) {
			return koehler.KappaOf(a.Number("d"), kelvinLength(a), a.Number("s"))
		},
		"kappa-of-classic": func(a Args) (float64, error) {
			return koehler.KappaOfClassic(a.Number("d"), kelvinLength(a), a.Number("s")), nil
		},
		"kappa-crest": func(a Args) (float64, error) {
			return koehler.SolveKappa(a.Number("d"), kelvinLength(a), a.Number("kappa")).Supersaturation, nil
		},
		"classic-over-exact": func(a Args) (float64, error) {
			d, A, kappa := a.Number("d"), kelvinLength(a), a.Number("kappa")
			return koehler.KappaClassic(d, A, kappa).Supersaturation / koehler.SolveKappa(d, A, kappa).Supersaturation, nil
		},
		"sodium-chloride-critical-radius": func(a Args) (float64, error) {
			crest, err := nucleus(a)
			return crest.WetDiameter / 2, err
		},
		"sodium-chloride-critical-supersaturation": func(a Args) (float64, error) {
			crest, err := nucleus(a)
			return crest.Supersaturation, err
		},
		"ammonium-sulfate-growth": growth,
		"film-slope":              filmSlope,
		"crystal-dissolves":       crystalDissolves,
	}
}

// kelvinLength is A as given, else that of pure water at T.
func kelvinLength(a Args) float64 {
	if a.Has("A") {
		return a.Number("A")
	}
	T := a.Number("T")
	return koehler.KelvinLength(atmos.SurfaceTension(T), T)
}

// kelvinRadius is the radius of a drop of pure water in equilibrium at S.
func kelvinRadius(a Args) float64 { return kelvinLength(a) / (2 * math.Log(a.Number("S"))) }

func kelvinMolecules(a Args) (float64, error) {
	r, T := kelvinRadius(a), a.Number("T")
	return 4 * math.Pi / 3 * r * r * r * atmos.Avogadro / atmos.WaterMolarVolume(T), nil
}

// kelvinExcess is (ln S of a form - ln S standard)/ln S standard for pure water,
// with the properties given.
func kelvinExcess(a Args) (float64, error) {
	per := a.Number("v") / (atmos.GasConstant * a.Number("T"))
	k := koehler.KelvinTerm{PerPressure: per}
	if a.Has("p0") {
		k.Form, k.Vapour = koehler.PureVapour, per*a.Number("p0")
	} else {
		k.Form, k.Compressibility = koehler.Compressible, a.Number("compressibility")
	}
	dp := koehler.LaplacePressure(a.Number("sigma"), a.Number("D"))
	lnS, _, _ := k.LnSaturation(dp, 0)
	return lnS/(per*dp) - 1, nil
}

// nucleus is the crest of a sphere of sodium chloride of given mass with van 't
// Hoff factor 2.
func nucleus(a Args) (koehler.Crest, error) {
	const density, molarMass = 2165, 0.0584428 // kg/m³, kg/mol
	T := a.Number("T")
	return koehler.Particle{
		DryDiameter: math.Cbrt(6 * a.Number("mass") / (math.Pi * density)),
		Temperature: T,
		Solution:    solutes.VantHoffKappa(2, molarMass, density, atmos.WaterDensity(T)),
	}.Crest()
}

// growth is the diameter growth factor of ammonium sulfate by ion interaction
// joined to the concentrated polynomial.
func growth(a Args) (float64, error) {
	T := a.Number("T")
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	p, err := saltParticle(salt, a.Number("d"), T)
	if err != nil {
		return math.NaN(), err
	}
	haze, _, err := p.Haze(a.Number("S"))
	return haze.WetDiameter / p.DryDiameter, err
}

// saltParticle is a particle of one salt by ion interaction joined to its
// concentrated data.
func saltParticle(salt solutes.Substance, dry, T float64) (koehler.Particle, error) {
	solution, err := solutes.NewSalt(solutes.SaltInput{
		Ion: salt.Ion, Concentrated: salt.Concentrated, MolarMass: salt.MolarMass.Value,
		Density: salt.Density.Value, WaterDensity: atmos.WaterDensity(T), Temperature: T,
	})
	return koehler.Particle{DryDiameter: dry, Temperature: T, Solution: solution}, err
}

// filmSlope is the slope of ln s_c against ln of the dry size from 100 to 500 nm.
func filmSlope(a Args) (float64, error) {
	film := koehler.Adsorption{A: a.Number("a"), B: a.Number("b"), SolubleShare: a.Number("share"), Kappa: a.Number("kappa")}
	const small, large = 100e-9, 500e-9
	var s [2]float64
	for i, dry := range [2]float64{small, large} {
		p, err := film.Particle(dry, a.Number("T"))
		if err != nil {
			return math.NaN(), err
		}
		crest, err := p.Crest()
		if err != nil {
			return math.NaN(), err
		}
		s[i] = crest.Supersaturation
	}
	return math.Log(s[1]/s[0]) / math.Log(large/small), nil
}

// crystalDissolves is the humidity over a small crystal of sodium chloride at
// which it dissolves.
func crystalDissolves(a Args) (float64, error) {
	salt, _ := solutes.Standard().Find("sodium chloride")
	T := a.Number("T")
	p, err := saltParticle(salt, a.Number("d"), T)
	if err != nil {
		return math.NaN(), err
	}
	flat, _ := solutes.PhasesOf([]solutes.Part{{Substance: salt, Volume: 1}}, T)
	h, err := p.Hysteresis(0.5, flat, solutes.Rising)
	return h.Over.Dissolved, err
}
