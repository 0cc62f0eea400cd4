package spectrum

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
)

// ErrUnsolved is wrapped by an *UnsolvedError.
var ErrUnsolved = errors.New("no solution")

// Reason says why a count has no κ. It is a stable key for scripts.
type Reason string

// The reasons.
const (
	NothingCounted Reason = "nothing-counted"         // the number is 0, negative or missing
	MoreThanSized  Reason = "more-counted-than-sized" // it exceeds the integral of the distribution
	NotSuper       Reason = "not-supersaturated"      // s is 0, negative or missing
	BelowInsoluble Reason = "below-insoluble"         // particles of the critical diameter activate there without any solute
	KappaTooLarge  Reason = "kappa-too-large"         // κ would exceed 30
)

// An UnsolvedError says why a count has no κ. It wraps ErrUnsolved.
type UnsolvedError struct {
	Reason          Reason
	Count           float64 // 1/m³
	Supersaturation float64 // fraction
	Limit           float64 // what it exceeded or fell short of: 1/m³, a fraction or κ
}

// Error says it in words.
func (e *UnsolvedError) Error() string {
	switch e.Reason {
	case NothingCounted:
		return fmt.Sprintf("no solution: a number of %.6g per m³ has no critical diameter", e.Count)
	case MoreThanSized:
		return fmt.Sprintf("no solution: %.6g per m³ were counted, but only %.6g per m³ were sized (size limits, losses, or another state of the air)", e.Count, e.Limit)
	case NotSuper:
		return fmt.Sprintf("no solution: the supersaturation %.6g %% is not above 0", 100*e.Supersaturation)
	case BelowInsoluble:
		return fmt.Sprintf("no solution: at %.6g %% particles of the critical diameter would activate from %.6g %% on without any solute", 100*e.Supersaturation, 100*e.Limit)
	}
	return fmt.Sprintf("no solution: kappa would be %.6g, above 30", e.Limit)
}

// Unwrap returns ErrUnsolved.
func (e *UnsolvedError) Unwrap() error { return ErrUnsolved }

// CountKappa is the κ that one number of activated particles implies.
type CountKappa struct {
	CriticalDiameter float64 // m
	Kappa            float64
	// The bin that holds the critical diameter. In the first bin, what lies below the
	// instrument's range would matter; in the last one, everything rests on one bin.
	Bin             int
	AtFirst, AtLast bool
	// Relative sensitivities, for uncertainties: d ln κ/d ln N, by all diameters and
	// by s. At small s they tend to 3N/(dN/dlnD), -3 and -2.
	ByCount, ByDiameter, BySupersaturation float64
}

// KappaOfCount integrates the distribution from the largest size down until it holds
// count (1/m³), splits the last bin log-uniformly, and returns the κ of particles of
// that critical diameter whose crest lies at s, for the Kelvin length in m. That
// presumes one κ for all particles near this size and none of the wider ones
// staying inactive. Errors are *UnsolvedError.
func KappaOfCount(b *aerosol.Bins, count, s, kelvin float64) (CountKappa, error) {
	unsolved := func(r Reason, limit float64) (CountKappa, error) {
		return CountKappa{}, &UnsolvedError{r, count, s, limit}
	}
	switch {
	case !(s > 0) || math.IsInf(s, 1):
		return unsolved(NotSuper, 0)
	case !(count > 0):
		return unsolved(NothingCounted, 0)
	case !(count <= b.Number()):
		return unsolved(MoreThanSized, b.Number())
	}
	d, bin, ok := b.WidestAbove(count)
	if !ok {
		return unsolved(MoreThanSized, b.Number())
	}
	kappa, err := koehler.KappaOf(d, kelvin, s)
	if err != nil {
		var none *koehler.NoSolutionError
		if errors.As(err, &none) {
			return unsolved(BelowInsoluble, none.Limit)
		}
		return CountKappa{}, err
	}
	if kappa > mostKappa {
		return unsolved(KappaTooLarge, kappa)
	}
	out := CountKappa{CriticalDiameter: d, Kappa: kappa, Bin: bin, AtFirst: bin == 0, AtLast: bin == b.Grid().Len()-1}
	out.ByDiameter = logSlope(func(x float64) float64 { k, _ := koehler.KappaOf(d*x, kelvin, s); return k })
	out.BySupersaturation = logSlope(func(x float64) float64 { k, _ := koehler.KappaOf(d, kelvin, s*x); return k })
	out.ByCount = -out.ByDiameter * count / (b.Count(bin) / b.Grid().WidthLn(bin))
	return out, nil
}

// logSlope is d ln f/d ln x at x = 1.
func logSlope(f func(x float64) float64) float64 {
	const h = 1e-5
	return math.Log(f(math.Exp(h))/f(math.Exp(-h))) / (2 * h)
}
