package ascent

import (
	"math"
	"testing"
)

// rodasScalar makes a step of the method on y' = f(y) with the tables of this package:
// the end, the embedded end and the dense output in the middle.
func rodasScalar(f, slope func(y float64) float64, y, h float64) (end, embedded, middle float64) {
	var k [rodasStages]float64
	inverse := 1 / (1/(h*rodasGamma) - slope(y))
	k[0] = f(y) * inverse
	at := y
	for i := 1; i < rodasStages; i++ {
		if i < rodasStages-1 {
			at = y
			for s := range i {
				at += rodasA[i-1][s] * k[s]
			}
		} else {
			at += k[i-1]
		}
		right := f(at)
		for s := range i {
			right += rodasC[i-1][s] / h * k[s]
		}
		k[i] = right * inverse
	}
	end, embedded = at+k[rodasStages-1], at
	d := [2]float64{}
	for s := range 5 {
		d[0] += rodasD[0][s] * k[s]
		d[1] += rodasD[1][s] * k[s]
	}
	return end, embedded, 0.5*y + 0.5*(end+0.5*(d[0]+0.5*d[1]))
}

// The orders of method, embedded method and dense output say that no coefficient is
// wrong: y' = -y² + y/2 from y = 1, whose solution is known.
func TestRodasOrders(t *testing.T) {
	f := func(y float64) float64 { return -y*y + y/2 }
	slope := func(y float64) float64 { return -2*y + 0.5 }
	exact := func(t float64) float64 { return 0.5 / (1 - 0.5*math.Exp(-t/2)) }
	errors := func(n int) (e [3]float64) {
		h := 1 / float64(n)
		y := 1.0
		for i := range n {
			end, embedded, middle := rodasScalar(f, slope, y, h)
			if i == 0 { // local errors, one order more
				e[1] = math.Abs(embedded-exact(h)) / h
				e[2] = math.Abs(middle-exact(h/2)) / h
			}
			y = end
		}
		e[0] = math.Abs(y - exact(1))
		return e
	}
	coarse, fine := errors(16), errors(32)
	for i, c := range []struct {
		name  string
		order float64
	}{{"method", 4}, {"embedded method", 3}, {"dense output", 3}} {
		if got := math.Log2(coarse[i] / fine[i]); math.Abs(got-c.order) > 0.25 {
			t.Errorf("order of the %s: %.3f, want %g (errors %.3g, %.3g)", c.name, got, c.order, coarse[i], fine[i])
		}
	}
	// L-stable: a stiff decay is gone after a step
	end, _, _ := rodasScalar(func(y float64) float64 { return -1e9 * y }, func(float64) float64 { return -1e9 }, 1, 1)
	if math.Abs(end) > 1e-8 {
		t.Errorf("stiff decay leaves %g", end)
	}
}
