package koehler

// Solved is what Crest, Extrema, Equilibria and Haze say of one particle. What
// does not exist has its error beside it.
type Solved struct {
	Crest            Crest
	NoCrest          error
	Extrema          []Extremum
	Drops            []Equilibrium // all of them, in the order of their wet size
	Stable, Unstable State         // those of Haze; the zero State where there is none
	NoHaze           error
}

// Solve returns the crest, the extrema and the drops at the saturation ratio S
// by one search, which costs most where a curve must be scanned.
func (p Particle) Solve(S float64) (s Solved) {
	if err := p.Check(); err != nil {
		s.NoCrest, s.NoHaze = err, err
		return s
	}
	c := p.ready()
	var room [16]Turn
	crest, turns, err := c.barrier(room[:0])
	s.Crest, s.NoCrest = crest, err
	s.Extrema = c.extrema(turns)
	if s.Drops, s.NoHaze = c.equilibria(nil, turns, S); s.NoHaze == nil {
		s.Stable, s.Unstable, s.NoHaze = haze(s.Drops, S)
	}
	return s
}
