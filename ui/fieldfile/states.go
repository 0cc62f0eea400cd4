package fieldfile

import (
	"bytes"
	"math"
	"strconv"
	"strings"
)

// cell reads one number with its four states.
func (f *File) cell(s *step, field []byte) (Cell, bool) {
	x, ok := number(field)
	if !ok {
		x, ok = f.strange(field)
		if !ok {
			return f.wordCell(s, field)
		}
	}
	if f.Format == CSV {
		if x < suspicious && isRepeated(x, 9) {
			f.notes.add("nines", f.row.line, "%s in column %s is taken as a value, not as a missing code", short(x), quoted(f.Columns[s.column].Name))
		}
		return Cell{s.unit.si(x), Value}, true
	}
	if state := f.coded(s, x); state != Value {
		limit := s.lower
		switch state {
		case Missing:
			return Cell{}, true
		case Above:
			limit = s.upper
		}
		return Cell{limit, state}, true
	}
	return Cell{s.unit.si(x * s.scale), Value}, true
}

// suspicious bounds what may be a row of nines, such as -999.
const suspicious = -990

// strange reads numbers that are spelt in another way: with blanks around, a
// Fortran exponent, and if lenient a decimal comma.
func (f *File) strange(field []byte) (float64, bool) {
	field = bytes.TrimSpace(field)
	if len(field) == 0 {
		return 0, false
	}
	if x, ok := number(field); ok {
		return x, true
	}
	if f.Format == NASAAmes {
		return number(bytes.Map(func(r rune) rune {
			if r == 'D' || r == 'd' {
				return 'e'
			}
			return r
		}, field))
	}
	if c, ok := f.rows.(*csvRows); ok && c.comma == ';' && bytes.Count(field, []byte{','}) == 1 {
		x, ok := number(bytes.Replace(field, []byte{','}, []byte{'.'}, 1))
		if ok {
			f.notes.add("decimal_comma", f.row.line, "decimal commas are read as points")
		}
		return x, ok
	}
	return 0, false
}

// wordCell reads what stands for a number in CSV: nothing or a word for a missing
// value, "<0.5" and ">1000" for limits.
func (f *File) wordCell(s *step, field []byte) (Cell, bool) {
	if f.Format != CSV {
		return Cell{}, false
	}
	field = bytes.TrimSpace(field)
	if len(field) == 0 {
		return Cell{}, true
	}
	if field[0] == '<' || field[0] == '>' {
		x, ok := f.strange(field[1:])
		state := Below
		if field[0] == '>' {
			state = Above
		}
		return Cell{s.unit.si(x), state}, ok
	}
	switch strings.ToLower(string(field)) {
	case "nan", "na", "n/a", "null", "none":
		return Cell{}, true
	}
	return Cell{}, false
}

// isRepeated reports whether the digits of x are that digit alone and there are
// at least three.
func isRepeated(x float64, digit byte) bool {
	text := strconv.FormatFloat(math.Abs(x), 'f', -1, 64)
	n := 0
	for i := range len(text) {
		switch text[i] {
		case '0' + digit:
			n++
		case '.':
		default:
			return false
		}
	}
	const fewest = 3
	return n >= fewest
}
