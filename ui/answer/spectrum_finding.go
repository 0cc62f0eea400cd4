package answer

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/spectrum"
)

// finding is the answer in sentences: how many activate, whether that agrees with
// what was counted, the κ of both, the numbers of the fit, and what limits it.
func (a *activated) finding() []string {
	return findingOf([]string{a.countSentence(), a.closureSentence(), a.kappaSentence(), a.fitSentence(), a.rejectedSentence()}, a.notes, limitsCounts)
}

// limitsCounts tells whether a note says what limits the counts.
func limitsCounts(n atmos.Note) bool {
	switch n.Code {
	case "critical-size-below-bins", "critical-size-above-bins", "count-misses-upper-tail":
		return true
	}
	return strings.HasSuffix(n.Code, "-extrapolated")
}

// mostListed are as many numbers as a sentence lists; of more it gives the ends.
const mostListed = 6

// countSentence is what is predicted.
func (a *activated) countSentence() string {
	if a.sizes == nil && a.mean.X == nil {
		return fmt.Sprintf("Nothing can be predicted: %s.", a.noSizes)
	}
	var at, counts, wide []string
	for i, p := range a.predicted {
		if len(a.predicted) > mostListed && i != 0 && i != len(a.predicted)-1 {
			continue
		}
		at, counts, wide = append(at, levelWords(p.s)), append(counts, cubic(p.count)), append(wide, nanometres(p.critical))
	}
	says := fmt.Sprintf("%s activate at %s %% supersaturation", list(counts), list(at))
	if a.sizes != nil {
		says = fmt.Sprintf("of %s particles per cm³ %s", cubic(a.sizes.Number()), says)
	}
	if a.isSeason() { // critical diameters differ from record to record
		return fmt.Sprintf("On average over %d records, %s.", a.records, says)
	}
	return capital(says) + fmt.Sprintf(", those wider than %s nm.", list(wide))
}

// isSeason reports whether these are all records of the data.
func (a *activated) isSeason() bool { return a.number == 0 && a.records > 0 }

// list joins words with commas and an and.
func list(words []string) string {
	if n := len(words); n > 1 {
		return strings.Join(words[:n-1], ", ") + " and " + words[n-1]
	}
	return strings.Join(words, "")
}

// cubic writes a number concentration in 1/cm³.
func cubic(n float64) string {
	x := n * perCubic
	if x >= 100 {
		return strconv.FormatFloat(x, 'f', 0, 64)
	}
	return digits(x, 3)
}

// nanometres writes a length in nm, without the unit.
func nanometres(m float64) string {
	if math.IsNaN(m) {
		return "any"
	}
	return digits(m*nano, 3)
}

// closureSentence is how predicted and measured counts agree.
func (a *activated) closureSentence() string {
	g := a.closures.All.Agreement()
	switch {
	case g.Pairs == 0 && len(a.measured) > 0 && a.sizes != nil:
		return "No count can be compared with the prediction."
	case g.Pairs == 0:
		return ""
	case !a.isSeason() && g.Pairs <= mostListed:
		low, high := math.Inf(1), 0.0
		for _, m := range a.measured {
			if r := m.ratio(); !math.IsNaN(r) && !m.isBetween {
				low, high = math.Min(low, r), math.Max(high, r)
			}
		}
		return fmt.Sprintf("Predicted over measured is %s to %s, median %s; normalised mean bias %s.", digits(low, 3), digits(high, 3), digits(g.Median, 3), signedPercent(g.MeanBias))
	}
	return fmt.Sprintf("Predicted over measured is %s in the median of %s (5 to 95 %%: %s to %s), normalised mean bias %s; %s lie within 10 %%.",
		digits(g.Median, 3), pairs(g.Pairs), digits(g.P05, 3), digits(g.P95, 3), signedPercent(g.MeanBias), wholePercent(g.Within10))
}

func pairs(n int) string {
	if n == 1 {
		return "1 pair"
	}
	return strconv.Itoa(n) + " pairs"
}

func signedPercent(x float64) string {
	if math.Abs(x) < 0.0005 {
		return "0.0 %"
	}
	return fmt.Sprintf("%+.1f %%", 100*x)
}

func wholePercent(x float64) string { return fmt.Sprintf("%.0f %%", 100*x) }

// kappaSentence is κ by count and by composition.
func (a *activated) kappaSentence() string {
	if a.bins == nil && !a.isSeason() || len(a.measured) == 0 {
		return ""
	}
	says := a.countedKappas()
	if k := a.kappa(); !math.IsNaN(k) {
		says += fmt.Sprintf("; the prediction takes %s", digits(k, 3))
	}
	return says + "."
}

// countedKappas are the κ by count, and why there is none.
func (a *activated) countedKappas() string {
	var at, kappas, without []string
	for _, m := range a.measured {
		if m.isBetween {
			continue
		}
		if m.noKappa != nil {
			without = append(without, fmt.Sprintf("at %s %%: %s", levelWords(m.s), noKappaWords(m.noKappa)))
			continue
		}
		text := digits(m.kappa.Kappa, 3)
		if u := m.kappaUncertainty(); u > 0 {
			text = roundedPair(m.kappa.Kappa, u)
		}
		at, kappas = append(at, levelWords(m.s)), append(kappas, text)
	}
	of := "of"
	if a.isSeason() {
		of = "with a median of"
	}
	n := len(kappas)
	switch {
	case n == 0:
		return "The counts imply no κ (" + without[0] + ")"
	case n > mostListed:
		return fmt.Sprintf("The counts imply κ %s %s at %s %% to %s at %s %%", of, kappas[0], at[0], kappas[n-1], at[n-1])
	case len(without) > 0:
		return fmt.Sprintf("The counts imply κ %s %s at %s %% (none %s)", of, list(kappas), list(at), strings.Join(without, "; "))
	}
	if a.asksAt(at) {
		return fmt.Sprintf("The counts imply κ %s %s there", of, list(kappas))
	}
	return fmt.Sprintf("The counts imply κ %s %s at %s %%", of, list(kappas), list(at))
}

// asksAt reports whether these are the supersaturations that the first sentence
// names.
func (a *activated) asksAt(at []string) bool {
	if len(at) != len(a.predicted) || len(at) > mostListed {
		return false
	}
	for i, p := range a.predicted {
		if at[i] != levelWords(p.s) {
			return false
		}
	}
	return true
}

// roundedPair writes a value and its standard uncertainty with as many decimals as
// two digits of the uncertainty need.
func roundedPair(x, u float64) string {
	decimals := min(max(1-int(math.Floor(math.Log10(u))), 0), 6)
	return strconv.FormatFloat(x, 'f', decimals, 64) + " ± " + strconv.FormatFloat(u, 'f', decimals, 64)
}

// noKappaWords say why a count implies no κ.
func noKappaWords(err error) string {
	var u *spectrum.UnsolvedError
	if !errors.As(err, &u) {
		return err.Error()
	}
	switch u.Reason {
	case spectrum.NothingCounted:
		return "nothing was counted"
	case spectrum.MoreThanSized:
		return fmt.Sprintf("more were counted than the %s per cm³ that were sized (size limits, losses, another state of the air)", cubic(u.Limit))
	case spectrum.BelowInsoluble:
		return "particles of the critical diameter would activate there without any solute"
	case spectrum.KappaTooLarge:
		return "it would exceed 30"
	}
	return "there is no supersaturation"
}

// fitSentence is the numbers of the fit.
func (a *activated) fitSentence() string {
	if len(a.fits) == 0 {
		return ""
	}
	f := a.fits[0]
	if f.noFit != nil {
		return fmt.Sprintf("The %s cannot be fitted to the %s counts: %s.", formWords(f.form), f.of, f.whyNoFit())
	}
	fit := "fits"
	if f.form == "erf2" {
		fit = "fit"
	}
	says := fmt.Sprintf("The %s that %s the %s counts from %s to %s %%: %s", formWords(f.form), fit, f.of,
		levelWords(f.Low), levelWords(f.High), f.numberWords())
	if f.DegreesOfFreedom > 0 {
		says += fmt.Sprintf("; root mean square deviation %s", wholeOrOne(f.Deviation))
	}
	return says + "."
}

// wholeOrOne writes a share in per cent with two digits.
func wholeOrOne(x float64) string { return digits(100*x, 2) + " %" }

// rejectedSentence is what was left out.
func (a *activated) rejectedSentence() string {
	if len(a.rejected) == 0 {
		return ""
	}
	var parts []string
	for _, r := range a.rejected {
		parts = append(parts, fmt.Sprintf("%s (%s)", counts(r.Count), r.Reason))
	}
	return "Left out: " + list(parts) + "."
}

func counts(n int) string {
	if n == 1 {
		return "1 count"
	}
	return strconv.Itoa(n) + " counts"
}
