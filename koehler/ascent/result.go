package ascent

import "dropcrest/atmos"

// State is the air at one time.
type State struct {
	Time            float64 // s since the start
	Height          float64 // m above it
	Temperature     float64 // K
	Pressure        float64 // Pa
	Supersaturation float64 // S - 1
	Vapour          float64 // kg per kg of dry air
	LiquidWater     float64 // kg per kg of dry air, that of haze included
}

// Result is what an ascent came to.
type Result struct {
	Peak    State // where the supersaturation is highest
	HasPeak bool  // false: it still rose at the end, which Peak then is
	End     State

	Droplets       float64 // particles with s_c ≤ the peak, 1/m³ of the air at the start
	DropletsAtPeak float64 // the same in 1/m³ at the peak
	DropletsSTP    float64 // the same in 1/m³ at 273.15 K and 1013.25 hPa, as aerosol.Air.To
	Number         float64 // all particles between the limits of the bins, 1/m³ at the start
	Grown          float64 // above the smallest dry size that is past its critical size at the end, 1/m³ at the start
	GrownError     float64 // half the particles between that size and the next smaller one looked at
	ByGroup        []GroupResult
	LiquidContent  float64 // at the end, kg/m³ of the air there

	WaterResidual  float64 // of vapour and liquid over total water, at the end
	EnergyResidual float64 // of ∫(c_p dT + g dz - L dw_l) over g z, at the end

	Profile []Row
	Tracers []TracerResult // of Options.Follow
	Drops   []Drop         // at the end, where Options.Sizes asks for them
	Notes   []atmos.Note
	Stats
}

// GroupResult is one group's part, in the order of the population.
type GroupResult struct {
	Number      float64 // 1/m³ at the start
	Droplets    float64 // with s_c ≤ the peak, 1/m³ at the start
	CriticalDry float64 // m, dry diameter whose crest is at the peak; +Inf where there is none
	Grown       float64 // 1/m³ at the start
	GrownError  float64
	GrownDry    float64 // m, the smallest dry diameter that has grown; +Inf where none has
}

// Row is one height of the profile.
type Row struct {
	State
	Droplets     float64   // drops wider than their critical size at the start's temperature, 1/m³ at the start
	MeanRadius   float64   // of those, by number, m; 0 where there are none
	SpreadRadius float64   // standard deviation of their radius, m
	Followed     []float64 // wet radii of Options.Follow, m
}

// TracerResult is what became of a followed size.
type TracerResult struct {
	Tracer
	CriticalRadius float64 // m, wet, at the temperature of the end
	Grown          bool    // past it at the end
}

// Drop is the drops of one bin at the end.
type Drop struct {
	Group            int
	DryDiameter      float64 // m, of the middle of the bin
	WetDiameter      float64 // m; that of additive volumes
	CriticalDiameter float64 // m, at the temperature of the end
	Number           float64 // 1/m³ at the start
}

// Stats is what the integration took.
type Stats struct {
	Steps    int // accepted
	Rejected int
	Bins     int // drops that were followed
}
