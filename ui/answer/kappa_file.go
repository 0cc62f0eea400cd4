package answer

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"
	"unicode/utf8"

	"dropcrest/atmos"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// The most that is read of a file of points: far more than anyone has measured.
const (
	largestPoints = 1 << 20 // bytes
	mostPoints    = 5000
)

// pointsFile is a file of points while it is read.
type pointsFile struct {
	name    string
	text    []byte
	rows    *csv.Reader
	columns []pointColumn
	asked   scenario.Scenario
}

// readPoints reads the points of a CSV file with a header. What a column holds is
// guessed from its name, which carries the unit: dry_diameter_nm,
// supersaturation_percent, and beside them supersaturation_relative_uncertainty_percent;
// a cell may also be written as an option is, 80nm±3%rel.
func readPoints(env Env, s scenario.Scenario) ([]kappaPoint, []atmos.Note, error) {
	f := &pointsFile{name: plain.Clean(s.PointsFile), asked: s}
	if err := f.open(env, "points-file", s.PointsFile, demoPoints); err != nil {
		return nil, nil, err
	}
	notes, err := f.header()
	if err != nil {
		return nil, nil, err
	}
	var points []kappaPoint
	for {
		cells, err := f.next()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, nil, err
		}
		m, err := f.point(cells, len(points))
		if err != nil {
			return nil, nil, err
		}
		if points = append(points, m); len(points) > mostPoints {
			return nil, nil, f.wrong(0, 0, fmt.Sprintf("more than %d measurements", mostPoints), "a smaller file")
		}
	}
	if len(points) == 0 {
		return nil, nil, f.wrong(0, 0, "no measurements below the header", "a row for each")
	}
	return points, notes, nil
}

// demoPoints is the file of measurements of the invented station.
const demoPoints = "points.csv"

// open reads the file of that name, which the input has given. demo is the one that
// the word demo stands for, "" if there is none.
func (f *pointsFile) open(env Env, input, name, demo string) error {
	isDemo := name == scenario.DemoData && demo != ""
	if isDemo {
		name = demo
	}
	in, err := openFile(env, name, isDemo)
	if err != nil {
		return &InputError{input, err.Error()}
	}
	defer in.Close()
	f.text, err = io.ReadAll(io.LimitReader(in, largestPoints+1))
	switch {
	case err != nil:
		return &fieldfile.Error{File: f.name, Problem: err.Error(), Err: err}
	case len(f.text) > largestPoints:
		return f.wrong(0, 0, "larger than 1 MiB", "a file of measurements")
	case !utf8.Valid(f.text):
		line := 1 + bytes.Count(f.text[:firstInvalid(f.text)], []byte("\n"))
		return f.wrong(line, 0, "no UTF-8", "UTF-8, or +- in place of ±")
	}
	f.text = bytes.TrimPrefix(f.text, []byte("\uFEFF"))
	f.rows = csv.NewReader(bytes.NewReader(f.text))
	f.rows.Comment, f.rows.FieldsPerRecord, f.rows.TrimLeadingSpace = '#', -1, true
	f.rows.Comma = separator(f.text)
	return nil
}

func firstInvalid(text []byte) int {
	for i := 0; i < len(text); {
		r, n := utf8.DecodeRune(text[i:])
		if r == utf8.RuneError && n <= 1 {
			return i
		}
		i += n
	}
	return len(text)
}

// separator is the comma, unless the header has tabs or semicolons: beside these a
// comma may part a name and its unit.
func separator(text []byte) rune {
	for line := range bytes.Lines(text) {
		if bytes.HasPrefix(line, []byte("#")) || len(bytes.TrimSpace(line)) == 0 {
			continue
		}
		for _, mark := range "\t;" {
			if bytes.ContainsRune(line, mark) {
				return mark
			}
		}
		break
	}
	return ','
}

// next reads the next row, as many cells as there are columns.
func (f *pointsFile) next() ([]string, error) {
	cells, err := f.rows.Read()
	var parse *csv.ParseError
	switch {
	case errors.As(err, &parse):
		return nil, f.wrong(parse.Line, f.charactersTo(parse.Line, parse.Column), parse.Err.Error(), "CSV by RFC 4180")
	case err != nil:
		return nil, err
	}
	if f.columns != nil && len(cells) != len(f.columns) {
		line, _ := f.rows.FieldPos(0)
		return nil, f.wrong(line, 0, fmt.Sprintf("%d values where the header has %d names", len(cells), len(f.columns)), "one value, or nothing, for each name")
	}
	return cells, nil
}

// point makes a measurement of a row.
func (f *pointsFile) point(cells []string, index int) (kappaPoint, error) {
	m := kappaPoint{name: defaultName(index)}
	s := f.asked.Clone()
	s.Measurements = []scenario.Point{{Plateau: 1}}
	for i, c := range f.columns {
		cell := strings.TrimSpace(cells[i])
		if cell == "" || c.isUncertainty || c.holds == nothingUsed {
			continue
		}
		if c.holds == nameOfPoint {
			m.name = plain.Clean(cell)
			continue
		}
		text, err := f.withUncertainties(cells, i)
		if err != nil {
			return m, err
		}
		in, _ := scenario.Find(&s, c.holds.path())
		if err := in.SetWithUnit(text); err != nil {
			return m, f.refused(i, err)
		}
	}
	m.Point, m.water = s.Measurements[0], conventionOf(s)
	if err := checkMeasurement(m.Point); err != nil {
		return m, f.wrong(f.line(), 0, err.Problem, err.Right)
	}
	return m, nil
}

// withUncertainties is a cell as an option would be written, with its unit and with
// what the columns of its uncertainties hold.
func (f *pointsFile) withUncertainties(cells []string, i int) (string, error) {
	c := f.columns[i]
	parts := strings.Split(strings.ReplaceAll(strings.TrimSpace(cells[i]), "+-", "±"), "±")
	for j, p := range parts {
		number, isCommon := strings.CutSuffix(strings.TrimSpace(p), "common")
		if !isNumber(number) || j > 0 && c.holds.inPercent() { // of % rel or abs must be said
			continue
		}
		if parts[j] = number + c.unit; isCommon {
			parts[j] += " common"
		}
	}
	text := strings.Join(parts, "±")
	for j, u := range f.columns {
		if !u.isUncertainty || u.holds != c.holds {
			continue
		}
		cell := strings.TrimSpace(cells[j])
		switch {
		case cell == "":
			continue
		case !isNumber(cell):
			return "", f.wrongCell(j, fmt.Sprintf("%q is no number", plain.Clean(cell)), "the uncertainty as a number")
		}
		text += "±" + cell + u.unit
		switch {
		case u.isRelative:
			text += "rel"
		case u.holds.inPercent():
			text += "abs"
		}
		if u.isCommon {
			text += " common"
		}
	}
	return text, nil
}

func isNumber(text string) bool {
	_, err := strconv.ParseFloat(strings.TrimSpace(text), 64)
	return err == nil
}

// refused is what an input says of a cell.
func (f *pointsFile) refused(column int, err error) error {
	var value *scenario.ValueError
	if errors.As(err, &value) {
		return f.wrongCell(column, value.Problem, value.Right)
	}
	return f.wrongCell(column, err.Error(), "")
}

// line is that of the row that was read last.
func (f *pointsFile) line() int {
	line, _ := f.rows.FieldPos(0)
	return line
}

func (f *pointsFile) wrongCell(column int, problem, right string) error {
	line, bytes := f.rows.FieldPos(column)
	return f.wrong(line, f.charactersTo(line, bytes), problem, right)
}

func (f *pointsFile) wrong(line, column int, problem, right string) error {
	return &fieldfile.Error{File: f.name, Line: line, Column: column, Problem: problem, Right: right}
}

// charactersTo counts a column in characters that encoding/csv counts in bytes.
func (f *pointsFile) charactersTo(line, column int) int {
	n := 0
	for text := range bytes.Lines(f.text) {
		if n++; n == line && column >= 1 && column-1 <= len(text) {
			return 1 + utf8.RuneCount(text[:column-1])
		}
	}
	return column
}
