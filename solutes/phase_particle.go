package solutes

import (
	"fmt"
	"math"

	"dropcrest/atmos"
)

// History says how a particle came to the humidity that it is at.
type History int

const (
	Rising  History = iota // it was dry, humidity rose
	Falling                // it was a solution, humidity fell
)

// Branch says in which state a particle is.
type Branch int

const (
	BranchUnknown   Branch = iota // what it depends on is not known
	CrystalBranch                 // dry; of a mixture: nothing has dissolved yet
	PartlyDissolved               // of a mixture: some of it is dissolved, how much is not known
	SolutionBranch                // all that is soluble is dissolved
)

// String returns the state in words.
func (b Branch) String() string {
	switch b {
	case CrystalBranch:
		return "dry"
	case PartlyDissolved:
		return "partly dissolved"
	case SolutionBranch:
		return "solution"
	}
	return "not known"
}

// Phases are the relative humidities (0 to 1, flat surface) that bound the states
// of a particle. NaN: not known.
type Phases struct {
	Uptake        float64 // a dry particle starts to take up water: of one solute the deliquescence, of a mixture the mutual one
	Dissolved     float64 // from here on all of it is dissolved
	Efflorescence float64 // a drying drop crystallises; 0: none seen
}

// Branch returns the state at the water activity aw of the drop, after that
// history.
func (p Phases) Branch(aw float64, h History) Branch {
	switch {
	case aw >= p.Dissolved:
		return SolutionBranch
	case h == Falling && aw > p.Efflorescence:
		return SolutionBranch
	case h == Falling && aw <= p.Efflorescence:
		return CrystalBranch
	case h == Rising && aw < p.Uptake:
		return CrystalBranch
	case h == Rising && aw >= p.Uptake:
		return PartlyDissolved
	}
	return BranchUnknown
}

// mutual is a pair of salts whose mutual deliquescence humidity is published.
type mutual struct {
	one, other string // keys
	humidity   float64
	share      float64 // mole fraction of one at the eutonic point
	source     string
}

func mutualPairs() []mutual {
	return []mutual{{"sodium_chloride", "sodium_nitrate", 0.679, 0.38, "Gupta et al. 2014"}}
}

// PhasesOf returns the humidities of a particle at the temperature T (K) and says
// what is not known about them. Insoluble parts count for nothing in it. A mixture
// has a mutual deliquescence humidity, known here for NaCl with NaNO3 only.
func PhasesOf(parts []Part, T float64) (Phases, []atmos.Note) {
	var soluble []Substance
	insoluble := false
	for _, p := range mergeParts(parts) {
		if p.Substance.Insoluble() {
			insoluble = true
			continue
		}
		soluble = append(soluble, p.Substance)
	}
	unknown := Phases{math.NaN(), math.NaN(), math.NaN()}
	switch len(soluble) {
	case 0:
		return unknown, nil
	case 1:
		return onePhases(soluble[0], T, insoluble)
	}
	if len(soluble) == 2 {
		for _, m := range mutualPairs() {
			a, b := soluble[0].Key, soluble[1].Key
			if a == m.one && b == m.other || a == m.other && b == m.one {
				unknown.Uptake = m.humidity
				return unknown, m.notes(soluble, T)
			}
		}
	}
	return unknown, []atmos.Note{{Code: "mutual-deliquescence-not-known", Input: inputComponent, Text: mixedText(soluble, T)}}
}

func onePhases(s Substance, T float64, insoluble bool) (Phases, []atmos.Note) {
	notes := s.PhaseNotes(T)
	drh, known := s.DeliquescenceHumidity(T)
	erh, crystallises := s.EfflorescenceHumidity(T)
	if !known {
		notes = append(notes, atmos.Note{Code: "deliquescence-not-known", Input: inputComponent,
			Text: fmt.Sprintf("No deliquescence humidity of %s is known: whether a dry particle dissolves cannot be said.", s.called())})
	}
	if insoluble && crystallises && erh > 0 {
		notes = append(notes, atmos.Note{Code: "efflorescence-pure", Input: inputComponent,
			Text: fmt.Sprintf("The efflorescence humidity is that of pure %s: on an insoluble core it may crystallise at higher humidity.", s.called())})
	}
	return Phases{drh, drh, erh}, notes
}

func (m mutual) notes(soluble []Substance, T float64) []atmos.Note {
	notes := []atmos.Note{{Code: "mutual-deliquescence", Input: inputComponent, Text: fmt.Sprintf(
		"Dry %s with %s takes up water from %.4g %% humidity on (%s, eutonic mole fraction of %s %g); where all of it is dissolved and where it crystallises is not known.",
		soluble[0].called(), soluble[1].called(), 100*m.humidity, m.source, nameOf(m.one, soluble), m.share)}}
	if away(T) {
		notes = append(notes, atmos.Note{Code: "deliquescence-25c", Input: inputTemperature,
			Text: "The mutual deliquescence humidity is that of 25 °C."})
	}
	return notes
}

// nameOf is the name of the part with that key.
func nameOf(key string, parts []Substance) string {
	for _, s := range parts {
		if s.Key == key {
			return s.called()
		}
	}
	return key
}

// mixedText says what is known of a mixture without a published value: it takes
// up water below the deliquescence humidity of each of its salts.
func mixedText(soluble []Substance, T float64) string {
	const text = "The deliquescence humidity of this mixture is not known"
	lowest, of := math.Inf(1), ""
	for _, s := range soluble {
		if drh, ok := s.DeliquescenceHumidity(T); ok && drh < lowest {
			lowest, of = drh, s.called()
		}
	}
	if of == "" {
		return text + "."
	}
	return fmt.Sprintf("%s; it lies below that of %s alone, %.4g %%.", text, of, 100*lowest)
}
