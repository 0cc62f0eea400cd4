package spectrum

import "math"

// External is an external mixture: at every size each part has its share of the
// particles. It may stand inside Ranges, so that the mixture differs with size.
type External []Part

// Part is one kind of particles of an External.
type Part struct {
	Share float64 // of the particles, above 0; the shares add up to 1
	Of    Composition
}

// shareSlack is how far the shares may be from 1 in all: they are typed or read
// with a few digits, and nothing is rescaled.
const shareSlack = 1e-6

func (e External) check() error {
	sum := 0.0
	for i, p := range e {
		if err := checkShare(p.Share); err != nil {
			err.Index = i
			return err
		}
		sum += p.Share
	}
	if !(math.Abs(sum-1) <= shareSlack) {
		return unusable("sum of shares", -1, sum, "1")
	}
	return nil
}

// Critical returns the dry diameter (m) from which on every wider particle of every
// part activates at s.
func (e External) Critical(s float64) (float64, error) {
	if err := e.check(); err != nil {
		return math.NaN(), err
	}
	widest := 0.0
	for _, p := range e {
		d, err := p.Of.Critical(s)
		if err != nil {
			return math.NaN(), err
		}
		widest = math.Max(widest, d)
	}
	return widest, nil
}

// AddCounts implements Composition.
func (e External) AddCounts(dst, s []float64, sizes Sizes, share float64) error {
	if err := e.check(); err != nil {
		return err
	}
	for _, p := range e {
		if err := p.Of.AddCounts(dst, s, sizes, share*p.Share); err != nil {
			return err
		}
	}
	return nil
}
