package answer

import (
	"fmt"
	"slices"
	"strings"

	"dropcrest/atmos"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// columnHolds is what a column of a file of points holds.
type columnHolds int

const (
	nothingUsed columnHolds = iota
	nameOfPoint
	drySizeOfPoint
	supersaturationOfPoint
	growthOfPoint
	humidityOfPoint
	temperatureOfPoint
	tensionOfPoint
	transferWidthOfPoint
	widthOfPoint
	plateauOfPoint
)

// heldBy names the quantities by words of a column's name. The first one that fits
// counts.
var heldBy = []struct {
	holds columnHolds
	words []string
	path  scenario.Path
}{
	{transferWidthOfPoint, []string{"transfer"}, "point[0].transfer-width"},
	{widthOfPoint, []string{"width"}, "point[0].width"},
	{plateauOfPoint, []string{"plateau"}, "point[0].plateau"},
	{tensionOfPoint, []string{"tension"}, "surface-tension"},
	{temperatureOfPoint, []string{"temperature", "temp"}, "temperature"},
	{humidityOfPoint, []string{"humidity", "rh"}, "point[0].relative-humidity"},
	{growthOfPoint, []string{"growth", "gf"}, "point[0].growth-factor"},
	{supersaturationOfPoint, []string{"supersaturation", "ss", "sc"}, "point[0].supersaturation"},
	{drySizeOfPoint, []string{"dry", "diameter", "d50", "dp", "dd", "size"}, "point[0].dry-diameter"},
	{nameOfPoint, []string{"name", "label", "id", "sample", "point"}, ""},
}

func (h columnHolds) path() scenario.Path {
	for _, by := range heldBy {
		if by.holds == h {
			return by.path
		}
	}
	return ""
}

// inPercent: a percentage of it may be relative or absolute.
func (h columnHolds) inPercent() bool { return h == supersaturationOfPoint || h == humidityOfPoint }

// mayVary: a standard uncertainty belongs to it.
func (h columnHolds) mayVary() bool {
	return h == drySizeOfPoint || h == supersaturationOfPoint || h == growthOfPoint || h == humidityOfPoint
}

// pointColumn is a column of a file of points.
type pointColumn struct {
	name          string
	holds         columnHolds
	unit          string // as options have it; "" where cells have their own
	isUncertainty bool
	isRelative    bool
	isCommon      bool // to all points
}

// role is what no two columns may hold both.
func (c pointColumn) role() pointColumn {
	return pointColumn{holds: c.holds, isUncertainty: c.isUncertainty, isCommon: c.isCommon}
}

// header reads the names of the columns.
func (f *pointsFile) header() ([]atmos.Note, error) {
	names, err := f.next()
	if err != nil {
		return nil, f.wrong(1, 0, "no header", "names such as dry_diameter_nm,supersaturation_percent")
	}
	var unused []string
	for i, name := range names {
		c, problem, right := columnOf(plain.Clean(name))
		if problem != "" {
			return nil, f.wrongCell(i, problem, right)
		}
		if c.holds == nothingUsed {
			unused = append(unused, fmt.Sprintf("%q", c.name))
		} else if j := slices.IndexFunc(f.columns, func(o pointColumn) bool { return o.role() == c.role() }); j >= 0 {
			return nil, f.wrongCell(i, fmt.Sprintf("%q holds the same as %q", c.name, f.columns[j].name), "one column for each quantity")
		}
		f.columns = append(f.columns, c)
	}
	has := func(h columnHolds) bool {
		return slices.ContainsFunc(f.columns, func(c pointColumn) bool { return c.holds == h && !c.isUncertainty })
	}
	switch {
	case !has(drySizeOfPoint):
		return nil, f.wrong(f.line(), 0, "no column of the dry diameter", "a name such as dry_diameter_nm")
	case !has(supersaturationOfPoint) && !has(growthOfPoint):
		return nil, f.wrong(f.line(), 0, "no column of a supersaturation or a growth factor", "a name such as supersaturation_percent or growth_factor")
	}
	if len(unused) == 0 {
		return nil, nil
	}
	return []atmos.Note{{Code: "columns-unused", Input: "points-file",
		Text: fmt.Sprintf("Not used of %s: %s.", f.name, strings.Join(unused, ", "))}}, nil
}

// columnOf guesses what a column holds from its name.
func columnOf(name string) (c pointColumn, problem, right string) {
	c = pointColumn{name: name}
	stem, unit := splitUnit(name)
	words := strings.FieldsFunc(strings.ToLower(stem), func(r rune) bool {
		return !('a' <= r && r <= 'z') && !('0' <= r && r <= '9')
	})
	has := func(any ...string) bool {
		return slices.ContainsFunc(any, func(w string) bool { return slices.Contains(words, w) })
	}
	c.unit = unit
	if has("wet", "difference", "dew") { // of something else
		return c, "", ""
	}
	for _, by := range heldBy {
		if has(by.words...) {
			c.holds = by.holds
			break
		}
	}
	c.isUncertainty = has("uncertainty", "unc", "std", "stdev", "error", "u")
	if !c.isUncertainty || c.holds == nothingUsed {
		return c, "", ""
	}
	if !c.holds.mayVary() {
		c.holds = nothingUsed
		return c, "", ""
	}
	c.isCommon = has("common", "systematic")
	c.isRelative = has("relative", "rel")
	switch isShare := unit == "%"; {
	case isShare && c.holds.inPercent() && !c.isRelative && !has("absolute", "abs"):
		return c, fmt.Sprintf("%q may be relative or absolute", name), `a name with "relative" or "absolute" in it`
	case isShare && !c.holds.inPercent():
		c.isRelative = true
	case c.isRelative && !isShare:
		return c, fmt.Sprintf("%q is relative and not in percent", name), "a name that ends in _percent"
	}
	return c, "", ""
}

// endsOfNames are the units at the end of a name.
var endsOfNames = []struct{ end, unit string }{
	{"_percent", "%"}, {"_pct", "%"}, {"_nm", "nm"}, {"_um", "um"}, {"_mn_per_m", "mN/m"}, {"_n_per_m", "N/m"}, {"_m", "m"},
	{"_degc", "C"}, {"_c", "C"}, {"_k", "K"},
}

// splitUnit parts a name and its unit: "dry_diameter_nm", "dry diameter (nm)",
// "dry diameter [nm]", "dry diameter, nm".
func splitUnit(name string) (stem, unit string) {
	name = strings.TrimSpace(name)
	for _, pair := range []string{"()", "[]"} {
		if i := strings.LastIndexByte(name, pair[0]); i >= 0 && strings.HasSuffix(name, pair[1:]) {
			return name[:i], percentSign(strings.TrimSpace(name[i+1 : len(name)-1]))
		}
	}
	if i := strings.LastIndex(name, ", "); i >= 0 {
		return name[:i], percentSign(strings.TrimSpace(name[i+2:]))
	}
	for _, e := range endsOfNames {
		if n := len(name) - len(e.end); n > 0 && strings.EqualFold(name[n:], e.end) {
			return name[:n], e.unit
		}
	}
	return name, ""
}

func percentSign(unit string) string {
	if unit == "percent" || unit == "pct" {
		return "%"
	}
	return unit
}
