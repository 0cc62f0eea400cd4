package spectrum

import (
	"errors"
	"math"
	"slices"
	"testing"

	"dropcrest/atmos/aerosol"
)

func TestRules(t *testing.T) {
	good := Observed{Supersaturation: 0.002, Activated: 4e8, Uncertainty: 1e7, All: 1e9, AllUncertainty: 2e7, AllMedian: 1e9,
		Sized: 1.1e9, Drops: 2000, SinceChange: 200, Stable: 1, FirstChannel: 0}
	with := func(change func(o *Observed)) Observed {
		o := good
		change(&o)
		return o
	}
	for _, c := range []struct {
		name     string
		o        Observed
		rejected string
		flags    []string
	}{
		{"good", good, "", nil},
		{"unknown", Unknown(), "", nil},
		{"settling", with(func(o *Observed) { o.SinceChange = 179 }), Settling, nil},
		{"unstable", with(func(o *Observed) { o.Stable = 0 }), Stable, nil},
		{"few", with(func(o *Observed) { o.Drops = 99 }), "", []string{CountedFew}},
		{"too few", with(func(o *Observed) { o.Drops = 9 }), CountedFew, nil},
		{"fraction inside its uncertainty", with(func(o *Observed) { o.Activated, o.Uncertainty = 1.02e9, 2e7 }), "", nil},
		{"fraction", with(func(o *Observed) { o.Activated, o.Uncertainty = 1.08e9, 1e7 }), "", []string{Fraction}},
		{"fraction of 1.3", with(func(o *Observed) { o.Activated, o.Uncertainty = 1.3e9, 1e7 }), Fraction, nil},
		{"fraction without uncertainties", with(func(o *Observed) { o.Activated, o.Uncertainty, o.AllUncertainty = 1.05e9, math.NaN(), math.NaN() }), "", []string{Fraction}},
		{"depletion", with(func(o *Observed) { o.Activated, o.All, o.AllMedian, o.Sized = 6e9, 9e9, 9e9, 9e9 }), "", []string{Depletion}},
		{"many at 0.5 %", with(func(o *Observed) {
			o.Supersaturation, o.Activated, o.All, o.AllMedian, o.Sized = 0.005, 6e9, 9e9, 9e9, 9e9
		}), "", nil},
		{"small drops", with(func(o *Observed) { o.FirstChannel = 1 }), "", []string{SmallDrops}},
		{"spike", with(func(o *Observed) { o.AllMedian = 3e8 }), "", []string{Spike}},
		{"sized", with(func(o *Observed) { o.Sized = 4e8 }), "", []string{NumberAgrees}},
		{"several", with(func(o *Observed) { o.SinceChange, o.Drops, o.Sized = 10, 5, 4e9 }), Settling, []string{NumberAgrees}},
	} {
		j, err := NewJudge(Defaults())
		if err != nil {
			t.Fatal(err)
		}
		v := j.Look(c.o)
		if v.Rejected != c.rejected || !slices.Equal(v.Flags, c.flags) {
			t.Errorf("%s: %+v, want %q %v", c.name, v, c.rejected, c.flags)
		}
		rejected, flagged, looked := 0, 0, 0
		for _, tally := range j.Tallies() {
			rejected, flagged, looked = rejected+tally.Rejected, flagged+tally.Flagged, looked+tally.Looked
		}
		if (rejected > 0) != (c.rejected != "") || flagged != len(c.flags) || c.name == "unknown" && looked != 0 {
			t.Errorf("%s: counted %d rejections and %d flags of %d", c.name, rejected, flagged, looked)
		}
	}
}

func TestRulesAreDataAndAdjustable(t *testing.T) {
	for i, r := range Defaults() {
		if r.Says == "" || r.Source == "" || len(r.Needs) == 0 || r.Unit == "" || math.IsNaN(r.Flag) && math.IsNaN(r.Reject) {
			t.Errorf("rule %s is not described: %+v", r.Key, r)
		}
		changed := Defaults()
		changed[i].Flag = changed[i].Most + 1
		var input *InputError
		if _, err := NewJudge(changed); !errors.As(err, &input) || input.Index != i {
			t.Errorf("bound of %s above what makes sense: %v", r.Key, err)
		}
	}
	if _, err := NewJudge([]Rule{{Key: "colour"}}); err == nil {
		t.Error("an unknown rule is taken")
	}
	rules := Defaults()
	rules[0].Reject = 60
	j, err := NewJudge(rules)
	if err != nil {
		t.Fatal(err)
	}
	o := Unknown()
	o.SinceChange = 100
	if v := j.Look(o); v.Rejected != "" {
		t.Errorf("adjusted rule: %+v", v)
	}
}

func TestCycle(t *testing.T) {
	point := func(s, n, u, all float64) Observed {
		o := Unknown()
		o.Supersaturation, o.Activated, o.Uncertainty, o.All = s, n, u, all
		return o
	}
	for name, c := range map[string]struct {
		points []Observed
		want   []int
	}{
		"rising":              {[]Observed{point(0.001, 1e8, 1e6, 1e9), point(0.004, 4e8, 1e6, 1e9), point(0.002, 2e8, 1e6, 1e9)}, nil},
		"falls":               {[]Observed{point(0.004, 1.5e8, 1e6, 1e9), point(0.001, 1e8, 1e6, 1e9), point(0.002, 2e8, 1e6, 1e9)}, []int{0}},
		"inside uncertainty":  {[]Observed{point(0.001, 1e8, 1e6, 1e9), point(0.002, 0.975e8, 1e6, 1e9)}, nil},
		"outside uncertainty": {[]Observed{point(0.001, 1e8, 1e6, 1e9), point(0.002, 0.97e8, 1e6, 1e9)}, []int{1}},
		"air changed":         {[]Observed{point(0.001, 2e8, 1e6, 1e9), point(0.002, 1e8, 1e6, 0.7e9)}, nil},
		"nothing known":       {[]Observed{point(0.001, 2e8, math.NaN(), math.NaN()), point(0.002, 1e8, math.NaN(), math.NaN())}, []int{1}},
		"missing":             {[]Observed{point(0.001, 2e8, 1e6, 1e9), point(0.002, math.NaN(), 1e6, 1e9)}, nil},
	} {
		j, err := NewJudge(Defaults())
		if err != nil {
			t.Fatal(err)
		}
		flagged, rejected := j.LookAtCycle(c.points)
		if !slices.Equal(flagged, c.want) || rejected != nil {
			t.Errorf("%s: %v %v, want %v", name, flagged, rejected, c.want)
		}
	}
}

func TestLevelMean(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		values []float64
		want   float64
	}{{[]float64{1, 100, 2, 3, nan, 4}, 3}, {[]float64{5}, 5}, {[]float64{nan}, nan}, {nil, nan}} {
		if got := LevelMean(slices.Clone(c.values)); got != c.want && !(math.IsNaN(got) && math.IsNaN(c.want)) {
			t.Errorf("level mean of %v = %g, want %g", c.values, got, c.want)
		}
	}
}

// C31 of the field's reference, computed for this project: 50 cm³/min over 60 s.
func TestCountingUncertainty(t *testing.T) {
	for count, percent := range map[float64]float64{100e6: 1.41, 10e6: 4.47, 1e6: 14.1} {
		if got := 100 * CountingUncertainty(count, 50e-6/60, 60); math.Abs(got-percent) > 0.1 {
			t.Errorf("%g per m³: %.3f %%, want %.2f", count, got, percent)
		}
	}
	near(t, "all together", CountUncertainty(0.03, 0.04, 0.1, 1.2), 0.13, 1e-14)
}

// A counter that has 0.22 % where 0.2 % was set is found out.
func TestCrossCheck(t *testing.T) {
	c, err := NewCrossCheck(20e-9, 300e-9, 80)
	if err != nil {
		t.Fatal(err)
	}
	if _, ok := c.Diameter(); ok {
		t.Error("a diameter out of nothing")
	}
	grid := inventedBins(t, 60).Grid()
	r := noise(2)
	for range 40 {
		var air aerosol.Modes
		for _, m := range invented() {
			m.Concentration *= math.Exp(0.4 * r.next())
			m.Median *= math.Exp(0.1 * r.next())
			air = append(air, m)
		}
		n, err := Population{{air, 1, Kappa{0.3, kelvin}}}.Count(0.0022)
		if err != nil {
			t.Fatal(err)
		}
		c.Add(air.Bins(grid), n)
	}
	s, ok := c.Supersaturation(0.3, kelvin)
	if !ok || math.Abs(s/0.0022-1) > 0.005 {
		t.Errorf("supersaturation %.5f, want 0.0022", s)
	}
	for _, bad := range [][2]float64{{0, 1}, {2e-8, 1e-8}, {1e-8, math.Inf(1)}} {
		if _, err := NewCrossCheck(bad[0], bad[1], 10); !errors.Is(err, ErrInput) {
			t.Errorf("%v: %v", bad, err)
		}
	}
}
