package answer

import (
	"math"

	"dropcrest/koehler/ascent"
)

// AscentFacts is the JSON object of the Ascent question. Scripts rely on its keys.
// Where the supersaturation still rises at the end, its value there stands for the
// peak, and peak_reached is false.
type AscentFacts struct {
	Peak              Number             `json:"peak_supersaturation_percent"`
	PeakReached       bool               `json:"peak_reached"`
	HeightOfPeak      Number             `json:"height_of_peak_m"`
	TemperatureAtPeak Number             `json:"temperature_at_peak_k"`
	Droplets          Number             `json:"droplets_per_m3"` // in the air of the start
	DropletsAtPeak    Number             `json:"droplets_at_peak_per_m3"`
	DropletsSTP       Number             `json:"droplets_stp_per_m3"`
	Grown             Number             `json:"grown_droplets_per_m3"`            // in the air of the start
	GrownError        Number             `json:"grown_droplets_resolution_per_m3"` // half the particles of the bins between
	Particles         Number             `json:"particles_per_m3"`                 // in the air of the start
	Updraft           Number             `json:"updraft_m_per_s"`                  // of this ascent
	ByMode            []AscentModeRow    `json:"by_mode"`
	LiquidWater       Number             `json:"liquid_water_kg_per_kg_at_end"`
	LiquidContent     Number             `json:"liquid_water_kg_per_m3_at_end"`
	WaterResidual     Number             `json:"total_water_residual"`
	EnergyResidual    Number             `json:"energy_residual"`
	Regime            RegimeRow          `json:"regime"`
	ClosedForms       []ClosedFormRow    `json:"closed_forms"`
	Distribution      *DistributionRow   `json:"updraft_distribution"` // null with one updraft
	Sensitivities     *SensitivityRow    `json:"sensitivities"`        // null where there are none
	Updrafts          []UpdraftRow       `json:"updrafts"`
	Followed          []FollowedRow      `json:"followed"`
	Profile           []AscentProfileRow `json:"profile"`
	Steps             int                `json:"steps"`
	RejectedSteps     int                `json:"rejected_steps"`
	Bins              int                `json:"bins"`
	Refinement        *RefinementRow     `json:"refinement"` // null unless asked for
	Sweep             *SweepFacts        `json:"sweep"`      // null without one
}

// RefinementRow is what endless bins would give.
type RefinementRow struct {
	Bins          int    `json:"bins"`
	Peak          Number `json:"peak_supersaturation_percent"`
	Droplets      Number `json:"droplets_per_m3"`
	PeakError     Number `json:"peak_relative_error"`
	DropletsError Number `json:"droplets_relative_error"`
}

// AscentModeRow is one mode's part, or that of the measured sizes.
type AscentModeRow struct {
	Mode      int    `json:"mode"` // from 1
	Particles Number `json:"particles_per_m3"`
	Droplets  Number `json:"droplets_per_m3"`
	Grown     Number `json:"grown_droplets_per_m3"`
	Critical  Number `json:"critical_dry_diameter_m"`       // at the peak; null where it is no one size
	GrownDry  Number `json:"smallest_grown_dry_diameter_m"` // null where none has grown
}

// RegimeRow is what limits the number of droplets.
type RegimeRow struct {
	Label string `json:"label"` // updraft-limited | transitional | aerosol-limited
	Ratio Number `json:"updraft_over_particles_m4_per_s"`
	Scope string `json:"scope"`
}

// ClosedFormRow is what a closed form says beside the ascent.
type ClosedFormRow struct {
	Method            string  `json:"method"`
	Peak              Number  `json:"peak_supersaturation_percent"`
	Droplets          Number  `json:"droplets_per_m3"`
	PeakDeviation     Number  `json:"peak_deviation"` // over the ascent, less 1
	DropletsDeviation Number  `json:"droplets_deviation"`
	Source            string  `json:"source"`
	Limits            string  `json:"limits"`
	Problem           *string `json:"problem"` // why it says nothing
}

// DistributionRow is the mean over a distribution of updrafts.
type DistributionRow struct {
	Droplets       Number `json:"mean_droplets_per_m3"`
	Characteristic Number `json:"characteristic_updraft_m_per_s"` // with as many droplets
	MeanUpdraft    Number `json:"mean_updraft_m_per_s"`
	Weighting      string `json:"weighting"`
}

// SensitivityRow is the change of ln of the droplet number per change of the
// logarithm of each; of temperature per K.
type SensitivityRow struct {
	Number      Number `json:"particles"`
	Updraft     Number `json:"updraft"`
	Kappa       Number `json:"kappa"` // null where particles have none
	Size        Number `json:"dry_diameter"`
	Temperature Number `json:"temperature_per_k"`
}

// UpdraftRow is the number of droplets at another updraft.
type UpdraftRow struct {
	Updraft  Number  `json:"updraft_m_per_s"`
	Droplets Number  `json:"droplets_per_m3"`
	Peak     Number  `json:"peak_supersaturation_percent"`
	Problem  *string `json:"problem"`
}

// FollowedRow is what became of a dry size.
type FollowedRow struct {
	Dry      Number `json:"dry_diameter_m"`
	Mode     int    `json:"mode"`
	Critical Number `json:"critical_wet_radius_m"`
	AtEnd    Number `json:"wet_radius_at_end_m"`
	Grown    bool   `json:"grown"`
}

// AscentProfileRow is one height.
type AscentProfileRow struct {
	Height          Number   `json:"height_m"`
	Time            Number   `json:"time_s"`
	Supersaturation Number   `json:"supersaturation_percent"`
	Temperature     Number   `json:"temperature_k"`
	Pressure        Number   `json:"pressure_pa"`
	LiquidWater     Number   `json:"liquid_water_kg_per_kg"`
	Droplets        Number   `json:"droplets_per_m3"` // past their critical size, in the air of the start
	MeanRadius      Number   `json:"mean_radius_m"`   // of those; null where there are none
	SpreadRadius    Number   `json:"standard_deviation_of_radius_m"`
	Followed        []Number `json:"followed_wet_radii_m"`
}

func (r *risen) facts() AscentFacts {
	f := AscentFacts{
		Peak: percentNumber(r.Peak.Supersaturation), PeakReached: r.HasPeak, HeightOfPeak: Number(r.Peak.Height), TemperatureAtPeak: Number(r.Peak.Temperature),
		Droplets: Number(r.Droplets), DropletsAtPeak: Number(r.DropletsAtPeak), DropletsSTP: Number(r.DropletsSTP), Grown: Number(r.Grown),
		GrownError: Number(r.GrownError), Particles: Number(r.Number), Updraft: Number(r.parcel.Updraft), ByMode: r.byMode(),
		LiquidWater: Number(r.End.LiquidWater), LiquidContent: Number(r.LiquidContent), WaterResidual: Number(r.WaterResidual), EnergyResidual: Number(r.EnergyResidual),
		Regime:      RegimeRow{ascent.RegimeOf(r.parcel.Updraft, r.Number).String(), Number(r.parcel.Updraft / r.Number), ascent.RegimeScope},
		ClosedForms: []ClosedFormRow{}, Updrafts: []UpdraftRow{}, Followed: []FollowedRow{}, Profile: make([]AscentProfileRow, 0, len(r.Profile)),
		Steps: r.Steps, RejectedSteps: r.Rejected, Bins: r.Bins,
	}
	for _, c := range r.forms {
		f.ClosedForms = append(f.ClosedForms, r.closedRow(c))
	}
	if m := r.ofSpread; m != nil {
		f.Distribution = &DistributionRow{Number(m.Mean), Number(m.Characteristic), Number(m.MeanUpdraft), r.asked.UpdraftWeighting}
	}
	if s := r.answers; s != nil {
		f.Sensitivities = &SensitivityRow{Number(s.Number), Number(s.Updraft), Number(s.Kappa), Number(s.Size), Number(s.Temperature)}
	}
	for _, p := range r.curve {
		f.Updrafts = append(f.Updrafts, UpdraftRow{Number(p.updraft), Number(p.droplets), percentNumber(p.peak), textOrNull(p.fault)})
	}
	for i, t := range r.Tracers {
		f.Followed = append(f.Followed, FollowedRow{Number(t.DryDiameter), r.of.partOf[t.Group] + 1, Number(t.CriticalRadius), Number(r.wetAtEnd(i)), t.Grown})
	}
	for _, p := range r.Profile {
		f.Profile = append(f.Profile, profileRow(p))
	}
	if f2 := r.refined; f2 != nil {
		f.Refinement = &RefinementRow{f2.Bins, percentNumber(f2.Peak), Number(f2.Droplets), Number(f2.PeakError), Number(f2.DropletsError)}
	}
	if r.sweep != nil {
		f.Sweep = r.sweep.facts()
	}
	return f
}

// textOrNull is a text of the JSON object, null where there is none.
func textOrNull(text string) *string {
	if text == "" {
		return nil
	}
	return &text
}

func (r *risen) wetAtEnd(i int) float64 { return r.Profile[len(r.Profile)-1].Followed[i] }

func profileRow(p ascent.Row) AscentProfileRow {
	row := AscentProfileRow{Number(p.Height), Number(p.Time), percentNumber(p.Supersaturation), Number(p.Temperature), Number(p.Pressure),
		Number(p.LiquidWater), Number(p.Droplets), Number(math.NaN()), Number(math.NaN()), make([]Number, 0, len(p.Followed))}
	if p.MeanRadius > 0 {
		row.MeanRadius, row.SpreadRadius = Number(p.MeanRadius), Number(p.SpreadRadius)
	}
	for _, x := range p.Followed {
		row.Followed = append(row.Followed, Number(x))
	}
	return row
}

// byMode adds the groups up that a mode was cut into.
func (r *risen) byMode() []AscentModeRow {
	rows := make([]AscentModeRow, len(r.of.groups))
	seen := make([]int, len(rows))
	for i := range rows {
		rows[i] = AscentModeRow{Mode: i + 1, Critical: Number(math.NaN()), GrownDry: Number(math.Inf(1))}
	}
	for i, g := range r.ByGroup {
		at := r.of.partOf[i]
		row := &rows[at]
		row.Particles += Number(g.Number)
		row.Droplets += Number(g.Droplets)
		row.Grown += Number(g.Grown)
		row.GrownDry = min(row.GrownDry, Number(g.GrownDry))
		row.Critical = Number(g.CriticalDry)
		if seen[at]++; seen[at] > 1 {
			row.Critical = Number(math.NaN()) // differs among particles
		}
	}
	return rows
}

func (r *risen) closedRow(c closedForm) ClosedFormRow {
	gap := Number(math.NaN())
	row := ClosedFormRow{Method: c.Method.String(), Peak: gap, Droplets: gap, PeakDeviation: gap, DropletsDeviation: gap,
		Source: c.Method.Source(), Limits: c.Method.Limits()}
	if c.none != nil {
		row.Problem = textOrNull(reason(c.none))
		return row
	}
	row.Peak, row.Droplets = percentNumber(c.Peak), Number(c.Droplets)
	if r.HasPeak {
		row.PeakDeviation, row.DropletsDeviation = Number(c.Peak/r.Peak.Supersaturation-1), Number(c.Droplets/r.Droplets-1)
	}
	return row
}
