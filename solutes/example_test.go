package solutes_test

import (
	"fmt"
	"math"

	"dropcrest/solutes"
)

func ExampleDissolve() {
	salt, _ := solutes.Standard().Find("sodium chloride")
	soot, _ := solutes.Standard().Find("soot")
	d, notes, err := solutes.Dissolve(solutes.Recipe{
		Parts:       []solutes.Part{{Substance: salt, Volume: 0.4}, {Substance: soot, Volume: 0.6}},
		Model:       solutes.IonInteraction,
		Temperature: 298.15,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	const growth = 5.0
	u := growth*growth*growth - 1
	lnaw, _ := d.Solution.LnActivity(u)
	fmt.Printf("water activity %.6g at %.4g mol/kg, %d notes\n", math.Exp(lnaw), d.Molality(u), len(notes))
	// Output: water activity 0.995995 at 0.1199 mol/kg, 0 notes
}

func ExampleCatalogue_Near() {
	fmt.Println(solutes.Standard().Near("amonium sulphat", 2))
	// Output: [ammonium sulfate ammonium bisulfate]
}
