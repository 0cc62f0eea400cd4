package ledger

import (
	"fmt"
	"math"

	"dropcrest/koehler"
)

// Deviation is what each input is off by, in its unit.
type Deviation [quantities]float64

// Model is an answer as it follows its inputs. It must be safe for concurrent use.
type Model func(*Deviation) Values

// Propagate is NewBudget for an answer of any kind, such as a count: value is the
// answer itself, whose outcomes are what the caller takes them for (NaN: none).
// step is that of the central differences in standard uncertainties; 0 takes one
// that is small beside the value, for models that are good to rounding. An error
// wraps koehler.ErrInput.
func Propagate(value Values, inputs []Input, model Model, step float64) (Budget, error) {
	if err := check(inputs); err != nil {
		return Budget{}, err
	}
	if !(step >= 0) || math.IsInf(step, 1) {
		return Budget{}, &koehler.RangeError{What: "step of the differences", Value: step, Right: "0 or more"}
	}
	return propagate(value, inputs, model, step), nil
}

func propagate(value Values, inputs []Input, model Model, step float64) Budget {
	b := Budget{Answer: Answer{Values: value}, model: model, inputs: inputs, FixedTension: none()}
	for _, in := range inputs {
		c := Contribution{Input: in, Sensitivity: model.slope(in, step)}
		for o := range c.Percent {
			c.Percent[o] = 100 * c.Sensitivity[o] * in.StandardUncertainty
			b.Combined[o] = math.Hypot(b.Combined[o], c.Percent[o])
		}
		b.Contributions = append(b.Contributions, c)
	}
	for i := range b.Contributions {
		c := &b.Contributions[i]
		for o, p := range c.Percent {
			if c.Share[o] = 0; b.Combined[o] != 0 {
				c.Share[o] = p * p / (b.Combined[o] * b.Combined[o])
			}
		}
	}
	return b
}

func check(inputs []Input) error {
	seen := [quantities]bool{}
	for _, in := range inputs {
		switch {
		case in.Quantity < 0 || in.Quantity >= quantities || seen[in.Quantity]:
			return fmt.Errorf("%w: input %d is none of a ledger, or is there twice", koehler.ErrInput, int(in.Quantity))
		case !(in.StandardUncertainty >= 0) || math.IsInf(in.StandardUncertainty, 1):
			return &koehler.RangeError{What: "standard uncertainty of the " + in.String(), Value: in.StandardUncertainty, Right: "0 or more"}
		case !(in.Value > 0):
			return &koehler.RangeError{What: in.String(), Value: in.Value, Right: "above 0"}
		}
		seen[in.Quantity] = true
	}
	return nil
}

// Steps of the central differences: large beside the rounding of the crests, and
// their squares small beside the digits that a budget has.
const (
	relativeStep    = 1e-3
	temperatureStep = 0.05 // K
)

// slope is ∂ ln y/∂x by central differences.
func (m Model) slope(in Input, step float64) Values {
	h := step * in.StandardUncertainty
	switch {
	case h > 0:
	case in.Quantity == Temperature:
		h = temperatureStep
	default:
		h = relativeStep * in.Value
	}
	var up, down Deviation
	up[in.Quantity], down[in.Quantity] = h, -h
	above, below := m(&up), m(&down)
	var s Values
	for o := range s {
		s[o] = math.Log(above[o]/below[o]) / (2 * h)
	}
	return s
}
