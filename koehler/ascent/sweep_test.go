package ascent

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"reflect"
	"strings"
	"testing"
)

func askContinental(w, number float64) (Parcel, Options, error) {
	p := continental()
	p.Updraft = w
	scaleNumber(&p, number/p1500)
	if number == 666e6 {
		return p, Options{}, errors.New("a number that nobody likes")
	}
	return p, Options{Bins: 20}, nil
}

const p1500 = 1500e6 // all particles of continental

func smallSweep() *Sweep {
	return &Sweep{X: Axis{"updraft", []float64{0.1, -1, 1, 3}}, Y: Axis{"number", []float64{200e6, 666e6, 2000e6}}}
}

func TestSweep(t *testing.T) {
	whole := smallSweep()
	last := 0
	if err := whole.Run(context.Background(), 1, askContinental, func(done, of int) error {
		if done != last+1 || of != 12 {
			t.Errorf("%d of %d after %d", done, of, last)
		}
		last = done
		return nil
	}); err != nil {
		t.Fatal(err)
	}
	for y := range 3 {
		for x := range 4 {
			c, ok := whole.At(x, y)
			switch {
			case !ok:
				t.Errorf("cell %d, %d is not finished", x, y)
			case y == 1:
				if c.Fault != "a number that nobody likes" {
					t.Errorf("cell %d, %d: %+v", x, y, c)
				}
			case x == 1:
				if !strings.Contains(c.Fault, "updraft") {
					t.Errorf("cell %d, %d: %+v", x, y, c)
				}
			case c.Fault != "" || !(c.Droplets > 0) || !(c.Droplets < c.Number):
				t.Errorf("cell %d, %d: %+v", x, y, c)
			}
		}
	}
	if _, ok := whole.At(4, 0); ok {
		t.Error("a cell beside the table")
	}
	many := smallSweep()
	if err := many.Run(context.Background(), 7, askContinental, nil); err != nil {
		t.Fatal(err)
	}
	if !reflect.DeepEqual(whole, many) {
		t.Error("other results on seven workers than on one")
	}
	resume(t, whole)
}

// resume stops a sweep after each number of cells, writes it away, reads it again and
// finishes it.
func resume(t *testing.T, whole *Sweep) {
	for stop := 1; stop < 12; stop += 3 {
		part := smallSweep()
		ctx, cancel := context.WithCancel(context.Background())
		err := part.Run(ctx, 3, askContinental, func(done, _ int) error {
			if done == stop {
				cancel()
			}
			return nil
		})
		if !errors.Is(err, context.Canceled) || part.Done() != stop {
			t.Fatalf("%d cells, %v, want %d and a cancelled context", part.Done(), err, stop)
		}
		text, err := json.Marshal(part)
		if err != nil {
			t.Fatal(err)
		}
		var again Sweep
		if err := json.Unmarshal(text, &again); err != nil {
			t.Fatal(err)
		}
		if err := again.Run(context.Background(), 0, askContinental, nil); err != nil {
			t.Fatal(err)
		}
		if !reflect.DeepEqual(whole, &again) {
			t.Errorf("stopped after %d: another result", stop)
		}
	}
}

func TestSweepChecks(t *testing.T) {
	for name, s := range map[string]*Sweep{
		"no values":      {X: Axis{"updraft", nil}, Y: Axis{"number", []float64{1}}},
		"too many cells": {X: Axis{"updraft", []float64{1}}, Y: Axis{"number", []float64{1}}, Cells: make([]Cell, 2)},
	} {
		if err := s.Run(context.Background(), 1, askContinental, nil); !errors.Is(err, ErrInput) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestEachStops(t *testing.T) {
	odd := errors.New("enough")
	for _, workers := range []int{1, 2, 9} {
		var got []int
		err := Each(context.Background(), 3, 1000, workers, func(_ context.Context, i int) int { return i * i },
			func(i, square int) error {
				if square != i*i {
					t.Errorf("%d at %d", square, i)
				}
				if got = append(got, i); len(got) == 5 {
					return odd
				}
				return nil
			})
		if err != odd || fmt.Sprint(got) != "[3 4 5 6 7]" {
			t.Errorf("%d workers: %v, %v", workers, got, err)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if err := Each(ctx, 0, 5, 2, func(context.Context, int) int { return 0 }, func(int, int) error { return nil }); !errors.Is(err, context.Canceled) {
		t.Errorf("cancelled: %v", err)
	}
	if err := Each(context.Background(), 5, 5, 2, func(context.Context, int) int { return 0 }, func(int, int) error { return odd }); err != nil {
		t.Errorf("nothing to do: %v", err)
	}
}
