package atmos

import "fmt"

// WaterNotes returns what must be said when density, surface tension and vapour
// pressure of water are used at the temperature T (K): one note for each whose
// range T leaves, none inside them all. The codes are
// "water-density-extrapolated", "surface-tension-extrapolated" and
// "vapour-pressure-extrapolated", the input is "temperature".
func WaterNotes(T float64) []Note {
	var notes []Note
	for _, r := range dropRelations() {
		if note, outside := r.Note(T); outside {
			notes = append(notes, note)
		}
	}
	return notes
}

// NotesOf returns what must be said when the property of that key, one of
// Relations, is used at the temperature T (K): its note outside its range, none
// inside. An unknown key has none.
func NotesOf(key string, T float64) []Note {
	for _, r := range Relations() {
		if note, outside := r.Note(T); r.Key == key && outside {
			return []Note{note}
		}
	}
	return nil
}

// Note returns the note that this property is used at a temperature T (K)
// outside its range, and whether that is so.
func (r Relation) Note(T float64) (note Note, outside bool) {
	if r.Temperature.Contains(T) {
		return Note{}, false
	}
	return Note{
		Code: r.Key + "-extrapolated",
		Text: fmt.Sprintf("The %s is extrapolated: %s holds from %s to %s, and this is %s.",
			r.Name, r.Source, celsius(r.Temperature.Min), celsius(r.Temperature.Max), celsius(T)),
		Input: "temperature",
	}, true
}

func celsius(T float64) string { return fmt.Sprintf("%.4g °C", T-ZeroCelsius) }
