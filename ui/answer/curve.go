package answer

import (
	"context"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

func curveQuestion() Question {
	return Question{
		Key:       "curve",
		Title:     "Curve",
		Says:      "Over which saturation is a droplet grown on this dry particle in equilibrium, and which crest must it cross to become a cloud droplet?",
		Live:      true,
		Statement: curveStatement,
		Ask:       askCurve,
	}
}

// curve is all that is known about one particle before it is put into words,
// lines and tables.
type curve struct {
	asked     scenario.Scenario
	dissolved solutes.Dissolved
	particle  koehler.Particle
	parts     []solutes.Part

	crest    koehler.Crest
	noCrest  error // why there is no crest
	extrema  []koehler.Extremum
	haze     []hazeState
	noHaze   error // why there is no haze size at the humidity looked at
	textbook koehler.Crest
	noCubic  error

	line  []koehler.State // dense, with the extrema, far to both sides
	table []koehler.State // what is printed: Points states over the frame
	notes []atmos.Note
}

// hazeState is the drop at the humidity looked at.
type hazeState struct {
	branch string // "stable" | "unstable"
	koehler.State
}

func askCurve(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	c, err := newCurve(env, s)
	if err != nil {
		return Answer{}, err
	}
	c.solve()
	c.line = c.dense()
	picture := c.figure()
	frame, _ := CurveFrame(s, picture, figure.Frame{}, frameRows)
	c.table = c.sample(frame.XMin/micro, frame.XMax/micro, s.Points)
	limits := c.limits(frame.XMin/micro, frame.XMax/micro)
	c.notes = distinct(append(c.notes, limits...))
	for _, n := range c.notes {
		picture.Notes = append(picture.Notes, n.Text)
	}
	return Answer{
		Finding: c.finding(limits),
		Why:     c.why(),
		Facts:   c.facts(),
		Figures: []figure.Figure{picture},
		Others:  c.others(),
		Tables:  c.tables(),
		Notes:   c.notes,
	}, nil
}

// newCurve makes the particle of a scenario.
func newCurve(env Env, s scenario.Scenario) (*curve, error) {
	c := &curve{asked: s}
	recipe, notes, err := newRecipe(env, s)
	if err != nil {
		return nil, err
	}
	dissolved, more, err := solutes.Dissolve(recipe)
	if err != nil {
		return nil, &InputError{Input: "component", Text: err.Error()}
	}
	c.dissolved = dissolved
	c.parts = recipe.Parts
	c.notes = distinct(slices.Concat(notes, waterNotes(s), more))
	c.particle = koehler.Particle{
		DryDiameter: dryDiameter(s),
		Temperature: s.Temperature,
		Solution:    dissolved.Solution,
		Swelling:    dissolved.Swelling,
		Tension:     dissolved.Tension,
		Kelvin:      kelvinForm(s.Kelvin),
	}
	if !(c.particle.DryDiameter > 0) {
		return nil, &InputError{Input: "dry-diameter", Text: "no volume-equivalent diameter belongs to this mobility diameter and shape factor"}
	}
	return c, nil
}

// dryDiameter is the volume-equivalent dry diameter. A classifier measures at
// laboratory pressure: one standard atmosphere.
func dryDiameter(s scenario.Scenario) float64 {
	if s.DrySizeIs == "mobility" {
		return atmos.VolumeEquivalent(s.DryDiameter, s.ShapeFactor, s.Temperature, atmos.StandardPressure)
	}
	return s.DryDiameter
}

func kelvinForm(word string) koehler.Kelvin {
	switch word {
	case "pure-vapour":
		return koehler.PureVapour
	case "compressible":
		return koehler.Compressible
	}
	return koehler.Standard
}

// solve finds crest, extrema, haze and the textbook crest. What does not exist
// is no error of the question: it is said in words and is null in the facts.
func (c *curve) solve() {
	s := c.particle.Solve(c.asked.RelativeHumidity)
	c.crest, c.noCrest, c.extrema, c.noHaze = s.Crest, s.NoCrest, s.Extrema, s.NoHaze
	c.textbook, c.noCubic = c.particle.Textbook()
	if s.Stable.WetDiameter > 0 {
		c.haze = append(c.haze, hazeState{"stable", s.Stable})
	}
	if s.Unstable.WetDiameter > 0 && !math.IsInf(s.Unstable.WetDiameter, 0) {
		c.haze = append(c.haze, hazeState{"unstable", s.Unstable})
	}
}

// growth is the diameter growth factor of a state.
func (c *curve) growth(s koehler.State) float64 { return s.WetDiameter / c.particle.DryDiameter }

// distinct drops notes that say again what was said.
func distinct(notes []atmos.Note) []atmos.Note {
	var out []atmos.Note
	for _, n := range notes {
		if !slices.Contains(out, n) {
			out = append(out, n)
		}
	}
	return out
}
