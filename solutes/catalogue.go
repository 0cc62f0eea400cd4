package solutes

import (
	"bytes"
	_ "embed"
	"encoding/json"
	"fmt"
	"slices"
	"sort"
	"strings"
	"sync"
)

//go:embed catalogue.json
var catalogueJSON []byte

// Catalogue is an immutable list of substances.
type Catalogue struct {
	substances []Substance
	byName     map[string]int // folded key, name, formula and aliases
}

var standard = sync.OnceValue(func() *Catalogue {
	c, err := parseCatalogue(catalogueJSON)
	if err != nil {
		panic("solutes: embedded catalogue: " + err.Error())
	}
	return c
})

// Standard returns the embedded catalogue. It is read once and shared.
func Standard() *Catalogue { return standard() }

// NewCatalogue makes a catalogue of substances. It is a *RecordError if two of them
// share a key, name, formula or alias, or if one has no key.
func NewCatalogue(substances []Substance) (*Catalogue, error) {
	c := &Catalogue{substances: slices.Clone(substances), byName: map[string]int{}}
	for i, s := range c.substances {
		if fold(s.Key) == "" {
			return nil, &RecordError{s.called(), "key", fmt.Sprintf("%q", s.Key), "a word of letters or digits"}
		}
		for n, name := range s.names() {
			f := fold(name)
			if f == "" {
				continue // a substance may have no name
			}
			if j, taken := c.byName[f]; taken && j != i {
				return nil, &RecordError{s.called(), s.nameField(n), fmt.Sprintf("%q", name),
					"a name that does not stand for " + c.substances[j].called() + " already"}
			}
			c.byName[f] = i
		}
	}
	return c, nil
}

func parseCatalogue(text []byte) (*Catalogue, error) {
	var list []Substance
	d := json.NewDecoder(bytes.NewReader(text))
	d.DisallowUnknownFields()
	if err := d.Decode(&list); err != nil {
		return nil, err
	}
	return NewCatalogue(list)
}

// All returns the substances in catalogue order; the slice is the caller's.
// What its entries point to is shared and must not be changed.
func (c *Catalogue) All() []Substance { return slices.Clone(c.substances) }

// Find returns the substance of that key, name, formula or alias; case, blanks,
// '_' and '-' do not count, and "sulphate" is "sulfate".
func (c *Catalogue) Find(name string) (Substance, bool) {
	i, ok := c.byName[fold(name)]
	if !ok {
		return Substance{}, false
	}
	return c.substances[i], true
}

// Near returns at most n names of substances that look like the one that was
// not found, best first. A name counts when fewer than about half of its letters
// would have to change, or when it holds the whole of what was asked.
func (c *Catalogue) Near(name string, n int) []string {
	type hit struct {
		name     string
		distance int
	}
	want := []rune(fold(name))
	if len(want) == 0 || n <= 0 {
		return nil
	}
	var hits []hit
	for _, s := range c.substances {
		best := len(want) + 1
		for _, known := range s.names() {
			best = min(best, likeness(want, []rune(fold(known))))
		}
		if best <= max(1, len(want)*2/5) {
			hits = append(hits, hit{s.Name, best})
		}
	}
	sort.SliceStable(hits, func(i, j int) bool { return hits[i].distance < hits[j].distance })
	var names []string
	for _, h := range hits[:min(n, len(hits))] {
		names = append(names, h.name)
	}
	return names
}

func (s Substance) names() []string {
	names := []string{s.Key, s.Name}
	if s.Formula != "" {
		names = append(names, s.Formula)
	}
	return append(names, s.Aliases...)
}

// nameField is the field that the name number n of names comes from.
func (s Substance) nameField(n int) string {
	switch {
	case n == 0:
		return "key"
	case n == 1:
		return "name"
	case n == 2 && s.Formula != "":
		return "formula"
	}
	return fmt.Sprintf("aliases[%d]", n-(len(s.names())-len(s.Aliases)))
}

// fold brings names that mean the same to one spelling.
func fold(name string) string {
	name = strings.Map(func(r rune) rune {
		switch r {
		case ' ', '\t', '_', '-':
			return -1
		}
		return r
	}, strings.ToLower(name))
	return strings.ReplaceAll(name, "sulph", "sulf")
}

// likeness is the edit distance, or 1 when b holds the whole of a.
func likeness(a, b []rune) int {
	d := editDistance(a, b)
	if len(a) >= 3 && strings.Contains(string(b), string(a)) {
		return min(d, 1)
	}
	return d
}

// editDistance is the number of letters to insert, drop or change to make b of a
// (Levenshtein 1966).
func editDistance(a, b []rune) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i, x := range a {
		diagonal := row[0]
		row[0] = i + 1
		for j, y := range b {
			cost := diagonal
			if x != y {
				cost = 1 + min(diagonal, row[j], row[j+1])
			}
			diagonal, row[j+1] = row[j+1], cost
		}
	}
	return row[len(b)]
}
