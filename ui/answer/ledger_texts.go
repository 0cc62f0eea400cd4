package answer

import (
	"math"

	"dropcrest/koehler/ascent"
	"dropcrest/koehler/ledger"
)

// Assumptions of counts and of ascents, beside those of one particle.
const (
	mixingState ledger.Key = "mixing_state"
	kappaSpread ledger.Key = "kappa_spread"
	binWidth    ledger.Key = "bin_width"
	sizeError   ledger.Key = "size_error"
	calibration ledger.Key = "calibration"

	massAccommodation ledger.Key = "mass_accommodation"
	transitionForm    ledger.Key = "transition_form"
	ascentBins        ledger.Key = "bins"
	startHumidity     ledger.Key = "start_humidity"
	heatCapacity      ledger.Key = "heat_capacity"
)

// otherAssumptions are their texts.
var otherAssumptions = map[ledger.Key]ledger.Assumption{
	mixingState: {Says: "all particles of a size are alike",
		Explains: "An internal mixture gives every particle the same share of each component; in an external one each component has particles of its own. " +
			"Fresh particles are nearer to the second, aged ones to the first.",
		Source: "mixing rule of Petters & Kreidenweis 2007, Atmos. Chem. Phys. 7, 1961; external mixture by number"},
	kappaSpread: {Says: "one κ for all particles of a size",
		Explains: "Particles of one size differ in κ, so that a supersaturation divides them by a smooth curve and not by a step. " +
			"The spread moves the count most where the size distribution is steep at the critical size.",
		Source: "lognormal spread of κ about its median; a geometric standard deviation of 1.5 is our own choice of an example"},
	binWidth: {Says: "a bin counts whole, by its middle",
		Explains: "Measured sizes come in bins, and the critical size lies inside one of them. " +
			"Counting whole bins moves the count by up to half a bin, while the answer here cuts that bin, its particles spread evenly over the logarithm of the size.",
		Source: "common practice"},
	sizeError: {Says: "sizes that are 3 % too large",
		Explains: "A mobility spectrometer that sizes 3 % too large lifts more particles above the critical size. " +
			"The count follows sizes by several times their error where the distribution is steep.",
		Source: ledger.SizingSource},
	calibration: {Says: "a counter that is set 5 % too high",
		Explains: "The supersaturation of a counter is known by its calibration only, and repeats itself within some 5 % in the field. " +
			"A higher one activates smaller particles too.",
		Source: settingSource},
	massAccommodation: {Says: "every molecule that hits a drop stays",
		Explains: "A smaller accommodation slows the growth of small drops, so the supersaturation climbs higher and more particles activate. " +
			"Measurements span 0.04 to 1: growth of drops agrees with 1, a comparison of techniques found more than 0.5.",
		Source: "Laaksonen et al. 2005, Atmos. Chem. Phys. 5, 461; range of a comparison of techniques of 2012 and 2013 (abstract)"},
	transitionForm: {Says: "drops grow as in the continuum",
		Explains: "Drops smaller than some micrometre are not much larger than the free path of the molecules and grow more slowly than diffusion through a continuum says. " +
			"Leaving that out takes up vapour too fast, so the peak comes out too low.",
		Source: "Fuchs & Sutugin 1970; the other published forms differ by up to 15 % in growth"},
	ascentBins: {Says: "the number of bins in the integration",
		Explains: "Particles are integrated in bins, and the error falls with the square of their number. " +
			"It is estimated by a second ascent with half the bins.",
		Source: "Richardson's extrapolation, second order (DEVELOPERS.md has the table)"},
	startHumidity: {Says: "equilibrium where the air starts to rise",
		Explains: "Particles are in equilibrium with the air at the start, which large ones cannot follow at once. " +
			"The cost is that of starting here instead of below, where the same air has 10 % less humidity, and from where they grow as fast as they can.",
		Source: "common practice; the lower start is our own choice"},
	heatCapacity: {Says: "the heat capacity of dry air alone",
		Explains: "The heat that condensation sets free warms vapour and liquid water as well as the air. " +
			"Counting the air alone cools it a little too fast.",
		Source: "common practice in models of cloud droplets"},
}

// newAssumed is the row of an assumption of counts or ascents, without its cost.
func newAssumed(key ledger.Key) assumed {
	a := otherAssumptions[key]
	a.Key = key
	return assumed{Assumption: a, change: noChange(), ifChange: noChange()}
}

// closedKey is the key of a closed form.
func closedKey(m ascent.Method) ledger.Key {
	return map[ascent.Method]ledger.Key{ascent.Twomey1959: "closed_form_twomey", ascent.AbdulRazzakGhan00: "closed_form_abdul_razzak_ghan",
		ascent.FountoukisNenes05: "closed_form_fountoukis_nenes"}[m]
}

// closedAssumption is the row of a closed form.
func closedAssumption(f closedForm, full ledger.Values) assumed {
	row := assumed{Assumption: ledger.Assumption{Key: closedKey(f.Method), Says: "the closed form of " + methodName(f.Method),
		Explains: "A closed form takes the place of the integration. " + f.Method.Limits(), Source: f.Method.Source()},
		change: noChange(), ifChange: noChange()}
	if f.none != nil {
		row.status, row.reason = ledger.NotKnown, capital(reason(f.none))+"."
		return row
	}
	row.change = change(ledger.Values{f.Droplets, f.Peak, math.NaN()}, full)
	return row
}
