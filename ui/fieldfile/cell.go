package fieldfile

import (
	"math"
	"time"
)

// State says what is known of a cell.
type State uint8

// The states of a cell. The zero value is Missing, so that a cell nobody filled
// is not taken for a zero.
const (
	Missing State = iota
	Value
	Below // the limit of detection; X is that limit, NaN where it is not given
	Above // the upper limit; X as for Below
)

func (s State) String() string {
	return [...]string{"missing", "value", "below limit", "above limit"}[s&3]
}

// Cell is one measured value. X means something in the state Value, and as a
// limit in Below and Above.
type Cell struct {
	X     float64
	State State
}

// OK reports whether there is a value.
func (c Cell) OK() bool { return c.State == Value }

// Or is the value, or x where there is none.
func (c Cell) Or(x float64) float64 {
	if c.OK() {
		return c.X
	}
	return x
}

// Measured makes a cell of a value; NaN is a missing one.
func Measured(x float64) Cell {
	if math.IsNaN(x) {
		return Cell{}
	}
	return Cell{x, Value}
}

// Record is one record of a file. Read fills it anew and reuses its slices.
type Record struct {
	Line       int       // where it begins in the file
	Start, End time.Time // UTC; equal where the file gives an instant, zero where it has no time
	Cells      []Cell    // one a column in SI; missing where the column is not used
	Text       []string  // one a column, "" where the column holds no text that is used; nil where none is
	Flags      [][]int   // EBAS: the codes of each flag column, in the order of the file
}
