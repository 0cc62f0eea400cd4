package answer

import (
	"bytes"
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler/counter"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// Scans of an invented salt aerosol, charged as theory has it: with its size
// distribution the size that activates is recovered, and the share of doubly charged
// particles is that of the classifier at this size.
func TestSaltSizes(t *testing.T) {
	aerosols := aerosol.Modes{{Concentration: 1e10, Median: 60e-9, GSD: 1.7}}
	salt, _ := solutes.Standard().Find("ammonium sulfate")
	standard := counter.SaltStandard(salt, solutes.IonInteraction, 298.15, counter.Classifier{})
	rng := rand.New(rand.NewPCG(5, 5))
	var log bytes.Buffer
	log.WriteString("temperature difference (K),dry diameter (nm),cn counted,ccn counted\n")
	truth := map[float64]float64{4: 90e-9, 10: 45e-9}
	for _, dt := range []float64{4, 10} {
		for i := range 24 {
			d := truth[dt] * math.Exp(-0.7+1.2*float64(i)/23)
			fraction := 0.0
			for _, m := range (counter.Classifier{}).Multiples(nil, d, aerosols.Density) {
				fraction += m.Share * 0.5 * math.Erfc(-math.Log(m.Diameter/truth[dt])/0.05/math.Sqrt2)
			}
			const counts = 20000
			fmt.Fprintf(&log, "%g,%.4f,%.0f,%.0f\n", dt, d*1e9, distuv.Poisson{Lambda: counts, Src: rng}.Rand(), distuv.Poisson{Lambda: 1e-9 + counts*fraction, Src: rng}.Rand())
		}
	}
	var header, row []string
	for d := 8e-9; d < 900e-9; d *= 1.05 {
		header = append(header, fmt.Sprintf("%.5g", d*1e9))
		row = append(row, fmt.Sprintf("%.6g", aerosols.Density(d)*math.Ln10/1e6))
	}
	dir := t.TempDir()
	write := func(name, text string) string {
		file := filepath.Join(dir, name)
		if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
		return file
	}
	sizes := "diameter (nm),dN/dlogD (cm-3)\n"
	for i := range header {
		sizes += header[i] + "," + row[i] + "\n"
	}
	set := func(s *scenario.Scenario) {
		s.Scans, s.ScanSizes = []scenario.DataFile{{Name: write("scans.csv", log.String())}}, write("sizes.csv", sizes)
	}
	a, err := calibrate(t, set)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if len(f.Scans) != len(truth) {
		t.Fatalf("%d scans", len(f.Scans))
	}
	for _, s := range f.Scans {
		want := truth[math.Round(float64(s.TemperatureDifference))]
		if s.Fault != nil {
			t.Fatal(*s.Fault)
		}
		if d := float64(s.D50) - want; math.Abs(d) > 3.5*float64(s.D50Uncertainty) || float64(s.D50Uncertainty) > 0.01*want {
			t.Errorf("%v K: D50 %v ± %v, the truth is %v", s.TemperatureDifference, s.D50, s.D50Uncertainty, want)
		}
		share := standard.Air.Multiples(nil, want, aerosols.Density)[1].Share
		if math.Abs(float64(s.DoublyCharged)/share-1) > 0.03 {
			t.Errorf("%v K: %v doubly charged, theory says %v", s.TemperatureDifference, s.DoublyCharged, share)
		}
	}
	if paper := strings.Join(a.Paper, " "); !strings.Contains(paper, "multiply charged particles by the size distribution of ") {
		t.Errorf("the record does not say where the charges come from: %s", paper)
	}
	for name, want := range map[string]string{"none.csv": "no such file", write("empty.csv", ""): "empty"} {
		_, err := calibrate(t, func(s *scenario.Scenario) { s.ScanSizes = name })
		var in *InputError
		if !errors.As(err, &in) || in.Input != "scan-sizes" || !strings.Contains(err.Error(), want) {
			t.Errorf("%s: %v, want %q", name, err, want)
		}
	}
}
