package answer

import (
	"context"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/ascent"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// swept is a finished sweep.
type swept struct {
	axes [2]scenario.SweepAxis // across, down
	ascent.Sweep
}

// sweep makes the sweep of a scenario. Cells that were finished before, in this
// session or another, are not made again.
func (env Env) sweep(ctx context.Context, s scenario.Scenario, of *rising) (*swept, error) {
	axes, err := scenario.ParseSweep(s.Sweep)
	if err != nil {
		return nil, &InputError{Input: "sweep", Text: err.Error()}
	}
	for _, a := range axes {
		if a.Path == scenario.NumberOfAll {
			continue
		}
		trial := s.Clone()
		if err := a.Set(&trial, a.Values[0]); err != nil {
			return nil, &InputError{Input: "sweep", Text: err.Error()}
		}
	}
	w := &swept{axes: axes, Sweep: ascent.Sweep{X: ascent.Axis{Key: string(axes[0].Path), Values: axes[0].Values},
		Y: ascent.Axis{Key: string(axes[1].Path), Values: axes[1].Values}}}
	key := sweepKey(s, of, env.Version)
	env.resume(key, &w.Sweep)
	o := ascentOptions(s)
	o.Height = 0 // as far as the peak takes
	err = w.Run(ctx, max(1, env.Workers), func(x, y float64) (ascent.Parcel, ascent.Options, error) {
		p, err := env.cell(ctx, s, axes, x, y)
		return p, o, err
	}, func(done, n int) error {
		if env.Progress != nil {
			env.Progress(int64(done), int64(n))
		}
		if done%len(w.X.Values) == 0 {
			return env.save(key, &w.Sweep)
		}
		return nil
	})
	if saved := env.save(key, &w.Sweep); err == nil {
		err = saved
	}
	if err != nil {
		return nil, err
	}
	return w, nil
}

// cell is the parcel at two values.
func (env Env) cell(ctx context.Context, s scenario.Scenario, axes [2]scenario.SweepAxis, x, y float64) (ascent.Parcel, error) {
	s = s.Clone()
	total := math.NaN()
	for i, value := range []float64{x, y} {
		if axes[i].Path == scenario.NumberOfAll {
			total = value
			continue
		}
		if err := axes[i].Set(&s, value); err != nil {
			return ascent.Parcel{}, err
		}
	}
	of, err := env.rising(ctx, s)
	if err != nil {
		return ascent.Parcel{}, err
	}
	if !math.IsNaN(total) {
		now := of.particles()
		for i := range of.air {
			of.air[i].Share *= total / now
		}
	}
	return of.parcel(s), nil
}

// particles are all of them, 1/m³ of the air at the start.
func (of *rising) particles() float64 {
	n := 0.0
	for _, g := range of.air {
		n += g.Share * g.Sizes.Number()
	}
	return n
}

// sweepKey is the same for sweeps of the same cells only.
func sweepKey(s scenario.Scenario, of *rising, version string) string {
	s.Follow, s.UpdraftSpread, s.UpdraftWeighting, s.Height = nil, 0, "", 0
	sum := sha256.New()
	fmt.Fprintln(sum, version, of.particles(), of.kappa(), of.start)
	if err := scenario.Encode(sum, s); err != nil {
		return "" // such a sweep is not kept
	}
	return "sweep-" + hex.EncodeToString(sum.Sum(nil)[:16])
}

// resume takes up a sweep that was begun before.
func (env Env) resume(key string, w *ascent.Sweep) {
	if env.Load == nil || key == "" {
		return
	}
	var before ascent.Sweep
	if err := json.Unmarshal(env.Load(key), &before); err != nil || before.Check() != nil {
		return // none, or not ours: it is made anew
	}
	if slices.Equal(before.X.Values, w.X.Values) && slices.Equal(before.Y.Values, w.Y.Values) {
		w.Cells = before.Cells
	}
}

func (env Env) save(key string, w *ascent.Sweep) error {
	if env.Save == nil || key == "" || w.Done() == 0 {
		return nil
	}
	text, err := json.Marshal(w)
	if err != nil {
		return err
	}
	return env.Save(key, text)
}

// faults are how many cells have none, and why the first one has not.
func (w *swept) faults() (n int, first string) {
	for _, c := range w.Cells {
		if c.Fault != "" {
			if n++; n == 1 {
				first = c.Fault
			}
		}
	}
	return n, first
}

func (w *swept) notes() []atmos.Note {
	n, first := w.faults()
	if n == 0 {
		return nil
	}
	return []atmos.Note{{Code: "sweep-faults", Input: "sweep", Text: fmt.Sprintf("%d of %d cells of the sweep have no result, the first of them: %s.", n, w.Size(), first)}}
}

// sentence gives the ends of a sweep.
func (w *swept) sentence() string {
	low, high := -1, -1
	for i, c := range w.Cells {
		if c.Fault != "" {
			continue
		}
		if low < 0 || c.Droplets < w.Cells[low].Droplets {
			low = i
		}
		if high < 0 || c.Droplets > w.Cells[high].Droplets {
			high = i
		}
	}
	if low < 0 {
		return "No cell of the sweep has a result."
	}
	at := func(i int) string {
		n := len(w.X.Values)
		return fmt.Sprintf("%s per cm³ (%s %s, %s %s)", cubic(w.Cells[i].Droplets), w.axes[0].Says, w.show(0, w.X.Values[i%n]), w.axes[1].Says, w.show(1, w.Y.Values[i/n]))
	}
	return fmt.Sprintf("Over %d by %d cells the droplets go from %s to %s.", len(w.X.Values), len(w.Y.Values), at(low), at(high))
}

// show writes a value of an axis with three digits.
func (w *swept) show(axis int, x float64) string {
	text := digits(w.axes[axis].Shown(x), 3)
	if unit := w.axes[axis].Unit; unit != "" {
		text += " " + unit
	}
	return text
}

// table has one cell a row.
func (w *swept) table() Table {
	t := Table{Key: "sweep", Title: "Sweep", Columns: []Column{
		{w.axes[0].Key(), w.axes[0].Says}, {w.axes[1].Key(), w.axes[1].Says},
		{"droplets_per_m3", "droplets, 1/m³"}, {"peak_supersaturation_percent", "peak, %"}, {"height_of_peak_m", "height of the peak, m"},
		{"particles_per_m3", "particles, 1/m³"}, {"problem", "why there is no result"}}}
	for i, c := range w.Cells {
		n := len(w.X.Values)
		row := []any{cell(w.axes[0].SI(w.X.Values[i%n])), cell(w.axes[1].SI(w.Y.Values[i/n])), nil, nil, nil, nil, word(c.Fault)}
		if c.Fault == "" {
			row[2], row[3], row[4], row[5] = cell(c.Droplets), cell(100*c.Peak), cell(c.Height), cell(c.Number)
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// mostLines of a sweep tell it in one picture.
const mostLines = 5

// figure is the droplets across, one line for some of the values down.
func (w *swept) figure() figure.Figure {
	f := figure.Figure{
		Key: "sweep", Title: fmt.Sprintf("droplets, 1/cm³ against %s", w.axes[0].Says),
		X: figure.Axis{Says: w.axes[0].Says, Unit: w.axes[0].Unit, Log: w.axes[0].Log},
		Y: figure.Axis{Says: "droplets", Unit: "1/cm³", Log: true},
	}
	if unit := w.axes[0].Unit; unit != "" {
		f.Title = fmt.Sprintf("droplets, 1/cm³ against %s, %s", w.axes[0].Says, unit)
	}
	rows := min(mostLines, len(w.Y.Values))
	for k := range rows {
		y := k * (len(w.Y.Values) - 1) / max(1, rows-1)
		line := figure.Line{Letter: letterOf(k), Says: w.axes[1].Says + " " + w.show(1, w.Y.Values[y])}
		for x, v := range w.X.Values {
			c, _ := w.At(x, y)
			n := c.Droplets * perCubic
			if c.Fault != "" || !(n > 0) {
				n = math.NaN()
			}
			line.X, line.Y = append(line.X, w.axes[0].Shown(v)), append(line.Y, n)
		}
		f.Lines = append(f.Lines, line)
	}
	return f
}
