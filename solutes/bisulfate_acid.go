package solutes

import "math"

// Join of the two models of sulfuric acid in water activity, and the end of
// the second one: below it the next region of Tabazadeh et al. starts with a
// jump to a lower molality, which no solution makes.
const (
	sulfuricIonsDown = 0.80 // the ion model alone above
	sulfuricFitDown  = 0.63 // Tabazadeh et al. alone below
	sulfuricLeast    = 0.05
)

// NewSulfuricAcid returns the solution of sulfuric acid at T, 180 to 373.15 K:
// ion interaction with the bisulfate equilibrium, then Tabazadeh et al. 1997.
// Between water activities of 0.80 and 0.63 the molalities of both at the same
// water activity are blended,
//
//	m = (1-s) m_ions + s m_Tabazadeh,  s = t² (3 - 2t),  t = (0.80 - a_w)/0.17
//
// and the range ends at a water activity of 0.05. At 25 °C φ is within 0.008 of
// Robinson and Stokes 1959 from 0.1 to 4 mol/kg. Above, where the second model
// is used beyond its 260 K, the water activity is up to 0.017 low (0.9 wt% of
// acid at 6 mol/kg); the ion model alone would stay within 0.008 in φ up to 6
// mol/kg there, but has no data in the cold. Errors are of type
// *UnusableError or *NoModelError.
func NewSulfuricAcid(s Substance, T float64) (*OsmoticSolution, error) {
	if s.Key != "sulfuric_acid" {
		return nil, &NoModelError{s.Name, "sulfuric acid"}
	}
	one, err := molalityAtOne(s, T)
	if err != nil {
		return nil, err
	}
	acid := newSulfuric(T)
	top := acid.fit(sulfuricLeast)
	return &OsmoticSolution{
		model: newOsmoticTable(sulfateIons, top, acid.osmotic),
		ions:  sulfateIons, molality: one, highest: top,
	}, nil
}

// sulfuric joins the two models.
type sulfuric struct {
	T    float64
	ions *bisulfate
	join float64 // molality at a_w 0.80
	end  float64 // molality of the ion model alone at a_w 0.63
	last float64 // molality of Tabazadeh et al. there: the blend ends
}

func newSulfuric(T float64) *sulfuric {
	s := &sulfuric{T: T, ions: newBisulfate(2, false, DebyeHueckel(T))}
	// From 180 to 373 K the ion model has these activities between 2 and 8 mol/kg.
	s.join = crossing(2, 8, func(m float64) float64 { return s.ionActivity(m) - sulfuricIonsDown })
	s.end = crossing(2, 8, func(m float64) float64 { return s.ionActivity(m) - sulfuricFitDown })
	s.last = s.fit(sulfuricFitDown)
	s.ions.share = 0
	return s
}

// osmotic returns the stoichiometric φ at m mol/kg.
func (s *sulfuric) osmotic(m float64) float64 {
	var aw float64
	switch {
	case m <= s.join:
		return s.ions.osmotic(m)
	case m < s.last:
		// The molality of the ion model runs through the window.
		q := crossing(s.join, s.end, func(q float64) float64 { return m - s.blended(q, s.ionActivity(q)) })
		aw = s.ionActivity(q)
	default:
		aw = crossing(0.5*sulfuricLeast, sulfuricFitDown, func(aw float64) float64 { return s.fit(aw) - m })
	}
	return -math.Log(aw) / (sulfateIons * waterMolarMass * m)
}

// blended is the molality of the join at the water activity aw, q being that of
// the ion model.
func (s *sulfuric) blended(q, aw float64) float64 {
	t := (sulfuricIonsDown - aw) / (sulfuricIonsDown - sulfuricFitDown)
	w := t * t * (3 - 2*t)
	return (1-w)*q + w*s.fit(aw)
}

// ionActivity is a_w of the ion model.
func (s *sulfuric) ionActivity(m float64) float64 {
	return math.Exp(-sulfateIons * waterMolarMass * m * s.ions.osmotic(m))
}

// fit is the middle region of Tabazadeh et al., at its ends too.
func (s *sulfuric) fit(aw float64) float64 { return tabazadehRegions()[1].at(aw, s.T) }

// crossing returns where f, positive at low and negative at high, is zero, to
// 1e-15 of high: the secant rule of Illinois inside the bracket.
func crossing(low, high float64, f func(float64) float64) float64 {
	fl, fh := f(low), f(high)
	side := 0
	for range 100 {
		x := (low*fh - high*fl) / (fh - fl)
		if !(x > low && x < high) {
			x = 0.5 * (low + high)
		}
		fx := f(x)
		if fx == 0 || high-low <= 1e-15*high {
			return x
		}
		if fx > 0 {
			low, fl = x, fx
			if side > 0 {
				fh *= 0.5
			}
			side = 1
		} else {
			high, fh = x, fx
			if side < 0 {
				fl *= 0.5
			}
			side = -1
		}
	}
	return 0.5 * (low + high)
}
