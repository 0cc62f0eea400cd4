package figure

import (
	"math"
	"strconv"
	"strings"
)

// scaled is m times ten to the power of n, as near as a float64 comes to it:
// 5/100 is the number that prints as 0.05, 5*0.01 need not be.
func scaled(m float64, n int) float64 {
	if n < 0 {
		return m / math.Pow10(-n)
	}
	return m * math.Pow10(n)
}

// roundUp is the smallest of the given leading digits times a power of ten that
// is not below v. The digits end with 10.
func roundUp(v float64, digits ...float64) float64 {
	n := int(math.Floor(math.Log10(v)))
	for _, m := range digits {
		if u := scaled(m, n); u >= v*(1-1e-9) {
			return u
		}
	}
	return scaled(10, n)
}

// roundRows lays rows rows over low..high: one row is a round unit and zero
// lies on a row. Low and high are widened to include zero.
func roundRows(low, high float64, rows int) (lo, hi, step float64) {
	low, high = math.Min(low, 0), math.Max(high, 0)
	if !(high-low > 1e-90) {
		high = 1
	}
	steps := rows - 1
	step = (high - low) / float64(steps)
	for range 6 {
		step = roundUp(step, 1, 2, 2.5, 5, 10)
		first := int(math.Floor(low/step + 1e-9))
		if float64(first+steps) >= high/step-1e-9 {
			return tidy(float64(first)*step, step), tidy(float64(first+steps)*step, step), step
		}
		step *= 1.01
	}
	// Two rows cannot show both signs: show the greater.
	step = roundUp(math.Max(high, -low)/float64(steps), 1, 2, 2.5, 5, 10)
	if high >= -low {
		return 0, tidy(float64(steps)*step, step), step
	}
	return tidy(-float64(steps)*step, step), 0, step
}

// freeRows is roundRows without the need to show zero.
func freeRows(low, high float64, rows int) (lo, hi, step float64) {
	if least := 1e-6 * math.Max(math.Abs(low), math.Abs(high)); !(high-low > least) {
		room := math.Max(math.Abs(low)/10, 1e-90) // one value: a tenth of it on both sides
		low, high = low-room, high+room
	}
	steps := float64(rows - 1)
	step = (high - low) / steps
	for {
		step = roundUp(step, 1, 2, 2.5, 5, 10)
		first := math.Floor(low/step + 1e-9)
		if first+steps >= high/step-1e-9 {
			return tidy(first*step, step), tidy((first+steps)*step, step), step
		}
		step *= 1.01
	}
}

// twoDigits rounds a positive v to two significant digits by floor or ceil.
func twoDigits(v float64, round func(float64) float64) float64 {
	n := int(math.Floor(math.Log10(v))) - 1
	m := scaled(v, -n)
	if near := math.Round(m); math.Abs(m-near) < 1e-9 {
		return scaled(near, n)
	}
	return scaled(round(m), n)
}

// Tick is one labelled value of an axis.
type Tick struct {
	Value float64
	Label string
}

// Ticks are the labelled values of the axis between lo and hi, at most most of
// them.
func (a Axis) Ticks(lo, hi float64, most int) []Tick {
	if a.Time {
		return timeTicks(lo, hi, most)
	}
	var at []Tick
	for _, v := range Ticks(lo, hi, a.Log, most) {
		at = append(at, Tick{v, TickLabel(v)})
	}
	return at
}

// Ticks returns round values between lo and hi, at most most of them: 1, 2, 5
// times powers of ten on a logarithmic axis, whole multiples of such a number
// on a linear one and on a logarithmic one too short for three of them.
func Ticks(lo, hi float64, log bool, most int) []float64 {
	if !(lo < hi) || !usable(lo) || !usable(hi) || most < 1 || (log && lo <= 0) {
		return nil
	}
	if log {
		if at := decadeTicks(lo, hi, most); len(at) >= 3 || hi/lo >= 10 {
			return at
		}
	}
	step := roundUp((hi-lo)/float64(max(most-1, 1)), 1, 2, 5, 10)
	var at []float64
	for k := math.Ceil(lo/step - 1e-9); k*step <= hi+1e-9*step && len(at) < most; k++ {
		at = append(at, tidy(k*step, step))
	}
	return at
}

// decadeTicks takes 1, 2 and 5 of each decade, or the powers of ten alone, or
// every second, third … power, whatever is the first that does not exceed most.
func decadeTicks(lo, hi float64, most int) []float64 {
	first, last := int(math.Floor(math.Log10(lo))), int(math.Ceil(math.Log10(hi)))
	take := func(every int, digits ...float64) (at []float64) {
		for n := first; n <= last; n++ {
			for _, m := range digits {
				v := scaled(m, n)
				if n%every == 0 && v >= lo*(1-1e-9) && v <= hi*(1+1e-9) {
					at = append(at, v)
				}
			}
		}
		return at
	}
	if at := take(1, 1, 2, 5); len(at) <= most {
		return at
	}
	for every := 1; ; every++ {
		if at := take(every, 1); len(at) <= most {
			return at
		}
	}
}

// tidy rounds a multiple of step to the digits of step, so that 3*0.1 is 0.3.
func tidy(v, step float64) float64 {
	n := int(math.Floor(math.Log10(step)))
	r := scaled(math.Round(scaled(v, 2-n)), n-2)
	if r == 0 {
		return 0 // not -0
	}
	return r
}

// TickLabel writes a round value: plainly where that is short, with a power of
// ten where it is not.
func TickLabel(v float64) string {
	if a := math.Abs(v); v != 0 && (a < 0.000099 || a >= 99999.5) {
		return short(strconv.FormatFloat(v, 'e', -1, 64))
	}
	return strconv.FormatFloat(v, 'f', -1, 64)
}

// short takes the padding out of an exponent: 2e-09 is 2e-9, 1e+06 is 1e6.
func short(s string) string {
	mantissa, power, ok := strings.Cut(s, "e")
	n, err := strconv.Atoi(power)
	if !ok || err != nil {
		return s
	}
	return mantissa + "e" + strconv.Itoa(n)
}
