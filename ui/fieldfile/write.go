package fieldfile

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"time"

	"dropcrest/ui/plain"
)

// Output is one column to write: its quantity and place, the unit of which
// stands in the name.
type Output struct {
	Name string // as scripts read it; "": made of the role
	Role Role   // its Unit is the unit of the column; "": SI, supersaturation and humidity in percent
	Long string // for ICARTT
}

// percent is the unit of supersaturation and humidity.
const percent = "%"

// unit of an output, with the words for names.
func (o Output) unit() (u unit, key, shown string) {
	d := declared[o.Role.Quantity]
	if d.kind != asNumber || o.Role.Quantity == Number || d.dim.free {
		return unit{1, 1, 0}, "", "none"
	}
	name := o.Role.Unit
	if name == "" {
		name = siNames[d.dim]
	}
	u, ok := d.dim.unit(name)
	if !ok {
		panic("fieldfile: no unit " + name + " of " + d.key)
	}
	if o.Role.Quantity == PerLnDiameter { // cells hold dN/dlog10 D
		u.mul *= perLn
	}
	return u, unitWords.Replace(unitKey(name)), name
}

// siNames are the units that output has where nothing else is asked for.
var siNames = map[*dimension]string{
	concentration: "m-3", length: "m", excess: percent, humidity: percent, heat: "K", heatStep: "K",
	force: "Pa", mass: "kg/m3", speed: "m/s", flow: "m3/s", span: "s",
}

var unitWords = strings.NewReplacer("%", "percent", "cm-3", "per_cm3", "m-3", "per_m3", "/m3", "_per_m3", "/s", "_per_s", "/min", "_per_min", "1/cm3", "per_cm3")

// name of a column: quantity, place and unit, such as "ccn_at_0.3_percent_per_m3".
func (o Output) name() string {
	if o.Name != "" {
		return plain.Clean(o.Name)
	}
	d := declared[o.Role.Quantity]
	_, key, _ := o.unit()
	b := d.key
	switch {
	case o.Role.From > 0:
		b += fmt.Sprintf("_at_%s..%s_nm", short(o.Role.From*1e9), short(o.Role.To*1e9))
	case o.Role.At > 0 && d.at == atDiameter:
		b += fmt.Sprintf("_at_%s_nm", short(o.Role.At*1e9))
	case o.Role.At > 0:
		b += fmt.Sprintf("_at_%s_percent", short(o.Role.At*100))
	}
	if o.Role.Basis == Standard {
		b += "_stp"
	}
	if key != "" {
		b += "_" + key
	}
	return b
}

// stampOf writes a time: RFC 3339, with fractions only where there are any.
func stampOf(b []byte, t time.Time) []byte {
	if t.IsZero() {
		return b
	}
	return t.UTC().AppendFormat(b, time.RFC3339Nano)
}

// digits writes a value with the fewest digits that read back as the same.
func digits(b []byte, x float64) []byte {
	if a := math.Abs(x); a != 0 && (a < 1e-4 || a >= 1e15) {
		return strconv.AppendFloat(b, x, 'e', -1, 64)
	}
	return strconv.AppendFloat(b, x, 'f', -1, 64)
}
