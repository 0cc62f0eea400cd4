package spectrum_test

import (
	"errors"
	"fmt"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
)

// Two modes of one hygroscopicity at 20 °C.
func ExamplePopulation_Counts() {
	const T = 293.15
	of := spectrum.Kappa{Value: 0.3, KelvinLength: koehler.KelvinLength(atmos.SurfaceTension(T), T)}
	p := spectrum.Population{
		{Sizes: aerosol.Mode{Concentration: 850e6, Median: 45e-9, GSD: 1.6}, Share: 1, Of: of},
		{Sizes: aerosol.Mode{Concentration: 400e6, Median: 140e-9, GSD: 1.5}, Share: 1, Of: of},
	}
	n, err := p.Counts(nil, []float64{0.001, 0.002, 0.005})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, x := range n {
		fmt.Printf("%.4g per cm3\n", x/1e6)
	}
	// Output:
	// 127.8 per cm3
	// 325.3 per cm3
	// 642.2 per cm3
}

// More droplets than particles: there is no κ, and the reason is said.
func ExampleKappaOfCount() {
	grid, _ := aerosol.NewGrid([]float64{20e-9, 60e-9, 180e-9, 540e-9})
	sizes, _ := aerosol.NewBins(grid, []float64{500e6, 300e6, 40e6}, aerosol.Counts)
	for _, count := range []float64{200e6, 900e6} {
		k, err := spectrum.KappaOfCount(sizes, count, 0.003, 2.1e-9)
		var why *spectrum.UnsolvedError
		if errors.As(err, &why) {
			fmt.Println(why.Reason)
			continue
		}
		fmt.Printf("kappa %.3f from %.1f nm\n", k.Kappa, k.CriticalDiameter*1e9)
	}
	// Output:
	// kappa 0.151 from 100.2 nm
	// more-counted-than-sized
}

func ExampleFitPower() {
	f, err := spectrum.FitPower([]spectrum.Point{
		{Supersaturation: 0.002, Count: 210e6}, {Supersaturation: 0.005, Count: 350e6}, {Supersaturation: 0.01, Count: 500e6},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	p := f.Form.(spectrum.Power)
	fmt.Printf("%.4g per cm3 at 1 %%, exponent %.3f ± %.3f\n", p.C/1e6, p.K, f.Uncertainty(1))
	// Output:
	// 503.2 per cm3 at 1 %, exponent 0.540 ± 0.012
}
