package scenario

// Counted is one setting of a salt scan that was typed: what was selected, at which
// temperature difference, and what was counted.
type Counted struct {
	Difference float64 // K
	Diameter   float64 // m, mobility
	CN, CCN    float64 // particles and droplets
}

var (
	temperatureDifference = &quantity{says: "temperature difference", units: []unit{kelvinStep}, si: "k", min: 0, open: true, max: 60, start: 5,
		step: stepper{small: 0.5, big: 5, decimals: 2}}
	scanNumber = &quantity{says: "number", units: []unit{bare}, min: 1, max: 500, whole: true, start: 1, step: stepper{small: 1, big: 10}}
	counts     = &quantity{says: "number", units: []unit{bare}, min: 0, max: 1e9, start: 1000, step: stepper{ladder: true}}
)

// countedList is the scans that were typed, in place of files.
var countedList = list[Counted]{
	key: "counted", says: "scans by hand",
	help: "One setting of a salt scan, typed: dT= temperature difference, diameter= mobility diameter, cn= particles and ccn= droplets counted. " +
		"Rows of one temperature difference, or of one diameter, are a scan; they take the place of files.",
	rows: func(s *Scenario) *[]Counted { return &s.Counted },
	fields: []field[Counted]{
		{key: "dT", says: "temperature difference", quantity: temperatureDifference,
			help: "The temperature difference along the column of the counter.", origin: "an example",
			at: func(c *Counted) any { return &c.Difference }},
		{key: "diameter", says: "mobility diameter", quantity: drySize,
			help: "The mobility diameter that the classifier selects.", origin: "an example",
			at: func(c *Counted) any { return &c.Diameter }},
		{key: "cn", says: "particles counted", quantity: counts,
			help: "How many particles the particle counter counted.", origin: "an example",
			at: func(c *Counted) any { return &c.CN }},
		{key: "ccn", says: "droplets counted", quantity: counts,
			help: "How many droplets the CCN counter counted, of as much air.", origin: "an example",
			at: func(c *Counted) any { return &c.CCN }},
	},
	standard: firstCounted,
	another:  anotherCounted,
	required: []string{"dT", "diameter", "cn", "ccn"},
	most:     500,
	show: func(s *Scenario) string {
		if len(s.Counted) == 0 {
			return "none"
		}
		return count(len(s.Counted), "row") + " typed by hand"
	},
}

// anotherCounted is the next size of the scan that is being typed.
func anotherCounted(s *Scenario) Counted {
	if n := len(s.Counted); n > 0 {
		next := s.Counted[n-1]
		next.Diameter *= 1.1
		return next
	}
	return firstCounted()
}

func firstCounted() Counted { return Counted{5, 50e-9, 1000, 500} }
