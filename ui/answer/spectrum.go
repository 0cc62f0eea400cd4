package answer

import (
	"context"

	"dropcrest/ui/scenario"
)

func spectrumQuestion() Question {
	return Question{
		Key:       "spectrum",
		Title:     "Spectrum",
		Says:      "How many particles of this population activate at each supersaturation, and does that agree with what was counted?",
		Groups:    spectrumGroups,
		Statement: spectrumStatement,
		Ask:       askSpectrum,
	}
}

func askSpectrum(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	return Answer{}, &InputError{Input: "population", Text: "not yet"}
}
