package answer

import (
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/ascent"
)

// finding is the answer in sentences: peak and droplets, the mean over updrafts, the
// closed forms, what limits the number, and what limits the answer.
func (r *risen) finding() []string {
	return findingOf([]string{r.dropletSentence(), r.meanSentence(), r.sweepSentence(), r.closedSentence(), r.limitSentence(), r.grownSentence()},
		r.notes, limitsAscent)
}

// limitsAscent tells whether a note says what limits the numbers.
func limitsAscent(n atmos.Note) bool {
	switch n.Code {
	case "no-peak", "outside-bins", "stays-dry", "sweep-faults":
		return true
	}
	return strings.HasSuffix(n.Code, "-extrapolated")
}

func (r *risen) dropletSentence() string {
	rises := fmt.Sprintf("At %s the supersaturation peaks at %s, %s m above the start at %s", r.updraftWords(),
		percent(r.Peak.Supersaturation), digits(r.Peak.Height, 3), celsius(r.Peak.Temperature))
	if !r.HasPeak {
		rises = fmt.Sprintf("At %s the supersaturation still rises at %s m, to %s", r.updraftWords(), digits(r.Peak.Height, 3), percent(r.Peak.Supersaturation))
	}
	says := fmt.Sprintf("%s: %s of %s particles per cm³ become droplets", rises, cubic(r.Droplets), cubic(r.Number))
	var wide []string
	for _, m := range r.byMode() {
		if d := float64(m.Critical); d > 0 && !math.IsInf(d, 0) {
			if text := nanometres(d); len(wide) == 0 || wide[len(wide)-1] != text {
				wide = append(wide, text)
			}
		}
	}
	if len(wide) > 0 && len(wide) <= mostListed && r.Droplets > 0 {
		says += ", those wider than " + list(wide) + " nm"
	}
	return says + "."
}

// updraftWords is the updraft as it was given, or with as many digits as a mean has.
func (r *risen) updraftWords() string {
	if r.ofSpread != nil {
		return digits(r.parcel.Updraft, 3) + " m/s"
	}
	return shortest(r.parcel.Updraft) + " m/s"
}

// meanSentence is the mean over a distribution of updrafts.
func (r *risen) meanSentence() string {
	m := r.ofSpread
	if m == nil {
		return ""
	}
	how := "by area"
	if r.asked.UpdraftWeighting == "flux" {
		how = "by the air they carry"
	}
	says := fmt.Sprintf("Over all updrafts, weighted %s, the mean is %s droplets per cm³ at a mean updraft of %s m/s", how, cubic(m.Mean), digits(m.MeanUpdraft, 3))
	if m.Characteristic > 0 {
		says += fmt.Sprintf("; the ascent at %s m/s has as many", digits(m.Characteristic, 3))
	}
	return says + "."
}

func (r *risen) sweepSentence() string {
	if r.sweep == nil {
		return ""
	}
	return r.sweep.sentence()
}

// closedSentence puts the closed forms beside the ascent.
func (r *risen) closedSentence() string {
	var parts []string
	for _, c := range r.forms {
		switch {
		case c.none != nil:
			return "The closed forms say nothing: " + strings.TrimSuffix(reason(c.none), ".") + "."
		case r.HasPeak && r.Droplets > 0:
			parts = append(parts, fmt.Sprintf("%s gives %s (%s)", methodName(c.Method), cubic(c.Droplets), signedPercent(c.Droplets/r.Droplets-1)))
		default:
			parts = append(parts, fmt.Sprintf("%s gives %s", methodName(c.Method), cubic(c.Droplets)))
		}
	}
	return strings.Join(parts, ", ") + "."
}

// limitSentence is what limits the number of droplets: the published regime with what
// it was found for, and what the number answers to.
func (r *risen) limitSentence() string {
	regime := ascent.RegimeOf(r.parcel.Updraft, r.Number)
	says := "By updraft over particles the number is limited by "
	switch regime {
	case ascent.UpdraftLimited:
		says += "the updraft"
	case ascent.AerosolLimited:
		says += "the aerosol"
	default:
		says += "both updraft and aerosol"
	}
	says += " (Reutter et al. 2009, found for fresh smoke)"
	if s := r.answers; s != nil {
		says += fmt.Sprintf("; 10 %% more updraft means %s droplets, 10 %% more particles %s", tenPercent(s.Updraft), tenPercent(s.Number))
		if !math.IsNaN(s.Kappa) {
			says += ", 10 % more kappa " + tenPercent(s.Kappa)
		}
	}
	return says + "."
}

// tenPercent is what 10 % more of something is worth.
func tenPercent(slope float64) string { return signedPercent(math.Pow(1.1, slope) - 1) }

// grownSentence tells where growth lags behind activation.
func (r *risen) grownSentence() string {
	const worth = 0.02 // of the droplets
	if !r.HasPeak || !(r.Droplets > 0) || math.Abs(r.Grown-r.Droplets) < worth*r.Droplets+r.GrownError {
		return ""
	}
	return fmt.Sprintf("At the end of %s m, %s per cm³ have grown past their critical size.", digits(r.End.Height, 3), cubic(r.Grown))
}
