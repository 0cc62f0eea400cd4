package spectrum

import (
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/solutes"
)

func hundred() []float64 {
	s := make([]float64, 100)
	for i := range s {
		s[i] = 0.0005 * math.Pow(40, float64(i)/99)
	}
	return s
}

// Aim: 150 µs, each mode with a κ of its own.
func BenchmarkFourModesHundredSupersaturations(b *testing.B) {
	var p Population
	for i, m := range append(invented(), invented()...) {
		p = append(p, Group{m, 1, Kappa{0.1 + 0.2*float64(i), kelvin}})
	}
	s, dst := hundred(), make([]float64, 0, 100)
	b.ReportAllocs()
	for b.Loop() {
		if _, err := p.Counts(dst, s); err != nil {
			b.Fatal(err)
		}
	}
}

// Aim: 12 µs for the bins and the looks-up at critical diameters that are held.
func BenchmarkHundredBinsBuildAndLookUp(b *testing.B) {
	bins := inventedBins(b, 100)
	values := bins.Values(nil, aerosol.PerLog10)
	cuts, err := NewCuts(Kappa{0.3, kelvin}, hundred())
	if err != nil {
		b.Fatal(err)
	}
	dst := make([]float64, 100)
	b.ReportAllocs()
	for b.Loop() {
		grid, err := aerosol.NewGrid(bins.Grid().Edges())
		if err != nil {
			b.Fatal(err)
		}
		again, err := aerosol.NewBins(grid, values, aerosol.PerLog10)
		if err != nil {
			b.Fatal(err)
		}
		cuts.AddCounts(dst, again, 1)
	}
}

// One record of a campaign: 100 bins, 8 supersaturations, κ of its own, closure.
func BenchmarkRecord(b *testing.B) {
	bins := inventedBins(b, 100)
	values := bins.Values(nil, aerosol.PerLog10)
	s := hundred()[:96:96]
	eight := []float64{s[5], s[15], s[25], s[35], s[45], s[55], s[65], s[75]}
	dst := make([]float64, 0, 8)
	var c Closures
	b.ReportAllocs()
	for b.Loop() {
		if err := bins.Set(values, aerosol.PerLog10); err != nil {
			b.Fatal(err)
		}
		n, err := Population{{bins, 1, Kappa{0.3, kelvin}}}.Counts(dst, eight)
		if err != nil {
			b.Fatal(err)
		}
		for i, x := range n {
			c.Add(eight[i], x, 1.1*x)
		}
	}
}

func BenchmarkSpread(b *testing.B) {
	k := Spread{0.3, 1.3, kelvin}
	for name, sizes := range map[string]Sizes{"mode": invented()[0], "bins": inventedBins(b, 100)} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := (Population{{sizes, 1, k}}).Count(0.003); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkMatter(b *testing.B) {
	m := &Matter{koehler.Particle{DryDiameter: 1e-7, Temperature: 298.15, Solution: solutes.IdealOsmotic(0.6)}}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := (Population{{invented(), 1, m}}).Count(0.003); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkFits(b *testing.B) {
	points := pointsOf(ErrorFunctions{{5e8, 0.0016, 0.8}, {9e8, 0.0075, 1.1}}, 0.0005, 0.02, 10, 0.05)
	for name, fit := range map[string]func() (Fitted, error){
		"power":  func() (Fitted, error) { return FitPower(points) },
		"cohard": func() (Fitted, error) { return FitCohard(points) },
		"erf":    func() (Fitted, error) { return FitErrorFunctions(points, 1, 0) },
		"erf2":   func() (Fitted, error) { return FitErrorFunctions(points, 2, 0) },
	} {
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := fit(); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkKappaOfCount(b *testing.B) {
	bins := inventedBins(b, 100)
	b.ReportAllocs()
	for b.Loop() {
		if _, err := KappaOfCount(bins, 4e8, 0.003, kelvin); err != nil {
			b.Fatal(err)
		}
	}
}
