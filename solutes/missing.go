package solutes

import "fmt"

// MissingError says that a model needs a value that the catalogue does not have.
type MissingError struct {
	Substance string // name
	Quantity  string // "density", "molar mass", "number of ions", "kappa"
	Key       string // key of a component that gives it: "density"
}

// Error says what is missing and how to give it.
func (e *MissingError) Error() string {
	return fmt.Sprintf("no %s is known for %s: give %s= a value", e.Quantity, e.Substance, e.Key)
}

// RefusedError says why two choices do not go together and what would.
type RefusedError struct {
	Input string // option or slot: "solubility"
	Why   string
}

// Error says why, and what would go.
func (e *RefusedError) Error() string { return e.Why }

// missing returns the first of the values that molality needs and s lacks.
func missing(s Substance) error {
	for _, q := range []struct {
		datum         Datum
		quantity, key string
	}{
		{s.Ions, "number of ions", "ions"},
		{s.Density, "density", "density"},
		{s.MolarMass, "molar mass", "molar-mass"},
	} {
		if !q.datum.Known() {
			return &MissingError{s.called(), q.quantity, q.key}
		}
	}
	return nil
}

// called is the best name there is.
func (s Substance) called() string {
	if s.Name != "" {
		return s.Name
	}
	if s.Key != "" {
		return s.Key
	}
	return "a component without a name"
}
