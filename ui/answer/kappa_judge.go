package answer

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/kappa"
)

// unlikely is the probability of a χ² from which on the points do not agree
// (common practice).
const unlikely = 0.05

// judge says what limits the answer.
func (k *implied) judge(stopped bool) {
	k.judgePoints()
	for _, m := range k.means {
		k.judgeMean(m)
	}
	if len(k.means) > 1 {
		k.note("methods-not-merged", "point", "κ from growth factors and from activation stand side by side: they are known to disagree, by sparingly soluble matter, "+
			"by surface tension and because κ itself depends on how dilute the droplet is.")
	}
	if stopped {
		k.note("trials-stopped", "trials", fmt.Sprintf("The work was stopped after %d of at most %d trials: what has none has the interval of linear propagation.",
			k.made(), mostTrials(k.asked)*len(k.points)))
	}
	k.notes = distinct(k.notes)
}

// made is the number of trials that were made.
func (k *implied) made() int {
	n := 0
	for _, p := range k.points {
		if p.MonteCarlo != nil {
			n += p.MonteCarlo.Trials
		}
	}
	return n
}

func (k *implied) note(code, input, text string) {
	k.notes = append(k.notes, atmos.Note{Code: code, Input: input, Text: text})
}

// mostMade is the most trials that a point has.
func (k *implied) mostMade() int {
	most := 0
	for _, p := range k.points {
		if p.MonteCarlo != nil {
			most = max(most, p.MonteCarlo.Trials)
		}
	}
	return most
}

// mostNamed is how many points a note names; the tables have them all.
const mostNamed = 3

// judgePoints says of which points what must be said.
func (k *implied) judgePoints() {
	k.noteOn("no-kappa", "no κ", func(m *kappaPoint) string {
		if m.Err == nil {
			return ""
		}
		return m.problem()
	})
	k.noteOn("no-growth", "no growth", func(m *kappaPoint) string {
		if m.Err != nil || !m.isGrowth() || m.Growth.Value != 1 {
			return ""
		}
		return "the particle took up no water, so that κ is 0 and its uncertainty only counts upwards"
	})
	k.noteOn("plateau-above-one", "a plateau above 1", func(m *kappaPoint) string {
		if m.Plateau <= 1 || m.isGrowth() {
			return ""
		}
		return "more particles than there are cannot activate, so that the efficiency of the counters was not corrected"
	})
	k.noteOn("curve-unused", "no use for an activation curve", func(m *kappaPoint) string {
		if !m.isGrowth() || m.Width == 0 && m.Plateau == 1 {
			return ""
		}
		return "its width and plateau belong to a supersaturation and not to a growth factor"
	})
	k.noteOn("trials-without-kappa", "trials without κ", func(m *kappaPoint) string {
		d := m.MonteCarlo
		if m.Err != nil || d == nil || d.Above+d.Below == 0 {
			return ""
		}
		return fmt.Sprintf("%s of the trials (%d beyond any κ, %d below 0); quantiles count them, the mean takes the latter as 0 and leaves the former out",
			shareWords(float64(d.Above+d.Below)/float64(d.Trials)), d.Above, d.Below)
	})
	k.noteOn("trials-not-stable", "trials that are not enough", func(m *kappaPoint) string {
		d := m.MonteCarlo
		if m.Err != nil || d == nil || d.Stable || d.Stopped || math.IsNaN(d.Tolerance) {
			return ""
		}
		return fmt.Sprintf("after %d of them mean, standard uncertainty and interval are not yet stable to %s", d.Trials, digits(d.Tolerance, 1))
	})
	k.noteOn("linear-differs", "a skewed distribution", func(m *kappaPoint) string {
		if m.Err != nil || m.MonteCarlo == nil || m.MonteCarlo.Agrees {
			return ""
		}
		return fmt.Sprintf("linear propagation would give %s to %s (JCGM 101:2008, 8)", digits3(m.Linear.Interval.Low), digits3(m.Linear.Interval.High))
	})
}

// noteOn makes one note on all points that what has something to say of.
func (k *implied) noteOn(code, subject string, what func(*kappaPoint) string) {
	var named []string
	more := 0
	for i := range k.points {
		m := &k.points[i]
		says := what(m)
		switch {
		case says == "":
			continue
		case len(named) >= mostNamed:
			more++
			continue
		case len(k.points) > 1:
			says = "point " + m.name + ": " + says
		}
		named = append(named, says)
	}
	if len(named) == 0 {
		return
	}
	text := capital(subject) + ": " + strings.Join(named, "; ")
	if more > 0 {
		text += fmt.Sprintf("; and %d more", more)
	}
	k.note(code, "point", text+".")
}

// problem is why a point has no κ.
func (m *kappaPoint) problem() string { return problemOf(m.Err) }

func (k *implied) judgeMean(m kindMean) {
	var weightless *kappa.NoWeightError
	switch {
	case errors.As(m.err, &weightless):
		k.note("no-weight", "point", fmt.Sprintf("There is no mean of %s: point %s has no uncertainty of its own and would outweigh all others.", m.method(), weightless.Point))
	case m.err != nil && m.count > 1:
		k.note("no-mean", "point", "There is no mean of "+m.method()+": "+m.err.Error()+".")
	case m.mean != nil && m.mean.Probability < unlikely:
		k.note("points-scatter", "point", fmt.Sprintf(
			"The points of %s scatter more than their own uncertainties say (χ² %s with %d degrees of freedom): either κ differs between them, or the uncertainties are too small; that of the mean is then too small as well.",
			m.method(), digits3(m.mean.ChiSquare), m.mean.Freedom))
	}
}

// digits3 writes a number with three digits.
func digits3(x float64) string { return digits(x, 3) }

// shareWords writes a share in per cent, so that it does not vanish.
func shareWords(share float64) string {
	p := 100 * share
	if p > 0 && p < 0.01 {
		return "less than 0.01 %"
	}
	return digits(p, 2) + " %"
}

// relativeWords writes a relative uncertainty in per cent.
func relativeWords(u float64) string {
	if math.IsNaN(u) || math.IsInf(u, 0) {
		return "unknown"
	}
	return digits(100*u, 3) + " %"
}
