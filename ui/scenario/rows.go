package scenario

// RowList is a list of rows in a scenario, such as the components of a particle.
type RowList interface {
	Key() string  // "component"
	Says() string // "composition"
	Help() string
	Len() int
	Row(i int) []Input // the inputs of row i
	Add() error        // a new row with defaults at the end
	Drop(i int) error  // the last row cannot be dropped
	Show(Style) string // "ammonium sulfate", "ammonium sulfate 0.60, black carbon 0.40", "5 components"
}
