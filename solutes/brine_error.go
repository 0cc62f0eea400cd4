package solutes

import "fmt"

// UnusableError says which input a model cannot work with and what would be right.
type UnusableError struct {
	Model    string  // the model in words
	Quantity string  // the input in words
	Value    float64 // as given, SI
	Want     string  // what would be right
}

func (e *UnusableError) Error() string {
	return fmt.Sprintf("%s: %s is %.6g, should be %s", e.Model, e.Quantity, e.Value, e.Want)
}
