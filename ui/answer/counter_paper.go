package answer

import (
	"fmt"
	"slices"
	"strings"
	"time"
	"unicode/utf8"

	"dropcrest/atmos"
	"dropcrest/koehler/counter"
	"dropcrest/ui/scenario"
)

// A record below its picture has about so many lines of so many letters on a page of
// paper.
const (
	linesOnPage   = 56
	lettersOnLine = 138
)

// paper is the record of the calibration, one paragraph an entry: data, left-out
// points, model, constants, result, version. With points=false the points are
// counted only, which keeps any record on one page.
func (c *calibrated) paper(version string, points bool) []string {
	out := []string{strings.TrimSpace("Calibration record of a CCN counter, written by dropcrest "+version) + "."}
	out = append(out, c.dataWords())
	out = append(out, c.modelWords()...)
	out = append(out, constantWords())
	for _, s := range c.Scans {
		out = append(out, c.scanWords(s))
		if points && len(s.Points) > 0 {
			out = append(out, pointWords(s))
		}
	}
	out = append(out, c.leftWords())
	return append(out, c.resultWords()...)
}

// pageOf is the record below its picture: where the points take more room than there
// is they are in the text and in the JSON only.
func (c *calibrated) pageOf(version string) []string {
	page := c.paper(version, true)
	for _, n := range c.notes {
		page = append(page, "Note: "+n.Text)
	}
	lines := 0
	for _, text := range page {
		lines += 1 + utf8.RuneCountInString(text)/lettersOnLine
	}
	if lines <= linesOnPage {
		return page
	}
	page = c.paper(version, false)
	for _, n := range c.notes {
		page = append(page, "Note: "+n.Text)
	}
	return append(page, "The points are one by one in the text and in the JSON of this record.")
}

func (c *calibrated) dataWords() string {
	names := make([]string, len(c.asked.Scans))
	for i, f := range c.asked.Scans {
		if names[i] = f.Name; f.Name == scenario.DemoData {
			names[i] = "the invented demo station"
		}
	}
	text := fmt.Sprintf("Data: %s; %d rows, %d scans", strings.Join(names, ", "), c.rows, len(c.Scans))
	if !c.begin.IsZero() {
		text += ", " + c.begin.Format(time.DateTime) + " to " + c.end.Format(time.DateTime) + " UTC"
	}
	if c.Pressure > 0 {
		text += fmt.Sprintf(", at %s hPa", digits(c.Pressure/100, 5))
	}
	if c.Flow > 0 {
		text += fmt.Sprintf(", with %s l/min", digits(c.Flow*6e4, 4))
	}
	return text + ". Columns: " + strings.Join(c.mapping, "; ") + "."
}

// modelWords are what the fits and the salt are made with.
func (c *calibrated) modelWords() []string {
	o := fitOptions(c.asked)
	text := fmt.Sprintf("Fits: activation curve %s, efficiency of the counter %s, %s particles selected, %s", c.Curve,
		givenOr(o.Plateau), c.asked.Polarity, c.chargeWords())
	text += "; points of fewer than 10 particles or more than 6 standard deviations off their curve are left out. Scans are rows whose salt and fixed setting are the same " +
		"within 0.2 K, 1 % of size, 3 % of flow."
	if c.asked.Bootstrap > 0 {
		text += fmt.Sprintf(" Bootstrap: %d replicates, seed %d.", c.asked.Bootstrap, c.asked.Seed)
	}
	return append([]string{text}, c.standardWords()...)
}

func givenOr(x float64) string {
	if x > 0 {
		return shortest(x) + " as given"
	}
	return "fitted"
}

// chargeWords say where the share of multiply charged particles comes from.
func (c *calibrated) chargeWords() string {
	switch {
	case c.asked.Activation != "two-step":
		return "multiply charged particles taken as a lower plateau"
	case c.asked.ScanSizes != "":
		return "multiply charged particles by the size distribution of " + c.asked.ScanSizes +
			" with the charges of Wiedensohler (1988) and Gunn and Woessner (1956)"
	}
	return "share of doubly charged particles " + givenOr(fitOptions(c.asked).Charges.Double) + ", the same at all sizes of a scan"
}

// saltModels names a salt with its models, which mostly begin with its name.
func saltModels(s counter.StandardRecord) string {
	text := strings.Join(s.Models, ", ")
	if strings.HasPrefix(text, s.Name+":") {
		return text
	}
	return s.Name + ": " + text
}

func (c *calibrated) standardWords() []string {
	var out []string
	for _, s := range c.Standards {
		out = append(out, fmt.Sprintf("%s; surface tension %s mN/m, water %s kg/m³ at %s; shape factor %s; classifier at %s and %s hPa.",
			capital(saltModels(s)), digits(s.SurfaceTension*1e3, 4), digits(s.WaterDensity, 5), celsius(s.Temperature), shortest(s.ShapeFactor),
			celsius(s.AirTemperature), digits(s.AirPressure/100, 5)))
	}
	return out
}

func constantWords() string {
	var parts []string
	for _, k := range atmos.Constants() {
		parts = append(parts, strings.TrimSpace(fmt.Sprintf("%s %.10g %s", k.Name, k.Value, k.Unit)))
	}
	return "Constants: " + strings.Join(parts, ", ") + "."
}

// scanWords are one scan in a line.
func (c *calibrated) scanWords(s counter.ScanResult) string {
	if s.Fault != "" {
		return "Scan " + s.Name + ": no curve. " + capital(sentenceOf(s.Fault))
	}
	text := fmt.Sprintf("Scan %s: %s ± %s K, D50 %s ± %s nm, width %s in ln D, plateau %s, doubly charged %s, χ² %s of %d degrees of freedom; S = %s ± %s %%", s.Name,
		digits(s.TemperatureDifference, 4), digits(s.DifferenceUncertainty, 1), digits(s.MobilityDiameter*1e9, 4), digits(s.DiameterUncertainty*1e9, 2),
		estimateWords(s.Width), estimateWords(s.Plateau), estimateWords(s.Double), digits(s.ChiSquare, 3), s.Freedom,
		digits(100*s.Supersaturation, 4), digits(100*s.SupersaturationUncertainty, 2))
	if s.Bootstrap != nil {
		text += fmt.Sprintf("; by bootstrap ± %s nm", digits(s.Bootstrap.Deviation*1e9, 2))
	}
	return text + "."
}

func estimateWords(e counter.Estimate) string {
	if e.Uncertainty > 0 {
		return roundedPair(e.Value, e.Uncertainty)
	}
	return digits(e.Value, 3)
}

// pointWords are the points of a scan: setting, particles, droplets.
func pointWords(s counter.ScanResult) string {
	unit, scale := "nm", 1e9
	switch s.Over {
	case counter.OverDifference:
		unit, scale = "K", 1
	case counter.OverFlow:
		unit, scale = "l/min", 6e4
	}
	parts := make([]string, len(s.Points))
	for i, p := range s.Points {
		parts[i] = fmt.Sprintf("%s %s/%s", digits(p.Setting*scale, 4), shortest(p.CCN), shortest(p.CN))
	}
	return fmt.Sprintf("Points %s (%s, CCN/CN counted): %s.", s.Name, unit, strings.Join(parts, ", "))
}

func (c *calibrated) leftWords() string {
	if len(c.LeftOut) == 0 {
		return "Left out: no point."
	}
	type cause struct{ scan, why string }
	var causes []cause
	lines := map[cause][]string{}
	for _, l := range c.LeftOut {
		k := cause{l.Scan, l.Why}
		if !slices.Contains(causes, k) {
			causes = append(causes, k)
		}
		if l.Line > 0 {
			lines[k] = append(lines[k], fmt.Sprint(l.Line))
		}
	}
	var parts []string
	for _, k := range causes {
		text := k.scan
		if n := len(lines[k]); n > 0 {
			text += ", line " + strings.Join(lines[k][:min(n, mostLinesNamed)], " ")
			if n > mostLinesNamed {
				text += fmt.Sprintf(" and %d more", n-mostLinesNamed)
			}
		}
		parts = append(parts, text+": "+k.why)
	}
	return fmt.Sprintf("Left out: %d points. %s.", len(c.LeftOut), strings.Join(parts, "; "))
}

// mostLinesNamed is how many lines of a file are named for one cause.
const mostLinesNamed = 20

// resultWords are the line with all that is needed to apply it.
func (c *calibrated) resultWords() []string {
	out := []string{"Result: " + strings.Join(c.finding(), " ")}
	if c.Line == nil {
		return out
	}
	l := c.Line
	text := fmt.Sprintf("Line: weighted with errors in both coordinates (York et al. 2004); covariance of intercept and slope %s %%²/K; χ² %s of %d degrees of freedom, probability %s; off the line by",
		fmt.Sprintf("%.3g", 1e4*l.Covariance), digits(l.ChiSquare, 3), l.Freedom, digits(l.Probability, 2))
	for i, r := range l.Residuals {
		if i > 0 {
			text += ","
		}
		text += fmt.Sprintf(" %s ± %s", digits(100*r.Residual, 2), digits(100*r.Uncertainty, 2))
	}
	text += " %."
	if b := c.LineBootstrap; b != nil {
		text += fmt.Sprintf(" By bootstrap the slope is ± %s %%/K, the intercept ± %s %%.", digits(100*b.Slope.Deviation, 2), digits(100*b.Intercept.Deviation, 2))
	}
	return append(out, text, c.validWords())
}

// validWords say where the calibration holds and what moves it.
func (c *calibrated) validWords() string {
	middle := (c.Line.Lowest + c.Line.Highest) / 2
	text := fmt.Sprintf("It holds from %s to %s K; carried to another pressure by the power %s of it, ", digits(c.Line.Lowest, 3), digits(c.Line.Highest, 3), shortest(c.PressureExponent))
	if c.FlowExponent != 0 {
		text += fmt.Sprintf("to another flow by the power %s.", roundedPair(c.FlowExponent, c.FlowExponentUncertainty))
	} else {
		text += "and not to another flow."
	}
	applied, err := c.Apply(middle, counter.Site{})
	if err != nil {
		return text
	}
	k := applied.Sensitivity
	return text + fmt.Sprintf(" Not in the uncertainties: at %s K, +1 %% of all sizes moves it by %+.2f %%, +1 %% of the surface tension by %+.2f %%, +1 K where particles activate by %+.2f %%, "+
		"+1 %% of the shape factor by %+.2f %%.", digits(middle, 3), k.Dry, k.Tension, 100*k.Temperature, k.Shape)
}
