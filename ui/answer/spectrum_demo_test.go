package answer

import (
	"context"
	"math"
	"os"
	"path/filepath"
	"strconv"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

func askedDemo(t testing.TB, values ...string) (Answer, SpectrumFacts) {
	t.Helper()
	a, err := askSpectrum(context.Background(), stationEnv(), scene(t, values...))
	if err != nil {
		t.Fatal(err)
	}
	return a, a.Facts.(SpectrumFacts)
}

// All records say the truth behind the demo within its noise: closure, κ, and what
// was left out.
func TestSpectrumOfDemo(t *testing.T) {
	_, f := askedDemo(t, "record=all")
	if f.Closure == nil || f.Closure.Pairs < 450 {
		t.Fatalf("closure %+v", f.Closure)
	}
	// Counts have some 0.5 % by counting, predictions 1 % by sizes and composition.
	for says, got := range map[string]float64{"median ratio": float64(f.Closure.Ratio.Median), "slope": float64(f.Closure.ThroughOrigin), "1 + bias": 1 + float64(f.Closure.MeanBias)} {
		if !(math.Abs(got-1) < 0.005) {
			t.Errorf("%s %g, want 1", says, got)
		}
	}
	if spread := float64(f.Closure.Ratio.P95 - f.Closure.Ratio.P05); !(spread > 0.01 && spread < 0.06) {
		t.Errorf("5 to 95 %% of the ratios span %g: the noise is about 1 %%", spread)
	}
	truth, mean := truthOfDemo(t), 0.0
	for _, r := range truth {
		mean += r.kappa / float64(len(truth))
	}
	for _, m := range f.Measured {
		if !(math.Abs(float64(m.Kappa)/mean-1) < 0.04) { // a median against a mean
			t.Errorf("κ by count at %g %% is %g, want about %g", m.Supersaturation, m.Kappa, mean)
		}
	}
	want := map[string]int{"missing in the data": 10, "below the limit of detection": 1} // testdata/demo/README.md
	for _, r := range f.Rejected {
		if r.Count != want[r.Reason] {
			t.Errorf("%d counts %s, want %d", r.Count, r.Reason, want[r.Reason])
		}
		delete(want, r.Reason)
	}
	if len(want) > 0 {
		t.Errorf("not said to be left out: %v", want)
	}
}

// Each record is closed, and its modes are recovered, within the noise.
func TestRecordsOfDemo(t *testing.T) {
	chi, n := 0.0, 0
	for i, truth := range truthOfDemo(t) {
		if i%12 != 3 {
			continue
		}
		a, f := askedDemo(t, "fit=erf2", "record="+shortest(float64(i+1)))
		if a.Record != i+1 || a.Records != 96 || f.Record.Start != clock(truth.start) {
			t.Fatalf("record %d of %d begins %s, want %d at %s", a.Record, a.Records, f.Record.Start, i+1, clock(truth.start))
		}
		if len(f.Modes) != 2 {
			t.Errorf("record %d: modes %+v", i+1, f.Modes)
			continue
		}
		for k, m := range f.Modes {
			for _, x := range []struct{ got, want, u Number }{
				{m.Count, Number(truth.modes[k].Concentration), m.CountUncertainty},
				{m.Median, Number(truth.modes[k].Median), m.MedianUncertainty},
				{m.GSD, Number(truth.modes[k].GSD), m.GSDUncertainty},
			} {
				n++
				chi += math.Pow(float64((x.got-x.want)/x.u), 2)
				if !(math.Abs(float64((x.got-x.want)/x.u)) < 4) {
					t.Errorf("record %d: mode %d has %g ± %g, the truth is %g", i+1, k+1, x.got, x.u, x.want)
				}
			}
		}
		for k, row := range f.Spectrum {
			if got := float64(row.Count); !(math.Abs(got/truth.ccn[k]-1) < 0.06) {
				t.Errorf("record %d at %g %%: predicted %g, the truth is %g", i+1, row.Supersaturation, got, truth.ccn[k])
			}
		}
	}
	if reduced := chi / float64(n); !(reduced > 0.2 && reduced < 3) {
		t.Errorf("modes differ from the truth by a reduced χ² of %.2f", reduced)
	}
}

// The record before and the next one, all of them, and another mixing are answers of
// the same form; nothing that limits them is left out.
func TestSpectrumOfDemoInOtherWords(t *testing.T) {
	for name, c := range map[string]struct {
		values []string
		says   string
	}{
		"no counts":      {[]string{"record=25"}, "5 counts (missing in the data)"},
		"no sizes":       {[]string{"record=69"}, "Nothing can be predicted: all sizes"},
		"external":       {[]string{"mixing=external"}, "The counts imply κ of"},
		"given":          {[]string{"composition=given", "water-activity=kappa", "kappa=0.3"}, "the prediction takes 0.300"},
		"given salt":     {[]string{"composition=given"}, "The counts imply κ of"},
		"spread":         {[]string{"kappa-spread=2"}, "normalised mean bias"},
		"below a limit":  {[]string{"record=55"}, "below the limit of detection"},
		"fit":            {[]string{"fit=cohard", "record=all"}, "form of Cohard et al. that fits"},
		"linear":         {[]string{"axes=linear"}, "activate at"},
		"averaged":       {[]string{"every=120 min"}, "activate at"},
		"beyond the end": {[]string{"supersaturation=0.005, 0.1, 5"}, "above the last bin limit"},
	} {
		t.Run(name, func(t *testing.T) {
			a, _ := askedDemo(t, c.values...)
			if all := strings.Join(append(a.Finding, a.Why...), " "); !strings.Contains(all, c.says) {
				t.Errorf("finding %q, want %q in it", a.Finding, c.says)
			}
		})
	}
}

// A count that was asked for between measured ones is interpolated, said to be, and
// no pair of the closure.
func TestSpectrumBetweenLevels(t *testing.T) {
	for _, record := range []string{"1", "all"} {
		_, usual := askedDemo(t, "record="+record)
		_, f := askedDemo(t, "record="+record, "supersaturation=0.05, 0.2, 0.7, 1.5")
		if f.Closure.AgreementFacts != usual.Closure.AgreementFacts || len(f.Measured) != 6 || len(f.Spectrum) != 4 {
			t.Errorf("record %s: %d measured, %d predicted, closure %+v, want %+v", record, len(f.Measured), len(f.Spectrum), f.Closure, usual.Closure)
		}
		m := f.Measured[4]
		if m.Supersaturation != 0.7 || m.Flag == nil || *m.Flag != "interpolated" || !(m.Count > f.Measured[3].Count && m.Count < f.Measured[5].Count) {
			t.Errorf("record %s: at 0.7 %%: %+v", record, m)
		}
		if !(math.Abs(float64(m.Ratio)-1) < 0.03) { // by the bend of the spectrum
			t.Errorf("record %s: predicted over interpolated is %g", record, m.Ratio)
		}
	}
}

// A file of bins gives the same spectrum whatever its numbers are called.
func TestSpectrumOfBinFiles(t *testing.T) {
	grid := inventedObservation(t, scene(t), 40, 0.3).sizes.Grid()
	bins := inventedModes().Bins(grid)
	dir := t.TempDir()
	var counts [][]SpectrumRow
	for name, of := range map[string]func(i int) float64{
		"dN/dlog10D (cm-3)": func(i int) float64 { return bins.Count(i) / grid.WidthLn(i) * math.Ln10 },
		"dN/dlnD (cm-3)":    func(i int) float64 { return bins.Count(i) / grid.WidthLn(i) },
		"dN (cm-3)":         bins.Count,
	} {
		text := "lower_diameter (nm),upper_diameter (nm)," + name + "\n"
		for i, e := range grid.Edges()[1:] {
			text += exact(grid.Edges()[i]*1e9) + "," + exact(e*1e9) + "," + exact(of(i)*1e-6) + "\n"
		}
		s := scene(t, "population=bins", "water-activity=kappa", "kappa=0.3")
		if strings.HasPrefix(name, "dN (") { // not guessed
			s.Map = []scenario.MapLine{{Text: "dN (cm-3)=dN"}}
		}
		s.Bins = filepath.Join(dir, "bins.csv")
		if err := os.WriteFile(s.Bins, []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
		a, err := askSpectrum(context.Background(), stationEnv(), s)
		if err != nil {
			t.Errorf("%s: %v", name, err)
			continue
		}
		counts = append(counts, a.Facts.(SpectrumFacts).Spectrum)
	}
	for _, other := range counts {
		for i, row := range other {
			if want := inventedModes().Above(float64(row.Critical)); !(math.Abs(float64(row.Count/counts[0][i].Count)-1) < 1e-9) || !(math.Abs(float64(row.Count)/want-1) < 0.01) {
				t.Errorf("at %g %%: %.12g, another form %.12g, the modes %.6g", row.Supersaturation, row.Count, counts[0][i].Count, want)
			}
		}
	}
}

func exact(x float64) string { return strconv.FormatFloat(x, 'g', -1, 64) }

// Stepping through the demo is done within a frame once it has been read.
func BenchmarkSpectrumOfDemo(b *testing.B) {
	env := stationEnv()
	env.Kept = &Kept{}
	for _, values := range [][]string{{"record=7"}, {"record=7", "kappa-spread=1.5"}, {"record=7", "fit=erf2"}, {"record=all"}} {
		b.Run(strings.Join(values, " "), func(b *testing.B) {
			s := scene(b, values...)
			b.ReportAllocs()
			for b.Loop() {
				if _, err := askSpectrum(context.Background(), env, s); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
