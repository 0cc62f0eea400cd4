package answer

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/ui/scenario"
)

const (
	// aboveCrest is the code of the note that there is no haze size.
	aboveCrest = "humidity-above-crest"
	// fewMolecules is the number of water molecules below which bulk properties
	// are doubted: a drop of 2 nm radius. Common practice.
	fewMolecules = 1000.0
	// freezing is the temperature (K), -38 °C, below which cloud drops freeze
	// homogeneously. From memory.
	freezing = 235.15
)

// molecules is how many molecules of water the drop has at its crest; endless
// when there is no crest in solution.
func (c *curve) molecules() float64 {
	if c.noCrest != nil || !(c.crest.Water > 0) {
		return math.Inf(1)
	}
	dry := math.Pi / 6 * math.Pow(c.particle.DryDiameter, 3)
	return c.crest.Water * dry * c.dissolved.WaterDensity / atmos.WaterMolarMass * atmos.Avogadro
}

// worthSaying is the growth, relative to the dry size, below which nobody looks at
// the curve: a film of the first layer of water on dust.
const worthSaying = 0.01

// limits are the notes that say in words what limits the crest and the haze
// size, the most important first. from and to are the ends of the wet radius
// shown (m).
func (c *curve) limits(from, to float64) []atmos.Note {
	var notes []atmos.Note
	add := func(code, input, format string, values ...any) {
		notes = append(notes, atmos.Note{Code: code, Input: input, Text: fmt.Sprintf(format, values...)})
	}
	dry := c.particle.DryDiameter / 2
	if to <= dry {
		add("frame-below-particle", "to-radius", "No drop is as small as the wet radii asked for, up to %s: the dry particle has %s.",
			micrometres(to), micrometres(dry))
	}
	if c.noCrest == nil && c.crest.Kind == koehler.BoundaryMaximum && !c.hasTwin {
		add("barrier-at-dry-size", "component", "There is no crest in solution: what must be overcome is the curvature of the dry particle, taken as wettable.")
	}
	if c.noCrest == nil && c.crest.Kind != koehler.BoundaryMaximum && c.crest.Extrapolated {
		add("crest-outside-model", "water-activity", "The crest lies where the water activity model is outside its range: it is extrapolated.")
	}
	if c.particle.Giant() && c.noCrest == nil && c.crest.Slow() {
		add("giant-nucleus", "dry-diameter", "This is a giant nucleus: growth to its crest at %s takes many minutes, the longer the larger it is, so kinetics decide and not equilibrium.", micrometres(c.crest.WetDiameter/2))
	}
	if n := c.molecules(); n < fewMolecules {
		add("few-molecules", "dry-diameter", "The drop at its crest has about %s molecules of water: whether so few have the surface tension and the activity of bulk water is not known.", digits(n, 2))
	}
	if c.asked.Temperature < freezing {
		add("freezes-by-itself", "temperature", "At %s dilute drops freeze without an ice nucleus: the curve is that of a drop that is still liquid.", celsius(c.asked.Temperature))
	}
	if c.pastCrest() {
		add(aboveCrest, "relative-humidity", "The humidity looked at, %s, is not below the crest at %s: there is no haze size.",
			humidity(c.asked.RelativeHumidity), percent(c.crest.Supersaturation))
	}
	least := c.dissolved.Solution.LeastWater()
	for _, h := range c.haze {
		if h.Water < least && (h.branch == "stable" || h.branch == "metastable") {
			add("haze-outside-model", "water-activity", "The haze size lies where the water activity model is outside its range: it is extrapolated.")
		}
	}
	notes = append(notes, c.ranges()...)
	if least > 0 && c.noCrest == nil {
		if edge := c.particle.AtWater(least).WetDiameter / 2; edge > from*(1+1e-6) && edge > dry*(1+worthSaying) {
			add("curve-outside-model", "water-activity", "Below a wet radius of %s the water activity model is outside its range: the curve is extrapolated there.", micrometres(edge))
		}
	}
	for _, n := range c.notes {
		if strings.HasSuffix(n.Code, "-extrapolated") {
			notes = append(notes, n)
		}
	}
	return notes
}

// waterNotes are what must be said of the properties of water that the question
// uses at its temperature.
func waterNotes(s scenario.Scenario) []atmos.Note {
	notes := atmos.WaterNotes(s.Temperature)
	if s.Kelvin == "compressible" {
		notes = append(notes, atmos.NotesOf("compressibility", s.Temperature)...)
	}
	return slices.DeleteFunc(notes, func(n atmos.Note) bool {
		switch n.Code {
		case "vapour-pressure-extrapolated":
			return s.Kelvin != "pure-vapour" // S needs no vapour pressure otherwise
		case "surface-tension-extrapolated":
			return s.SurfaceTension.Word == "" // given
		}
		return false
	})
}

// ranges are what the models of the solution have to say at the crest and at the
// humidity looked at. That the water activity is extrapolated is said already.
func (c *curve) ranges() []atmos.Note {
	var notes []atmos.Note
	at := func(s koehler.State) {
		if !(s.Water > 0) {
			return
		}
		for _, n := range c.dissolved.RangeNotes(s.Water) {
			if n.Code != "activity-outside-range" {
				notes = append(notes, n)
			}
		}
	}
	if c.noCrest == nil {
		at(c.crest.State)
	}
	for _, h := range c.haze {
		at(h.State)
	}
	return distinct(notes)
}
