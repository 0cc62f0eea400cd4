package answer

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/atmos/fit"
	"dropcrest/koehler/spectrum"
)

// fitted is a form laid through counts, or why there is none.
type fitted struct {
	form string // power | cohard | erf | erf2
	of   string // measured | predicted
	spectrum.Fitted
	noFit error
}

// fit lays the form that was asked for through the measured counts, or through
// the predicted ones where nothing was measured.
func (a *activated) fit() {
	form := a.asked.Fit
	if form == "none" {
		return
	}
	points, of := a.points()
	f := fitted{form: form, of: of}
	switch form {
	case "power":
		f.Fitted, f.noFit = spectrum.FitPower(points)
	case "cohard":
		f.Fitted, f.noFit = spectrum.FitCohard(points)
	case "erf":
		f.Fitted, f.noFit = spectrum.FitErrorFunctions(points, 1, 0)
	case "erf2":
		f.Fitted, f.noFit = spectrum.FitErrorFunctions(points, 2, a.total(len(points)))
	}
	a.fits = append(a.fits, f)
	a.fitSizes()
}

// fitSizes lays as many modes through measured sizes as error functions were laid
// through the counts, so that both can be compared. It takes longer than all else.
func (a *activated) fitSizes() {
	n := map[string]int{"erf": 1, "erf2": 2}[a.asked.Fit]
	if a.bins == nil || n == 0 {
		return
	}
	modes, err := aerosol.FitModes(a.bins, n, nil)
	if err != nil {
		a.notes = append(a.notes, atmos.Note{Code: "sizes-not-fitted", Input: "fit", Text: fmt.Sprintf("%d modes cannot be fitted to the sizes: %s.", n, reason(err))})
		return
	}
	a.modes = &modes
}

// modeUncertainty is that of number k (N, D_g, σ_g) of mode i; NaN: not known.
func (a *activated) modeUncertainty(i, k int) float64 {
	if a.modes.Covariance == nil {
		return math.NaN()
	}
	return math.Sqrt(a.modes.Covariance.At(3*i+k, 3*i+k))
}

// total is the number of all particles where five counts need it to determine two
// steps, 0 where it is not known or not needed.
func (a *activated) total(points int) float64 {
	if a.sizes == nil || points > 5 {
		return 0
	}
	return a.sizes.Number()
}

// points are what is fitted.
func (a *activated) points() (points []spectrum.Point, of string) {
	if points, ok := a.measuredPoints(); ok {
		return points, "measured"
	}
	for _, p := range a.predicted {
		if p.count >= 0 {
			points = append(points, spectrum.Point{Supersaturation: p.s, Count: p.count})
		}
	}
	return points, "predicted"
}

// measuredPoints are the counts, and whether there are any.
func (a *activated) measuredPoints() ([]spectrum.Point, bool) {
	var points []spectrum.Point
	for _, m := range a.measured {
		if !(m.count >= 0) || m.isBetween {
			continue
		}
		p := spectrum.Point{Supersaturation: m.s, Count: m.count}
		if m.uncertainty > 0 {
			p.Uncertainty = m.uncertainty
		}
		points = append(points, p)
	}
	return points, len(points) > 0
}

// formWords names a form in running text.
func formWords(form string) string {
	switch form {
	case "power":
		return "power law"
	case "cohard":
		return "form of Cohard et al."
	case "erf":
		return "error function"
	}
	return "two error functions"
}

// numberWords are the numbers of a fit with one standard uncertainty.
func (f fitted) numberWords() string {
	value := func(i int, scale float64, n int) string {
		p := f.Form.Parameters()[i]
		if u := f.Uncertainty(i) * scale; u > 0 && !math.IsInf(u, 1) {
			return roundedPair(p.Value*scale, u)
		}
		return digits(p.Value*scale, n)
	}
	const perCubicCentimetre = 1e-6
	switch form := f.Form.(type) {
	case spectrum.Power:
		return fmt.Sprintf("N = C s^k with C = %s per cm³ at 1 %% and k = %s", value(0, perCubicCentimetre, 4), value(1, 1, 3))
	case spectrum.Cohard:
		return fmt.Sprintf("C = %s per cm³, k = %s, µ = %s, β = %s per %%²", value(0, perCubicCentimetre, 4), value(1, 1, 3), value(2, 1, 3), value(3, 1, 3))
	case spectrum.ErrorFunctions:
		text := ""
		for i := range form {
			if i > 0 {
				text += "; "
			}
			text += fmt.Sprintf("%s per cm³ about %s %% of width %s in ln s", value(3*i, perCubicCentimetre, 4), value(3*i+1, 1, 3), value(3*i+2, 1, 3))
		}
		return text
	}
	return ""
}

// whyNoFit says in words why a form could not be fitted.
func (f fitted) whyNoFit() string {
	switch {
	case errors.Is(f.noFit, fit.ErrFewPoints):
		return "there are fewer counts than the form has numbers"
	case errors.Is(f.noFit, fit.ErrUndetermined), errors.Is(f.noFit, fit.ErrNotConverged):
		return "the counts do not determine all its numbers"
	}
	var in *aerosol.InputError
	if errors.As(f.noFit, &in) {
		return fmt.Sprintf("%s is %.6g, should be %s", in.What, in.Value, in.Right)
	}
	return reason(f.noFit)
}

// isHeld reports whether a parameter was held and not fitted.
func (f fitted) isHeld(i int) bool { return slices.Contains(f.Held, i) }
