package koehler_test

import (
	"fmt"
	"math"

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

// A crystal of ammonium sulfate of 50 nm at 70 %: dry if the humidity has risen,
// a metastable drop if it has fallen.
func ExampleParticle_Hysteresis() {
	const T = 298.15
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	recipe := solutes.Recipe{
		Parts: []solutes.Part{{Substance: salt, Volume: 1}}, Model: solutes.IonInteraction, Temperature: T,
		Kappa: math.NaN(), VantHoffFactor: math.NaN(), // not given
	}
	dissolved, _, err := solutes.Dissolve(recipe)
	if err != nil {
		panic(err)
	}
	p := koehler.Particle{DryDiameter: 50e-9, Temperature: T, Solution: dissolved.Solution, Tension: dissolved.Tension}
	flat, _ := solutes.PhasesOf(recipe.Parts, T)
	h, err := p.Hysteresis(0.70, flat, solutes.Rising)
	if err != nil {
		panic(err)
	}
	fmt.Printf("it dissolves at %.1f %%, a large one at %.1f %%\n", 100*h.Over.Dissolved, 100*flat.Dissolved)
	fmt.Printf("%v: %.3g nm, or %v: %.3g nm\n", h.Now.Branch, h.Now.WetDiameter*1e9, h.Other.Branch, h.Other.WetDiameter*1e9)
	// Output:
	// it dissolves at 82.2 %, a large one at 79.9 %
	// dry: 50 nm, or solution: 67.1 nm
}
