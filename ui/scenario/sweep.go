package scenario

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"dropcrest/ui/plain"
)

// NumberOfAll is the axis of a sweep that is the number of all particles, which
// no single input is.
const NumberOfAll Path = "number"

// SweepAxis is one of the two quantities that a sweep goes through.
type SweepAxis struct {
	Path Path // of the input, or NumberOfAll
	Says string
	Unit string // that is shown, "" for none
	// Values are in SI, fractions where per cent are shown.
	Values []float64
	// Log says that they are evenly spaced in their logarithm.
	Log bool

	quantity *quantity
}

// mostCells keeps a sweep from filling the memory: a map of 200 by 200.
const mostCells = 40000

// ParseSweep reads the two axes of a sweep, the first one running across. The
// error is a *ValueError that says which part is wrong and where it stands.
func ParseSweep(text string) ([2]SweepAxis, error) {
	var axes [2]SweepAxis
	fail := func(problem, right string) ([2]SweepAxis, error) {
		return axes, &ValueError{Path: "sweep", Given: text, Problem: problem, Right: right}
	}
	const shape = "two of name=from..to:points:log or lin, such as \"updraft=0.05..5m/s:20:log number=100..10000/cm3:20:log\""
	words := strings.Fields(plain.Clean(text))
	if len(words) != len(axes) {
		return fail(fmt.Sprintf("a sweep of %s", count(len(words), "quantity")), shape)
	}
	at := 1
	for i, word := range words {
		at += strings.Index(text[at-1:], word) // a control character ends the search below
		axis, problem, right := parseAxis(word)
		if problem != "" {
			return fail(fmt.Sprintf("%q, from character %d on: %s", shortened(word), at, problem), right)
		}
		axes[i] = axis
		at += len(word)
	}
	switch cells := len(axes[0].Values) * len(axes[1].Values); {
	case axes[0].Path == axes[1].Path:
		return fail("both quantities are "+string(axes[0].Path), "two that differ")
	case cells > mostCells:
		return fail(fmt.Sprintf("%d cells", cells), fmt.Sprintf("at most %d", mostCells))
	}
	return axes, nil
}

// checkSweep says what is wrong with a text, nil when nothing is.
func checkSweep(text string) *ValueError {
	if _, err := ParseSweep(text); err != nil {
		return err.(*ValueError)
	}
	return nil
}

// parseAxis reads "updraft=0.05..5m/s:20:log".
func parseAxis(word string) (a SweepAxis, problem, right string) {
	name, rest, found := strings.Cut(word, "=")
	if !found {
		return a, "no sign = in it", "name=from..to:points:log or lin"
	}
	q, says, ok := sweptQuantity(Path(name))
	if !ok {
		return a, fmt.Sprintf("no quantity %q that can be gone through", shortened(name)), strings.Join(sweptNames(), ", ")
	}
	parts := strings.Split(rest, ":")
	if len(parts) < 2 || len(parts) > 3 {
		return a, "not of the form from..to:points:log", "such as " + name + "=" + compact(q.show(q.start/2)) + ".." + compact(q.show(q.start)) + ":20:log"
	}
	from, to, problem, right := readRange(q, parts[0])
	if problem != "" {
		return a, problem, right
	}
	n, err := strconv.Atoi(parts[1])
	if err != nil || n < 2 || n > 1000 {
		return a, fmt.Sprintf("%q is no number of points", shortened(parts[1])), "2 to 1000"
	}
	a = SweepAxis{Path: Path(name), Says: says, Unit: q.units[0].name(), quantity: q}
	if len(parts) == 3 {
		switch parts[2] {
		case "log":
			a.Log = true
		case "lin":
		default:
			return a, fmt.Sprintf("%q is no spacing", shortened(parts[2])), "log or lin"
		}
	}
	if a.Log && !(from > 0) {
		return a, "logarithmic from 0", "a start above 0, or lin"
	}
	for i := range n {
		a.Values = append(a.Values, between(from, to, float64(i)/float64(n-1), a.Log))
	}
	if q.whole {
		for i := range a.Values {
			a.Values[i] = math.Round(a.Values[i])
		}
	}
	return a, "", ""
}

// between has both ends exactly.
func between(from, to, share float64, log bool) float64 {
	switch {
	case share == 0:
		return from
	case share == 1:
		return to
	case log:
		return from * math.Pow(to/from, share)
	}
	return from + (to-from)*share
}

// readRange reads "0.05..5m/s"; a first number without unit has that of the second.
func readRange(q *quantity, text string) (from, to float64, problem, right string) {
	low, high, found := strings.Cut(text, "..")
	if !found {
		return 0, 0, fmt.Sprintf("%q has no .. in it", shortened(text)), "from..to"
	}
	if n := numberLength(low); n == len(low) && n > 0 {
		low += high[numberLength(high):]
	}
	from, wrong := q.read(low, false)
	if wrong == nil {
		to, wrong = q.read(high, false)
	}
	switch {
	case wrong != nil:
		return 0, 0, wrong.Problem, wrong.Right
	case from == to:
		return 0, 0, "both ends are " + q.show(from), "two that differ"
	}
	return from, to, "", ""
}

// compact writes a shown value in one word.
func compact(text string) string { return strings.ReplaceAll(text, " ", "") }

// sweptQuantity is the quantity of a number that a sweep can go through.
func sweptQuantity(p Path) (q *quantity, says string, ok bool) {
	if p == NumberOfAll {
		return numberConcentration, "number of particles", true
	}
	for _, f := range slices.Concat(particleFields, populationFields, ascentFields) {
		if f.key == string(p) {
			return f.quantity, f.says, f.quantity != nil && !f.several
		}
	}
	list, key, isRow := strings.Cut(string(p), "].")
	name, number, _ := strings.Cut(list, "[")
	if i, err := strconv.Atoi(number); !isRow || name != modeList.key || err != nil || i < 0 || i >= modeList.most {
		return nil, "", false
	}
	for _, f := range modeList.fields {
		if f.key == key {
			return f.quantity, f.says, f.quantity != nil
		}
	}
	return nil, "", false
}

// sweptNames are the names that are most often gone through.
func sweptNames() []string {
	return []string{"updraft", string(NumberOfAll), "kappa", "temperature", "pressure", "start-humidity", "mass-accommodation", "mode[0].Dg"}
}

// Show writes a value of the axis in the unit that is shown.
func (a SweepAxis) Show(x float64) string { return a.quantity.show(x) }

// Shown is the value in that unit.
func (a SweepAxis) Shown(x float64) float64 { return a.quantity.units[0].fromSI(x) }

// Key is that of columns of a table, with the unit of SI: "updraft_m_per_s".
func (a SweepAxis) Key() string { return siKey(string(a.Path), a.quantity) }

// SI is a value as that column has it, in per cent where the key says so.
func (a SweepAxis) SI(x float64) float64 {
	if a.quantity.si == "percent" {
		return 100 * x
	}
	return x
}

// Set gives the scenario a value of the axis, which NumberOfAll has no input for. The
// error is a *ValueError.
func (a SweepAxis) Set(s *Scenario, x float64) error {
	in, ok := Find(s, a.Path)
	if !ok {
		return &ValueError{Path: "sweep", Given: string(a.Path), Problem: "there is no " + string(a.Path), Right: fmt.Sprintf("mode[0] to mode[%d]", len(s.Modes)-1)}
	}
	return in.SetWithUnit(a.quantity.exact(x))
}

// siKey is the key of a quantity in JSON and CSV.
func siKey(key string, q *quantity) string {
	key = strings.ReplaceAll(key, "-", "_")
	if q != nil && q.si != "" {
		key += "_" + q.si
	}
	return key
}
