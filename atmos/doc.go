// Package atmos holds the properties of water and moist air that cloud-droplet
// activation needs. Everything is in SI units (kg, m, s, K, Pa, mol, N/m);
// temperatures are absolute. Functions do not check their arguments: each
// states the range it was published for, the matching Range variable tells
// whether an argument is inside it, and outside it the formula is evaluated
// all the same, so that the caller can say "extrapolated".
//
// All functions are pure and safe for concurrent use.
package atmos
