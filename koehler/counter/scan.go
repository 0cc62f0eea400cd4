package counter

import (
	"fmt"
	"math"
)

// Axis says what a scan goes through.
type Axis int

const (
	OverDiameter   Axis = iota // dry mobility diameter at a fixed temperature difference
	OverDifference             // temperature difference at a fixed dry diameter
	OverFlow                   // flow at a fixed dry diameter and temperature difference
)

// String returns what is scanned, in words.
func (a Axis) String() string {
	switch a {
	case OverDiameter:
		return "dry diameter"
	case OverDifference:
		return "temperature difference"
	case OverFlow:
		return "flow"
	}
	return "unknown axis"
}

// show writes a setting of the axis with its unit.
func (a Axis) show(x float64) string {
	switch a {
	case OverDiameter:
		return fmt.Sprintf("%.4g nm", x*1e9)
	case OverDifference:
		return fmt.Sprintf("%.4g K", x)
	}
	return fmt.Sprintf("%.4g L/min", x*6e4)
}

// Point is one setting of a scan with its counts.
type Point struct {
	Setting float64 // m, K or m³/s, see Axis
	CN      float64 // particles counted by the particle counter
	CCN     float64 // droplets counted by the CCN counter
	Ratio   float64 // flow times time of the CCN counter over that of the particle counter; 0: 1
	Reject  string  // why it must not be used, a clause; "": usable
	Time    float64 // s, any origin; 0: not known
	Line    int     // in the file it comes from; 0: none
}

// Scan is one series of settings.
type Scan struct {
	Name string
	Over Axis

	DryDiameter           float64 // mobility diameter, m, unless it is scanned
	TemperatureDifference float64 // K, unless it is scanned
	DifferenceUncertainty float64 // standard uncertainty of it, K
	DiameterUncertainty   float64 // standard uncertainty of DryDiameter that is this scan's own, m
	Flow                  float64 // total flow of the CCN counter, m³/s, unless it is scanned; 0: not known
	Pressure              float64 // Pa; 0: not known
	Time                  float64 // s, any origin
	Standard              int     // which of the standards of a calibration; 0: the first

	Points []Point
}

// LeftOut is a point that was not used.
type LeftOut struct {
	Scan    string
	Setting float64
	Line    int
	Why     string // a clause: "no particles were counted"
}

// Curve names the form of an activation curve in the logarithm of the setting.
type Curve int

const (
	// TwoStep is a cumulative Gaussian for each of the kinds of particles of equal
	// mobility, at its own size. Recommended.
	TwoStep Curve = iota
	// Gaussian is one cumulative Gaussian on a lower plateau, which takes the
	// multiply charged particles as active everywhere.
	Gaussian
	// Sigmoid is 1/(1 + (x/x50)^C), C < 0, on such a plateau.
	Sigmoid
)

// String returns the word that scripts see.
func (c Curve) String() string {
	switch c {
	case TwoStep:
		return "two-step"
	case Gaussian:
		return "gaussian"
	case Sigmoid:
		return "sigmoid"
	}
	return "unknown curve"
}

// Charges says which share of the particles is multiply charged, for TwoStep.
type Charges struct {
	Classifier Classifier
	// Sizes is dN/dln D of the aerosol, in any unit. nil: a constant share, the
	// fallback, which is said in the notes.
	Sizes  func(d float64) float64
	Double float64 // the constant share of doubly charged particles; 0: fitted
	Triple float64 // triply over doubly charged ones, where the share is constant
}

// Options of a fit. The zero value is a two-step curve with a fitted constant
// share and a fitted plateau.
type Options struct {
	Curve   Curve
	Charges Charges
	Plateau float64 // efficiency of the CCN counter against the particle counter; 0: fitted
	// CNEfficiency is the share of particles of a diameter (m) that the particle
	// counter counts; nil: all.
	CNEfficiency func(d float64) float64
	// LeastPlateau is the fitted plateau below which a scan counts as one that ends on
	// the lower plateau of its multiply charged particles; 0: 0.5, below 0: none.
	// Ambient particles of which few activate want a smaller one.
	LeastPlateau float64
	LeastCN      float64 // points with fewer counts are left out; 0: 10
	Outlier      float64 // points whose residual is larger than that many standard deviations are left out; 0: 6, below 0: none
}

// sift parts the points of a scan into usable ones and those left out.
func (s Scan) sift(o Options) (used []Point, out []LeftOut) {
	least := o.LeastCN
	if least == 0 {
		least = 10
	}
	seen := map[Point]bool{}
	for _, p := range s.Points {
		key := p
		key.Line = 0
		why := p.reject(least)
		if why == "" && seen[key] {
			why = "the row stands twice"
		}
		seen[key] = true
		if why != "" {
			out = append(out, LeftOut{s.Name, p.Setting, p.Line, why})
			continue
		}
		used = append(used, p)
	}
	return used, out
}

// reject says why a point cannot be used, "" when it can.
func (p Point) reject(least float64) string {
	ok := func(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) && x >= 0 }
	switch {
	case !ok(p.CN) || !ok(p.CCN):
		return "a count is not a number of 0 or more"
	case !(p.Setting > 0) || math.IsInf(p.Setting, 1):
		return "the setting is not above 0"
	case !ok(p.Ratio):
		return "the ratio of flows and times is not above 0"
	case p.Reject != "":
		return p.Reject
	case p.CN == 0:
		return "no particles were counted"
	case p.CN < least:
		return fmt.Sprintf("fewer than %g particles were counted", least)
	}
	return ""
}

// leastSettings is how many different settings a curve needs: one more than it
// has parameters of its own.
const leastSettings = 4

// check says what is wrong with the usable points before any fit.
func (s Scan) check(used []Point) error {
	if len(used) == 0 {
		if s.countsNone() {
			return s.fault(ErrNoParticles, "the particle counter (CN) counted nothing at any %v", s.Over)
		}
		return s.fault(ErrFewPoints, "no usable points, at least %d are needed", leastSettings)
	}
	different := map[float64]bool{}
	sum := 0.0
	for _, p := range used {
		different[p.Setting] = true
		sum += p.CCN
	}
	switch n := len(different); {
	case n < leastSettings && len(used) >= leastSettings:
		return s.fault(ErrDuplicated, "%d points stand at only %d different settings of the %v, at least %d are needed", len(used), n, s.Over, leastSettings)
	case n == 1:
		return s.fault(ErrFewPoints, "one usable point only, at least %d are needed", leastSettings)
	case n < leastSettings:
		return s.fault(ErrFewPoints, "%d usable points, at least %d are needed", n, leastSettings)
	case sum == 0:
		return s.fault(ErrAllZero, "no droplets at any %v: the supersaturation is too low for these particles, or the CCN counter did not count", s.Over)
	}
	return s.checkRise(used)
}

func (s Scan) countsNone() bool {
	for _, p := range s.Points {
		if p.CN != 0 {
			return false
		}
	}
	return len(s.Points) > 0
}

// checkRise compares the activated fraction of the lower and the upper third.
func (s Scan) checkRise(used []Point) error {
	sorted := sortedPoints(used)
	third := max(1, len(sorted)/3)
	low, uLow := fraction(sorted[:third])
	high, uHigh := fraction(sorted[len(sorted)-third:])
	if away := (high - low) / math.Hypot(uLow, uHigh); away < -3 {
		return s.fault(ErrDecreasing, "droplets over particles fall from %.3g at small to %.3g at large settings of the %v: are columns swapped?", low, high, s.Over)
	} else if away < 3 {
		if low > 0.5 {
			return s.fault(ErrAllActive, "droplets over particles are %.3g at all settings of the %v: it must reach down to where nothing activates", low, s.Over)
		}
		return s.fault(ErrNoStep, "droplets over particles go from %.3g to %.3g, which is no step: the %v must reach further up", low, high, s.Over)
	}
	return nil
}

// fraction is droplets over particles of some points together and its standard
// deviation by counting.
func fraction(points []Point) (f, u float64) {
	cn, ccn := 0.0, 0.0
	for _, p := range points {
		cn += p.CN * p.ratio()
		ccn += p.CCN
	}
	f = ccn / cn
	return f, math.Sqrt((ccn+1)+f*f*cn) / cn
}

func (p Point) ratio() float64 {
	if p.Ratio == 0 {
		return 1
	}
	return p.Ratio
}
