package scenario

import "math"

// Point is one measurement that implies a kappa. What it is follows from what was
// measured: a supersaturation for activation, a growth factor with its humidity for
// growth.
type Point struct {
	Dry             Uncertain // m, of the kind that dry-size-is names
	Supersaturation Uncertain // fraction
	Growth          Uncertain
	Humidity        Uncertain // fraction

	// Of the activation curve that the dry size is the middle of, where it was scanned.
	Width         float64 // standard deviation in ln D; 0: not measured
	TransferWidth float64 // of the classifier, likewise; 0: not taken out
	Plateau       float64 // activated share of large particles
}

// defaultPoint is an invented measurement of activation.
func defaultPoint() Point {
	return Point{Dry: Uncertain{Value: 80e-9, Own: 0.03 * 80e-9}, Supersaturation: Uncertain{Value: 0.0025, Own: 0.05 * 0.0025}, Plateau: 1}
}

// curveWidth is a standard deviation in ln D.
var curveWidth = &quantity{says: "width", units: []unit{bare}, min: 0, max: 3, start: 0.1, step: stepper{small: 0.01, big: 0.1, decimals: 2}}

// pointList is the measurements of the Kappa question.
var pointList = list[Point]{
	key: "point", says: "measurements",
	help: "A measurement: dry-diameter= with supersaturation= at which half of such particles activate, or with growth-factor= and relative-humidity=; each with its " +
		"standard uncertainty, as in dry-diameter=80nm±3%rel, and what is common to all points, as in ±2%rel common.",
	rows: func(s *Scenario) *[]Point { return &s.Measurements },
	fields: []field[Point]{
		{key: "dry-diameter", says: "dry size", quantity: drySize, help: "The dry diameter.", origin: "an invented example",
			at: func(p *Point) any { return &p.Dry }},
		{key: "supersaturation", says: "critical supersaturation", quantity: supersaturation,
			help: "The supersaturation at which half of these particles activate.", origin: "an invented example",
			at: func(p *Point) any { return &p.Supersaturation }},
		{key: "growth-factor", says: "growth factor", quantity: growthFactor,
			help: "The wet over the dry diameter at relative-humidity.", origin: "not measured",
			at: func(p *Point) any { return &p.Growth }},
		{key: "relative-humidity", says: "humidity of growth", quantity: humidity,
			help: "The relative humidity at which the growth factor was measured.", origin: "not measured",
			at: func(p *Point) any { return &p.Humidity }},
		{key: "width", says: "width of the activation curve", quantity: curveWidth,
			help:   "The standard deviation in ln D of the activated share against dry size, where particles were scanned: it says how far kappa spreads. 0: not measured.",
			origin: "not measured",
			at:     func(p *Point) any { return &p.Width }},
		{key: "transfer-width", says: "width of the classifier", quantity: curveWidth,
			help:   "The standard deviation in ln D of the classifier's transfer function, which is taken out of the width of the activation curve. 0: not taken out.",
			origin: "not taken out",
			at:     func(p *Point) any { return &p.TransferWidth }},
		{key: "plateau", says: "plateau of the activation curve", quantity: efficiency,
			help:   "The activated share of the large particles, corrected for the efficiency of the counter. What is missing to 1 never activates.",
			origin: "all large particles activate",
			at:     func(p *Point) any { return &p.Plateau }},
	},
	standard: defaultPoint,
	blank:    func() Point { return Point{Plateau: 1} },
	required: []string{"dry-diameter"},
	least:    1,
	most:     200,
	show: func(s *Scenario) string {
		if len(s.Measurements) != 1 {
			return count(len(s.Measurements), "measurement")
		}
		p := s.Measurements[0]
		text := drySize.show(p.Dry.Value)
		if p.Supersaturation.Known() {
			text += ", " + supersaturation.show(p.Supersaturation.Value)
		}
		if p.Growth.Known() {
			text += ", growth " + growthFactor.show(p.Growth.Value)
		}
		return text
	},
}

// kappaFields declares what the Kappa question asks for besides its points.
var kappaFields = []field[Scenario]{
	{key: "points-file", says: "file of measurements", form: File,
		help:   "A CSV file of measurements, one a row, in place of the points given one by one. demo stands for the built-in ones of an invented station.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.PointsFile }},
	{key: "growth-factors", says: "file of growth factors", form: File,
		help: "A CSV file with the distribution of growth factors of the first measurement, which it must be of growth: columns growth_factor and share, or " +
			"growth_factor_low, growth_factor_high and share. It becomes a distribution of kappa.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.GrowthFactors },
		used:   func(s *Scenario) bool { return s.PointsFile == "" }},
	{key: "trials", says: "trials", quantity: trialCount, words: []Option{{"adaptive", "as many as needed"}},
		help: "How many trials Monte Carlo makes (JCGM 101); 0 is linear propagation alone (JCGM 100). With adaptive as many as two digits of the standard uncertainty " +
			"need (JCGM 101, 7.9), one million at most.",
		origin: "enough for two digits of the interval (common practice)",
		at:     func(s *Scenario) any { return &s.Trials }},
	{key: "seed", says: "seed", quantity: seedNumber,
		help:   "The seed of the random numbers; the same seed gives the same answer.",
		origin: "any number does",
		at:     func(s *Scenario) any { return &s.Seed }},
	{key: "coverage", says: "coverage", quantity: coverage,
		help:   "Which share of the distribution the intervals hold.",
		origin: "common practice",
		at:     func(s *Scenario) any { return &s.Coverage }},
	{key: "published-kappa", says: "published kappa", quantity: kappaValue, words: []Option{{"none", "none"}},
		help: "A kappa to compare with: it is recomputed for the water of the question, and the dry size at which such particles activate stands beside each " +
			"measurement, or how far they grow.",
		origin: "nothing is compared",
		at:     func(s *Scenario) any { return &s.PublishedKappa }},
	{key: "published-temperature", says: "temperature of the published kappa", quantity: airTemperature,
		help:   "The temperature that the published kappa was computed with.",
		origin: "the convention of most published kappa (Petters and Kreidenweis 2007)",
		at:     func(s *Scenario) any { return &s.PublishedTemperature },
		used:   isCompared},
	{key: "published-surface-tension", says: "surface tension of the published kappa", quantity: tension,
		help:   "The surface tension that the published kappa was computed with.",
		origin: "the convention of most published kappa (Petters and Kreidenweis 2007)",
		at:     func(s *Scenario) any { return &s.PublishedTension },
		used:   isCompared},
}

func isCompared(s *Scenario) bool { return s.PublishedKappa.Word == "" }

// counterFields declares what the Counter question asks for besides its scans.
var counterFields = []field[Scenario]{
	{key: "calibration", says: "calibration of the counter", form: File,
		help:   "A calibration file that the Counter question has written; measured counts then stand at calibrated supersaturations.",
		origin: "none: supersaturations as the data have them",
		at:     func(s *Scenario) any { return &s.Calibration }},
	{key: "scan", says: "scan in the picture", quantity: scanNumber, words: []Option{{"all", "all"}},
		help:   "Which activation curve is drawn, by its number in the order of the scans, or all of them.",
		origin: "all",
		at:     func(s *Scenario) any { return &s.Scan }},
	{key: "calibration-after", says: "calibration after the data", form: File,
		help:   "A second calibration file, made later: between the two the calibration is interpolated in time.",
		origin: "none: one calibration serves all",
		at:     func(s *Scenario) any { return &s.CalibrationAfter },
		used:   func(s *Scenario) bool { return s.Calibration != "" }},
	{key: "set-slope", says: "slope of the set line", quantity: setSlope, words: []Option{{"none", "none"}},
		help: "What the counter itself takes as supersaturation a kelvin of temperature difference: with it supersaturations as set go back to temperature differences, " +
			"to which the calibration is applied where the data have none.",
		origin: "none: the data have the temperature difference",
		at:     func(s *Scenario) any { return &s.SetSlope },
		used:   func(s *Scenario) bool { return s.Calibration != "" }},
	{key: "set-intercept", says: "intercept of the set line", quantity: setIntercept,
		help:   "What the counter itself takes as supersaturation at no temperature difference.",
		origin: "a line through nothing",
		at:     func(s *Scenario) any { return &s.SetIntercept },
		used:   func(s *Scenario) bool { return s.Calibration != "" && s.SetSlope.Word == "" }},
	{key: "activation-curve", says: "activation curve",
		words: []Option{{"two-step", "two steps"}, {"gaussian", "cumulative Gaussian"}, {"sigmoid", "sigmoid"}},
		help: "The form of the activated fraction: two steps, the lower one of doubly charged particles of equal mobility; or one step as a cumulative Gaussian in " +
			"the logarithm of the diameter, or as a sigmoid.",
		origin: "two steps have the least bias",
		at:     func(s *Scenario) any { return &s.Activation }},
	{key: "polarity", says: "polarity", words: []Option{{"positive", "positive"}, {"negative", "negative"}},
		help:   "The polarity of the particles that the classifier selects. The share of doubly charged ones depends on it.",
		origin: "common practice",
		at:     func(s *Scenario) any { return &s.Polarity }},
	{key: "plateau", says: "efficiency of the counter", quantity: efficiency, words: []Option{{"fitted", "fitted"}},
		help:   "The activated fraction of large particles: the efficiency of the CCN counter against the particle counter.",
		origin: "it follows from the scan itself",
		at:     func(s *Scenario) any { return &s.Plateau }},
	{key: "double-charged", says: "doubly charged share", quantity: efficiency, words: []Option{{"fitted", "fitted"}},
		help:   "A constant share of doubly charged particles where no size distribution gives it.",
		origin: "it follows from the scan itself",
		at:     func(s *Scenario) any { return &s.DoubleCharged },
		used:   func(s *Scenario) bool { return s.Activation == "two-step" }},
	{key: "cn-delay", says: "delay of the particle counter", quantity: delay,
		help:   "How much later the particles of the same air reach the CCN counter than the particle counter: its counts are moved by that.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.CNDelay }},
	{key: "settling", says: "settling time", quantity: delay,
		help:   "How long after a change of the temperature difference rows are left out, because the column is not steady yet.",
		origin: "the log holds steady rows only",
		at:     func(s *Scenario) any { return &s.Settling }},
	{key: "cn-cut-off", says: "cut-off of the particle counter", quantity: cutOff, words: []Option{{"none", "none"}},
		help:   "The diameter of which the particle counter counts half; smaller ones are corrected for. Its curve is a logistic one with a tenth of that as its scale.",
		origin: "it counts all sizes of the scans",
		at:     func(s *Scenario) any { return &s.CNCutOff }},
	{key: "bootstrap", says: "bootstrap", quantity: trialCount,
		help:   "How many replicates check the covariance of the fits; 0 is none.",
		origin: "common practice",
		at:     func(s *Scenario) any { return &s.Bootstrap }},
}

// scanList is the salt scans of the counter.
var scanList = list[DataFile]{
	key: "scans", says: "salt scans",
	help: "A file of salt scans: salt, temperature difference, dry diameter, CN, CCN, and time, pressure, flows where there are. demo stands for the built-in scans of an " +
		"invented station.",
	rows:     func(s *Scenario) *[]DataFile { return &s.Scans },
	fields:   dataList.fields,
	standard: dataList.standard,
	another:  dataList.another,
	required: dataList.required,
	first:    "file",
	least:    1,
	most:     20,
	show:     func(s *Scenario) string { return showFiles(s.Scans) },
}

// scanMapList says what columns of the scans hold.
var scanMapList = list[MapLine]{
	key: "scans-map", says: "meaning of the scans' columns",
	help:     "What a column of the scans holds, as column=quantity, where the guess is wrong.",
	rows:     func(s *Scenario) *[]MapLine { return &s.ScansMap },
	fields:   mapList.fields,
	standard: mapList.standard,
	first:    "column",
	raw:      true,
	most:     200,
	show: func(s *Scenario) string {
		if len(s.ScansMap) == 0 {
			return "as guessed"
		}
		return count(len(s.ScansMap), "line")
	},
}

// checkPoint says what a measurement lacks.
func checkPoint(p Point) (problem, right string) {
	switch {
	case !p.Supersaturation.Known() && !p.Growth.Known():
		return "neither a supersaturation nor a growth factor was measured", "one of them"
	case p.Supersaturation.Known() && p.Growth.Known():
		return "a supersaturation and a growth factor stand in one measurement", "one of them; kappa from growth and from activation are kept apart"
	case p.Growth.Known() && !p.Humidity.Known():
		return "a growth factor without its humidity", "relative-humidity=, such as 90%±1%abs"
	case !p.Dry.Known() || math.IsInf(p.Dry.Value, 0):
		return "no dry size", "dry-diameter=, such as 80nm±3%rel"
	}
	return "", ""
}
