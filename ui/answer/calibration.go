package answer

import (
	"encoding/json"
	"errors"
	"fmt"
	"io"

	"dropcrest/atmos"
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

// recalibrated is the supersaturation of a set temperature difference by a
// calibration, with its standard uncertainty (fractions), carried to the pressure
// and the flow of the measurement; 0 stands for not known.
func recalibrated(c *counter.Calibration, difference, pressure, flow float64) (s, uncertainty float64, notes []atmos.Note, err error) {
	applied, err := c.Apply(difference, counter.Site{Pressure: pressure, Flow: flow})
	return applied.Supersaturation, applied.Uncertainty, applied.Notes, err
}
