// Package verify recomputes published check values, so that a user can see on
// the own machine that the program is right.
//
// The values stand in CSV files, one a row: which check to run with which
// arguments (SI), and what was published with which tolerance, unit and source.
// A tolerance comes from the printed digits, from the uncertainty that the
// source states, or from a documented conflict between references; the remark
// says which when it is not the first. A check is a function in the registry
// that Checks returns; units.go has the units.
package verify
