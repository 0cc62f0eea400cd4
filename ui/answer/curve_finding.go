package answer

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// finding is the answer in sentences: the crest, the drop at the humidity looked
// at, and whatever limits both.
func (c *curve) finding(limits []atmos.Note) []string {
	out := []string{c.crestSentence(), c.hazeSentence()}
	if len(limits) > 0 {
		out = append(out, limits[0].Text)
	}
	return out
}

func (c *curve) crestSentence() string {
	if c.noCrest != nil {
		return fmt.Sprintf("It has no crest: %s.", strings.TrimSuffix(reason(c.noCrest), "."))
	}
	at := percent(c.crest.Supersaturation)
	if c.crest.Kind == koehler.BoundaryMaximum {
		return fmt.Sprintf("It must be wetted at %s supersaturation, the Kelvin barrier at its dry radius of %s; from there it grows without another crest.",
			at, micrometres(c.particle.DryDiameter/2))
	}
	inside := "water activity " + activity(c.crest.WaterActivity)
	if m := c.molality(); !math.IsNaN(m) {
		inside += ", " + digits(m, 3) + " mol/kg"
	}
	return fmt.Sprintf("It crosses at %s supersaturation, where its wet radius is %s (%s times the dry radius; %s).",
		at, micrometres(c.crest.WetDiameter/2), digits(c.crest.GrowthFactor, 3), inside)
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
	for _, h := range c.haze {
		if h.branch == "stable" {
			says += fmt.Sprintf("it is haze of %s radius", micrometres(h.WetDiameter/2))
			continue
		}
		says += fmt.Sprintf("; a drop larger than %s would grow on", micrometres(h.WetDiameter/2))
	}
	return says + "."
}

// pastCrest reports whether the humidity looked at is at or above the crest.
func (c *curve) pastCrest() bool {
	return c.noCrest == nil && c.asked.RelativeHumidity >= c.crest.SaturationRatio
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
