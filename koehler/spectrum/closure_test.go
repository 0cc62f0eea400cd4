package spectrum

import (
	"math"
	"slices"
	"testing"

	"gonum.org/v1/gonum/stat"
)

func invent(n int) (predicted, measured []float64) {
	r := noise(5)
	for range n {
		m := 3e8 * math.Exp(0.6*r.next())
		measured = append(measured, m)
		predicted = append(predicted, m*1.05*math.Exp(0.2*r.next())+1e7)
	}
	return predicted, measured
}

// Every figure against the textbook formula in two passes.
func TestAgreement(t *testing.T) {
	p, m := invent(501)
	var c Closure
	ratios, logs := make([]float64, len(p)), make([]float64, len(p))
	var sum struct{ p, m, pm, mm, abs, square, log2 float64 }
	within := map[string]float64{}
	for i := range p {
		if !c.Add(p[i], m[i]) {
			t.Fatal("refused")
		}
		r := p[i] / m[i]
		ratios[i], logs[i] = r, math.Log(r)
		sum.p, sum.m, sum.pm, sum.mm = sum.p+p[i], sum.m+m[i], sum.pm+p[i]*m[i], sum.mm+m[i]*m[i]
		sum.abs, sum.square, sum.log2 = sum.abs+math.Abs(p[i]-m[i]), sum.square+(p[i]-m[i])*(p[i]-m[i]), sum.log2+logs[i]*logs[i]
		for name, b := range map[string]float64{"10": 0.1, "20": 0.2, "30": 0.3} {
			if math.Abs(r-1) <= b {
				within[name] += 1.0 / float64(len(p))
			}
		}
		if r >= 0.5 && r <= 2 {
			within["2"] += 1.0 / float64(len(p))
		}
	}
	slices.Sort(ratios)
	n := float64(len(p))
	intercept, slope := stat.LinearRegression(m, p, nil, false)
	a := c.Agreement()
	// of 501 values the quantiles are values themselves
	for _, x := range []struct {
		what      string
		got, want float64
	}{
		{"p05", a.P05, ratios[25]}, {"p25", a.P25, ratios[125]}, {"median", a.Median, ratios[250]},
		{"p75", a.P75, ratios[375]}, {"p95", a.P95, ratios[475]},
		{"geometric mean", a.GeometricMean, math.Exp(stat.Mean(logs, nil))}, {"gsd", a.GSD, math.Exp(stat.StdDev(logs, nil))},
		{"through origin", a.ThroughOrigin, sum.pm / sum.mm},
		{"slope", a.Ordinary.Slope, slope}, {"intercept", a.Ordinary.Intercept, intercept},
		{"R²", a.RSquared, math.Pow(stat.Correlation(m, p, nil), 2)},
		{"bias", a.MeanBias, sum.p/sum.m - 1}, {"error", a.MeanError, sum.abs / sum.m},
		{"rms", a.RootMeanSquare, math.Sqrt(sum.square / n)}, {"log rms", a.LogRootMeanSquare, math.Sqrt(sum.log2 / n)},
		{"within 10", a.Within10, within["10"]}, {"within 20", a.Within20, within["20"]},
		{"within 30", a.Within30, within["30"]}, {"within 2", a.WithinFactor2, within["2"]},
	} {
		near(t, x.what, x.got, x.want, 1e-11)
	}
	if a.Pairs != 501 || a.Refused != 0 || !a.ExactQuantiles {
		t.Errorf("%+v", a)
	}
}

// The orthogonal line does not care which axis is which, and minimises what it says.
func TestOrthogonalLine(t *testing.T) {
	p, m := invent(200)
	var c, swapped Closure
	for i := range p {
		c.Add(p[i], m[i])
		swapped.Add(m[i], p[i])
	}
	line := c.Agreement().Orthogonal
	near(t, "swapped", swapped.Agreement().Orthogonal.Slope, 1/line.Slope, 1e-12)
	distance := func(l Line) (sum float64) {
		for i := range p {
			d := p[i] - l.Slope*m[i] - l.Intercept
			sum += d * d / (1 + l.Slope*l.Slope)
		}
		return sum
	}
	least := distance(line)
	for _, l := range []Line{{line.Slope * 1.001, line.Intercept}, {line.Slope * 0.999, line.Intercept}, {line.Slope, line.Intercept * 1.01}, {line.Slope, line.Intercept * 0.99}} {
		if distance(l) < least {
			t.Errorf("%+v is nearer than %+v", l, line)
		}
	}
}

func TestClosureAtItsEdges(t *testing.T) {
	var c Closure
	a := c.Agreement()
	for what, x := range map[string]float64{"median": a.Median, "slope": a.Ordinary.Slope, "bias": a.MeanBias, "gsd": a.GSD, "within": a.Within10} {
		if !math.IsNaN(x) {
			t.Errorf("%s of nothing is %g", what, x)
		}
	}
	for _, pair := range [][2]float64{{1, 0}, {1, math.NaN()}, {math.NaN(), 1}, {-1, 1}, {1, math.Inf(1)}, {math.Inf(1), 1}} {
		if c.Add(pair[0], pair[1]) {
			t.Errorf("%v taken", pair)
		}
	}
	c.Add(0, 4) // predicted nothing: a ratio of 0, no logarithm
	c.Add(6, 4)
	a = c.Agreement()
	near(t, "median", a.Median, 0.75, 1e-15)
	near(t, "geometric mean", a.GeometricMean, 1.5, 1e-15)
	if a.Refused != 6 || a.Pairs != 2 || !math.IsNaN(a.Ordinary.Slope) {
		t.Errorf("%+v", a)
	}
}

func TestClosuresByLevel(t *testing.T) {
	var c Closures
	c.Add(0.001, 1, 1)
	c.Add(0.0010004, 2, 1)
	c.Add(0.002, 3, 1)
	c.Add(math.NaN(), 3, 1)
	if got := c.Levels(); !slices.Equal(got, []float64{0.001, 0.002}) {
		t.Errorf("levels %v", got)
	}
	if n := c.At(0.001).Agreement().Pairs; n != 2 || c.All.Agreement().Pairs != 4 || c.At(0.003) != nil {
		t.Errorf("%d pairs at 0.1 %%", n)
	}
	for i := range 200 {
		c.Add(0.003+1e-4*float64(i), 1, 1)
	}
	if n := len(c.Levels()); n != mostLevels || c.All.Agreement().Pairs != 204 {
		t.Errorf("%d levels", n)
	}
}

// Beyond what is kept the quantiles stay within their stated error, and memory
// stays what it is.
func TestQuantilesOfVeryMany(t *testing.T) {
	var q Quantiles
	all := make([]float64, 0, exactRatios+1000)
	r := uint64(1)
	for range cap(all) {
		r = r*6364136223846793005 + 1442695040888963407
		x := math.Exp(3 * (float64(r>>11)/(1<<53) - 0.5))
		all = append(all, x)
		q.Add(x)
		if len(all) == exactRatios && !q.Exact() {
			t.Error("not exact although all are kept")
		}
	}
	if q.Exact() || q.values != nil {
		t.Error("still keeps all")
	}
	slices.Sort(all)
	shares := []float64{0, 0.05, 0.25, 0.5, 0.75, 0.95, 1}
	for i, got := range q.At(shares...) {
		near(t, "quantile", got, quantileOf(all, shares[i]), QuantileError*1.01)
	}
	q.Add(0)
	q.Add(1e300)
	near(t, "least", q.At(0)[0], 1e-6, 2*QuantileError)
}
