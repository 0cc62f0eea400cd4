package answer

import (
	"context"
	"slices"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

func spectrumQuestion() Question {
	return Question{
		Key:       "spectrum",
		Title:     "Spectrum",
		Says:      "How many particles of this population activate at each supersaturation, and does that agree with what was counted?",
		Groups:    spectrumGroups,
		Live:      spectrumLive,
		Statement: spectrumStatement,
		Ask:       askSpectrum,
		Formats:   []string{"jsonl", "icartt"},
		Tabled:    spectrumTabled,
	}
}

// spectrumTabled are the tables to read: of one record the closure says nothing more.
func spectrumTabled(a Answer) []string {
	if a.Record == 0 && a.Records > 0 {
		return []string{"spectrum", "closure"}
	}
	return []string{"spectrum"}
}

// spectrumLive tells whether the answer takes no longer than a frame: measured
// files may be of any length, the demo is short; particles with a film take a
// millisecond for each supersaturation.
func spectrumLive(s scenario.Scenario) bool {
	return len(s.Szyszkowski) == 0 && (s.Population != "data" ||
		!slices.ContainsFunc(s.Data, func(d scenario.DataFile) bool { return d.Name != scenario.DemoData }))
}

func askSpectrum(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	a, err := newActivated(ctx, env, s)
	if err != nil {
		return Answer{}, err
	}
	return a.answer()
}

// newActivated makes the population of a scenario, with what was counted of it, and
// solves it.
func newActivated(ctx context.Context, env Env, s scenario.Scenario) (*activated, error) {
	var mixed func(scenario.Scenario) (*activated, error)
	switch s.Population {
	case "modes":
		mixed = func(s scenario.Scenario) (*activated, error) { return ofModes(env, s) }
	case "bins":
		bins, notes, err := oneBins(ctx, env, s)
		if err != nil {
			return nil, err
		}
		mixed = func(s scenario.Scenario) (*activated, error) { return ofBins(env, s, bins, notes) }
	default:
		return ofRecords(ctx, env, s)
	}
	a, err := mixed(s)
	if err != nil {
		return nil, err
	}
	a.vary = mixed
	return a, a.solve()
}

// solve predicts, compares, fits, and finds what limits that.
func (a *activated) solve() error {
	if err := a.predict(); err != nil {
		return err
	}
	a.fit()
	a.limit()
	a.notes = distinct(append(a.notes, a.sharedNotes()...))
	return nil
}

// limit notes what the bins leave out.
func (a *activated) limit() {
	if a.bins == nil {
		return
	}
	var cuts spectrum.Cuts
	for _, p := range a.predicted {
		cuts.Supersaturations = append(cuts.Supersaturations, p.s)
		cuts.Diameters = append(cuts.Diameters, p.critical)
	}
	a.notes = distinct(append(a.notes, spectrum.BinNotes(a.bins, cuts)...))
}

func (a *activated) answer() (Answer, error) {
	pictures, err := a.figures()
	if err != nil {
		return Answer{}, err
	}
	for i := range pictures {
		for _, n := range a.notes {
			pictures[i].Notes = append(pictures[i].Notes, n.Text)
		}
	}
	others, err := a.others()
	if err != nil {
		return Answer{}, err
	}
	return Answer{
		Finding: a.finding(), Why: a.why(), Facts: a.facts(), Figures: pictures, Others: others,
		Tables: a.tables(), Notes: a.notes, Record: a.number, Records: a.records,
	}, nil
}

// otherSpread is the geometric standard deviation of κ that is shown on demand:
// about what separates particles of the same size in continental air (own choice).
const (
	otherSpread = 1.5
	otherPoints = 40 // of a line: a spread takes long
)

// others are the counts of the same particles if they were mixed in another way.
func (a *activated) others() ([]figure.Line, error) {
	if a.vary == nil || a.sizes == nil {
		return nil, nil
	}
	s := a.asked.Clone()
	says := "mixed externally"
	if s.Mixing == "external" {
		s.Mixing, says = "internal", "mixed internally"
	} else {
		s.Mixing = "external"
	}
	spread, saysSpread := a.asked.Clone(), "spread of κ "+shortest(otherSpread)
	if spread.KappaSpread = otherSpread; a.asked.KappaSpread > 1 {
		spread.KappaSpread, saysSpread = 1, "without spread of κ"
	}
	var out []figure.Line
	for _, other := range []struct {
		says string
		of   scenario.Scenario
	}{{says, s}, {saysSpread, spread}} {
		b, err := a.vary(other.of)
		if err != nil {
			continue // cannot be mixed that way
		}
		if b.isAsMixed(a) {
			continue
		}
		low, high := a.reach()
		line, err := a.line(spaced(low, high, otherPoints), b.population)
		if err != nil {
			return nil, err
		}
		line.Says, line.Dash = other.says, figure.Dotted
		out = append(out, line)
	}
	return out, nil
}

// isAsMixed reports whether both are populations of the same particles.
func (a *activated) isAsMixed(b *activated) bool {
	for i := range a.groups {
		_, external := a.groups[i].of.(spectrum.External)
		_, both := b.groups[i].of.(spectrum.External)
		if external != both || a.groups[i].isOne != b.groups[i].isOne {
			return false
		}
	}
	return true
}
