package scenario

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"dropcrest/ui/near"
	"dropcrest/ui/plain"
)

// Cases is the head of a table with one scenario a row.
type Cases struct {
	columns []caseColumn
	labels  int // column of the names of the rows, -1: none
}

// caseColumn is what a column holds.
type caseColumn struct {
	name string
	path Path
	isSI bool // numbers in the unit that the name says
}

// CaseLabel is the column with names of the rows, which no input is.
const CaseLabel = "case"

// CaseError says which column of a row cannot be read.
type CaseError struct {
	Column int    // from 1
	Name   string // of the column
	Err    error
}

func (e *CaseError) Error() string {
	return fmt.Sprintf("column %d, %s: %v", e.Column, plain.Clean(e.Name), e.Err)
}

// Unwrap returns what is wrong with the value.
func (e *CaseError) Unwrap() error { return e.Err }

// NewCases reads the head of such a table: paths of inputs of the scenario
// ("updraft", "mode[0].N"), whose cells have units; their keys in JSON
// ("updraft_m_per_s", "mode[0].n_per_m3"), whose cells are numbers; and CaseLabel.
// The error is a *CaseError.
func NewCases(base *Scenario, names []string) (*Cases, error) {
	c := &Cases{labels: -1}
	byName := map[string]caseColumn{}
	var known []string
	for _, in := range Inputs(base) {
		path := in.Path()
		key, _ := in.SI()
		si := strings.TrimSuffix(string(path), in.Key()) + strings.ToLower(key)
		byName[si] = caseColumn{si, path, si != string(path)}
		byName[string(path)] = caseColumn{string(path), path, false}
		known = append(known, string(path))
	}
	for i, name := range names {
		name = strings.TrimSpace(plain.Clean(name))
		if name == CaseLabel && c.labels < 0 {
			c.labels = i
			c.columns = append(c.columns, caseColumn{name: name})
			continue
		}
		column, ok := byName[name]
		if !ok {
			right := "the name of an option, such as updraft, pressure, temperature, mode[0].N"
			if word := near.Word(name, known); word != "" {
				right = word + "?"
			}
			return nil, &CaseError{i + 1, name, &ValueError{Given: name, Problem: "no quantity has this name", Right: right}}
		}
		if slices.ContainsFunc(c.columns, func(o caseColumn) bool { return o.path == column.path && o.path != "" }) {
			return nil, &CaseError{i + 1, name, &ValueError{Given: name, Problem: "the quantity stands twice", Right: "one column"}}
		}
		c.columns = append(c.columns, column)
	}
	return c, nil
}

// Len is the number of columns.
func (c *Cases) Len() int { return len(c.columns) }

// Row is the scenario of a row: base with the values of its cells; an empty cell
// changes nothing. label is the name of the row, "" where it has none. The error is a
// *CaseError, or a *ValueError of values that contradict each other.
func (c *Cases) Row(base Scenario, cells []string) (s Scenario, label string, err error) {
	s = base.Clone()
	if len(cells) != len(c.columns) {
		return s, "", &ValueError{Problem: fmt.Sprintf("%d cells", len(cells)), Right: fmt.Sprintf("%d, as the head has", len(c.columns))}
	}
	for i, text := range cells {
		column := c.columns[i]
		if text = strings.TrimSpace(text); text == "" {
			continue
		}
		if i == c.labels {
			label = plain.Clean(text)
			continue
		}
		if err := column.set(&s, text); err != nil {
			var v *ValueError
			if errors.As(err, &v) {
				v.Path = ""
			}
			return s, label, &CaseError{i + 1, column.name, err}
		}
	}
	if wrong := Check(&s); len(wrong) > 0 {
		return s, label, wrong[0]
	}
	return s, label, nil
}

func (c caseColumn) set(s *Scenario, text string) error {
	in, ok := Find(s, c.path)
	if !ok {
		return &ValueError{Given: c.name, Problem: "there is no such quantity", Right: "the name of an option"}
	}
	if !c.isSI {
		return in.SetWithUnit(text)
	}
	if _, err := strconv.ParseFloat(text, 64); err != nil {
		return in.SetWithUnit(text) // a word, or a value with its own unit
	}
	return in.SetWithUnit(text + unitOfSI(in))
}

// unitOfSI is the unit that numbers under the key of an input in JSON have.
func unitOfSI(in Input) string {
	if q, ok := in.(interface{ measured() *quantity }); ok && q.measured() != nil {
		for _, u := range q.measured().units {
			if q.measured().si == "percent" || u.factor == "1" && u.offset == "" {
				return u.name()
			}
		}
	}
	return ""
}

func (i slot[R]) measured() *quantity { return i.quantity }
