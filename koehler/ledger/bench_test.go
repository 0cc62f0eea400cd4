package ledger

import (
	"context"
	"testing"
)

func BenchmarkLedger(b *testing.B) {
	for _, c := range []string{"ammonium sulfate", "sea salt", "adipic acid", "mineral dust"} {
		a := asked(b, c, 100e-9)
		a.Recipe.Temperature = 283.15 // so that the convention is another solution
		b.Run(c, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				l, err := Make(a)
				if err != nil {
					b.Fatal(err)
				}
				if _, err := NewBudget(&l, l.Inputs()); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}

func BenchmarkMonteCarlo100000(b *testing.B) {
	for _, c := range []string{"ammonium sulfate", "sea salt", "adipic acid", "mineral dust"} {
		l, err := Make(asked(b, c, 100e-9))
		if err != nil {
			b.Fatal(err)
		}
		budget, err := NewBudget(&l, l.Inputs())
		if err != nil {
			b.Fatal(err)
		}
		b.Run(c, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				budget.MonteCarlo(context.Background(), Settings{})
			}
		})
	}
}

func BenchmarkLedgerOfAFilm(b *testing.B) {
	a := filmOf(b, 0.5)
	b.ReportAllocs()
	for b.Loop() {
		l, err := Make(a)
		if err != nil {
			b.Fatal(err)
		}
		NewBudget(&l, l.Inputs())
	}
}
