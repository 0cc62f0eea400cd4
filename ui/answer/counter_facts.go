package answer

import (
	"math"

	"dropcrest/koehler/counter"
)

// CounterFacts is the JSON object of the Counter question. Scripts rely on its keys.
type CounterFacts struct {
	Scans   []ScanRow      `json:"scans"`
	Line    *LineRow       `json:"line"` // null without a line; line_fault says why
	Fault   *string        `json:"line_fault"`
	LeftOut []LeftOutRow   `json:"left_out"`
	Columns []string       `json:"columns"` // column=quantity, as the files were understood
	Record  CalibrationRow `json:"calibration"`

	// File is all of the calibration in SI, which the Spectrum question reads.
	File counter.Calibration `json:"calibration_file"`
}

// ScanRow is one scan.
type ScanRow struct {
	Name                    string      `json:"name"`
	TemperatureDifference   Number      `json:"temperature_difference_k"`
	D50                     Number      `json:"d50_m"`
	D50Uncertainty          Number      `json:"d50_standard_uncertainty_m"`
	Width                   Number      `json:"width_ln"`
	Plateau                 Number      `json:"plateau"`
	DoublyCharged           Number      `json:"doubly_charged_fraction"`
	CriticalSupersaturation Number      `json:"critical_supersaturation_percent"`
	SupersaturationU        Number      `json:"critical_supersaturation_standard_uncertainty_percent"`
	Dispersion              Number      `json:"dispersion"`
	BootstrapDeviation      Number      `json:"d50_bootstrap_standard_deviation_m"`
	Choices                 []ChoiceRow `json:"models"` // what other water-activity models make of the same size
	InLine                  bool        `json:"in_line"`
	Fault                   *string     `json:"fault"` // why there is no curve, or null
}

// ChoiceRow is what one model makes of a scan.
type ChoiceRow struct {
	Model                   string `json:"model"`
	CriticalSupersaturation Number `json:"critical_supersaturation_percent"`
}

// LineRow is supersaturation against temperature difference.
type LineRow struct {
	Slope         Number     `json:"slope_percent_per_k"`
	Intercept     Number     `json:"intercept_percent"`
	Covariance    [][]Number `json:"covariance"` // of intercept (percent) and slope (percent per K)
	ChiSquare     Number     `json:"chi_square"`
	Freedom       int        `json:"degrees_of_freedom"`
	Probability   Number     `json:"probability"`
	LowestPoint   Number     `json:"lowest_temperature_difference_k"`
	HighestPoint  Number     `json:"highest_temperature_difference_k"`
	BootstrapLine *[2]Number `json:"bootstrap_standard_deviations"` // of intercept and slope; null without bootstrap
}

// LeftOutRow is a point that was not used.
type LeftOutRow struct {
	Scan    string `json:"scan"`
	Setting Number `json:"setting"`
	Line    int    `json:"line"`
	Why     string `json:"why"`
}

// CalibrationRow is what a calibration rests on.
type CalibrationRow struct {
	Curve     string        `json:"activation_curve"`
	Standards []StandardRow `json:"standards"`
	Pressure  Number        `json:"pressure_pa"`
	Flow      Number        `json:"flow_m3_per_s"`
}

// StandardRow is a salt with its model.
type StandardRow struct {
	Name           string   `json:"name"`
	Models         []string `json:"models"`
	Temperature    Number   `json:"temperature_k"`
	SurfaceTension Number   `json:"surface_tension_n_per_m"`
	WaterDensity   Number   `json:"water_density_kg_per_m3"`
	ShapeFactor    Number   `json:"shape_factor"`
	AirTemperature Number   `json:"classifier_temperature_k"`
	AirPressure    Number   `json:"classifier_pressure_pa"`
}

func (c *calibrated) facts() CounterFacts {
	f := CounterFacts{Scans: []ScanRow{}, LeftOut: []LeftOutRow{}, Columns: c.mapping}
	for _, s := range c.Scans {
		f.Scans = append(f.Scans, scanRow(s))
	}
	for _, l := range c.LeftOut {
		f.LeftOut = append(f.LeftOut, LeftOutRow{l.Scan, Number(l.Setting), l.Line, l.Why})
	}
	if c.Line != nil {
		f.Line = c.lineRow()
	} else {
		f.Fault = &c.LineFault
	}
	f.File = c.Calibration
	f.Record = CalibrationRow{Curve: c.Curve, Standards: []StandardRow{}, Pressure: positive(c.Pressure), Flow: positive(c.Flow)}
	for _, s := range c.Standards {
		f.Record.Standards = append(f.Record.Standards, StandardRow{s.Name, s.Models, Number(s.Temperature), Number(s.SurfaceTension),
			Number(s.WaterDensity), Number(s.ShapeFactor), Number(s.AirTemperature), Number(s.AirPressure)})
	}
	return f
}

// positive is a number that 0 stands for as not known.
func positive(x float64) Number {
	if x > 0 {
		return Number(x)
	}
	return Number(math.NaN())
}

func scanRow(s counter.ScanResult) ScanRow {
	gap := Number(math.NaN())
	r := ScanRow{Name: s.Name, TemperatureDifference: Number(s.TemperatureDifference), D50: gap, D50Uncertainty: gap, Width: gap, Plateau: gap,
		DoublyCharged: gap, CriticalSupersaturation: gap, SupersaturationU: gap, Dispersion: gap, BootstrapDeviation: gap, Choices: []ChoiceRow{}, InLine: s.InLine}
	if s.Fault != "" {
		r.Fault = &s.Fault
		return r
	}
	r.D50, r.D50Uncertainty = Number(s.MobilityDiameter), Number(s.DiameterUncertainty)
	r.Width, r.Plateau, r.DoublyCharged = Number(s.Width.Value), Number(s.Plateau.Value), Number(s.Double.Value)
	r.CriticalSupersaturation, r.SupersaturationU = percentNumber(s.Supersaturation), percentNumber(s.SupersaturationUncertainty)
	r.Dispersion = Number(s.Dispersion)
	if s.Bootstrap != nil {
		r.BootstrapDeviation = Number(s.Bootstrap.Deviation)
	}
	for _, choice := range s.Choices {
		row := ChoiceRow{choice.Model, percentNumber(choice.Supersaturation)}
		if choice.Fault != "" {
			row.CriticalSupersaturation = gap
		}
		r.Choices = append(r.Choices, row)
	}
	return r
}

func (c *calibrated) lineRow() *LineRow {
	l := c.Line
	const p2 = 1e4 // per cent squared
	r := &LineRow{
		Slope: percentNumber(l.Slope), Intercept: percentNumber(l.Intercept),
		Covariance: [][]Number{
			{Number(p2 * l.InterceptUncertainty * l.InterceptUncertainty), Number(p2 * l.Covariance)},
			{Number(p2 * l.Covariance), Number(p2 * l.SlopeUncertainty * l.SlopeUncertainty)}},
		ChiSquare: Number(l.ChiSquare), Freedom: l.Freedom, Probability: Number(l.Probability),
		LowestPoint: Number(l.Lowest), HighestPoint: Number(l.Highest),
	}
	if b := c.LineBootstrap; b != nil {
		r.BootstrapLine = &[2]Number{percentNumber(b.Intercept.Deviation), percentNumber(b.Slope.Deviation)}
	}
	return r
}
