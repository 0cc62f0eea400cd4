package answer

import (
	"math"
	"slices"
	"strings"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/counter"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/fieldfile"
)

// count is what was counted at each supersaturation, judged by the rules of quality.
func (r *recorder) count(o *observation, s *fieldfile.Sample, air aerosol.Air) {
	all, allUncertainty := r.allParticles(o, s, air)
	median := r.all.add(all)
	sized := math.NaN()
	if o.sizes != nil {
		sized = o.sizes.Number()
	}
	var points []spectrum.Observed
	for _, c := range s.Counts {
		at := r.level(o, s, c)
		if why := notCounted(c, at.Supersaturation); why != "" {
			o.rejected.add(why)
			r.left.add(why)
			continue
		}
		factor := r.standard(o, c.Basis, air)
		if math.IsNaN(factor) {
			o.rejected.add(airNotKnown)
			r.left.add(airNotKnown)
			continue
		}
		p := spectrum.Unknown()
		p.Supersaturation, p.Activated = at.Supersaturation, c.N.X*factor
		p.Uncertainty = countUncertainty(c) * factor
		p.All, p.Sized = all, sized
		p.AllUncertainty, p.AllMedian = allUncertainty, median
		p.Drops = c.Counted.Or(math.NaN())
		verdict := r.judge.Look(p)
		if verdict.Rejected != "" {
			o.rejected.add(r.says(verdict.Rejected))
			continue
		}
		points = append(points, p)
		o.counts = append(o.counts, measurement{s: p.Supersaturation, count: p.Activated, uncertainty: p.Uncertainty,
			levelUncertainty: at.Uncertainty, transfer: at.Sensitivity, flag: strings.Join(verdict.Flags, " "), predicted: math.NaN()})
	}
	r.cycle(o, points)
}

// airNotKnown is why a count at ambient air is left out.
const airNotKnown = "at ambient air whose temperature or pressure is missing"

// allParticles is the number of all particles and its standard uncertainty, 1/m³ at
// standard air; NaN: not known.
func (r *recorder) allParticles(o *observation, s *fieldfile.Sample, air aerosol.Air) (n, uncertainty float64) {
	c := s.Values[fieldfile.CN]
	if !c.OK() {
		return math.NaN(), math.NaN()
	}
	factor := r.standard(o, s.Basis[fieldfile.CN], air)
	u := countUncertainty(fieldfile.Count{N: c, Uncertainty: s.Values[fieldfile.CNUncertainty], Counted: s.Values[fieldfile.CNCounted]})
	return c.X * factor, u * factor
}

// notCounted says why there is no number to compare, "" where there is one.
func notCounted(c fieldfile.Count, level float64) string {
	switch {
	case c.N.State == fieldfile.Below:
		return "below the limit of detection"
	case c.N.State == fieldfile.Above:
		return "above the upper limit of the instrument"
	case !c.N.OK():
		return "missing in the data"
	case !(level > 0):
		return "of no known supersaturation"
	}
	return ""
}

// level is the supersaturation that a count belongs to: by the calibration of the
// scenario where there is a temperature difference, else as the data have it, with no uncertainty.
func (r *recorder) level(o *observation, s *fieldfile.Sample, c fieldfile.Count) counter.Applied {
	asGiven := counter.Applied{Supersaturation: c.At()}
	if r.calibrations.first == nil {
		return asGiven
	}
	difference := s.Values[fieldfile.TemperatureDifference]
	if set := c.Set.Or(c.At()); !difference.OK() && r.setSlope > 0 && set > 0 {
		difference = fieldfile.Measured((set - r.setIntercept) / r.setSlope)
	}
	if !difference.OK() {
		r.note(o, "calibration-not-applied", "calibration", "The data have no temperature difference of the counter: the calibration cannot be applied, supersaturations are as the data have them. With the line that the counter itself takes (set-slope) it can.")
		return asGiven
	}
	calibration, err := r.calibrations.at(float64(s.Start.UnixNano()) / 1e9)
	if err != nil {
		r.note(o, "calibration-does-not-apply", "calibration-after", capital(sentenceOf(reason(err))))
		return counter.Applied{Supersaturation: math.NaN()}
	}
	pressure, flow := s.Values[fieldfile.Pressure].Or(0), s.Values[fieldfile.SampleFlow].Or(0)
	if pressure > 0 && calibration.Pressure == 0 {
		r.note(o, "calibration-without-pressure", "calibration", "The pressure of the calibration is not known: supersaturations are not corrected for that of the data.")
		pressure = 0
	}
	if calibration.Flow == 0 {
		flow = 0
	}
	applied, err := calibration.Apply(difference.X, counter.Site{Pressure: pressure, Flow: flow})
	if err != nil {
		r.note(o, "calibration-does-not-apply", "calibration", capital(sentenceOf(reason(err))))
		return counter.Applied{Supersaturation: math.NaN()}
	}
	for _, n := range applied.Notes {
		r.note(o, n.Code, "calibration", n.Text)
	}
	return applied
}

// countUncertainty is that of the file, else that of counting, 1/m³.
func countUncertainty(c fieldfile.Count) float64 {
	if c.Uncertainty.OK() {
		return c.Uncertainty.X
	}
	if c.Counted.OK() && c.Counted.X > 0 {
		return c.N.X / math.Sqrt(c.Counted.X)
	}
	return math.NaN()
}

// cycle applies the rule that counts must rise with supersaturation.
func (r *recorder) cycle(o *observation, points []spectrum.Observed) {
	flagged, rejected := r.judge.LookAtCycle(points)
	for _, i := range flagged {
		o.counts[i].flag = strings.TrimSpace(o.counts[i].flag + " " + spectrum.Monotonic)
	}
	out := map[int]bool{}
	for _, i := range rejected {
		out[i] = true
		o.rejected.add(r.says(spectrum.Monotonic))
	}
	kept := o.counts[:0]
	for i, m := range o.counts {
		if !out[i] {
			kept = append(kept, m)
		}
	}
	o.counts = kept
}

// says is a rule in words.
func (r *recorder) says(key string) string {
	for _, rule := range r.rules {
		if rule.Key == key {
			return rule.Says
		}
	}
	return key
}

// rejected is what was left out of all records, and by which rule.
func (r *recorder) rejected() rejections {
	out := slices.Clone(r.left)
	for _, t := range r.judge.Tallies() {
		if t.Rejected > 0 {
			out = append(out, rejection{t.Rule.Says, t.Rejected})
		}
	}
	return out
}
