package fieldfile

// Quantity is what a column holds.
type Quantity int

// The quantities a column can hold. A quantity "at" a supersaturation or a
// diameter is the wide layout (a column each); without, it is the long one (a
// record each, with a column that says at which).
const (
	Unused Quantity = iota
	Time
	StartTime
	MidTime
	EndTime
	Flag
	CCN
	CCNUncertainty
	CCNCounted
	CN
	CNUncertainty
	CNCounted
	PerLogDiameter // dN/dlog10 D
	PerLnDiameter  // dN/dln D; Read gives it as dN/dlog10 D
	PerBin         // dN in the bin
	Diameter
	LowerDiameter
	UpperDiameter
	Supersaturation
	SupersaturationSet
	SupersaturationUncertainty
	TemperatureDifference
	Temperature
	Pressure
	RelativeHumidity
	Kappa
	GrowthFactor
	Organic
	Sulfate
	Nitrate
	Ammonium
	Chloride
	BlackCarbon
	Updraft
	SampleFlow
	SheathFlow
	SamplingTime
	Salt
	Status
	Number
	Text

	Quantities // how many there are
)

// place is what a quantity can be "at".
type place int

const (
	nowhere place = iota
	atSupersaturation
	atDiameter
)

// kind is how the text of a cell is read.
type kind int

const (
	asNumber kind = iota
	asTime
	asText
	asFlags
)

type declaration struct {
	key, says string
	dim       *dimension
	at        place
	kind      kind
}

// declared holds every quantity once: what the mapping calls it, what it is,
// and in which units it can come.
var declared = [Quantities]declaration{
	Unused:                     {"unused", "not used", none, nowhere, asText},
	Time:                       {"time", "time of the measurement, one stamp a record", nil, nowhere, asTime},
	StartTime:                  {"start_time", "time at which the measurement began", nil, nowhere, asTime},
	MidTime:                    {"mid_time", "time in the middle of the measurement", nil, nowhere, asTime},
	EndTime:                    {"end_time", "time at which the measurement ended", nil, nowhere, asTime},
	Flag:                       {"flag", "EBAS flags of the columns before", none, nowhere, asFlags},
	CCN:                        {"ccn", "number concentration of cloud condensation nuclei", concentration, atSupersaturation, asNumber},
	CCNUncertainty:             {"ccn_uncertainty", "standard uncertainty of ccn", concentration, atSupersaturation, asNumber},
	CCNCounted:                 {"ccn_counted", "droplets counted", none, atSupersaturation, asNumber},
	CN:                         {"cn", "number concentration of all particles", concentration, nowhere, asNumber},
	CNUncertainty:              {"cn_uncertainty", "standard uncertainty of cn", concentration, nowhere, asNumber},
	CNCounted:                  {"cn_counted", "particles counted", none, nowhere, asNumber},
	PerLogDiameter:             {"dN/dlog10D", "number per decimal logarithm of diameter", concentration, atDiameter, asNumber},
	PerLnDiameter:              {"dN/dlnD", "number per natural logarithm of diameter", concentration, atDiameter, asNumber},
	PerBin:                     {"dN", "number in a size bin", concentration, atDiameter, asNumber},
	Diameter:                   {"diameter", "dry diameter", length, nowhere, asNumber},
	LowerDiameter:              {"lower_diameter", "lower limit of a size bin", length, nowhere, asNumber},
	UpperDiameter:              {"upper_diameter", "upper limit of a size bin", length, nowhere, asNumber},
	Supersaturation:            {"supersaturation", "supersaturation, as calibrated", excess, nowhere, asNumber},
	SupersaturationSet:         {"supersaturation_set", "supersaturation, as set", excess, nowhere, asNumber},
	SupersaturationUncertainty: {"supersaturation_uncertainty", "standard uncertainty of the supersaturation", excess, nowhere, asNumber},
	TemperatureDifference:      {"temperature_difference", "temperature difference along the column", heatStep, nowhere, asNumber},
	Temperature:                {"temperature", "temperature of the air", heat, nowhere, asNumber},
	Pressure:                   {"pressure", "pressure of the air", force, nowhere, asNumber},
	RelativeHumidity:           {"relative_humidity", "relative humidity", humidity, nowhere, asNumber},
	Kappa:                      {"kappa", "hygroscopicity", none, nowhere, asNumber},
	GrowthFactor:               {"growth_factor", "wet over dry diameter", none, nowhere, asNumber},
	Organic:                    {"organic", "organic matter", mass, nowhere, asNumber},
	Sulfate:                    {"sulfate", "sulfate", mass, nowhere, asNumber},
	Nitrate:                    {"nitrate", "nitrate", mass, nowhere, asNumber},
	Ammonium:                   {"ammonium", "ammonium", mass, nowhere, asNumber},
	Chloride:                   {"chloride", "chloride", mass, nowhere, asNumber},
	BlackCarbon:                {"black_carbon", "black or elemental carbon", mass, nowhere, asNumber},
	Updraft:                    {"updraft", "upward air velocity", speed, nowhere, asNumber},
	SampleFlow:                 {"sample_flow", "sample flow", flow, nowhere, asNumber},
	SheathFlow:                 {"sheath_flow", "sheath flow", flow, nowhere, asNumber},
	SamplingTime:               {"sampling_time", "time over which was counted", span, nowhere, asNumber},
	Salt:                       {"salt", "name of the calibration salt", none, nowhere, asText},
	Status:                     {"status", "the instrument's word on its state", none, nowhere, asText},
	Number:                     {"number", "a number as it stands", none, nowhere, asNumber},
	Text:                       {"text", "text as it stands", none, nowhere, asText},
}

func (q Quantity) String() string { return declared[q].key }

// Says is the quantity in words.
func (q Quantity) Says() string { return declared[q].says }

// IsTime reports whether it is one of the time stamps.
func (q Quantity) IsTime() bool { return declared[q].kind == asTime }

// IsSize reports whether it is a column of a size distribution.
func (q Quantity) IsSize() bool { return declared[q].at == atDiameter }

// quantityKeys are the names a mapping can use.
func quantityKeys() []string {
	keys := make([]string, Quantities)
	for q := range declared {
		keys[q] = declared[q].key
	}
	return keys
}

func quantityOf(key string) (Quantity, bool) {
	for q := range declared {
		if declared[q].key == key {
			return Quantity(q), true
		}
	}
	return Unused, false
}
