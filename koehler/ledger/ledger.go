package ledger

import (
	"math"
	"sort"

	"dropcrest/atmos"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

// Status says whether a row has a cost.
type Status int

const (
	Known         Status = iota // the row has a number
	NotKnown                    // what it would take is not known: the reason says what
	NotApplicable               // the particle cannot make this assumption
)

// String returns the status in words.
func (s Status) String() string {
	return [...]string{"known", "not known", "not applicable"}[s]
}

// Row is the cost of one assumption for one particle.
type Row struct {
	Assumption
	Status     Status
	Reason     string // one sentence about this particle; of a known row it may be ""
	Made       bool   // the plain answer makes this assumption
	Change     Values // percent, simplified minus full; NaN where Status is not Known or an outcome does not exist
	Simplified Answer
	Full       Answer // what Simplified is compared with: the fullest answer unless Reason says otherwise
	If         *If    // nil: none
	Pressures  *Pressures

	simple, whole *koehler.Particle // nil: no particle makes the assumption by itself
}

// Particles returns the particle that makes the assumption and the one it is
// compared with, so that it can be asked of other sizes (Particle.Sized) and of
// whole populations. ok is false where no particle makes it: a row without a number,
// and the textbook form, whose crests are those of Particle.Textbook.
func (r Row) Particles() (simplified, full koehler.Particle, ok bool) {
	if r.simple == nil || r.whole == nil {
		return koehler.Particle{}, koehler.Particle{}, false
	}
	return *r.simple, *r.whole, true
}

// If is what a row would cost under a condition that does not hold or is disputed.
type If struct {
	Says   string // "in pure water vapour instead of air"
	Change Values // percent
}

// Pressures stand beside each other to show that the smaller one may be dropped.
// Both belong to the drop at the crest of the fullest model.
type Pressures struct {
	Laplace float64 // 4σ/D, Pa
	Vapour  float64 // change of the vapour's own pressure, e_s (S - 1), Pa
}

// Ledger is what the assumptions about one particle cost.
type Ledger struct {
	Fullest Answer
	Plain   Answer // of what was asked
	Change  Values // percent, plain minus fullest
	Models  []string
	Notes   []atmos.Note // on the fullest model
	Rows    []Row        // in the order of Assumptions
	full    made
}

// book is what the rows are worked out from.
type book struct {
	asked   Asked
	plain   made
	full    made
	refused map[Key]error
	fullest Answer
}

// Make works out the ledger of a particle. Errors are those of solutes.Dissolve,
// koehler.Making.Of and koehler.Particle.Check about what was asked; what the
// fuller models lack is said in the rows.
func Make(a Asked) (Ledger, error) {
	plain, err := a.make()
	if err != nil {
		return Ledger{}, err
	}
	b := &book{asked: a, plain: plain}
	b.full, b.refused = a.fullest(plain)
	b.fullest = answer(b.full.particle, a.SaturationRatio)
	l := Ledger{
		Fullest: b.fullest,
		Plain:   answer(plain.particle, a.SaturationRatio),
		Models:  b.full.dissolved.Models,
		Notes:   b.full.notes,
		full:    b.full,
	}
	l.Change = change(l.Plain.Values, l.Fullest.Values)
	for _, as := range Assumptions() {
		r := as.row(b)
		r.Assumption, r.Made = as, b.isMade(as.Key)
		l.Rows = append(l.Rows, r)
	}
	return l, nil
}

// Particle returns the particle of the fullest model.
func (l *Ledger) Particle() koehler.Particle { return l.full.particle }

// Ranked returns the rows by the size of what they cost in one outcome, the
// largest first; rows without a number come last in the order of Assumptions.
func (l *Ledger) Ranked(o Outcome) []Row {
	rows := append([]Row(nil), l.Rows...)
	size := func(r Row) float64 {
		if x := math.Abs(r.Change[o]); x >= 0 {
			return x
		}
		return -1 // NaN
	}
	sort.SliceStable(rows, func(i, j int) bool { return size(rows[i]) > size(rows[j]) })
	return rows
}

// isMade tells whether the plain answer makes an assumption.
func (b *book) isMade(k Key) bool {
	r := recipe{b.asked.Recipe}
	switch k {
	case VapourPressureChange:
		return b.asked.Kelvin != koehler.PureVapour
	case IncompressibleLiquid:
		return b.asked.Kelvin != koehler.Compressible
	case FlatSurfaceTension:
		return b.asked.TolmanLength == 0
	case ConstantKappa:
		return r.Model == solutes.KappaModel
	case IdealSolute:
		return r.Model == solutes.VantHoff && math.IsNaN(r.VantHoffFactor)
	case PureWaterSurfaceTension:
		return r.TensionRule == solutes.PureWater
	case Convention25C:
		return r.takesConvention()
	case VolumeAdditivity:
		return b.plain.particle.Swelling == nil
	case Sphere:
		return b.asked.Mobility && b.asked.ShapeFactor <= 1
	case CompleteDissolution:
		return len(b.plain.dissolved.Limits) > 0 && !isKept(b.plain.dissolved)
	}
	return false
}

// isKept tells whether the solution follows the solubility of its parts.
func isKept(d solutes.Dissolved) bool {
	for _, l := range d.Limits {
		if l.Kept {
			return true
		}
	}
	return false
}
