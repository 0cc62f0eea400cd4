package solutes

import "math"

// TabazadehNote says what is left out of range in strong sulfuric acid.
const TabazadehNote = "sulfuric acid below a water activity of 0.8 follows Tabazadeh et al. 1997, published for 190 to 260 K; at 298 K it is 0.7 to 1.3 wt% too weak"

// tabazadehTerm holds A, B, C, D of y = A a^B + C a + D.
type tabazadehTerm struct{ a, b, c, d float64 }

func (t tabazadehTerm) at(aw float64) float64 { return t.a*math.Pow(aw, t.b) + t.c*aw + t.d }

// tabazadehRegion holds y at 190 K and at 260 K up to a water activity.
type tabazadehRegion struct {
	below      float64
	cold, mild tabazadehTerm
}

// tabazadehRegions are the three regions of water activity (Tabazadeh, Toon,
// Clegg and Hamill, Geophys. Res. Lett. 24, 1931, 1997; coefficients from
// memory). Swapping the two lower ones makes the molality negative: a test
// holds their order.
func tabazadehRegions() [3]tabazadehRegion {
	return [3]tabazadehRegion{
		{0.05, tabazadehTerm{12.37208932, -0.16125516114, -30.490657554, -2.1133114241},
			tabazadehTerm{13.455394705, -0.1921312255, -34.285174607, -1.7620073078}},
		{0.85, tabazadehTerm{11.820654354, -0.20786404244, -4.807306373, -5.1727540348},
			tabazadehTerm{12.891938068, -0.23233847708, -6.4261237757, -4.9005471319}},
		{1, tabazadehTerm{-180.06541028, -0.38601102592, -93.317846778, 273.88132245},
			tabazadehTerm{-176.95814097, -0.36257048154, -90.469744201, 267.45509988}},
	}
}

// TabazadehMolality returns the molality of sulfuric acid, mol/kg, at a water
// activity 0.01 ≤ aw ≤ 1 and a temperature T, K, published for 190 to 260 K:
//
//	m = y1 + (T - 190) (y2 - y1)/70,  y = A aw^B + C aw + D
//
// Its three regions do not meet: at 260 K the molality jumps at water
// activities of 0.05 and 0.85. Outside 0.01 to 1 the result is NaN.
func TabazadehMolality(aw, T float64) float64 {
	if !(aw >= 0.01 && aw <= 1) {
		return math.NaN()
	}
	for _, r := range tabazadehRegions() {
		if aw <= r.below {
			return r.at(aw, T)
		}
	}
	return math.NaN()
}

func (r tabazadehRegion) at(aw, T float64) float64 {
	cold := r.cold.at(aw)
	return cold + (T-190)*(r.mild.at(aw)-cold)/70
}
