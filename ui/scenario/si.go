package scenario

import (
	"fmt"
	"math"
)

// Fraction is the unit of SI for humidities: a number from 0 to 1, as text in per
// cent.
const Fraction = "fraction"

// siQuantities are the quantities that SI reads, by their SI unit.
var siQuantities = map[string]*quantity{
	"kg/mol": {says: "molar mass", units: molarMass.units, start: 0.15},
	"kg/m³":  {says: "density", units: massDensity.units, start: 1400},
	"N/m":    {says: "surface tension", units: tension.units, start: 0.036},
	"mol/m²": {says: "amount a surface", units: filmExcess.units, start: 3e-6},
	"m³/mol": {says: "volume an amount", units: filmAffinity.units, start: 20},
	"K":      {says: "temperature", units: airTemperature.units, start: 298.15},
	Fraction: {says: "humidity", units: humidity.units, start: 0.8},
	"":       {says: "number", units: []unit{bare}, start: 0.5},
}

// SI reads a text such as "1.4 g/cm3" as a number of that SI unit: "kg/mol",
// "kg/m³", "N/m", "mol/m²", "m³/mol", "K", Fraction, or "" for a bare number. The
// error is a *ValueError; ranges are left to whoever asks. Of any other unit the
// number can only be given as a number.
func SI(unit, text string) (float64, error) {
	known, ok := siQuantities[unit]
	if !ok {
		return 0, &ValueError{Given: text, Problem: fmt.Sprintf("%q is text", shortened(text)), Right: "a number in " + unit}
	}
	q := *known
	q.min, q.max = math.Inf(-1), math.Inf(1)
	x, problem := q.read(text, false)
	switch {
	case problem == nil:
		return x, nil
	case unit == "":
		problem.Right = "a number"
	case unit == Fraction:
		problem.Right = "per cent, such as " + q.show(q.start) + ", or a number from 0 to 1 without quotes"
	default:
		problem.Right = fmt.Sprintf("a unit, such as %s, or a number in %s without quotes", q.show(q.start), unit)
	}
	return 0, problem
}
