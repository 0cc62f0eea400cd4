package answer

import (
	"cmp"
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/figure"
)

// season is all records of the data, taken one after the other in constant memory.
type season struct {
	whole    *activated // what it becomes
	all      averages   // of what was sized
	compared averages   // of records that have counts as well
	levels   []*level   // of counts, ascending
	kappas   spectrum.Quantiles
	kelvin   float64
	times    timeline
	rows     *recordRows
	grid     *aerosol.Grid // nil: nothing was sized yet
	isMixed  bool          // records have bins of several kinds
}

// averages are means of predictions and sizes.
type averages struct {
	n                            int
	line, asked, critical, sizes []float64
}

// level is what was counted at one supersaturation.
type level struct {
	s                             float64
	paired                        bool // some are compared: only those count then
	isMeasured                    bool // not only interpolated
	n                             int
	predicted, measured, variance float64 // sums
	kappas, diameters             spectrum.Quantiles
	noKappa                       error // the last one
}

// meanPoints are the supersaturations at which a mean spectrum is known; more would
// take longer than the rest of a record.
const meanPoints = 25

func newSeason(c *composer, rows *recordRows) *season {
	w := &activated{asked: c.asked, isAlike: true}
	for _, s := range slices.Compact(slices.Sorted(slices.Values(c.asked.Supersaturations))) {
		w.predicted = append(w.predicted, prediction{s: s, count: math.NaN(), critical: math.NaN()})
	}
	low, high := w.reach()
	w.meanAt = spaced(low, high, meanPoints)
	return &season{whole: w, rows: rows, kelvin: w.kelvin()}
}

// add takes a record that has been predicted.
func (q *season) add(a *activated) error {
	w := q.whole
	if w.records++; w.records == 1 {
		w.start = a.start
	}
	w.end = a.end
	w.notes = merged(w.notes, a.notes)
	hasPairs := false
	for _, m := range a.measured {
		q.count(a, m)
		hasPairs = hasPairs || !math.IsNaN(m.ratio())
	}
	if k := a.kappa(); !math.IsNaN(k) {
		q.kappas.Add(k)
	}
	if a.sizes != nil {
		q.kelvin = a.kelvin()
		line, err := a.counts(w.meanAt)
		if err != nil {
			return err
		}
		sizes := q.binned(a.bins)
		q.all.add(line, a.predicted, sizes)
		if hasPairs {
			q.compared.add(line, a.predicted, sizes)
		}
	}
	return q.rows.add(a)
}

// count takes what was counted at one supersaturation.
func (q *season) count(a *activated, m measurement) {
	l := q.level(m.s)
	if !m.isBetween {
		q.whole.closures.Add(m.s, m.predicted, m.count)
		q.times.add(a.start, a.end.Sub(a.start), m.ratio())
	}
	if l == nil || math.IsNaN(m.count) {
		return
	}
	if m.noKappa != nil {
		l.noKappa = m.noKappa
	} else {
		l.kappas.Add(m.kappa.Kappa)
		l.diameters.Add(m.kappa.CriticalDiameter)
	}
	isPair := !math.IsNaN(m.predicted)
	switch {
	case isPair && !l.paired:
		l.paired, l.n, l.predicted, l.measured, l.variance = true, 0, 0, 0, 0
	case !isPair && l.paired:
		return
	}
	l.n++
	l.isMeasured = l.isMeasured || !m.isBetween
	l.predicted += m.predicted
	l.measured += m.count
	l.variance += m.uncertainty * m.uncertainty
}

// mostLevels bounds the supersaturations that are kept apart, as spectrum.Closures does.
const mostLevels = 64

// level is that of a supersaturation, nil where there are too many.
func (q *season) level(s float64) *level {
	for _, l := range q.levels {
		if sameLevel(l.s, s) {
			return l
		}
	}
	if len(q.levels) == mostLevels {
		return nil
	}
	q.levels = append(q.levels, &level{s: s})
	return q.levels[len(q.levels)-1]
}

// binned are the numbers in the bins, nil where they differ from the first ones.
func (q *season) binned(b *aerosol.Bins) []float64 {
	switch {
	case q.isMixed:
		return nil
	case q.grid == nil:
		q.grid = b.Grid()
	case q.grid != b.Grid() && !slices.Equal(q.grid.Edges(), b.Grid().Edges()):
		q.isMixed = true
		return nil
	}
	return b.Values(nil, aerosol.Counts)
}

func (v *averages) add(line []float64, asked []prediction, sizes []float64) {
	if v.n++; v.n == 1 {
		v.line, v.asked, v.critical, v.sizes = make([]float64, len(line)), make([]float64, len(asked)), make([]float64, len(asked)), make([]float64, len(sizes))
	}
	for i, x := range line {
		v.line[i] += x
	}
	for i, p := range asked {
		v.asked[i] += p.count
		v.critical[i] += p.critical
	}
	for i, x := range sizes {
		v.sizes[i] += x
	}
}

// merged appends the notes that are not there yet: what is said of one record is
// said once.
func merged(notes, more []atmos.Note) []atmos.Note {
	for _, n := range more {
		if !slices.ContainsFunc(notes, func(o atmos.Note) bool { return o.Code == n.Code }) {
			notes = append(notes, n)
		}
	}
	return notes
}

// close makes the answer of all records.
func (q *season) close() (*activated, error) {
	w := q.whole
	v := q.all
	if q.compared.n > 0 {
		v = q.compared
	}
	w.noSizes = "no sizes were measured in any record"
	if v.n > 0 {
		if err := q.average(v); err != nil {
			return nil, err
		}
	}
	slices.SortFunc(q.levels, func(a, b *level) int { return cmp.Compare(a.s, b.s) })
	for _, l := range q.levels {
		if l.n > 0 {
			w.measured = append(w.measured, l.mean())
		}
	}
	kappa := math.NaN()
	if at := q.kappas.At(0.5); len(at) > 0 {
		kappa = at[0]
	}
	w.groups = []composed{{kappa: kappa, kelvin: q.kelvin}}
	w.kappaFrom = "the median of the records"
	if len(q.times.cells) > 0 {
		w.times = &q.times
	}
	w.fit()
	w.limit()
	if n := q.rows.missed; n > 0 {
		w.notes = append(w.notes, atmos.Note{Code: "rows-not-kept", Input: "record",
			Text: fmt.Sprintf("The table of all records holds the first %d rows; written to a file by the command line it has %d more.", mostRows, n)})
	}
	return w, nil
}

// average makes means of sums.
func (q *season) average(v averages) error {
	w, n := q.whole, float64(v.n)
	w.mean = figure.Line{}
	for i, s := range w.meanAt {
		w.mean.X, w.mean.Y = append(w.mean.X, 100*s), append(w.mean.Y, v.line[i]/n*perCubic)
	}
	for i := range w.predicted {
		w.predicted[i].count, w.predicted[i].critical = v.asked[i]/n, v.critical[i]/n
	}
	if q.isMixed || q.grid == nil {
		w.notes = append(w.notes, atmos.Note{Code: "bins-differ", Input: "data", Text: "The records have bins of several kinds: there is no mean size distribution."})
		return nil
	}
	for i := range v.sizes {
		v.sizes[i] /= n
	}
	bins, err := aerosol.NewBins(q.grid, v.sizes, aerosol.Counts)
	if err != nil {
		return fmt.Errorf("mean of the size distributions: %w", err)
	}
	w.sizes, w.bins = bins, bins
	return nil
}

// mean is the mean of a level; its uncertainty is that of the mean of these counts.
func (l *level) mean() measurement {
	n := float64(l.n)
	m := measurement{s: l.s, count: l.measured / n, uncertainty: math.Sqrt(l.variance) / n, predicted: l.predicted / n,
		critical: math.NaN(), records: l.n, noKappa: l.noKappa}
	if !l.isMeasured {
		m.flag, m.isBetween = betweenFlag, true
	}
	if k := l.kappas.At(0.5); !math.IsNaN(k[0]) {
		m.noKappa = nil
		m.kappa = spectrum.CountKappa{Kappa: k[0], CriticalDiameter: l.diameters.At(0.5)[0], ByCount: math.NaN()}
	}
	return m
}
