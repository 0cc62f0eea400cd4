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

// readCalibration reads what the Counter question has written as JSON; nil: the
// scenario names none.
func readCalibration(env Env, s scenario.Scenario) (*counter.Calibration, error) {
	if s.Calibration == "" {
		return nil, nil
	}
	fail := func(problem string) (*counter.Calibration, error) {
		return nil, &InputError{Input: "calibration", Text: fmt.Sprintf("%s: %s: want a file that dropcrest counter --as json has written", s.Calibration, problem)}
	}
	if env.Open == nil {
		return fail("files cannot be opened here")
	}
	in, err := env.Open(s.Calibration)
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
