package koehler_test

import (
	"fmt"

	"dropcrest/koehler"
	"dropcrest/solutes"
)

func ExampleParticle_Crest() {
	p := koehler.Particle{DryDiameter: 100e-9, Temperature: 298.15, Solution: solutes.Kappa(0.61)}
	crest, err := p.Crest()
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%.6g %% at %.6g µm\n", 100*crest.Supersaturation, 1e6*crest.WetDiameter)
	// Output: 0.149846 % at 0.934661 µm
}

func ExampleKappaOf() {
	kappa, err := koehler.KappaOf(43e-9, 2.09918e-9, 0.011)
	fmt.Printf("%.3f %v\n", kappa, err)
	// Output: 0.139 <nil>
}
