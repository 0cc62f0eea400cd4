package ascent_test

import (
	"context"
	"fmt"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/ascent"
)

// invented is an invented population of two modes in air of 10 °C and 900 hPa.
func invented(updraft float64) ascent.Parcel {
	return ascent.Parcel{Temperature: 283.15, Pressure: 90000, Humidity: 0.95, Updraft: updraft, Population: []ascent.Group{
		{Sizes: aerosol.Mode{Concentration: 1000e6, Median: 30e-9, GSD: 1.7}, Kappa: 0.2},
		{Sizes: aerosol.Mode{Concentration: 500e6, Median: 130e-9, GSD: 1.6}, Kappa: 0.45},
	}}
}

func ExampleRun() {
	p := invented(0.5)
	r, err := ascent.Run(context.Background(), p, ascent.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("peak %.4f %% at %.1f m, %.1f droplets per cm3 of %.0f particles, %v\n",
		100*r.Peak.Supersaturation, r.Peak.Height, r.Droplets/1e6, r.Number/1e6, ascent.RegimeOf(p.Updraft, r.Number))
	forms, _ := ascent.ClosedForms(p, ascent.Options{})
	for _, f := range forms {
		fmt.Printf("%-23s %.3f %%, %.0f per cm3\n", f.Method, 100*f.Peak, f.Droplets/1e6)
	}
	// Output:
	// peak 0.2493 % at 103.0 m, 412.2 droplets per cm3 of 1500 particles, transitional
	// twomey-1959             0.214 %, 380 per cm3
	// abdul-razzak-ghan-2000  0.186 %, 344 per cm3
	// fountoukis-nenes-2005   0.225 %, 391 per cm3
}

// How the peak and the droplets come to their end: with more bins, against the
// extrapolation from 800 bins a mode, and with a smaller tolerance at 200 bins, against
// 1e-10.
func ExampleRun_convergence() {
	p := invented(0.5)
	run := func(bins int, tol float64) ascent.Result {
		r, err := ascent.Run(context.Background(), p, ascent.Options{Bins: bins, Tolerance: tol})
		if err != nil {
			fmt.Println(err)
		}
		return r
	}
	best, err := ascent.Refine(context.Background(), p, ascent.Options{Bins: 800, Tolerance: 1e-7})
	if err != nil {
		fmt.Println(err)
		return
	}
	for _, bins := range []int{50, 100, 200, 400, 800} {
		r := run(bins, 1e-7)
		fmt.Printf("%4d bins: peak %+.0e, droplets %+.0e\n", bins, r.Peak.Supersaturation/best.Peak-1, r.Droplets/best.Droplets-1)
	}
	sharp := run(200, 1e-10)
	for _, tol := range []float64{1e-4, 1e-5, 1e-6, 1e-7} {
		r := run(200, tol)
		fmt.Printf("%.0e: peak %+.0e, droplets %+.0e, energy %.0e\n", tol,
			r.Peak.Supersaturation/sharp.Peak.Supersaturation-1, r.Droplets/sharp.Droplets-1, r.EnergyResidual)
	}
	// Output:
	// 50 bins: peak -2e-04, droplets -9e-05
	//  100 bins: peak -4e-05, droplets -2e-05
	//  200 bins: peak -1e-05, droplets -5e-06
	//  400 bins: peak -3e-06, droplets -1e-06
	//  800 bins: peak -6e-07, droplets -3e-07
	// 1e-04: peak +1e-04, droplets +6e-05, energy -2e-05
	// 1e-05: peak -4e-06, droplets -2e-06, energy -2e-06
	// 1e-06: peak -8e-07, droplets -4e-07, energy -2e-07
	// 1e-07: peak -6e-08, droplets -3e-08, energy -1e-08
}

// A map of two updrafts by three numbers, which could be stopped and taken up
// again after each cell.
func ExampleSweep() {
	s := &ascent.Sweep{
		X: ascent.Axis{Key: "updraft", Values: []float64{0.2, 2}},
		Y: ascent.Axis{Key: "number", Values: []float64{100e6, 1000e6, 10000e6}},
	}
	err := s.Run(context.Background(), 0, func(w, number float64) (ascent.Parcel, ascent.Options, error) {
		p := invented(w)
		for i := range p.Population {
			p.Population[i].Share = number / 1500e6
		}
		return p, ascent.Options{Bins: 60}, nil
	}, nil)
	if err != nil {
		fmt.Println(err)
		return
	}
	for y, n := range s.Y.Values {
		a, _ := s.At(0, y)
		b, _ := s.At(1, y)
		fmt.Printf("%5.0f per cm3: %4.0f %5.0f\n", n/1e6, a.Droplets/1e6, b.Droplets/1e6)
	}
	// Output:
	// 100 per cm3:   32    57
	//  1000 per cm3:  228   379
	// 10000 per cm3:  855  2783
}
