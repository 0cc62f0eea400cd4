package aerosol

import (
	"fmt"
	"math"

	"dropcrest/atmos"
	"gonum.org/v1/gonum/stat"
)

// tailReach is how far from the end, in ln D, the bins say how a distribution goes on:
// a factor of two, but two bins at least and five at most (own choice).
const (
	tailReach = math.Ln2
	leastTail = 2
	mostTail  = 5
)

// Tail is what probably lies beyond one end of the bins.
type Tail struct {
	Edge    float64 // m, the limit beyond which nothing was measured
	Number  float64 // 1/m³ beyond it, +Inf where the density does not fall towards that end
	Share   float64 // Number over the number of all measured and these particles
	Falling bool    // the density falls towards that end
}

// UpperTail estimates what lies above the last limit. The line through ln
// dN/dlnD of the last bins that are not empty, up to five within a factor of two,
// is continued: a power law, which falls more slowly than a lognormal mode does,
// so the number is rather too high. An empty last bin has no tail.
func (b *Bins) UpperTail() Tail { return b.tail(len(b.counts)-1, -1) }

// LowerTail estimates what lies below the first limit in the same way.
func (b *Bins) LowerTail() Tail { return b.tail(0, 1) }

func (b *Bins) tail(from, inwards int) Tail {
	outer := from
	if inwards < 0 {
		outer++
	}
	t := Tail{Edge: b.grid.edges[outer], Falling: true}
	if b.counts[from] == 0 {
		return t
	}
	var x, y []float64 // x: distance from the edge in ln D, inwards
	for i := from; i >= 0 && i < len(b.counts) && len(x) < mostTail; i += inwards {
		distance := math.Abs(b.grid.middleLn(i) - b.grid.ln[outer])
		if distance > tailReach && len(x) >= leastTail {
			break
		}
		if b.counts[i] > 0 {
			x = append(x, distance)
			y = append(y, math.Log(b.counts[i]/b.grid.WidthLn(i)))
		}
	}
	slope := 0.0
	if len(x) > 1 {
		var intercept float64
		intercept, slope = stat.LinearRegression(x, y, nil, false)
		t.Number = math.Exp(intercept) / slope
	}
	if !(slope > 0) {
		t.Number, t.Share, t.Falling = math.Inf(1), 1, false
		return t
	}
	t.Share = t.Number / (t.Number + b.Number())
	return t
}

// tailWorthSaying is the share of particles beyond the bins from which on a
// result must say so (own choice).
const tailWorthSaying = 0.01

// UpperNote returns the note that the distribution goes on above its last bin,
// and whether there is something to say. Input is left to the caller.
func (b *Bins) UpperNote() (atmos.Note, bool) {
	t := b.UpperTail()
	return t.note("above-last-bin", "above the last limit"), t.Share >= tailWorthSaying
}

// LowerNote is UpperNote for the sizes below the first bin.
func (b *Bins) LowerNote() (atmos.Note, bool) {
	t := b.LowerTail()
	return t.note("below-first-bin", "below the first limit"), t.Share >= tailWorthSaying
}

func (t Tail) note(code, where string) atmos.Note {
	text := fmt.Sprintf("Nothing was measured %s of %.4g nm; continued as the bins beside it go, about %.2g %% of all particles lie there and are not counted.",
		where, t.Edge*1e9, 100*t.Share)
	if !t.Falling {
		text = fmt.Sprintf("Nothing was measured %s of %.4g nm, and the distribution does not fall towards it: an unknown number of particles lies there and is not counted.",
			where, t.Edge*1e9)
	}
	return atmos.Note{Code: code, Text: text}
}
