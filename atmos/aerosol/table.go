package aerosol

import (
	"math"
	"sort"
)

// Table is something given at some diameters, linear in ln D between them and held
// at its ends: a Response, a κ of package spectrum.
type Table struct {
	ln, values []float64
}

// NewTable makes the table of values, finite and 0 or more, at the diameters (m),
// which ascend.
func NewTable(diameters, values []float64) (*Table, error) {
	if len(diameters) == 0 || len(diameters) != len(values) {
		return nil, &InputError{"number of values", -1, float64(len(values)), "one a diameter, and one or more"}
	}
	if err := CheckDiameters("diameter", diameters); err != nil {
		return nil, err
	}
	t := &Table{values: append([]float64(nil), values...)}
	for i, d := range diameters {
		if !(values[i] >= 0) || math.IsInf(values[i], 1) {
			return nil, &InputError{"value", i, values[i], "0 or more"}
		}
		t.ln = append(t.ln, math.Log(d))
	}
	return t, nil
}

// At returns the value at d (m).
func (t *Table) At(d float64) float64 { return t.AtLn(math.Log(d)) }

// AtLn returns the value at ln D = x, D in m.
func (t *Table) AtLn(x float64) float64 {
	i := sort.SearchFloat64s(t.ln, x)
	switch {
	case i == 0:
		return t.values[0]
	case i == len(t.ln):
		return t.values[i-1]
	}
	w := (x - t.ln[i-1]) / (t.ln[i] - t.ln[i-1])
	return t.values[i-1] + w*(t.values[i]-t.values[i-1])
}

// Ln returns ln D of the given diameters. They are not to be changed.
func (t *Table) Ln() []float64 { return t.ln }
