package answer

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// why is what stands behind the finding: definitions, formulas, models,
// constants, sources, and the notes in full. One entry is one paragraph.
func (c *curve) why() []string {
	out := []string{
		"The saturation ratio S is the vapour pressure over the drop against that over flat pure liquid water under the same total pressure; " +
			"supersaturation is S - 1. Against the vapour pressure of pure water alone S would come out about 0.4 % larger at 1000 hPa, " +
			"which is more than many a crest.",
		"S = a_w exp(Kelvin term): the water activity of the solution (Raoult) times the effect of the drop's curvature (Kelvin). " + c.kelvinWords(),
	}
	for _, model := range c.dissolved.Models {
		out = append(out, "Water activity: "+model+".")
	}
	out = append(out, c.kindWords()...)
	out = append(out, c.tensionWords(), c.volumeWords())
	if c.asked.DrySizeIs == "mobility" {
		out = append(out, fmt.Sprintf("The mobility diameter of %s nm with shape factor %s is a volume-equivalent diameter of %s nm, by slip correction at 1013.25 hPa (ISO 15900).",
			shortest(c.asked.DryDiameter*1e9), shortest(c.asked.ShapeFactor), digits(c.particle.DryDiameter*1e9, 4)))
	}
	if !math.IsNaN(c.dissolved.Kappa) {
		out = append(out, fmt.Sprintf("The particle's κ, mixed by volume, is %s.", digits(c.dissolved.Kappa, 3)))
	}
	if c.noCubic == nil {
		out = append(out, fmt.Sprintf("The textbook form s = A/D - B/D³, which takes the drop as very dilute%s and exp(x) as 1 + x, puts the crest at %s and %s.",
			c.textbookLeavesOut(), percent(c.textbook.Supersaturation), micrometres(c.textbook.WetDiameter/2)))
	}
	out = append(out, fmt.Sprintf("Constants: R = %v J/(mol K), molar mass of water %v kg/mol (%s).",
		atmos.GasConstant, atmos.WaterMolarMass, "CODATA 2018; IUPAC"))
	out = append(out, sourcesOfWater()...)
	for _, n := range c.notes {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

// sourcesOfWater are the relations that the Kelvin term needs, with their range.
func sourcesOfWater() []string {
	var out []string
	for _, r := range atmos.Relations() {
		switch r.Key {
		case "water-density", "surface-tension":
			out = append(out, fmt.Sprintf("Source of the %s: %s, valid from %s to %s.", r.Name, r.Source,
				celsius(r.Temperature.Min), celsius(r.Temperature.Max)))
		}
	}
	return out
}

func (c *curve) kelvinWords() string {
	switch c.particle.Kelvin {
	case koehler.PureVapour:
		return "Kelvin term for a drop in its own vapour, whose pressure change is kept: R T ln S = v (4 σ/D + e_s (S - 1)). In air of fixed total pressure that term does not exist."
	case koehler.Compressible:
		return "Kelvin term with the compression of the liquid by the Laplace pressure 4 σ/D: its molar volume is integrated over that pressure (compressibility by Kell 1975)."
	}
	return "Kelvin term 4 σ M_w/(R T ρ_w D), with the molar volume of water and not that of the solution."
}

func (c *curve) tensionWords() string {
	says := "Surface tension: "
	switch {
	case c.dissolved.Film != nil:
		says += "σ = σ_w - Γmax R T ln(1 + K c), of the bulk concentration c of the organic (Szyszkowski and Langmuir)"
	case c.asked.SurfaceTension.Is("solution"):
		says += "pure water and a linear increment per molality of the solutes"
	case c.asked.SurfaceTension.Is("water"):
		says += "pure water at the temperature"
	default:
		return says + fmt.Sprintf("%s mN/m, as given.", shortest(c.asked.SurfaceTension.Number*1e3))
	}
	if c.noCrest == nil {
		says += fmt.Sprintf("; %s mN/m at the crest", digits(c.crest.SurfaceTension*1e3, 4))
	}
	if c.particle.TolmanLength != 0 {
		says += fmt.Sprintf("; it is divided by 1 + 4 δ/D with Tolman's length δ of %s nm (Tolman 1949), which is disputed in value and sign",
			shortest(c.particle.TolmanLength*1e9))
	}
	return says + "."
}

func (c *curve) volumeWords() string {
	says := fmt.Sprintf("Density of water %s kg/m³; ", digits(c.dissolved.WaterDensity, 6))
	if c.dissolved.Swelling != nil {
		return says + "the volume of the drop follows the measured density of the solution."
	}
	return says + "water and dry particle keep their volumes in the drop."
}

func celsius(T float64) string { return fmt.Sprintf("%.4g °C", T-atmos.ZeroCelsius) }
