package answer

import (
	"math"

	"dropcrest/koehler"
)

// CurveFacts is the JSON object of the Curve question. Scripts rely on its keys.
type CurveFacts struct {
	CriticalSupersaturation Number        `json:"critical_supersaturation_percent"`
	CriticalWetRadius       Number        `json:"critical_wet_radius_m"`
	CriticalWetDiameter     Number        `json:"critical_wet_diameter_m"`
	CriticalGrowthFactor    Number        `json:"critical_growth_factor"`
	CriticalWaterActivity   Number        `json:"critical_water_activity"`
	CriticalMolality        Number        `json:"critical_molality_mol_per_kg"`
	CrestTension            Number        `json:"surface_tension_at_crest_n_per_m"`
	BarrierKind             *string       `json:"barrier_kind"`                   // of the highest extremum; null without one
	BarrierPosition         *string       `json:"barrier_position"`               // only | first | middle | last
	AlreadyDissolved        *DissolvedRow `json:"already_dissolved"`              // null where solubility limits nothing
	Deliquescence           Number        `json:"deliquescence_humidity_percent"` // over a flat surface
	Efflorescence           Number        `json:"efflorescence_humidity_percent"`
	DeliquescenceOver       Number        `json:"deliquescence_humidity_over_particle_percent"`
	Extrema                 []ExtremumRow `json:"extrema"`
	Haze                    []HazeRow     `json:"haze"`
	Textbook                *TextbookRow  `json:"textbook"` // null when the cubic form does not exist
	Curve                   []CurveRow    `json:"curve"`
}

// ExtremumRow is one extremum of the equilibrium curve.
type ExtremumRow struct {
	Kind            string `json:"kind"` // maximum | minimum | kink_minimum | boundary_maximum
	WetRadius       Number `json:"wet_radius_m"`
	Supersaturation Number `json:"supersaturation_percent"`
}

// HazeRow is the drop at the humidity looked at.
type HazeRow struct {
	Branch           string `json:"branch"` // stable | unstable | metastable | dry | partly_dissolved | dissolved
	RelativeHumidity Number `json:"relative_humidity_percent"`
	WetRadius        Number `json:"wet_radius_m"`
	GrowthFactor     Number `json:"growth_factor"`
}

// DissolvedRow is the crest of the particle once all of it has been dissolved.
type DissolvedRow struct {
	CriticalSupersaturation Number `json:"critical_supersaturation_percent"`
	CriticalWetRadius       Number `json:"critical_wet_radius_m"`
}

// TextbookRow is the crest of the cubic form s = A/D - B/D³.
type TextbookRow struct {
	CriticalSupersaturation Number `json:"critical_supersaturation_percent"`
	CriticalWetRadius       Number `json:"critical_wet_radius_m"`
}

// CurveRow is one point of the equilibrium curve.
type CurveRow struct {
	WetRadius       Number `json:"wet_radius_m"`
	SaturationRatio Number `json:"saturation_ratio"`
	WaterActivity   Number `json:"water_activity"`
	KelvinFactor    Number `json:"kelvin_factor"`
}

func (c *curve) facts() CurveFacts {
	gap := Number(math.NaN())
	f := CurveFacts{
		CriticalSupersaturation: gap, CriticalWetRadius: gap, CriticalWetDiameter: gap, CriticalGrowthFactor: gap,
		CriticalWaterActivity: gap, CriticalMolality: gap, CrestTension: gap,
		Deliquescence: percentNumber(c.flat.Dissolved), Efflorescence: percentNumber(c.flat.Efflorescence), DeliquescenceOver: gap,
		Extrema: make([]ExtremumRow, 0, len(c.extrema)), Haze: make([]HazeRow, 0, len(c.haze)), Curve: make([]CurveRow, 0, len(c.table)),
	}
	if c.hasPhase {
		f.DeliquescenceOver = percentNumber(c.phase.Over.Dissolved)
	}
	if c.hasTwin {
		f.AlreadyDissolved = &DissolvedRow{percentNumber(c.twinCrest.Supersaturation), Number(c.twinCrest.WetDiameter / 2)}
	}
	if c.noCrest == nil {
		f.CriticalSupersaturation = Number(100 * c.crest.Supersaturation)
		f.CriticalWetRadius = Number(c.crest.WetDiameter / 2)
		f.CriticalWetDiameter = Number(c.crest.WetDiameter)
		f.CriticalGrowthFactor = Number(c.crest.GrowthFactor)
		f.CriticalWaterActivity = Number(c.crest.WaterActivity)
		f.CriticalMolality = Number(c.molality())
		f.CrestTension = Number(c.crest.SurfaceTension)
		kind, place := kindWord(c.crest.Kind), c.crest.Place.String()
		f.BarrierKind, f.BarrierPosition = &kind, &place
	}
	for _, e := range c.extrema {
		f.Extrema = append(f.Extrema, ExtremumRow{kindWord(e.Kind), Number(e.WetDiameter / 2), Number(100 * e.Supersaturation)})
	}
	for _, h := range c.haze {
		f.Haze = append(f.Haze, HazeRow{h.branch, Number(100 * c.asked.RelativeHumidity), Number(h.WetDiameter / 2), Number(c.growth(h.State))})
	}
	if c.noCubic == nil {
		f.Textbook = &TextbookRow{Number(100 * c.textbook.Supersaturation), Number(c.textbook.WetDiameter / 2)}
	}
	for _, s := range c.table {
		f.Curve = append(f.Curve, CurveRow{Number(s.WetDiameter / 2), Number(s.SaturationRatio), Number(s.WaterActivity), Number(s.KelvinFactor)})
	}
	return f
}

// molality is mol of solute per kg of water at the crest, NaN if not known.
func (c *curve) molality() float64 {
	if c.noCrest != nil || !(c.crest.Water > 0) {
		return math.NaN()
	}
	return c.dissolved.Molality(c.crest.Water)
}

// percentNumber writes a fraction in per cent.
func percentNumber(fraction float64) Number { return Number(100 * fraction) }

// kindWord is the kind of an extremum as scripts see it.
func kindWord(k koehler.Kind) string {
	switch k {
	case koehler.Minimum:
		return "minimum"
	case koehler.KinkMinimum:
		return "kink_minimum"
	case koehler.BoundaryMaximum:
		return "boundary_maximum"
	}
	return "maximum"
}
