package koehler_test

import (
	"fmt"

	"dropcrest/koehler"
)

// Fresh mineral dust of 200 nm, bare and with a tenth of soluble coat.
func ExampleAdsorptionCrest() {
	kelvin := koehler.KelvinLength(0.072, 298.15)
	dust := koehler.Adsorption{A: 2.25, B: 1.2}
	bare, err := koehler.AdsorptionCrest(200e-9, kelvin, dust)
	if err != nil {
		panic(err)
	}
	dust.SolubleShare, dust.Kappa = 0.1, 0.6
	coated, err := koehler.AdsorptionCrest(200e-9, kelvin, dust)
	if err != nil {
		panic(err)
	}
	fmt.Printf("bare:   %.3f %% at %.3g layers\n", 100*bare.Supersaturation, dust.On(200e-9).Layers(bare.Water))
	fmt.Printf("coated: %.3f %%\n", 100*coated.Supersaturation)
	// Output:
	// bare:   0.337 % at 337 layers
	// coated: 0.126 %
}
