package solutes_test

import (
	"fmt"
	"math"

	"dropcrest/solutes"
)

// A particle that holds a sparingly soluble acid and a miscible compound: where
// the acid has dissolved the curve has a kink.
func ExampleNewLimited() {
	l, err := solutes.NewLimited([]solutes.LimitedPart{
		{Volume: 0.6, Kappa: 0.231, Solubility: 0.0526},
		{Volume: 0.4, Kappa: 0.1, Solubility: math.Inf(1)},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("dissolved at u = %.6g\n", l.Point(0))
	for _, u := range []float64{1, 20} {
		lnaw, _ := l.LnActivity(u)
		k, g := l.Segment(l.SegmentAt(u))
		fmt.Printf("u = %-3g a_w %.6f  K %.6g  G %.6g\n", u, math.Exp(lnaw), k, g)
	}
	// Output:
	// dissolved at u = 11.4068
	// u = 1   a_w 0.950434  K 0.04  G 0.0121506
	// u = 20  a_w 0.991149  K 0.1786  G 0
}

// Sulfuric acid: the osmotic coefficient with complete dissociation as 1.
func ExampleOwnModel() {
	acid, _ := solutes.Standard().Find("sulfuric acid")
	o, says, _, _, err := solutes.OwnModel(acid, 298.15)
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(says)
	for _, m := range []float64{0.1, 1, 3} {
		fmt.Printf("%g mol/kg: %.4f\n", m, o.Osmotic(m))
	}
	// Output:
	// ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tabazadeh et al. 1997
	// 0.1 mol/kg: 0.6766
	// 1 mol/kg: 0.7224
	// 3 mol/kg: 0.9928
}

// Sodium chloride as a mixture of one salt.
func ExampleNewBrine() {
	b, err := solutes.NewBrine(
		[]solutes.BrineIon{{Name: "Na+", Charge: 1, Amount: 1}, {Name: "Cl-", Charge: -1, Amount: 1}},
		[]solutes.BrinePair{{Cation: "Na+", Anion: "Cl-", B0: 0.0765, B1: 0.2664, Cphi: 0.00127}},
		nil, solutes.DebyeHueckel(298.15))
	if err != nil {
		fmt.Println(err)
		return
	}
	phi, _ := b.Osmotic(1)
	gamma := make([]float64, 2)
	b.LnGamma(gamma, 1)
	fmt.Printf("1 mol/kg: osmotic coefficient %.4f, mean activity coefficient %.4f\n", phi, math.Exp((gamma[0]+gamma[1])/2))
	// Output:
	// 1 mol/kg: osmotic coefficient 0.9359, mean activity coefficient 0.6555
}
