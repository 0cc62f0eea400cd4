package screen

import (
	"strings"
	"testing"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/scenario"
)

// made changes a scenario as a person would: "component=..." rows and
// "input=value".
func made(t *testing.T, rows map[string][]string, values map[string]string) scenario.Scenario {
	t.Helper()
	s := scenario.Default()
	for key, texts := range rows {
		for i, text := range texts {
			if err := scenario.SetRow(&s, key, text, i == 0); err != nil {
				t.Fatalf("%s %s: %v", key, text, err)
			}
		}
	}
	for key, text := range values {
		in, ok := scenario.Find(&s, scenario.Path(key))
		if !ok {
			t.Fatalf("no input %q", key)
		}
		if err := in.Set(text); err != nil {
			t.Fatalf("%s: %v", key, err)
		}
	}
	return s
}

// Every kind of particle on the usual window, as a person sees it who does not
// know which models stand behind it.
func TestParticleScreens(t *testing.T) {
	type rows = map[string][]string
	type values = map[string]string
	film := rows{
		"component":   {"ammonium sulfate share=0.2", "pinic acid density=1200kg/m3 share=0.8"},
		"szyszkowski": {"gamma-max=3e-6mol/m2 k=20m3/mol floor=30mN/m"},
	}
	for name, c := range map[string]struct {
		rows   rows
		values values
	}{
		"salt_rising":        {nil, values{"relative-humidity": "60%"}},
		"salt_falling":       {nil, values{"relative-humidity": "60%", "humidity-history": "falling"}},
		"salt_mixture":       {rows{"component": {"ammonium sulfate share=0.5", "sodium chloride share=0.5"}}, values{"relative-humidity": "70%"}},
		"adipic_acid":        {rows{"component": {"adipic acid"}}, values{"water-activity": "kappa", "surface-tension": "72mN/m"}},
		"sparing_with_salt":  {rows{"component": {"succinic acid share=0.97", "ammonium sulfate share=0.03"}}, values{"water-activity": "kappa"}},
		"coated_soot":        {rows{"component": {"black carbon share=0.7", "ammonium sulfate share=0.3"}}, nil},
		"dust":               {rows{"component": {"illite"}}, values{"dry-diameter": "500nm"}},
		"coated_dust":        {rows{"component": {"illite share=0.9", "ammonium sulfate share=0.1"}}, values{"dry-diameter": "500nm"}},
		"film_partitioned":   {film, nil},
		"film_unpartitioned": {film, values{"partitioning": "off"}},
	} {
		t.Run(name, func(t *testing.T) {
			o := onTerminal("plain")
			o.Scenario = made(t, c.rows, c.values)
			golden.RequireEqual(t, []byte(opened(o, 80, 24).View()+"\n"))
		})
	}
}

// Adipic acid of 100 nm (κ 0.096, C 0.0183; Petters and Kreidenweis 2008) started
// dry and already dissolved: picture and words of the usual window hold both.
func TestBothWaysOfAdipicAcid(t *testing.T) {
	for name, c := range map[string]struct {
		values map[string]string
		says   []string
	}{
		"25 °C, 72 mN/m": {map[string]string{"surface-tension": "72mN/m"}, []string{"1.942 %", "0.375 %"}},
		"20 °C":          {map[string]string{"temperature": "20C"}, []string{"1.998 %", "0.390 %"}},
	} {
		c.values["water-activity"] = "kappa"
		o := onTerminal("plain")
		o.Scenario = made(t, map[string][]string{"component": {"adipic acid"}}, c.values)
		view := opened(o, 80, 24).View()
		for _, text := range c.says {
			if n := strings.Count(view, text); n != 2 {
				t.Errorf("%s: %s stands %d times on the screen, want it in the picture and in the finding:\n%s", name, text, n, view)
			}
		}
		if !strings.Contains(strings.Join(strings.Fields(view), " "), "the barrier is its dissolution at the dry surface") {
			t.Errorf("%s: the barrier is not named:\n%s", name, view)
		}
	}
}
