package print

import (
	"math"

	"gonum.org/v1/plot/text"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
)

// board knows what is already on the picture, so that labels find free room.
type board struct {
	c     *draw.Canvas
	dots  []vg.Point     // the lines, a dot every few points
	taken []vg.Rectangle // marks and labels
}

// cover enters lines into the board.
func (b *board) cover(runs [][]vg.Point) {
	const apart = 3
	for _, run := range runs {
		for i := 1; i < len(run); i++ {
			from, to := run[i-1], run[i]
			n := math.Ceil(math.Hypot(float64(to.X-from.X), float64(to.Y-from.Y)) / apart)
			for k := range int(math.Min(n, 1000)) + 1 {
				t := vg.Length(float64(k) / math.Max(n, 1))
				b.dots = append(b.dots, vg.Point{X: from.X + t*(to.X-from.X), Y: from.Y + t*(to.Y-from.Y)})
			}
		}
	}
}

// label writes a text beside its point, in the place of least cost: to cover a
// mark, a label or the edge costs most, then lines, then distance. Lines that are
// covered nevertheless end at the text, so that it can be read.
func (b *board) label(l label) {
	if l.text == "" {
		return
	}
	size := l.style.Rectangle(l.text).Size()
	best, lowest := vg.Rectangle{}, math.Inf(1)
	for i, at := range placesAround(l.at, size) {
		r := vg.Rectangle{Min: at, Max: vg.Point{X: at.X + size.X, Y: at.Y + size.Y}}
		if cost := b.cost(r) + float64(i)*0.5; cost < lowest {
			best, lowest = r, cost
		}
	}
	if b.lined(best) {
		b.c.SetColor(paper)
		b.c.Fill(best.Path())
	}
	l.style.YAlign = draw.YBottom
	b.c.FillText(l.style, best.Min, l.text)
	b.taken = append(b.taken, vg.Rectangle{Min: vg.Point{X: best.Min.X - 3, Y: best.Min.Y}, Max: vg.Point{X: best.Max.X + 3, Y: best.Max.Y}})
}

// placesAround is the lower left corners that a text of this size may have,
// best first: above, right, left, below, and the same farther away.
func placesAround(at vg.Point, size vg.Point) []vg.Point {
	var places []vg.Point
	for _, gap := range []vg.Length{1.6, 3, 5, 8} {
		gap *= markRadius
		up, down := at.Y+gap, at.Y-gap-size.Y
		right, left := at.X+gap, at.X-gap-size.X
		places = append(places,
			vg.Point{X: at.X - size.X/2, Y: up}, vg.Point{X: right, Y: at.Y - size.Y/2},
			vg.Point{X: left, Y: at.Y - size.Y/2}, vg.Point{X: at.X, Y: up}, vg.Point{X: at.X - size.X, Y: up},
			vg.Point{X: at.X - size.X/2, Y: down}, vg.Point{X: right, Y: down}, vg.Point{X: left, Y: down})
	}
	return places
}

func (b *board) cost(r vg.Rectangle) float64 {
	cost := 0.0
	if r.Min.X < b.c.Min.X+1 || r.Max.X > b.c.Max.X-1 || r.Min.Y < b.c.Min.Y || r.Max.Y > b.c.Max.Y {
		cost += 1e6
	}
	cost += 1e4 * float64(b.hits(r))
	for _, d := range b.dots {
		if around(r, d) {
			cost++
		}
	}
	return cost
}

// hits counts the marks and labels that a rectangle touches.
func (b *board) hits(r vg.Rectangle) (n int) {
	for _, t := range b.taken {
		if r.Min.X < t.Max.X && t.Min.X < r.Max.X && r.Min.Y < t.Max.Y && t.Min.Y < r.Max.Y {
			n++
		}
	}
	return n
}

// letter writes the letter of a held line onto the line itself, at its highest
// point or as near to it as no mark or other letter is.
func (b *board) letter(letter string, style text.Style, runs [][]vg.Point) {
	var line []vg.Point
	for _, run := range runs {
		line = append(line, run...)
	}
	if letter == "" || len(line) == 0 {
		return
	}
	top := 0
	for i, p := range line {
		if p.Y > line[top].Y {
			top = i
		}
	}
	half := style.Rectangle(letter).Size().Scale(0.5)
	box := func(i int) vg.Rectangle { return vg.Rectangle{Min: line[i].Sub(half), Max: line[i].Add(half)} }
	free := func(i int) bool {
		return i >= 0 && i < len(line) && b.hits(box(i)) == 0 && b.c.Contains(box(i).Min) && b.c.Contains(box(i).Max)
	}
	best := box(top)
	for d := range len(line) {
		if free(top - d) {
			best = box(top - d)
			break
		}
		if free(top + d) {
			best = box(top + d)
			break
		}
	}
	b.c.SetColor(paper)
	b.c.Fill(best.Path())
	style.YAlign = draw.YBottom
	b.c.FillText(style, best.Min, letter)
	b.taken = append(b.taken, best)
}

// lined reports whether a line runs through a rectangle.
func (b *board) lined(r vg.Rectangle) bool {
	for _, d := range b.dots {
		if around(r, d) {
			return true
		}
	}
	return false
}

func around(r vg.Rectangle, d vg.Point) bool {
	return d.X > r.Min.X-1 && d.X < r.Max.X+1 && d.Y > r.Min.Y-1 && d.Y < r.Max.Y+1
}
