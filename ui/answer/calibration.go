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

// calibrations are those of a scenario: one that serves all, or two between which it
// is interpolated in time.
type calibrations struct{ first, after *counter.Calibration }

func readCalibrations(env Env, s scenario.Scenario) (c calibrations, err error) {
	if c.first, err = readCalibration(env, "calibration", s.Calibration); err != nil || c.first == nil {
		return c, err
	}
	c.after, err = readCalibration(env, "calibration-after", s.CalibrationAfter)
	return c, err
}

// at is the calibration at a time, in s of the clock of the scans.
func (c calibrations) at(time float64) (*counter.Calibration, error) {
	if c.after == nil {
		return c.first, nil
	}
	between, err := counter.Between(*c.first, *c.after, time)
	return &between, err
}

// readCalibration reads what the Counter question has written as JSON; nil: no
// file is named.
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

// CalibrationEffect is how errors that the calibration of the counter shares with the
// measured particles move κ through both: through the supersaturation and through the
// particles themselves.
type CalibrationEffect struct {
	Uncertainty Number `json:"supersaturation_standard_uncertainty_percent"`
	Sizing      Number `json:"kappa_by_size"`              // d ln κ/d ln D
	Tension     Number `json:"kappa_by_surface_tension"`   // d ln κ/d ln σ
	Temperature Number `json:"kappa_by_temperature_per_k"` // d ln κ/dT of the activation
}

// shared is the effect on the κ that a count implies; nil without a calibration. Only
// the ratio of size and Kelvin length counts, so that κ goes with that length as it
// goes with the inverse of all sizes.
func (m measurement) shared(temperature float64) *CalibrationEffect {
	if m.transfer == (counter.Sensitivity{}) {
		return nil
	}
	unknown := Number(math.NaN())
	e := &CalibrationEffect{percentNumber(m.levelUncertainty), unknown, unknown, unknown}
	if m.noKappa != nil || !(m.kappa.Kappa > 0) {
		return e
	}
	const step = 0.1 // K
	length := func(T float64) float64 { return math.Log(koehler.KelvinLength(atmos.SurfaceTension(T), T)) }
	slope := (length(temperature+step) - length(temperature-step)) / (2 * step)
	k := m.kappa
	e.Sizing = Number(k.ByDiameter + k.BySupersaturation*m.transfer.Dry)
	e.Tension = Number(-k.ByDiameter + k.BySupersaturation*m.transfer.Tension)
	e.Temperature = Number(-k.ByDiameter*slope + k.BySupersaturation*m.transfer.Temperature)
	return e
}

// sharedNotes say what cancels, by the first count with a κ.
func (a *activated) sharedNotes() []atmos.Note {
	for _, m := range a.measured {
		e := m.shared(a.asked.Temperature)
		if e == nil || math.IsNaN(float64(e.Sizing)) {
			continue
		}
		return []atmos.Note{{Code: "calibration-shared", Input: "calibration", Text: fmt.Sprintf(
			"Uncertainties of κ are those of the counts and of the calibration's counts. Errors that the calibration shares with the particles largely cancel and are not counted twice: "+
				"+1 %% of all sizes moves κ at %s %% supersaturation by %+.2f %% and not by %+.2f %%, +1 %% of the surface tension by %+.2f %% and not by %+.2f %%, +1 K by %+.2f %%, "+
				"as far as one classifier sized both.",
			levelWords(m.s), float64(e.Sizing), m.kappa.ByDiameter, float64(e.Tension), -m.kappa.ByDiameter, 100*float64(e.Temperature))}}
	}
	return nil
}
