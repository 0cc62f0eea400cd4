package answer

import (
	"bytes"
	"fmt"
	"math"
	"math/rand/v2"
	"regexp"
	"strings"
	"testing"

	"gonum.org/v1/gonum/stat/distuv"

	"dropcrest/koehler/counter"
	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// The salt scans of the demo station are invented. The truth behind them: the
// supersaturation of the counter, its width, its efficiency, and the share of
// doubly charged particles.
const (
	demoSlope     = 0.064 // % per K
	demoIntercept = -0.052
	demoWidth     = 0.05 // standard deviation in ln D
	demoPlateau   = 0.97
	demoDouble    = 0.06
	demoCounts    = 1500 // particles at each size
)

var demoDifferences = []float64{3, 5, 8, 12, 17}

// demoLog writes the invented log: ammonium sulfate, 22 sizes around the one that
// activates half, counts with the noise of Poisson.
func demoLog(t testing.TB) []byte {
	t.Helper()
	rng := rand.New(rand.NewPCG(2026, 314))
	salt, ok := solutes.Standard().Find("ammonium sulfate")
	if !ok {
		t.Fatal("no ammonium sulfate")
	}
	standard := counter.SaltStandard(salt, solutes.IonInteraction, 298.15, counter.Classifier{})
	standard.ShapeFactor = 1
	var b bytes.Buffer
	b.WriteString("time,salt,temperature difference (K),dry diameter (nm),cn counted,ccn counted\n")
	second := 0
	for _, dt := range demoDifferences {
		d50 := demoSize(t, standard, (demoSlope*dt+demoIntercept)/100)
		for i := range 22 {
			d := d50 * math.Exp(-0.62+1.1*float64(i)/21)
			half := counter.EqualMobility(d, 2, 296.15, 101325)
			step := func(d float64) float64 { return 0.5 * math.Erfc(-math.Log(d/d50)/demoWidth/math.Sqrt2) }
			fraction := demoPlateau * ((1-demoDouble)*step(d) + demoDouble*step(half))
			cn := distuv.Poisson{Lambda: demoCounts, Src: rng}.Rand()
			ccn := distuv.Poisson{Lambda: demoCounts * fraction, Src: rng}.Rand()
			noise := 0.01 * distuv.Normal{Sigma: 1, Src: rng}.Rand()
			fmt.Fprintf(&b, "2026-03-13T%02d:%02d:%02dZ,ammonium sulfate,%.3f,%.2f,%.0f,%.0f\n",
				9+second/3600, second/60%60, second%60, dt+noise, d*1e9, cn, ccn)
			second += 30
		}
		second += 300 // the column settles
	}
	return b.Bytes()
}

// demoSize is the mobility diameter that activates at a supersaturation.
func demoSize(t testing.TB, s counter.Standard, want float64) float64 {
	low, high := 10e-9, 400e-9
	for range 60 {
		mid := math.Sqrt(low * high)
		got, err := s.Supersaturation(mid)
		if err != nil {
			t.Fatal(err)
		}
		if got > want {
			low = mid
		} else {
			high = mid
		}
	}
	return math.Sqrt(low * high)
}

// The file of the demo is what the program above writes. To write it anew:
// DROPCREST_WRITE_DEMO=1 go test -run TestDemoScans ./ui/answer
func TestDemoScans(t *testing.T) { isInDemo(t, demoScans, demoLog(t)) }

// The truth behind the demo is recovered within its noise.
func TestDemoCalibration(t *testing.T) {
	a, err := calibrate(t, nil)
	if err != nil {
		t.Fatal(err)
	}
	f := counterFacts(t, a)
	if f.Line == nil || len(f.Scans) != len(demoDifferences) {
		t.Fatalf("line %v, %d scans", f.Line, len(f.Scans))
	}
	us := math.Sqrt(float64(f.Line.Covariance[1][1]))
	ui := math.Sqrt(float64(f.Line.Covariance[0][0]))
	const sigmas = 3
	if d := float64(f.Line.Slope) - demoSlope; math.Abs(d) > sigmas*us {
		t.Errorf("slope %v ± %.2g, the truth is %v", f.Line.Slope, us, demoSlope)
	}
	if d := float64(f.Line.Intercept) - demoIntercept; math.Abs(d) > sigmas*ui {
		t.Errorf("intercept %v ± %.2g, the truth is %v", f.Line.Intercept, ui, demoIntercept)
	}
	if us > 0.01*demoSlope {
		t.Errorf("the slope is known to %.2g of %.2g only: the check says nothing", us, demoSlope)
	}
	for i, s := range f.Scans {
		if math.Abs(float64(s.Plateau)-demoPlateau) > 0.05 || math.Abs(float64(s.DoublyCharged)-demoDouble) > 0.03 {
			t.Errorf("scan %d: plateau %v, doubly charged %v; the truth is %v and %v", i, s.Plateau, s.DoublyCharged, demoPlateau, demoDouble)
		}
		if len(s.Choices) < 2 {
			t.Errorf("scan %d: no other models", i)
		}
	}
	all := strings.Join(a.Finding, " ")
	if !regexp.MustCompile(`S = \(0\.06[34]\d* ± `).MatchString(all) || !strings.Contains(all, "water-activity model is worth") {
		t.Errorf("finding %q", all)
	}
}

// Every form of the curve finds about the same line; the two-step one lies closest.
func TestActivationCurves(t *testing.T) {
	for _, curve := range []string{"two-step", "gaussian", "sigmoid"} {
		a, err := calibrate(t, func(s *scenario.Scenario) { s.Activation = curve })
		if err != nil {
			t.Fatal(err)
		}
		f := counterFacts(t, a)
		if f.Line == nil {
			t.Fatalf("%s: no line: %v", curve, *f.Fault)
		}
		at10 := float64(f.Line.Slope)*10 + float64(f.Line.Intercept)
		if want := demoSlope*10 + demoIntercept; math.Abs(at10/want-1) > 0.015 {
			t.Errorf("%s: %v %% at 10 K, want %v", curve, at10, want)
		}
	}
}
