// Package scenario is what is asked: every quantity declared once. From that one
// declaration come the slot on the screen, the option of the command line, the
// key of the scenario file, the help text and the position of an error.
package scenario

import (
	"reflect"
	"slices"

	"dropcrest/solutes"
)

// Scenario is one question in full, in SI units. Words are the words of the
// options. A Measure that is a word has no number.
type Scenario struct {
	DryDiameter      float64 // m
	DrySizeIs        string  // volume-equivalent | mobility
	ShapeFactor      float64
	Adsorption       []Isotherm  // of insoluble matter; none: of the catalogue
	Components       []Component // may be empty when Kappa is a number
	SharesBy         string      // volume | mass
	WaterActivity    string      // kappa | vant-hoff | ion-interaction
	Kappa            Measure     // number, or "catalogue"
	VantHoffFactor   Measure     // number, or "ions"
	Solubility       string      // limited | complete
	SurfaceTension   Measure     // N/m, or "water" | "solution"
	Szyszkowski      []Film      // of the surface-active organics, one at most
	Partitioning     string      // on | off
	TolmanLength     float64     // m, 0: a flat surface's tension
	SolutionDensity  string      // additive | measured
	Kelvin           string      // standard | pure-vapour | compressible
	Temperature      float64     // K
	RelativeHumidity float64     // fraction
	HumidityHistory  string      // rising | falling
	Points           int
	FromRadius       Measure // m, or "frame"
	ToRadius         Measure // m, or "frame"

	Population       string     // data | modes | bins
	Modes            []Mode     // of a population of modes
	Bins             string     // file of a size distribution, "": none
	Data             []DataFile // measured files; "demo" is the invented station
	Map              []MapLine  // what columns hold, where the guess is wrong
	Record           Measure    // number of the record looked at, or "all"
	Every            Measure    // s: windows that are averaged over, or "records" of the first file
	Average          string     // mean | median | quartile-mean
	Composition      string     // measured | given
	Mixing           string     // internal | external
	KappaSpread      float64    // geometric standard deviation of kappa
	Supersaturations []float64  // fractions
	Fit              string     // none | power | cohard | erf | erf2
	Axes             string     // log | linear
	Rules            []Rule     // of quality, whose bounds are not the usual ones
	Penetration      string     // share of particles that reach the instrument: a number or a file, "": all

	Calibration      string  // file of a calibration of the counter, "": none
	CalibrationAfter string  // file of a later one, "": none
	SetSlope         Measure // 1/K, of the line that the counter itself takes, or "none"
	SetIntercept     float64 // fraction
	CNDelay          float64 // s
	Settling         float64 // s
	CNCutOff         Measure // m, or "none"
	Measurements     []Point // that imply a kappa
	PointsFile       string  // file of such points, "": none
	GrowthFactors    string  // file of a distribution of growth factors, "": none
	Trials           Measure // of Monte Carlo, 0: linear propagation alone; or "adaptive"
	Seed             int
	Coverage         float64    // fraction
	Scans            []DataFile // salt scans of the counter; "demo" is the invented station
	ScansMap         []MapLine
	Counted          []Counted // scans that were typed, in place of files
	Scan             Measure   // number of the scan whose curve is drawn, or "all"
	Activation       string    // two-step | gaussian | sigmoid
	Polarity         string    // positive | negative, of the classifier
	Plateau          Measure   // efficiency of the counter, or "fitted"
	DoubleCharged    Measure   // share of doubly charged particles, or "fitted"
	Bootstrap        int       // replicates, 0: none

	Updraft              float64 // m/s
	UpdraftSpread        float64 // m/s, 0: one updraft
	UpdraftWeighting     string  // number | flux
	Pressure             float64 // Pa, where the air starts to rise
	StartHumidity        float64 // fraction
	MassAccommodation    float64
	ThermalAccommodation float64
	Transition           string // fuchs-sutugin | flux-matching | continuum
	MoistHeat            string // on | off
	Refinement           string // on | off
	AscentBins           int    // of each mode
	Tolerance            float64
	Height               float64   // m
	Follow               []float64 // m, dry diameters
	Sweep                string    // "": none
	Cases                string    // file of one ascent a row, "": none
	Part                 string    // of the cases, "3/64"; "": all
	PublishedKappa       Measure   // that the measurements are compared with, or "none"
	PublishedTemperature float64   // K, and
	PublishedTension     float64   // N/m: of the water that it was computed with

	LedgerOf          string // curve | spectrum | ascent
	ParticleOutcome   string // critical-supersaturation | critical-wet-radius | haze-radius
	AtSupersaturation float64
	AscentOutcome     string // droplets | peak-supersaturation
	LedgerRow         int
	Reach             Measure       // relative, or "half"
	Uncertainties     []Uncertainty // of a ledger's inputs, where the usual is not meant

	// Standard uncertainties that all measurements share.
	TemperatureUncertainty float64 // K
	TensionUncertainty     float64 // N/m
	ShapeUncertainty       float64

	substances *solutes.Catalogue // nil: the standard one
	anyName    bool               // names of substances are not looked up
}

// Component is one part of the dry particle.
type Component struct {
	Substance string  // catalogue name; "" when everything is given by the fields
	Share     float64 // > 0; scaled so that all add up to 1
	Kappa     Measure // number, or "catalogue"
	Density   Measure // kg/m³, or "catalogue"
	MolarMass Measure // kg/mol, or "catalogue"
	Ions      Measure // number, or "catalogue"

	Solubility Measure // m³ of compound per m³ of water, or "catalogue"
}

// Film is the surface activity of organics by Szyszkowski and Langmuir.
type Film struct {
	GammaMax float64 // mol/m²
	K        float64 // m³/mol
	Floor    float64 // N/m, 0: none
}

// Isotherm is the adsorption of water by Frenkel, Halsey and Hill. A = 0 is none.
type Isotherm struct {
	A, B float64
	Form string // kappa | exponential: the term of a soluble share
}

// Measure is a number or a word that stands for one.
type Measure struct {
	Word   string  // "" when the number counts
	Number float64 // SI
}

// Is reports whether the measure is that word.
func (m Measure) Is(word string) bool { return m.Word == word }

// Default returns the scenario a new user meets: 100 nm of ammonium sulfate by
// ion interaction in air of 25 °C, looked at at 95 % humidity.
func Default() Scenario {
	return Scenario{
		DryDiameter:      100e-9,
		DrySizeIs:        "volume-equivalent",
		ShapeFactor:      1,
		Components:       []Component{defaultComponent("ammonium sulfate")},
		SharesBy:         "volume",
		WaterActivity:    "ion-interaction",
		Kappa:            Measure{Word: "catalogue"},
		VantHoffFactor:   Measure{Word: "ions"},
		Solubility:       "limited",
		Partitioning:     "on",
		HumidityHistory:  "rising",
		SurfaceTension:   Measure{Word: "water"},
		SolutionDensity:  "additive",
		Kelvin:           "standard",
		Temperature:      298.15,
		RelativeHumidity: 0.95,
		Points:           200,
		FromRadius:       Measure{Word: "frame"},
		ToRadius:         Measure{Word: "frame"},
		Population:       "data",
		Modes:            defaultModes(),
		Data:             []DataFile{{Name: DemoData}},
		Record:           Measure{Number: 1},
		Every:            Measure{Word: "records"},
		Average:          "mean",
		Composition:      "measured",
		Mixing:           "internal",
		KappaSpread:      1,
		Supersaturations: []float64{0.001, 0.002, 0.004, 0.006, 0.01},
		Fit:              "none",
		Axes:             "log",
		Measurements:     []Point{defaultPoint()},
		Trials:           Measure{Number: 100000},
		Seed:             1,
		Coverage:         0.95,
		Scans:            []DataFile{{Name: DemoData}},
		Scan:             Measure{Word: "all"},
		Activation:       "two-step",
		Polarity:         "positive",
		Plateau:          Measure{Word: "fitted"},
		CNCutOff:         Measure{Word: "none"},
		SetSlope:         Measure{Word: "none"},
		DoubleCharged:    Measure{Word: "fitted"},
		Bootstrap:        1000,

		Updraft:              0.5,
		UpdraftWeighting:     "number",
		Pressure:             90000,
		StartHumidity:        0.95,
		MassAccommodation:    1,
		ThermalAccommodation: 0.96,
		Transition:           "fuchs-sutugin",
		MoistHeat:            "off",
		Refinement:           "off",
		AscentBins:           200,
		Tolerance:            1e-5,
		Height:               300,
		Follow:               []float64{30e-9, 50e-9, 80e-9, 120e-9, 200e-9},
		PublishedKappa:       Measure{Word: "none"},
		PublishedTemperature: 298.15,
		PublishedTension:     0.072,
		LedgerOf:             LedgerOfCurve,
		ParticleOutcome:      "critical-supersaturation",
		AtSupersaturation:    0.004,
		AscentOutcome:        "droplets",
		LedgerRow:            1,
		Reach:                Measure{Word: "half"},
	}
}

func defaultComponent(substance string) Component {
	own := Measure{Word: "catalogue"}
	return Component{Substance: substance, Share: 1, Kappa: own, Density: own, MolarMass: own, Ions: own, Solubility: own}
}

// Clone returns a copy that shares nothing with s but the catalogue, which does
// not change.
func (s Scenario) Clone() Scenario {
	s.Components = slices.Clone(s.Components)
	s.Szyszkowski = slices.Clone(s.Szyszkowski)
	s.Adsorption = slices.Clone(s.Adsorption)
	s.Modes, s.Data, s.Map = slices.Clone(s.Modes), slices.Clone(s.Data), slices.Clone(s.Map)
	s.Supersaturations, s.Follow = slices.Clone(s.Supersaturations), slices.Clone(s.Follow)
	s.Rules, s.Uncertainties = slices.Clone(s.Rules), slices.Clone(s.Uncertainties)
	s.Measurements, s.Scans, s.ScansMap, s.Counted = slices.Clone(s.Measurements), slices.Clone(s.Scans), slices.Clone(s.ScansMap), slices.Clone(s.Counted)
	return s
}

// Equal reports whether both ask the same.
func (s Scenario) Equal(other Scenario) bool {
	return slices.Equal(s.Uncertainties, other.Uncertainties) && slices.Equal(s.Counted, other.Counted) && slices.Equal(s.Measurements, other.Measurements) && slices.Equal(s.Scans, other.Scans) && slices.Equal(s.ScansMap, other.ScansMap) &&
		slices.Equal(s.Rules, other.Rules) && slices.Equal(s.Modes, other.Modes) && slices.Equal(s.Data, other.Data) && slices.Equal(s.Map, other.Map) &&
		slices.Equal(s.Components, other.Components) && slices.Equal(s.Szyszkowski, other.Szyszkowski) &&
		slices.Equal(s.Adsorption, other.Adsorption) && reflect.DeepEqual(s.plain(), other.plain())
}

// plain is the scenario without its rows and without where names are looked up.
func (s Scenario) plain() Scenario {
	s.Modes, s.Data, s.Map, s.Rules, s.Measurements, s.Scans, s.ScansMap, s.Uncertainties, s.Counted = nil, nil, nil, nil, nil, nil, nil, nil, nil
	s.Components, s.Szyszkowski, s.Adsorption, s.substances, s.anyName = nil, nil, nil, nil, false
	return s
}

// Use makes names of substances be looked up in that catalogue.
func (s *Scenario) Use(c *solutes.Catalogue) { s.substances = c }

func (s *Scenario) catalogue() *solutes.Catalogue {
	if s.substances != nil {
		return s.substances
	}
	return solutes.Standard()
}

// Inputs returns every input of the scenario, those of its rows included, in
// the order of the statement.
func Inputs(s *Scenario) []Input {
	out := ownInputs(s)
	for _, l := range Lists(s) {
		for i := range l.Len() {
			out = append(out, l.Row(i)...)
		}
	}
	return out
}

// ownInputs are the inputs that are no rows.
func ownInputs(s *Scenario) []Input {
	standard := Default()
	out := make([]Input, 0, len(fields))
	for i := range fields {
		out = append(out, slot[Scenario]{&fields[i], s, s, Path(fields[i].key), &standard})
	}
	return out
}

// Find returns the input at a path.
func Find(s *Scenario, p Path) (Input, bool) {
	for _, in := range Inputs(s) {
		if in.Path() == p {
			return in, true
		}
	}
	return nil, false
}
