// Package aerosol is about how many particles there are of which size:
// lognormal modes, bins as an instrument measured them, their moments, and what
// stands between a measurement and the air (standard or ambient conditions,
// losses on the way in, two instruments for two ranges, what lies beyond the
// last bin).
//
// Diameters are in m, number concentrations in 1/m³. A density is dN/dlnD
// unless its name says otherwise. Number concentrations refer to the air that
// the caller means; Air converts between two states.
//
// Values are not changed once made, except by Bins.Set, and all functions are
// safe for concurrent use on different values.
package aerosol
