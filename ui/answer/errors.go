package answer

// InputError says that one input of the scenario cannot be answered, though its
// value is well formed: a density that is needed and not known, for example.
type InputError struct {
	Input string // key of the input: "component"
	Text  string // what is wrong and what would be right
}

func (e *InputError) Error() string { return e.Text }
