package spectrum

import (
	"fmt"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
)

// missedWorthSaying is the share of a count beyond the last bin from which on a
// result says so (own choice).
const missedWorthSaying = 0.02

// BinNotes returns what must be said of numbers predicted from bins, for the
// critical dry diameters (m) at some supersaturations: those that lie below the first
// bin, where more particles activate than were sized; above the last one, where
// nothing is left to count; and those whose count leaves out 2 % or more because the
// distribution goes on above its last bin, which concerns low supersaturations first.
func BinNotes(b *aerosol.Bins, c Cuts) []atmos.Note {
	edges := b.Grid().Edges()
	first, last := edges[0], edges[len(edges)-1]
	tail := b.UpperTail()
	var below, above, missing span
	worst := 0.0
	for i, d := range c.Diameters {
		s := c.Supersaturations[i]
		switch {
		case d < first:
			below.add(s)
		case d >= last:
			above.add(s)
		default:
			if share := tail.Number / (tail.Number + b.Above(d)); tail.Falling && share >= missedWorthSaying {
				missing.add(s)
				worst = max(worst, share)
			}
		}
	}
	var notes []atmos.Note
	say := func(x span, code, text string) {
		if x.n > 0 {
			notes = append(notes, atmos.Note{Code: code, Text: text, Input: "bins"})
		}
	}
	say(below, "critical-size-below-bins", fmt.Sprintf("At %s particles below the first bin limit of %.4g nm activate too: the numbers are lower bounds.", below, first*1e9))
	say(above, "critical-size-above-bins", fmt.Sprintf("At %s only particles above the last bin limit of %.4g nm activate: nothing there was measured.", above, last*1e9))
	say(missing, "count-misses-upper-tail", fmt.Sprintf("At %s up to %.2g %% of the activated particles are probably wider than the last bin limit of %.4g nm and not counted.", missing, 100*worst, last*1e9))
	return notes
}

// span is the range of some supersaturations.
type span struct {
	n      int
	lo, hi float64
}

func (x *span) add(s float64) {
	if x.n++; x.n == 1 {
		x.lo, x.hi = s, s
	}
	x.lo, x.hi = min(x.lo, s), max(x.hi, s)
}

func (x span) String() string {
	if x.lo == x.hi {
		return fmt.Sprintf("%.3g %%", 100*x.lo)
	}
	return fmt.Sprintf("%.3g to %.3g %%", 100*x.lo, 100*x.hi)
}
