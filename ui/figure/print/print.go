// Package print writes figures as files for papers and reports: SVG, PNG and
// PDF by gonum/plot, through the same frame as the screen.
package print

import (
	"bytes"
	"fmt"
	"io"
	"regexp"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	"gonum.org/v1/plot/vg/vgpdf"
	"gonum.org/v1/plot/vg/vgsvg"

	"dropcrest/ui/figure"
)

// The page: as wide as the text of a journal page, the picture with its axes
// 10 cm high, or as high as its bars need, legend and notes below it likewise.
const (
	pageWidth     = 16 * vg.Centimeter
	pictureHeight = 10 * vg.Centimeter
	margin        = 0.4 * vg.Centimeter
	dotsPerInch   = 300
)

// Formats are the formats that Write knows.
func Formats() []string { return []string{"svg", "png", "pdf"} }

// Write draws f through the frame and writes it to w as "svg", "png" or "pdf".
// A frame that cannot be drawn, such as the zero Frame, is fitted here. The same
// figure gives the same bytes in every run and carries no date.
func Write(w io.Writer, f figure.Figure, fr figure.Frame, format string) (err error) {
	canvasOf := map[string]func(w, h vg.Length) vg.CanvasWriterTo{"svg": svgCanvas, "png": pngCanvas, "pdf": pdfCanvas}[format]
	if canvasOf == nil {
		return fmt.Errorf("figure format %q is not known: want svg, png or pdf", format)
	}
	if !fr.Suits(f) {
		fr, _ = figure.Fit(f, figure.Frame{}, 24)
	}
	// gonum/plot panics on what it cannot draw; a figure that fails must not
	// take the screen with it.
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("the figure cannot be drawn as %s: %v", format, r)
		}
	}()
	s := newSheet(f, fr)
	canvas := canvasOf(pageWidth, s.height())
	s.draw(draw.New(canvas))
	var b bytes.Buffer
	if _, err := canvas.WriteTo(&b); err != nil {
		return fmt.Errorf("the figure cannot be written as %s: %w", format, err)
	}
	out := b.Bytes()
	switch format {
	case "pdf":
		out = undated(out)
	case "svg":
		out = bytes.ReplaceAll(out, []byte("font-family:Liberation Sans;"), []byte("font-family:'Liberation Sans',Arial,Helvetica,sans-serif;"))
	}
	_, err = w.Write(out)
	return err
}

func svgCanvas(w, h vg.Length) vg.CanvasWriterTo { return vgsvg.New(w, h) }

func pngCanvas(w, h vg.Length) vg.CanvasWriterTo {
	return vgimg.PngCanvas{Canvas: vgimg.NewWith(vgimg.UseWH(w, h), vgimg.UseDPI(dotsPerInch))}
}

func pdfCanvas(w, h vg.Length) vg.CanvasWriterTo { return vgpdf.New(w, h) }

var pdfDate = regexp.MustCompile(`/(CreationDate|ModDate) \(D:\d{14}\)`)

// undated blanks out the two dates that the PDF writer puts in, keeping the
// length, because the file ends with a table of byte positions. The date of the
// blank is the first day of 2000.
func undated(file []byte) []byte {
	return pdfDate.ReplaceAllFunc(file, func(date []byte) []byte {
		at := bytes.IndexByte(date, ':') + 1
		return append(append([]byte{}, date[:at]...), "20000101000000)"...)
	})
}

// sheet is one page: a figure, its frame and the texts below the picture.
type sheet struct {
	f      figure.Figure
	fr     figure.Frame
	lines  []line
	legend []entry
	notes  []string

	pictureHeight vg.Length
}

// entry is one line of the legend.
type entry interface {
	inLegend(c *draw.Canvas, at vg.Point)
}

func newSheet(f figure.Figure, fr figure.Frame) *sheet {
	s := &sheet{f: f, fr: fr, pictureHeight: pictureHeight}
	if len(f.Bars) > 0 {
		s.pictureHeight = heightOfBars(len(f.Bars))
	} else {
		s.lines = linesOf(f)
		s.legend = legendOf(s.lines, f.Points)
	}
	for _, n := range f.Notes {
		s.notes = append(s.notes, wrap(n, textStyle(noteSize), pageWidth-2*margin)...)
	}
	return s
}

// legendOf is the legend of lines and points; none where there is nothing to tell
// one entry from.
func legendOf(lines []line, points []figure.Point) []entry {
	var legend []entry
	for _, l := range lines {
		if !l.AtEnd {
			legend = append(legend, l)
		}
	}
	if hasOwn(points) {
		legend = append(legend, measured{})
	}
	if len(legend) == 1 {
		return nil
	}
	return legend
}

// height is the height of the page with everything on it.
func (s *sheet) height() vg.Length {
	h := s.pictureHeight + 2*margin
	if n := len(s.legend); n > 0 {
		h += vg.Length(n)*legendLine + margin/2
	}
	if n := len(s.notes); n > 0 {
		h += vg.Length(n)*noteLine + margin/2
	}
	return h
}

// draw fills the page from the top: picture, legend, notes.
func (s *sheet) draw(page draw.Canvas) {
	page.SetColor(paper)
	page.Fill(page.Rectangle.Path())
	inner := draw.Crop(page, margin, -margin, margin, -margin)
	picture := inner
	picture.Min.Y = picture.Max.Y - s.pictureHeight
	if len(s.f.Bars) > 0 {
		s.drawBars(picture)
	} else {
		s.plot().Draw(picture)
	}
	at := vg.Point{X: inner.Min.X, Y: picture.Min.Y - margin/2}
	for _, l := range s.legend {
		at.Y -= legendLine
		l.inLegend(&inner, at)
	}
	if len(s.legend) > 0 {
		at.Y -= margin / 2
	}
	style := textStyle(noteSize)
	for _, n := range s.notes {
		at.Y -= noteLine
		inner.FillText(style, at, n)
	}
}

// plot is the picture with its axes.
func (s *sheet) plot() *plot.Plot {
	p := plot.New()
	p.BackgroundColor = nil
	p.Title.Text = clean(s.f.Title)
	p.Title.TextStyle.Font = typeface(titleSize)
	p.Title.Padding = vg.Points(6)
	axis(&p.X, s.f.X, s.fr.XMin, s.fr.XMax, 12)
	axis(&p.Y, s.f.Y, s.fr.YMin, s.fr.YMax, 10)
	p.Add(frame{zero: s.fr.YMin < 0 && s.fr.YMax > 0})
	for _, l := range s.lines {
		p.Add(l)
	}
	p.Add(points{s}, marks{s})
	return p
}
