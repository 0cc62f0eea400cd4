package aerosol

import "math"

// Gaps tells what Fill had to do.
type Gaps struct {
	Filled  []int // bins whose value was interpolated
	Trimmed []int // bins at the ends without a value, set to 0
}

// Fill replaces missing values (NaN) of a row of densities, dN/dlnD or
// dN/dlog10D, in place. Inside, a gap of up to widest bins is bridged linearly
// in ln D; at the ends a missing bin is set to 0, which the caller must say. A
// wider gap, or a row without any value, is an *InputError.
func Fill(g *Grid, densities []float64, widest int) (Gaps, error) {
	var gaps Gaps
	if len(densities) != g.Len() {
		return gaps, &InputError{"number of values", -1, float64(len(densities)), "one a bin"}
	}
	last := -1 // the last bin with a value
	for i, v := range densities {
		if math.IsNaN(v) {
			continue
		}
		if gap := i - last - 1; gap > widest && last >= 0 {
			return gaps, &InputError{"bin", last + 1, math.NaN(), "a value: too many in a row are missing to interpolate"}
		}
		for k := last + 1; k < i; k++ {
			if last < 0 {
				densities[k] = 0
				gaps.Trimmed = append(gaps.Trimmed, k)
				continue
			}
			x := (g.middleLn(k) - g.middleLn(last)) / (g.middleLn(i) - g.middleLn(last))
			densities[k] = densities[last] + x*(v-densities[last])
			gaps.Filled = append(gaps.Filled, k)
		}
		last = i
	}
	if last < 0 {
		return gaps, &InputError{"bin", 0, math.NaN(), "a value: every bin is missing"}
	}
	for k := last + 1; k < len(densities); k++ {
		densities[k] = 0
		gaps.Trimmed = append(gaps.Trimmed, k)
	}
	return gaps, nil
}

func (g *Grid) middleLn(i int) float64 { return (g.ln[i] + g.ln[i+1]) / 2 }
