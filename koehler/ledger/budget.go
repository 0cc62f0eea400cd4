package ledger

import (
	"math"
	"sort"

	"dropcrest/atmos"
)

// Contribution is the part of the uncertainty that one input makes.
type Contribution struct {
	Input
	Sensitivity Values // ∂ ln y/∂x, per unit of the input
	Percent     Values // of the outcome, with its sign: sensitivity times standard uncertainty
	Share       Values // of the variance of the outcome
}

// Relative returns ∂ ln y/∂ ln x of one outcome, the power by which it follows the
// input.
func (c Contribution) Relative(o Outcome) float64 { return c.Sensitivity[o] * c.Value }

// Budget is the uncertainty of the fullest answer by the law of propagation, JCGM
// 100:2008, 5.1.2.
type Budget struct {
	Answer        Answer
	Contributions []Contribution // in the order of the inputs
	Combined      Values         // percent of the outcome, one standard uncertainty

	// The tension of water follows the temperature, so the two are correlated: an
	// error of the thermometer is one of the tension too. The contribution of the
	// temperature holds both, that of the tension only what it does not owe to
	// the temperature, and these two are independent.
	Correlation float64 // of temperature and all of the tension, -1 to 0

	// FixedTension is what the sensitivity to the temperature would be if the
	// tension did not follow it.
	FixedTension Values

	model  Model
	inputs []Input
}

// NewBudget propagates the uncertainties of the inputs, those of Ledger.Inputs as
// they are or with uncertainties of the caller's own, through the fullest model.
// An error wraps koehler.ErrInput.
func NewBudget(l *Ledger, inputs []Input) (Budget, error) {
	if err := check(inputs); err != nil {
		return Budget{}, err
	}
	v := l.deviating(inputs)
	b := propagate(l.Fullest.Values, inputs, func(x *Deviation) Values { return v.answer(x).Values }, 0)
	b.Answer = l.Fullest
	tension, temperature := -1, -1
	for i, in := range inputs {
		switch in.Quantity {
		case SurfaceTension:
			tension = i
		case Temperature:
			temperature = i
		}
	}
	if tension >= 0 && temperature >= 0 {
		b.correlate(v.follows(), b.Contributions[temperature], b.Contributions[tension])
	}
	return b, nil
}

// correlate works out how temperature and tension hang together; follows is dσ/dT.
func (b *Budget) correlate(follows float64, temperature, tension Contribution) {
	fixed := temperature.Sensitivity
	if follows != 0 {
		owed := follows * temperature.StandardUncertainty
		if all := math.Hypot(owed, tension.StandardUncertainty); all > 0 {
			b.Correlation = owed / all
		}
		for o := range fixed {
			fixed[o] -= tension.Sensitivity[o] * follows
		}
	}
	b.FixedTension = fixed
}

// follows is dσ/dT of the drop's tension, N/(m K): 0 for a tension that was given.
func (v *deviating) follows() float64 {
	if v.full.dissolved.Film == nil {
		var up, down Deviation
		up[Temperature], down[Temperature] = temperatureStep, -temperatureStep
		const dilute = 1e9
		a, _ := v.tension(v.full.dissolved.Tension, &up).SurfaceTension(dilute)
		b, _ := v.tension(v.full.dissolved.Tension, &down).SurfaceTension(dilute)
		return (a - b) / (2 * temperatureStep)
	}
	T := v.full.particle.Temperature
	return (atmos.SurfaceTension(T+temperatureStep) - atmos.SurfaceTension(T-temperatureStep)) / (2 * temperatureStep)
}

// Ranked returns the contributions by their size in one outcome, the largest first.
func (b *Budget) Ranked(o Outcome) []Contribution {
	c := append([]Contribution(nil), b.Contributions...)
	sort.SliceStable(c, func(i, j int) bool { return math.Abs(c[i].Percent[o]) > math.Abs(c[j].Percent[o]) })
	return c
}

// Need is an input that must be known better.
type Need struct {
	Input
	Needed float64 // standard uncertainty to be reached, in the unit of the input
}

// Reach says what must be measured better, and how well, so that the combined
// standard uncertainty of an outcome comes down to that many percent. It cuts the
// largest contributions to a common level and leaves the smaller ones as they are,
// which touches the fewest inputs; the largest comes first. None: it is there
// already. percent must be above 0, otherwise the result is nil too.
func (b *Budget) Reach(o Outcome, percent float64) []Need {
	if !(percent > 0) || !(b.Combined[o] > percent) {
		return nil
	}
	ranked := b.Ranked(o)
	rest := b.Combined[o] * b.Combined[o]
	level := 0.0
	n := 0
	for i, c := range ranked {
		rest -= c.Percent[o] * c.Percent[o]
		n = i + 1
		level = math.Sqrt(math.Max(0, percent*percent-math.Max(0, rest)) / float64(n))
		if i+1 == len(ranked) || level >= math.Abs(ranked[i+1].Percent[o]) {
			break
		}
	}
	needs := make([]Need, n)
	for i, c := range ranked[:n] {
		needs[i] = Need{c.Input, c.StandardUncertainty * level / math.Abs(c.Percent[o])}
	}
	return needs
}
