package counter

import (
	"math"
	"slices"
)

// Row is one line of a log in the long layout.
type Row struct {
	Salt                  string
	TemperatureDifference float64 // K
	DryDiameter           float64 // mobility diameter, m
	CN, CCN               float64 // counts, see Counts
	Ratio                 float64 // flow times time of the CCN counter over that of the particle counter; 0: 1
	Flow                  float64 // total flow of the CCN counter, m³/s; 0: not known
	Pressure              float64 // Pa; 0: not known
	Time, Duration        float64 // begin and length of the sample, s
	Reject                string  // why it must not be used, a clause
	Line                  int     // in its file
}

// Counts returns how many particles a concentration (1/m³) is, sampled with a flow
// (m³/s) for a time (s). The likelihood needs counts: a concentration alone does not
// say how sure it is.
func Counts(concentration, flow, seconds float64) float64 { return concentration * flow * seconds }

// Tolerances of Gather and DetectAxis: settings that differ by less are one.
type Tolerances struct {
	Difference float64 // K; 0: 0.2
	Diameter   float64 // relative; 0: 0.01
	Flow       float64 // relative; 0: 0.03
}

func (t Tolerances) defaults() Tolerances {
	if t.Difference == 0 {
		t.Difference = 0.2
	}
	if t.Diameter == 0 {
		t.Diameter = 0.01
	}
	if t.Flow == 0 {
		t.Flow = 0.03
	}
	return t
}

func (t Tolerances) sameDifference(a, b float64) bool { return math.Abs(a-b) <= t.Difference }
func (t Tolerances) sameDiameter(a, b float64) bool   { return math.Abs(a-b) <= t.Diameter*b }
func (t Tolerances) sameFlow(a, b float64) bool       { return math.Abs(a-b) <= t.Flow*b }

// DetectAxis returns what changes most often from row to row.
func DetectAxis(rows []Row, t Tolerances) Axis {
	t = t.defaults()
	var changes [3]int
	for i := 1; i < len(rows); i++ {
		a, b := rows[i-1], rows[i]
		if !t.sameDiameter(a.DryDiameter, b.DryDiameter) {
			changes[OverDiameter]++
		}
		if !t.sameDifference(a.TemperatureDifference, b.TemperatureDifference) {
			changes[OverDifference]++
		}
		if !t.sameFlow(a.Flow, b.Flow) {
			changes[OverFlow]++
		}
	}
	axis := OverDiameter
	for _, a := range []Axis{OverDifference, OverFlow} {
		if changes[a] > changes[axis] {
			axis = a
		}
	}
	return axis
}

// Gather puts the rows of a log together to scans over an axis: rows belong to one
// scan when salt and the settings that are not scanned are the same. The measured
// temperature difference may wander by the tolerance; the scan has its mean and the
// standard uncertainty of that mean. Scans stand in the order of their first rows,
// and salts says which salt each is of. Rows that are to be left out are kept, so
// that a fit can say so.
func Gather(rows []Row, over Axis, t Tolerances) (scans []Scan, salts []string) {
	t = t.defaults()
	var groups [][]Row
	for _, r := range rows {
		i := slices.IndexFunc(groups, func(g []Row) bool {
			return g[0].Salt == r.Salt &&
				(over == OverDiameter || t.sameDiameter(r.DryDiameter, g[0].DryDiameter)) &&
				(over == OverDifference || t.sameDifference(r.TemperatureDifference, g[0].TemperatureDifference)) &&
				(over == OverFlow || t.sameFlow(r.Flow, g[0].Flow))
		})
		if i < 0 {
			groups = append(groups, []Row{r})
			continue
		}
		groups[i] = append(groups[i], r)
	}
	for _, g := range groups {
		scans = append(scans, gathered(g, over))
		salts = append(salts, g[0].Salt)
	}
	return scans, salts
}

func gathered(rows []Row, over Axis) Scan {
	s := Scan{Over: over, DryDiameter: rows[0].DryDiameter}
	n := float64(len(rows))
	for _, r := range rows {
		s.TemperatureDifference += r.TemperatureDifference / n
		s.Flow += r.Flow / n
		s.Pressure += r.Pressure / n
		s.Time += r.Time / n
		setting := r.DryDiameter
		switch over {
		case OverDifference:
			setting = r.TemperatureDifference
		case OverFlow:
			setting = r.Flow
		}
		s.Points = append(s.Points, Point{Setting: setting, CN: r.CN, CCN: r.CCN, Ratio: r.Ratio, Reject: r.Reject, Time: r.Time, Line: r.Line})
	}
	square := 0.0
	for _, r := range rows {
		d := r.TemperatureDifference - s.TemperatureDifference
		square += d * d
	}
	switch over {
	case OverDiameter:
		s.DryDiameter = 0
	case OverDifference:
		s.TemperatureDifference, square = 0, 0
	case OverFlow:
		s.Flow = 0
	}
	if len(rows) > 1 {
		s.DifferenceUncertainty = math.Sqrt(square / (n * (n - 1)))
	}
	s.Name = over.nameOf(s)
	return s
}

// nameOf names a scan by what it holds fixed.
func (a Axis) nameOf(s Scan) string {
	difference, diameter := OverDifference.show(s.TemperatureDifference), OverDiameter.show(s.DryDiameter)
	switch a {
	case OverDiameter:
		return "at " + difference
	case OverDifference:
		return "at " + diameter
	}
	return "at " + difference + " and " + diameter
}

// Settle marks rows that were begun less than seconds after the temperature
// difference was changed: the column is not steady yet. Rows must be in the order of
// their time. It returns a copy.
func Settle(rows []Row, seconds float64, t Tolerances) []Row {
	t = t.defaults()
	out := slices.Clone(rows)
	changed := math.Inf(-1)
	for i := range out {
		if i > 0 && !t.sameDifference(out[i].TemperatureDifference, out[i-1].TemperatureDifference) {
			changed = out[i].Time
		}
		if out[i].Time-changed < seconds && out[i].Reject == "" {
			out[i].Reject = "the temperature difference had just been changed"
		}
	}
	return out
}

// Delay moves the counts of the particle counter later by seconds, so that they
// meet the droplets of the same air: particles take longer through the column of the
// CCN counter. Counts are shared out by the overlap of the samples, each taken as
// steady. Rows at the ends that the moved samples do not cover are marked. Durations
// must be above 0 and rows in the order of their time. It returns a copy.
func Delay(rows []Row, seconds float64) []Row {
	out := slices.Clone(rows)
	for i := range out {
		r := &out[i]
		count, covered := 0.0, 0.0
		for _, o := range rows {
			begin := math.Max(r.Time, o.Time+seconds)
			end := math.Min(r.Time+r.Duration, o.Time+o.Duration+seconds)
			if end > begin {
				count += o.CN * (end - begin) / o.Duration
				covered += end - begin
			}
		}
		r.CN = count
		if covered < 0.999*r.Duration && r.Reject == "" {
			r.Reject = "no particle counts at that time, for the delay of the CCN counter"
		}
	}
	return out
}
