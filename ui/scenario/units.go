package scenario

import "fmt"

// Units, the shown one first. Factors are exact: SI and its prefixes, and the
// definition of the degree Celsius (273.15 K).
var (
	nanometre  = unit{[]string{"nm"}, "1e-9", ""}
	micrometre = unit{[]string{"µm", "um", "μm", "micron"}, "1e-6", ""}
	millimetre = unit{[]string{"mm"}, "1e-3", ""}
	metre      = unit{[]string{"m"}, "1", ""}

	celsius = unit{[]string{"°C", "C", "degC", "celsius"}, "1", "273.15"}
	kelvin  = unit{[]string{"K", "kelvin"}, "1", ""}

	perCent = unit{[]string{"%", "percent"}, "0.01", ""}
	bare    = unit{[]string{""}, "1", ""}

	millinewton = unit{[]string{"mN/m", "dyn/cm"}, "1e-3", ""}
	newton      = unit{[]string{"N/m", "J/m2", "J/m²"}, "1", ""}

	gramPerCubicCentimetre = unit{[]string{"g/cm³", "g/cm3", "kg/L", "g/mL"}, "1000", ""}
	kilogramPerCubicMetre  = unit{[]string{"kg/m³", "kg/m3", "g/L"}, "1", ""}

	micromolePerSquareMetre = unit{[]string{"µmol/m²", "µmol/m2", "umol/m2"}, "1e-6", ""}
	molePerSquareMetre      = unit{[]string{"mol/m²", "mol/m2"}, "1", ""}
	cubicMetrePerMole       = unit{[]string{"m³/mol", "m3/mol"}, "1", ""}
	litrePerMole            = unit{[]string{"L/mol", "l/mol"}, "1e-3", ""}

	perCubicCentimetre = unit{[]string{"/cm³", "/cm3", "cm-3", "1/cm3"}, "1e6", ""}
	perCubicMetre      = unit{[]string{"/m³", "/m3", "m-3", "1/m3"}, "1", ""}

	second = unit{[]string{"s"}, "1", ""}
	minute = unit{[]string{"min"}, "60", ""}
	hour   = unit{[]string{"h"}, "3600", ""}

	gramPerMole     = unit{[]string{"g/mol"}, "1e-3", ""}
	kilogramPerMole = unit{[]string{"kg/mol"}, "1", ""}
)

// Quantities. Ranges are what makes sense to ask for, not where the formulas were
// measured: answers note that. start is also the example in messages.
var (
	drySize = &quantity{says: "length", units: []unit{nanometre, micrometre, millimetre, metre}, si: "m",
		min: 1e-9, max: 1e-5, start: 1e-7, step: stepper{ladder: true}}
	wetRadius = &quantity{says: "length", units: []unit{micrometre, nanometre, millimetre, metre}, si: "m",
		min: 0.5e-9, max: 1e-2, start: 1e-6, step: stepper{ladder: true}}
	shapeFactor = &quantity{says: "shape factor", units: []unit{bare}, min: 1, max: 3, start: 1,
		step: stepper{small: 0.01, big: 0.1, decimals: 2}}
	kappaValue = &quantity{says: "kappa", units: []unit{bare}, min: 0, max: 3, start: 0.3,
		step: stepper{small: 0.01, big: 0.1}}
	vantHoffFactor = &quantity{says: "van 't Hoff factor", units: []unit{bare}, min: 0, max: 10, start: 2,
		step: stepper{small: 0.1, big: 1}}
	airTemperature = &quantity{says: "temperature", units: []unit{celsius, kelvin}, si: "k",
		min: 233.15, max: 323.15, start: 298.15, step: stepper{small: 1, big: 10, decimals: 1}}
	humidity = &quantity{says: "humidity", units: []unit{perCent}, si: "percent",
		min: 0, open: true, max: 1.1, start: 0.95, step: stepper{small: 1, big: 5, decimals: 1}, doubt: doubtFraction}
	tension = &quantity{says: "surface tension", units: []unit{millinewton, newton}, si: "n_per_m",
		min: 1e-3, max: 0.2, start: 0.072, step: stepper{small: 1, big: 10, decimals: 1}}
	pointCount = &quantity{says: "number", units: []unit{bare}, min: 1, max: 100000, whole: true, start: 200,
		step: stepper{ladder: true}}
	share = &quantity{says: "share", units: []unit{bare}, min: 0, open: true, max: 1e6, start: 1,
		step: stepper{small: 0.05, big: 0.25, decimals: 2}}
	massDensity = &quantity{says: "density", units: []unit{gramPerCubicCentimetre, kilogramPerCubicMetre}, si: "kg_per_m3",
		min: 100, max: 20000, start: 1500, step: stepper{small: 0.05, big: 0.5, decimals: 2}}
	molarMass = &quantity{says: "molar mass", units: []unit{gramPerMole, kilogramPerMole}, si: "kg_per_mol",
		min: 1e-3, max: 1000, start: 0.1, step: stepper{ladder: true}}
	volumeSolubility = &quantity{says: "solubility", units: []unit{bare}, min: 0, max: 100, start: 0.01, step: stepper{ladder: true}}
	tolmanLength     = &quantity{says: "length", units: []unit{nanometre, metre}, si: "m",
		min: -1e-9, max: 1e-9, start: 0.1e-9, step: stepper{small: 0.01, big: 0.1}}
	filmExcess = &quantity{says: "amount a surface", units: []unit{micromolePerSquareMetre, molePerSquareMetre}, si: "mol_per_m2",
		min: 0, open: true, max: 1e-4, start: 3e-6, step: stepper{ladder: true}}
	filmAffinity = &quantity{says: "volume an amount", units: []unit{cubicMetrePerMole, litrePerMole}, si: "m3_per_mol",
		min: 0, open: true, max: 1e6, start: 20, step: stepper{ladder: true}}
	filmFloor = &quantity{says: "surface tension", units: []unit{millinewton, newton}, si: "n_per_m",
		min: 0, max: 0.072, start: 0.03, step: stepper{small: 1, big: 10, decimals: 1}}
	isothermA           = &quantity{says: "number", units: []unit{bare}, min: 0, max: 20, start: 2.25, step: stepper{small: 0.05, big: 0.5, decimals: 2}}
	isothermB           = &quantity{says: "number", units: []unit{bare}, min: 0.1, max: 5, start: 1.2, step: stepper{small: 0.05, big: 0.5, decimals: 2}}
	numberConcentration = &quantity{says: "number concentration", units: []unit{perCubicCentimetre, perCubicMetre}, si: "per_m3",
		min: 0, open: true, max: 1e12, start: 1e9, step: stepper{ladder: true}}
	geometricDeviation = &quantity{says: "geometric standard deviation", units: []unit{bare}, min: 1, max: 10, start: 1.6,
		step: stepper{small: 0.05, big: 0.5, decimals: 2}}
	recordNumber    = &quantity{says: "number", units: []unit{bare}, min: 1, max: 1e9, whole: true, start: 1, step: stepper{small: 1, big: 10}}
	duration        = &quantity{says: "time", units: []unit{minute, second, hour}, si: "s", min: 1, max: 86400, start: 1800, step: stepper{ladder: true}}
	clockOffset     = &quantity{says: "time", units: []unit{second, minute, hour}, si: "s", min: -86400, max: 86400, start: 0, step: stepper{small: 1, big: 60}}
	supersaturation = &quantity{says: "supersaturation", units: []unit{perCent}, si: "percent",
		min: 0, open: true, max: 0.1, start: 0.002, step: stepper{ladder: true}}
	growthFactor = &quantity{says: "growth factor", units: []unit{bare}, min: 1, max: 50, start: 1.4, step: stepper{small: 0.01, big: 0.1, decimals: 2}}
	trialCount   = &quantity{says: "number", units: []unit{bare}, min: 0, max: 1e7, whole: true, start: 100000, step: stepper{ladder: true}}
	seedNumber   = &quantity{says: "number", units: []unit{bare}, min: 0, max: 1e9, whole: true, start: 1, step: stepper{small: 1, big: 10}}
	coverage     = &quantity{says: "share", units: []unit{perCent}, si: "percent", min: 0.5, max: 0.999, start: 0.95, step: stepper{small: 1, big: 5}}
	efficiency   = &quantity{says: "share", units: []unit{bare}, min: 0, open: true, max: 1.5, start: 1, step: stepper{small: 0.01, big: 0.1, decimals: 2}}
	ionCount     = &quantity{says: "number of ions", units: []unit{bare}, min: 0, max: 10, start: 2,
		step: stepper{small: 1, big: 1}}
)

// doubtFraction refuses a bare humidity that may be meant as a fraction.
func doubtFraction(x float64) (problem, right string) {
	if x <= 0 || x > 1.1 {
		return "", ""
	}
	return fmt.Sprintf("%s may be a fraction or per cent", figures(x)),
		fmt.Sprintf("%s%% or %s%%", figures(100*x), figures(x))
}
