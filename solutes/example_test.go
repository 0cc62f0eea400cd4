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

// A sparingly soluble acid with some salt: it dissolves step by step.
func ExampleDissolve_limitedSolubility() {
	acid, _ := solutes.Standard().Find("succinic acid")
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	d, _, err := solutes.Dissolve(solutes.Recipe{
		Parts:       []solutes.Part{{Substance: acid, Volume: 0.9}, {Substance: salt, Volume: 0.1}},
		Kappa:       math.NaN(), // each part has its own
		Solubility:  solutes.LimitedSolubility,
		Temperature: 298.15,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, l := range d.Limits {
		fmt.Printf("%s is dissolved from %.3g times the dry size on; κ of all is %.3f\n", l.Substance, math.Cbrt(1+l.Water), d.Kappa)
	}
	// Output: succinic acid is dissolved from 2.63 times the dry size on; κ of all is 0.269
}

// A user's substance, with a density in g/cm³ by mistake.
func ExampleNewSubstance() {
	record := map[string]any{"name": "my salt", "kappa": 0.5, "density": 1.77}
	_, err := solutes.NewSubstance("1", record)
	fmt.Println(err)
	record["density"] = 1770.0
	mine, _ := solutes.NewSubstance("1", record)
	catalogue, err := solutes.Standard().Extend([]solutes.Substance{mine})
	fmt.Println(err)
	found, _ := catalogue.Find("My-salt")
	fmt.Println(found.Key, found.Density.Value, found.Density.Source)
	// Output:
	// substance my salt: density is 1.77, should be 100 to 25000 kg/m³
	// <nil>
	// my_salt 1770 user
}

func ExamplePhasesOf() {
	salt, _ := solutes.Standard().Find("sodium chloride")
	phases, _ := solutes.PhasesOf([]solutes.Part{{Substance: salt, Volume: 1}}, 298.15)
	fmt.Printf("dissolves at %.1f %%, crystallises at %.1f %%; at 60 %%: %s when wetted, %s when dried\n",
		100*phases.Dissolved, 100*phases.Efflorescence, phases.Branch(0.6, solutes.Rising), phases.Branch(0.6, solutes.Falling))
	// Output: dissolves at 75.3 %, crystallises at 44.5 %; at 60 %: dry when wetted, solution when dried
}
