package koehler_test

import (
	"fmt"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// A strong surfactant, with illustrative parameters, with and without what is at
// the surface being taken out of the bulk.
func ExampleSurfaceActive_Crest() {
	organic := koehler.Surfactant{Share: 0.5, Density: 1100, MolarMass: 0.3, GammaMax: 3e-6, K: 20}
	for _, organic.Partitioning = range []bool{false, true} {
		particle, err := koehler.NewSurfaceActive(80e-9, 298.15, atmos.SurfaceTension(298.15), organic, koehler.Salt{Share: 0.5, Kappa: 0.61})
		if err != nil {
			panic(err)
		}
		crest, place, err := particle.Crest()
		if err != nil {
			panic(err)
		}
		state := particle.At(crest.Water)
		fmt.Printf("partitioning %t: %.4f %% (%s maximum), %.1f mN/m, %.3g of the organic in the bulk\n",
			organic.Partitioning, 100*crest.Supersaturation, place, 1000*state.SurfaceTension, state.BulkShare)
	}
	// Output:
	// partitioning false: 0.1307 % (only maximum), 46.3 mN/m, 1 of the organic in the bulk
	// partitioning true: 0.2846 % (only maximum), 70.2 mN/m, 0.00174 of the organic in the bulk
}
