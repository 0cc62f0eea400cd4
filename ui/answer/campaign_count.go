package answer

import (
	"math"
	"slices"
	"strings"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/counter"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/fieldfile"
)

// count is what was counted at each supersaturation, judged by the rules of quality.
func (r *recorder) count(o *observation, s *fieldfile.Sample, air aerosol.Air) {
	all := s.Values[fieldfile.CN].Or(math.NaN())
	if !math.IsNaN(all) {
		all *= r.standard(o, s.Basis[fieldfile.CN], air)
	}
	sized := math.NaN()
	if o.sizes != nil {
		sized = o.sizes.Number()
	}
	var points []spectrum.Observed
	for _, c := range s.Counts {
		level, inherits := r.level(o, s, c)
		if why := notCounted(c, level); why != "" {
			o.reject(why)
			r.leave(why)
			continue
		}
		factor := r.standard(o, c.Basis, air)
		if math.IsNaN(factor) {
			continue
		}
		p := spectrum.Unknown()
		p.Supersaturation, p.Activated = level, c.N.X*factor
		p.Uncertainty = countUncertainty(c) * factor
		p.All, p.Sized = all, sized
		p.AllUncertainty = s.Values[fieldfile.CNUncertainty].Or(math.NaN())
		p.Drops = c.Counted.Or(math.NaN())
		verdict := r.judge.Look(p)
		if verdict.Rejected != "" {
			o.reject(r.says(verdict.Rejected))
			continue
		}
		points = append(points, p)
		o.counts = append(o.counts, measurement{s: p.Supersaturation, count: p.Activated, uncertainty: p.Uncertainty,
			inherits: inherits,
			flag:     strings.Join(verdict.Flags, " "), predicted: math.NaN()})
	}
	r.cycle(o, points)
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
// scenario where there is a temperature difference, else as the data have it.
func (r *recorder) level(o *observation, s *fieldfile.Sample, c fieldfile.Count) (float64, inherited) {
	if r.calibration == nil {
		return c.At(), inherited{}
	}
	difference := s.Values[fieldfile.TemperatureDifference]
	if !difference.OK() {
		r.note(o, "calibration-not-applied", "calibration", "The data have no temperature difference of the counter: the calibration cannot be applied, supersaturations are as the data have them.")
		return c.At(), inherited{}
	}
	at := counter.Site{Pressure: s.Values[fieldfile.Pressure].Or(0), Flow: s.Values[fieldfile.SampleFlow].Or(0)}
	if r.calibration.first.Pressure == 0 && at.Pressure > 0 {
		at.Pressure = 0
		r.note(o, "calibration-pressure", "calibration", "The calibration has no pressure: it is taken to hold at that of the measurement.")
	}
	if r.calibration.first.Flow == 0 && at.Flow > 0 {
		at.Flow = 0
		r.note(o, "calibration-flow", "calibration", "The calibration has no flow: it is taken to hold at that of the measurement.")
	}
	middle := float64(o.start.Unix()) + o.end.Sub(o.start).Seconds()/2
	applied, err := r.calibration.apply(difference.X, middle, at)
	if err != nil {
		r.noteOnce(o, atmos.Note{Code: "calibration-does-not-apply", Input: "calibration", Text: capital(sentenceOf(reason(err)))})
		return math.NaN(), inherited{}
	}
	for _, n := range applied.Notes {
		r.noteOnce(o, n)
	}
	return applied.Supersaturation, inherited{applied.Uncertainty / applied.Supersaturation, applied.Sensitivity}
}

// leave counts a point that no rule has looked at.
func (r *recorder) leave(why string) {
	for i := range r.left {
		if r.left[i].Reason == why {
			r.left[i].Count++
			return
		}
	}
	r.left = append(r.left, rejection{why, 1})
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
		o.reject(r.says(spectrum.Monotonic))
	}
	kept := o.counts[:0]
	for i, m := range o.counts {
		if !out[i] {
			kept = append(kept, m)
		}
	}
	o.counts = kept
}

// reject counts a point that is left out.
func (o *observation) reject(why string) {
	for i := range o.rejected {
		if o.rejected[i].Reason == why {
			o.rejected[i].Count++
			return
		}
	}
	o.rejected = append(o.rejected, rejection{why, 1})
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
func (r *recorder) rejected() []rejection {
	out := slices.Clone(r.left)
	for _, t := range r.judge.Tallies() {
		if t.Rejected > 0 {
			out = append(out, rejection{t.Rule.Says, t.Rejected})
		}
	}
	return out
}
