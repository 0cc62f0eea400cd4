package atmos

// Note is one thing a reader must know about a result: a formula used beyond
// its range, a value that is not known, a model that was put in another's
// place. Notes travel with the result through every floor and are shown alike
// on the screen, in text, CSV, JSON and figures.
type Note struct {
	Code  string // stable key for scripts, kebab case: "surface-tension-extrapolated"
	Text  string // one plain sentence without a line break
	Input string // option or slot it belongs to, "" when it belongs to the whole answer
}

// Range is a closed interval of one variable, in SI units.
type Range struct {
	Min, Max float64
}

// Contains reports whether x lies inside the range, its ends included. NaN
// lies in no range.
func (r Range) Contains(x float64) bool { return x >= r.Min && x <= r.Max }
