package kappa_test

import (
	"context"
	"fmt"

	"dropcrest/koehler/kappa"
)

func ExampleFromActivation() {
	v, err := kappa.FromActivation(60e-9, 0.004, kappa.At25C())
	fmt.Printf("%.4f, classic %.4f, %+.2f %% %v\n", v.Kappa, v.Classic, 100*v.ClassicError(), err)
	// Output: 0.3965, classic 0.3981, +0.40 % <nil>
}

func ExamplePropagate() {
	p := kappa.Point{
		Dry:             kappa.Measured{Value: 60e-9, Independent: 1.8e-9},
		Supersaturation: kappa.Measured{Value: 0.004, Independent: 0.0002},
		Temperature:     kappa.Measured{Value: 298.15},
		Tension:         kappa.Measured{Value: 0.072},
	}
	r, err := kappa.Propagate(context.Background(), []kappa.Point{p}, kappa.Settings{Trials: 100000, Seed: 1})
	e := r.Points[0]
	fmt.Printf("%.3f, 95 %% from %.2f to %.2f, mostly from the %v %v\n",
		e.Kappa, e.MonteCarlo.Interval.Low, e.MonteCarlo.Interval.High, e.Linear.Contributions[0].Quantity, err)
	// Output: 0.397, 95 % from 0.31 to 0.52, mostly from the supersaturation <nil>
}
