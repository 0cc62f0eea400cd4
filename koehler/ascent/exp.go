package ascent

// mostSmall is the largest argument of expSmall.
const mostSmall = 0.5

// expSmall returns exp(4t) for 0 ≤ 4t ≤ mostSmall: Taylor's polynomial of degree 7
// in t, squared twice. Its relative error is below 1e-11 at the end of that range and
// falls with the eighth power. The Kelvin factor is all it is used for, in the loops
// over the drops, where a call of math.Exp would be a third of the time.
func expSmall(t float64) float64 {
	t2 := t * t
	e := 1 + t2*(1./2+t2*(1./24+t2*(1./720))) + t*(1+t2*(1./6+t2*(1./120+t2*(1./5040))))
	e *= e
	return e * e
}
