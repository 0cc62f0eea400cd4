package answer

import (
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
	at := humidity(c.asked.RelativeHumidity)
	if c.noHaze != nil || len(c.haze) == 0 {
		if c.pastCrest() {
			return fmt.Sprintf("At %s humidity it has no equilibrium size: it grows to a cloud droplet.", at)
		}
		if c.noHaze != nil {
			return fmt.Sprintf("At %s humidity no size can be given: %s.", at, strings.TrimSuffix(reason(c.noHaze), "."))
		}
		return fmt.Sprintf("At %s humidity it stays dry.", at)
	}
	says := fmt.Sprintf("At %s humidity it is haze of %s radius", at, micrometres(c.haze[0].WetDiameter/2))
	if c.haze[0].branch == "unstable" {
		says = fmt.Sprintf("At %s humidity a drop of %s radius is in unstable balance", at, micrometres(c.haze[0].WetDiameter/2))
	}
	if len(c.haze) > 1 {
		says += fmt.Sprintf("; a drop of more than %s would grow on", micrometres(c.haze[1].WetDiameter/2))
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
