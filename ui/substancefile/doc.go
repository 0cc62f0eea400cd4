// Package substancefile reads substances of the user from a TOML file:
//
//	[[substance]]
//	name = "my acid"
//	density = "1.4 g/cm3"
//	molar_mass = {value = "150 g/mol", source = "its formula"}
//	kappa = 0.12
//	ions = 1
//
// The keys are those of the embedded catalogue (solutes/catalogue.json). A single
// value is a number in SI units, a text with its unit, or a table of value, low,
// high and source. What has no source of its own has that of the record, or "user".
package substancefile
