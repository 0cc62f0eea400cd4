package atmos

// Relation says about one property function what a reader must know before
// using it.
type Relation struct {
	Key         string // stable, kebab case; stem of the note's code
	Name        string // what it gives, in words
	Unit        string // SI
	Temperature Range  // K, where it may be used without a note
	Quality     string // stated accuracy, with what it was compared
	Source      string
	At          func(T, p float64) float64 // the function itself; p is unused by most
}

// Relations returns the properties of this package that depend on temperature,
// with their ranges, qualities and sources. The slice is the caller's own.
func Relations() []Relation {
	return append(waterRelations(), airRelations()...)
}

func waterRelations() []Relation { return append(dropRelations(), otherWaterRelations()...) }

// dropRelations are those that every equilibrium drop uses.
func dropRelations() []Relation {
	return []Relation{
		{"water-density", "density of liquid water", "kg/m3", WaterDensityRange,
			"within 0.0034 kg/m3 of CIPM at 0 to 40 °C; extrapolated below 0 °C, within 0.011 % of IAPWS G12-15 to -38 °C",
			"Kell 1975", withoutPressure(WaterDensity)},
		{"surface-tension", "surface tension of water", "N/m", SurfaceTensionRange,
			"about 0.5 %; extrapolation below 0 °C called reasonable to -25 °C",
			"IAPWS R1-76(2014)", withoutPressure(SurfaceTension)},
		{"vapour-pressure", "saturation vapour pressure over liquid water", "Pa", VapourPressureRange,
			"within 0.0086 % of IAPWS-95 at 2 to 50 °C; 0.03 % high at -20 °C, 0.18 % at -40 °C",
			"Murphy and Koop 2005, eq. 10", withoutPressure(VapourPressure)},
	}
}

func otherWaterRelations() []Relation {
	return []Relation{
		{"compressibility", "isothermal compressibility of water", "1/Pa", CompressibilityRange,
			"within 5e-5 (relative) of IAPWS SR6-08 at 0 to 50 °C; 0.14 % low at -20 °C, 0.53 % at -30 °C",
			"Kell 1975", withoutPressure(Compressibility)},
		{"latent-heat", "latent heat of vaporisation", "J/kg", LatentHeatRange,
			"within 0.07 % of IAPWS values at -30 to 50 °C",
			"Murphy and Koop 2005, eq. 9", withoutPressure(LatentHeat)},
		{"linear-latent-heat", "latent heat of vaporisation, linear form", "J/kg", LinearLatentHeatRange,
			"within 0.011 % of IAPWS-95 at 0 to 40 °C; 0.06 % low at -20 °C, 0.7 % at -40 °C",
			"common practice; Bolton 1980", withoutPressure(LinearLatentHeat)},
	}
}

func airRelations() []Relation {
	return []Relation{
		{"vapour-diffusivity", "diffusivity of water vapour in air", "m2/s", VapourDiffusivityRange,
			"references differ by 2 to 5 %",
			"Hall and Pruppacher 1976", VapourDiffusivity},
		{"air-conductivity", "thermal conductivity of air", "W/(m K)", AirConductivityRange,
			"1.3 to 2.7 % below Lemmon and Jacobsen 2004",
			"Seinfeld and Pandis, after Beard and Pruppacher 1971", withoutPressure(AirConductivity)},
		{"air-viscosity", "dynamic viscosity of air", "Pa s", AirViscosityRange,
			"0.03 to 0.25 % below Lemmon and Jacobsen 2004",
			"ISO 15900:2020", withoutPressure(AirViscosity)},
		{"mean-free-path", "mean free path of air molecules", "m", MeanFreePathRange,
			"a convention, 67.3 nm at 296.15 K and 101.325 kPa; Jennings 1988 is 1.6 % lower",
			"ISO 15900:2020", MeanFreePath},
	}
}

func withoutPressure(f func(T float64) float64) func(T, p float64) float64 {
	return func(T, _ float64) float64 { return f(T) }
}
