package ascent

import (
	"fmt"

	"dropcrest/atmos"
)

// notes says what a reader must know about the result.
func (r *run) notes(p Parcel) []atmos.Note {
	var notes []atmos.Note
	add := func(code, input, format string, args ...any) {
		notes = append(notes, atmos.Note{Code: code, Text: fmt.Sprintf(format, args...), Input: input})
	}
	for _, rel := range atmos.Relations() {
		switch rel.Key {
		case "water-density", "surface-tension", "vapour-pressure", "linear-latent-heat", "vapour-diffusivity", "air-conductivity":
			worst := p.Temperature
			if end := r.from.T; rel.Temperature.Contains(worst) {
				worst = end
			}
			if note, outside := rel.Note(worst); outside {
				notes = append(notes, note)
			}
		}
	}
	if !r.hasPeak {
		add("no-peak", "height", "The supersaturation still rises at %.4g m: droplets are counted at its value there; let the air rise farther.", r.peak.Height)
	}
	for i := range r.all {
		c := &r.all[i]
		if c.isInert() {
			add("stays-dry", "kappa", "Group %d takes up no water (kappa 0): its particles are counted by their crest and take no water from the air.", i+1)
		}
		if all, kept := c.Share*c.Sizes.Number(), c.above(0); kept < 0.99*all {
			add("outside-bins", "population", "Of group %d, %.2g %% of the particles lie outside %.4g to %.4g nm and take no part.",
				i+1, 100*(1-kept/all), c.from*1e9, c.to*1e9)
		}
	}
	return notes
}
