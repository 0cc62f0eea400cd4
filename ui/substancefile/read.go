package substancefile

import (
	"cmp"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"
	"unicode"

	"dropcrest/solutes"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// tableKey is the only key of a file: [[substance]].
const tableKey = "substance"

const (
	mostRecords  = 1000 // a catalogue of all that was ever measured is smaller
	mostKeys     = 500  // of a record, those of its tables included; the catalogue knows about 80
	mostProblems = 50   // nobody reads on
)

// Extend returns the catalogue with the substances of a file of at most 128 KiB.
// The error is scenario.FileErrors: all that is wrong, with line and column.
func Extend(c *solutes.Catalogue, name string, r io.Reader) (*solutes.Catalogue, error) {
	name = plain.Clean(name)
	text, tree, err := scenario.ReadTOML(name, r, "file of substances")
	if err != nil {
		return nil, err
	}
	f := &file{name: name, places: placesOf(text)}
	records := f.records(tree)
	substances := make([]solutes.Substance, len(records))
	for i, record := range records {
		substances[i] = f.substance(i, record)
	}
	if len(f.problems) == 0 {
		if extended, err := c.Extend(substances); err == nil {
			return extended, nil
		}
	}
	f.taken(c, substances)
	return nil, f.all()
}

// file is a file of substances that is being read.
type file struct {
	name     string
	places   *places
	problems []problem
}

// problem is what is wrong at a place. Line and column are found at the end, for as
// many as are said: that takes a walk through the text each.
type problem struct {
	offset int
	key    string
	err    error
}

func (f *file) fail(path, key string, err error) {
	f.problems = append(f.problems, problem{f.places.offset(path), shortened(plain.Clean(key)), err})
}

// records are the tables [[substance]]; anything else at the top is refused.
func (f *file) records(tree map[string]any) []map[string]any {
	const right = "[[" + tableKey + "]]"
	for key := range tree {
		if key != tableKey {
			f.fail(keyOf(joined("", key)), key, &scenario.ValueError{Problem: "no such key", Right: right + " and the values below it"})
		}
	}
	list, ok := tree[tableKey].([]any)
	if _, there := tree[tableKey]; there && !ok {
		f.fail(keyOf(tableKey), tableKey, &scenario.ValueError{Problem: "no list of tables", Right: right})
	}
	if len(list) > mostRecords {
		f.fail(item(tableKey, mostRecords), tableKey, &scenario.ValueError{Problem: fmt.Sprintf("%d substances", len(list)), Right: fmt.Sprintf("at most %d", mostRecords)})
		return nil
	}
	var out []map[string]any
	for i, one := range list {
		record, ok := one.(map[string]any)
		if !ok {
			f.fail(item(tableKey, i), tableKey, &scenario.ValueError{Problem: "no table", Right: right})
		}
		out = append(out, record)
	}
	return out
}

// substance makes a substance of a record.
func (f *file) substance(i int, record map[string]any) solutes.Substance {
	if record == nil {
		return solutes.Substance{}
	}
	top := item(tableKey, i)
	if n := keys(record); n > mostKeys {
		f.fail(top, tableKey, &scenario.ValueError{Problem: fmt.Sprintf("%d keys", n), Right: "those of the catalogue"})
		return solutes.Substance{}
	}
	u := &unitReader{file: f, top: top, said: map[string]bool{}}
	u.read(record)
	s, err := solutes.NewSubstance(fmt.Sprint(i+1), record)
	for _, e := range recordErrors(err) {
		if !u.said[e.Field] { // the first complaint says it
			f.refuse(top, e)
			u.said[e.Field] = true
		}
	}
	return s
}

// keys counts the keys of a value, and of the tables in it.
func keys(value any) int {
	n := 0
	switch value := value.(type) {
	case map[string]any:
		n = len(value)
		for _, v := range value {
			n += keys(v)
		}
	case []any:
		for _, v := range value {
			n += keys(v)
		}
	}
	return n
}

// recordErrors are the errors of a record one by one.
func recordErrors(err error) []*solutes.RecordError {
	if err == nil {
		return nil
	}
	all := []error{err}
	if several, ok := err.(interface{ Unwrap() []error }); ok {
		all = several.Unwrap()
	}
	var out []*solutes.RecordError
	for _, one := range all {
		var e *solutes.RecordError
		if !errors.As(one, &e) {
			e = &solutes.RecordError{Given: one.Error(), Right: "a record that can be used"}
		}
		out = append(out, e)
	}
	return out
}

// unknownKey is what solutes gives for a key that it does not know.
const unknownKey = "not a known key"

// refuse says an error of a record at its place in the file: at the value, at the
// key when that is wrong, at the table when something is missing.
func (f *file) refuse(top string, e *solutes.RecordError) {
	path := top
	if e.Field != "" {
		path += "." + e.Field
	}
	if e.Given == unknownKey {
		path = keyOf(path)
	}
	told := *e
	told.Record, told.Field = plain.Clean(e.Record), plain.Clean(e.Field)
	told.Given, told.Right = plain.Clean(e.Given), plain.Clean(e.Right)
	f.fail(path, "", &told)
}

// taken says which substances take a name that stands for another.
func (f *file) taken(c *solutes.Catalogue, substances []solutes.Substance) {
	for i, s := range substances {
		if s.Key == "" || len(f.problems) >= mostProblems {
			continue // refused already, or enough is said
		}
		next, err := c.Extend([]solutes.Substance{s})
		if err == nil {
			c = next
			continue
		}
		top := item(tableKey, i)
		for _, e := range recordErrors(err) {
			if e.Field == "key" && !f.places.has(top+".key") {
				e.Field, e.Given = "name", fmt.Sprintf("%q", s.Name)
			}
			f.refuse(top, e)
		}
	}
}

// all is what is wrong, in the order of the file and not longer than anybody reads.
func (f *file) all() error {
	slices.SortStableFunc(f.problems, func(a, b problem) int { return cmp.Compare(a.offset, b.offset) })
	if more := len(f.problems) - mostProblems; more > 0 {
		f.problems = f.problems[:mostProblems]
		last := &f.problems[mostProblems-1]
		last.key, last.err = "", fmt.Errorf("and %d more problems from here on", more+1)
	}
	var out scenario.FileErrors
	for _, p := range f.problems {
		at := f.places.position(p.offset)
		out = append(out, &scenario.FileError{Name: f.name, Line: at.Line, Column: at.Column, Key: p.key, Err: p.err})
	}
	return out
}

// item is the path of an item of a list.
func item(path string, i int) string {
	if len(path) > longestPath {
		return path
	}
	return fmt.Sprintf("%s[%d]", path, i)
}

// keyOf is the path of a key itself; that of its value is without the mark.
func keyOf(path string) string { return "=" + path }

// longestPath is longer than the path of any key that a record knows. Below it
// nothing is told apart, so that a file of brackets does not fill the memory.
const longestPath = 300

// joined is the path of a key in a table, in quotes where solutes puts them.
func joined(path, key string) string {
	if len(path) > longestPath {
		return path
	}
	if strings.ContainsFunc(key, func(r rune) bool { return !unicode.IsLetter(r) && !unicode.IsDigit(r) && r != '_' && r != '-' }) {
		key = fmt.Sprintf("%q", key)
	}
	return strings.TrimPrefix(path+"."+shortened(key), ".")
}

// shortened keeps a key on a line.
func shortened(key string) string {
	const most = 60
	if runes := []rune(key); len(runes) > most {
		return string(runes[:most-3]) + "..."
	}
	return key
}
