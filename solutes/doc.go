// Package solutes says what particles are made of: a catalogue of substances
// with a source for every value, the water activity of their solutions, the
// density and surface tension of those solutions, and the rules that mix them.
//
// The state of a solution is always given by u, the volume of water per volume
// of dry particle (dimensionless, u > 0; with additive volumes u = g³ - 1 for
// the diameter growth factor g). Everything is in SI units. Values of this
// package are immutable after they are made and safe for concurrent use.
//
// Dissolve is the usual way in: it takes a Recipe and gives the models with
// notes on what stands in for what. NewSalt, NewMixture, NewLimited, OwnModel and
// Kappa are the models themselves. PhasesOf says where a dry particle dissolves and
// a drop crystallises; RangeNotes says what a drop is too concentrated for.
//
// Substances are records of the embedded catalogue, or of a user: NewSubstance
// checks one, Extend puts it beside the others.
package solutes
