package figure

import (
	"math"
	"strconv"
)

// rowLabels writes the round values beside the rows, "" beside the others, and
// says how wide the widest is. Row 0 is the lowest.
func rowLabels(fr Frame, rows int) (labels []string, widest int) {
	if fr.YLog {
		return logLabels(fr, rows)
	}
	return linearLabels(fr, rows)
}

// logLabels puts 1, 2 and 5 of each decade beside the rows that are nearest to
// them, where a value of the figure would be as well; powers of ten lie on rows.
func logLabels(fr Frame, rows int) (labels []string, widest int) {
	labels = make([]string, rows)
	digits, off := []float64{1}, 1e-6
	if perDecade := 1 / fr.YStep; perDecade > 2.5 {
		digits, off = []float64{1, 2, 5}, 0.5
	}
	for n := math.Floor(math.Log10(fr.YMin)); n <= math.Ceil(math.Log10(fr.YMax)); n++ {
		for _, d := range digits {
			v := scaled(d, int(n))
			at := fr.row(v)
			if i := math.Round(at); i >= 0 && i < float64(rows) && math.Abs(at-i) <= off {
				labels[int(i)] = TickLabel(v)
				widest = max(widest, len(labels[int(i)]))
			}
		}
	}
	return labels, widest
}

func linearLabels(fr Frame, rows int) (labels []string, widest int) {
	labels = make([]string, rows)
	first := int(math.Round(fr.YMin / fr.YStep))
	every := 2
	// A unit of 2 has no round double: 10 is the next round number, unless so
	// few rows are there that each can have its label.
	if n := int(math.Floor(math.Log10(fr.YStep) + 1e-9)); math.Abs(scaled(fr.YStep, -n)-2) < 1e-6 {
		every = 5
		if rows < 10 {
			every = 1
		}
	}
	spacing := float64(every) * fr.YStep
	places := 0
	for places < 6 && math.Abs(spacing*math.Pow10(places)-math.Round(spacing*math.Pow10(places))) > 1e-6 {
		places++
	}
	plainly := spacing > 0.99e-5 && math.Max(math.Abs(fr.YMin), fr.YMax) < 99999.5
	for i := range labels {
		if (first+i)%every != 0 {
			continue
		}
		v := tidy(float64(first+i)*fr.YStep, fr.YStep)
		switch {
		case plainly:
			labels[i] = strconv.FormatFloat(v, 'f', places, 64)
		case v == 0:
			labels[i] = "0"
		default:
			labels[i] = short(strconv.FormatFloat(v, 'e', -1, 64))
		}
		widest = max(widest, len(labels[i]))
	}
	return labels, widest
}
