package fieldfile

import (
	"bytes"
	"fmt"
	"slices"
	"strings"
)

// flagClass says what EBAS makes of a value with that flag.
type flagClass byte

const (
	valid   flagClass = 'V'
	invalid flagClass = 'I'
	absent  flagClass = 'M'
	below   flagClass = 'B' // below the limit of detection, the value is the limit
)

type flagMeaning struct {
	class flagClass
	says  string
}

// ebasFlags are the flags with a meaning here. Sources: the submission manual of
// EBAS for 100 to 220; the others from memory.
var ebasFlags = map[int]flagMeaning{
	100: {valid, "checked, valid, overrides invalid flags"},
	110: {valid, "episode data checked and accepted"},
	111: {valid, "irregular data checked and accepted"},
	120: {valid, "sample re-analysed"},
	147: {valid, "below detection limit, but valid"},
	185: {valid, "possible local contamination"},
	186: {valid, "possible local contamination"},
	187: {valid, "possible local contamination"},
	188: {valid, "possible local contamination"},
	189: {valid, "possible local contamination"},
	190: {valid, "optical data not corrected"},
	191: {valid, "optical data not corrected"},
	210: {valid, "checked by the co-ordinator"},
	211: {valid, "checked by the co-ordinator"},
	220: {valid, "preliminary"},
	390: {valid, "data completeness below 50 %"},
	392: {valid, "data completeness below 75 %"},
	394: {valid, "data completeness below 90 %"},
	459: {invalid, "extreme value"},
	460: {invalid, "contamination suspected"},
	559: {valid, "local influence, but valid"},
	640: {valid, "humidity of the instrument above 40 %"},
	780: {below, "below detection limit"},
	781: {below, "below detection limit"},
	980: {absent, "missing for calibration or zero"},
	990: {absent, "missing"},
	999: {absent, "missing"},
}

// overrides makes a value count whatever else flags it.
const overrides = 100

// readFlags decodes the text of a flag column: 0. and three digits a flag. It
// works on the text, because 0.147559001 as a float has lost its digits.
func (f *File) readFlags(codes []int, field []byte) ([]int, bool) {
	field = bytes.TrimSpace(field)
	first, digits, _ := bytes.Cut(field, []byte("."))
	if len(first) != 1 {
		return codes, false
	}
	for _, d := range digits {
		if d < '0' || d > '9' {
			return codes, false
		}
	}
	if first[0] == '9' && len(bytes.Trim(digits, "9")) == 0 {
		f.notes.add("flag_missing", f.row.line, "the flag itself is missing (%s): the values are taken as missing", quoted(field))
		return append(codes, 999), true
	}
	if first[0] != '0' {
		return codes, false
	}
	for i := 0; i < len(digits); i += 3 {
		code := 0
		for j := i; j < i+3; j++ {
			code *= 10
			if j < len(digits) { // trailing zeros may have been dropped: 0.46 is 460
				code += int(digits[j] - '0')
			}
		}
		if code != 0 {
			codes = append(codes, code)
		}
	}
	return codes, true
}

// judge applies the flags to a cell: invalid and missing ones drop the value
// unless 100 is among them; unknown ones keep it and are noted.
func (f *File) judge(c *Cell, codes []int) {
	if len(codes) == 0 || c.State != Value {
		return
	}
	if slices.Contains(codes, overrides) {
		return
	}
	for _, code := range codes {
		m, known := ebasFlags[code]
		switch {
		case !known:
			f.notes.add("flag"+itoa(code), f.row.line, "flag %03d is not known here: values are kept", code)
		case m.class == invalid || m.class == absent:
			f.flags.add(code)
			*c = Cell{}
			return
		case m.class == below:
			c.State = Below
		}
	}
}

// flagCount counts the values that flags dropped.
type flagCount struct{ by map[int]int }

func (n *flagCount) add(code int) {
	if n.by == nil {
		n.by = map[int]int{}
	}
	n.by[code]++
}

// Dropped is how many values each flag made missing.
func (f *File) Dropped() map[int]int {
	out := map[int]int{}
	for code, n := range f.flags.by {
		out[code] = n
	}
	return out
}

// FlagSays is the meaning of an EBAS flag in words.
func FlagSays(code int) string {
	if m, ok := ebasFlags[code]; ok {
		return m.says
	}
	return "not known here"
}

func (n *flagCount) notes() []Note {
	var out []Note
	for code, count := range n.by {
		out = append(out, Note{Code: "dropped" + itoa(code), Count: count,
			Text: fmt.Sprintf("%d values left out for flag %03d (%s)", count, code, FlagSays(code))})
	}
	slices.SortFunc(out, func(a, b Note) int { return strings.Compare(a.Code, b.Code) })
	return out
}
