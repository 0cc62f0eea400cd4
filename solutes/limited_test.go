package solutes

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"
)

// kappaByHand is the sum of the definition, written without segments.
func kappaByHand(parts []LimitedPart, u float64) float64 {
	k := 0.0
	for _, p := range parts {
		k += p.Volume * p.Kappa * math.Min(1, u*p.Solubility/p.Volume)
	}
	return k
}

func mustLimited(t testing.TB, parts []LimitedPart) *Limited {
	t.Helper()
	l, err := NewLimited(parts)
	if err != nil {
		t.Fatal(err)
	}
	return l
}

func TestLimitedSegments(t *testing.T) {
	inf := math.Inf(1)
	l := mustLimited(t, []LimitedPart{
		{0.3, 0.2, 0.05},  // dissolves at u = 6
		{0.2, 0.6, inf},   // miscible
		{0.3, 0.1, 0.1},   // at 3
		{0.1, 0.5, 0},     // insoluble
		{0.06, 0.3, 0.02}, // at 3 as well, up to rounding
	})
	if l.Points() < 2 || math.Abs(l.Point(0)-3) > 1e-14 || math.Abs(l.Point(l.Points()-1)-6) > 1e-14 {
		t.Fatalf("points: %d, first %v, last %v", l.Points(), l.Point(0), l.Point(l.Points()-1))
	}
	k, g := l.Segment(0)
	if math.Abs(k-0.12) > 1e-16 || math.Abs(g-(0.01+0.01+0.006)) > 1e-16 {
		t.Errorf("first segment: K %v G %v, want 0.12 and 0.026", k, g)
	}
	k, g = l.Segment(l.Points())
	if math.Abs(k-(0.12+0.06+0.03+0.018)) > 1e-16 || g != 0 {
		t.Errorf("last segment: K %v G %v, want 0.228 and 0", k, g)
	}
}

// Random mixtures agree with the definition, their slope with finite
// differences inside a segment, and they are continuous with slopes that jump
// up at the points.
func TestLimitedAgainstDefinition(t *testing.T) {
	rng := rand.New(rand.NewPCG(1, 2))
	for n := range 2000 {
		parts := randomLimited(rng)
		l := mustLimited(t, parts)
		for range 10 {
			u := math.Exp(rng.Float64()*20 - 8)
			got, slope := l.LnActivity(u)
			if want := -math.Log1p(kappaByHand(parts, u) / u); math.Abs(got-want) > 1e-14*math.Abs(want)+1e-300 {
				t.Fatalf("mixture %d %v: ln a_w(%v) = %v, want %v", n, parts, u, got, want)
			}
			h := 1e-5
			if l.SegmentAt(u*math.Exp(h)) != l.SegmentAt(u*math.Exp(-h)) {
				continue
			}
			up, _ := l.LnActivity(u * math.Exp(h))
			down, _ := l.LnActivity(u * math.Exp(-h))
			if fd := (up - down) / (2 * h); math.Abs(fd-slope) > 1e-8*(math.Abs(slope)+math.Abs(got))+1e-11 {
				t.Fatalf("mixture %d %v: slope(%v) = %v, finite difference %v", n, parts, u, slope, fd)
			}
		}
		for i := range l.Points() {
			at := l.Point(i)
			upper, right := l.LnActivity(at)
			lower, left := l.LnActivity(math.Nextafter(at, 0))
			if math.Abs(upper-lower) > 1e-12*math.Abs(upper) || right < left-1e-15 {
				t.Fatalf("mixture %d %v: at point %v ln a_w %v %v, slope %v %v", n, parts, at, lower, upper, left, right)
			}
		}
	}
}

func randomLimited(rng *rand.Rand) []LimitedPart {
	n := 1 + rng.IntN(MaxLimitedParts)
	parts := make([]LimitedPart, n)
	for i := range parts {
		parts[i] = LimitedPart{(0.1 + rng.Float64()) / (1.1 * float64(n)), rng.Float64(), math.Exp(rng.Float64()*12 - 8)}
		switch rng.IntN(6) {
		case 0:
			parts[i].Solubility = math.Inf(1)
		case 1:
			parts[i].Solubility = 0
		}
	}
	return parts
}

// All miscible: the plain κ mixture.
func TestLimitedWithoutLimit(t *testing.T) {
	l := mustLimited(t, []LimitedPart{{0.25, 1.28, math.Inf(1)}, {0.75, 0.1, math.Inf(1)}})
	if l.Points() != 0 {
		t.Fatalf("%d points, want none", l.Points())
	}
	const kappa = 0.25*1.28 + 0.75*0.1
	for _, u := range []float64{1e-3, 1, 1e3, 1e9} {
		got, slope := l.LnActivity(u)
		if math.Abs(got+math.Log1p(kappa/u)) > 1e-15*math.Abs(got) || math.Abs(slope-kappa/(u+kappa)) > 1e-15*slope {
			t.Errorf("u = %v: %v, %v", u, got, slope)
		}
	}
}

func TestLimitedRefuses(t *testing.T) {
	nan, inf := math.NaN(), math.Inf(1)
	cases := []struct {
		name  string
		parts []LimitedPart
	}{
		{"none", nil},
		{"nine", make([]LimitedPart, 9)},
		{"share 0", []LimitedPart{{0, 0.1, 1}}},
		{"share NaN", []LimitedPart{{nan, 0.1, 1}}},
		{"share 2", []LimitedPart{{2, 0.1, 1}}},
		{"sum", []LimitedPart{{0.6, 0.1, 1}, {0.6, 0.1, 1}}},
		{"kappa below 0", []LimitedPart{{1, -0.1, 1}}},
		{"kappa NaN", []LimitedPart{{1, nan, 1}}},
		{"kappa infinite", []LimitedPart{{1, inf, 1}}},
		{"solubility below 0", []LimitedPart{{1, 0.1, -1}}},
		{"solubility NaN", []LimitedPart{{1, 0.1, nan}}},
	}
	for _, c := range cases {
		_, err := NewLimited(c.parts)
		var u *UnusableError
		if !errors.As(err, &u) || u.Want == "" {
			t.Errorf("%s: error %v, want an *UnusableError", c.name, err)
		}
	}
}

func TestLimitedPanics(t *testing.T) {
	l := mustLimited(t, []LimitedPart{{1, 0.1, 0.02}})
	for name, f := range map[string]func(){
		"point": func() { l.Point(1) }, "segment": func() { l.Segment(2) },
		"point -1": func() { l.Point(-1) }, "segment -1": func() { l.Segment(-1) },
	} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%s: no panic", name)
				}
			}()
			f()
		}()
	}
}

func BenchmarkLimited(b *testing.B) {
	l := mustLimited(b, []LimitedPart{{0.4, 0.1, 0.02}, {0.3, 0.2, 0.1}, {0.3, 0.6, math.Inf(1)}})
	b.ReportAllocs()
	u := 1.0
	for b.Loop() {
		_, s := l.LnActivity(u)
		u = 1 + s
	}
}
