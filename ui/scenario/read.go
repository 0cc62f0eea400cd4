package scenario

import (
	"errors"
	"fmt"
	"io"
	"strings"

	"github.com/pelletier/go-toml/v2/unstable"

	"dropcrest/solutes"
	"dropcrest/ui/near"
	"dropcrest/ui/plain"
)

// Decode reads a scenario file. Keys that are absent keep their defaults; a file
// that names components has no others. The error is FileErrors: all that is wrong,
// with line and column.
func Decode(name string, r io.Reader) (Scenario, error) { return decode(name, r, Default()) }

// DecodeUsing is Decode with names of substances looked up in that catalogue; with
// nil they are taken as they are, because what a session has kept must be read even
// when a substance is not there any more.
func DecodeUsing(c *solutes.Catalogue, name string, r io.Reader) (Scenario, error) {
	s := Default()
	s.substances, s.anyName = c, c == nil
	s, err := decode(name, r, s)
	s.anyName = false
	return s, err
}

func decode(name string, r io.Reader, s Scenario) (Scenario, error) {
	name = plain.Clean(name)
	text, _, err := ReadTOML(name, r, "scenario file")
	if err != nil {
		return s, err
	}
	f := file{name: name, s: &s}
	f.walk(text)
	if len(f.problems) == 0 {
		f.check()
	}
	if len(f.problems) > 0 {
		return s, f.problems
	}
	return s, nil
}

// file is a scenario file that is being read. Its syntax was checked before.
type file struct {
	name     string
	s        *Scenario
	parser   unstable.Parser
	row      []Input // the row that is being read, nil: none yet
	skip     bool    // the rest of a table that is not known
	named    map[string]bool
	begun    []begun
	where    map[Path]unstable.Position
	problems FileErrors
}

func (f *file) walk(text []byte) {
	f.where, f.named = map[Path]unstable.Position{}, map[string]bool{}
	f.parser.Reset(text)
	for f.parser.NextExpression() {
		e := f.parser.Expression()
		switch e.Kind {
		case unstable.KeyValue:
			f.keyValue(e)
		case unstable.ArrayTable:
			f.table(e, true)
		case unstable.Table:
			f.table(e, false)
		}
	}
	if err := f.parser.Error(); err != nil {
		f.problems = append(f.problems, &FileError{f.name, 1, 1, "", errors.New(plain.Clean(err.Error()))})
	}
}

func (f *file) position(n *unstable.Node) unstable.Position {
	return f.parser.Shape(NodeRange(&f.parser, n)).Start
}

func (f *file) fail(at unstable.Position, key string, err error) {
	f.problems = append(f.problems, &FileError{f.name, at.Line, at.Column, plain.Clean(key), err})
}

// name of a key, with the place of its first part.
func (f *file) key(n *unstable.Node) (string, unstable.Position) {
	var parts []string
	var at unstable.Position
	for it := n.Key(); it.Next(); {
		if len(parts) == 0 {
			at = f.position(it.Node())
		}
		parts = append(parts, string(it.Node().Data))
	}
	return strings.Join(parts, "."), at
}

func (f *file) table(n *unstable.Node, repeated bool) {
	name, at := f.key(n)
	f.skip, f.row = true, nil
	t, err := f.tableOf(name, repeated)
	if err == nil {
		err = t.begin()
	}
	if err != nil {
		f.fail(at, name, err)
		return
	}
	f.skip, f.row = false, t.Row(t.Len()-1)
	f.begun = append(f.begun, begun{t, t.Len() - 1, at})
}

// begun is a row of the file.
type begun struct {
	table table
	row   int
	at    unstable.Position
}

// tableOf is the list of that name, without its default rows when it is named for
// the first time. A list of one row at most may be written as a plain table.
func (f *file) tableOf(name string, repeated bool) (table, error) {
	var right []string
	for _, t := range tables(f.s) {
		if t.Key() == name && (repeated || t.single()) {
			if !f.named[name] {
				f.named[name] = true
				t.clear()
			}
			return t, nil
		}
		right = append(right, "[["+t.Key()+"]]")
	}
	return nil, &ValueError{Given: name, Problem: fmt.Sprintf("no table %q", plain.Clean(name)), Right: strings.Join(right, ", ")}
}

func (f *file) keyValue(n *unstable.Node) {
	if f.skip {
		return
	}
	name, at := f.key(n)
	inputs := f.row
	if inputs == nil {
		inputs = ownInputs(f.s)
		if name == versionKey {
			f.version(n.Value())
			return
		}
	}
	for _, in := range inputs {
		if in.Key() == name {
			value := n.Value()
			f.where[in.Path()] = f.position(value)
			if NodeRange(&f.parser, value).Length == 0 { // an empty list
				f.where[in.Path()] = at
			}
			f.set(in, value)
			return
		}
	}
	f.fail(at, name, unknownKey(name, inputs))
}

func unknownKey(name string, inputs []Input) error {
	keys := make([]string, len(inputs))
	for i, in := range inputs {
		keys[i] = in.Key()
	}
	right := strings.Join(keys, ", ")
	if word := near.Word(name, keys); word != "" {
		right = word + "?"
	}
	return &ValueError{Given: name, Problem: "no such key", Right: right}
}

func (f *file) version(n *unstable.Node) {
	if string(n.Data) != fmt.Sprint(fileVersion) {
		f.fail(f.position(n), versionKey, &ValueError{Problem: fmt.Sprintf("version %s of the file", shortened(plain.Clean(string(n.Data)))), Right: fmt.Sprint(fileVersion)})
	}
}

func (f *file) set(in Input, n *unstable.Node) {
	at := f.where[in.Path()]
	switch n.Kind {
	case unstable.String, unstable.Integer, unstable.Float:
	default:
		f.fail(at, in.Key(), &ValueError{Problem: "neither text nor a number", Right: in.Range()})
		return
	}
	text := string(n.Data)
	if n.Kind == unstable.Integer && !isDecimal(text) {
		f.fail(at, in.Key(), &ValueError{Problem: shortened(text) + " is no decimal number", Right: in.Range()})
		return
	}
	if n.Kind != unstable.String {
		text = strings.ReplaceAll(text, "_", "")
	}
	if err := in.SetWithUnit(text); err != nil {
		f.fail(at, in.Key(), err)
	}
}

func isDecimal(text string) bool {
	return len(text) < 2 || text[0] != '0' || isDigit(text[1])
}

// check looks at the values together.
func (f *file) check() {
	for _, b := range f.begun {
		given := func(key string) bool {
			_, ok := f.where[Path(fmt.Sprintf("%s[%d].%s", b.table.Key(), b.row, key))]
			return ok
		}
		if v := b.table.missing(given); v != nil {
			f.fail(b.at, b.table.Key(), v)
		}
	}
	for _, p := range Check(f.s) {
		at, ok := f.where[p.Path]
		if !ok {
			at = unstable.Position{Line: 1, Column: 1}
		}
		f.fail(at, string(p.Path), p)
	}
}
