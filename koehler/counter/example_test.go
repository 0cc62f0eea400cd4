package counter_test

import (
	"context"
	"fmt"
	"math"

	"dropcrest/koehler/counter"
	"dropcrest/koehler/kappa"
	"dropcrest/solutes"
)

// exampleScan is an invented scan of 500 particles a size without noise.
func exampleScan(d50, difference float64) counter.Scan {
	s := counter.Scan{TemperatureDifference: difference, DifferenceUncertainty: 0.02}
	for d := d50 / 2; d < 2*d50; d *= 1.05 {
		active := 0.5 * math.Erfc(-math.Log(d/d50)/0.05/math.Sqrt2)
		s.Points = append(s.Points, counter.Point{Setting: d, CN: 500, CCN: 480 * active})
	}
	return s
}

func ExampleFitScan() {
	f, err := counter.FitScan(exampleScan(60e-9, 8), counter.Options{})
	fmt.Printf("D50 %.2f ± %.2f nm, plateau %.3f %v\n", 1e9*f.Midpoint.Value, 1e9*f.Midpoint.Uncertainty, f.Plateau.Value, err)
	// Output: D50 60.00 ± 0.23 nm, plateau 0.960 <nil>
}

// A salt calibration is applied to particles of the same size and classifier: the
// 1 % that the sizing is off and the temperature of activation do not count twice.
func ExampleCalibrate() {
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	standard := counter.SaltStandard(salt, solutes.IonInteraction, 298.15, counter.Classifier{})
	c, err := counter.Calibrate(context.Background(), counter.Request{
		Scans:     []counter.Scan{exampleScan(100e-9, 4), exampleScan(60e-9, 8), exampleScan(40e-9, 14)},
		Standards: []counter.Standard{standard},
	})
	if err != nil {
		fmt.Println(err)
		return
	}
	a, err := c.Apply(8, counter.Site{})
	if err != nil {
		fmt.Println(err)
		return
	}
	p := kappa.Point{
		Dry:             kappa.Measured{Value: 80e-9, Systematic: 0.8e-9},
		Supersaturation: kappa.Measured{Value: a.Supersaturation, Systematic: a.Uncertainty},
		Temperature:     kappa.Measured{Value: 298.15, Systematic: 1},
	}
	alone, _ := kappa.Evaluate(p, 0.95)
	p.Transfer = a.Sensitivity
	shared, _ := kappa.Evaluate(p, 0.95)
	fmt.Printf("kappa %.2f, without the shared errors ± %.1f %%, counted twice ± %.1f %%\n", shared.Kappa,
		100*shared.Linear.StandardUncertainty/shared.Kappa, 100*alone.Linear.StandardUncertainty/alone.Kappa)
	// Output: kappa 0.23, without the shared errors ± 2.3 %, counted twice ± 4.1 %
}
