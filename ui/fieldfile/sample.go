package fieldfile

import (
	"cmp"
	"io"
	"math"
	"slices"
	"sort"
	"time"
)

// Bin is one size of a distribution.
type Bin struct {
	Diameter     float64 // m
	Lower, Upper float64 // m, the limits; 0: not given
	PerBin       bool    // counts in the bin; else dN/dlog10 D
	Basis        Basis
}

// Count is what was counted at one supersaturation.
type Count struct {
	Supersaturation Cell // fraction, as calibrated where the file says it
	Set             Cell // fraction, as set
	SetUncertainty  Cell // fraction, of the supersaturation
	N, Uncertainty  Cell // 1/m³
	Counted         Cell // droplets
	Basis           Basis
}

// At is the supersaturation to use: the calibrated one, else the one set.
func (c Count) At() float64 {
	return c.Supersaturation.Or(c.Set.Or(math.NaN()))
}

// Sample is what was measured at one time. Next fills it anew and reuses its
// slices.
type Sample struct {
	Line       int       // of its first record
	Start, End time.Time // UTC; equal for an instant
	Values     [Quantities]Cell
	Basis      [Quantities]Basis
	Bins       []Bin  // shared between samples; not to be changed
	Sizes      []Cell // one a bin, 1/m³
	Counts     []Count
	Texts      map[Quantity]string // salt and status; nil where there are none
}

// Samples reads a file by samples. In the wide layout a record is a sample; in
// the long layout of sizes the records of one time are.
type Samples struct {
	f      *File
	rec    Record
	held   bool  // rec is read and belongs to the next sample
	failed error // what comes after the sample being given
	wide   []int // columns of sizes, by diameter
	bins   []Bin
	counts []countColumns
	single []int // columns of single values
	texts  []int
	long   bool // sizes, a record each
	size   int  // column of the number in the long layout
}

// mostBins is far more than any spectrometer has.
const mostBins = 100000

// countColumns are the columns of one supersaturation; -1: none.
type countColumns struct {
	at                      float64 // fraction; 0: the record says it
	n, uncertainty, counted int
	basis                   Basis
}

// Samples reads on by samples. Use must not be called after it.
func (f *File) Samples() *Samples {
	s := &Samples{f: f, size: -1}
	for i, r := range f.roles {
		switch {
		case r.Quantity == Unused || r.Quantity == Flag || r.Quantity.IsTime():
		case r.Quantity.IsSize() && r.At == 0:
			s.size, s.long = i, true
		case r.Quantity.IsSize():
			s.wide = append(s.wide, i)
		case r.Quantity == CCN || r.Quantity == CCNUncertainty || r.Quantity == CCNCounted:
			s.addCount(i, r)
		case declared[r.Quantity].kind == asText:
			s.texts = append(s.texts, i)
		default:
			s.single = append(s.single, i)
		}
	}
	slices.SortFunc(s.wide, func(a, b int) int { return cmp.Compare(f.roles[a].At, f.roles[b].At) })
	for _, c := range s.wide {
		s.bins = append(s.bins, binOf(f.roles[c]))
	}
	s.counts = slices.DeleteFunc(s.counts, func(c countColumns) bool { return c.n < 0 && c.counted < 0 })
	slices.SortFunc(s.counts, func(a, b countColumns) int { return cmp.Compare(a.at, b.at) })
	return s
}

func binOf(r Role) Bin {
	return Bin{r.At, r.From, r.To, r.Quantity == PerBin, r.Basis}
}

func (s *Samples) addCount(column int, r Role) {
	i := slices.IndexFunc(s.counts, func(c countColumns) bool { return c.at == r.At })
	if i < 0 {
		i = len(s.counts)
		s.counts = append(s.counts, countColumns{r.At, -1, -1, -1, Unstated})
	}
	c := &s.counts[i]
	switch r.Quantity {
	case CCN:
		c.n, c.basis = column, r.Basis
	case CCNUncertainty:
		c.uncertainty = column
	case CCNCounted:
		c.counted = column
	}
}

// Next reads the next sample; io.EOF ends them.
func (s *Samples) Next(out *Sample) error {
	if !s.held {
		if s.failed != nil {
			return s.failed
		}
		if err := s.f.Read(&s.rec); err != nil {
			s.failed = err
			return err
		}
	}
	s.held = false
	s.begin(out)
	if !s.long {
		return nil
	}
	out.Bins, out.Sizes = nil, out.Sizes[:0]
	for {
		s.addSize(out)
		if len(out.Bins) > mostBins {
			s.failed = s.f.wrongAt(out.Line, 0, "more than "+itoa(mostBins)+" sizes of one time", "a time stamp for each size distribution")
			return s.failed
		}
		if s.failed = s.f.Read(&s.rec); s.failed != nil {
			if s.failed == io.EOF {
				break
			}
			return s.failed
		}
		if s.held = !s.rec.Start.Equal(out.Start); s.held {
			break
		}
	}
	sort.Stable(bySize{out})
	return nil
}

// begin fills a sample from one record.
func (s *Samples) begin(out *Sample) {
	*out = Sample{Line: s.rec.Line, Start: s.rec.Start, End: s.rec.End, Bins: s.bins,
		Sizes: out.Sizes[:0], Counts: out.Counts[:0], Texts: out.Texts}
	roles := s.f.roles
	for _, c := range s.single {
		out.Values[roles[c].Quantity] = s.rec.Cells[c]
		out.Basis[roles[c].Quantity] = roles[c].Basis
	}
	for _, c := range s.texts {
		if out.Texts == nil {
			out.Texts = map[Quantity]string{}
		}
		out.Texts[roles[c].Quantity] = s.rec.Text[c]
	}
	for _, c := range s.wide {
		out.Sizes = append(out.Sizes, s.rec.Cells[c])
	}
	cell := func(c int) Cell {
		if c < 0 {
			return Cell{}
		}
		return s.rec.Cells[c]
	}
	for _, c := range s.counts {
		n := Count{N: cell(c.n), Uncertainty: cell(c.uncertainty), Counted: cell(c.counted), Basis: c.basis}
		if c.at > 0 {
			n.Set = Cell{c.at, Value}
		} else {
			n.Set, n.Supersaturation = out.Values[SupersaturationSet], out.Values[Supersaturation]
			n.SetUncertainty = out.Values[SupersaturationUncertainty]
			if s.long {
				continue // CCN beside every size of a long distribution is a scan, not a spectrum
			}
		}
		out.Counts = append(out.Counts, n)
	}
}

// addSize adds the record's size in the long layout.
func (s *Samples) addSize(out *Sample) {
	r := s.f.roles[s.size]
	b := binOf(r)
	for _, c := range s.single {
		x := s.rec.Cells[c].Or(0)
		switch s.f.roles[c].Quantity {
		case Diameter:
			b.Diameter = x
		case LowerDiameter:
			b.Lower = x
		case UpperDiameter:
			b.Upper = x
		}
	}
	if b.Diameter == 0 && b.Lower > 0 && b.Upper > 0 {
		b.Diameter = math.Sqrt(b.Lower * b.Upper)
	}
	if !(b.Diameter > 0) {
		s.f.notes.add("no_diameter", s.rec.Line, "a size without a diameter is left out")
		return
	}
	out.Bins, out.Sizes = append(out.Bins, b), append(out.Sizes, s.rec.Cells[s.size])
}

// bySize sorts bins and sizes together.
type bySize struct{ *Sample }

func (s bySize) Len() int           { return len(s.Bins) }
func (s bySize) Less(i, j int) bool { return s.Bins[i].Diameter < s.Bins[j].Diameter }
func (s bySize) Swap(i, j int) {
	s.Bins[i], s.Bins[j] = s.Bins[j], s.Bins[i]
	s.Sizes[i], s.Sizes[j] = s.Sizes[j], s.Sizes[i]
}
