// Package spectrum is about populations: how many particles of a size
// distribution and composition become cloud droplets at each supersaturation, and
// what a measured number of droplets says about either.
//
// Forward: a Population counts. Backward: FitPower, FitCohard and
// FitErrorFunctions lay the usual forms through measured numbers, KappaOfCount
// reads κ out of one of them, Closure compares predicted with measured numbers
// over a campaign, and a Judge applies rules of quality before.
//
// Supersaturations are fractions, diameters are dry and in m, concentrations in
// 1/m³. Who activates: a particle whose crest lies at or below s.
package spectrum
