package fieldfile

import (
	"cmp"
	"math"
	"slices"
	"time"
)

// window gathers the cells of all files in one interval of time.
type window struct {
	from, to time.Time
	samples  int
	line     int
	values   [Quantities]pool
	basis    [Quantities]Basis
	sizes    []sizePool // one a file that has sizes
	counts   []countPool
	texts    map[Quantity]string
	bins     []Bin
}

type sizePool struct {
	source int
	bins   []Bin
	pools  []pool
}

type countPool struct {
	level                             float64
	set, actual, spread, n, u, counts pool
	basis                             Basis
}

func (w *window) reset(from, to time.Time) {
	w.from, w.to, w.samples, w.texts = from, to, 0, nil
	for q := range w.values {
		w.values[q].reset()
	}
	w.sizes = w.sizes[:0]
	w.counts = w.counts[:0]
	clear(w.basis[:])
}

// shared is the time a sample has in the window, in s, and which share of the
// sample that is.
func (w *window) shared(s *Sample) (sec, share float64) {
	if !s.End.After(s.Start) {
		if s.Start.Before(w.from) || !s.Start.Before(w.to) {
			return 0, 0
		}
		return 1, 1
	}
	from, to := s.Start, s.End
	if from.Before(w.from) {
		from = w.from
	}
	if to.After(w.to) {
		to = w.to
	}
	sec = to.Sub(from).Seconds()
	return sec, sec / s.End.Sub(s.Start).Seconds()
}

func (w *window) add(m *Merger, source int, s *Sample, sec, share float64) {
	if w.samples == 0 {
		w.line = s.Line
	}
	w.samples++
	for q := range s.Values {
		if m.owner[q] != source || s.Values[q].State == Missing {
			continue
		}
		weight := sec
		if summed(Quantity(q)) {
			weight = share
		}
		w.values[q].add(s.Values[q], weight)
		w.basis[q] = s.Basis[q]
	}
	for q, text := range s.Texts {
		if _, ok := w.texts[q]; !ok {
			if w.texts == nil {
				w.texts = map[Quantity]string{}
			}
			w.texts[q] = text
		}
	}
	if len(s.Bins) > 0 {
		w.addSizes(m, source, s, sec)
	}
	for i := range s.Counts {
		w.addCount(&s.Counts[i], sec, share)
	}
}

func summed(q Quantity) bool { return q == CNCounted || q == CCNCounted || q == SamplingTime }

func uncertain(q Quantity) bool {
	return q == CNUncertainty || q == CCNUncertainty
}

func (w *window) addSizes(m *Merger, source int, s *Sample, sec float64) {
	var p *sizePool
	for i := range w.sizes {
		if w.sizes[i].source == source {
			p = &w.sizes[i]
		}
	}
	if p == nil {
		if len(w.sizes) < cap(w.sizes) {
			w.sizes = w.sizes[:len(w.sizes)+1] // its slices are used again
		} else {
			w.sizes = append(w.sizes, sizePool{})
		}
		p = &w.sizes[len(w.sizes)-1]
		p.source = source
		p.bins = append(p.bins[:0], s.Bins...)
		p.pools = slices.Grow(p.pools[:0], len(s.Bins))[:len(s.Bins)]
		for i := range p.pools {
			p.pools[i].reset()
		}
	}
	if !sameBins(p.bins, s.Bins) {
		m.sources[source].Samples.f.notes.add("bins", s.Line, "the sizes change inside an averaging window: only the first are kept")
		return
	}
	for i, c := range s.Sizes {
		p.pools[i].add(c, sec)
	}
}

func sameBins(a, b []Bin) bool {
	if len(a) != len(b) {
		return false
	}
	for i := range a {
		if !alike(a[i].Diameter, b[i].Diameter) || a[i].PerBin != b[i].PerBin || a[i].Basis != b[i].Basis {
			return false
		}
	}
	return true
}

// sameLevel is how far, as a ratio, two supersaturations of one level may be
// apart: a counter's steps are some 20 % or more, its jitter 1 to 3 %.
const sameLevel = 0.05

func (w *window) addCount(c *Count, sec, share float64) {
	level := c.Set.Or(c.At())
	if math.IsNaN(level) {
		level = 0 // none is known: a temperature difference may say it
	}
	var p *countPool
	for i := range w.counts {
		if math.Abs(level-w.counts[i].level) <= sameLevel*w.counts[i].level && w.counts[i].basis == c.Basis {
			p = &w.counts[i]
		}
	}
	if p == nil {
		w.counts = append(w.counts, countPool{level: level, basis: c.Basis})
		p = &w.counts[len(w.counts)-1]
	}
	p.set.add(c.Set, sec)
	p.actual.add(c.Supersaturation, sec)
	p.spread.add(c.SetUncertainty, sec)
	p.n.add(c.N, sec)
	p.u.add(c.Uncertainty, sec)
	p.counts.add(c.Counted, share)
}

// give writes the averages into a sample.
func (w *window) give(out *Sample, how Averaging) {
	*out = Sample{Line: w.line, Start: w.from, End: w.to, Basis: w.basis, Sizes: out.Sizes[:0], Counts: out.Counts[:0], Texts: w.texts}
	for q := range w.values {
		switch p := &w.values[q]; {
		case summed(Quantity(q)):
			out.Values[q] = p.total()
		case uncertain(Quantity(q)):
			out.Values[q] = p.combined()
		default:
			out.Values[q] = p.cell(how)
		}
	}
	bins := 0
	for i := range w.sizes {
		bins += len(w.sizes[i].bins)
		for j := range w.sizes[i].pools {
			out.Sizes = append(out.Sizes, w.sizes[i].pools[j].cell(how))
		}
	}
	out.Bins = w.allBins(bins)
	for i := range w.counts {
		p := &w.counts[i]
		out.Counts = append(out.Counts, Count{
			Supersaturation: p.actual.cell(how), Set: p.set.cell(how), SetUncertainty: p.spread.cell(Mean),
			N: p.n.cell(how), Uncertainty: p.u.combined(), Counted: p.counts.total(), Basis: p.basis,
		})
	}
	slices.SortStableFunc(out.Counts, func(a, b Count) int { return cmp.Compare(a.At(), b.At()) })
}

// allBins joins the bins of the files. The slice of the last window is given
// again where nothing changed.
func (w *window) allBins(n int) []Bin {
	all := make([]Bin, 0, n)
	for i := range w.sizes {
		all = append(all, w.sizes[i].bins...)
	}
	if sameBins(all, w.bins) {
		return w.bins
	}
	w.bins = all
	return all
}
