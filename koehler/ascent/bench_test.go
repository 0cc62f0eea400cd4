package ascent

import (
	"context"
	"fmt"
	"testing"

	"dropcrest/koehler/internal/computed"
)

// Aim: 4 ms for 200 bins in two modes to 300 m at a tolerance of 1e-5; time in
// proportion to the bins.
func BenchmarkAscent(b *testing.B) {
	for _, bins := range []int{30, 100, 200, 500, 2000} {
		b.Run(fmt.Sprintf("%dbins", 2*bins), func(b *testing.B) {
			p, o := continental(), Options{Bins: bins}
			b.ReportAllocs()
			steps := 0
			for b.Loop() {
				r, err := Run(context.Background(), p, o)
				if err != nil {
					b.Fatal(err)
				}
				steps = r.Steps + r.Rejected
			}
			b.ReportMetric(float64(steps), "steps")
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N*steps*2*bins), "ns/step/bin")
		})
	}
}

// Aim: no allocation in a step.
func BenchmarkStep(b *testing.B) {
	p, o, err := completed(continental(), Options{})
	if err != nil {
		b.Fatal(err)
	}
	s, start, err := newSystem(p, o, nil)
	if err != nil {
		b.Fatal(err)
	}
	r := &run{stepper: newStepper(s), opt: o}
	r.begin(start)
	b.ReportAllocs()
	for b.Loop() {
		r.differentiate(r.system, &r.from)
		if taken, _, err := r.step(1, mostGrowth); taken == 0 || err != nil {
			b.Fatal(taken, err)
		}
	}
}

// What a page needs while a key is held: the peak, the profile and the closed forms.
// Aim: well within a frame of 16 ms.
func BenchmarkHeldKey(b *testing.B) {
	p, o := continental(), Options{Bins: 100, ProfileRows: 60, Follow: []Tracer{{1, 3e-8}, {1, 1e-7}}}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := Run(context.Background(), p, o); err != nil {
			b.Fatal(err)
		}
		ClosedForms(p, o)
	}
}

// Aim: 10 s for 40 by 40 cells at 60 bins a mode on two cores, 6 ms a cell.
func BenchmarkSweep(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		s := &Sweep{X: Axis{Key: "updraft"}, Y: Axis{Key: "number"}}
		for i := range 8 {
			s.X.Values = append(s.X.Values, 0.05*float64(int(1)<<i))
			s.Y.Values = append(s.Y.Values, 50e6*float64(int(1)<<i))
		}
		if err := s.Run(context.Background(), 0, func(w, n float64) (Parcel, Options, error) {
			p := continental()
			p.Updraft = w
			scaleNumber(&p, n/p1500)
			return p, Options{Bins: 60}, nil
		}, nil); err != nil {
			b.Fatal(err)
		}
	}
	b.ReportMetric(b.Elapsed().Seconds()/float64(b.N)/64*1600, "s/map")
}

// The reference's own cases at 200 bins a mode, to be set against the timing in
// parcel.json (README 8). Aim: 100 times faster than BDF at the same tolerance.
func BenchmarkReference(b *testing.B) {
	for _, c := range computed.Read[computedCase](b, "parcel.json") {
		for _, tol := range []float64{1e-5, 1e-6} {
			b.Run(fmt.Sprintf("%s/%.0e", c.ID, tol), func(b *testing.B) {
				p, o := c.Input.parcel(), c.Input.options(b, 200, tol)
				for b.Loop() {
					if _, err := Run(context.Background(), p, o); err != nil {
						b.Fatal(err)
					}
				}
				for _, row := range c.Timing {
					if row.Method == "BDF" && row.Bins == 200 && row.Tolerance == 1e-6 {
						b.ReportMetric(row.CPU/(b.Elapsed().Seconds()/float64(b.N)), "times-BDF-1e-6")
					}
				}
			})
		}
	}
}

func BenchmarkClosedForms(b *testing.B) {
	p := continental()
	for m := Twomey1959; m <= FountoukisNenes05; m++ {
		b.Run(m.String(), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				if _, err := Closed(m, p, Options{}); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
