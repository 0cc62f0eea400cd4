package answer

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/koehler/counter"
	"dropcrest/ui/scenario"
)

// largestCalibration is far more than any calibration.
const largestCalibration = 8 << 20

// calibrations are the calibration of a counter, or two of them between which its
// line is interpolated in time.
type calibrations struct {
	first  *counter.Calibration
	second *counter.Calibration // nil: one
}

// readCalibrations reads what a scenario names; nil: it names none.
func readCalibrations(env Env, s scenario.Scenario) (*calibrations, error) {
	var c calibrations
	var err error
	if c.first, err = readCalibration(env, "calibration", s.Calibration); err != nil {
		return nil, err
	}
	if c.second, err = readCalibration(env, "second-calibration", s.SecondCalibration); err != nil {
		return nil, err
	}
	switch {
	case c.first == nil && c.second == nil:
		return nil, nil
	case c.first == nil:
		return &calibrations{first: c.second}, nil
	case c.second == nil:
		return &c, nil
	}
	if c.first.Time > c.second.Time {
		c.first, c.second = c.second, c.first
	}
	if _, err := counter.Between(*c.first, *c.second, c.first.Time); err != nil {
		return nil, &InputError{Input: "second-calibration", Text: fmt.Sprintf("there is nothing between %s and %s: %s", s.Calibration, s.SecondCalibration, reason(err))}
	}
	return &c, nil
}

// readCalibration reads what the Counter question has written as JSON; nil without a
// name.
func readCalibration(env Env, input, name string) (*counter.Calibration, error) {
	if name == "" {
		return nil, nil
	}
	fail := func(problem string) (*counter.Calibration, error) {
		return nil, &InputError{Input: input, Text: fmt.Sprintf("%s: %s: want a file that dropcrest counter --as json has written", name, problem)}
	}
	if env.Open == nil {
		return fail("files cannot be opened here")
	}
	in, err := env.Open(name)
	if err != nil {
		return nil, err
	}
	defer in.Close()
	text, err := io.ReadAll(io.LimitReader(in, largestCalibration+1))
	if err != nil {
		return nil, err
	}
	if len(text) > largestCalibration {
		return fail("larger than 8 MiB")
	}
	var file struct {
		Calibration *counter.Calibration `json:"calibration_file"`
	}
	if err := json.Unmarshal(text, &file); err != nil {
		var syntax *json.SyntaxError
		if errors.As(err, &syntax) {
			line, column := placeOf(text, syntax.Offset)
			return fail(fmt.Sprintf("line %d, column %d: no JSON", line, column))
		}
		return fail("no calibration")
	}
	switch {
	case file.Calibration == nil:
		return fail("no key calibration_file")
	case file.Calibration.Line == nil:
		return fail("the calibration has no line: " + file.Calibration.LineFault)
	}
	return file.Calibration, nil
}

// placeOf is line and column, from 1, of a byte of a text.
func placeOf(text []byte, offset int64) (line, column int) {
	line, column = 1, 1
	for _, b := range text[:min(int(offset), len(text))] {
		if column++; b == '\n' {
			line, column = line+1, 1
		}
	}
	return line, column
}

// betweenNote says that a line was interpolated.
var betweenNote = atmos.Note{Code: "calibration-interpolated", Input: "second-calibration", Text: "The line of the counter is interpolated in time between its two calibrations; " +
	"between them it may drift back and forth, which is in its uncertainty."}

// apply is the supersaturation of a set temperature difference by the calibration at
// that time (s), carried to the pressure and the flow of the measurement; 0 stands for
// not known.
func (c *calibrations) apply(difference, time float64, at counter.Site) (counter.Applied, error) {
	if c.second == nil {
		return c.first.Apply(difference, at)
	}
	now, err := counter.Between(*c.first, *c.second, time)
	if err != nil {
		return counter.Applied{}, err
	}
	applied, err := now.Apply(difference, at)
	applied.Notes = append(applied.Notes, betweenNote)
	for _, n := range now.Notes {
		if n.Code == "outside-calibrations" {
			n.Input = "second-calibration"
			applied.Notes = append(applied.Notes, n)
		}
	}
	return applied, err
}

// inherited is what a supersaturation has from a calibration; the zero value is
// nothing.
type inherited struct {
	uncertainty float64 // standard, relative, by the counts of the calibration
	by          counter.Sensitivity
}

// CalibrationEffect is how errors that the calibration of the counter and the
// measured particles have in common move κ: by both, so that they are not counted
// twice.
type CalibrationEffect struct {
	Uncertainty Number `json:"supersaturation_standard_uncertainty_percent"`
	Sizing      Number `json:"kappa_by_size"`              // d ln κ/d ln D
	Tension     Number `json:"kappa_by_surface_tension"`   // d ln κ/d ln σ
	Temperature Number `json:"kappa_by_temperature_per_k"` // d ln κ/dT of the activation
}

// shared is the effect on the κ that a count implies; nil without a calibration. In
// the Kelvin length alone κ goes with the cube of its tension, as with the inverse
// cube of all sizes.
func (m measurement) shared(temperature float64) *CalibrationEffect {
	if m.inherits == (inherited{}) {
		return nil
	}
	e := &CalibrationEffect{Uncertainty: percentNumber(m.s * m.inherits.uncertainty), Sizing: Number(math.NaN()), Tension: Number(math.NaN()), Temperature: Number(math.NaN())}
	if m.noKappa == nil && m.kappa.ByDiameter != 0 {
		k, by := m.kappa, m.inherits.by
		kelvin := -k.ByDiameter // d ln κ/d ln A: only D/A counts
		const step = 0.1        // K
		length := func(T float64) float64 { return math.Log(koehler.KelvinLength(atmos.SurfaceTension(T), T)) }
		slope := (length(temperature+step) - length(temperature-step)) / (2 * step)
		e.Sizing = Number(k.ByDiameter + k.BySupersaturation*by.Dry)
		e.Tension = Number(kelvin + k.BySupersaturation*by.Tension)
		e.Temperature = Number(kelvin*slope + k.BySupersaturation*by.Temperature)
	}
	return e
}

// sharedNote says what cancels, by the first count with a κ.
func (a *activated) sharedNote() (atmos.Note, bool) {
	for _, m := range a.measured {
		e := m.shared(a.asked.Temperature)
		if e == nil || math.IsNaN(float64(e.Sizing)) {
			continue
		}
		return atmos.Note{Code: "calibration-shared", Input: "calibration", Text: fmt.Sprintf(
			"Uncertainties of κ are those of the counts and of the calibration's counts. Errors that the calibration shares with the particles largely cancel and are not counted twice: "+
				"+1 %% of all sizes moves κ at %s %% by %+.2f %% and not by %+.2f %%, +1 %% of the surface tension by %+.2f %% and not by %+.2f %%, +1 K by %+.2f %%, "+
				"as far as both were sized by the same classifier.",
			digits(100*m.s, 4), float64(e.Sizing), m.kappa.ByDiameter, float64(e.Tension), -m.kappa.ByDiameter, 100*float64(e.Temperature))}, true
	}
	return atmos.Note{}, false
}
