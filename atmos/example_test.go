package atmos_test

import (
	"fmt"

	"dropcrest/atmos"
)

func ExampleSurfaceTension() {
	T := 20 + atmos.ZeroCelsius
	fmt.Printf("σ %.6g N/m, ρ %.6g kg/m3, e %.6g Pa\n",
		atmos.SurfaceTension(T), atmos.WaterDensity(T), atmos.VapourPressure(T))
	// Output: σ 0.0727361 N/m, ρ 998.204 kg/m3, e 2339.4 Pa
}

func ExampleWaterNotes() {
	for _, note := range atmos.WaterNotes(-30 + atmos.ZeroCelsius) {
		fmt.Println(note.Code)
		fmt.Println(note.Text)
	}
	// Output:
	// surface-tension-extrapolated
	// The surface tension of water is extrapolated: IAPWS R1-76(2014) holds from -25 °C to 373.9 °C, and this is -30 °C.
}

// A classifier selects 100 nm singly charged spheres; what else comes through?
func ExampleDiameterFromMobility() {
	const T, p = 293.15, 101325
	Z := atmos.Mobility(100e-9, 1, T, p)
	for n := 1; n <= 3; n++ {
		fmt.Printf("%d charges: %.6g nm\n", n, atmos.DiameterFromMobility(Z, n, T, p)*1e9)
	}
	// Output:
	// 1 charges: 100 nm
	// 2 charges: 151.415 nm
	// 3 charges: 196.163 nm
}

func ExampleVolumeEquivalent() {
	d := atmos.VolumeEquivalent(100e-9, 1.08, 293.15, 101325)
	fmt.Printf("%.6g nm\n", d*1e9)
	// Output: 95.6603 nm
}

func ExampleRelations() {
	for _, r := range atmos.Relations()[:2] {
		fmt.Printf("%s: %.6g %s at 25 °C (%s)\n", r.Name, r.At(298.15, atmos.StandardPressure), r.Unit, r.Source)
	}
	// Output:
	// density of liquid water: 997.045 kg/m3 at 25 °C (Kell 1975)
	// surface tension of water: 0.0719722 N/m at 25 °C (IAPWS R1-76(2014))
}
