// Package fit is nonlinear least squares: a curve with a few parameters laid
// through some points, with the covariance of the parameters. Every kind of
// curve of this program that is fitted to measurements by least squares uses it.
//
// It is deterministic: the same points give the same parameters to the last
// digit.
package fit
