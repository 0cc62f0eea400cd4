package scenario

import (
	"fmt"
	"slices"
	"strings"

	"dropcrest/ui/near"
	"dropcrest/ui/plain"
)

// list declares rows of a record R in a scenario: the components of a particle,
// for example. Row list, option, file table and error text are made of it.
type list[R any] struct {
	key, says, help string

	rows        func(*Scenario) *[]R
	fields      []field[R]
	standard    func() R               // a row with its defaults
	blank       func() R               // a row before option or file fill it; nil: standard
	another     func(*Scenario) R      // the row that Add appends; nil: standard
	required    []string               // fields that a file or an option must give
	least, most int                    // rows
	first       string                 // field of the words before the first key of a row
	raw         bool                   // a row is one text, whatever signs it has
	show        func(*Scenario) string // all rows in a few words
}

// rowsOf is a list of one scenario; it implements RowList and the reading and
// writing of its rows.
type rowsOf[R any] struct {
	*list[R]
	s *Scenario
}

func (l rowsOf[R]) Key() string  { return l.key }
func (l rowsOf[R]) Says() string { return l.says }
func (l rowsOf[R]) Help() string { return l.help }
func (l rowsOf[R]) Len() int     { return len(*l.rows(l.s)) }

func (l rowsOf[R]) Row(i int) []Input {
	standard := l.standard()
	out := make([]Input, 0, len(l.fields))
	for f := range l.fields {
		path := Path(fmt.Sprintf("%s[%d].%s", l.key, i, l.fields[f].key))
		out = append(out, slot[R]{&l.fields[f], l.s, &(*l.rows(l.s))[i], path, &standard})
	}
	return out
}

func (l rowsOf[R]) Add() error {
	if err := l.room(); err != nil {
		return err
	}
	rows := l.rows(l.s)
	row := l.standard()
	if l.another != nil {
		row = l.another(l.s)
	}
	*rows = append(slices.Clone(*rows), row)
	return nil
}

// room says that no row more can be had.
func (l rowsOf[R]) room() error {
	if l.Len() < l.most {
		return nil
	}
	return &ValueError{Path: Path(l.key), Problem: fmt.Sprintf("%s has %s", l.says, count(l.Len(), "row")),
		Right: fmt.Sprintf("at most %d", l.most)}
}

func (l rowsOf[R]) Drop(i int) error {
	switch {
	case i < 0 || i >= l.Len():
		return &ValueError{Path: Path(l.key), Problem: fmt.Sprintf("%s has no row %d", l.says, i+1), Right: fmt.Sprintf("1 to %d", l.Len())}
	case l.Len() <= l.least:
		return &ValueError{Path: Path(l.key), Problem: "the last row cannot be dropped", Right: "another value in its place"}
	}
	rows := l.rows(l.s)
	*rows = slices.Delete(slices.Clone(*rows), i, i+1)
	return nil
}

func (l rowsOf[R]) Show(st Style) string {
	text := l.show(l.s)
	if st.ASCII {
		return plain.ASCII(text)
	}
	return text
}

func count(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return fmt.Sprintf("%d %ss", n, what)
}

// table is what reading and writing need of a list beyond RowList.
type table interface {
	RowList
	clear()
	begin() error // appends a blank row
	read(text string) error
	room() error
	entries(i int) []entry
	missing(given func(key string) bool) *ValueError
	single() bool // at most one row
}

func (l rowsOf[R]) clear()       { *l.rows(l.s) = nil }
func (l rowsOf[R]) single() bool { return l.most == 1 }

func (l rowsOf[R]) begin() error {
	if err := l.room(); err != nil {
		return err
	}
	rows := l.rows(l.s)
	row := l.standard()
	if l.blank != nil {
		row = l.blank()
	}
	*rows = append(slices.Clone(*rows), row)
	return nil
}

// read reads the command-line form of one row and appends it.
func (l rowsOf[R]) read(text string) error {
	pairs, err := l.pairs(text)
	if err != nil {
		return err
	}
	given := func(key string) bool { return slices.ContainsFunc(pairs, func(p pair) bool { return p.key == key }) }
	if v := l.missing(given); v != nil {
		return v
	}
	if err := l.begin(); err != nil {
		return err
	}
	for _, in := range l.Row(l.Len() - 1) {
		for _, p := range pairs {
			if in.Key() != p.key {
				continue
			}
			if err := in.SetWithUnit(p.value); err != nil {
				return l.inRow(err, p.key)
			}
		}
	}
	return nil
}

// missing says which value is missing in a row, nil if none is.
func (l rowsOf[R]) missing(given func(key string) bool) *ValueError {
	for _, key := range l.required {
		if given(key) {
			continue
		}
		for _, f := range l.fields {
			if f.key == key {
				right := (slot[R]{field: &f}).Range()
				if f.quantity != nil {
					right = f.quantity.right()
				}
				return &ValueError{Path: Path(l.key), Problem: l.says + " has no " + key, Right: key + "= " + right}
			}
		}
	}
	return nil
}

func (l rowsOf[R]) inRow(err error, key string) error {
	if v, ok := err.(*ValueError); ok && key != l.first {
		v.Problem = key + "=" + shortened(v.Given) + ": " + v.Problem
	}
	return err
}

type pair struct{ key, value string }

// pairs splits a row into its keys and values. Values run to the next known key,
// so that names may have spaces; what stands before the first key belongs to the
// list's first field.
func (l rowsOf[R]) pairs(text string) ([]pair, error) {
	fail := func(problem, right string) ([]pair, error) {
		return nil, &ValueError{Path: Path(l.key), Given: text, Problem: problem, Right: right}
	}
	if l.raw {
		if strings.TrimSpace(text) == "" {
			return fail("no value", l.first)
		}
		return []pair{{l.first, strings.TrimSpace(text)}}, nil
	}
	pairs := []pair{{l.first, ""}}
	for _, word := range strings.Fields(text) {
		key, rest, found := strings.Cut(word, "=")
		if !found {
			last := &pairs[len(pairs)-1]
			last.value = strings.TrimSpace(last.value + " " + word)
			continue
		}
		if !slices.Contains(l.keys(), key) {
			right := strings.Join(l.keys(), ", ")
			if meant := near.Word(key, l.keys()); meant != "" {
				right = meant + "?"
			}
			return fail(fmt.Sprintf("no key %q", shortened(plain.Clean(key))), right)
		}
		for _, p := range pairs {
			if p.key == key && (key != l.first || p.value != "") {
				return fail(key+" stands twice", "one value")
			}
		}
		pairs = append(pairs, pair{key, rest})
	}
	if pairs[0].value == "" {
		pairs = pairs[1:]
	} else if l.first == "" {
		return fail(fmt.Sprintf("%q has no key", shortened(plain.Clean(pairs[0].value))), "key=value with "+strings.Join(l.keys(), ", "))
	}
	if len(pairs) == 0 {
		return fail("no value", strings.Join(l.keys(), ", "))
	}
	return pairs, nil
}

func (l rowsOf[R]) keys() []string {
	keys := make([]string, len(l.fields))
	for i := range l.fields {
		keys[i] = l.fields[i].key
	}
	return keys
}

// entries are the keys of a row for a file; what the catalogue gives is left out.
func (l rowsOf[R]) entries(i int) []entry {
	var out []entry
	for f := range l.fields {
		in := slot[R]{field: &l.fields[f], r: &(*l.rows(l.s))[i]}
		empty := in.isText() && in.value().Word == "" && !slices.Contains(l.required, in.key)
		if in.value().Is("catalogue") || empty {
			continue
		}
		out = append(out, in.entry())
	}
	return out
}

// Lists returns the row lists of the scenario.
func Lists(s *Scenario) []RowList {
	all := tables(s)
	out := make([]RowList, len(all))
	for i, t := range all {
		out[i] = t
	}
	return out
}

// SetRow reads the command-line form of one row, "ammonium sulfate share=0.6",
// as a new row of the list of that key; with fresh it takes the place of the rows
// that are there.
func SetRow(s *Scenario, key, text string, fresh bool) error {
	next := s.Clone()
	for _, t := range tables(&next) {
		if t.Key() != key {
			continue
		}
		if fresh {
			t.clear()
		}
		if err := t.read(text); err != nil {
			return err
		}
		*s = next
		return nil
	}
	return &ValueError{Path: Path(key), Given: text, Problem: fmt.Sprintf("no list %q", key), Right: "the key of a list"}
}
