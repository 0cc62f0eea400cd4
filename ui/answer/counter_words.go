package answer

import (
	"fmt"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/counter"
)

// fitted are the scans that gave a curve.
func (c *calibrated) fitted() (good, bad []counter.ScanResult) {
	for _, s := range c.Scans {
		if s.Fault == "" {
			good = append(good, s)
		} else {
			bad = append(bad, s)
		}
	}
	return good, bad
}

// stoppedNote says how far a calibration came that was stopped.
func (c *calibrated) stoppedNote() atmos.Note {
	done := 0
	if c.LineBootstrap != nil {
		done = c.LineBootstrap.Slope.Replicates
	}
	return atmos.Note{Code: "stopped", Input: "bootstrap", Text: fmt.Sprintf(
		"The work was stopped: %d of %d replicates of the bootstrap were made. The fits are complete.", done, c.asked.Bootstrap)}
}

// finding is the calibration in sentences.
func (c *calibrated) finding() []string {
	good, bad := c.fitted()
	var out []string
	switch {
	case c.Line != nil:
		l := c.Line
		out = append(out, fmt.Sprintf("S = (%s ± %s) %%/K × ΔT %s (%s ± %s) %%, by %d scans from %s to %s K.",
			digits(100*l.Slope, 4), digits(100*l.SlopeUncertainty, 2), sign(l.Intercept), digits(100*abs(l.Intercept), 3), digits(100*l.InterceptUncertainty, 2),
			len(l.Residuals), digits(l.Lowest, 3), digits(l.Highest, 3)))
		out = append(out, c.setPoints())
	case len(good) > 0:
		out = append(out, fmt.Sprintf("There is no calibration line: %s.", strings.TrimSuffix(c.LineFault, ".")), c.oneScan(good[0]))
	default:
		out = append(out, "No scan gives an activation curve.")
	}
	if spread := modelSpread(good); spread != "" {
		out = append(out, spread)
	}
	if len(bad) > 0 {
		out = append(out, sentenceOf(capital(bad[0].Fault)))
		if len(bad) > 1 {
			out[len(out)-1] += fmt.Sprintf(" %d more scans give no curve.", len(bad)-1)
		}
	}
	return out
}

func sign(x float64) string {
	if x < 0 {
		return "-"
	}
	return "+"
}

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}

// setPoints are the supersaturations at the temperature differences of the scans.
func (c *calibrated) setPoints() string {
	var parts []string
	for i, r := range c.Line.Residuals {
		const most = 5
		if i == most {
			parts = append(parts, "…")
			break
		}
		parts = append(parts, fmt.Sprintf("%s ± %s at %s K", digits(100*c.Line.At(r.X), 4), digits(100*c.Line.Uncertainty(r.X), 2), digits(r.X, 3)))
	}
	return "That is " + strings.Join(parts, ", ") + ", in %."
}

func (c *calibrated) oneScan(s counter.ScanResult) string {
	return fmt.Sprintf("At %s K half of the particles of %s ± %s nm activate: %s.", digits(s.TemperatureDifference, 3),
		digits(s.MobilityDiameter*1e9, 4), digits(s.DiameterUncertainty*1e9, 2), percent(s.Supersaturation))
}

// modelSpread says what the choice of the Köhler model alone is worth.
func modelSpread(good []counter.ScanResult) string {
	low, high, lowest, highest := 0.0, 0.0, "", ""
	for _, s := range good {
		for _, c := range s.Choices {
			if c.Fault != "" || !(s.Supersaturation > 0) {
				continue
			}
			d := 100 * (c.Supersaturation/s.Supersaturation - 1)
			if d < low {
				low, lowest = d, shortModel(c.Model)
			}
			if d > high {
				high, highest = d, shortModel(c.Model)
			}
		}
	}
	switch {
	case low == 0 && high == 0:
		return ""
	case low == 0:
		return fmt.Sprintf("The choice of the water-activity model is worth up to +%s %% (%s).", digits(high, 2), highest)
	case high == 0:
		return fmt.Sprintf("The choice of the water-activity model is worth up to %s %% (%s).", digits(low, 2), lowest)
	}
	return fmt.Sprintf("The choice of the water-activity model is worth %s %% (%s) to +%s %% (%s).", digits(low, 2), lowest, digits(high, 2), highest)
}

// shortModel is a model without its salt and its source.
func shortModel(model string) string {
	if _, after, found := strings.Cut(model, ": "); found {
		model = after
	}
	before, _, _ := strings.Cut(model, " (")
	return before
}

// why is what stands behind the calibration, one paragraph an entry.
func (c *calibrated) why() []string {
	out := []string{
		"Each scan gives the mobility diameter D50 at which half of the singly charged particles activate. CN and CCN are two Poisson counts of two instruments: " +
			"the likelihood is that of CCN given CN + CCN, with the efficiency of the counter inside the fit.",
		"Activation curve: " + c.Curve + ". Charges by Wiedensohler (1988) for one and two, by Gunn and Woessner (1956) for more.",
	}
	for _, s := range c.Standards {
		out = append(out, fmt.Sprintf("%s: %s; surface tension %s mN/m, water %s kg/m³ at %s; shape factor %s; classifier at %s and %s hPa.", s.Name,
			strings.Join(s.Models, ", "), digits(s.SurfaceTension*1e3, 4), digits(s.WaterDensity, 5), celsius(s.Temperature), shortest(s.ShapeFactor),
			celsius(s.AirTemperature), digits(s.AirPressure/100, 5)))
	}
	if l := c.Line; l != nil {
		out = append(out, fmt.Sprintf("The line has errors in both coordinates (York et al. 2004): χ² %s for %d degrees of freedom, probability %s.",
			digits(l.ChiSquare, 3), l.Freedom, digits(l.Probability, 2)))
	}
	out = append(out, "Columns as they were understood: "+strings.Join(c.mapping, "; ")+".")
	for i, l := range c.LeftOut {
		const most = 12
		if i == most {
			out = append(out, fmt.Sprintf("%d more points are left out; the table of left-out points has all.", len(c.LeftOut)-most))
			break
		}
		out = append(out, fmt.Sprintf("Left out of %s, line %d: %s.", l.Scan, l.Line, l.Why))
	}
	for _, n := range c.notes {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

// account is the record of the calibration beside its finding: every scan, what was
// left out, models and constants, and the version of the program.
func (c *calibrated) account(version string) []string {
	out := []string{"Calibration record."}
	for _, s := range c.Scans {
		if s.Fault != "" {
			out = append(out, sentenceOf(capital(s.Fault)))
			continue
		}
		out = append(out, fmt.Sprintf("Scan at %s K (± %s K): D50 %s ± %s nm, plateau %s, doubly charged %s, width %s, χ² %s of %d; supersaturation %s ± %s %%.",
			digits(s.TemperatureDifference, 4), digits(s.DifferenceUncertainty, 2), digits(s.MobilityDiameter*1e9, 4), digits(s.DiameterUncertainty*1e9, 2),
			digits(s.Plateau.Value, 3), digits(s.Double.Value, 2), digits(s.Width.Value, 2), digits(s.ChiSquare, 3), s.Freedom,
			digits(100*s.Supersaturation, 4), digits(100*s.SupersaturationUncertainty, 2)))
	}
	if len(c.LeftOut) == 0 {
		out = append(out, "No point was left out.")
	}
	out = append(out, c.why()...)
	out = append(out, fmt.Sprintf("Constants: R = %v J/(mol K), molar mass of water %v kg/mol.", atmos.GasConstant, atmos.WaterMolarMass))
	out = append(out, sourcesOfWater()...)
	return append(out, "dropcrest "+version+".")
}
