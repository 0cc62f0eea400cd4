package form

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"

	"dropcrest/atmos"
	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// Object is a JSON object that keeps the order of its keys.
type Object []Member

// Member is one key of a JSON object.
type Member struct {
	Key   string
	Value any
}

// MarshalJSON writes the members in their order.
func (o Object) MarshalJSON() ([]byte, error) {
	var b bytes.Buffer
	b.WriteByte('{')
	for i, m := range o {
		if i > 0 {
			b.WriteByte(',')
		}
		key, err := marshal(m.Key)
		if err != nil {
			return nil, err
		}
		value, err := marshal(m.Value)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", m.Key, err)
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
func writeJSON(w io.Writer, q answer.Question, s scenario.Scenario, a answer.Answer, version string) error {
	facts, err := marshal(a.Facts)
	if err != nil {
		return err
	}
	rest, err := marshal(Object{
		{"scenario", scenarioObject(q, &s)},
		{"constants", constantsObject()},
		{"notes", notesList(a.Notes)},
		{"version", version},
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

// Indented writes any value as indented JSON.
func Indented(w io.Writer, v any) error {
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

// scenarioObject is every input that a question looks at in SI units, rows as
// lists of objects.
func scenarioObject(q answer.Question, s *scenario.Scenario) Object {
	var out Object
	for _, in := range q.Inputs(s) {
		if !q.Heeds(*s, in.Path()) {
			continue
		}
		out = append(out, siMember(in))
	}
	for _, l := range q.Lists(s) {
		if !q.Heeds(*s, scenario.Path(l.Key())) {
			continue
		}
		rows := make([]Object, 0, l.Len())
		for i := range l.Len() {
			var row Object
			for _, in := range l.Row(i) {
				row = append(row, siMember(in))
			}
			rows = append(rows, row)
		}
		out = append(out, Member{l.Key(), rows})
	}
	return out
}

func siMember(in scenario.Input) Member {
	key, value := in.SI()
	if x, ok := value.(float64); ok {
		value = answer.Number(x)
	}
	return Member{key, value}
}

func constantsObject() Object {
	var out Object
	for _, c := range atmos.Constants() {
		out = append(out, Member{c.Key, answer.Number(c.Value)})
	}
	return out
}

func notesList(notes []atmos.Note) []Object {
	out := make([]Object, 0, len(notes))
	for _, n := range notes {
		var input any
		if n.Input != "" {
			input = n.Input
		}
		out = append(out, Object{{"code", n.Code}, {"text", n.Text}, {"input", input}})
	}
	return out
}
