package answer

import (
	"math"
	"slices"
	"strings"
	"time"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/fieldfile"
)

// sameSetting is how far, relative, readings at one supersaturation lie apart: the
// steps of a counter are some 20 % or more, its jitter is 1 to 3 %.
const sameSetting = 0.05

// looked is a reading that was left out before averaging.
type looked struct {
	at  time.Time
	why string
}

// readings follows the readings of one file, before they are averaged: an average
// no longer shows that the counter had not settled.
type readings struct {
	of    *recorder
	level float64   // of the last reading, 0: none yet
	since time.Time // when it was set; zero: not known
	holds bool      // a level has been held over several readings
}

// readings returns what looks at the readings of a file.
func (r *recorder) readings() func(*fieldfile.Sample) {
	g := &readings{of: r}
	return g.look
}

// look judges what belongs to single readings: time since the supersaturation
// changed, and the state of the instrument.
func (g *readings) look(s *fieldfile.Sample) {
	if len(s.Counts) == 0 {
		return
	}
	p := spectrum.Unknown()
	p.Stable = stability(s.Texts[fieldfile.Status])
	if len(s.Counts) == 1 { // a supersaturation a record
		countByFlow(s)
		p.SinceChange = g.sinceChange(s)
	}
	if math.IsNaN(p.Stable) && math.IsNaN(p.SinceChange) {
		return
	}
	kept := s.Counts[:0]
	for _, c := range s.Counts {
		if c.N.OK() {
			if why := g.of.judge.Look(p).Rejected; why != "" {
				g.of.looked = append(g.of.looked, looked{s.Start, g.of.says(why)})
				continue
			}
		}
		kept = append(kept, c)
	}
	s.Counts = kept
}

// sinceChange is the time since the supersaturation changed, s; NaN: not known. Where
// no level is ever held, each record is the mean of a level, and whoever took it has
// waited.
func (g *readings) sinceChange(s *fieldfile.Sample) float64 {
	c := s.Counts[0]
	level := c.Set.Or(c.At())
	switch {
	case !(level > 0):
		return math.NaN()
	case g.level > 0 && math.Abs(level-g.level) <= sameSetting*g.level:
		g.holds = true
	default:
		if g.level > 0 {
			g.since = s.Start
		}
		g.level = level
	}
	if !g.holds || g.since.IsZero() {
		return math.NaN()
	}
	return s.Start.Sub(g.since).Seconds()
}

// countByFlow fills in what flow and time make of counted drops, or of a number.
// The flow is that through the instrument, so the air stays as the data state it.
func countByFlow(s *fieldfile.Sample) {
	c := &s.Counts[0]
	volume := s.Values[fieldfile.SampleFlow].Or(0) * s.Values[fieldfile.SamplingTime].Or(0)
	if !(volume > 0) {
		return
	}
	switch {
	case c.N.State == fieldfile.Missing && c.Counted.OK():
		c.N = fieldfile.Measured(c.Counted.X / volume)
	case c.N.OK() && c.Counted.State == fieldfile.Missing:
		c.Counted = fieldfile.Measured(c.N.X * volume)
	}
}

// stability is 1 or 0 by the instrument's word on its temperatures, NaN: none known.
func stability(word string) float64 {
	switch strings.ToLower(strings.TrimSpace(word)) {
	case "1", "1.0", "true", "yes", "stable":
		return 1
	case "0", "0.0", "false", "no", "unstable", "not stable":
		return 0
	}
	return math.NaN()
}

// take gives a window the readings that were left out in it.
func (r *recorder) take(o *observation, s *fieldfile.Sample) {
	ahead := r.looked[:0]
	for _, l := range r.looked {
		switch {
		case !l.at.Before(s.End) && s.End.After(s.Start):
			ahead = append(ahead, l)
		case !l.at.Before(s.Start):
			o.rejected.add(l.why)
		}
	}
	r.looked = ahead
}

// runningMedian is the median of the last values.
type runningMedian struct {
	last, sorted []float64
	next         int
}

// medianOf records are a memory of half a day where a record is half an hour, and
// fewer than fewestOfMedian say nothing (own choice).
const (
	medianOf       = 25
	fewestOfMedian = 5
)

// add takes a value and returns the median; NaN is no value.
func (m *runningMedian) add(x float64) float64 {
	if !math.IsNaN(x) {
		if len(m.last) < medianOf {
			m.last = append(m.last, x)
		} else {
			m.last[m.next] = x
			m.next = (m.next + 1) % medianOf
		}
	}
	if len(m.last) < fewestOfMedian {
		return math.NaN()
	}
	m.sorted = append(m.sorted[:0], m.last...)
	slices.Sort(m.sorted)
	n := len(m.sorted)
	return (m.sorted[(n-1)/2] + m.sorted[n/2]) / 2
}
