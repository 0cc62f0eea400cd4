package solutes

import "math"

// bisulfateConstant is K2 of HSO4- ⇌ H+ + SO4-- at 25 °C, mol/kg (Pitzer, Roy
// and Silvester, J. Am. Chem. Soc. 99, 4930, 1977; from memory).
const bisulfateConstant = 0.0105

// BisulfateNote says what the model of acids and bisulfates leaves out away
// from 25 °C.
const BisulfateNote = "the dissociation constant of bisulfate and the ion parameters are those of 25 °C; only the Debye-Hückel slope follows the temperature"

// bisulfate solves the dissociation of HSO4- in a solution with protons and
// one other cation, for one mol of sulfate in all its forms.
type bisulfate struct {
	ions   *Brine
	acid   float64 // mol of H+ per mol of sulfate, were all of it dissociated
	cation float64 // mol of the other cation
	share  float64 // of HSO4- in the last solution, 0: none yet
	growth float64 // by which it differs from the one before
}

// Places of the ions.
const (
	ionH = iota
	ionHSO4
	ionSO4
	ionM
)

// sulfateIons is the number of ions per mol of sulfate when all is
// dissociated: H and M together carry two charges, and SO4. It is the ν of φ.
const sulfateIons = 3

// newBisulfate makes the model of a sulfate with acid mol of H+ and 2 - acid
// mol of NH4+ or Na+ per mol of sulfate.
//
// Parameters: Pitzer, Roy and Silvester 1977 for H2SO4; Pitzer and Mayorga, J.
// Phys. Chem. 77, 2300, 1973 for the sulfates; Harvie, Moller and Weare 1984
// for Na-HSO4 (all from memory). NH4-HSO4 is not published as far as known
// here: Na-HSO4 stands in for it. θ(HSO4,SO4) = 0 with Eθ counted.
func newBisulfate(acid float64, sodium bool, debye float64) *bisulfate {
	name, sulfate := "NH4+", BrinePair{B0: 0.04088, B1: 0.6585, Cphi: -0.00116}
	if sodium {
		name, sulfate = "Na+", BrinePair{B0: 0.01958, B1: 1.113, Cphi: 0.00497}
	}
	sulfate.Cation, sulfate.Anion = name, "SO4--"
	ions := []BrineIon{{"H+", 1, acid}, {"HSO4-", -1, 0}, {"SO4--", -2, 1}, {name, 1, 2 - acid}}
	pairs := []BrinePair{
		{Cation: "H+", Anion: "HSO4-", B0: 0.2065, B1: 0.5556},
		{Cation: "H+", Anion: "SO4--", B0: 0.0298, Cphi: 0.0438},
		{Cation: name, Anion: "HSO4-", B0: 0.0454, B1: 0.398},
		sulfate,
	}
	brine, err := NewBrine(ions, pairs, nil, debye)
	if err != nil {
		panic(err) // the data above and the caller's A_φ are at fault, no input
	}
	return &bisulfate{ions: brine, acid: acid, cation: 2 - acid}
}

// species are the molalities at m mol of sulfate per kg, p of each mol being
// HSO4-.
func (b *bisulfate) species(m, p float64) (mol molalities) {
	mol[ionH], mol[ionHSO4], mol[ionSO4], mol[ionM] = m*(b.acid-p), m*p, m*(1-p), m*b.cation
	return mol
}

// imbalance is ln of the ion product over K2; it falls with p.
func (b *bisulfate) imbalance(m, p float64) float64 {
	mol := b.species(m, p)
	g := b.ions.lnGamma(&mol)
	return g[ionH] + g[ionSO4] - g[ionHSO4] + math.Log(mol[ionH]*mol[ionSO4]/(mol[ionHSO4]*bisulfateConstant))
}

const (
	shareTiny     = 4e-15 // the share of HSO4- is known to this (absolute)
	shareMaxSteps = 100
)

// associated returns the share p of sulfate that is HSO4- at m mol/kg. It takes
// secant steps, and halves the bracket instead where a step leaves it or the
// one before has not halved the imbalance.
func (b *bisulfate) associated(m, start float64) float64 {
	low, high := 0.0, math.Min(b.acid, 1)
	p := start
	if !(p > low && p < high) {
		p = 0.5 * high
	}
	r, was := b.imbalance(m, p), math.Inf(1)
	// The first step takes the activity coefficients as fixed.
	step := r / (1/(b.acid-p) + 1/(1-p) + 1/p)
	for range shareMaxSteps {
		if r > 0 {
			low = p
		} else {
			high = p
		}
		if math.Abs(step) <= shareTiny || high-low <= shareTiny {
			break
		}
		next := p + step
		if !(next > low && next < high) || math.Abs(r) > 0.5*math.Abs(was) {
			next = 0.5 * (low + high)
			step = next - p
		}
		was, p = r, next
		r = b.imbalance(m, p)
		step *= r / (was - r)
	}
	return p
}

// osmotic returns the stoichiometric φ (ν = 3) at m mol of sulfate per kg.
// A call starts from the shares of the two before, so calls in small steps are
// fast; not for concurrent use.
func (b *bisulfate) osmotic(m float64) float64 {
	p := b.associated(m, b.share+b.growth)
	if b.share > 0 {
		b.growth = p - b.share
	}
	b.share = p
	mol := b.species(m, p)
	phi, _ := b.ions.osmotic(&mol)
	total := b.acid - p + 1 + b.cation
	return phi * total / sulfateIons
}
