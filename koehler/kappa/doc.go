// Package kappa finds the hygroscopicity κ of Petters and Kreidenweis (Atmos.
// Chem. Phys. 7, 1961, 2007) that measurements imply, and how sure it is.
//
// FromActivation, FromGrowth, FromCurve and GrowthDistribution invert one
// measurement each, DryDiameter and GrowthFactor go the other way, and Recompute
// takes a published κ from one convention to another. Evaluate adds the linear
// propagation of uncertainty (JCGM 100) and Propagate Monte Carlo (JCGM 101) and
// the weighted mean.
//
// κ depends on the surface tension and temperature it is computed with: a
// Convention says which. The common one is 72.0 mN/m and 298.15 K; with the
// tension of water at the actual temperature κ differs by some 8 % for 5 K.
//
// Diameters are volume-equivalent and in m unless said otherwise, temperatures
// in K, supersaturations and humidities fractions. All functions are pure and
// safe for concurrent use.
package kappa
