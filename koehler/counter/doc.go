// Package counter calibrates a cloud condensation nuclei counter: which
// supersaturation it really had, found from which size of a known salt activates.
//
// A Scan holds the counts of a condensation particle counter (CN) and of the CCN
// counter for one series of settings. FitScan gives its activation curve by the
// likelihood of the counts, a Standard turns the size at half activation into a
// critical supersaturation, York draws the line through several of them, and
// Calibrate does it all and keeps a Calibration, a plain record that another page
// applies to measured data. ChargeFraction, Classifier and EqualMobility are
// about the multiply charged particles that a classifier lets through.
//
// Diameters are in m, temperatures and temperature differences in K, pressures in
// Pa, flows in m³/s, supersaturations fractions; CN and CCN are counts, not
// concentrations. All functions are pure and safe for concurrent use.
package counter
