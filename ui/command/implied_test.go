package command

import (
	"strings"
	"testing"
)

func TestImplied(t *testing.T) {
	const mode = "N=1/cm3 Dg=45nm gsd=1.6"
	for _, c := range []struct {
		name string
		args []string
		want string // population and model, or the error
	}{
		{"nothing", nil, "data ion-interaction"},
		{"mode", []string{"--mode", mode}, "modes ion-interaction"},
		{"bins", []string{"--bins", "a.csv", "--kappa", "0.3"}, "bins kappa"},
		{"data", []string{"--data", "a.csv"}, "data ion-interaction"},
		{"both say the same", []string{"--population", "modes", "--mode", mode}, "modes ion-interaction"},
		{"population alone", []string{"--population", "bins"}, "bins ion-interaction"},
		{"model given", []string{"--kappa", "0.3", "--water-activity", "ion-interaction"}, "data ion-interaction"},
		{"kappa of the catalogue", []string{"--kappa", "catalogue"}, "data ion-interaction"},
		{"contradiction", []string{"--population", "data", "--mode", mode}, "--population data and --mode contradict each other: want --population modes, or no --mode"},
		{"two populations", []string{"--data", "a.csv", "--bins", "b.csv"}, "--bins and --data contradict each other"},
	} {
		o := newOptions(newRoot(world{env: func(string) string { return "" }}))
		o.question = campaign{}.question()
		for i := 0; i < len(c.args); i += 2 {
			o.given = append(o.given, setting{strings.TrimPrefix(c.args[i], "--"), c.args[i+1]})
		}
		o.env = func(string) string { return "" }
		s, _, err := o.scenario(world{})
		got := s.Population + " " + s.WaterActivity
		if err != nil {
			got = err.Error()
		}
		if !strings.HasPrefix(got, c.want) {
			t.Errorf("%s: %s, want %s", c.name, got, c.want)
		}
	}
}

func TestParts(t *testing.T) {
	for _, c := range []struct {
		args []string
		code int
		says string
	}{
		{[]string{"--as", "csv", "--table", "spectrum"}, done, ""},
		{[]string{"--as", "csv", "--record", "all", "--table", "spectrum"}, done, ""},
		{[]string{"--as", "csv", "--table", "sizes"}, misuse, `--table: this answer has no table "sizes": want spectrum`},
		{[]string{"--as", "json", "--table", "spectrum"}, misuse, "--table and --as json contradict each other"},
		{[]string{"--as", "svg", "--picture", "spectrum"}, failed, "this answer has no picture"},
		{[]string{"--as", "csv", "--picture", "spectrum"}, misuse, "--picture and --as csv contradict each other"},
		{[]string{"--out", "a.jpg"}, misuse, "want one of .txt, .csv, .json, .jsonl, .ict, .svg"},
	} {
		code, out, messages := campaign{records: 2, stop: -1}.command(world{}, c.args...)
		if code != c.code || !strings.Contains(messages, c.says) {
			t.Errorf("%q: exit %d, %q, want %d, %q", c.args, code, messages, c.code, c.says)
		}
		if code == done && out != "supersaturation_percent\r\n0.1\r\n" {
			t.Errorf("%q: %q", c.args, out)
		}
	}
}
