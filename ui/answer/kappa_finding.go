package answer

import (
	"fmt"
	"math"
	"strings"

	"dropcrest/koehler/kappa"
)

// finding is the answer in sentences.
func (k *implied) finding() []string {
	out := k.findingOfAll()
	if k.spread != nil {
		out[len(out)-1] += " " + k.spread.words()
	}
	if says := k.publishedWords(); says != "" {
		out[len(out)-1] += " " + says
	}
	return out
}

// findingOfAll is what the measurements say.
func (k *implied) findingOfAll() []string {
	if len(k.points) == 1 {
		return k.findingOfOne(&k.points[0])
	}
	var out []string
	if without := k.withoutKappa(); without == len(k.points) {
		return []string{fmt.Sprintf("None of the %d measurements has a κ: %s.", without, k.points[0].problem())}
	}
	for i := range k.means {
		out = append(out, k.sentenceOfMean(&k.means[i]))
	}
	if len(k.means) > 1 {
		out = append(out, "Both are shown side by side and not merged.")
	} else if m := k.means[0]; m.mean != nil {
		out = append(out, scatterWords(m.mean)+" "+conventionWords(m.mean.Kappa, m.at25C, math.NaN()))
	}
	if n := k.withoutKappa(); n > 0 {
		out = append(out, fmt.Sprintf("%d of %d measurements have no κ.", n, len(k.points)))
	}
	return out
}

// withoutKappa is how many points have none.
func (k *implied) withoutKappa() int {
	n := 0
	for _, p := range k.points {
		if p.Err != nil {
			n++
		}
	}
	return n
}

func (k *implied) findingOfOne(m *kappaPoint) []string {
	if m.Err != nil {
		return []string{"This measurement has no κ: " + m.problem() + "."}
	}
	how := "activation"
	if m.isGrowth() {
		how = "growth"
	}
	row := kappaRow(m.Value, m.At25C, m.Linear, m.MonteCarlo, nil)
	out := []string{fmt.Sprintf("From this %s κ is %s%s.", how, digits3(m.Kappa), k.sureWords(row, m.MonteCarlo != nil))}
	if parts := contributionsOf(m.Estimate); len(parts) > 0 {
		out = append(out, rankWords(parts))
	}
	last := conventionWords(m.Kappa, m.At25C, m.Classic)
	if says := m.spreadWords(); says != "" {
		last = says + " " + last
	}
	return append(out, last)
}

// spreadWords say what the activation curve tells about the particles.
func (m *kappaPoint) spreadWords() string {
	p := m.spread
	if p == nil {
		return ""
	}
	says := "All particles have about the same κ: their curve is as narrow as the classifier's"
	switch {
	case m.Width == 0:
		says = "How far κ spreads is not known without the width of the curve"
	case !p.Unresolved:
		says = fmt.Sprintf("Between the particles κ spreads from %s to %s (one standard deviation of its logarithm, %s)", digits3(p.Low), digits3(p.High), digits(p.Spread, 2))
	}
	if p.Insoluble > 0 {
		says += fmt.Sprintf("; %s of them never activate", shareWords(p.Insoluble))
	}
	return says + "."
}

// sureWords say how sure a κ is.
func (k *implied) sureWords(r KappaRow, drawn bool) string {
	if r.Interval == nil {
		return "; no uncertainty was given"
	}
	by := "linear propagation"
	if drawn {
		by = "Monte Carlo"
	}
	return fmt.Sprintf(" ± %s (%s), with %s between %s and %s by %s", digits(float64(r.Standard), 2), relativeWords(float64(r.Relative)),
		percentWords(k.asked.Coverage), digits3(float64(r.Interval[0])), digits3(float64(r.Interval[1])), by)
}

func percentWords(share float64) string { return shortest(100*share) + " %" }

// rankWords rank what the inputs contribute to the variance.
func rankWords(parts []contribution) string {
	var words []string
	for i, c := range parts {
		if i == 3 || c.share < 0.01 && i > 0 {
			break
		}
		common := ""
		if c.systematic {
			common = " (common)"
		}
		words = append(words, fmt.Sprintf("%s%s %.0f %%", c.quantity, common, 100*c.share))
	}
	if len(words) == 1 {
		return "All of its variance is from the " + parts[0].quantity.String() + "."
	}
	return "Its variance is from " + strings.Join(words, ", ") + "."
}

// conventionWords set κ beside the common convention and the approximation.
func conventionWords(value, at25C, classic float64) string {
	says := fmt.Sprintf("under 298.15 K and 72.0 mN/m κ is %s.", digits3(at25C))
	if math.IsNaN(at25C) {
		says = "under 298.15 K and 72.0 mN/m there is none."
	}
	if !math.IsNaN(classic) && !math.IsInf(classic, 0) && value > 0 {
		return fmt.Sprintf("The classic approximation would give %s (%+.1f %%); %s", digits3(classic), 100*(classic/value-1), says)
	}
	return capital(says)
}

func (k *implied) sentenceOfMean(m *kindMean) string {
	from := "activation"
	if m.isGrowth {
		from = "growth factors"
	}
	if m.mean == nil {
		for i := range k.points { // the only one, if there is one
			if p := &k.points[i]; m.count == 1 && p.Err == nil && p.isGrowth() == m.isGrowth {
				return fmt.Sprintf("From %s (1 point) κ is %s%s.", from, digits3(p.Kappa),
					k.sureWords(kappaRow(p.Value, p.At25C, p.Linear, p.MonteCarlo, nil), p.MonteCarlo != nil))
			}
		}
		return fmt.Sprintf("From %s there is no mean of the %d points.", from, m.count)
	}
	row := m.row().KappaRow
	return fmt.Sprintf("From %s (weighted mean of %d points) κ is %s%s.", from, m.count, digits3(m.mean.Kappa), k.sureWords(row, m.mean.MonteCarlo != nil))
}

// scatterWords say whether the points agree.
func scatterWords(m *kappa.Mean) string {
	says := "agree within their own uncertainties"
	if m.Probability < unlikely {
		says = "scatter more than their own uncertainties say"
	}
	return fmt.Sprintf("The points %s (χ² %s with %d degrees of freedom, probability %s).", says, digits3(m.ChiSquare), m.Freedom, digits(m.Probability, 2))
}
