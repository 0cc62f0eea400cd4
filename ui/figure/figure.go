// Package figure is a picture as data, the frame it is looked at through, and
// its text form. Coordinates are in the units that are shown (µm, %).
package figure

// Figure is one picture: dense polylines that contain their extrema, and marks; or,
// where there are bars, these alone.
type Figure struct {
	Key    string // "curve"
	Title  string // "supersaturation, % against wet radius, µm"
	X, Y   Axis
	Lines  []Line
	Marks  []Mark
	Points []Point  // measured, drawn over the lines
	Bars   []Bar    // rows with signed bars instead of lines; X is the axis of their values, Y is not looked at
	Notes  []string // printed below the picture in figure files
}

// Axis is one axis of a figure.
type Axis struct {
	Says string // "wet radius"
	Unit string // "µm"
	Log  bool
	Free bool // of Y: data need not show zero, such as ratios about 1
	// Time says that values are moments, in seconds since 1970-01-01 UTC; ticks are
	// at round times of UTC. Only for X, and not with Log.
	Time bool
}

// Dash tells lines apart without colour.
type Dash int

const (
	Solid  Dash = iota
	Dashed      // held curves
	Dotted      // Kelvin-only, Raoult-only
)

// Line is one polyline; NaN in Y leaves a gap.
type Line struct {
	Letter rune   // 'A'..'F' held curves, 0 the current one
	Says   string // "Kelvin only"
	Dash   Dash
	X, Y   []float64
	Crest  bool // its extrema count when the frame is fitted; means nothing on a logarithmic Y axis
	AtEnd  bool // Says stands at its end, in figure files too, and not in the legend
	// Extrema are the X of the extrema where they are known; nil: they are found
	// among the points.
	Extrema []float64
}

// Point is a measured point with the ends of its uncertainty, NaN where there is
// none. Letter is that of the series it belongs to, 0 for the current one.
type Point struct {
	Letter      rune
	X, Y        float64
	XLow, XHigh float64
	YLow, YHigh float64
}

// Bar is one row of a figure of bars.
type Bar struct {
	Says   string  // "one κ at every dilution"
	Value  float64 // in the unit of X; NaN: it has none
	Text   string  // the value in words: "-7.2 %", "not known"
	Chosen bool    // marked, and always in sight
}

// Drawable reports whether the value is a number that a bar can show.
func (b Bar) Drawable() bool { return usable(b.Value) }

// MarkKind says what a mark stands for.
type MarkKind int

const (
	CrestMark MarkKind = iota
	HazeMark
	PointMark
)

// Mark is one marked point with an optional label. A mark outside the frame is
// shown at the edge with its value.
type Mark struct {
	Kind   MarkKind
	Letter rune // as the line it belongs to
	X, Y   float64
	Text   string // label: "0.094 %", "haze 0.157 µm at 95.0 %"
}

// Frame is the part of the plane that is shown. The zero Frame stands for none.
type Frame struct {
	XMin, XMax float64
	YMin, YMax float64 // the lowest and the highest row
	YStep      float64 // one row; decades where YLog is set
	YLog       bool    // rows are evenly spaced in the logarithm
}

// Style is how a text picture is drawn.
type Style struct {
	ASCII bool
}

// Role says what a cell belongs to; the screen gives each role a colour.
type Role uint8

const (
	Blank Role = iota
	AxisRole
	TickRole
	ZeroRole
	CurrentRole
	HeldRole
	OtherRole // Kelvin only, Raoult only
	CrestRole
	HazeRole
	PointRole // measured points
	BarRole   // their uncertainty; the bars of a figure of bars are CurrentRole
	LabelRole
)

// Cell is one character of a text picture.
type Cell struct {
	Rune rune
	Role Role
}
