package scenario

// commonFields declares how sure what is common to all measurements is.
var commonFields = []field[Scenario]{
	{key: "temperature-uncertainty", says: "uncertainty of the temperature", quantity: temperatureSpread,
		help:   "The standard uncertainty of the temperature, common to all measurements. On the Ledger page 0 stands for what is usual there; uncertainty with relative=0% leaves an input out.",
		origin: "none is counted",
		at:     func(s *Scenario) any { return &s.TemperatureUncertainty }},
	{key: "surface-tension-uncertainty", says: "uncertainty of the surface tension", quantity: tensionSpread,
		help:   "The standard uncertainty of the surface tension, common to all measurements. On the Ledger page 0 stands for what is usual there; uncertainty with relative=0% leaves an input out.",
		origin: "none is counted",
		at:     func(s *Scenario) any { return &s.TensionUncertainty }},
	{key: "shape-factor-uncertainty", says: "uncertainty of the shape factor", quantity: shapeSpread,
		help:   "The standard uncertainty of the shape factor, common to all measurements. On the Ledger page 0 stands for what is usual there; uncertainty with relative=0% leaves an input out.",
		origin: "none is counted",
		at:     func(s *Scenario) any { return &s.ShapeUncertainty },
		used:   func(s *Scenario) bool { return s.DrySizeIs == "mobility" }},
}

// Spreads are differences: a degree Celsius of them is a kelvin.
var (
	kelvinStep = unit{[]string{"K", "kelvin", "°C", "C"}, "1", ""}

	temperatureSpread = &quantity{says: "temperature difference", units: []unit{kelvinStep}, si: "k", min: 0, max: 20, start: 0.5,
		step: stepper{small: 0.1, big: 1, decimals: 1}}
	tensionSpread = &quantity{says: "surface tension", units: []unit{millinewton, newton}, si: "n_per_m", min: 0, max: 0.02, start: 0.5e-3,
		step: stepper{small: 0.1, big: 1, decimals: 1}}
	shapeSpread = &quantity{says: "shape factor", units: []unit{bare}, min: 0, max: 0.5, start: 0.02,
		step: stepper{small: 0.01, big: 0.1, decimals: 2}}
)
