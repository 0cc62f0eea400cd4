// Package ledger says what every assumption behind the answer about one particle
// costs, and how sure the answer is.
//
// Make builds the fullest model of a particle that is at hand and takes one
// assumption at a time: the simplified answer minus the fullest one in percent of
// the fullest, for the critical supersaturation, the critical wet size and the
// haze size. A row whose cost cannot be said says why instead. NewBudget adds the
// uncertainty of the inputs by the law of propagation (JCGM 100), Budget.MonteCarlo
// the same by trials (JCGM 101), and Budget.Reach what must be measured better.
//
// Everything is in SI units; costs and contributions are in percent. All functions
// are pure and safe for concurrent use.
package ledger
