package solutes

import (
	"slices"

	"dropcrest/atmos"
)

// OwnModelWords names the water activity model that OwnModel returns for the
// substance, "" for those that have none.
func OwnModelWords(s Substance) string {
	switch s.Key {
	case "sulfuric_acid":
		return "ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tabazadeh et al. 1997"
	case "sea_salt":
		return "ion mixture of the reference composition (Harvie, Moller & Weare 1984; Millero et al. 2008)"
	case "sucrose":
		return "osmotic coefficients of Robinson & Stokes 1961, then Norrish 1966"
	case "glucose", "citric_acid":
		return "ideal solution, then Norrish 1966 (Chirife et al. 1980)"
	}
	if _, ok := bisulfateSaltOf(s.Key); ok {
		return "ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tang & Munkelwitz 1994"
	}
	return ""
}

func hasOwnModel(s Substance) bool { return OwnModelWords(s) != "" }

// isBisulfate reports whether the model of the substance solves the dissociation
// of bisulfate.
func isBisulfate(s Substance) bool {
	_, ok := bisulfateSaltOf(s.Key)
	return ok || s.Key == "sulfuric_acid"
}

// OwnModel returns the solution of a substance that has a water activity model
// of its own beside the single-salt ion interaction: sulfuric acid, the
// bisulfates, sea salt, sucrose, glucose, citric acid (by Key). says names the
// model in words; notes say what it leaves out at the temperature T (K); ok is
// false for all other substances. Errors are of type *UnusableError.
//
// It tabulates the model, which takes about a millisecond for acids, bisulfates
// and sea salt.
func OwnModel(s Substance, T float64) (o *OsmoticSolution, says string, notes []atmos.Note, ok bool, err error) {
	says = OwnModelWords(s)
	if says == "" {
		return nil, "", nil, false, nil
	}
	switch s.Key {
	case "sulfuric_acid":
		notes = append(bisulfateNotes(T), tabazadehNotes(T)...)
		o, err = NewSulfuricAcid(s, T)
	case "sea_salt":
		notes = append([]atmos.Note{{Code: "sea-salt-dry-state", Input: inputComponent, Text: sentence(SeaSaltNote)}}, debyeHueckelNotes(T)...)
		o, err = NewSeaSalt(s, T)
	case "sucrose":
		notes = nonelectrolyteNotes(T)
		o, err = NewNonelectrolyte(s, T)
	case "glucose", "citric_acid":
		notes = nonelectrolyteNotes(T)
		if s.Key == "citric_acid" {
			notes = append(notes, atmos.Note{Code: "acid-undissociated", Input: inputActivity, Text: sentence(CitricAcidNote)})
		}
		o, err = NewNonelectrolyte(s, T)
	default:
		notes = append(bisulfateNotes(T), bisulfateSaltNote(s.Key))
		o, err = NewBisulfate(s, T)
	}
	return o, says, notes, true, err
}

func bisulfateNotes(T float64) []atmos.Note {
	notes := debyeHueckelNotes(T)
	if away(T) {
		notes = slices.Insert(notes, 0, atmos.Note{Code: "bisulfate-25c", Input: inputTemperature, Text: sentence(BisulfateNote)})
	}
	return notes
}

func bisulfateSaltNote(key string) atmos.Note {
	if salt, _ := bisulfateSaltOf(key); salt.sodium {
		return atmos.Note{Code: "sodium-bisulfate-models", Input: inputActivity, Text: sentence(SodiumBisulfateNote)}
	}
	return atmos.Note{Code: "bisulfate-parameters-borrowed", Input: inputActivity, Text: sentence(BorrowedBisulfateNote)}
}

// tabazadehRange is the temperature range of Tabazadeh et al. 1997, K.
var tabazadehRange = atmos.Range{Min: 190, Max: 260}

func tabazadehNotes(T float64) []atmos.Note {
	if tabazadehRange.Contains(T) {
		return nil
	}
	return []atmos.Note{{Code: "strong-acid-temperature", Input: inputTemperature, Text: sentence(TabazadehNote)}}
}

func nonelectrolyteNotes(T float64) []atmos.Note {
	if !away(T) {
		return nil
	}
	return []atmos.Note{{Code: "nonelectrolyte-25c", Input: inputTemperature, Text: sentence(NonelectrolyteNote)}}
}

// debyeHueckelNotes say that the Debye-Hückel slope is extrapolated.
func debyeHueckelNotes(T float64) []atmos.Note {
	if (atmos.Range{Min: debyeHueckelLow, Max: debyeHueckelHigh}).Contains(T) {
		return nil
	}
	return []atmos.Note{{Code: "debye-hueckel-extrapolated", Input: inputTemperature,
		Text: "The Debye-Hückel slope is extrapolated: it rests on values from 0 to 40 °C."}}
}

// sentence makes a sentence of a clause.
func sentence(clause string) string {
	return string(clause[0]-'a'+'A') + clause[1:] + "."
}
