package answer

// Questions is the table of all questions in the order of the pages. Screen,
// command line, help and README range over it; a question that is not here does
// not exist.
func Questions() []Question {
	return []Question{curveQuestion(), spectrumQuestion(), kappaQuestion(), counterQuestion(), ascentQuestion(), ledgerQuestion()}
}

// Find returns the question of that key.
func Find(key string) (Question, bool) {
	for _, q := range Questions() {
		if q.Key == key {
			return q, true
		}
	}
	return Question{}, false
}
