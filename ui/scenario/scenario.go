package scenario

// Scenario is one question in full, in SI units. Words are the words of the
// options. A Measure that is a word has no number.
type Scenario struct {
	DryDiameter      float64 // m
	DrySizeIs        string  // volume-equivalent | mobility
	ShapeFactor      float64
	Components       []Component // may be empty when Kappa is a number
	SharesBy         string      // volume | mass
	WaterActivity    string      // kappa | vant-hoff | ion-interaction
	Kappa            Measure     // number, or "catalogue"
	VantHoffFactor   Measure     // number, or "ions"
	SurfaceTension   Measure     // N/m, or "water" | "solution"
	SolutionDensity  string      // additive | measured
	Kelvin           string      // standard | pure-vapour | compressible
	Temperature      float64     // K
	RelativeHumidity float64     // fraction
	Points           int
	FromRadius       Measure // m, or "frame"
	ToRadius         Measure // m, or "frame"
}

// Component is one part of the dry particle.
type Component struct {
	Substance string  // catalogue name; "" when everything is given by the fields
	Share     float64 // > 0; scaled so that all add up to 1
	Kappa     Measure // number, or "catalogue"
	Density   Measure // kg/m³, or "catalogue"
	MolarMass Measure // kg/mol, or "catalogue"
	Ions      Measure // number, or "catalogue"
}

// Measure is a number or a word that stands for one.
type Measure struct {
	Word   string  // "" when the number counts
	Number float64 // SI
}

// Is reports whether the measure is that word.
func (m Measure) Is(word string) bool { return m.Word == word }
