package answer

import (
	"context"
	"encoding/json"
	"errors"
	"math"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"dropcrest/koehler/ascent"
	"dropcrest/ui/scenario"
)

const smallSweep = "sweep=updraft=0.2..2m/s:3:log number=200..5000/cm3:4:log"

// A cell is the ascent at its two values, and no other cell changes it.
func TestSweepCells(t *testing.T) {
	for name, sweep := range map[string]string{
		"number":   smallSweep,
		"inputs":   "sweep=temperature=0..20C:2 mode[0].Dg=40..80nm:2:log",
		"shares":   "sweep=mode[1].kappa=0.1..0.6:2 start-humidity=90..99%:2",
		"pressure": "sweep=number=500..2000/cm3:2 pressure=700..950hPa:2",
	} {
		t.Run(name, func(t *testing.T) {
			s := modesOfKappa(t, sweep)
			_, f := rises(t, s)
			axes, err := scenario.ParseSweep(s.Sweep)
			if err != nil {
				t.Fatal(err)
			}
			nx, ny := len(axes[0].Values), len(axes[1].Values)
			if len(f.Sweep.Cells) != nx*ny {
				t.Fatalf("%d cells, want %d", len(f.Sweep.Cells), nx*ny)
			}
			for i, c := range f.Sweep.Cells {
				one := s.Clone()
				one.Sweep = ""
				for k, x := range []float64{axes[0].Values[i%nx], axes[1].Values[i/nx]} {
					if axes[k].Path != scenario.NumberOfAll {
						if err := axes[k].Set(&one, x); err != nil {
							t.Fatal(err)
						}
						continue
					}
					for m := range one.Modes {
						one.Modes[m].Number = x * s.Modes[m].Number / 1250e6
					}
				}
				_, want := rises(t, one)
				if !(math.Abs(float64(c.Droplets/want.Droplets)-1) < 1e-4) || !(math.Abs(float64(c.Peak/want.Peak)-1) < 1e-4) { // of the tolerance
					t.Errorf("cell %d: %g droplets at %g %%, asked alone %g at %g %%", i, c.Droplets, c.Peak, want.Droplets, want.Peak)
				}
			}
		})
	}
}

// The numbers of measured sizes are scaled likewise.
func TestSweepOfDemo(t *testing.T) {
	_, f := rises(t, scene(t, "ascent-bins=30", "sweep=updraft=0.2..2m/s:2:log number=200..5000/cm3:2:log"))
	c := f.Sweep.Cells
	// Few particles leave a high peak; more of them make more droplets of a smaller share.
	if !(c[2].Peak < c[0].Peak && c[1].Peak > c[0].Peak && c[1].Droplets > c[0].Droplets && c[2].Droplets > c[0].Droplets && c[2].Droplets/5000 < c[0].Droplets/200) {
		t.Errorf("cells %+v", c)
	}
}

// A sweep that was stopped goes on where it was, also in another session.
func TestSweepGoesOn(t *testing.T) {
	s := modesOfKappa(t, smallSweep)
	_, whole := rises(t, s)
	saved := map[string][]byte{}
	env := stationEnv()
	env.Load = func(key string) []byte { return saved[key] }
	env.Save = func(key string, data []byte) error { saved[key] = data; return nil }
	ctx, cancel := context.WithCancel(context.Background())
	env.Progress = func(done, total int64) {
		if total == 12 && done == 5 {
			cancel()
		}
	}
	if _, err := askAscent(ctx, env, s); !errors.Is(err, context.Canceled) {
		t.Fatalf("stopped: %v", err)
	}
	var kept ascent.Sweep
	for _, data := range saved {
		if err := json.Unmarshal(data, &kept); err != nil {
			t.Fatal(err)
		}
	}
	if len(saved) != 1 || kept.Done() < 5 || kept.Done() > 8 {
		t.Fatalf("%d sweeps are kept, with %d cells", len(saved), kept.Done())
	}
	var told []int64
	env.Progress = func(done, total int64) {
		if total == 12 {
			told = append(told, done)
		}
	}
	a, err := askAscent(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	if len(told) != 12-kept.Done() || told[0] != int64(kept.Done()+1) {
		t.Errorf("after %d cells it goes on with %v", kept.Done(), told)
	}
	if texts(t, a.Facts) != texts(t, whole) {
		t.Error("a sweep in two parts differs from one that was not stopped")
	}
	s.Temperature += 1
	if _, err := askAscent(context.Background(), env, s); err != nil || len(saved) != 2 {
		t.Errorf("another temperature: %v, %d sweeps are kept", err, len(saved))
	}
	for key := range saved {
		saved[key] = []byte(`{"x": 1`)
	}
	if _, err := askAscent(context.Background(), env, s); err != nil {
		t.Errorf("a broken file: %v", err)
	}
	env.Save = func(string, []byte) error { return errors.New("the disk is full") }
	for key := range saved {
		delete(saved, key)
	}
	if _, err := askAscent(context.Background(), env, s); err == nil || err.Error() != "the disk is full" {
		t.Errorf("nothing can be kept: %v", err)
	}
}

// A cell that fails has its reason, and the rest goes on.
func TestSweepFaults(t *testing.T) {
	a, f := rises(t, modesOfKappa(t, "sweep=updraft=0..1m/s:2 number=200..5000/cm3:2:log"))
	for i, c := range f.Sweep.Cells {
		if failed := c.Problem != nil; failed != (i%2 == 0) || failed != math.IsNaN(float64(c.Droplets)) {
			t.Errorf("cell %d: %+v", i, c)
		}
	}
	if !slices.Contains(codes(a), "sweep-faults") || !strings.Contains(strings.Join(a.Finding, " "), "2 of 4 cells of the sweep have no result") {
		t.Errorf("notes %q, finding %q", codes(a), a.Finding)
	}
	explained(t, a)
	text := strings.Join(f.Sweep.Map(80, 20, false), "\n")
	if strings.Count(text, "none!") != 2 || !strings.Contains(text, "none: air with an updraft of 0") {
		t.Errorf("the map\n%s", text)
	}
}

// The map is read without colour: numbers, and shades that grow with them.
func TestSweepMap(t *testing.T) {
	_, f := rises(t, modesOfKappa(t, "ascent-bins=20", "sweep=updraft=0.05..5m/s:20:log number=100..10000/cm3:6:log"))
	for _, c := range []struct {
		width, rows int
		ascii       bool
	}{{80, 20, false}, {80, 20, true}, {60, 5, false}, {200, 40, false}, {10, 1, true}} {
		lines := f.Sweep.Map(c.width, c.rows, c.ascii)
		for _, l := range lines[1:] {
			if n := utf8.RuneCountInString(l); n > c.width+6 && c.width > 20 { // the unit of the foot
				t.Errorf("%d columns of %d: %q", n, c.width, l)
			}
			if c.ascii && strings.ContainsFunc(l, func(r rune) bool { return r > 127 }) {
				t.Errorf("not ASCII: %q", l)
			}
		}
		if len(lines) > max(c.rows, 3) {
			t.Errorf("%d lines in %d rows", len(lines), c.rows)
		}
	}
	lines := f.Sweep.Map(80, 20, false)
	first, last := lines[1], lines[len(lines)-2]
	if !strings.Contains(first, "10000 /cm³") || !strings.HasSuffix(first, "█") || !strings.Contains(last, "100 /cm³") {
		t.Errorf("the map\n%s", strings.Join(lines, "\n"))
	}
	// The ends are there whatever is left out.
	foot := strings.Fields(lines[len(lines)-1])
	if foot[0] != "0.050" || foot[len(foot)-2] != "5.0" || foot[len(foot)-1] != "m/s" {
		t.Errorf("the foot %q", foot)
	}
}
