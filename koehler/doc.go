// Package koehler is about one droplet in equilibrium: the saturation ratio
// over a drop grown on a dry particle, the crest it must cross to become a
// cloud droplet, the haze size below it, and the inverse of each.
//
// Saturation ratio S is the vapour pressure over the drop against that over
// flat pure liquid water under the same total pressure. Supersaturation is
// s = S - 1, a fraction. Diameters are in m, temperatures in K.
//
// All functions are pure and safe for concurrent use.
package koehler
