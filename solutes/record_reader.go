package solutes

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"strings"
	"unicode"
)

// recordReader reads one record and collects what is wrong with it.
type recordReader struct {
	record string
	source string // for values that name none
	errs   []error
}

func (r *recordReader) fail(field, given, right string) {
	r.errs = append(r.errs, &RecordError{r.record, field, given, right})
}

// recordTable is one table of a record. Keys are taken as they are read; what is
// left is not known.
type recordTable struct {
	*recordReader
	path  string // with a dot at its end, "" at the top
	left  map[string]any
	known []string
}

func (r *recordReader) table(path string, fields map[string]any) *recordTable {
	return &recordTable{recordReader: r, path: path, left: maps.Clone(fields)}
}

// take returns the value of a key, nil if it is not there.
func (t *recordTable) take(key string) any {
	t.known = append(t.known, key)
	value := t.left[key]
	delete(t.left, key)
	return value
}

func (t *recordTable) wrong(key string, value any, right string) {
	t.fail(t.path+key, shown(value), right)
}

// shown is a value for an error, without control characters and not too long.
func shown(value any) string {
	text := fmt.Sprint(value)
	if s, ok := value.(string); ok {
		text = fmt.Sprintf("%q", s)
	}
	if runes := []rune(text); len(runes) > 60 {
		text = string(runes[:57]) + "..."
	}
	return strings.Map(func(r rune) rune {
		if unicode.IsControl(r) {
			return '?'
		}
		return r
	}, text)
}

// longestText is how long a name or remark may be, in runes.
const longestText = 400

func (t *recordTable) asText(key string, value any) string {
	s, ok := value.(string)
	if !ok {
		t.wrong(key, value, "text")
		return ""
	}
	if strings.ContainsFunc(s, unicode.IsControl) || len([]rune(s)) > longestText {
		t.wrong(key, value, fmt.Sprintf("text of at most %d characters without control characters", longestText))
		return ""
	}
	return strings.TrimSpace(s)
}

// text returns a string, "" if it is not there.
func (t *recordTable) text(key string) string {
	value := t.take(key)
	if value == nil {
		return ""
	}
	return t.asText(key, value)
}

func (t *recordTable) texts(key string) []string {
	value := t.take(key)
	if value == nil {
		return nil
	}
	list, ok := value.([]any)
	if !ok {
		t.wrong(key, value, "a list of text")
		return nil
	}
	var out []string
	for i, v := range list {
		at := fmt.Sprintf("%s[%d]", key, i)
		s := t.asText(at, v)
		if fold(s) == "" && key == "aliases" {
			t.wrong(at, v, "a name")
		}
		out = append(out, s)
	}
	return out
}

// asNumber checks kind and range.
func (t *recordTable) asNumber(key string, value any, low, high float64, unit string) (float64, bool) {
	var x float64
	switch v := value.(type) {
	case float64:
		x = v
	case int64:
		x = float64(v)
	case int:
		x = float64(v)
	default:
		t.wrong(key, value, "a number, "+rangeWords(low, high, unit))
		return 0, false
	}
	if !(x >= low && x <= high) || math.IsInf(x, 0) {
		t.wrong(key, value, rangeWords(low, high, unit))
		return 0, false
	}
	return x, true
}

// number returns a number that must be there.
func (t *recordTable) number(key string, low, high float64, unit string) float64 {
	value := t.take(key)
	if value == nil {
		t.fail(t.path+key, "nothing", rangeWords(low, high, unit))
		return 0
	}
	x, _ := t.asNumber(key, value, low, high, unit)
	return x
}

// optional returns a number, 0 if it is not there.
func (t *recordTable) optional(key string, low, high float64, unit string) float64 {
	value := t.take(key)
	if value == nil {
		return 0
	}
	x, _ := t.asNumber(key, value, low, high, unit)
	return x
}

// whole returns a whole number that must be there.
func (t *recordTable) whole(key string, low, high int) int {
	value := t.take(key)
	right := fmt.Sprintf("a whole number from %d to %d", low, high)
	if value == nil {
		t.fail(t.path+key, "nothing", right)
		return low
	}
	x, ok := t.asNumber(key, value, float64(low), float64(high), "")
	if ok && x != math.Trunc(x) {
		t.wrong(key, value, right)
	}
	return int(x)
}

// numbers returns a list of least to most finite numbers, nil if it is not there.
func (t *recordTable) numbers(key string, least, most int) []float64 {
	value := t.take(key)
	if value == nil {
		return nil
	}
	list, ok := value.([]any)
	if !ok || len(list) < least || len(list) > most {
		words := fmt.Sprintf("a list of %d to %d numbers", least, most)
		if least == most {
			words = fmt.Sprintf("a list of %d numbers", most)
		}
		t.wrong(key, value, words)
		return nil
	}
	var out []float64
	for i, v := range list {
		x, _ := t.asNumber(fmt.Sprintf("%s[%d]", key, i), v, math.Inf(-1), math.Inf(1), "")
		out = append(out, x)
	}
	return out
}

// datum returns a value with its source: a number, or a table of value, low, high
// and source; the zero Datum if it is not there.
func (t *recordTable) datum(key string, low, high float64, unit string) Datum {
	value := t.take(key)
	fields, table := value.(map[string]any)
	switch {
	case value == nil:
		return Datum{}
	case !table:
		x, ok := t.asNumber(key, value, low, high, unit)
		if !ok {
			return Datum{}
		}
		return Datum{Value: x, Source: t.source, Evidence: User}
	}
	in := t.table(t.path+key+".", fields)
	d := Datum{
		Value: in.number("value", low, high, unit), Low: in.optional("low", low, high, unit),
		High: in.optional("high", low, high, unit), Source: in.sourceText(), Evidence: User,
	}
	in.finish()
	if d.Low > d.Value {
		in.wrong("low", d.Low, fmt.Sprintf("at most the value %g", d.Value))
	}
	if d.High != 0 && d.High < d.Value {
		in.wrong("high", d.High, fmt.Sprintf("at least the value %g", d.Value))
	}
	return d
}

// sourceText returns the source of a table. The key "evidence" of the embedded
// catalogue is taken too: in a user's record everything is a user's.
func (t *recordTable) sourceText() string {
	t.text("evidence")
	if source := t.text("source"); source != "" {
		return source
	}
	return t.source
}

// sub returns the table of a key, nil if it is not there.
func (t *recordTable) sub(key string) *recordTable {
	value := t.take(key)
	if value == nil {
		return nil
	}
	fields, ok := value.(map[string]any)
	if !ok {
		t.wrong(key, value, "a table")
		return nil
	}
	return t.table(t.path+key+".", fields)
}

// finish fails what is left.
func (t *recordTable) finish() {
	for _, key := range slices.Sorted(maps.Keys(t.left)) {
		best, near := "", len(key)/2+1
		for _, k := range t.known {
			if d := likeness([]rune(fold(key)), []rune(fold(k))); d < near {
				best, near = k, d
			}
		}
		right := "one of " + strings.Join(t.known, ", ")
		if best != "" {
			right = best
		}
		t.fail(t.path+shownKey(key), "not a known key", right)
	}
}

// shownKey is a key for an error: one that needs quotes has them.
func shownKey(key string) string {
	for _, r := range key {
		if !(unicode.IsLetter(r) || unicode.IsDigit(r) || r == '_' || r == '-') {
			return shown(key)
		}
	}
	return key
}
