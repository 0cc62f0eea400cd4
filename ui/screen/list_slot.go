package screen

import "dropcrest/ui/scenario"

// listSlot is a list of rows as one slot among the settings: Enter opens it.
type listSlot struct{ scenario.RowList }

func isList(in scenario.Input) bool {
	_, ok := in.(listSlot)
	return ok
}

func (s listSlot) Path() scenario.Path           { return scenario.Path(s.Key()) }
func (s listSlot) Origin() string                { return "" }
func (s listSlot) Kind() scenario.Kind           { return scenario.Text }
func (s listSlot) Range() string                 { return "Enter opens its rows" }
func (s listSlot) Choices() []scenario.Option    { return nil }
func (s listSlot) IsDefault() bool               { return s.Len() == 0 }
func (s listSlot) Used() bool                    { return true }
func (s listSlot) SI() (key string, value any)   { return s.Key(), nil }
func (s listSlot) Set(text string) error         { return s.refuse(text) }
func (s listSlot) SetWithUnit(text string) error { return s.refuse(text) }
func (s listSlot) Step(int, bool) error          { return s.refuse("") }

func (s listSlot) refuse(text string) error {
	return &scenario.ValueError{Path: s.Path(), Given: text, Problem: s.Says() + " has rows", Right: "Enter, which opens them"}
}
