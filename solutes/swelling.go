package solutes

import "math"

// referenceWaterDensity is the density of water that the published density
// polynomials start from, kg/m³ at 25 °C.
const referenceWaterDensity = 997.1

// MeasuredDensity is the volume of a drop by published density polynomials
//
//	ρ(x) = ρ_w (1 + Σ 1000 A_i x^i / 997.1)
//
// of the mass fraction x of the solute (in percent), which hold at 25 °C; the
// factor makes x = 0 the density ρ_w of water at the temperature. Parts of a
// mixture add their volumes, each at the mass fraction of the whole solution. A
// part without a polynomial keeps its dry volume. Beyond the end of a polynomial
// the tangent of its specific volume against x is held. Insoluble parts count
// with their dry volume.
//
// Sources: Tang & Munkelwitz 1994, Tang 1996 (see Concentrated).
type MeasuredDensity struct {
	waterDensity float64
	solute       float64 // kg of dissolving parts per m³ of dry particle
	insoluble    float64 // volume share
	parts        []densityPart
}

type densityPart struct {
	weight  float64 // of the solute's mass
	dry     float64 // m³/kg; used when there is no polynomial
	known   bool
	a       [4]float64 // of ρ/ρ_w
	end     float64    // percent
	value   float64    // ρ_w/ρ at the end
	tangent float64    // and its slope a percent
}

func newDensityPart(s Substance, weight float64) densityPart {
	p := densityPart{weight: weight, dry: 1 / s.Density.Value}
	c := s.Concentrated
	if c == nil || len(c.Density) == 0 {
		return p
	}
	p.known, p.end = true, c.MaxMassPercent
	for i, a := range c.Density {
		p.a[i] = a * 1000 / referenceWaterDensity
	}
	p.value, p.tangent = p.inRange(p.end)
	return p
}

// inRange returns ρ_w/ρ and its slope by x.
func (p *densityPart) inRange(x float64) (value, slope float64) {
	rho := 1 + x*(p.a[0]+x*(p.a[1]+x*(p.a[2]+x*p.a[3])))
	rhoSlope := p.a[0] + x*(2*p.a[1]+x*(3*p.a[2]+x*4*p.a[3]))
	return 1 / rho, -rhoSlope / (rho * rho)
}

// volume returns m³ a kg of solution and its slope by x.
func (p *densityPart) volume(x, waterDensity float64) (value, slope float64) {
	switch {
	case !p.known:
		return x/100*p.dry + (1-x/100)/waterDensity, (p.dry - 1/waterDensity) / 100
	case x > p.end:
		value, slope = p.value+p.tangent*(x-p.end), p.tangent
	default:
		value, slope = p.inRange(x)
	}
	return value / waterDensity, slope / waterDensity
}

// Swell returns the volume of the drop per volume of dry particle and its
// derivative by ln u.
func (d *MeasuredDensity) Swell(u float64) (v, slope float64) {
	water := u * d.waterDensity
	mass := d.solute + water
	x := 100 * d.solute / mass
	xSlope := -x * water / mass
	volume, byX := 0.0, 0.0
	for i := range d.parts {
		value, s := d.parts[i].volume(x, d.waterDensity)
		volume += d.parts[i].weight * value
		byX += d.parts[i].weight * s
	}
	return d.insoluble + mass*volume, water*volume + mass*byX*xSlope
}

// MostMassPercent returns the end of the shortest polynomial in percent of the
// solution's mass; +Inf: no limit.
func (d *MeasuredDensity) MostMassPercent() float64 {
	end := math.Inf(1)
	for _, p := range d.parts {
		if p.known {
			end = min(end, p.end)
		}
	}
	return end
}

// LeastWater returns u at the end of the shortest polynomial; 0: no limit.
func (d *MeasuredDensity) LeastWater() float64 {
	end := d.MostMassPercent()
	if math.IsInf(end, 1) {
		return 0
	}
	return d.solute * (100 - end) / (end * d.waterDensity)
}
