package solutes

import "math"

// LnGamma writes the natural logarithms of the activity coefficients of the
// species, in their order, at m mol of solute per kg of water, m > 0; molal
// scale. It panics when dst is not as long as there are species.
//
//	ln γ_i = z² F + |z| Σ m_c m_a C_ca + Σ_j m_j (2 B_ij + Z C_ij) + Σ_k 2 m_k Φ_ik
//	F = -A_φ [√I/(1+1.2√I) + (2/1.2) ln(1+1.2√I)] + Σ m_c m_a B'_ca + Σ m m' Φ'
//
// (j of unlike, k of like sign; Harvie, Moller and Weare 1984, from memory).
func (b *Brine) LnGamma(dst []float64, m float64) {
	if len(dst) != b.n {
		panic("solutes: length of dst is not the number of species")
	}
	mol := b.at(m)
	out := b.lnGamma(&mol)
	copy(dst, out[:b.n])
}

// lnGamma returns ln γ of all species.
func (b *Brine) lnGamma(mol *molalities) (out molalities) {
	s := b.strength(mol)
	f := -b.debye * (s.root/(1+brineB*s.root) + 2/brineB*math.Log1p(brineB*s.root))
	triples := 0.0
	var e unequalMixing
	if b.mixing {
		e = mixUnequal(b.debye, s.ionic, s.root)
	}
	for i := range b.n {
		for j := i + 1; j < b.n; j++ {
			t := &b.pair[i][j]
			var pull float64
			switch {
			case t.attract:
				bt, prime := t.b(s.ionic, s.root)
				f += mol[i] * mol[j] * prime
				triples += mol[i] * mol[j] * t.c
				pull = 2*bt + s.charges*t.c
			case t.unequal:
				f += mol[i] * mol[j] * e.thetaPrime
				pull = 2 * (t.theta + e.theta)
			default:
				pull = 2 * t.theta
			}
			out[i] += mol[j] * pull
			out[j] += mol[i] * pull
		}
	}
	for i := range b.n {
		z := math.Abs(b.charge[i])
		out[i] += z*z*f + z*triples
	}
	return out
}

// b returns B = β0 + β1 g(α1 √I) + β2 g(α2 √I) and dB/dI.
func (t *brineTerms) b(ionic, root float64) (b, prime float64) {
	b = t.b0
	if t.b1 != 0 {
		g, d := brineG(t.alpha1 * root)
		b, prime = b+t.b1*g, t.b1*d/ionic
	}
	if t.b2 != 0 {
		g, d := brineG(brineAlpha2 * root)
		b, prime = b+t.b2*g, prime+t.b2*d/ionic
	}
	return b, prime
}

// brineG returns g(x) = 2 (1 - (1+x) e^-x)/x² and half its derivative by ln x,
// g' = -2 (1 - (1+x+x²/2) e^-x)/x². Below 0.02 both are series, where the
// difference would cancel.
func brineG(x float64) (g, half float64) {
	if x < 0.02 {
		return 1 - x*(2./3-x*(1./4-x*(1./15-x/72))), -x * (1./3 - x*(1./4-x*(1./10-x*(1./36-x/168))))
	}
	e := math.Exp(-x)
	return 2 * (1 - (1+x)*e) / (x * x), -2 * (1 - (1+x+0.5*x*x)*e) / (x * x)
}
