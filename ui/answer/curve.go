package answer

import (
	"context"
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
		Groups:    curveGroups,
		Frame:     CurveFrame,
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

	twin      koehler.Particle // all that can dissolve is dissolved already
	twinCrest koehler.Crest
	hasTwin   bool

	flat       solutes.Phases // humidities over a flat surface; NaN: not known
	phase      koehler.Hysteresis
	hasPhase   bool
	isDoubtful bool // whether the drop has dissolved is not known

	line  []koehler.State // dense, with the extrema, far to both sides
	table []koehler.State // what is printed: Points states over the frame
	notes []atmos.Note
}

// hazeState is the drop at the humidity looked at.
type hazeState struct {
	branch string // stable | unstable | metastable | dry | partly_dissolved | dissolved
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
