package fieldfile

import (
	"math"
	"slices"
	"strings"
)

// unit is one unit of a dimension: SI value = number·mul/div + add. Both factors
// are whole numbers wherever the definition allows it, so that 100 nm is 1e-7 m
// to the last bit.
type unit struct {
	mul, div, add float64
}

func (u unit) si(x float64) float64 {
	if u.div != 1 {
		return x*u.mul/u.div + u.add
	}
	return x*u.mul + u.add
}

// fromSI is the inverse of si.
func (u unit) fromSI(x float64) float64 { return (x - u.add) * u.div / u.mul }

// dimension is a kind of number with its units. Names are compared after
// unitKey. The first name of shown is the one the program writes.
type dimension struct {
	says  string
	shown string
	units map[string]unit
	free  bool // a number without a unit is one too
}

// unitKey makes the spellings of a unit alike: "# / cm^3", "#/cc", "cm**-3".
func unitKey(s string) string {
	s = strings.ToLower(strings.TrimSpace(s))
	s = unitSpelling.Replace(s)
	return strings.TrimSuffix(strings.TrimPrefix(s, "#"), ".")
}

var unitSpelling = strings.NewReplacer(
	" ", "", "^", "", "**", "", "·", "", "*", "", "_", "", "µ", "u", "μ", "u",
	"⁻", "-", "¹", "1", "²", "2", "³", "3", "−", "-", "per", "/", "°", "deg", "particles", "#",
)

func same(u unit, names ...string) map[string]unit {
	m := map[string]unit{}
	for _, n := range names {
		m[n] = u
	}
	return m
}

func join(maps ...map[string]unit) map[string]unit {
	all := map[string]unit{}
	for _, m := range maps {
		for k, u := range m {
			all[k] = u
		}
	}
	return all
}

// The dimensions. Factors are definitions of SI, its prefixes, the degree
// Celsius, the atmosphere and the millimetre of mercury (133.322387415 Pa).
var (
	none = &dimension{says: "number", units: same(unit{1, 1, 0}, "", "1", "none", "unitless", "nounit", "dimensionless"), free: true}

	concentration = &dimension{says: "number concentration", shown: "cm-3", units: join(
		same(unit{1e6, 1, 0}, "cm-3", "1/cm3", "/cm3", "/cc", "1/cc", "cc-1", "#/cm3", "#/cc", "#cm-3", "1cm-3"),
		same(unit{1e3, 1, 0}, "l-1", "1/l", "/l", "#/l"),
		same(unit{1, 1, 0}, "m-3", "1/m3", "/m3", "#/m3"))}

	length = &dimension{says: "length", shown: "nm", units: join(
		same(unit{1, 1e9, 0}, "nm", "nanometer", "nanometre"), same(unit{1, 1e6, 0}, "um", "micron", "micrometer", "micrometre"),
		same(unit{1, 1e3, 0}, "mm"), same(unit{1, 1, 0}, "m"))}

	excess = &dimension{says: "supersaturation", shown: "%", units: join(
		same(unit{1, 100, 0}, "%", "/cent", "pct"), same(unit{1, 1, 0}, "fraction"),
		same(unit{1, 1, -1}, "saturationratio"), same(unit{1, 100, -1}, "%rh"))}

	humidity = &dimension{says: "relative humidity", shown: "%", units: join(
		same(unit{1, 100, 0}, "%", "%rh", "/cent", "pct"), same(unit{1, 1, 0}, "fraction", "1"))}

	heat = &dimension{says: "temperature", shown: "K", units: join(
		same(unit{1, 1, 0}, "k", "kelvin"), same(unit{1, 1, 273.15}, "c", "degc", "celsius", "degreec", "degreecelsius"))}

	heatStep = &dimension{says: "temperature difference", shown: "K", units: same(unit{1, 1, 0}, "k", "kelvin", "c", "degc", "celsius")}

	force = &dimension{says: "pressure", shown: "hPa", units: join(
		same(unit{100, 1, 0}, "hpa", "mbar", "mb", "millibar"), same(unit{1, 1, 0}, "pa"), same(unit{1e3, 1, 0}, "kpa"),
		same(unit{1e5, 1, 0}, "bar"), same(unit{101325, 1, 0}, "atm"), same(unit{133.322387415, 1, 0}, "mmhg", "torr"))}

	mass = &dimension{says: "mass concentration", shown: "ug/m3", units: join(
		same(unit{1, 1e9, 0}, "ug/m3", "ugm-3", "ug/m-3", "microgram/m3"), same(unit{1, 1e12, 0}, "ng/m3", "ngm-3"),
		same(unit{1, 1e6, 0}, "mg/m3", "mgm-3"), same(unit{1, 1e3, 0}, "g/m3"), same(unit{1, 1, 0}, "kg/m3", "kgm-3"))}

	speed = &dimension{says: "speed", shown: "m/s", units: join(same(unit{1, 1, 0}, "m/s", "ms-1"), same(unit{1, 100, 0}, "cm/s", "cms-1"))}

	flow = &dimension{says: "flow", shown: "L/min", units: join(
		same(unit{1, 60000, 0}, "l/min", "lmin-1", "lpm", "slpm", "vlpm"),
		same(unit{1, 6e7, 0}, "cm3/min", "cc/min", "ccm", "sccm", "vccm", "cm3min-1", "ml/min"), same(unit{1, 1, 0}, "m3/s", "m3s-1"))}

	span = &dimension{says: "duration", shown: "s", units: join(same(unit{1, 1, 0}, "s", "sec", "seconds"), same(unit{60, 1, 0}, "min"), same(unit{3600, 1, 0}, "h"))}
)

// unit finds a unit by any of its spellings.
func (d *dimension) unit(name string) (unit, bool) {
	u, ok := d.units[unitKey(name)]
	if !ok && d.free && strings.TrimSpace(name) == "" {
		return unit{1, 1, 0}, true
	}
	return u, ok
}

// dimensions are all of them.
var dimensions = []*dimension{none, concentration, length, excess, humidity, heat, heatStep, force, mass, speed, flow, span}

// isUnit reports whether a text is a unit of anything, or of a time.
func isUnit(text string) bool {
	if _, ok := parseTimeUnit(text); ok {
		return true
	}
	return slices.ContainsFunc(dimensions, func(d *dimension) bool {
		_, ok := d.unit(text)
		return ok && strings.TrimSpace(text) != ""
	})
}

// right says which units there are, by example.
func (d *dimension) right() string {
	if d.free {
		return "no unit"
	}
	return "a unit of " + d.says + " such as " + d.shown
}

// perLn makes dN/dlog10 D of dN/dln D.
const perLn = math.Ln10
