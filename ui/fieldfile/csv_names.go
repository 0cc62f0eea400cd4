package fieldfile

import "strings"

// csvUnit finds the unit in a column's name: "ccn (cm-3)", "ccn [cm-3]", "ccn,
// cm-3" or, as this program writes, "ccn_per_cm3", "diameter_nm". What follows
// "seconds since" is the unit of a time.
func csvUnit(name string) (unit, time string) {
	for _, pair := range []string{"()", "[]"} {
		if i := strings.LastIndexByte(name, pair[0]); i >= 0 && strings.HasSuffix(name, pair[1:]) {
			unit = strings.TrimSpace(name[i+1 : len(name)-1])
		}
	}
	if unit == "" {
		if i := strings.LastIndex(name, ", "); i >= 0 && isUnit(name[i+1:]) {
			unit = strings.TrimSpace(name[i+1:])
		}
	}
	if unit == "" {
		unit = suffixUnit(name)
	}
	if _, ok := parseTimeUnit(unit); ok {
		return unit, unit
	}
	return unit, ""
}

// suffixes of names that are units.
var suffixes = []string{"_per_cm3", "_cm-3", "_cm3", "_per_m3", "_m-3", "_percent", "_pct", "_nm", "_um", "_hpa", "_pa", "_mbar",
	"_degc", "_c", "_k", "_ug_per_m3", "_ugm3", "_ug_m3", "_m_per_s", "_l_per_min", "_lpm", "_m", "_s"}

// suffixUnit is the unit at the end of a name. "_cm3" and "_m3" behind a number
// concentration leave out the "per".
func suffixUnit(name string) string {
	switch longest := strings.ToLower(suffixOf(name)); longest {
	case "":
		return ""
	case "_cm3":
		return "1/cm3"
	case "_ugm3", "_ug_m3", "_ug_per_m3":
		return "ug/m3"
	case "_per_m3":
		return "1/m3"
	case "_per_cm3":
		return "1/cm3"
	case "_m_per_s":
		return "m/s"
	case "_l_per_min":
		return "L/min"
	}
	return suffixOf(name)[1:]
}

// suffixOf is the longest suffix of a name that is a unit.
func suffixOf(name string) string {
	longest := 0
	for _, s := range suffixes {
		if n := len(name) - len(s); n >= 0 && strings.EqualFold(name[n:], s) {
			longest = max(longest, len(s))
		}
	}
	return name[len(name)-longest:]
}
