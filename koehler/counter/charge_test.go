package counter

import (
	"encoding/json"
	"fmt"
	"math"
	"strconv"
	"testing"

	"dropcrest/koehler/internal/computed"
)

// dma.json of testdata/computed: general-purpose libraries, README there, section
// 10. It takes k and e in all digits.
func TestComputedCharges(t *testing.T) {
	type chargeCase struct {
		Family, ID string
		Input      map[string]float64
		Output     json.RawMessage
	}
	checked := 0
	for _, c := range computed.Read[chargeCase](t, "dma.json") {
		if c.Family != "mobility_and_charge" {
			continue
		}
		var out struct {
			Charge map[string]float64
			SameZ  map[string]float64 `json:"d_same_Z"`
		}
		if err := json.Unmarshal(c.Output, &out); err != nil {
			t.Fatal(err)
		}
		d, T, p := c.Input["d"], c.Input["T"], c.Input["p"]
		for n, want := range out.Charge {
			number, err := strconv.Atoi(n)
			if err != nil {
				t.Fatal(err)
			}
			if number*number == 4 && d < leastDouble {
				continue
			}
			near(t, fmt.Sprintf("%s charge %s relative", c.ID, n), ChargeFraction(d, number, T)/want, 1, 1e-10)
			checked++
		}
		for n, want := range out.SameZ {
			number, _ := strconv.Atoi(n)
			near(t, fmt.Sprintf("%s charge %s diameter relative", c.ID, n), EqualMobility(d, number, T, p)/want, 1, 1e-10)
			checked++
		}
	}
	if checked < 50 {
		t.Errorf("only %d values were checked", checked)
	}
}

// Wiedensohler 1988, Table 1; from memory, computed.
func TestPublishedChargeEquilibrium(t *testing.T) {
	sum := 0.0
	for i, want := range []float64{0.0561, 0.2793, 0.4259, 0.2138, 0.0317} {
		f := ChargeFraction(100e-9, i-2, 293.15)
		near(t, fmt.Sprint("share of charge ", i-2), f, want, 1e-4)
		sum += f
	}
	near(t, "sum at 100 nm", sum, 1.0068, 1e-4)
	for _, nm := range []float64{20, 40, 60, 100, 150} {
		sum := 0.0
		for n := -2; n <= 2; n++ {
			sum += ChargeFraction(nm*1e-9, n, 293.15)
		}
		if sum < 0.98 || sum > 1.0075 {
			t.Errorf("sum at %g nm is %.4f, want 0.98 to 1.007", nm, sum)
		}
	}
	if f := ChargeFraction(15e-9, 2, 293.15); f != 0 {
		t.Errorf("doubly charged at 15 nm: %g, want 0", f)
	}
}

// Slip correction and mean free path of ISO 15900; computed.
func TestPublishedEqualMobility(t *testing.T) {
	want := []float64{43.2, 72.9, 119.2, 151.3, 235.2, 323.6}
	for i, nm := range []float64{30, 50, 80, 100, 150, 200} {
		near(t, fmt.Sprintf("doubly charged for %g nm", nm), 1e9*EqualMobility(nm*1e-9, 2, 296.15, 101325), want[i], 0.1)
	}
}

// The project's own figures for an aerosol of 40 nm and 1.5: the share of multiply
// charged particles falls with size, and depends on the polarity by some 30 %.
func TestSharesOfAnAerosol(t *testing.T) {
	share := func(nm float64, p Polarity) float64 {
		m := Classifier{Polarity: p}.Multiples(nil, nm*1e-9, aerosol)
		sum := 0.0
		for _, k := range m {
			sum += k.Share
		}
		near(t, "sum of shares", sum, 1, 1e-14)
		return 1 - m[0].Share
	}
	for _, p := range []Polarity{Positive, Negative} {
		t.Logf("polarity %d: 40 nm %.2f %%, 150 nm %.2f %%", p, 100*share(40, p), 100*share(150, p))
		if a, b := share(40, p), share(150, p); !(a > 0.015 && a < 0.06 && b < 0.012 && b < a/3) {
			t.Errorf("polarity %d: %.2f %% at 40 nm and %.2f %% at 150 nm", p, 100*a, 100*b)
		}
	}
	near(t, "negative over positive at 40 nm", share(40, Negative)/share(40, Positive), 1.3, 0.1)
	none := Classifier{}.Multiples(nil, 40e-9, func(float64) float64 { return 0 })
	if !math.IsNaN(none[0].Share) {
		t.Errorf("shares of no particles: %v", none)
	}
}

func TestWidthOfTheClassifier(t *testing.T) {
	// Mobility goes with D^-2 for small particles and D^-1 for large ones.
	c := Classifier{}
	near(t, "small", c.TransferWidth(1e-9, 0.1)*math.Sqrt(6)/0.1, 0.5, 0.01)
	near(t, "large", c.TransferWidth(2e-5, 0.1)*math.Sqrt(6)/0.1, 1, 0.02)
}
