package solutes

import (
	"errors"

	"dropcrest/atmos"
)

// DissolveJoined is Dissolve for a recipe whose solubility is to count wherever a
// published model joins it with the rest. Limited solubility is a model for κ
// components: where nothing of the particle has more than a κ, κ stands in for
// ion interaction and an isotherm of the catalogue gives way; where the rest is
// known by more, all is taken as soluble and a note says so. Errors are those of
// Dissolve.
func DissolveJoined(r Recipe) (Dissolved, []atmos.Note, error) {
	whole := r
	whole.Solubility = Complete
	all, notes, err := Dissolve(whole)
	if err != nil || r.Solubility != LimitedSolubility || len(all.Limits) == 0 {
		return all, notes, err
	}
	limited := r
	if _, ok := all.Solution.(Kappa); ok && r.Model == IonInteraction {
		limited.Model = KappaModel // that is what stands in for all its parts
	}
	if limited.Adsorption == KnownAdsorption {
		limited.Adsorption = NoAdsorption
	}
	kept, more, err := Dissolve(limited)
	var refused *RefusedError
	if errors.As(err, &refused) {
		return all, append(notes, atmos.Note{Code: "solubility-not-limited", Input: inputSolubility,
			Text: "All of the particle is taken as soluble: " + refused.Why + "."}), nil
	}
	if limited.Model != r.Model {
		more = append(notes, more...)
	}
	return kept, more, err
}
