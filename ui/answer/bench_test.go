package answer

import (
	"context"
	"testing"

	"dropcrest/solutes"
	"dropcrest/ui/figure"
)

// The question as the screen asks it at every key: answer, frame and picture.
func BenchmarkCurveAndPicture(b *testing.B) {
	for name, values := range map[string][]string{
		"ion interaction": nil,
		"kappa":           {"water-activity=kappa"},
		"mixture": {"component=ammonium sulfate share=0.5", "component=sodium chloride share=0.3",
			"component=sodium nitrate share=0.2"},
	} {
		b.Run(name, func(b *testing.B) {
			s := scene(b, values...)
			env := Env{Substances: solutes.Standard()}
			b.ReportAllocs()
			for b.Loop() {
				a, err := askCurve(context.Background(), env, s)
				if err != nil {
					b.Fatal(err)
				}
				fr, _ := figure.Fit(a.Figures[0], figure.Frame{}, 40)
				figure.Text(a.Figures[0], fr, 120, 40, figure.Style{})
			}
		})
	}
}

func BenchmarkAsk(b *testing.B) {
	s := scene(b)
	env := Env{Substances: solutes.Standard()}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := askCurve(context.Background(), env, s); err != nil {
			b.Fatal(err)
		}
	}
}
