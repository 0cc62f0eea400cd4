package answer

import (
	"context"
	"errors"
	"math"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// What cannot rise names the input that is wrong.
func TestAscentErrors(t *testing.T) {
	for name, c := range map[string]struct {
		values      []string
		input, says string
	}{
		"no updraft":     {[]string{"population=modes", "updraft=0"}, "updraft", "an updraft of 0 does not rise"},
		"all records":    {[]string{"record=all"}, "record", "give its number"},
		"no such record": {[]string{"record=100000"}, "record", "no record 100000"},
		"no bins":        {[]string{"population=bins"}, "bins", "no file of bins"},
		"spread of salt": {[]string{"population=modes", "kappa-spread=1.5"}, "kappa-spread", "water activity by kappa only"},
		"kink":           {[]string{"population=modes", "water-activity=kappa", "component=ammonium sulfate", "component=succinic acid"}, "mode", "mode 1: the particle must have a smooth equilibrium curve"},
		"what is right":  {[]string{"population=modes", "water-activity=kappa", "component=ammonium sulfate", "component=succinic acid"}, "mode", "want solubility complete"},
		"no mode":        {[]string{"population=modes", "water-activity=kappa", "sweep=updraft=1..2m/s:2 mode[5].Dg=50..80nm:2"}, "sweep", "no mode[5].Dg"},
		"no cases":       {[]string{"cases=nowhere.csv"}, "cases", "nowhere.csv"},
		"no component":   {[]string{"population=modes", "water-activity=kappa", "component=density=1.5g/cm3"}, "component", "mode 1"},
	} {
		_, err := askAscent(context.Background(), stationEnv(), scene(t, c.values...))
		var in *InputError
		if !errors.As(err, &in) || in.Input != c.input || !strings.Contains(in.Text, c.says) {
			t.Errorf("%s: %v, want one of %s that says %q", name, err, c.input, c.says)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := askAscent(ctx, stationEnv(), scenario.Default()); !errors.Is(err, context.Canceled) {
		t.Errorf("stopped: %v", err)
	}
}

// What limits an answer is said.
func TestAscentLimitsAreSaid(t *testing.T) {
	for name, c := range map[string]struct {
		values        []string
		code, finding string
	}{
		"no peak":    {[]string{"height=50m"}, "no-peak", "still rises at 50.0 m"},
		"cold":       {[]string{"temperature=-35C"}, "surface-tension-extrapolated", "extrapolated"},
		"giant ones": {[]string{"updraft=0.02m/s"}, "", "have grown past their critical size"},
	} {
		a, _ := rises(t, modesOfKappa(t, c.values...))
		if says := strings.Join(a.Finding, " "); c.code != "" && !slices.Contains(codes(a), c.code) || !strings.Contains(says, c.finding) {
			t.Errorf("%s: notes %q, finding %q", name, codes(a), says)
		}
		explained(t, a)
	}
}

// What endless bins would give is close to what 200 give, and is said.
func TestAscentRefinement(t *testing.T) {
	s := modesOfKappa(t, "refinement=on")
	a, err := askAscent(context.Background(), Env{}, s)
	if err != nil {
		t.Fatal(err)
	}
	f, ok := a.Facts.(AscentFacts)
	if !ok || f.Refinement == nil {
		t.Fatalf("facts %T without a refinement", a.Facts)
	}
	if e := math.Abs(float64(f.Refinement.PeakError)); e == 0 || e > 1e-3 {
		t.Errorf("the peak is %v from that of endless bins, want some 1e-5", f.Refinement.PeakError)
	}
	if !slices.Contains(codes(a), "discretisation") {
		t.Errorf("notes %q", codes(a))
	}
}
