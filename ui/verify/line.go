package verify

import (
	"errors"
	"math"

	"dropcrest/koehler/counter"
)

// lineChecks recomputes published lines through points with errors in both
// coordinates: x and y with their weights wx and wy, each a list with commas.
func lineChecks() map[string]Check {
	of := func(pick func(counter.Line) float64) Check {
		return func(a Args) (float64, error) {
			line, err := yorkLine(a)
			if err != nil {
				return 0, err
			}
			return pick(line), nil
		}
	}
	return map[string]Check{
		"york-slope":                 of(func(l counter.Line) float64 { return l.Slope }),
		"york-intercept":             of(func(l counter.Line) float64 { return l.Intercept }),
		"york-slope-uncertainty":     of(func(l counter.Line) float64 { return l.SlopeUncertainty }),
		"york-intercept-uncertainty": of(func(l counter.Line) float64 { return l.InterceptUncertainty }),
	}
}

func yorkLine(a Args) (counter.Line, error) {
	x, y, wx, wy := a.Numbers("x"), a.Numbers("y"), a.Numbers("wx"), a.Numbers("wy")
	if len(y) != len(x) || len(wx) != len(x) || len(wy) != len(x) {
		return counter.Line{}, errors.New("x, y, wx and wy: as many numbers each")
	}
	points := make([]counter.LinePoint, len(x))
	for i := range x {
		points[i] = counter.LinePoint{X: x[i], Y: y[i], UX: 1 / math.Sqrt(wx[i]), UY: 1 / math.Sqrt(wy[i])}
	}
	return counter.York(points)
}
