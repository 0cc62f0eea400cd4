package spectrum

import "math"

// Rule is one rule of quality. A measured point is flagged, and still used, or
// rejected when it fails the rule.
type Rule struct {
	Key         string  // for scripts: "settling"
	Says        string  // what it asks for, in words; a reason when it fails
	Unit        string  // of the bounds, SI; "1" for a share, a factor or a number
	Flag        float64 // the bound of a flag, NaN: never flags
	Reject      float64 // the bound of a rejection, NaN: never rejects
	Least, Most float64 // bounds that make sense
	Source      string
	Needs       []string // what must be known of a point, in words; else the rule says nothing
}

// The keys of the rules, in the order in which they are applied.
const (
	Settling     = "settling"
	Stable       = "temperatures-stable"
	CountedFew   = "counted-particles"
	Fraction     = "activated-fraction"
	Depletion    = "depletion"
	SmallDrops   = "drops-in-first-channel"
	Spike        = "local-pollution"
	NumberAgrees = "sized-against-counted"
	Monotonic    = "monotonic"
)

// Defaults returns the rules with their default bounds. They are own choices where
// the source says so; all can be changed.
func Defaults() []Rule {
	nan := math.NaN()
	return []Rule{
		{Settling, "time since the supersaturation changed must reach the bound", "s", nan, 180, 60, 300,
			"a public station data set drops 3 min; own range", []string{"time since change"}},
		{Stable, "the instrument must report stable temperatures", "1", nan, 1, 0, 1,
			"instrument logs carry it", []string{"stable"}},
		{CountedFew, "counted drops must reach the bound (counting error 10 % at 100, 32 % at 10)", "1", 100, 10, 1, 1e6,
			"Poisson statistics; own bounds", []string{"counted drops"}},
		{Fraction, "activated over all particles must stay below the bound, two standard uncertainties allowed", "1", 1, 1.1, 0.5, 2,
			"counting physics; own bounds", []string{"activated", "all particles"}},
		{Depletion, "at 0.2 % and below, activated particles must stay below the bound: they take the vapour from each other", "1/m3", 5e9, nan, 1e8, 1e11,
			"Lathem & Nenes 2011, from memory; 0.2 % own choice", []string{"activated", "supersaturation"}},
		{SmallDrops, "drops must have grown beyond the first size channel", "1", 1, nan, 0, 1,
			"common practice, from memory", []string{"first channel"}},
		{Spike, "all particles must stay below the bound times their running median", "1", 3, nan, 1.1, 100,
			"own bound", []string{"all particles", "running median"}},
		{NumberAgrees, "sized and counted numbers must differ by less than the bound times the counted one", "1", 0.5, nan, 0.05, 5,
			"a public harmonised data set flags 50 %", []string{"sized", "all particles"}},
		{Monotonic, "within one cycle the number must not fall, as the supersaturation rises, by more standard uncertainties than the bound", "1", 2, nan, 0, 10,
			"physics; real air may change, so only where all particles are steady", []string{"cycle"}},
	}
}

// Observed is one measured point with what is known about its making. NaN is
// not known, and rules that need it say nothing.
type Observed struct {
	Supersaturation float64 // fraction, as set
	Activated       float64 // 1/m³
	Uncertainty     float64 // of Activated, one standard uncertainty, 1/m³
	All             float64 // number of all particles, by a counter of its own, 1/m³
	AllUncertainty  float64 // 1/m³
	AllMedian       float64 // running median of All, 1/m³
	Sized           float64 // integral of the size distribution, 1/m³
	Drops           float64 // particles counted in the sampling time
	SinceChange     float64 // s since the supersaturation changed
	Stable          float64 // 1 stable, 0 not
	FirstChannel    float64 // 1 the size of drops peaks in the first channel, 0 not
}

// Unknown returns an Observed of which nothing is known.
func Unknown() Observed {
	nan := math.NaN()
	return Observed{nan, nan, nan, nan, nan, nan, nan, nan, nan, nan, nan}
}

// Tally counts what one rule has done.
type Tally struct {
	Rule              Rule
	Looked            int // points with what the rule needs
	Flagged, Rejected int
}

// Verdict is what the rules say of one point. Rules are keys.
type Verdict struct {
	Rejected string   // the first rule that rejects it, "" where none does
	Flags    []string // all rules that flag it
}

// Judge applies rules to points and counts. It belongs to one goroutine.
type Judge struct{ tallies []Tally }

// NewJudge makes a judge of these rules. A rule whose key is not known, or whose
// bound lies outside what makes sense, is an *InputError.
func NewJudge(rules []Rule) (*Judge, error) {
	j := &Judge{}
	for i, r := range rules {
		if _, ok := measures[r.Key]; !ok && r.Key != Monotonic {
			return nil, unusable("rule "+r.Key, i, math.NaN(), "one of the rules of Defaults")
		}
		for _, bound := range []float64{r.Flag, r.Reject} {
			if !math.IsNaN(bound) && !(bound >= r.Least && bound <= r.Most) {
				return nil, unusable("bound of rule "+r.Key, i, bound, rangeWords(r.Least, r.Most))
			}
		}
		j.tallies = append(j.tallies, Tally{Rule: r})
	}
	return j, nil
}

// Tallies returns what each rule has done so far, in the order of the rules.
func (j *Judge) Tallies() []Tally { return append([]Tally(nil), j.tallies...) }

// lowSupersaturation is where vapour depletion is looked for (own choice).
const lowSupersaturation = 0.002

// measures are what the rules compare with their bounds. A value above the bound
// fails, or one below it where it must reach the bound; NaN says nothing.
var measures = map[string]struct {
	of      func(o Observed) float64
	atLeast bool // must reach the bound
}{
	Settling:   {func(o Observed) float64 { return o.SinceChange }, true},
	Stable:     {func(o Observed) float64 { return o.Stable }, true},
	CountedFew: {func(o Observed) float64 { return o.Drops }, true},
	Fraction:   {fractionAllowed, false},
	Depletion: {func(o Observed) float64 {
		if !(o.Supersaturation <= lowSupersaturation) {
			return math.NaN()
		}
		return o.Activated
	}, false},
	SmallDrops:   {func(o Observed) float64 { return 1 - o.FirstChannel }, true},
	Spike:        {func(o Observed) float64 { return o.All / o.AllMedian }, false},
	NumberAgrees: {func(o Observed) float64 { return math.Abs(o.Sized-o.All) / o.All }, false},
}

// fractionAllowed is the activated fraction less two of its standard uncertainties.
// Uncertainties that are not known allow nothing.
func fractionAllowed(o Observed) float64 {
	f := o.Activated / o.All
	u, all := o.Uncertainty/o.Activated, o.AllUncertainty/o.All
	if math.IsNaN(u) {
		u = 0
	}
	if math.IsNaN(all) {
		all = 0
	}
	return f * (1 - 2*math.Hypot(u, all))
}

// Look applies all rules but Monotonic to one point.
func (j *Judge) Look(o Observed) Verdict {
	var v Verdict
	for i := range j.tallies {
		t := &j.tallies[i]
		m, ok := measures[t.Rule.Key]
		if !ok {
			continue
		}
		value := m.of(o)
		if math.IsNaN(value) || math.IsInf(value, 0) {
			continue
		}
		t.Looked++
		fails := func(bound float64) bool { return value > bound }
		if m.atLeast {
			fails = func(bound float64) bool { return value < bound }
		}
		switch {
		case fails(t.Rule.Reject):
			t.Rejected++
			if v.Rejected == "" {
				v.Rejected = t.Rule.Key
			}
		case fails(t.Rule.Flag):
			t.Flagged++
			v.Flags = append(v.Flags, t.Rule.Key)
		}
	}
	return v
}
