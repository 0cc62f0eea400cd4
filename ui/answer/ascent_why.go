package answer

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler/ascent"
)

// why is what stands behind the finding: equations, sources, constants, and the notes
// in full.
func (r *risen) why() []string {
	out := []string{
		"A closed parcel of air rises without mixing, collisions or fall-out. dz/dt = w; dp/dt = -g p w/(R_d T_v); dT/dt = -g w/c_p + (L/c_p) dw_l/dt; " +
			"vapour is total water less liquid, so that water is conserved. Every size grows by vapour: r dr/dt = (S - S_eq(r))/F, " +
			"F = ρ_w R T/(e_s D_v* M_w) + (L ρ_w/(k_a* T)) (L M_w/(R T) - 1).",
		"Droplets are the particles whose crest lies at or below the peak supersaturation; grown ones are past their critical size at the end, which giant nuclei may miss. " +
			"Numbers are per m³ of the air at the start unless their name says otherwise; STP is 273.15 K and 1013.25 hPa.",
		r.growthWords(), r.methodWords(),
	}
	for _, c := range r.forms {
		out = append(out, fmt.Sprintf("%s (%s): %s", methodName(c.Method), c.Method.Source(), c.Method.Limits()))
	}
	out = append(out, fmt.Sprintf("Updraft over particles is %s m/s cm³: %s. Reutter et al., Atmos. Chem. Phys. 9 (2009) 7067. %s",
		digits(r.parcel.Updraft/(r.Number*perCubic), 2), ascent.RegimeOf(r.parcel.Updraft, r.Number), ascent.RegimeScope))
	if s := r.answers; s != nil {
		out = append(out, sensitivityWords(*s))
	}
	if r.noAnswer != nil {
		out = append(out, "There are no sensitivities: "+reason(r.noAnswer)+".")
	}
	if r.ofSpread != nil {
		out = append(out, fmt.Sprintf("Updrafts: the part above 0 of a normal distribution of mean %s and standard deviation %s m/s, %d points of Gauss quadrature.",
			shortest(r.asked.Updraft), shortest(r.asked.UpdraftSpread), len(r.ofSpread.Updrafts)))
	}
	out = append(out, fmt.Sprintf("Constants: g = %v m/s², R = %v J/(mol K), molar mass of water %v kg/mol, of dry air %v kg/mol (CODATA 2018; IUPAC; WMO).",
		atmos.Gravity, atmos.GasConstant, atmos.WaterMolarMass, atmos.DryAirMolarMass))
	out = append(out, sourcesOfAscent()...)
	for _, n := range r.notes {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

func (r *risen) growthWords() string {
	says := "Growth of small drops: "
	switch r.asked.Transition {
	case "flux-matching":
		says += "fluxes matched at the surface, as in Pruppacher and Klett without the jump length (from memory)"
	case "continuum":
		says += "continuum, without correction for free molecules"
	default:
		says += "the correction of Fuchs and Sutugin (1970)"
	}
	return says + fmt.Sprintf(", mass accommodation %s, thermal accommodation %s.", shortest(r.asked.MassAccommodation), shortest(r.asked.ThermalAccommodation))
}

func (r *risen) methodWords() string {
	heat := "dry air"
	if r.asked.MoistHeat == "on" {
		heat = "dry air, vapour and liquid"
	}
	return fmt.Sprintf("%d sizes, integrated with a tolerance of %s in %d steps by a linearly implicit method of fourth order; heat capacity of %s. "+
		"Water is conserved to %.1g of it, energy to %.1g of the lift. The error of the bins falls with the square of their number.",
		r.Bins, shortest(r.asked.Tolerance), r.Steps, heat, math.Abs(r.WaterResidual), math.Abs(r.EnergyResidual))
}

func sensitivityWords(s ascent.Sensitivity) string {
	says := fmt.Sprintf("d ln N_d by d ln of: particles %s, updraft %s", digits(s.Number, 2), digits(s.Updraft, 2))
	if !math.IsNaN(s.Kappa) {
		says += ", κ " + digits(s.Kappa, 2)
	}
	if !math.IsNaN(s.Size) {
		says += ", dry size " + digits(s.Size, 2)
	}
	return says + fmt.Sprintf("; by temperature %s %% per K. Central differences of ascents of at most %d bins a mode.", digits(100*s.Temperature, 2), mostSlopeBins)
}

// sourcesOfAscent are the relations that an ascent needs, with their range.
func sourcesOfAscent() []string {
	var out []string
	for _, rel := range atmos.Relations() {
		switch rel.Key {
		case "water-density", "surface-tension", "vapour-pressure", "linear-latent-heat", "vapour-diffusivity", "air-conductivity":
			out = append(out, fmt.Sprintf("Source of the %s: %s, valid from %s to %s.", rel.Name, rel.Source, celsius(rel.Temperature.Min), celsius(rel.Temperature.Max)))
		}
	}
	return out
}
