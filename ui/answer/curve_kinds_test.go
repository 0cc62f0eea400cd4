package answer

import (
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/figure"
)

// adipicAcid is the example of limited solubility that the literature discusses.
var adipicAcid = []string{"dry-diameter=100nm", "component=adipic acid", "water-activity=kappa",
	"temperature=25C", "surface-tension=72mN/m"}

// Started dry and already dissolved stand side by side: in words, in the facts
// and as two crests of one picture, the frame of which holds both.
func TestTwoWaysOfAdipicAcid(t *testing.T) {
	for name, c := range map[string]struct {
		values         []string
		dry, dissolved float64 // %
		tol            float64 // half a unit of the last digit
	}{
		// κ 0.096 and C 0.0183 of the catalogue (Petters and Kreidenweis 2008); the values
		// follow from their equations: exp(a)/(1+κC) at the dry size, κ form when dissolved.
		"25 °C": {adipicAcid, 1.942, 0.375, 5e-4},
		// The same with the tension of water at 20 °C.
		"20 °C": {append(adipicAcid[:3:3], "temperature=20C"), 1.998, 0.390, 1e-3},
	} {
		t.Run(name, func(t *testing.T) {
			a := asked(t, c.values...)
			f := facts(t, a)
			if got := float64(f.CriticalSupersaturation); math.Abs(got-c.dry) > c.tol {
				t.Errorf("started dry %g %%, want %g", got, c.dry)
			}
			if f.AlreadyDissolved == nil || math.Abs(float64(f.AlreadyDissolved.CriticalSupersaturation)-c.dissolved) > c.tol {
				t.Errorf("already dissolved %v, want %g", f.AlreadyDissolved, c.dissolved)
			}
			if *f.BarrierKind != "boundary_maximum" || *f.BarrierPosition != "only" {
				t.Errorf("barrier %s, %s", *f.BarrierKind, *f.BarrierPosition)
			}
			pic := a.Figures[0]
			if len(pic.Lines) != 2 || !pic.Lines[1].Crest || pic.Lines[1].Letter != 0 || pic.Lines[1].Says != "already dissolved" {
				t.Fatalf("%d lines", len(pic.Lines))
			}
			fr, _ := CurveFrame(scene(t, c.values...), pic, figure.Frame{}, 13)
			crests := 0
			for _, m := range pic.Marks {
				if m.Kind == figure.CrestMark && fr.XMin <= m.X && m.X <= fr.XMax && fr.YMin <= m.Y && m.Y <= fr.YMax {
					crests++
				}
			}
			if crests != 2 {
				t.Errorf("%d crests in the frame %+v", crests, fr)
			}
		})
	}
}

// The finding names the barrier: where it lies and which of the maxima it is.
func TestBarrierIsNamed(t *testing.T) {
	acid := "component=kappa=0.2 solubility=0.01 share="
	salt := "component=kappa=0.61 share="
	for name, c := range map[string]struct {
		values []string
		kind   string
		place  string
		says   string
		others int // point marks of other maxima
	}{
		"boundary, only":  {adipicAcid, "boundary_maximum", "only", "the barrier is its dissolution at the dry surface", 0},
		"boundary, first": {[]string{"water-activity=kappa", acid + "1"}, "boundary_maximum", "first", "at the dry surface of 0.0500 µm radius, the first of two maxima", 1},
		"first":           {[]string{"water-activity=kappa", "dry-diameter=80nm", acid + "0.99", salt + "0.01"}, "maximum", "first", "the first of two maxima, with part of it undissolved", 1},
		"last":            {[]string{"water-activity=kappa", acid + "0.88", salt + "0.12"}, "maximum", "last", "the last of two maxima", 1},
		"only":            {nil, "maximum", "only", "where its wet radius is", 0},
	} {
		t.Run(name, func(t *testing.T) {
			a := asked(t, c.values...)
			f := facts(t, a)
			if *f.BarrierKind != c.kind || *f.BarrierPosition != c.place {
				t.Errorf("barrier %s, %s, want %s, %s: %+v", *f.BarrierKind, *f.BarrierPosition, c.kind, c.place, f.Extrema)
			}
			if !strings.Contains(a.Finding[0], c.says) {
				t.Errorf("%q does not say %q", a.Finding[0], c.says)
			}
			others := 0
			for _, m := range a.Figures[0].Marks {
				if m.Kind == figure.PointMark {
					others++
				}
			}
			if others != c.others {
				t.Errorf("%d other maxima are marked, want %d", others, c.others)
			}
		})
	}
}

// Every mark of the particle and of its twin lies on one of the two lines, and
// both lines run upwards in the radius.
func TestLinesOfTwinsContainTheirMarks(t *testing.T) {
	for name, values := range map[string][]string{
		"acid":      adipicAcid,
		"with salt": {"water-activity=kappa", "component=kappa=0.2 solubility=0.01 share=0.97", "component=kappa=0.61 share=0.03"},
	} {
		pic := asked(t, values...).Figures[0]
		for _, m := range pic.Marks {
			found := false
			for _, l := range pic.Lines {
				i, ok := slices.BinarySearch(l.X, m.X)
				found = found || ok && math.Abs(l.Y[i]-m.Y) <= 1e-6*math.Max(1e-3, math.Abs(m.Y))
			}
			if !found {
				t.Errorf("%s: mark %q is on no line", name, m.Text)
			}
		}
		for _, l := range pic.Lines {
			if !slices.IsSorted(l.X) {
				t.Errorf("%s: %q turns back", name, l.Says)
			}
		}
	}
}

// A held curve keeps the barrier and not the twin.
func TestHeldTwin(t *testing.T) {
	a := asked(t, adipicAcid...)
	_, marks := HeldLine('A', a)
	if len(marks) != 1 || marks[0].Text != percent(float64(facts(t, a).CriticalSupersaturation)/100) {
		t.Errorf("held marks %v", marks)
	}
}

// The state of a crystal or a drop on another line bends no curve: without a
// turning point beside the crest the frame stays near it.
func TestOtherStatesBendNoLine(t *testing.T) {
	for _, history := range []string{"rising", "falling"} {
		a := asked(t, "relative-humidity=60%", "humidity-history="+history)
		fr, _ := CurveFrame(scene(t), a.Figures[0], figure.Frame{}, 13)
		if fr.YMin < -1 {
			t.Errorf("%s humidity: the frame goes down to %g %%", history, fr.YMin)
		}
	}
}

// Where a mixture is said to be a drop although nobody knows whether it has
// dissolved, the finding says so; a mixture far above every deliquescence is one.
func TestUnknownPhaseIsSaid(t *testing.T) {
	mixed := []string{"component=ammonium sulfate share=0.5", "component=sodium chloride share=0.5"}
	for humidity, want := range map[string]bool{"75%": true, "40%": true, "95%": false} {
		all := strings.Join(asked(t, append(mixed[:2:2], "relative-humidity="+humidity)...).Finding, " ")
		if got := strings.Contains(all, "if it is dissolved"); got != want {
			t.Errorf("at %s the finding says %q", humidity, all)
		}
	}
	if all := strings.Join(asked(t, "component=glucose", "relative-humidity=60%").Finding, " "); strings.Contains(all, "if it is") {
		t.Errorf("of a sugar that never crystallises: %q", all)
	}
}

// What stands behind the finding names the model that was used, and no other.
func TestWhyNamesTheModel(t *testing.T) {
	sulfate, organic := "component=ammonium sulfate share=0.2", "component=pinic acid density=1200kg/m3 share=0.8"
	film := "szyszkowski=gamma-max=3e-6mol/m2 k=20m3/mol"
	for name, c := range map[string]struct {
		values     []string
		says, hush string
	}{
		"sparing":       {adipicAcid, "adipic acid (C 0.0183) is wholly dissolved from 3.82 times the dry diameter on", "Adsorption"},
		"film":          {[]string{sulfate, organic, film}, "missing in the bulk", "Surface tension: pure water"},
		"whole film":    {[]string{sulfate, organic, film, "partitioning=off"}, "counts it twice", "missing in the bulk"},
		"dust":          {[]string{"component=illite"}, "θ^(-B_F)", "soluble share ε"},
		"coated dust":   {[]string{"component=illite share=0.9", "component=ammonium sulfate share=0.1"}, "ln(1 + ε κ", "ion interaction (Pitzer"},
		"the old form":  {[]string{"component=illite share=0.9", "component=ammonium sulfate share=0.1", "adsorption=A=1 B=1.1 form=exponential"}, "less ε κ Dd³/(D³", "ln(1 + ε κ"},
		"salt":          {nil, "at 79.89 % over a flat surface and at 81.02 % over this particle", "Film:"},
		"given tension": {[]string{"surface-tension=60mN/m"}, "as very dilute, its surface tension as that of pure water and", "NaN"},
		"water's":       {nil, "as very dilute and exp(x)", "as that of pure water"},
		"κ unused":      {nil, "mixed by volume, is 0.610; it stands here for comparison", "NaN"},
		"κ used":        {[]string{"water-activity=kappa"}, "mixed by volume, is 0.610.", "for comparison"},
		"classifier":    {[]string{"dry-size-is=mobility", "shape-factor=1.1", "temperature=10C"}, "at 1013.25 hPa and 10 °C", "NaN"},
		"cold, pressed": {[]string{"kelvin=compressible", "temperature=-35C"}, "isothermal compressibility of water is extrapolated: Kell 1975 holds from -30 °C", "NaN"},
		"cold":          {[]string{"temperature=-35C"}, "surface tension of water is extrapolated", "compressib"},
		"Tolman":        {[]string{"tolman=0.1nm"}, "Tolman's length δ of 0.1 nm", "Film:"},
	} {
		why := strings.Join(asked(t, c.values...).Why, "\n")
		if !strings.Contains(why, c.says) || strings.Contains(why, c.hush) {
			t.Errorf("%s: want %q and not %q in\n%s", name, c.says, c.hush, why)
		}
	}
}
