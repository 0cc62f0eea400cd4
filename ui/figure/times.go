package figure

import (
	"math"
	"time"
)

// Times of an axis, in seconds.
const (
	minute = 60.0
	hour   = 60 * minute
	day    = 24 * hour
)

// clockSteps divide a day into round parts.
var clockSteps = []float64{
	1, 2, 5, 10, 15, 30, minute, 2 * minute, 5 * minute, 10 * minute, 15 * minute, 30 * minute,
	hour, 2 * hour, 3 * hour, 6 * hour, 12 * hour,
}

// dateStep is a distance of ticks in days of a month, months or years.
type dateStep struct{ days, months, years int }

var dateSteps = []dateStep{
	{days: 1}, {days: 2}, {days: 5}, {days: 10}, {months: 1}, {months: 2}, {months: 3}, {months: 6},
	{years: 1}, {years: 2}, {years: 5}, {years: 10}, {years: 20}, {years: 50}, {years: 100}, {years: 200}, {years: 500},
}

// Moments that an axis can name; what lies outside has no ticks.
var (
	firstMoment = float64(time.Date(1000, 1, 1, 0, 0, 0, 0, time.UTC).Unix())
	lastMoment  = float64(time.Date(9000, 1, 1, 0, 0, 0, 0, time.UTC).Unix())
)

// timeTicks are round times of UTC between lo and hi, at most most of them. A
// midnight bears its date; if there is none, the first tick has it too.
func timeTicks(lo, hi float64, most int) []Tick {
	if !(lo < hi) || lo < firstMoment || hi > lastMoment || most < 1 {
		return nil
	}
	for _, step := range clockSteps {
		if first := math.Ceil(lo / step); math.Floor(hi/step)-first < float64(most) {
			return clockTicks(first*step, hi, step)
		}
	}
	for _, step := range dateSteps {
		if at := step.ticks(lo, hi); len(at) <= most {
			return at
		}
	}
	return nil
}

func clockTicks(first, hi, step float64) []Tick {
	var at []Tick
	dated := false
	layout := "15:04"
	if step < minute {
		layout = "15:04:05"
	}
	for v := first; v <= hi; v += step {
		moment := time.Unix(int64(v), 0).UTC()
		label := moment.Format(layout)
		if math.Mod(v, day) == 0 {
			label, dated = moment.Format("2 Jan"), true
		}
		at = append(at, Tick{v, label})
	}
	if !dated && len(at) > 0 {
		at[0].Label = time.Unix(int64(first), 0).UTC().Format("2 Jan " + layout)
	}
	return at
}

// ticks are the days, firsts of months or of years between lo and hi. The last
// ticks of a month are left out where the next month follows too soon.
func (s dateStep) ticks(lo, hi float64) []Tick {
	from := time.Unix(int64(math.Floor(lo)), 0).UTC()
	year, month := from.Year(), from.Month()
	if s.months > 0 {
		month = time.Month((int(month)-1)/s.months*s.months + 1)
	}
	if s.years > 0 {
		year, month = year/s.years*s.years, 1
	}
	var at []Tick
	add := func(moment time.Time, layout string) {
		if v := float64(moment.Unix()); v >= lo && v <= hi {
			at = append(at, Tick{v, moment.Format(layout)})
		}
	}
	const enough = 400
	for len(at) < enough {
		begin := time.Date(year, month, 1, 0, 0, 0, 0, time.UTC)
		if float64(begin.Unix()) > hi {
			break
		}
		switch {
		case s.days > 0:
			end := begin.AddDate(0, 1, 0)
			for d := begin; end.Sub(d) > time.Duration(s.days)*12*time.Hour; d = d.AddDate(0, 0, s.days) {
				add(d, "2 Jan")
			}
			month++
		case s.months > 0:
			add(begin, "Jan 2006")
			month += time.Month(s.months)
		default:
			add(begin, "2006")
			year += s.years
		}
		year, month = year+int(month-1)/12, (month-1)%12+1
	}
	return at
}

// momentText is a time in a text.
func momentText(v float64) string {
	if !(v >= firstMoment && v <= lastMoment) {
		return "no time"
	}
	return time.Unix(int64(math.Round(v)), 0).UTC().Format("2 Jan 2006 15:04")
}
