package scenario

// Units of the ascent alone.
var (
	metrePerSecond      = unit{[]string{"m/s"}, "1", ""}
	centimetrePerSecond = unit{[]string{"cm/s"}, "0.01", ""}

	hectopascal = unit{[]string{"hPa", "mbar"}, "100", ""}
	pascal      = unit{[]string{"Pa"}, "1", ""}
	kilopascal  = unit{[]string{"kPa"}, "1000", ""}
)

// Quantities of the ascent alone.
var (
	updraft = &quantity{says: "updraft", units: []unit{metrePerSecond, centimetrePerSecond}, si: "m_per_s",
		min: 0, max: 50, start: 0.5, step: stepper{ladder: true}}
	airPressure = &quantity{says: "pressure", units: []unit{hectopascal, pascal, kilopascal}, si: "pa",
		min: 20000, max: 110000, start: 90000, step: stepper{small: 10, big: 100}}
	startHumidity = &quantity{says: "humidity", units: []unit{perCent}, si: "percent",
		min: 0.3, max: 1, start: 0.95, step: stepper{small: 1, big: 5, decimals: 1}, doubt: doubtFraction}
	accommodation = &quantity{says: "accommodation coefficient", units: []unit{bare}, min: 1e-4, max: 1, start: 1, step: stepper{ladder: true}}
	binCount      = &quantity{says: "number", units: []unit{bare}, min: 10, max: 10000, whole: true, start: 200, step: stepper{ladder: true}}
	tolerance     = &quantity{says: "tolerance", units: []unit{bare}, min: 1e-10, max: 1e-4, start: 1e-5, step: stepper{ladder: true}}
	height        = &quantity{says: "height", units: []unit{metre, kilometre}, si: "m", min: 1, max: 5000, start: 300, step: stepper{ladder: true}}

	kilometre = unit{[]string{"km"}, "1000", ""}
)

// hasUpdrafts tells whether the air rises with a distribution of updrafts.
func hasUpdrafts(s *Scenario) bool { return s.UpdraftSpread > 0 }

// ascentFields declares what the Ascent question asks for besides its population.
var ascentFields = []field[Scenario]{
	{key: "updraft", says: "updraft", quantity: updraft,
		help: "How fast the air rises; of a distribution of updrafts, the mean of the normal distribution whose part above 0 counts. " +
			"0 is possible with updraft-spread only.",
		origin: "a moderate updraft at the base of cumulus (common practice)",
		at:     func(s *Scenario) any { return &s.Updraft }},
	{key: "updraft-spread", says: "spread of updrafts", quantity: updraft,
		help: "The standard deviation of a normal distribution of updrafts about updraft, whose part above 0 counts; with an updraft of 0 that is half a Gaussian. " +
			"0 is one updraft for all air.",
		origin: "one updraft",
		at:     func(s *Scenario) any { return &s.UpdraftSpread }},
	{key: "updraft-weighting", says: "weight of updrafts", words: []Option{{"number", "by area"}, {"flux", "by flux"}},
		help:   "Whether updrafts count by the area they cover (number) or by the air that they carry through cloud base (flux).",
		origin: "common practice in models of climate",
		at:     func(s *Scenario) any { return &s.UpdraftWeighting }, used: hasUpdrafts},
	{key: "pressure", says: "pressure", quantity: airPressure,
		help:   "The pressure of the air where it starts to rise.",
		origin: "about 1 km above the sea, a usual height of cloud base",
		at:     func(s *Scenario) any { return &s.Pressure }},
	{key: "start-humidity", says: "humidity at the start", quantity: startHumidity,
		help:   "The relative humidity where the air starts to rise, with the particles in equilibrium.",
		origin: "below cloud base, where particles still are in equilibrium (common practice)",
		at:     func(s *Scenario) any { return &s.StartHumidity }},
	{key: "mass-accommodation", says: "mass accommodation", quantity: accommodation,
		help:   "The share of the water molecules that hit a drop and stay.",
		origin: "laboratory work on dilute water is near 1 (from memory)",
		at:     func(s *Scenario) any { return &s.MassAccommodation }},
	{key: "thermal-accommodation", says: "thermal accommodation", quantity: accommodation,
		help:   "The share of the air molecules that leave a drop with its temperature.",
		origin: "a usual value in parcel models (common practice)",
		at:     func(s *Scenario) any { return &s.ThermalAccommodation }},
	{key: "transition", says: "form of growth",
		words:  []Option{{"fuchs-sutugin", "Fuchs and Sutugin"}, {"flux-matching", "matched fluxes"}, {"continuum", "continuum"}},
		help:   "How the growth of small drops is corrected for free molecules: by Fuchs and Sutugin (1970), by fluxes matched at the surface, or not at all.",
		origin: "the form that most parcel models have (common practice)",
		at:     func(s *Scenario) any { return &s.Transition }},
	{key: "moist-heat", says: "heat of vapour and liquid", words: []Option{{"off", "left out"}, {"on", "kept"}},
		help:   "Whether the heat capacity of the air counts its vapour and liquid water, or is that of dry air alone.",
		origin: "common practice; it is worth less than a per cent of the droplets",
		at:     func(s *Scenario) any { return &s.MoistHeat }},
	{key: "ascent-bins", says: "bins of a mode", quantity: binCount,
		help:   "Into how many sizes each mode, or the measured distribution, is cut. The error falls with the square of it.",
		origin: "the number of droplets is good to some 1e-5 (DEVELOPERS.md)",
		at:     func(s *Scenario) any { return &s.AscentBins }},
	{key: "refinement", says: "refinement", words: []Option{{"off", "off"}, {"on", "on"}},
		help:   "Whether a second ascent with half the bins tells how far the numbers are from those of endless bins.",
		origin: "it takes half as long again",
		at:     func(s *Scenario) any { return &s.Refinement }},
	{key: "tolerance", says: "tolerance", quantity: tolerance,
		help:   "The relative tolerance of the integration, of radii and of the peak.",
		origin: "less than the discretisation (DEVELOPERS.md)",
		at:     func(s *Scenario) any { return &s.Tolerance }},
	{key: "height", says: "height", quantity: height,
		help:   "How far above its start the air rises.",
		origin: "well past the peak in most air",
		at:     func(s *Scenario) any { return &s.Height }},
	{key: "follow", says: "followed dry sizes", quantity: drySize, several: true,
		help:   "Dry diameters whose wet radius is followed and drawn, with commas between them.",
		origin: "sizes to both sides of usual critical ones",
		at:     func(s *Scenario) any { return &s.Follow }},
}

// severalFields declares how many ascents are asked for at once. They are apart from
// the rest, as a sweep looks the rest up.
var severalFields = []field[Scenario]{
	{key: "sweep", says: "sweep", form: Text, check: checkSweep,
		help: "Two quantities that are gone through, each as name=from..to:points:log or lin, such as \"updraft=0.05..5m/s:20:log number=100..10000/cm3:20:log\". " +
			"number is that of all particles; names of other quantities are those of options, mode[0].Dg is the median diameter of the first mode.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.Sweep }},
	{key: "cases", says: "file of cases", form: File,
		help: "A CSV file with one ascent a row: columns are called as options are (updraft, mode[0].N) and hold values with units, or as keys of the JSON " +
			"(updraft_m_per_s) and hold numbers. An empty cell leaves what is asked otherwise.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.Cases }},
	{key: "part", says: "part of the cases",
		help:   "Which part of the cases to make, as 3/64: every 64th row from the 3rd on, so that the jobs of a cluster can share a file.",
		origin: "all of them",
		at:     func(s *Scenario) any { return &s.Part },
		used:   func(s *Scenario) bool { return s.Cases != "" }},
}
