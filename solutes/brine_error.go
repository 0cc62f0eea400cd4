package solutes

import "fmt"

// UnusableError says which input a model cannot work with and what would be right.
type UnusableError struct {
	Model    string  // the model in words
	Quantity string  // the input in words
	Value    float64 // as given, SI
	Want     string  // what would be right
}

// Error says what was given and what would be right.
func (e *UnusableError) Error() string {
	return fmt.Sprintf("%s: %s is %.6g, should be %s", e.Model, e.Quantity, e.Value, e.Want)
}

// NoModelError says that a model is not for this substance.
type NoModelError struct {
	Substance string // its name
	For       string // what the model is for
}

// Error says what the model is for.
func (e *NoModelError) Error() string {
	return fmt.Sprintf("%s: this water activity model is for %s", e.Substance, e.For)
}
