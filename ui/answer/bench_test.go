package answer

import (
	"context"
	"testing"

	"dropcrest/solutes"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// particles are the dry particles of the benchmarks: 100 nm at 25 °C and 95 %.
func particles() map[string]scenario.Scenario {
	catalogue := scenario.Measure{Word: "catalogue"}
	part := func(name string, share float64) scenario.Component {
		return scenario.Component{Substance: name, Share: share,
			Kappa: catalogue, Density: catalogue, MolarMass: catalogue, Ions: catalogue}
	}
	with := func(model string, parts ...scenario.Component) scenario.Scenario {
		return scenario.Scenario{
			DryDiameter: 100e-9, DrySizeIs: "volume-equivalent", ShapeFactor: 1, Components: parts,
			SharesBy: "volume", WaterActivity: model, Kappa: catalogue,
			VantHoffFactor: scenario.Measure{Word: "ions"}, SurfaceTension: scenario.Measure{Word: "water"},
			SolutionDensity: "additive", Kelvin: "standard", Temperature: 298.15, RelativeHumidity: 0.95,
			Points: 400, FromRadius: scenario.Measure{Word: "frame"}, ToRadius: scenario.Measure{Word: "frame"},
		}
	}
	return map[string]scenario.Scenario{
		"ion interaction": with("ion-interaction", part("ammonium sulfate", 1)),
		"kappa":           with("kappa", part("ammonium sulfate", 1)),
		"three salts": with("ion-interaction", part("ammonium sulfate", 0.5),
			part("sodium chloride", 0.3), part("sodium nitrate", 0.2)),
	}
}

// The question as the screen asks it at every key: the answer with 400 points,
// its frame and its picture of 120 by 40 cells. The goal is 1 ms.
func BenchmarkCurveAndPicture(b *testing.B) {
	for name, s := range particles() {
		b.Run(name, func(b *testing.B) {
			env := Env{Substances: solutes.Standard()}
			b.ReportAllocs()
			for b.Loop() {
				a, err := askCurve(context.Background(), env, s)
				if err != nil {
					b.Fatal(err)
				}
				frame, _ := CurveFrame(s, a.Figures[0], figure.Frame{}, 40)
				figure.Text(a.Figures[0], frame, 120, 40, figure.Style{})
			}
		})
	}
}

// The answer alone.
func BenchmarkAsk(b *testing.B) {
	for name, s := range particles() {
		b.Run(name, func(b *testing.B) {
			env := Env{Substances: solutes.Standard()}
			b.ReportAllocs()
			for b.Loop() {
				if _, err := askCurve(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
