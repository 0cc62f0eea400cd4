package counter

import (
	"fmt"
	"math"
	"os"
	"testing"

	"dropcrest/koehler/internal/chunk"

	"gonum.org/v1/gonum/stat/distuv"
)

// truth is an invented scan whose answer is known.
type truth struct {
	d50, width, plateau float64
	double              float64 // constant share, 0: from sizes
	sizes               func(float64) float64
	polarity            Polarity
	counts              float64 // CN expected at each size
	settings            []float64
}

// logSpaced returns n values from a to b.
func logSpaced(a, b float64, n int) []float64 {
	x := make([]float64, n)
	for i := range x {
		x[i] = a * math.Pow(b/a, float64(i)/float64(n-1))
	}
	return x
}

// usual is the scan of the project's own check: 400 counts a point, 8 % doubly
// charged, 30 sizes over a factor 4.
func usual(d50, width float64) truth {
	return truth{d50: d50, width: width, plateau: 0.93, double: 0.08, counts: 400, settings: logSpaced(d50/2, d50*2, 30)}
}

// expected is droplets over particles at a size.
func (w truth) expected(d float64) float64 {
	active := func(D float64) float64 { return 0.5 * math.Erfc(-math.Log(D/w.d50)/w.width/math.Sqrt2) }
	if w.sizes == nil {
		return w.plateau * ((1-w.double)*active(d) + w.double*active(EqualMobility(d, 2, 296.15, 101325)))
	}
	sum := 0.0
	for _, m := range (Classifier{Polarity: w.polarity}).Multiples(nil, d, w.sizes) {
		sum += m.Share * active(m.Diameter)
	}
	return w.plateau * sum
}

// scan draws the two Poisson counts of each point.
func (w truth) scan(seed, replicate uint64) Scan {
	src := chunk.Source(seed, replicate)
	s := Scan{Name: fmt.Sprint("synthetic ", replicate)}
	for _, d := range w.settings {
		s.Points = append(s.Points, Point{
			Setting: d, CN: distuv.Poisson{Lambda: w.counts, Src: src}.Rand(),
			CCN: distuv.Poisson{Lambda: w.counts*w.expected(d) + 1e-12, Src: src}.Rand(),
		})
	}
	return s
}

// aerosol is an invented lognormal aerosol of 40 nm and a geometric standard
// deviation of 1.5.
func aerosol(d float64) float64 {
	z := math.Log(d/40e-9) / math.Log(1.5)
	return math.Exp(-z * z / 2)
}

// record is what many repetitions of a fit say about D50.
type record struct {
	n, covered  int
	bias, sd, u float64 // relative: mean error, its standard deviation, mean stated uncertainty
}

func repeat(t testing.TB, w truth, o Options, n int) record {
	t.Helper()
	bias, square, u := 0.0, 0.0, 0.0
	r := record{n: n}
	results := make([]Fit, n)
	errs := make([]error, n)
	_, _ = chunk.Run(t.Context(), n, 0, func(i int) { results[i], errs[i] = FitScan(w.scan(20, uint64(i)), o) }, nil)
	for i, f := range results {
		if errs[i] != nil {
			t.Fatalf("repetition %d: %v", i, errs[i])
		}
		e := f.Midpoint.Value/w.d50 - 1
		bias += e
		square += e * e
		u += f.Midpoint.Uncertainty / w.d50
		if math.Abs(e) <= 1.959964*f.Midpoint.Uncertainty/w.d50 {
			r.covered++
		}
	}
	r.bias = bias / float64(n)
	r.sd = math.Sqrt(square/float64(n) - r.bias*r.bias)
	r.u = u / float64(n)
	return r
}

func (r record) coverage() float64 { return float64(r.covered) / float64(r.n) }

func (r record) String() string {
	return fmt.Sprintf("%d repetitions: bias %+.4f %%, spread %.3f %%, stated %.3f %%, coverage %.1f %%", r.n, 100*r.bias, 100*r.sd, 100*r.u, 100*r.coverage())
}

// cases of the coverage test; the last has the charges of an aerosol.
func cases() []struct {
	name string
	truth
	Options
} {
	known := usual(60e-9, 0.05)
	sized := usual(60e-9, 0.05)
	sized.double, sized.sizes, sized.polarity = 0, aerosol, Negative
	return []struct {
		name string
		truth
		Options
	}{
		{"narrow, share fitted", usual(60e-9, 0.03), Options{}},
		{"share fitted", usual(60e-9, 0.05), Options{}},
		{"wide, share fitted", usual(60e-9, 0.08), Options{}},
		{"large size, share fitted", usual(120e-9, 0.05), Options{}},
		{"share given", known, Options{Charges: Charges{Double: 0.08}}},
		{"share from the sizes", sized, Options{Charges: Charges{Sizes: aerosol, Classifier: Classifier{Polarity: Negative}}}},
	}
}

// A shorter form of TestLongCoverage: 150 repetitions know the mean to a twelfth
// of the spread (0.05 %) and the coverage to 1.8 %.
func TestBiasAndCoverage(t *testing.T) {
	for _, c := range cases() {
		r := repeat(t, c.truth, c.Options, 150)
		t.Logf("%s: %v", c.name, r)
		if math.Abs(r.bias) > 0.0015 || r.coverage() < 0.895 {
			t.Errorf("%s: %v; want a bias below 0.15 %% and a coverage above 89.5 %%", c.name, r)
		}
	}
}

// The project's own check: mean bias below 0.1 % and coverage of the 95 % interval
// between 93 and 97 % over 1000 repetitions.
func TestLongCoverage(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("set DROPCREST_LONG=1")
	}
	for _, c := range cases() {
		r := repeat(t, c.truth, c.Options, 1000)
		fmt.Printf("%s: %v\n", c.name, r)
		if math.Abs(r.bias) > 0.001 || r.coverage() < 0.93 || r.coverage() > 0.97 {
			t.Errorf("%s: %v; want a bias below 0.1 %% and a coverage of 93 to 97 %%", c.name, r)
		}
	}
}
