package solutes

import "math"

// unequalMixing is the electrostatic effect of mixing ions of charges 1 and 2
// of like sign.
type unequalMixing struct {
	theta, thetaPrime     float64 // Eθ and dEθ/dI
	osmotic, osmoticSlope float64 // Eθ + I Eθ' and its derivative by ln I
}

// mixUnequal returns it at the ionic strength I (root is √I):
//
//	Eθ = z_i z_j/(4 I) [J(x_ij) - ½ J(x_ii) - ½ J(x_jj)],  x_ij = 6 z_i z_j A_φ √I
//
// (Pitzer, J. Solution Chem. 4, 249, 1975; from memory). Charges 1 and 2 are
// the only unequal ones that a Brine takes, so z_i z_j = 2.
func mixUnequal(debye, ionic, root float64) (e unequalMixing) {
	x := 6 * debye * root
	j11, d11, c11 := pitzerJ(x)
	j12, d12, c12 := pitzerJ(2 * x)
	j22, d22, c22 := pitzerJ(4 * x)
	j := j12 - 0.5*(j11+j22)
	d := d12 - 0.5*(d11+d22) // x J'
	c := c12 - 0.5*(c11+c22) // d(x J')/d ln x
	e.theta = j / (2 * ionic)
	e.osmotic = d / (4 * ionic)
	e.thetaPrime = (e.osmotic - e.theta) / ionic
	e.osmoticSlope = 0.5*c/(4*ionic) - e.osmotic
	return e
}

// pitzerJ returns Pitzer's approximation of the integral of mixing,
//
//	J(x) = x/(4 + 4.581 x^-0.7237 exp(-0.0120 x^0.528)),
//
// its derivative by ln x (that is x J'), and the derivative of that by ln x.
// Source: Pitzer 1975, as above.
func pitzerJ(x float64) (j, slope, curve float64) {
	const c1, c2, c3, c4 = 4.581, 0.7237, 0.0120, 0.528
	lnx := math.Log(x)
	y := c3 * math.Exp(c4*lnx)
	q := c1 * math.Exp(-c2*lnx-y)
	p := c2 + c4*y   // -d ln q / d ln x
	r := c4 * c4 * y // dp / d ln x
	d := 4 + q
	qp := q * p / d
	j = x / d
	slope = j * (1 + qp)
	curve = j*(1+qp)*(1+qp) + j*(q*(r-p*p)/d+qp*qp)
	return j, slope, curve
}
