package substancefile

import (
	"errors"
	"maps"
	"slices"
	"strings"

	"dropcrest/solutes"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// deeper are the units of values that lie in tables of a record.
var deeper = map[string]string{
	"adsorption.a": "", "adsorption.b": "",
	"surface_activity.gamma_max": "mol/m²", "surface_activity.k": "m³/mol", "surface_activity.floor": "N/m",
	"deliquescence_law.low": "K", "deliquescence_law.high": "K",
	"ion.temperature.low": "K", "ion.temperature.high": "K",
}

// units are the SI units of all values that may be text, by their path in a record.
func units() map[string]string {
	out := maps.Clone(deeper)
	for _, f := range solutes.RecordFields() {
		out[f.Key] = f.Unit
		if f.Key == "deliquescence" || f.Key == "efflorescence" {
			out[f.Key] = scenario.Fraction
		}
	}
	return out
}

// unitReader turns the texts with a unit of one record into numbers, and refuses
// texts that could drive a terminal.
type unitReader struct {
	*file
	top  string
	said map[string]bool // fields that were complained of
}

// read changes the record.
func (u *unitReader) read(record map[string]any) {
	for path, unit := range units() {
		in := record
		keys := strings.Split(path, ".")
		for _, key := range keys[:len(keys)-1] {
			in, _ = in[key].(map[string]any)
		}
		u.datum(in, keys[len(keys)-1], path, unit)
	}
	u.clean("", record)
}

// datum reads a single value, or the numbers in its table.
func (u *unitReader) datum(in map[string]any, key, path, unit string) {
	switch value := in[key].(type) {
	case string:
		x, err := scenario.SI(unit, value)
		if err != nil {
			u.complain(path, err)
			return
		}
		in[key] = x
	case map[string]any:
		for _, part := range []string{"value", "low", "high"} {
			if _, text := value[part].(string); text {
				u.datum(value, part, path+"."+part, unit)
			}
		}
	}
}

func (u *unitReader) complain(path string, err error) {
	u.said[path] = true
	var v *scenario.ValueError
	if errors.As(err, &v) {
		v.Problem, v.Right = plain.Clean(v.Problem), plain.Clean(v.Right)
	}
	u.fail(u.top+"."+path, path, err)
}

// clean refuses text that plain.Clean would change.
func (u *unitReader) clean(path string, value any) {
	switch value := value.(type) {
	case string:
		if clean := plain.Clean(value); clean != value && !u.said[path] {
			u.complain(path, &scenario.ValueError{Given: clean, Problem: "the text holds control characters or line breaks", Right: "text on one line"})
		}
	case []any:
		for i, v := range value {
			u.clean(item(path, i), v)
		}
	case map[string]any:
		for _, key := range slices.Sorted(maps.Keys(value)) {
			u.clean(joined(path, key), value[key])
		}
	}
}
