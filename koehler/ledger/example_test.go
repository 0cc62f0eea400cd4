package ledger_test

import (
	"context"
	"fmt"
	"math"

	"dropcrest/koehler/ledger"
	"dropcrest/solutes"
)

// What the assumptions behind the crest of 20 nm of ammonium sulfate cost, and how
// sure it is.
func Example() {
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	l, err := ledger.Make(ledger.Asked{
		Recipe: solutes.Recipe{Parts: []solutes.Part{{Substance: salt, Volume: 1}}, Model: solutes.KappaModel,
			Kappa: math.NaN(), VantHoffFactor: math.NaN(), Temperature: 298.15},
		DryDiameter: 20e-9, SaturationRatio: 0.95,
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	const s = ledger.CriticalSupersaturation
	fmt.Printf("plain %.4f %%, fullest %.4f %%: %+.1f %%\n", 100*l.Plain.Values[s], 100*l.Fullest.Values[s], l.Change[s])
	for _, r := range l.Ranked(s)[:5] {
		fmt.Printf("%+6.1f %%  %-5t %s\n", r.Change[s], r.Made, r.Says)
	}
	b, _ := ledger.NewBudget(&l, l.Inputs())
	m, _ := b.MonteCarlo(context.Background(), ledger.Settings{})
	fmt.Printf("%.1f %% linear, %.1f %% by trials, most by the %s\n", b.Combined[s], m.Outcomes[s].Percent, b.Ranked(s)[0])
	for _, n := range b.Reach(s, 3) {
		fmt.Printf("for 3 %%: %s to %.2f nm\n", n, 1e9*n.Needed)
	}
	// Output:
	// plain 1.6809 %, fullest 1.8324 %: -8.3 %
	//  -16.2 %  false the textbook cubic s = A/D - B/D³
	//  -15.3 %  false every ion counts in full (i = ν)
	//   -7.4 %  true  one κ at every dilution
	//   -1.3 %  true  the surface tension of pure water
	//   -1.2 %  false 72.0 mN/m and 25 °C throughout
	// 5.0 % linear, 5.0 % by trials, most by the dry diameter
	// for 3 %: dry diameter to 0.33 nm
}
