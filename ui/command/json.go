package command

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"

	"dropcrest/atmos"
	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// object is a JSON object that keeps the order of its keys.
type object []member

type member struct {
	key   string
	value any
}

// MarshalJSON writes the members in their order.
func (o object) MarshalJSON() ([]byte, error) {
	var b bytes.Buffer
	b.WriteByte('{')
	for i, m := range o {
		if i > 0 {
			b.WriteByte(',')
		}
		key, err := marshal(m.key)
		if err != nil {
			return nil, err
		}
		value, err := marshal(m.value)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", m.key, err)
		}
		b.Write(key)
		b.WriteByte(':')
		b.Write(value)
	}
	b.WriteByte('}')
	return b.Bytes(), nil
}

// marshal is json.Marshal that leaves <, > and & as they are.
func marshal(v any) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	if err := e.Encode(v); err != nil {
		return nil, err
	}
	return bytes.TrimRight(b.Bytes(), "\n"), nil
}

// writeJSON writes facts, scenario, constants, notes and version as one object.
func writeJSON(w io.Writer, s scenario.Scenario, a answer.Answer) error {
	facts, err := marshal(a.Facts)
	if err != nil {
		return err
	}
	rest, err := marshal(object{
		{"scenario", scenarioObject(&s)},
		{"constants", constantsObject()},
		{"notes", notesList(a.Notes)},
		{"version", version()},
	})
	if err != nil {
		return err
	}
	if len(facts) < 2 || facts[len(facts)-1] != '}' {
		return fmt.Errorf("the facts of this answer are no JSON object")
	}
	whole := facts[:len(facts)-1]
	if len(whole) > 1 {
		whole = append(whole, ',')
	}
	return indent(w, append(whole, rest[1:]...))
}

func writeIndented(w io.Writer, v any) error {
	text, err := marshal(v)
	if err != nil {
		return err
	}
	return indent(w, text)
}

func indent(w io.Writer, text []byte) error {
	var b bytes.Buffer
	if err := json.Indent(&b, text, "", "  "); err != nil {
		return err
	}
	b.WriteByte('\n')
	_, err := w.Write(b.Bytes())
	return err
}

// scenarioObject is every input in SI units, rows as lists of objects.
func scenarioObject(s *scenario.Scenario) object {
	var out object
	for _, in := range scenario.Inputs(s) {
		if string(in.Path()) == in.Key() {
			out = append(out, siMember(in))
		}
	}
	for _, l := range scenario.Lists(s) {
		rows := make([]object, 0, l.Len())
		for i := range l.Len() {
			var row object
			for _, in := range l.Row(i) {
				row = append(row, siMember(in))
			}
			rows = append(rows, row)
		}
		out = append(out, member{l.Key(), rows})
	}
	return out
}

func siMember(in scenario.Input) member {
	key, value := in.SI()
	if x, ok := value.(float64); ok {
		value = answer.Number(x)
	}
	return member{key, value}
}

func constantsObject() object {
	var out object
	for _, c := range atmos.Constants() {
		out = append(out, member{c.Key, answer.Number(c.Value)})
	}
	return out
}

func notesList(notes []atmos.Note) []object {
	out := make([]object, 0, len(notes))
	for _, n := range notes {
		var input any
		if n.Input != "" {
			input = n.Input
		}
		out = append(out, object{{"code", n.Code}, {"text", n.Text}, {"input", input}})
	}
	return out
}
