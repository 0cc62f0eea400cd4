package fieldfile

import (
	"math"
	"strings"
)

// placed finds at which supersaturation or diameter a column is: in a tag of
// EBAS, or as a number with its unit in the texts.
func (f *File) placed(c *Column, r Role) Role {
	if declared[r.Quantity].at == atSupersaturation {
		for _, text := range []string{c.Tags["Supersaturation"], c.Tags["SS"], c.Long, c.Name, c.Standard} {
			if x, ok := supersaturationIn(text); ok {
				r.At = x
				return r
			}
		}
		return r
	}
	for _, text := range []string{c.Tags["D"], c.Long, c.Name} {
		if low, high, ok := diameterIn(text); ok {
			r.At = low
			if high > low {
				r.From, r.To, r.At = low, high, math.Sqrt(low*high)
			}
			return r
		}
	}
	return r
}

// found is a number in a text and the word behind it.
type found struct {
	x      float64
	after  string // in lower case, up to the next number
	before byte   // 0: the beginning
	point  bool   // it is written with a point, or with the p of ICARTT names
}

// numbersIn finds the unsigned numbers of a text. In names a p between digits is
// a point, because short names of ICARTT have none.
func numbersIn(text string) []found {
	var all []found
	for i := 0; i < len(text); {
		if !isDigit(text[i]) {
			i++
			continue
		}
		start, point := i, false
		for i < len(text) && (isDigit(text[i]) || !point && i+1 < len(text) && (text[i] == '.' || text[i] == 'p') && isDigit(text[i+1])) {
			point = point || !isDigit(text[i])
			i++
		}
		x, ok := number([]byte(strings.Replace(text[start:i], "p", ".", 1)))
		if !ok {
			continue
		}
		n := found{x: x, point: point}
		if start > 0 {
			n.before = text[start-1]
		}
		end := i
		for end < len(text) && !isDigit(text[end]) {
			end++
		}
		n.after = strings.ToLower(text[i:end])
		all = append(all, n)
	}
	return all
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// supersaturationIn finds "0.30 %", "0.3percent" or "0p3_percent", and a number
// with a point without a unit ("CCN_0.3") up to 10 %. "CCN_030" could be 0.30 or
// 30 and is left to the user.
func supersaturationIn(text string) (float64, bool) {
	var bare []float64
	for _, n := range numbersIn(text) {
		unit := strings.TrimLeft(n.after, " _")
		if strings.HasPrefix(unit, "%") || strings.HasPrefix(unit, "percent") || strings.HasPrefix(unit, "per cent") || strings.HasPrefix(unit, "pct") {
			return n.x / 100, n.x > 0
		}
		const most = 10 // %
		if n.point && n.x > 0 && n.x <= most {
			bare = append(bare, n.x)
		}
	}
	if len(bare) == 1 {
		return bare[0] / 100, true
	}
	return 0, false
}

// diameterIn finds "50.3 nm", "0.05um" and ranges such as "45.2-50.1 nm" or
// "45.2 to 50.1 nm". high is 0 where there is one size only.
func diameterIn(text string) (low, high float64, ok bool) {
	numbers := numbersIn(text)
	for i, n := range numbers {
		u, isLength := lengthUnit(n.after)
		if !isLength || !(n.x > 0) {
			continue
		}
		if i > 0 {
			p := numbers[i-1]
			between := strings.Trim(p.after, " _")
			if _, same := lengthUnit(between); same {
				between = strings.Trim(strings.TrimLeft(between, "nmuµ"), " _")
			}
			if (between == "-" || between == "to" || between == ".." || between == "–") && p.x < n.x && p.x > 0 {
				return u.si(p.x), u.si(n.x), true
			}
		}
		return u.si(n.x), 0, true
	}
	return 0, 0, false
}

// lengthUnit finds nm or µm at the beginning of a text.
func lengthUnit(text string) (unit, bool) {
	text = strings.TrimLeft(text, " _")
	for _, name := range []string{"nm", "um", "µm", "μm"} {
		rest, ok := strings.CutPrefix(text, name)
		if ok && (rest == "" || !('a' <= rest[0] && rest[0] <= 'z')) {
			return length.unit(name)
		}
	}
	return unit{}, false
}
