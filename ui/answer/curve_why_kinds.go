package answer

import (
	"fmt"
	"math"
	"strings"

	"dropcrest/solutes"
)

// kindWords explain what makes the particle other than a plain salt: sparing
// solubility, a film, adsorbed water, and the phases of salts.
func (c *curve) kindWords() []string {
	var out []string
	if c.hasTwin {
		out = append(out, c.solubilityWords())
	}
	if c.dissolved.Film != nil {
		out = append(out, c.filmWords())
	}
	if c.dissolved.Core != nil && c.dissolved.Core.A > 0 {
		out = append(out, c.adsorptionWords())
	}
	if c.hasPhase && !math.IsNaN(c.flat.Dissolved) && c.flat.Dissolved > 0 {
		out = append(out, c.phaseWords())
	}
	return out
}

func (c *curve) solubilityWords() string {
	var parts []string
	for _, l := range c.dissolved.Limits {
		switch {
		case !l.Kept:
		case math.IsInf(l.Water, 1):
			parts = append(parts, l.Substance+" does not dissolve")
		default:
			parts = append(parts, fmt.Sprintf("%s (C %.3g) is wholly dissolved from %s times the dry diameter on",
				l.Substance, l.Solubility, digits(math.Cbrt(1+l.Water), 3)))
		}
	}
	return "Solubility: κ(D) = Σ ε κ min(1, C (D³ - Dd³)/(ε Dd³)), with C the volume of compound that a volume of water dissolves and ε its volume share; " +
		strings.Join(parts, "; ") + ". The particle that has been dissolved keeps the whole κ at every size. Curves are cut at these points and their extrema are exact."
}

func (c *curve) filmWords() string {
	if c.asked.Partitioning != "on" {
		return "Film: without partitioning all of the organic is in the bulk and at the surface too, which counts it twice and overstates its effect in small drops."
	}
	return "Film: partitioning keeps the mass of the organic, n = c V + π D² Γmax K c/(1 + K c): what covers the surface (Gibbs, ideal) is missing in the bulk " +
		"and lowers neither the water activity nor, any further, the tension."
}

func (c *curve) adsorptionWords() string {
	says := "Adsorption: ln S = A/D - A_F θ^(-B_F), θ = (D - Dc)/(2 · 0.275 nm) layers on the insoluble core of diameter Dc (Frenkel, Halsey and Hill; Sorjamaa and Laaksonen 2007)"
	if c.dissolved.Core.SolubleShare == 0 {
		return says + "."
	}
	form := "ln(1 + ε κ Dd³/(D³ - Dd³))"
	if isExponential(c.asked) {
		form = "ε κ Dd³/(D³ - (1-ε) Dd³)"
	}
	return says + ", less " + form + " for the soluble share ε (Kumar et al. 2011)."
}

func (c *curve) phaseWords() string {
	says := "Phases: a crystal dissolves where its drop would have the water activity of the saturated solution, at " +
		humidity(roundTo(c.flat.Dissolved, 4)) + " over a flat surface"
	if over := c.phase.Over.Dissolved; over > 0 {
		says += " and at " + humidity(roundTo(over, 4)) + " over this particle"
	}
	switch flat, over := c.flat.Efflorescence, c.phase.Over.Efflorescence; {
	case flat == 0:
		says += "; no crystallisation is seen when it dries"
	case over > 0:
		says += fmt.Sprintf("; when it dries it crystallises at %s over a flat surface and at %s over this particle", humidity(roundTo(flat, 4)), humidity(roundTo(over, 4)))
	}
	for _, p := range c.parts {
		if d := p.Substance.Deliquescence; d.Known() && d.Source != "" {
			says += " (" + d.Source + ")"
		}
	}
	return says + "."
}

// textbookLeavesOut names what the textbook form does not know of this particle.
func (c *curve) textbookLeavesOut() string {
	says := ""
	switch _, limited := c.dissolved.Solution.(*solutes.Limited); {
	case limited:
		says = ", all of it as dissolved"
	case c.dissolved.Film == nil && c.dissolved.Core != nil:
		says = ", nothing as adsorbed"
	}
	if c.dissolved.Film != nil || !c.asked.SurfaceTension.Is("water") || c.particle.TolmanLength != 0 {
		says += ", its surface tension as that of pure water"
	}
	return says
}
