package answer

import (
	"math"
	"testing"

	"dropcrest/ui/scenario"
)

// κ of a mixture is that of its parts weighted by volume, whatever model the
// question uses.
func TestHygroscopicity(t *testing.T) {
	part := func(kappa, density, share float64) scenario.Component {
		c := scenario.Default().Components[0]
		c.Kappa, c.Density, c.Share = scenario.Measure{Number: kappa}, scenario.Measure{Number: density}, share
		return c
	}
	for name, c := range map[string]struct {
		sharesBy string
		parts    []scenario.Component
		want     float64
	}{
		"one":       {"volume", []scenario.Component{part(0.6, 1000, 3)}, 0.6},
		"by volume": {"volume", []scenario.Component{part(0.6, 1000, 1), part(0.2, 2000, 3)}, 0.3},
		"by mass":   {"mass", []scenario.Component{part(0.6, 1000, 1), part(0.2, 2000, 2)}, 0.4},
	} {
		s := scenario.Default()
		s.SharesBy, s.Components = c.sharesBy, c.parts
		for _, model := range []string{"kappa", "ion-interaction", "vant-hoff"} {
			s.WaterActivity = model
			each, mixed := Hygroscopicity(Env{}, s)
			if math.Abs(mixed-c.want) > 1e-12 || len(each) != len(c.parts) || each[0] != 0.6 {
				t.Errorf("%s, %s: each %v, mixed %v, want %v", name, model, each, mixed, c.want)
			}
		}
	}
	s := scenario.Default()
	s.Components[0].Substance = "no such substance"
	if _, mixed := Hygroscopicity(Env{}, s); !math.IsNaN(mixed) {
		t.Errorf("κ of an unknown substance is %v", mixed)
	}
}
