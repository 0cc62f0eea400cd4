package koehler

import (
	"math"
	"math/big"
	"testing"
)

// exactCrest solves u(u+κ) = b x⁴ by halving in 200 bits and returns t. The
// same arguments as SolveKappa; nothing of its algorithm is used.
func exactCrest(dry, kelvin, kappa float64) float64 {
	big200 := func(x float64) *big.Float { return new(big.Float).SetPrec(200).SetFloat64(x) }
	mul := func(a, b *big.Float) *big.Float { return new(big.Float).SetPrec(200).Mul(a, b) }
	add := func(a, b *big.Float) *big.Float { return new(big.Float).SetPrec(200).Add(a, b) }
	one, three, k := big200(1), big200(3), big200(kappa)
	a := new(big.Float).SetPrec(200).Quo(big200(kelvin), big200(dry))
	lo, hi := big200(0), big200(1e9)
	for range 190 {
		t := mul(add(lo, hi), big200(0.5))
		u := mul(t, add(three, mul(t, add(three, t))))
		x := add(one, t)
		x2 := mul(x, x)
		if mul(a, mul(u, add(u, k))).Cmp(mul(mul(three, k), mul(x2, x2))) < 0 {
			lo = t
		} else {
			hi = t
		}
	}
	t, _ := lo.Float64()
	return t
}

func TestSolveKappaOverItsRange(t *testing.T) {
	const A = 2.1e-9
	for _, dry := range []float64{1e-9, 2e-9, 5e-9, 2e-8, 1e-7, 1e-6, 1e-5} {
		for _, kappa := range []float64{1e-12, 1e-9, 1e-6, 1e-4, 1e-3, 0.01, 0.1, 0.5, 1, 2, 3, 5, 10} {
			want := exactCrest(dry, A, kappa)
			got := SolveKappa(dry, A, kappa)
			checkClose(t, "x", got.GrowthFactor, 1+want, 1e-14)
			u := want * (3 + want*(3+want))
			s := (u*math.Expm1(A/dry/(1+want)) - kappa) / (u + kappa)
			checkClose(t, "s", got.Supersaturation, s, 1e-14)
		}
	}
}

func TestKappaInverses(t *testing.T) {
	const A = 2.1e-9
	for _, dry := range []float64{2e-9, 1e-8, 5e-8, 2e-7, 1e-6} {
		previous := math.Inf(1)
		for _, kappa := range []float64{1e-4, 1e-3, 0.01, 0.1, 0.61, 1.28, 2, 10} {
			s := SolveKappa(dry, A, kappa).Supersaturation
			if !(s < previous) {
				t.Errorf("s_c does not fall with κ at %g, %g", dry, kappa)
			}
			previous = s
			k, err := KappaOf(dry, A, s)
			if err != nil {
				t.Errorf("KappaOf(%g, %g): %v", dry, s, err)
			}
			// κ follows from the difference to the Kelvin limit, which keeps
			// fewer digits the closer s is to it
			tol := 1e-12 * (1 + math.Log1p(s)/math.Max(A/dry-math.Log1p(s), 1e-300))
			checkClose(t, "kappa", k, kappa, tol)
			d, err := DryOf(kappa, A, s)
			if err != nil {
				t.Errorf("DryOf(%g, %g): %v", kappa, s, err)
			}
			checkClose(t, "dry", d, dry, 1e-12)
		}
	}
}

// The classic form is the limit of large dry sizes.
func TestClassicLimit(t *testing.T) {
	previous := math.Inf(1)
	for _, dry := range []float64{1e-8, 1e-7, 1e-6, 1e-5, 1e-4} {
		excess := KappaClassic(dry, 2.1e-9, 0.61).Supersaturation/SolveKappa(dry, 2.1e-9, 0.61).Supersaturation - 1
		if !(excess > 0 && excess < previous) {
			t.Errorf("at %g m the classic form is %g too high, before %g", dry, excess, previous)
		}
		previous = excess
	}
	if previous > 1e-5 {
		t.Errorf("the classic form is still %g off at 100 µm", previous)
	}
}
