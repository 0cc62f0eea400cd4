package spectrum

import (
	"slices"

	"dropcrest/atmos/aerosol"
)

// Scaled returns the size distribution with every dry diameter by times as large,
// above 0, each particle kept. ok is false for sizes of a type that this package
// does not know, or that the factor takes out of the range of sizes.
func Scaled(sizes Sizes, by float64) (scaled Sizes, ok bool) {
	switch s := sizes.(type) {
	case aerosol.Mode:
		s.Median *= by
		return s, true
	case aerosol.Modes:
		s = slices.Clone(s)
		for i := range s {
			s[i].Median *= by
		}
		return s, true
	case *aerosol.Bins:
		b, err := s.Resized(func(d float64) float64 { return d * by })
		return b, err == nil
	}
	return sizes, false
}
