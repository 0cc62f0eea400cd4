// Package atmos holds the properties of water and moist air that cloud-droplet
// activation needs. Everything is in SI units (kg, m, s, K, Pa, mol, N/m);
// temperatures are absolute. Functions do not check their arguments: each
// states the range it was published for, the matching Range variable tells
// whether an argument is inside it, and outside it the formula is evaluated
// all the same, so that the caller can say "extrapolated".
//
// Liquid water: WaterDensity, WaterMolarVolume, SurfaceTension, VapourPressure,
// Compressibility, LatentHeat. Air: VapourDiffusivity, AirConductivity,
// AirViscosity, MeanFreePath. Particles in air: SlipCorrection, Mobility and
// its inverse DiameterFromMobility, VolumeEquivalent and its inverse
// MobilityDiameter. Relations lists ranges, qualities and sources, WaterNotes
// and NotesOf say what a result must say about its temperature, Constants lists
// the constants.
//
// Where an independent reference equation is known, the stated accuracy is the
// deviation from it, and the tests of this package recompute it.
//
// All functions are pure and safe for concurrent use. The Range variables are
// not meant to be changed.
package atmos
