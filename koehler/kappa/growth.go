package kappa

import (
	"math"
	"sort"

	"dropcrest/koehler"
	"dropcrest/solutes"
)

// Growth is a κ from a growth factor below saturation.
type Growth struct {
	Kappa         float64
	WithoutKelvin float64 // the same with a_w taken as the humidity: too low for small particles
	WaterActivity float64
	KelvinFactor  float64
}

// FromGrowth returns the κ of a particle of that dry diameter (m) that has
// grown to gf times its dry diameter at the saturation ratio humidity:
//
//	a_w = humidity exp(-A/(gf Dd)),  κ = (gf³ - 1)(1/a_w - 1)
//
// (Petters & Kreidenweis 2007, eq. 11). A growth factor below 1 is measurement
// noise or a particle that shrank: an error. Humidities above 1 are allowed as
// long as a_w stays below 1. Errors wrap koehler.ErrInput or
// koehler.ErrNoSolution.
func FromGrowth(dry, gf, humidity float64, c Convention) (Growth, error) {
	none := Growth{math.NaN(), math.NaN(), math.NaN(), math.NaN()}
	if err := c.Check(); err != nil {
		return none, err
	}
	switch {
	case !(dry > 0) || math.IsInf(dry, 0):
		return none, &koehler.RangeError{What: "dry diameter", Value: dry, Right: "a positive length in m"}
	case !(gf >= 1) || math.IsInf(gf, 0):
		return none, &koehler.RangeError{What: "growth factor", Value: gf, Right: "1 or more"}
	case !(humidity > 0):
		return none, &koehler.RangeError{What: "relative humidity", Value: humidity, Right: "above 0"}
	}
	k := math.Exp(c.Kelvin() / (gf * dry))
	g := Growth{growthKappa(gf, humidity/k), growthKappa(gf, humidity), humidity / k, k}
	if !(g.WaterActivity < 1) {
		return none, &koehler.RangeError{What: "relative humidity", Value: humidity, Right: "below that over a drop of pure water of the grown size"}
	}
	return g, nil
}

func growthKappa(gf, aw float64) float64 { return (gf*gf*gf - 1) * (1/aw - 1) }

// GrowthFactor returns the wet over the dry diameter of a particle of that κ
// in equilibrium at the saturation ratio humidity, on the stable branch below
// the crest. It inverts FromGrowth. Errors are those of koehler.Particle.Haze.
func GrowthFactor(dry, kappa, humidity float64, c Convention) (float64, error) {
	if err := c.Check(); err != nil {
		return math.NaN(), err
	}
	if kappa == 0 {
		return 1, nil
	}
	p := koehler.Particle{
		DryDiameter: dry, Temperature: c.Temperature, Solution: solutes.Kappa(kappa),
		Tension: solutes.ConstantTension(c.SurfaceTension()),
	}
	drop, _, err := p.Haze(humidity)
	if err != nil {
		return math.NaN(), err
	}
	return drop.WetDiameter / dry, nil
}

// Bin is a share of particles between two values.
type Bin struct {
	Low, High float64
	Share     float64 // of all particles
}

// Density returns the share per unit of the value.
func (b Bin) Density() float64 { return b.Share / (b.High - b.Low) }

// GrowthDistribution turns a measured distribution of growth factors of one
// dry diameter (m) at a humidity into one of κ. Edges of each bin go through
// FromGrowth, which rises with the growth factor, so shares are kept. Noise may
// leave bins below a growth factor of 1; their κ is below 0 by the same formula
// and they are kept, so that the mean has no bias.
//
// Bins must be in ascending order and must not overlap. Shares need not add up
// to 1: the result is normalised.
func GrowthDistribution(dry, humidity float64, bins []Bin, c Convention) ([]Bin, error) {
	total, last := 0.0, 0.0
	for _, b := range bins {
		if !(b.Low >= last) || !(b.High > b.Low) || !(b.Low > 0) {
			return nil, &koehler.RangeError{What: "growth factor of a bin", Value: b.Low, Right: "above 0, below its upper edge and not below the last bin"}
		}
		if !(b.Share >= 0) {
			return nil, &koehler.RangeError{What: "share of a bin", Value: b.Share, Right: "0 or more"}
		}
		last = b.High
		total += b.Share
	}
	if _, err := FromGrowth(dry, math.Max(1, last), humidity, c); err != nil {
		return nil, err
	}
	if !(total > 0) {
		return nil, &koehler.RangeError{What: "sum of the shares", Value: total, Right: "above 0"}
	}
	out := make([]Bin, len(bins))
	a := c.Kelvin()
	at := func(gf float64) float64 { return growthKappa(gf, humidity/math.Exp(a/(gf*dry))) }
	for i, b := range bins {
		out[i] = Bin{at(b.Low), at(b.High), b.Share / total}
	}
	return out, nil
}

// Moments describes a distribution in bins.
type Moments struct {
	Mean, StandardDeviation float64
	Median                  float64
	Low, High               float64 // quantiles of 0.16 and 0.84
}

// Describe returns the moments of a distribution of normalised bins, each taken
// as uniform between its edges.
func Describe(bins []Bin) Moments {
	var m Moments
	square := 0.0
	for _, b := range bins {
		m.Mean += b.Share * (b.Low + b.High) / 2
		square += b.Share * (b.Low*b.Low + b.Low*b.High + b.High*b.High) / 3
	}
	m.StandardDeviation = math.Sqrt(math.Max(0, square-m.Mean*m.Mean))
	m.Low, m.Median, m.High = binQuantile(bins, 0.16), binQuantile(bins, 0.5), binQuantile(bins, 0.84)
	return m
}

func binQuantile(bins []Bin, p float64) float64 {
	if len(bins) == 0 {
		return math.NaN()
	}
	sums := make([]float64, len(bins))
	sum := 0.0
	for i, b := range bins {
		sum += b.Share
		sums[i] = sum
	}
	i := min(sort.SearchFloat64s(sums, p*sum), len(bins)-1)
	b := bins[i]
	if b.Share == 0 {
		return b.High
	}
	return b.High - (b.High-b.Low)*(sums[i]-p*sum)/b.Share
}
