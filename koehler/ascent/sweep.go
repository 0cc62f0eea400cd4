package ascent

import (
	"context"
	"errors"
	"math"
)

// Axis is one of the quantities that a sweep goes through.
type Axis struct {
	Key    string    `json:"key"`    // stable: "updraft"
	Values []float64 `json:"values"` // SI
}

// Cell is one ascent of a sweep.
type Cell struct {
	Peak     float64 `json:"peak"`     // supersaturation
	Height   float64 `json:"height_m"` // of the peak
	Droplets float64 `json:"droplets"` // 1/m³ of the air at the start
	Number   float64 `json:"number"`   // of all particles, 1/m³
	Fault    string  `json:"fault,omitempty"`
}

// Sweep is a table over two quantities as plain data: what has been computed is
// in it, so it can be written away at any time, read again and finished. The cells
// go row by row: X runs first. Done says how many are finished.
type Sweep struct {
	X     Axis   `json:"x"`
	Y     Axis   `json:"y"`
	Cells []Cell `json:"cells"` // as many as are finished
}

// Size returns the number of cells of the whole table.
func (s *Sweep) Size() int { return len(s.X.Values) * len(s.Y.Values) }

// Done returns the number of finished cells.
func (s *Sweep) Done() int { return len(s.Cells) }

// At returns the cell of X.Values[x] and Y.Values[y], and whether it is finished.
func (s *Sweep) At(x, y int) (Cell, bool) {
	i := y*len(s.X.Values) + x
	if x < 0 || y < 0 || x >= len(s.X.Values) || i >= len(s.Cells) {
		return Cell{}, false
	}
	return s.Cells[i], true
}

// Check returns nil or what does not fit, such as after reading.
func (s *Sweep) Check() error {
	for _, a := range [...]Axis{s.X, s.Y} {
		if len(a.Values) == 0 {
			return unusable("number of values of "+a.Key, -1, 0, "1 or more")
		}
		for i, v := range a.Values {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				return unusable("value of "+a.Key, i, v, "a finite number")
			}
		}
	}
	if len(s.Cells) > s.Size() {
		return unusable("number of finished cells", -1, float64(len(s.Cells)), "no more than the table has")
	}
	return nil
}

// Ask says what a cell asks: the parcel at two values.
type Ask func(x, y float64) (Parcel, Options, error)

// Run computes the cells that are not finished, on so many workers (0: all cores), and
// appends them in order; after each it calls taken, which may be nil and whose error
// ends the sweep. A cell that fails keeps its reason and the rest goes on. The
// cells are the same on any number of workers. After an error, the context's too,
// the sweep is whole and can be run again.
func (s *Sweep) Run(ctx context.Context, workers int, ask Ask, taken func(done, of int) error) error {
	if err := s.Check(); err != nil {
		return err
	}
	n := s.Size()
	return Each(ctx, len(s.Cells), n, workers, func(ctx context.Context, i int) Cell {
		return cellOf(ctx, ask, s.X.Values[i%len(s.X.Values)], s.Y.Values[i/len(s.X.Values)])
	}, func(_ int, c Cell) error {
		s.Cells = append(s.Cells, c)
		if taken == nil {
			return nil
		}
		return taken(len(s.Cells), n)
	})
}

// farthestPeak is how high a cell may rise to find its peak where the options do not
// say, m.
const farthestPeak = 5000

func cellOf(ctx context.Context, ask Ask, x, y float64) Cell {
	p, o, err := ask(x, y)
	if err != nil {
		return Cell{Fault: err.Error()}
	}
	if o.Height == 0 {
		o.Height = farthestPeak
	}
	o.StopAtPeak, o.ProfileRows, o.Follow, o.Progress = true, 0, nil, nil
	r, err := Run(ctx, p, o)
	if err == nil && !r.HasPeak {
		err = errNoPeak
	}
	if err != nil {
		return Cell{Fault: err.Error()}
	}
	return Cell{r.Peak.Supersaturation, r.Peak.Height, r.Droplets, r.Number, ""}
}

var errNoPeak = errors.New("no peak up to the height")
