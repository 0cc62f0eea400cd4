package ascent

import (
	"context"
	"math"
	"slices"

	"dropcrest/koehler/spectrum"
)

// Sensitivity is how the droplet number answers to what it depends on: the change of
// ln N_d per change of the logarithm of each, for temperature per K.
type Sensitivity struct {
	Droplets    float64 // N_d, 1/m³ at the start
	Number      float64 // d ln N_d/d ln N, all groups alike
	Updraft     float64
	Kappa       float64 // NaN where a group has Matter, which has no κ to change
	Size        float64 // all dry diameters alike; NaN where sizes cannot be scaled
	Temperature float64 // 1/K
}

const (
	sensitivityStep  = 0.05 // in the logarithm, to both sides
	temperatureStep  = 0.5  // K
	sensitivityLeast = 1e-6 // the tolerance of the runs: their noise is divided by the step
)

// Sensitivities returns central differences of ascents that end at their peak, on so
// many workers (0: all cores).
func Sensitivities(ctx context.Context, workers int, p Parcel, o Options) (Sensitivity, error) {
	if o.Height == 0 {
		o.Height = farthestPeak
	}
	orDefault(&o.Tolerance, sensitivityLeast)
	o.StopAtPeak, o.ProfileRows, o.Follow, o.Progress = true, 0, nil, nil
	up, down := math.Exp(sensitivityStep), math.Exp(-sensitivityStep)
	changes := []func(*Parcel, float64) bool{scaleNumber, scaleUpdraft, scaleKappa, scaleSize, addTemperature}
	asks := []Parcel{p}
	possible := make([]bool, len(changes))
	for i, change := range changes {
		lower, upper := p, p
		lower.Population, upper.Population = slices.Clone(p.Population), slices.Clone(p.Population)
		possible[i] = change(&lower, down) && change(&upper, up)
		asks = append(asks, lower, upper)
	}
	type answer struct {
		n   float64
		err error
	}
	n := make([]float64, len(asks))
	err := Each(ctx, 0, len(asks), workers, func(ctx context.Context, i int) answer {
		if i > 0 && !possible[(i-1)/2] {
			return answer{math.NaN(), nil}
		}
		r, err := Run(ctx, asks[i], o)
		if err == nil && !r.HasPeak {
			err = errNoPeak
		}
		return answer{r.Droplets, err}
	}, func(i int, a answer) error {
		n[i] = a.n
		return a.err
	})
	if err != nil {
		return Sensitivity{}, err
	}
	slope := func(i int, width float64) float64 { return math.Log(n[2*i+2]/n[2*i+1]) / width }
	return Sensitivity{n[0], slope(0, 2*sensitivityStep), slope(1, 2*sensitivityStep), slope(2, 2*sensitivityStep),
		slope(3, 2*sensitivityStep), slope(4, 2*temperatureStep)}, nil
}

func scaleNumber(p *Parcel, by float64) bool {
	for i := range p.Population {
		g := &p.Population[i]
		orDefault(&g.Share, 1)
		g.Share *= by
	}
	return true
}

func scaleUpdraft(p *Parcel, by float64) bool {
	p.Updraft *= by
	return true
}

func scaleKappa(p *Parcel, by float64) bool {
	for i := range p.Population {
		g := &p.Population[i]
		if g.Matter != nil || g.KappaBySize != nil {
			return false
		}
		g.Kappa *= by
	}
	return true
}

func scaleSize(p *Parcel, by float64) bool {
	for i := range p.Population {
		g := &p.Population[i]
		if g.KappaBySize != nil {
			return false
		}
		var ok bool
		if g.Sizes, ok = spectrum.Scaled(g.Sizes, by); !ok {
			return false
		}
		g.From, g.To = g.From*by, g.To*by
	}
	return true
}

func addTemperature(p *Parcel, by float64) bool {
	p.Temperature += temperatureStep * math.Log(by) / sensitivityStep
	return true
}
