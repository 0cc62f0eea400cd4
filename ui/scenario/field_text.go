package scenario

import (
	"fmt"
	"strings"

	"dropcrest/ui/plain"
)

// ending takes off what a text ends in and what that says of the record; nil: nothing.
func (i slot[R]) ending(text string) (rest string, says func(*R)) {
	text = strings.TrimSpace(text)
	for end, of := range i.endings {
		if rest, found := strings.CutSuffix(text, end); found {
			return strings.TrimSpace(rest), of
		}
	}
	return text, nil
}

// longestWords is more than any file name or line of a mapping needs.
const longestWords = 1000

// readText reads a free text; "none" takes it away.
func (i slot[R]) readText(text string) (Measure, *ValueError) {
	if text == "none" {
		text = ""
	}
	if len(text) > longestWords {
		return Measure{}, &ValueError{Given: shortened(text), Problem: "a text that long", Right: fmt.Sprintf("at most %d bytes", longestWords)}
	}
	return Measure{Word: text}, nil
}

// mostNumbers keeps a series from filling the memory.
const mostNumbers = 1000

// setAll reads several numbers. One without a unit has that of the last one.
func (i slot[R]) setAll(text string, bare bool) error {
	parts := strings.Split(text, ",")
	if len(parts) > mostNumbers {
		return &ValueError{Path: i.path, Given: shortened(text), Problem: fmt.Sprintf("%d numbers", len(parts)), Right: fmt.Sprintf("at most %d", mostNumbers)}
	}
	last := strings.TrimSpace(parts[len(parts)-1])
	unit := last[numberLength(last):]
	var out []float64
	for _, p := range parts {
		p = strings.TrimSpace(p)
		if p != "" && numberLength(p) == len(p) {
			p += unit
		}
		x, problem := i.quantity.read(plain.Clean(p), bare)
		if problem != nil {
			problem.Path = i.path
			return problem
		}
		out = append(out, x)
	}
	*i.at(i.r).(*[]float64) = out
	return nil
}

// readName reads the name of a substance and writes it as the catalogue does.
func (i slot[R]) readName(text string) (Measure, *ValueError) {
	fail := func(problem, right string) (Measure, *ValueError) {
		return Measure{}, &ValueError{Given: text, Problem: problem, Right: right}
	}
	if text == "" {
		return fail("no name", i.Range())
	}
	if i.s.anyName {
		return Measure{Word: text}, nil
	}
	if found, ok := i.s.catalogue().Find(text); ok {
		return Measure{Word: found.Name}, nil
	}
	problem := fmt.Sprintf("no substance %q in the catalogue", shortened(text))
	if near := i.s.catalogue().Near(text, 3); len(near) > 0 {
		return fail(problem, strings.Join(near, ", ")+"?")
	}
	return fail(problem, "a name that dropcrest substances lists")
}
