package solutes

import (
	"fmt"
	"math"
)

// MaxBrineIons is the largest number of species of a Brine.
const MaxBrineIons = 8

// BrineIon is one dissolved species.
type BrineIon struct {
	Name   string  // as written in BrinePair and BrineTheta: "Na+", "SO4--"
	Charge int     // -2 to 2; 0: a neutral species, taken as ideal
	Amount float64 // mol per mol of solute, ≥ 0
}

// BrinePair holds the binary parameters of a cation and an anion, at 25 °C.
// Pairs that are left out have none: only the long-range term acts.
type BrinePair struct {
	Cation, Anion    string
	B0, B1, B2, Cphi float64 // β0, β1, β2 in kg/mol, Cφ in (kg/mol)²; B2 for 2-2 pairs only
}

// BrineTheta is the mixing parameter θ of two ions of like sign, kg/mol.
type BrineTheta struct {
	Ion, Other string
	Theta      float64
}

// Brine is the ion-interaction (Pitzer) model of a solution of many ions, in
// the form of Harvie, Moller and Weare (Geochim. Cosmochim. Acta 48, 723, 1984;
// from memory), without triple parameters ψ:
//
//	Σm (φ-1) = 2 { -A_φ I^1.5/(1+1.2 √I) + Σ m_c m_a (Bφ_ca + Z C_ca)
//	               + Σ_c<c' m_c m_c' Φφ_cc' + Σ_a<a' m_a m_a' Φφ_aa' }
//	Bφ = β0 + β1 exp(-α1 √I) + β2 exp(-α2 √I),  C = Cφ/(2 √|z_c z_a|)
//	Φφ = θ + Eθ + I Eθ'
//
// with I = ½ Σ m z², Z = Σ m |z|; α1 = 2, for 2-2 pairs α1 = 1.4 and α2 = 12.
// Eθ is the electrostatic effect of mixing unequal charges of like sign.
// Immutable, safe for concurrent use; its methods do not allocate.
type Brine struct {
	n      int
	charge [MaxBrineIons]float64
	amount [MaxBrineIons]float64
	total  float64                                // mol of species per mol of solute
	pair   [MaxBrineIons][MaxBrineIons]brineTerms // [i][j], i < j
	debye  float64                                // A_φ, (kg/mol)^½
	mixing bool                                   // Eθ counts
}

// molalities of the species of a Brine, mol per kg of water.
type molalities [MaxBrineIons]float64

// brineTerms are the parameters of two ions: of a pair or of a mixing.
type brineTerms struct {
	b0, b1, b2, c float64 // c is C, not Cφ
	alpha1        float64
	theta         float64
	attract       bool // unlike signs
	unequal       bool // like signs, unequal charges: Eθ
}

// brineB is 1.2 (kg/mol)^½, Pitzer's b for all solutes.
const brineB = 1.2

// brineAlpha2 is α2 of 2-2 pairs.
const brineAlpha2 = 12

// NewBrine makes the model. debye is A_φ at the temperature in (kg/mol)^½; the
// parameters stay those of 25 °C. Errors are of type *UnusableError, or say
// which name is unknown.
func NewBrine(ions []BrineIon, pairs []BrinePair, thetas []BrineTheta, debye float64) (*Brine, error) {
	if err := checkBrine(ions, debye); err != nil {
		return nil, err
	}
	b := &Brine{n: len(ions), debye: debye, mixing: true}
	index := map[string]int{}
	for i, ion := range ions {
		index[ion.Name] = i
		b.charge[i], b.amount[i] = float64(ion.Charge), ion.Amount
		b.total += ion.Amount
	}
	for i := range b.n {
		for j := i + 1; j < b.n; j++ {
			b.pair[i][j] = termsBetween(b.charge[i], b.charge[j])
		}
	}
	for _, p := range pairs {
		t, err := b.between(index, p.Cation, p.Anion, true)
		if err != nil {
			return nil, err
		}
		t.b0, t.b1, t.b2 = p.B0, p.B1, p.B2
		t.c = p.Cphi / (2 * math.Sqrt(math.Abs(b.charge[index[p.Cation]]*b.charge[index[p.Anion]])))
	}
	for _, p := range thetas {
		t, err := b.between(index, p.Ion, p.Other, false)
		if err != nil {
			return nil, err
		}
		t.theta = p.Theta
	}
	return b, nil
}

func termsBetween(zi, zj float64) brineTerms {
	t := brineTerms{alpha1: 2, attract: zi*zj < 0, unequal: zi*zj > 0 && zi != zj}
	if zi*zj == -4 {
		t.alpha1 = 1.4
	}
	return t
}

// between finds the terms of two named ions.
func (b *Brine) between(index map[string]int, name, other string, attract bool) (*brineTerms, error) {
	i, known := index[name]
	j, also := index[other]
	if !known || !also {
		return nil, fmt.Errorf("ion mixture: parameters of %s and %s, should be for two of its ions", name, other)
	}
	t := &b.pair[min(i, j)][max(i, j)]
	if z := b.charge[i] * b.charge[j]; attract && z >= 0 || !attract && z <= 0 {
		return nil, fmt.Errorf("ion mixture: %s and %s, binary parameters are for unlike signs and θ for like signs", name, other)
	}
	return t, nil
}

// neutralTolerance is the largest share of charge that may be left over.
const neutralTolerance = 1e-6

func checkBrine(ions []BrineIon, debye float64) error {
	const model = "ion mixture"
	if len(ions) < 1 || len(ions) > MaxBrineIons {
		return &UnusableError{model, "the number of ions", float64(len(ions)), fmt.Sprintf("1 to %d", MaxBrineIons)}
	}
	sum, positive, negative := 0.0, 0.0, 0.0
	for _, ion := range ions {
		if ion.Charge < -2 || ion.Charge > 2 {
			return &UnusableError{model, "the charge of " + ion.Name, float64(ion.Charge), "from -2 to 2"}
		}
		if !(ion.Amount >= 0) || math.IsInf(ion.Amount, 1) {
			return &UnusableError{model, "the amount of " + ion.Name, ion.Amount, "a finite number of at least 0"}
		}
		sum += ion.Amount
		q := float64(ion.Charge) * ion.Amount
		positive, negative = positive+max(q, 0), negative-min(q, 0)
	}
	switch {
	case !(sum > 0):
		return &UnusableError{model, "the amount of all ions", sum, "above 0"}
	case math.Abs(positive-negative) > neutralTolerance*(positive+negative):
		return &UnusableError{model, "the charge of all ions", positive - negative, "0 (as many positive as negative charges)"}
	case !(debye > 0) || math.IsInf(debye, 1):
		return &UnusableError{model, "the Debye-Hückel slope", debye, "above 0 and finite"}
	}
	return nil
}

// IonsPerSolute returns mol of species per mol of solute.
func (b *Brine) IonsPerSolute() float64 { return b.total }

// Osmotic returns the osmotic coefficient φ at m mol of solute per kg of water,
// m > 0, and its derivative by ln m at fixed proportions, both exact.
func (b *Brine) Osmotic(m float64) (phi, slope float64) {
	mol := b.at(m)
	return b.osmotic(&mol)
}

// at returns the molalities of the species at m.
func (b *Brine) at(m float64) (mol molalities) {
	for i := range b.n {
		mol[i] = m * b.amount[i]
	}
	return mol
}

// osmotic returns φ and its derivative by the logarithm of a common factor of
// all molalities.
func (b *Brine) osmotic(mol *molalities) (phi, slope float64) {
	s := b.strength(mol)
	debye := -b.debye * s.ionic * s.root / (1 + brineB*s.root)
	sum := debye
	change := debye * (1.5 - 0.5*brineB*s.root/(1+brineB*s.root))
	var e unequalMixing
	if b.mixing {
		e = mixUnequal(b.debye, s.ionic, s.root)
	}
	for i := range b.n {
		for j := i + 1; j < b.n; j++ {
			t, mm := &b.pair[i][j], mol[i]*mol[j]
			if mm == 0 {
				continue
			}
			term, dterm := 0.0, 0.0 // per m², its derivative at fixed m²
			switch {
			case t.attract:
				b, db := t.bphi(s.root)
				term, dterm = b+s.charges*t.c, db+s.charges*t.c
			case t.unequal:
				term, dterm = t.theta+e.osmotic, e.osmoticSlope
			default:
				term = t.theta
			}
			sum += mm * term
			change += mm * (2*term + dterm)
		}
	}
	return 1 + 2*sum/s.total, 2 * (change - sum) / s.total
}

// bphi returns Bφ and its derivative by the logarithm of the molality.
func (t *brineTerms) bphi(root float64) (b, slope float64) {
	e1 := t.b1 * math.Exp(-t.alpha1*root)
	b, slope = t.b0+e1, -0.5*t.alpha1*root*e1
	if t.b2 != 0 {
		e2 := t.b2 * math.Exp(-brineAlpha2*root)
		b, slope = b+e2, slope-0.5*brineAlpha2*root*e2
	}
	return b, slope
}

// brineStrength are the sums over the species.
type brineStrength struct {
	ionic, root    float64 // I and √I
	charges, total float64 // Z = Σ m |z| and Σ m
}

func (b *Brine) strength(mol *molalities) (s brineStrength) {
	for i := range b.n {
		z := math.Abs(b.charge[i])
		s.ionic += 0.5 * mol[i] * z * z
		s.charges += mol[i] * z
		s.total += mol[i]
	}
	s.root = math.Sqrt(s.ionic)
	return s
}
