package answer

import (
	"fmt"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/kappa"
)

// why is what stands behind the finding.
func (k *implied) why() []string {
	out := []string{
		"κ is defined by the water activity a_w = (D³ - Dd³)/(D³ - Dd³ (1 - κ)) of a droplet of diameter D on a dry particle of diameter Dd " +
			"(Petters and Kreidenweis 2007, Atmos. Chem. Phys. 7, 1961). The saturation ratio is S = a_w exp(A/D) with the Kelvin length A = 4 σ M_w/(R T ρ_w).",
	}
	hasActivation, hasGrowth := k.kinds()
	if hasActivation {
		out = append(out, "From activation: κ is the one whose equilibrium curve has its maximum at the measured supersaturation, found exactly. "+
			"The classic approximation is 4 A³/(27 Dd³ ln² S), equation 10 of the same source: it takes the drop as very dilute and is too high, the more so the smaller and the less hygroscopic the particle.")
	}
	if slices.ContainsFunc(k.points, func(m kappaPoint) bool { return m.spread != nil }) {
		out = append(out, "The spread of κ between particles is the width of the activation curve in ln D, that of the classifier taken out in quadrature, times the slope "+
			"of ln κ against ln D at that supersaturation, which is nearly 3. A plateau below 1 is a share of particles that never activate, or an efficiency that was not corrected.")
	}
	if hasGrowth {
		out = append(out, "From a growth factor g at humidity h: a_w = h exp(-A/(g Dd)), κ = (g³ - 1)(1/a_w - 1), equation 11 of the same source; "+
			"without the Kelvin term, which the table has beside it, κ of small particles comes out too low.")
	}
	actual, common := conventionOf(k.asked), kappa.At25C()
	out = append(out,
		fmt.Sprintf("Conventions: here σ is %s mN/m at %s K; most published κ are for 72.0 mN/m at %s K. For small supersaturations κ goes with (σ/T)³, whatever the size: "+
			"the same measurement under both conventions is recomputed exactly.", digits(actual.SurfaceTension()*1e3, 4), shortest(actual.Temperature), shortest(common.Temperature)),
		"Uncertainty: linear propagation by JCGM 100:2008, 5.1.2, with the derivatives of the exact κ; Monte Carlo by JCGM 101:2008 with normal inputs, "+
			"intervals between quantiles. The part of an uncertainty that is common moves all points together; the rest is independent.",
		k.trialsWords()+fmt.Sprintf(", seed %d; the same seed gives the same answer on any machine. relative_standard_uncertainty is the standard deviation of the trials over κ, "+
			"or that of linear propagation where there are no trials.", k.asked.Seed))
	if len(k.points) > 1 {
		out = append(out, "The mean weighs the points by their independent parts, w = 1/u²; common parts take no part in weights and χ² and do not average out: "+
			"u² = Σ w² u² + Σ (Σ w c)². κ from growth factors and from activation are not merged.")
	}
	if k.asked.DrySizeIs == "mobility" {
		out = append(out, fmt.Sprintf("Mobility diameters with shape factor %s are taken as volume-equivalent ones by slip correction at 1013.25 hPa (ISO 15900).", shortest(k.asked.ShapeFactor)))
	}
	out = append(out, fmt.Sprintf("Constants: R = %v J/(mol K), molar mass of water %v kg/mol (CODATA 2018; IUPAC).", atmos.GasConstant, atmos.WaterMolarMass))
	out = append(out, sourcesOfWater()...)
	for _, n := range k.notes {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

// trialsWords say how many trials were made, or why that many.
func (k *implied) trialsWords() string {
	if !k.asked.Trials.Is("adaptive") {
		return fmt.Sprintf("%d trials a point", mostTrials(k.asked))
	}
	return fmt.Sprintf("Trials in blocks of 10000 until two digits of the standard uncertainty are stable (JCGM 101:2008, 7.9.4), up to %d a point", k.mostMade())
}

// kinds reports which kinds of measurements there are.
func (k *implied) kinds() (hasActivation, hasGrowth bool) {
	for i := range k.points {
		if k.points[i].isGrowth() {
			hasGrowth = true
		} else {
			hasActivation = true
		}
	}
	return hasActivation, hasGrowth
}
