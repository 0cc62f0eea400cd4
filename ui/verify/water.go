package verify

import (
	"fmt"

	"dropcrest/atmos"
)

// waterChecks recomputes what is published about water and air. Arguments: T
// (K), p (Pa), d (m), name (key of a constant).
func waterChecks() map[string]Check {
	return map[string]Check{
		"constant":     constantCheck,
		"gas-constant": func(Args) (float64, error) { return atmos.Boltzmann * atmos.Avogadro, nil },
		"gas-constant-vapour": func(Args) (float64, error) {
			return atmos.GasConstant / atmos.WaterMolarMass, nil
		},

		"water-density":   ofTemperature(atmos.WaterDensity),
		"surface-tension": ofTemperature(atmos.SurfaceTension),
		"vapour-pressure": ofTemperature(atmos.VapourPressure),
		"compressibility": ofTemperature(atmos.Compressibility),
		"latent-heat":     ofTemperature(atmos.LatentHeat),

		"air-conductivity":   ofTemperature(atmos.AirConductivity),
		"air-viscosity":      ofTemperature(atmos.AirViscosity),
		"vapour-diffusivity": ofAir(atmos.VapourDiffusivity),
		"mean-free-path":     ofAir(atmos.MeanFreePath),
		"slip": func(a Args) (float64, error) {
			return atmos.SlipCorrection(a.Number("d"), a.Number("T"), a.Number("p")), nil
		},
	}
}

func ofTemperature(f func(T float64) float64) Check {
	return func(a Args) (float64, error) { return f(a.Number("T")), nil }
}

func ofAir(f func(T, p float64) float64) Check {
	return func(a Args) (float64, error) { return f(a.Number("T"), a.Number("p")), nil }
}

func constantCheck(a Args) (float64, error) {
	name := a.Text("name")
	for _, c := range atmos.Constants() {
		if c.Key == name {
			return c.Value, nil
		}
	}
	return 0, fmt.Errorf("no constant %q", name)
}
