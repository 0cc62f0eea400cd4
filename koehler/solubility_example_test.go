package koehler_test

import (
	"fmt"
	"math"

	"dropcrest/koehler"
	"dropcrest/solutes"
)

// Adipic acid of 100 nm at 25 °C: dry, it must first be dissolved at a high
// supersaturation; dissolved already it activates at a low one.
func ExampleLimitedExtrema() {
	acid, err := solutes.NewLimited([]solutes.LimitedPart{{Volume: 1, Kappa: 0.096, Solubility: 0.0183}})
	if err != nil {
		panic(err)
	}
	kelvin := koehler.KelvinLength(0.072, 298.15)
	turns := koehler.LimitedExtrema(nil, 100e-9, kelvin, acid)
	barrier, place := koehler.Barrier(turns)
	fmt.Printf("extrema: %d, the barrier is the %s maximum\n", len(turns), place)
	fmt.Printf("started dry: %.4g %%\n", 100*turns[barrier].Supersaturation)
	fmt.Printf("dissolved:   %.3g %%\n", 100*koehler.LimitedDissolved(100e-9, kelvin, acid).Supersaturation)
	// Output:
	// extrema: 1, the barrier is the only maximum
	// started dry: 1.942 %
	// dissolved:   0.375 %
}

// A trace of salt puts a first maximum before the point where the acid is
// dissolved.
func ExampleLimitedExtrema_traceOfSalt() {
	mix, err := solutes.NewLimited([]solutes.LimitedPart{
		{Volume: 0.98, Kappa: 0.15, Solubility: 0.01},
		{Volume: 0.02, Kappa: 1.28, Solubility: math.Inf(1)},
	})
	if err != nil {
		panic(err)
	}
	for _, t := range koehler.LimitedExtrema(nil, 150e-9, koehler.KelvinLength(0.072, 298.15), mix) {
		fmt.Printf("growth factor %.4g: %.4f %%, minimum %t\n", t.GrowthFactor, 100*t.Supersaturation, t.Kind == koehler.KinkMinimum)
	}
	// Output:
	// growth factor 2.499: 0.2355 %, minimum false
	// growth factor 4.626: 0.1266 %, minimum true
	// growth factor 6.107: 0.1532 %, minimum false
}
