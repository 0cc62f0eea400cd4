package scenario

import (
	"fmt"
	"strings"

	"dropcrest/ui/plain"
)

// mostComponents keeps a file from filling the screen; aerosol models use ten at most.
const mostComponents = 20

// components is the list of what a particle is made of; it implements RowList.
type components struct{ s *Scenario }

func (components) Key() string  { return "component" }
func (components) Says() string { return "composition" }
func (components) Help() string {
	return "What the dry particle is made of: a substance of the catalogue with share=, or one's own matter with kappa=, density=, " +
		"molar-mass=, ions=. Shares are scaled so that they add up to 1."
}

func (l components) Len() int { return len(l.s.Components) }

func (l components) Row(i int) []Input {
	standard := defaultComponent("ammonium sulfate")
	out := make([]Input, 0, len(componentFields))
	for f := range componentFields {
		path := Path(fmt.Sprintf("component[%d].%s", i, componentFields[f].key))
		out = append(out, slot[Component]{&componentFields[f], l.s, &l.s.Components[i], path, &standard})
	}
	return out
}

// Add appends a component that is not there yet.
func (l components) Add() error {
	if l.Len() >= mostComponents {
		return &ValueError{Path: "component", Problem: fmt.Sprintf("there are %d components", l.Len()), Right: fmt.Sprintf("at most %d", mostComponents)}
	}
	there := map[string]bool{}
	for _, c := range l.s.Components {
		there[c.Substance] = true
	}
	for _, name := range l.names() {
		if !there[name] {
			l.s.Components = append(l.s.Components, defaultComponent(name))
			return nil
		}
	}
	l.s.Components = append(l.s.Components, defaultComponent(l.names()[0]))
	return nil
}

// names are the substances that new rows begin with, the most common ones first.
func (l components) names() []string {
	names := []string{"ammonium sulfate", "sodium chloride"}
	for _, x := range l.s.catalogue().All() {
		names = append(names, x.Name)
	}
	return names
}

func (l components) Drop(i int) error {
	switch {
	case i < 0 || i >= l.Len():
		return &ValueError{Path: "component", Problem: fmt.Sprintf("there is no component %d", i+1), Right: fmt.Sprintf("1 to %d", l.Len())}
	case l.Len() == 1:
		return &ValueError{Path: "component", Problem: "the last component cannot be dropped", Right: "another substance in its place"}
	}
	l.s.Components = append(l.s.Components[:i:i], l.s.Components[i+1:]...)
	return nil
}

// Show names the components while they fit into a clause.
func (l components) Show(st Style) string {
	const fits = 46
	text := l.text()
	if len([]rune(text)) > fits {
		text = fmt.Sprintf("%d components", l.Len())
	}
	if st.ASCII {
		return plain.ASCII(text)
	}
	return text
}

func (l components) text() string {
	switch l.Len() {
	case 0:
		return "unnamed matter"
	case 1:
		return l.name(0)
	}
	total := 0.0
	for _, c := range l.s.Components {
		total += c.Share
	}
	var parts []string
	for i, c := range l.s.Components {
		parts = append(parts, fmt.Sprintf("%s %.2f", l.name(i), c.Share/total))
	}
	return strings.Join(parts, ", ")
}

func (l components) name(i int) string {
	if name := l.s.Components[i].Substance; name != "" {
		return name
	}
	return fmt.Sprintf("component %d", i+1)
}

// Lists returns the row lists of the scenario.
func Lists(s *Scenario) []RowList { return []RowList{components{s}} }

// SetRow reads the command-line form of one row, "ammonium sulfate share=0.6",
// as a new row of the list of that key; with fresh it takes the place of the rows
// that are there.
func SetRow(s *Scenario, list, text string, fresh bool) error {
	if list != (components{}).Key() {
		return &ValueError{Path: Path(list), Given: text, Problem: fmt.Sprintf("no list %q", list), Right: "component"}
	}
	next := s.Clone()
	if fresh {
		next.Components = nil
	}
	if len(next.Components) >= mostComponents {
		return &ValueError{Path: "component", Given: text, Problem: "too many components", Right: fmt.Sprintf("at most %d", mostComponents)}
	}
	pairs, err := rowPairs(text)
	if err != nil {
		return err
	}
	next.Components = append(next.Components, defaultComponent(""))
	row := components{&next}.Row(len(next.Components) - 1)
	for _, p := range pairs {
		for _, in := range row {
			if in.Key() != p.key {
				continue
			}
			if err := in.SetWithUnit(p.value); err != nil {
				return inRow(err, p.key)
			}
		}
	}
	*s = next
	return nil
}

func inRow(err error, key string) error {
	if v, ok := err.(*ValueError); ok && key != "substance" {
		v.Problem = key + "=" + v.Given + ": " + v.Problem
	}
	return err
}

type pair struct{ key, value string }

// rowPairs splits a row into its keys and values. Values run to the next known
// key, so that names may have spaces; what stands before the first key is the
// substance.
func rowPairs(text string) ([]pair, error) {
	pairs := []pair{{"substance", ""}}
	for _, word := range strings.Fields(text) {
		key, rest, found := strings.Cut(word, "=")
		if found {
			if !isRowKey(key) {
				return nil, &ValueError{Path: "component", Given: text, Problem: fmt.Sprintf("no key %q", shortened(plain.Clean(key))),
					Right: "substance, share, kappa, density, molar-mass or ions"}
			}
			for _, p := range pairs {
				if p.key == key && (key != "substance" || p.value != "") {
					return nil, &ValueError{Path: "component", Given: text, Problem: key + " stands twice", Right: "one value"}
				}
			}
			pairs = append(pairs, pair{key, rest})
			continue
		}
		last := &pairs[len(pairs)-1]
		last.value = strings.TrimSpace(last.value + " " + word)
	}
	if pairs[0].value == "" {
		pairs = pairs[1:]
	}
	if len(pairs) == 0 {
		return nil, &ValueError{Path: "component", Problem: "no value", Right: "a substance, such as \"ammonium sulfate share=0.6\""}
	}
	return pairs, nil
}

func isRowKey(key string) bool {
	for _, f := range componentFields {
		if f.key == key {
			return true
		}
	}
	return false
}
