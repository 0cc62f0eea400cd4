package answer

import (
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/spectrum"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// recorder makes observations of samples: one state of air, points judged, κ of the
// composition that was measured.
type recorder struct {
	rules  []spectrum.Rule
	judge  *spectrum.Judge
	sizing sizing
	number int

	setSlope, setIntercept float64 // of the line that the counter itself takes; 0: not known

	calibrations calibrations // none: supersaturations as the data have them
	notes        []atmos.Note

	grids []sizedGrid // of the bins so far
	left  rejections  // points that no rule has looked at

	parts  massParts     // of the composition that the files have columns for
	looked []looked      // readings left out that belong to a window still to come
	all    runningMedian // of all particles
}

// sizedGrid is the grid of bins that samples share.
type sizedGrid struct {
	of   []fieldfile.Bin
	low  *aerosol.Grid // of all, or of the smaller sizes where two instruments overlap
	high *aerosol.Grid // nil: one instrument
	cut  int           // first bin of the second one
	err  error
}

// newRecorder is a recorder for a scenario.
func newRecorder(env Env, s scenario.Scenario) (*recorder, error) {
	r := &recorder{rules: s.QualityRules()}
	var err error
	if r.judge, err = spectrum.NewJudge(r.rules); err != nil {
		return nil, &InputError{Input: "rule", Text: reason(err)}
	}
	if s.SetSlope.Word == "" {
		r.setSlope, r.setIntercept = s.SetSlope.Number, s.SetIntercept
	}
	if r.calibrations, err = readCalibrations(env, s); err != nil {
		return nil, err
	}
	r.sizing, err = sizingOf(env, s)
	return r, err
}

// observe is the observation of a sample. Nothing of it is used again.
func (r *recorder) observe(s *fieldfile.Sample) *observation {
	r.number++
	o := &observation{number: r.number, start: s.Start, end: s.End, kappa: math.NaN()}
	air := aerosol.Air{Temperature: s.Values[fieldfile.Temperature].Or(math.NaN()), Pressure: s.Values[fieldfile.Pressure].Or(math.NaN())}
	r.take(o, s)
	r.size(o, s, air)
	if o.sizes != nil {
		sized, err := r.sizing.apply(o.sizes)
		if err != nil {
			o.noSizes = reason(err)
		}
		o.sizes = sized
	}
	r.count(o, s, air)
	r.compose(o, s)
	return o
}

func (r *recorder) note(o *observation, code, input, text string) {
	n := atmos.Note{Code: code, Input: input, Text: text}
	if !slices.Contains(o.notes, n) {
		o.notes = append(o.notes, n)
	}
	if !slices.ContainsFunc(r.notes, func(known atmos.Note) bool { return known.Code == code && known.Input == input }) {
		r.notes = append(r.notes, n) // of a kind the first: a campaign may have as many texts as records
	}
}

// standard is the factor that brings a concentration to 273.15 K and 1013.25 hPa,
// NaN where the state of the air would have to be known and is not.
func (r *recorder) standard(o *observation, basis fieldfile.Basis, air aerosol.Air) float64 {
	switch basis {
	case fieldfile.Standard:
		return 1
	case fieldfile.Unstated:
		r.note(o, "air-not-stated", "data", "The data do not say at which state of air a number concentration is: 273.15 K and 1013.25 hPa are taken. "+
			"A line of the mapping with \"at ambient\" says otherwise.")
		return 1
	}
	if air.Check() != nil {
		r.note(o, "air-not-known", "data", "Concentrations at ambient air cannot be brought to standard air where temperature or pressure is missing: those are left out.")
		return math.NaN()
	}
	return air.To(aerosol.StandardAir())
}

// widestGap is the number of neighbouring sizes without a value that is bridged.
const widestGap = 2

// size is the size distribution of a sample.
func (r *recorder) size(o *observation, s *fieldfile.Sample, air aerosol.Air) {
	if len(s.Bins) < 2 {
		o.noSizes = "no sizes were measured"
		return
	}
	g := r.grid(s.Bins)
	if g.err != nil {
		o.noSizes = g.err.Error()
		return
	}
	values := make([]float64, len(s.Sizes))
	for i, c := range s.Sizes {
		b := s.Bins[i]
		switch {
		case c.State == fieldfile.Below:
			values[i] = 0
		default:
			values[i] = c.Or(math.NaN()) * r.standard(o, b.Basis, air)
		}
	}
	if !slices.ContainsFunc(values, func(x float64) bool { return !math.IsNaN(x) }) {
		o.noSizes = "all sizes of this record are missing"
		return
	}
	low, err := r.bins(o, g.low, values[:g.cut], s.Bins[:g.cut])
	if err != nil {
		o.noSizes = err.Error()
		return
	}
	o.sizes = low
	if g.high == nil {
		return
	}
	high, err := r.bins(o, g.high, values[g.cut:], s.Bins[g.cut:])
	if err == nil {
		r.compare(o, low, high)
		o.sizes, err = aerosol.Join(low, high, joint(g.low, g.high))
	}
	if err != nil {
		o.sizes, o.noSizes = nil, err.Error()
	}
}

// bins is a row of values on its grid, small gaps bridged.
func (r *recorder) bins(o *observation, g *aerosol.Grid, values []float64, of []fieldfile.Bin) (*aerosol.Bins, error) {
	as := aerosol.PerLog10
	if of[0].PerBin {
		as = aerosol.Counts
	}
	gaps, err := aerosol.Fill(g, values, widestGap)
	if err != nil {
		return nil, err
	}
	if len(gaps.Trimmed) > 0 {
		r.note(o, "sizes-missing-at-ends", "data", "Where sizes are missing at the ends of a distribution, no particles are taken to be there.")
	}
	return aerosol.NewBins(g, values, as)
}

// mostGrids is more than instruments change their sizes to and fro between; where each
// record has sizes of its own none is used again.
const mostGrids = 16

// grid is the grid of the bins, made once for all samples that share them.
func (r *recorder) grid(bins []fieldfile.Bin) *sizedGrid {
	for i := range r.grids {
		if g := &r.grids[i]; len(g.of) == len(bins) && (&g.of[0] == &bins[0] || slices.Equal(g.of, bins)) {
			return g
		}
	}
	g := sizedGrid{of: slices.Clone(bins), cut: len(bins)}
	for i := 1; i < len(bins); i++ {
		if bins[i].Diameter <= bins[i-1].Diameter || bins[i].PerBin != bins[i-1].PerBin {
			g.cut = i // a second instrument begins
			break
		}
	}
	if g.low, g.err = gridOf(bins[:g.cut]); g.err == nil && g.cut < len(bins) {
		g.high, g.err = gridOf(bins[g.cut:])
	}
	if len(r.grids) == mostGrids {
		r.grids = slices.Delete(r.grids, 0, 1)
	}
	r.grids = append(r.grids, g)
	return &r.grids[len(r.grids)-1]
}

// gridOf takes the limits that the file gives, else the geometric middle between
// neighbours.
func gridOf(bins []fieldfile.Bin) (*aerosol.Grid, error) {
	edges := make([]float64, 0, len(bins)+1)
	middles := make([]float64, 0, len(bins))
	for i, b := range bins {
		middles = append(middles, b.Diameter)
		const same = 1e-3 // relative: limits are printed with few digits
		if b.Lower > 0 && b.Upper > b.Lower && (i == 0 || len(edges) == i+1 && math.Abs(edges[i]/b.Lower-1) < same) {
			if i == 0 {
				edges = append(edges, b.Lower)
			}
			edges = append(edges, b.Upper)
		}
	}
	if len(edges) == len(bins)+1 {
		return aerosol.NewGrid(edges)
	}
	return aerosol.GridAround(middles)
}

// joint is where one instrument hands over to the other: the middle of what both
// measure, or of the gap between them.
func joint(low, high *aerosol.Grid) float64 {
	a, b := low.Edges(), high.Edges()
	return math.Sqrt(a[len(a)-1] * b[0])
}

// mostOverlap is by which factor two instruments may differ where both measured
// before that is said (own choice).
const mostOverlap = 2

// compare says where two instruments disagree about the same sizes.
func (r *recorder) compare(o *observation, low, high *aerosol.Bins) {
	both, ok := aerosol.OverlapOf(low, high)
	if ok && both.FromLow > 0 && both.FromHi > 0 && math.Abs(math.Log(both.Ratio())) > math.Log(mostOverlap) {
		r.note(o, "instruments-disagree", "data", "Where two instruments measured the same sizes, their numbers differ by more than a factor of two in some records.")
	}
}
