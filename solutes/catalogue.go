package solutes

// Catalogue is an immutable list of substances.
type Catalogue struct{ substances []Substance }

// Standard returns the embedded catalogue.
func Standard() *Catalogue { panic("not written yet") }

// All returns the substances in catalogue order; the slice is the caller's.
func (c *Catalogue) All() []Substance { panic("not written yet") }

// Find returns the substance of that key, name, formula or alias; case, blanks,
// '_' and '-' do not count.
func (c *Catalogue) Find(name string) (Substance, bool) { panic("not written yet") }

// Near returns at most n names that look like the one that was not found, best first.
func (c *Catalogue) Near(name string, n int) []string { panic("not written yet") }
