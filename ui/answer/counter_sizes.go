package answer

import (
	"context"
	"errors"
	"math"
	"sort"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/ui/scenario"
)

// saltSizes is dN/dln D of the salt particles before the charger, by mobility
// diameter, from the file of the scenario; nil: it names none, and the share of
// multiply charged particles is one number a scan.
func saltSizes(ctx context.Context, env Env, s scenario.Scenario) (func(d float64) float64, []atmos.Note, error) {
	if s.ScanSizes == "" || s.Activation != "two-step" {
		return nil, nil, nil
	}
	of := scenario.Default() // neither losses nor shapes of the particles in the air
	of.Population, of.Bins = "bins", s.ScanSizes
	bins, notes, err := oneBins(ctx, env, of)
	if err != nil {
		var in *InputError
		if errors.As(err, &in) {
			return nil, nil, &InputError{Input: "scan-sizes", Text: in.Text}
		}
		return nil, nil, err
	}
	for i := range notes {
		notes[i].Input = "scan-sizes"
	}
	return smooth(bins), notes, nil
}

// smooth is dN/dln D of bins without their steps: between the middles of two bins
// ln N is linear in ln D, beyond the outermost ones there are no particles.
func smooth(b *aerosol.Bins) func(d float64) float64 {
	edges := b.Grid().Edges()
	x, y := make([]float64, len(edges)-1), make([]float64, len(edges)-1)
	for i := range x {
		x[i] = (math.Log(edges[i]) + math.Log(edges[i+1])) / 2
		y[i] = b.Density(math.Exp(x[i]))
	}
	return func(d float64) float64 {
		at := math.Log(d)
		i := sort.SearchFloat64s(x, at)
		switch {
		case i == len(x) || i == 0 && at < x[0]:
			return 0
		case i == 0:
			return y[0]
		}
		f := (at - x[i-1]) / (x[i] - x[i-1])
		if y[i-1] > 0 && y[i] > 0 {
			return math.Exp((1-f)*math.Log(y[i-1]) + f*math.Log(y[i]))
		}
		return (1-f)*y[i-1] + f*y[i]
	}
}
