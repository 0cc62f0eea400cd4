package koehler

// Solved is what Crest, Extrema and Haze say of one particle. What does not
// exist has its error beside it.
type Solved struct {
	Crest            Crest
	NoCrest          error
	Extrema          []Extremum
	Stable, Unstable State // the zero State where there is none
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
	crest, scanned, err := p.barrier(&c)
	s.Crest, s.NoCrest = crest, err
	s.Extrema, _ = p.allExtrema(crest, scanned, err)
	switch ratio := checkRatio(S); {
	case ratio != nil:
		s.NoHaze = ratio
	case err != nil:
		s.NoHaze = err
	default:
		s.Stable, s.Unstable, s.NoHaze = p.haze(&c, S, crest, scanned)
	}
	return s
}
