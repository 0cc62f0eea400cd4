package ascent

import (
	"context"
	"math"
)

// Refinement is what infinitely many bins would give, estimated from two numbers of
// bins by the second order of the method.
type Refinement struct {
	Bins     int     // of each group, the larger number
	Peak     float64 // supersaturation, extrapolated
	Droplets float64 // 1/m³ at the start, extrapolated
	// How far the results at Bins are from that, relative. Where the bins are so few
	// that their own bumps show, the estimate is rough.
	PeakError, DropletsError float64
	Fine                     Result // the result at Bins
}

// Refine runs twice, with o.Bins and with half as many. Errors are those of Run.
func Refine(ctx context.Context, p Parcel, o Options) (Refinement, error) {
	if o.Bins == 0 {
		o.Bins = defaultBins
	}
	fine, err := Run(ctx, p, o)
	if err != nil {
		return Refinement{}, err
	}
	half := o
	half.Bins = max(1, o.Bins/2)
	half.ProfileRows, half.Follow, half.Probes, half.Sizes, half.StopAtPeak = 0, nil, 0, false, true
	coarse, err := Run(ctx, p, half)
	if err != nil {
		return Refinement{}, err
	}
	ratio := float64(o.Bins) / float64(half.Bins)
	share := 1 / (ratio*ratio - 1)
	out := Refinement{Bins: o.Bins, Fine: fine,
		Peak:     fine.Peak.Supersaturation + share*(fine.Peak.Supersaturation-coarse.Peak.Supersaturation),
		Droplets: fine.Droplets + share*(fine.Droplets-coarse.Droplets)}
	out.PeakError = relative(fine.Peak.Supersaturation, out.Peak)
	out.DropletsError = relative(fine.Droplets, out.Droplets)
	return out, nil
}

func relative(a, b float64) float64 {
	if a == b {
		return 0
	}
	return math.Abs(a-b) / math.Abs(b)
}
