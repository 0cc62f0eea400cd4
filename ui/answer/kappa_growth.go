package answer

import (
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"dropcrest/atmos"
	"dropcrest/koehler/kappa"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// growthSpread is how growth factors, and with them κ, spread between particles.
type growthSpread struct {
	bins    []kappa.Bin // of κ
	moments kappa.Moments
}

// GrowthSpreadRow is the distribution of κ in numbers.
type GrowthSpreadRow struct {
	Mean      Number `json:"mean"`
	Deviation Number `json:"standard_deviation"`
	Median    Number `json:"median"`
	Low       Number `json:"p16"`
	High      Number `json:"p84"`
}

// readGrowthFactors turns a file of growth factors into a distribution of κ. The
// mean of the file becomes the growth factor of the first measurement.
func (k *implied) readGrowthFactors(env Env) error {
	if k.asked.GrowthFactors == "" || k.asked.PointsFile != "" {
		return nil
	}
	first := &k.points[0]
	if !first.Growth.Known() {
		return &InputError{"growth-factors", "the first measurement is one of activation: want its relative-humidity in place of a supersaturation"}
	}
	bins, err := readGrowthBins(env, k.asked)
	if err != nil {
		return err
	}
	first.measured = first.asMeasured(k.asked)
	out, err := kappa.GrowthDistribution(first.volumeDiameter(), first.Humidity.Value, bins, first.water)
	if err != nil {
		return &InputError{"growth-factors", reason(err)}
	}
	k.spread = &growthSpread{out, kappa.Describe(out)}
	first.Growth.Value = meanOf(bins)
	k.notes = append(k.notes, atmos.Note{Code: "growth-of-file", Input: "growth-factors",
		Text: fmt.Sprintf("The growth factor of the first measurement is the mean of %s, %s.", plain.Clean(k.asked.GrowthFactors), digits(first.Growth.Value, 4))})
	return nil
}

// meanOf is the mean of bins whose shares need not add up to 1.
func meanOf(bins []kappa.Bin) float64 {
	sum, total := 0.0, 0.0
	for _, b := range bins {
		sum, total = sum+b.Share*(b.Low+b.High)/2, total+b.Share
	}
	return sum / total
}

// readGrowthBins reads growth factors and their shares.
func readGrowthBins(env Env, s scenario.Scenario) ([]kappa.Bin, error) {
	f := &pointsFile{name: plain.Clean(s.GrowthFactors), asked: s}
	if err := f.open(env, "growth-factors", s.GrowthFactors, ""); err != nil {
		return nil, err
	}
	names, err := f.next()
	if err != nil {
		return nil, f.wrong(1, 0, "no header", "growth_factor,share")
	}
	low, high, share := growthColumns(names)
	if low < 0 || share < 0 {
		return nil, f.wrong(f.line(), 0, "no growth factors and shares", "columns growth_factor and share, or growth_factor_low, growth_factor_high and share")
	}
	f.columns = make([]pointColumn, len(names))
	var bins []kappa.Bin
	for {
		cells, err := f.next()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, err
		}
		var row [3]float64
		for i, column := range []int{low, max(low, high), share} {
			row[i], err = strconv.ParseFloat(strings.TrimSpace(cells[column]), 64)
			if err != nil || math.IsNaN(row[i]) || math.IsInf(row[i], 0) || row[i] < 0 {
				return nil, f.wrongCell(column, fmt.Sprintf("%q is no number that can be used", plain.Clean(cells[column])), "a number, 0 or more")
			}
		}
		if bins = append(bins, kappa.Bin{Low: row[0], High: row[1], Share: row[2]}); len(bins) > mostPoints {
			return nil, f.wrong(0, 0, fmt.Sprintf("more than %d growth factors", mostPoints), "a smaller file")
		}
	}
	if high < 0 {
		return f.aroundMiddles(bins)
	}
	return bins, nil
}

// growthColumns finds the columns by their names; high is -1 where growth factors
// are those of the middles.
func growthColumns(names []string) (low, high, share int) {
	find := func(any ...string) int {
		return slices.IndexFunc(names, func(name string) bool {
			words := strings.FieldsFunc(strings.ToLower(name), func(r rune) bool { return r == '_' || r == ' ' })
			return slices.ContainsFunc(any, func(w string) bool { return slices.Contains(words, w) })
		})
	}
	share = find("share", "fraction", "probability", "counts", "number")
	if low, high = find("low", "lower"), find("high", "upper"); low >= 0 && high >= 0 {
		return low, high, share
	}
	return find("growth", "gf"), -1, share
}

// aroundMiddles gives growth factors the limits half-way to their neighbours.
func (f *pointsFile) aroundMiddles(middles []kappa.Bin) ([]kappa.Bin, error) {
	n := len(middles)
	if n < 2 {
		return nil, f.wrong(0, 0, "fewer than two growth factors", "a distribution")
	}
	bins := slices.Clone(middles)
	for i := range bins {
		before, after := max(i-1, 0), min(i+1, n-1)
		down, up := middles[i].Low-middles[before].Low, middles[after].Low-middles[i].Low
		if i == 0 {
			down = up
		}
		if i == n-1 {
			up = down
		}
		if !(down > 0 && up > 0) {
			return nil, f.wrong(0, 0, "growth factors that do not rise", "each above the one before")
		}
		bins[i].Low, bins[i].High = middles[i].Low-down/2, middles[i].Low+up/2
	}
	return bins, nil
}

func (g *growthSpread) row() *GrowthSpreadRow {
	if g == nil {
		return nil
	}
	m := g.moments
	return &GrowthSpreadRow{Number(m.Mean), Number(m.StandardDeviation), Number(m.Median), Number(m.Low), Number(m.High)}
}

func (g *growthSpread) words() string {
	m := g.moments
	return fmt.Sprintf("Over the particles κ is %s on average and %s to %s for the middle 68 %% of them.", digits3(m.Mean), digits3(m.Low), digits3(m.High))
}

func (g *growthSpread) table() Table {
	t := Table{Key: "growth", Title: "Particles by their κ from growth", Columns: []Column{
		{"kappa_low", "κ from"}, {"kappa_high", "κ to"}, {"share", "share"}, {"share_per_kappa", "share per unit of κ"},
	}}
	for _, b := range g.bins {
		t.Rows = append(t.Rows, []any{cell(b.Low), cell(b.High), cell(b.Share), cell(b.Density())})
	}
	return t
}
