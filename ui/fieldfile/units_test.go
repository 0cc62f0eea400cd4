package fieldfile

import (
	"math"
	"testing"
)

// Every spelling is read, and reading what is written gives the number again.
func TestUnits(t *testing.T) {
	for _, c := range []struct {
		dim  *dimension
		name string
		x    float64
		want float64
	}{
		{concentration, "cm-3", 1, 1e6}, {concentration, "# / cm^3", 1, 1e6}, {concentration, "#/cc", 1, 1e6}, {concentration, "cm**-3", 1, 1e6},
		{concentration, "cm⁻³", 1, 1e6}, {concentration, "1/cm3", 1, 1e6}, {concentration, "particles/cm3", 1, 1e6}, {concentration, "per_cm3", 1, 1e6},
		{concentration, "L-1", 1, 1e3}, {concentration, "m-3", 1, 1},
		{length, "nm", 100, 1e-7}, {length, "µm", 0.25, 2.5e-7}, {length, "um", 0.25, 2.5e-7}, {length, "m", 1, 1},
		{excess, "%", 0.3, 0.003}, {excess, "percent", 0.3, 0.003}, {excess, "per cent", 0.3, 0.003}, {excess, "fraction", 0.003, 0.003},
		{excess, "saturation ratio", 1.5, 0.5}, {excess, "%RH", 150, 0.5},
		{heat, "°C", 20, 293.15}, {heat, "degC", 20, 293.15}, {heat, "K", 20, 20},
		{force, "hPa", 1013.25, 101325}, {force, "mbar", 1013.25, 101325}, {force, "atm", 1, 101325}, {force, "mmHg", 760, 101325.0144354},
		{mass, "µg m-3", 5, 5e-9}, {mass, "ug/m³", 5, 5e-9}, {mass, "ng m^-3", 5, 5e-12},
		{flow, "L/min", 60, 1e-3}, {flow, "cm3/min", 60e6, 1}, {speed, "cm s-1", 50, 0.5}, {span, "min", 2, 120},
		{none, "", 2, 2}, {none, "no unit", 2, 2}, {none, "unitless", 2, 2},
	} {
		u, ok := c.dim.unit(c.name)
		if !ok {
			t.Errorf("%q is no unit of %s", c.name, c.dim.says)
			continue
		}
		if got := u.si(c.x); math.Abs(got-c.want) > 1e-15*math.Abs(c.want)+1e-13*math.Abs(u.add) {
			t.Errorf("%v %s: got %v, want %v", c.x, c.name, got, c.want)
		}
		if back := u.fromSI(u.si(c.x)); math.Abs(back-c.x) > 1e-12*math.Abs(c.x) {
			t.Errorf("%v %s comes back as %v", c.x, c.name, back)
		}
	}
	for _, c := range []struct {
		dim  *dimension
		name string
	}{{concentration, ""}, {concentration, "K"}, {length, "cm-3"}, {excess, "1"}, {excess, ""}, {heat, ""}, {heat, "F"}, {force, "psi"}, {none, "%"}} {
		if _, ok := c.dim.unit(c.name); ok {
			t.Errorf("%q is a unit of %s", c.name, c.dim.says)
		}
	}
}

// Every quantity is declared, with a name that no other has and a unit to write.
func TestDeclarations(t *testing.T) {
	seen := map[string]bool{}
	for q := range Quantities {
		d := declared[q]
		if d.key == "" || d.says == "" || seen[d.key] {
			t.Errorf("quantity %d: %+v", q, d)
		}
		seen[d.key] = true
		if d.kind == asNumber && !d.dim.free {
			if _, ok := d.dim.unit(d.dim.shown); !ok {
				t.Errorf("%s is shown in %q, which is no unit of it", d.key, d.dim.shown)
			}
			if _, ok := d.dim.unit(siNames[d.dim]); !ok {
				t.Errorf("%s is written in %q, which is no unit of it", d.key, siNames[d.dim])
			}
		}
	}
}
