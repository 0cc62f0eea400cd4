package answer

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/spectrum"
)

// why is what stands behind the finding: definitions, formulas, constants,
// sources, and the notes in full.
func (a *activated) why() []string {
	out := []string{
		"A particle activates at a supersaturation s where the crest of its equilibrium curve lies at or below s. " +
			"The number that activates, N(s), is the integral of the size distribution over all sizes that do.",
	}
	if a.sizes != nil {
		out = append(out, a.sizesWords(), a.mixingWords())
	}
	if len(a.groups) > 0 {
		models := map[string]bool{}
		for _, g := range a.groups {
			for _, m := range g.models {
				if !models[m] {
					out = append(out, "Water activity: "+m+".")
				}
				models[m] = true
			}
		}
		if k := a.kappa(); !math.IsNaN(k) {
			from := "as given"
			if a.kappaFrom != "" {
				from = "from " + a.kappaFrom
			}
			out = append(out, fmt.Sprintf("κ of the particles: %s, %s.", digits(k, 4), from))
		}
		out = append(out, fmt.Sprintf("Kelvin length A = 4 σ M_w/(R T ρ_w) = %s nm with the surface tension of a dilute drop, at %s.",
			digits(a.kelvin()*nano, 5), celsius(a.asked.Temperature)))
	}
	if len(a.measured) > 0 {
		out = append(out, a.comparedWords()...)
	}
	out = append(out, a.fitWords()...)
	out = append(out, a.sizedModes()...)
	out = append(out, fmt.Sprintf("Constants: R = %v J/(mol K), molar mass of water %v kg/mol (%s).",
		atmos.GasConstant, atmos.WaterMolarMass, "CODATA 2018; IUPAC"))
	if len(a.mapping) > 0 {
		out = append(out, "Columns of the data, as understood: "+strings.Join(a.mapping, "; ")+".")
	}
	for _, n := range a.notes {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

func (a *activated) sizesWords() string {
	if a.bins != nil {
		return "Sizes: measured bins, within which dN/dlog D is constant; the bin that holds a critical diameter is split log-uniformly."
	}
	return "Sizes: lognormal modes, dN/dln D = N/(√(2π) ln σ_g) exp(-ln²(D/D_g)/(2 ln² σ_g)); the number above a diameter is an error function."
}

func (a *activated) mixingWords() string {
	says := "Mixing: every particle of a size has the same composition."
	switch {
	case a.asked.KappaSpread > 1:
		says = fmt.Sprintf("Mixing: κ of particles of one size is lognormal about its median, with a geometric standard deviation of %s.", shortest(a.asked.KappaSpread))
	case a.asked.Mixing == "external" && len(a.groups) > 0 && !a.groups[0].isOne:
		says = "Mixing: at every size each component makes particles of its own, as many as it has of the volume."
	}
	return says + " Where that or the composition differs among particles, the critical dry diameter given is the one above which there are as many particles as activate."
}

func (a *activated) comparedWords() []string {
	out := []string{"Closure is predicted over measured. The normalised mean bias is Σ(p - m)/Σm; slopes have the predicted count as ordinate, R² hides any bias. " +
		"Agreement within 20 % is good, and lowest supersaturations agree worst (published closure studies, as remembered)."}
	if slices.ContainsFunc(a.measured, func(m measurement) bool { return m.isBetween }) {
		out = append(out, "A count marked as interpolated lies on the straight line between its measured neighbours in the logarithms of both; where the spectrum bends "+
			"that is off by several per cent. It is left out of closure and fits.")
	}
	if a.bins != nil {
		out = append(out, "κ by count: sizes are summed from the largest down until they hold the count; that is the critical dry diameter, and κ that of particles "+
			"whose crest lies at the supersaturation there. It presumes that all wider particles activate. Its uncertainty is that of the count alone; "+
			"d ln κ is -3 d ln D and -2 d ln s.")
	}
	return out
}

func (a *activated) fitWords() []string {
	var out []string
	for _, f := range a.fits {
		switch f.form {
		case "power":
			out = append(out, "Power law: N = C (s/1 %)^k (Twomey 1959, from memory). It has no bound at high supersaturation.")
		case "cohard":
			out = append(out, "Form of Cohard, Pinty and Bedos (1998, from memory): N = C S^k 2F1(µ, k/2; k/2 + 1; -β S²), S = s/1 %.")
		default:
			out = append(out, "Error functions: N/2 [1 + erf(ln(s/S1)/w)] each (Pöhlker et al. 2016, of activated fractions). A lognormal mode of one κ has S1 = s_c(D_g) and w = 3 ln σ_g/√2.")
		}
		if f.noFit == nil {
			out = append(out, f.rangeWords())
			out = append(out, f.modeWords(a)...)
		}
	}
	return out
}

func (f fitted) rangeWords() string {
	says := fmt.Sprintf("Fitted to %d %s counts from %s to %s %%; outside, the form extrapolates.", f.Points, f.of, levelWords(f.Low), levelWords(f.High))
	if !math.IsNaN(f.ReducedChiSquare) {
		says += fmt.Sprintf(" Reduced χ² %s.", digits(f.ReducedChiSquare, 3))
	}
	if f.Fitted.Covariance == nil {
		says += " No degree of freedom is left, so the numbers have no uncertainty."
	}
	if len(f.Held) > 0 {
		says += " k is held: these counts fit the better the larger it is."
	}
	return says
}

// sizedModes are the modes fitted to measured sizes.
func (a *activated) sizedModes() []string {
	if a.modes == nil {
		return nil
	}
	var out []string
	for i, m := range a.modes.Modes {
		pair := func(x float64, k int, scale float64) string {
			if u := a.modeUncertainty(i, k); u > 0 {
				return roundedPair(x*scale, u*scale)
			}
			return digits(x*scale, 4)
		}
		out = append(out, fmt.Sprintf("The sizes themselves, fitted by least squares, have a mode of %s per cm³, D_g %s nm, σ_g %s.",
			pair(m.Concentration, 0, perCubic), pair(m.Median, 1, nano), pair(m.GSD, 2, 1)))
	}
	return out
}

// modeWords are the lognormal modes of fitted error functions.
func (f fitted) modeWords(a *activated) []string {
	steps, ok := f.Form.(spectrum.ErrorFunctions)
	kappa := a.kappa()
	if !ok || !(kappa > 0) {
		return nil
	}
	var out []string
	for _, step := range steps {
		m, err := spectrum.ModeOfStep(step, kappa, a.kelvin())
		if err != nil {
			continue
		}
		out = append(out, fmt.Sprintf("With κ %s the step at %s %% is a mode of %s per cm³, D_g %s nm, σ_g %s.", digits(kappa, 3),
			digits(100*step.Centre, 3), cubic(m.Concentration), digits(m.Median*nano, 3), digits(m.GSD, 3)))
	}
	return out
}
