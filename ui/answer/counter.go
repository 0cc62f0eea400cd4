package answer

import (
	"context"
	"fmt"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/counter"
	"dropcrest/solutes"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

func counterQuestion() Question {
	return Question{
		Key:    "counter",
		Title:  "Counter",
		Says:   "Which supersaturation did the CCN counter really have?",
		Groups: counterGroups,
		Live:   counterIsLive,
		Always: []string{"shape-factor", "bins"},
		Tabled: func(Answer) []string { return []string{"left_out"} },
		Turns:  &Turns{"scan", "scan"},
		Counts: func(s scenario.Scenario, path scenario.Path) bool {
			return len(s.Counted) == 0 || path != "scans" && path != "scans-map" // rows take the place of files
		},
		Statement: counterStatement,
		Ask:       askCounter,
	}
}

// counterGroups are the inputs of the Counter question.
var counterGroups = []Group{
	{"The scans", []string{"data=scans", "map=scans-map", "counted", "activation-curve", "plateau", "double-charged", "polarity",
		"cn-delay", "settling", "cn-cut-off", "bins"}},
	{"The salt", []string{"component", "shares-by", "shape-factor", "water-activity", "kappa", "vant-hoff-factor", "temperature", "surface-tension"}},
	{"The uncertainty", []string{"bootstrap", "seed"}},
	{"Picture", []string{"scan"}},
}

// counterIsLive: without bootstrap the demo's scans are fitted within a frame.
func counterIsLive(s scenario.Scenario) bool {
	return s.Bootstrap == 0 && (len(s.Counted) > 0 || onlyDemo(s.Scans))
}

func onlyDemo(files []scenario.DataFile) bool {
	return !slices.ContainsFunc(files, func(f scenario.DataFile) bool { return f.Name != scenario.DemoData })
}

// counterStatement is the question in prose.
func counterStatement(s scenario.Scenario) []string {
	water := "and water activity by {water-activity}"
	switch s.WaterActivity {
	case "kappa":
		water += " {kappa}"
	case "vant-hoff":
		water += " factor {vant-hoff-factor}"
	}
	scans := "{scans}"
	if len(s.Counted) > 0 {
		scans = "{counted}"
	}
	return []string{
		"A counter that was scanned as in " + scans + ", {polarity} particles selected,",
		"with an activation curve of {activation-curve}, plateau {plateau},",
		"on particles of {component}, shape factor {shape-factor},",
		water + ", surface tension of {surface-tension},",
		"at {temperature} where they activate, all else {further}.",
	}
}

// calibrated is a calibration before it is put into words, lines and tables.
type calibrated struct {
	asked   scenario.Scenario
	rows    int // of the log
	mapping []string
	counter.Calibration
	notes []atmos.Note
}

func askCounter(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	c, err := env.calibrate(ctx, s)
	if c == nil {
		return Answer{}, err
	}
	line := c.lineFigure()
	line.Notes = append(c.finding(), c.account(env.Version)...)
	a := Answer{
		Finding: c.finding(),
		Why:     c.why(),
		Facts:   c.facts(),
		Figures: []figure.Figure{line, c.curvesFigure(), c.residualFigure()},
		Tables:  c.tables(),
		Notes:   c.notes,
		Account: c.account(env.Version),
		Records: len(c.drawn()),
	}
	if s.Scan.Word == "" {
		a.Record = min(int(s.Scan.Number), a.Records)
		if a.Record < int(s.Scan.Number) {
			a.Notes = append(slices.Clone(a.Notes), atmos.Note{Code: "no-such-scan", Input: "scan",
				Text: fmt.Sprintf("There is no scan %.0f: %d have an activation curve over sizes, and the last one of them is drawn.", s.Scan.Number, a.Records)})
		}
	}
	return a, err
}

// calibrate makes the calibration of a scenario, or takes the last one where nothing
// but the picture has changed. With the error of a context that has ended it returns
// what there is by then; nil: nothing.
func (env Env) calibrate(ctx context.Context, s scenario.Scenario) (*calibrated, error) {
	asked := s.Clone()
	asked.Scan = scenario.Measure{}
	key := askedKey{scenario.WithoutLedger(asked), env.catalogue(), stampOfScans(env, s)}
	if c := env.Kept.lastCalibration().of(key); c != nil {
		known := *c
		known.asked = s
		return &known, nil
	}
	c, err := env.newCalibration(ctx, s)
	if err == nil && s.Bins == "" {
		env.Kept.lastCalibration().keep(key, c)
	}
	return c, err
}

func (env Env) newCalibration(ctx context.Context, s scenario.Scenario) (*calibrated, error) {
	standard, notes, err := newStandard(env, s)
	if err != nil {
		return nil, err
	}
	log, err := readScans(ctx, env, s)
	if err != nil {
		return nil, err
	}
	if s.Settling > 0 {
		log.rows = counter.Settle(log.rows, s.Settling, counter.Tolerances{})
	}
	if s.CNDelay > 0 {
		if slices.ContainsFunc(log.rows, func(r counter.Row) bool { return !(r.Duration > 0) }) {
			return nil, &InputError{Input: "cn-delay", Text: "counts can be moved in time only where the length of each sample is known: want a column of sampling time, or of start and end"}
		}
		log.rows = counter.Delay(log.rows, s.CNDelay)
	}
	options, sized, err := fitOptions(ctx, env, s)
	if err != nil {
		return nil, err
	}
	log.notes = append(log.notes, sized...)
	axis := counter.DetectAxis(log.rows, counter.Tolerances{})
	scans, salts := counter.Gather(log.rows, axis, counter.Tolerances{})
	standards, scans, more, err := standardsOf(env, s, standard, scans, salts)
	if err != nil {
		return nil, err
	}
	c := &calibrated{asked: s, rows: len(log.rows), mapping: log.mapping}
	c.Calibration, err = counter.Calibrate(ctx, counter.Request{
		Scans: scans, Standards: standards, Options: options,
		Bootstrap: s.Bootstrap, Seed: uint64(s.Seed), Workers: env.Workers, Progress: env.Progress,
	})
	stopped := ctx.Err()
	switch {
	case stopped != nil && c.Line == nil: // too early to have something to say
		return nil, stopped
	case stopped != nil:
		c.Notes = append(c.Notes, c.stoppedNote())
	case err != nil:
		return nil, &InputError{Input: "scans", Text: reason(err)}
	}
	c.notes = distinct(slices.Concat(notes, log.notes, more, c.Calibration.Notes, waterNotes(s)))
	return c, stopped
}

// newStandard is the salt of the question with its Köhler model.
func newStandard(env Env, s scenario.Scenario) (counter.Standard, []atmos.Note, error) {
	recipe, notes, err := newRecipe(env, s)
	if err != nil {
		return counter.Standard{}, nil, err
	}
	_, more, err := solutes.Dissolve(recipe)
	if err != nil {
		return counter.Standard{}, nil, recipeError(err)
	}
	name := "the salt"
	if len(recipe.Parts) > 0 {
		name = recipe.Parts[0].Substance.Name
	}
	return counter.Standard{Name: name, Recipe: recipe, ShapeFactor: s.ShapeFactor, Air: classifier(s)}, append(notes, more...), nil
}

func classifier(s scenario.Scenario) counter.Classifier {
	c := counter.Classifier{Polarity: counter.Positive}
	if s.Polarity == "negative" {
		c.Polarity = counter.Negative
	}
	return c
}

// standardsOf gives each salt of the log its standard. A log that names none is of
// the salt of the question; one that names others is of those, by the same model.
func standardsOf(env Env, s scenario.Scenario, own counter.Standard, scans []counter.Scan, salts []string) ([]counter.Standard, []counter.Scan, []atmos.Note, error) {
	standards := []counter.Standard{own}
	place := map[string]int{"": 0}
	var notes []atmos.Note
	for i, salt := range salts {
		at, known := place[salt]
		if !known {
			found, ok := env.catalogue().Find(salt)
			switch {
			case !ok:
				return nil, nil, nil, unknownSubstance(env.catalogue(), salt)
			case found.Name == own.Name:
				at = 0
			default:
				other := s.Clone()
				other.Components = []scenario.Component{{Substance: found.Name, Share: 1, Kappa: catalogueWord, Density: catalogueWord,
					MolarMass: catalogueWord, Ions: catalogueWord, Solubility: catalogueWord}}
				standard, more, err := newStandard(env, other)
				if err != nil {
					return nil, nil, nil, err
				}
				standards, notes, at = append(standards, standard), append(notes, more...), len(standards)
			}
			place[salt] = at
		}
		scans[i].Standard = at
	}
	return standards, scans, notes, nil
}

var catalogueWord = scenario.Measure{Word: "catalogue"}

// fitOptions are the options of the fits; what is fitted is 0 there.
//
// A file of bins gives the size distribution, and so the share of multiply charged
// particles at every size.
func fitOptions(ctx context.Context, env Env, s scenario.Scenario) (counter.Options, []atmos.Note, error) {
	o := counter.Options{Curve: counter.TwoStep, Charges: counter.Charges{Classifier: classifier(s)}}
	switch s.Activation {
	case "gaussian":
		o.Curve = counter.Gaussian
	case "sigmoid":
		o.Curve = counter.Sigmoid
	}
	if s.Plateau.Word == "" {
		o.Plateau = s.Plateau.Number
	}
	if s.DoubleCharged.Word == "" {
		o.Charges.Double = s.DoubleCharged.Number
	}
	if s.CNCutOff.Word == "" {
		half := s.CNCutOff.Number
		o.CNEfficiency = counter.CutOff{Half: half, Scale: half / 10}.Efficiency
	}
	if s.Bins == "" {
		return o, nil, nil
	}
	bins, notes, err := oneBins(ctx, env, s)
	if err != nil {
		return o, nil, err
	}
	o.Charges.Sizes = bins.Density
	return o, notes, nil
}
