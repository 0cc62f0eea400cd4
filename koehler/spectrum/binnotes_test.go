package spectrum

import (
	"testing"

	"dropcrest/atmos/aerosol"
)

func TestBinNotes(t *testing.T) {
	edges := []float64{40e-9, 60e-9, 90e-9, 130e-9, 190e-9, 280e-9, 400e-9}
	g, err := aerosol.NewGrid(edges)
	if err != nil {
		t.Fatal(err)
	}
	b := invented().Bins(g)
	cuts := Cuts{Supersaturations: []float64{0.02, 0.01, 0.003, 0.0005, 0.0001}, Diameters: []float64{20e-9, 39e-9, 80e-9, 350e-9, 500e-9}}
	notes := BinNotes(b, cuts)
	want := []struct{ code, text string }{
		{"critical-size-below-bins", "At 1 to 2 % particles below the first bin limit of 40 nm activate too: the numbers are lower bounds."},
		{"critical-size-above-bins", "At 0.01 % only particles above the last bin limit of 400 nm activate: nothing there was measured."},
		{"count-misses-upper-tail", "At 0.05 % up to 44 % of the activated particles are probably wider than the last bin limit of 400 nm and not counted."},
	}
	if len(notes) != len(want) {
		t.Fatalf("%d notes, want %d: %+v", len(notes), len(want), notes)
	}
	for i, w := range want {
		if notes[i].Code != w.code || notes[i].Text != w.text || notes[i].Input != "bins" {
			t.Errorf("%+v, want %+v", notes[i], w)
		}
	}
	// 44 % is somewhat more than the truth, 38 %
	if truth := invented().Above(400e-9) / invented().Above(350e-9); truth < 0.37 || truth > 0.39 {
		t.Errorf("truth %.3f", truth)
	}
	if notes := BinNotes(b, Cuts{Supersaturations: cuts.Supersaturations[2:3], Diameters: cuts.Diameters[2:3]}); notes != nil {
		t.Errorf("nothing to say: %+v", notes)
	}
}
