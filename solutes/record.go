package solutes

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
)

// RecordError says which field of which record of substances cannot be used, what
// was given and what would be right. Field is a path such as "density", "ion.beta0"
// or "aliases[1]", empty for the whole record.
type RecordError struct {
	Record string // key or name of the substance, as far as it has one
	Field  string
	Given  string // as given; "nothing" where a field is missing
	Right  string
}

// Error names record and field, what was given and what would be right.
// Error says all of it in one sentence.
func (e *RecordError) Error() string {
	field := e.Field
	if field == "" {
		field = "the record"
	}
	return fmt.Sprintf("substance %s: %s is %s, should be %s", e.Record, field, e.Given, e.Right)
}

// RecordField describes one key of a record whose value is a number or a table of
// value, low, high and source.
type RecordField struct {
	Key  string  // as in the catalogue
	Says string  // in words
	Unit string  // SI, "" without one
	Low  float64 // range that is accepted
	High float64
	of   func(*Substance) *Datum
}

// RecordFields lists the single values of a record in the order in which they are
// read. Tables (ion, concentrated, deliquescence_law, adsorption,
// surface_activity) have further keys, those of the catalogue.
func RecordFields() []RecordField {
	return []RecordField{
		{"molar_mass", "molar mass", "kg/mol", 1e-3, 10, func(s *Substance) *Datum { return &s.MolarMass }},
		{"density", "dry density", "kg/m³", 100, 25000, func(s *Substance) *Datum { return &s.Density }},
		{"ions", "number of ions of a formula unit, 0: insoluble", "", 0, 20, func(s *Substance) *Datum { return &s.Ions }},
		{"hydration", "mol of crystal water a formula unit", "", 0, 20, func(s *Substance) *Datum { return &s.Hydration }},
		{"kappa", "κ at activation", "", 0, 10, func(s *Substance) *Datum { return &s.Kappa }},
		{"kappa_growth", "κ from growth factors", "", 0, 10, func(s *Substance) *Datum { return &s.KappaGrowth }},
		{"solubility", "solubility at 25 °C", "kg per kg of water", 0, 100, func(s *Substance) *Datum { return &s.Solubility }},
		{"volume_solubility", "solubility C at 25 °C", "m³ per m³ of water", 0, 100, func(s *Substance) *Datum { return &s.VolumeSolubility }},
		{"deliquescence", "deliquescence humidity at 25 °C", "", 0, 1, func(s *Substance) *Datum { return &s.Deliquescence }},
		{"efflorescence", "efflorescence humidity", "", 0, 1, func(s *Substance) *Datum { return &s.Efflorescence }},
		{"tension_increment", "rise of surface tension", "N/m per mol/kg", -0.1, 0.1, func(s *Substance) *Datum { return &s.TensionIncrement }},
		{"shape_factor", "dynamic shape factor", "", 1, 10, func(s *Substance) *Datum { return &s.ShapeFactor }},
	}
}

// Gaps lists in words what is not known of a substance and may matter to a drop:
// single values first, then models.
func (s Substance) Gaps() []string {
	var gaps []string
	for _, f := range RecordFields() {
		switch {
		case f.of(&s).Known(), f.Key == "hydration", f.Key == "shape_factor":
		case s.Insoluble() && !slices.Contains([]string{"molar_mass", "density"}, f.Key): // has no solution
		default:
			gaps = append(gaps, f.Says)
		}
	}
	if s.Insoluble() && s.Adsorption == nil {
		gaps = append(gaps, "parameters of adsorption")
	}
	if !s.Insoluble() && s.Ion == nil && !hasOwnModel(s) {
		gaps = append(gaps, "water activity beyond a constant κ")
	}
	if s.organic() && s.SurfaceActivity == nil {
		gaps = append(gaps, "constants of surface activity")
	}
	return gaps
}

// userSource is what a value of a user's record has as source if none is given.
const userSource = "user"

// NewSubstance makes a substance of a user's record: the keys of the embedded
// catalogue with numbers (float64 or int64), strings, []any and map[string]any, as
// readers of TOML and JSON give them. A single value is a number in SI units or a
// table of value, low, high and source; "source" of the record serves for all that
// have none. Every value has evidence User. record names it in errors as long as it
// has neither key nor name, such as "2".
//
// The solubility C is worked out from the one by mass if only that is given, ions
// from the ion-interaction parameters, the key from the name.
//
// The error joins a *RecordError for every field that is not known, of the wrong
// kind or out of range, or that does not go with others.
func NewSubstance(record string, fields map[string]any) (Substance, error) {
	in := &recordReader{record: record}
	top := in.table("", fields)
	var s Substance
	s.Key, s.Name = top.text("key"), top.text("name")
	switch {
	case fold(s.Name) != "":
		in.record = s.Name
	case fold(s.Key) != "":
		in.record, s.Name = s.Key, s.Key
	default:
		in.fail("name", "nothing", "a name, such as \"my salt\"")
	}
	if s.Key == "" {
		s.Key = strings.ReplaceAll(strings.ToLower(s.Name), " ", "_")
	}
	s.Formula = top.text("formula")
	s.Aliases, s.Remarks = top.texts("aliases"), top.texts("remarks")
	in.source = userSource
	if source := top.text("source"); source != "" {
		in.source = source
	}
	for _, f := range RecordFields() {
		*f.of(&s) = top.datum(f.Key, f.Low, f.High, f.Unit)
	}
	s.readModels(top)
	top.finish()
	if len(in.errs) == 0 {
		s.derive()
		s.consistent(in)
	}
	return s, errors.Join(in.errs...)
}

// derive works out what follows from other values.
func (s *Substance) derive() {
	if !s.Ions.Known() && s.Ion != nil {
		s.Ions = Datum{Value: float64(s.Ion.Number()), Source: s.Ion.Source, Evidence: User}
	}
	if !s.VolumeSolubility.Known() && s.Solubility.Known() && s.Density.Known() {
		const rhoWater = 997.05 // kg/m³ at 25 °C, Kell 1975
		s.VolumeSolubility = Datum{Value: s.Solubility.Value * rhoWater / s.Density.Value,
			Source: "solubility by mass and dry density", Evidence: Computed}
	}
}

// Extend returns a catalogue with more substances. It is a *RecordError if one of
// them has no key or takes a name that stands for another already.
func (c *Catalogue) Extend(more []Substance) (*Catalogue, error) {
	return NewCatalogue(append(c.All(), more...))
}

// rangeWords says a closed range with its unit.
func rangeWords(low, high float64, unit string) string {
	words := fmt.Sprintf("%g to %g", low, high)
	switch {
	case math.IsInf(high, 1) && math.IsInf(low, -1):
		words = "a finite number"
	case math.IsInf(high, 1):
		words = fmt.Sprintf("at least %g", low)
	}
	if unit != "" {
		words += " " + unit
	}
	return words
}
