package scenario

import (
	"fmt"
	"path/filepath"
	"strings"
)

// DemoData is the word that stands for the data of the invented station.
const DemoData = "demo"

// Mode is one lognormal mode of a population.
type Mode struct {
	Number float64 // 1/m³
	Median float64 // m
	GSD    float64
	Matter Component // what it is of; without substance and kappa: the composition of the question
}

// DataFile is one file of measured data.
type DataFile struct {
	Name   string
	Offset float64 // s, added to its time
}

// MapLine says what a column of the data holds: "column=quantity".
type MapLine struct{ Text string }

// ofData reports whether the population is that of measured files.
func ofData(s *Scenario) bool { return s.Population == "data" }

// populations are the kinds of population and the keys that give each.
var populations = []struct{ key, kind string }{{"mode", "modes"}, {"bins", "bins"}, {"data", "data"}}

// PopulationKeys are the keys of inputs and lists that give a population each.
func PopulationKeys() []string {
	var keys []string
	for _, p := range populations {
		keys = append(keys, p.key)
	}
	return keys
}

// PopulationOf is the kind of population that the input or list of that key gives,
// "" when it gives none.
func PopulationOf(key string) string {
	for _, p := range populations {
		if p.key == key {
			return p.kind
		}
	}
	return ""
}

// populationFields declares the quantities of a population.
var populationFields = []field[Scenario]{
	{key: "population", says: "population",
		words: []Option{{"data", "of measured data"}, {"modes", "of lognormal modes"}, {"bins", "of the bins of a file"}},
		help: "Where the size distribution comes from: measured files, lognormal modes, or a file with one size distribution in bins. " +
			"An option that gives one of them chooses it.",
		origin: "the data of the invented demo station",
		at:     func(s *Scenario) any { return &s.Population }},
	{key: "bins", says: "file of bins", form: File,
		help:   "A CSV file with one size distribution: a column of diameters (or of lower and upper limits) and one of dN/dlog10D, dN/dlnD or counts.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.Bins },
		used:   func(s *Scenario) bool { return s.Population == "bins" }},
	{key: "record", says: "record", quantity: recordNumber, words: []Option{{"all", "all"}},
		help:   "Which record of the data is looked at, counted from 1; or all of them.",
		origin: "the first one",
		at:     func(s *Scenario) any { return &s.Record }, used: ofData},
	{key: "every", says: "averaging time", quantity: duration, words: []Option{{"records", "the records of the first file"}},
		help:   "The windows over which the files are averaged, so that they share one time axis.",
		origin: "the records of the first file",
		at:     func(s *Scenario) any { return &s.Every }, used: ofData},
	{key: "average", says: "average", words: []Option{{"mean", "mean"}, {"median", "median"}, {"quartile-mean", "mean of the middle half"}},
		help:   "How the samples of a window are averaged.",
		origin: "common practice",
		at:     func(s *Scenario) any { return &s.Average }, used: ofData},
	{key: "composition", says: "composition from", words: []Option{{"measured", "measured where it is"}, {"given", "as given"}},
		help:   "Whether kappa follows from the composition in the data, where there is one, or from the components and kappa given here.",
		origin: "what was measured counts",
		at:     func(s *Scenario) any { return &s.Composition }, used: ofData},
	{key: "mixing", says: "mixing", words: []Option{{"internal", "internally"}, {"external", "externally"}},
		help:   "Whether every particle has the composition of the whole (internally mixed), or each component makes particles of its own (externally mixed).",
		origin: "common practice",
		at:     func(s *Scenario) any { return &s.Mixing }},
	{key: "kappa-spread", says: "spread of kappa", quantity: geometricDeviation,
		help:   "The geometric standard deviation of kappa among particles of one size; 1 is none.",
		origin: "no spread",
		at:     func(s *Scenario) any { return &s.KappaSpread }},
	{key: "supersaturation", says: "supersaturations", quantity: supersaturation, several: true,
		help:   "The supersaturations at which activated particles are counted, in per cent, with commas between them.",
		origin: "usual set points of counters (common practice)",
		at:     func(s *Scenario) any { return &s.Supersaturations }},
	{key: "fit", says: "fit", words: []Option{{"none", "no form"}, {"power", "a power law"}, {"cohard", "the form of Cohard et al."},
		{"erf", "an error function"}, {"erf2", "two error functions"}},
		help: "The form that is fitted to the counts: the power law C s^k (Twomey 1959), that of Cohard, Pinty and Bedos (1998), or one or two " +
			"error functions in ln s, which belong to lognormal modes.",
		origin: "none",
		at:     func(s *Scenario) any { return &s.Fit }},
	{key: "penetration", says: "share that is counted", form: File,
		help: "The share of particles that reach and are counted by the instrument that sizes them: a number such as 0.95, or a CSV file with diameters in nm and shares. " +
			"Sizes are divided by it.",
		origin: "all of them, or what the data have corrected already",
		at:     func(s *Scenario) any { return &s.Penetration },
		used:   func(s *Scenario) bool { return s.Population != "modes" }},
	{key: "axes", says: "axes", words: []Option{{"log", "logarithmic"}, {"linear", "linear"}},
		help:   "The axes of the picture of counts against supersaturation.",
		origin: "spectra span decades",
		at:     func(s *Scenario) any { return &s.Axes }},
}

// lifted are fields of a part of a record as fields of the record.
func lifted[R, Part any](fields []field[Part], part func(*R) *Part, keys ...string) []field[R] {
	var out []field[R]
	for _, f := range fields {
		for _, key := range keys {
			if f.key == key {
				out = append(out, field[R]{key: f.key, says: f.says, help: f.help, origin: f.origin, quantity: f.quantity,
					words: f.words, form: f.form, at: func(r *R) any { return f.at(part(r)) }})
			}
		}
	}
	return out
}

var modeList = list[Mode]{
	key: "mode", says: "modes",
	help: "A lognormal mode: N= number, Dg= median diameter, gsd= geometric standard deviation, and what it is of: kappa=, or the keys of a component; " +
		"without them the composition of the question.",
	rows: func(s *Scenario) *[]Mode { return &s.Modes },
	fields: append([]field[Mode]{
		{key: "N", says: "number", quantity: numberConcentration,
			help: "How many particles the mode has.", origin: "an invented example",
			at: func(m *Mode) any { return &m.Number }},
		{key: "Dg", says: "median diameter", quantity: drySize,
			help: "The number median diameter of the mode.", origin: "an invented example",
			at: func(m *Mode) any { return &m.Median }},
		{key: "gsd", says: "geometric standard deviation", quantity: geometricDeviation,
			help: "The geometric standard deviation of the mode.", origin: "an invented example",
			at: func(m *Mode) any { return &m.GSD }},
	}, lifted(componentFields, func(m *Mode) *Component { return &m.Matter }, "substance", "kappa", "density", "molar-mass", "ions")...),
	standard: func() Mode { return Mode{1e9, 100e-9, 1.6, defaultComponent("")} },
	required: []string{"N", "Dg", "gsd"},
	least:    1,
	most:     8,
	show:     showModes,
}

// defaultModes are an invented population of two modes.
func defaultModes() []Mode {
	return []Mode{{850e6, 45e-9, 1.6, defaultComponent("")}, {400e6, 150e-9, 1.6, defaultComponent("")}}
}

func showModes(s *Scenario) string {
	var parts []string
	for _, m := range s.Modes {
		parts = append(parts, numberConcentration.show(m.Number)+" at "+drySize.show(m.Median))
	}
	if text := strings.Join(parts, ", "); len([]rune(text)) <= 50 {
		return text
	}
	return fmt.Sprintf("%d modes", len(s.Modes))
}

var dataList = list[DataFile]{
	key: "data", says: "measured files",
	help: "A file of measured data (CSV, ICARTT, NASA Ames): sizes, counts, composition; several are merged on time. offset= is added to the times of a file. " +
		"demo stands for the built-in data of an invented station.",
	rows: func(s *Scenario) *[]DataFile { return &s.Data },
	fields: []field[DataFile]{
		{key: "file", says: "file", form: File,
			help: "The name of the file.", origin: "the invented demo station",
			at: func(d *DataFile) any { return &d.Name }},
		{key: "offset", says: "clock offset", quantity: clockOffset,
			help: "What is added to the times of this file, so that its clock agrees with the others.", origin: "none",
			at: func(d *DataFile) any { return &d.Offset }},
	},
	standard: func() DataFile { return DataFile{Name: DemoData} },
	another:  func(*Scenario) DataFile { return DataFile{} },
	required: []string{"file"},
	first:    "file",
	least:    1,
	most:     20,
	show:     func(s *Scenario) string { return showFiles(s.Data) },
}

func showFiles(files []DataFile) string {
	switch n := len(files); {
	case n == 1 && files[0].Name == DemoData:
		return "the invented demo station"
	case n == 1 && files[0].Name != "":
		return filepath.Base(files[0].Name)
	default:
		return count(n, "file")
	}
}

var mapList = list[MapLine]{
	key: "map", says: "meaning of columns",
	help: "What a column of the data holds, as column=quantity, where the guess is wrong; column= drops it. dropcrest spectrum with --as text shows the guess.",
	rows: func(s *Scenario) *[]MapLine { return &s.Map },
	fields: []field[MapLine]{
		{key: "column", says: "column",
			help: "column=quantity, with @size or @supersaturation, unit and state of air where they are needed.", origin: "guessed from names, units and texts",
			at: func(m *MapLine) any { return &m.Text }},
	},
	standard: func() MapLine { return MapLine{} },
	first:    "column",
	raw:      true,
	most:     200,
	show: func(s *Scenario) string {
		if len(s.Map) == 0 {
			return "as guessed"
		}
		return count(len(s.Map), "line")
	},
}
