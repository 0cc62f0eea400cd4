package figure

// Fit returns the frame for f in a picture of h rows: last if it still serves,
// a new one if not. It reports whether the frame was refitted.
func Fit(f Figure, last Frame, h int) (Frame, bool) { panic("not written yet") }

// Text draws f through the frame as h rows of w cells: the picture's rows with
// the vertical axis at their left, then the horizontal axis and its labels.
func Text(f Figure, fr Frame, w, h int, st Style) [][]Cell { panic("not written yet") }
