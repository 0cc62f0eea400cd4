package ascent

import (
	"context"
	"math"
	"sort"

	"gonum.org/v1/gonum/integrate/quad"
)

// Updrafts is a distribution of updrafts: the part above 0 of a normal distribution. With
// a mean of 0 that is the half-Gaussian.
type Updrafts struct {
	Mean   float64 // m/s, 0 or more
	Spread float64 // σ_w, m/s, above 0
	Points int     // of the quadrature; 0: 16
	// ByFlux weights with w too: droplets in the air that goes through cloud base
	// rather than over an area of it.
	ByFlux bool
}

// MeanDroplets is a mean over updrafts.
type MeanDroplets struct {
	Mean           float64 // of the droplet number, 1/m³
	Characteristic float64 // m/s, the updraft with that number; NaN where none of the points bracket it
	MeanUpdraft    float64 // m/s, with the same weights
	Updrafts       []float64
	Droplets       []float64 // at those
	Weights        []float64 // add up to 1
}

const (
	updraftPoints = 16
	updraftReach  = 5 // standard deviations beyond the mean
)

// Check returns nil or what is not usable.
func (u Updrafts) Check() error {
	switch {
	case !(u.Mean >= 0) || u.Mean > 50:
		return unusable("mean updraft", -1, u.Mean, "0 to 50 m/s")
	case !(u.Spread > 0) || u.Spread > 50:
		return unusable("spread of updraft", -1, u.Spread, "above 0 and up to 50 m/s")
	case u.Points < 0 || u.Points > 1000:
		return unusable("points of the quadrature", -1, float64(u.Points), "1 to 1000; 0 for 16")
	}
	return nil
}

// Average returns the mean of a droplet number over the updrafts, by Gauss quadrature in
// √w, which has its points where the number changes most. droplets is called at
// once for several updrafts, on so many workers (0: all cores); its first error, in the
// order of the updrafts, ends it.
func (u Updrafts) Average(ctx context.Context, workers int, droplets func(ctx context.Context, w float64) (float64, error)) (MeanDroplets, error) {
	if err := u.Check(); err != nil {
		return MeanDroplets{}, err
	}
	m := u.nodes()
	type answer struct {
		n   float64
		err error
	}
	err := Each(ctx, 0, len(m.Updrafts), workers, func(ctx context.Context, i int) answer {
		n, err := droplets(ctx, m.Updrafts[i])
		return answer{n, err}
	}, func(i int, a answer) error {
		m.Droplets = append(m.Droplets, a.n)
		m.Mean += m.Weights[i] * a.n
		m.MeanUpdraft += m.Weights[i] * m.Updrafts[i]
		return a.err
	})
	if err != nil {
		return MeanDroplets{}, err
	}
	m.Characteristic = m.updraftOf(m.Mean)
	return m, nil
}

// nodes are the points of the quadrature, ascending, with weights that add up to 1.
func (u Updrafts) nodes() MeanDroplets {
	n := u.Points
	if n == 0 {
		n = updraftPoints
	}
	from := math.Sqrt(math.Max(0, u.Mean-updraftReach*u.Spread))
	to := math.Sqrt(u.Mean + updraftReach*u.Spread)
	m := MeanDroplets{Updrafts: make([]float64, n), Weights: make([]float64, n), Droplets: make([]float64, 0, n)}
	quad.Legendre{}.FixedLocations(m.Updrafts, m.Weights, from, to)
	sort.Sort(byUpdraft(m)) // the nodes come in no order
	sum := 0.0
	for i, root := range m.Updrafts {
		w := root * root
		z := (w - u.Mean) / u.Spread
		weight := m.Weights[i] * root * math.Exp(-z*z/2)
		if u.ByFlux {
			weight *= w
		}
		m.Updrafts[i], m.Weights[i] = w, weight
		sum += weight
	}
	for i := range m.Weights {
		m.Weights[i] /= sum
	}
	return m
}

type byUpdraft MeanDroplets

func (m byUpdraft) Len() int           { return len(m.Updrafts) }
func (m byUpdraft) Less(i, j int) bool { return m.Updrafts[i] < m.Updrafts[j] }
func (m byUpdraft) Swap(i, j int) {
	m.Updrafts[i], m.Updrafts[j] = m.Updrafts[j], m.Updrafts[i]
	m.Weights[i], m.Weights[j] = m.Weights[j], m.Weights[i]
}

// updraftOf reads the updraft off the points that has the number, linear in the
// logarithms between two of them.
func (m MeanDroplets) updraftOf(number float64) float64 {
	for i := 1; i < len(m.Droplets); i++ {
		a, b := m.Droplets[i-1], m.Droplets[i]
		if a <= number && number <= b && a > 0 && b > a {
			share := math.Log(number/a) / math.Log(b/a)
			return m.Updrafts[i-1] * math.Pow(m.Updrafts[i]/m.Updrafts[i-1], share)
		}
	}
	return math.NaN()
}

// Droplets returns the mean droplet number of the parcel over the updrafts, whose own
// updraft does not matter. Each ascent ends at its peak; the weakest updrafts, which
// weigh least, may not come to one, and count by the highest supersaturation they
// come to.
func (u Updrafts) Droplets(ctx context.Context, workers int, p Parcel, o Options) (MeanDroplets, error) {
	if o.Height == 0 {
		o.Height = farthestPeak
	}
	o.StopAtPeak, o.ProfileRows, o.Follow, o.Progress = true, 0, nil, nil
	return u.Average(ctx, workers, func(ctx context.Context, w float64) (float64, error) {
		q := p
		q.Updraft = w
		r, err := Run(ctx, q, o)
		return r.Droplets, err
	})
}
