package solutes

// ConstantTension is a surface tension in N/m that the solute does not change.
type ConstantTension float64

// SurfaceTension returns the constant and 0.
func (t ConstantTension) SurfaceTension(float64) (sigma, slope float64) { return float64(t), 0 }

// SeveralMaxima is false: a constant tension leaves the curve its one crest.
func (t ConstantTension) SeveralMaxima() bool { return false }

// LinearTension is the surface tension σ = Water + PerDry/(u + Crystal) of a
// solution whose solutes each raise it by an increment per molality: PerDry = Σ b_i
// c_i with c_i the molality in a volume of water as large as the dry particle. The
// increments are measured up to a few mol/kg; the line is carried on beyond.
type LinearTension struct {
	Water   float64 // N/m, pure water
	PerDry  float64 // N/m
	Crystal float64 // crystal water that dissolves with the solutes, volume per volume of dry particle
}

// SurfaceTension returns σ in N/m and its derivative by ln u.
func (t LinearTension) SurfaceTension(u float64) (sigma, slope float64) {
	rise := t.PerDry / (u + t.Crystal)
	return t.Water + rise, -rise * u / (u + t.Crystal)
}

// SeveralMaxima is false: a rise by a line leaves the curve its one crest.
func (t LinearTension) SeveralMaxima() bool { return false }
