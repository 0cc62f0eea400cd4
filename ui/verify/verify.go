package verify

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"math"
	"slices"
	"sort"
	"strconv"
	"strings"
)

// Row is one published value beside the value recomputed here. Numbers are in
// Unit, as published.
type Row struct {
	Quantity, Condition string
	Computed, Published float64
	Difference          float64 // Computed - Published
	Tolerance           float64 // largest |Difference| that agrees
	Unit                string
	Source              string
	Seen                string // how the published value came here: one of SeenWords
	Verdict             Verdict
	Remark              string // why references differ, "" when they do not
}

// Verdict says whether a row lies inside its tolerance.
type Verdict string

// The verdicts.
const (
	Agrees Verdict = "agrees"
	Fails  Verdict = "fails"
)

// Options change how Run works. The zero value is what users get.
type Options struct {
	Checks map[string]Check // nil means Checks()
}

// SeenWords are the words that say how a published value came into its file:
// read in the source that is named; from memory of that source; or computed for
// this project from the equations that the source names, with a general-purpose
// numerical library, because nobody printed it. A computed value checks the
// arithmetic, not nature.
func SeenWords() []string { return []string{"read", "memory", "computed"} }

// Columns are the columns of a file of published values, in their order.
func Columns() []string {
	return []string{"check", "arguments", "quantity", "condition", "published",
		"tolerance", "unit", "source", "seen", "remark"}
}

// Error is trouble in a file of published values.
type Error struct {
	File         string
	Line, Column int // both count from 1; Column counts bytes
	Err          error
}

func (e *Error) Error() string {
	return fmt.Sprintf("%s:%d:%d: %v", e.File, e.Line, e.Column, e.Err)
}

// Unwrap returns what was wrong at that place.
func (e *Error) Unwrap() error { return e.Err }

// Run recomputes every row of every *.csv file at the root of fsys, in the
// order of file names and lines. A row outside its tolerance is no error: it
// gets the verdict Fails. Errors are files that cannot be understood; they
// are of type *Error where they have a place.
func Run(fsys fs.FS, opts Options) ([]Row, error) {
	names, err := fs.Glob(fsys, "*.csv")
	if err != nil {
		return nil, err
	}
	if len(names) == 0 {
		return nil, errors.New("verify: no file of published values (*.csv)")
	}
	sort.Strings(names)
	checks := opts.Checks
	if checks == nil {
		checks = Checks()
	}
	r := reader{checks: checks, units: unitFactors(), seen: map[[3]string]string{}}
	for _, name := range names {
		if err := r.file(fsys, name); err != nil {
			return nil, err
		}
	}
	return r.rows, nil
}

// reader collects the rows of all files.
type reader struct {
	checks map[string]Check
	units  map[string]float64
	seen   map[[3]string]string // (check, arguments, source) → place of its first row
	rows   []Row
}

func (r *reader) file(fsys fs.FS, name string) error {
	f, err := fsys.Open(name)
	if err != nil {
		return err
	}
	defer f.Close()
	in := csv.NewReader(f)
	in.FieldsPerRecord = -1
	for first := true; ; first = false {
		record, err := in.Read()
		if err == io.EOF {
			if first {
				return &Error{name, 1, 1, errors.New("the file is empty")}
			}
			return nil
		}
		if err != nil {
			return syntaxError(name, err)
		}
		l := line{name, in, record}
		if first {
			err = l.header()
		} else {
			err = r.row(l)
		}
		if err != nil {
			return err
		}
	}
}

func syntaxError(name string, err error) error {
	var p *csv.ParseError
	if errors.As(err, &p) {
		return &Error{name, p.Line, p.Column, p.Err}
	}
	return fmt.Errorf("%s: %w", name, err)
}

// row recomputes one line and appends it.
func (r *reader) row(l line) error {
	if len(l.record) != len(Columns()) {
		return l.at(0, fmt.Errorf("%d columns, should be %d", len(l.record), len(Columns())))
	}
	published, err := l.number("published")
	if err != nil {
		return err
	}
	tolerance, err := l.tolerance(published)
	if err != nil {
		return err
	}
	if err := r.identity(l); err != nil {
		return err
	}
	computed, err := r.compute(l)
	if err != nil {
		return err
	}
	row := Row{
		Quantity: l.text("quantity"), Condition: l.text("condition"),
		Computed: computed, Published: published, Difference: computed - published,
		Tolerance: tolerance, Unit: l.text("unit"), Source: l.text("source"),
		Seen: l.text("seen"), Remark: l.text("remark"),
		Verdict: verdict(computed-published, tolerance),
	}
	r.rows = append(r.rows, row)
	return nil
}

// verdict: what is not within the tolerance fails, NaN too.
func verdict(difference, tolerance float64) Verdict {
	if math.Abs(difference) <= tolerance {
		return Agrees
	}
	return Fails
}

// identity checks what names the row: nothing empty, nothing twice.
func (r *reader) identity(l line) error {
	for _, column := range []string{"check", "quantity", "unit", "source"} {
		if l.text(column) == "" {
			return l.at(column, fmt.Errorf("%s is empty", column))
		}
	}
	if s := l.text("seen"); !slices.Contains(SeenWords(), s) {
		return l.at("seen", fmt.Errorf("%q, should be one of %s", s, strings.Join(SeenWords(), ", ")))
	}
	key := [3]string{l.text("check"), l.text("arguments"), l.text("source")}
	here := fmt.Sprintf("%s:%d", l.file, l.lineNumber())
	if before, twice := r.seen[key]; twice {
		return l.at("check", fmt.Errorf("the same check, arguments and source stand at %s", before))
	}
	r.seen[key] = here
	return nil
}

// compute runs the check of the line and converts its result to the unit.
func (r *reader) compute(l line) (float64, error) {
	check, ok := r.checks[l.text("check")]
	if !ok {
		return 0, l.at("check", fmt.Errorf("unknown check %q", l.text("check")))
	}
	unit, ok := r.units[l.text("unit")]
	if !ok {
		return 0, l.at("unit", fmt.Errorf("unknown unit %q", l.text("unit")))
	}
	args, err := ParseArgs(l.text("arguments"))
	if err != nil {
		return 0, l.at("arguments", err)
	}
	x, err := check(args)
	if trouble := args.trouble(); trouble != nil {
		err = trouble
	}
	if err != nil {
		return 0, l.at("arguments", err)
	}
	return x / unit, nil
}

// line is one record with its place.
type line struct {
	file   string
	in     *csv.Reader
	record []string
}

func (l line) index(column string) int {
	for i, c := range Columns() {
		if c == column {
			return i
		}
	}
	panic("verify: no column " + column)
}

func (l line) text(column string) string { return strings.TrimSpace(l.record[l.index(column)]) }

// lineNumber is the line number of the record's first field.
func (l line) lineNumber() int {
	n, _ := l.in.FieldPos(0)
	return n
}

// at places an error at a column, given by its name or its index.
func (l line) at(column any, err error) error {
	i, ok := column.(int)
	if !ok {
		i = l.index(column.(string))
	}
	n, c := l.in.FieldPos(i)
	return &Error{l.file, n, c, err}
}

func (l line) header() error {
	want := Columns()
	for i, c := range l.record {
		if i >= len(want) || strings.TrimSpace(c) != want[i] {
			return l.at(i, fmt.Errorf("column %q, the columns are %s", c, strings.Join(want, ",")))
		}
	}
	if len(l.record) < len(want) {
		return l.at(0, fmt.Errorf("the columns are %s", strings.Join(want, ",")))
	}
	return nil
}

func (l line) number(column string) (float64, error) {
	x, err := strconv.ParseFloat(l.text(column), 64)
	if err != nil || math.IsNaN(x) || math.IsInf(x, 0) {
		return 0, l.at(column, fmt.Errorf("%q is not a finite number", l.text(column)))
	}
	return x, nil
}

// tolerance reads an absolute tolerance in the published unit, or one
// relative to the published value such as 3e-4rel.
func (l line) tolerance(published float64) (float64, error) {
	text, relative := strings.CutSuffix(l.text("tolerance"), "rel")
	x, err := strconv.ParseFloat(text, 64)
	if err != nil || math.IsInf(x, 0) || !(x >= 0) {
		return 0, l.at("tolerance", fmt.Errorf("%q, should be a number of at least 0, such as 0.01 or 3e-4rel", l.text("tolerance")))
	}
	if relative {
		x *= math.Abs(published)
	}
	return x, nil
}
