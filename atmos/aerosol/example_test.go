package aerosol_test

import (
	"fmt"

	"dropcrest/atmos/aerosol"
)

// From midpoints and dN/dlog10D to the number above 100 nm at standard conditions.
func ExampleBins() {
	grid, err := aerosol.GridAround([]float64{40e-9, 80e-9, 160e-9, 320e-9})
	if err != nil {
		fmt.Println(err)
		return
	}
	bins, err := aerosol.NewBins(grid, []float64{1200e6, 900e6, 700e6, 90e6}, aerosol.PerLog10)
	if err != nil {
		fmt.Println(err)
		return
	}
	ambient := aerosol.Air{Temperature: 288.15, Pressure: 90000}
	standard := bins.Scaled(ambient.To(aerosol.StandardAir()))
	fmt.Printf("%.1f per cm3 ambient, %.1f per cm3 standard\n", bins.Above(100e-9)/1e6, standard.Above(100e-9)/1e6)
	// Output:
	// 286.1 per cm3 ambient, 339.7 per cm3 standard
}
