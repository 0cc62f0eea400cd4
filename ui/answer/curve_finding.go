package answer

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// finding is the answer in sentences: the crest, the drop at the humidity looked
// at, and whatever limits both.
func (c *curve) finding(limits []atmos.Note) []string {
	sentences := []string{c.crestSentence(), c.hazeSentence()}
	if c.hasTwin {
		sentences = []string{c.crestSentence(), c.twinSentence(), c.hazeSentence()}
	}
	// The drop's sentence has said it when the humidity is above the crest.
	return findingOf(sentences, limits, func(n atmos.Note) bool { return n.Code != aboveCrest })
}

func (c *curve) crestSentence() string {
	if c.noCrest != nil {
		return fmt.Sprintf("It has no crest: %s.", strings.TrimSuffix(reason(c.noCrest), "."))
	}
	at := percent(c.crest.Supersaturation)
	dry := micrometres(c.particle.DryDiameter / 2)
	switch {
	case c.crest.Kind == koehler.BoundaryMaximum && c.isLimited():
		return fmt.Sprintf("Started dry it activates at %s supersaturation: the barrier is its dissolution at the dry surface of %s radius%s.",
			at, dry, c.placeWords())
	case c.crest.Kind == koehler.BoundaryMaximum:
		return fmt.Sprintf("It must be wetted at %s supersaturation, the Kelvin barrier at its dry radius of %s; from there it grows without another crest.",
			at, dry)
	}
	inside := "water activity " + activity(c.crest.WaterActivity)
	if m := c.molality(); m > 0 { // of a κ without a molar mass it is not known
		inside += ", " + digits(m, 3) + " mol/kg"
	}
	if film, ok := c.particle.Solution.(koehler.AdsorbedWater); ok && c.dissolved.Core.SolubleShare == 0 && c.dissolved.Core.A > 0 {
		inside += ", " + digits(film.Layers(c.crest.Water), 3) + " layers of adsorbed water"
	}
	if c.dissolved.Film != nil {
		inside += ", surface tension " + digits(c.crest.SurfaceTension*1e3, 3) + " mN/m"
	}
	start := "It activates"
	if c.hasTwin {
		start = "Started dry it activates"
	}
	return fmt.Sprintf("%s at %s supersaturation, where its wet radius is %s (%s times the dry radius; %s)%s.",
		start, at, micrometres(c.crest.WetDiameter/2), digits(c.crest.GrowthFactor, 3), inside, c.placeWords())
}

func (c *curve) isLimited() bool {
	_, limited := c.dissolved.Solution.(*solutes.Limited)
	return limited
}

// placeWords say which of several maxima the barrier is, and whether it is crossed
// before all is dissolved.
func (c *curve) placeWords() string {
	says := ""
	if n := len(c.otherMaxima()) + 1; n > 1 {
		says = fmt.Sprintf(", the %s of %s", c.crest.Place, maximaWords(n))
	}
	if mix, ok := c.dissolved.Solution.(*solutes.Limited); ok && c.crest.Kind == koehler.Maximum && mix.SegmentAt(c.crest.Water) < mix.Points() {
		says += ", with part of it undissolved"
	}
	return says
}

// twinSentence is what the particle does once it has been dissolved.
func (c *curve) twinSentence() string {
	if c.isDissolvedAtCrest() {
		return "It has dissolved by then: already dissolved it activates there as well."
	}
	return fmt.Sprintf("Already dissolved it activates at %s, where its wet radius is %s.",
		percent(c.twinCrest.Supersaturation), micrometres(c.twinCrest.WetDiameter/2))
}

// isDissolvedAtCrest reports whether the barrier is the same for a particle that
// started dry and for one that has been dissolved before.
func (c *curve) isDissolvedAtCrest() bool {
	return c.noCrest == nil && math.Abs(c.twinCrest.WetDiameter/c.crest.WetDiameter-1) < 1e-9
}

func (c *curve) hazeSentence() string {
	says := fmt.Sprintf("At %s humidity ", humidity(c.asked.RelativeHumidity))
	switch {
	case c.pastCrest():
		return says + "it has no equilibrium size: it grows to a cloud droplet."
	case errors.Is(c.noHaze, koehler.ErrNoHaze):
		says += "it stays dry"
	case c.noHaze != nil:
		return says + "no size can be given: " + strings.TrimSuffix(reason(c.noHaze), ".") + "."
	}
	for i, h := range c.haze {
		if i > 0 && h.branch != "unstable" && h.branch != "dissolved" {
			says += "; after " + c.otherHistory() + " humidity "
		}
		says += c.hazeWords(h)
	}
	return says + "."
}

// hazeWords say what the particle is in one of its states.
func (c *curve) hazeWords(h hazeState) string {
	radius := micrometres(h.WetDiameter / 2)
	times := digits(c.growth(h.State), 3)
	switch h.branch {
	case "unstable":
		return fmt.Sprintf("; a drop larger than %s would grow on", radius)
	case "dissolved":
		return fmt.Sprintf("; already dissolved it is haze of %s radius (growth factor %s)", radius, times)
	case "dry":
		if over := c.phase.Over.Uptake; c.asked.RelativeHumidity < over {
			return fmt.Sprintf("it is dry and takes up water from %s on (%s over a flat surface)",
				humidity(roundTo(over, 3)), humidity(roundTo(c.flat.Uptake, 3)))
		}
		return "it is dry"
	case "partly_dissolved":
		return "it is partly dissolved, of a size that is not known"
	case "metastable":
		return fmt.Sprintf("it is a supersaturated drop of %s radius (growth factor %s)%s", radius, times, c.dryingWords())
	}
	says := fmt.Sprintf("it is haze of %s radius (growth factor %s)", radius, times)
	if c.isDoubtful && h.branch == "stable" {
		says += " if it is dissolved"
	}
	return says
}

// dryingWords say how far a supersaturated drop can be dried.
func (c *curve) dryingWords() string {
	switch over := c.phase.Over.Efflorescence; {
	case c.flat.Efflorescence == 0:
		return ", which is not seen to crystallise"
	case over > 0:
		return ", down to " + humidity(roundTo(over, 3))
	}
	return ", unless it has crystallised: at which humidity is not known"
}

// otherHistory is the history that was not asked for.
func (c *curve) otherHistory() string {
	if c.asked.HumidityHistory == "falling" {
		return "rising"
	}
	return "falling"
}

// pastCrest reports whether the humidity looked at is at or above the crest.
func (c *curve) pastCrest() bool {
	return c.noCrest == nil && c.asked.RelativeHumidity >= c.crest.SaturationRatio
}

// capital begins a sentence with a capital letter, also one that begins with the
// name of a substance.
func capital(text string) string {
	if text != "" && text[0] >= 'a' && text[0] <= 'z' {
		return strings.ToUpper(text[:1]) + text[1:]
	}
	return text
}

// reason is an error as part of a sentence: without the name of the package it
// comes from.
func reason(err error) string {
	text := err.Error()
	for _, floor := range []string{"koehler: ", "solutes: ", "atmos: "} {
		text = strings.TrimPrefix(text, floor)
	}
	return text
}
