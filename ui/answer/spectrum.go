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
	}
}

// spectrumLive tells whether the answer takes no longer than a frame: measured
// files may be of any length, the demo is short.
func spectrumLive(s scenario.Scenario) bool {
	return s.Population != "data" ||
		!slices.ContainsFunc(s.Data, func(d scenario.DataFile) bool { return d.Name != scenario.DemoData })
}

func askSpectrum(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	a, err := newActivated(ctx, env, s)
	if err != nil {
		return Answer{}, err
	}
	if err := a.solve(); err != nil {
		return Answer{}, err
	}
	return a.answer(env)
}

// newActivated makes the population of a scenario with what was counted of it.
func newActivated(ctx context.Context, env Env, s scenario.Scenario) (*activated, error) {
	switch {
	case s.Population == "modes":
		return ofModes(env, s)
	}
	return nil, &InputError{"population", "not yet"}
}

// solve predicts, compares, fits, and finds what limits that.
func (a *activated) solve() error {
	if err := a.predict(); err != nil {
		return err
	}
	a.fit()
	a.limit()
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

func (a *activated) answer(env Env) (Answer, error) {
	pictures, err := a.figures()
	if err != nil {
		return Answer{}, err
	}
	for i := range pictures {
		for _, n := range a.notes {
			pictures[i].Notes = append(pictures[i].Notes, n.Text)
		}
	}
	others, err := a.others(env)
	if err != nil {
		return Answer{}, err
	}
	return Answer{
		Finding: a.finding(), Why: a.why(), Facts: a.facts(), Figures: pictures, Others: others,
		Tables: a.tables(), Notes: a.notes, Record: a.number, Records: a.records,
	}, nil
}

// others are the counts of the same particles mixed in another way.
func (a *activated) others(Env) ([]figure.Line, error) { return nil, nil }
