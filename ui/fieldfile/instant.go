package fieldfile

import (
	"bytes"
	"math"
	"strings"
	"time"
)

// clock reads time stamps of ISO 8601 and RFC 3339. It remembers the last date,
// because neighbouring records share it.
type clock struct {
	date [10]byte
	day  int64 // days since 1970-01-01 of date
	// what was met, for the notes
	noOffset, leap bool
}

const day = 86400 // s

// read reads one time stamp: a date, optionally "T" or a blank and a time, the
// extended form (2026-03-14T08:30:00Z) or the basic one (20260314T083000Z), with
// fractions, with an offset or without (then UTC, and noOffset is set).
func (c *clock) read(b []byte) (time.Time, bool) {
	if t, ok := c.common(b); ok {
		return t, true
	}
	b = bytes.TrimSpace(b)
	sec, rest, basic, ok := readDate(b)
	if !ok {
		return time.Time{}, false
	}
	if len(rest) == 0 {
		c.noOffset = true
		return time.Unix(sec, 0).UTC(), true
	}
	if rest[0] != 'T' && rest[0] != 't' && rest[0] != ' ' {
		return time.Time{}, false
	}
	into, nano, rest, leap, ok := readClock(rest[1:], basic)
	if !ok {
		return time.Time{}, false
	}
	offset, zoned, ok := readOffset(rest)
	if !ok {
		return time.Time{}, false
	}
	c.noOffset = c.noOffset || !zoned
	c.leap = c.leap || leap
	return time.Unix(sec+into-offset, nano).UTC(), true
}

// common is the form that nearly every record has: YYYY-MM-DDThh:mm:ss[Z].
func (c *clock) common(b []byte) (time.Time, bool) {
	n := len(b)
	if n != 20 && n != 19 || n == 20 && b[19] != 'Z' || b[10] != 'T' && b[10] != ' ' || b[13] != ':' || b[16] != ':' {
		return time.Time{}, false
	}
	if [10]byte(b[:10]) != c.date {
		sec, rest, basic, ok := readDate(b[:10])
		if !ok || basic || len(rest) > 0 {
			return time.Time{}, false
		}
		c.date, c.day = [10]byte(b[:10]), sec
	}
	h1, h0, m1, m0, s1, s0 := b[11]-'0', b[12]-'0', b[14]-'0', b[15]-'0', b[17]-'0', b[18]-'0'
	if h1 > 2 || h0 > 9 || m1 > 5 || m0 > 9 || s1 > 5 || s0 > 9 || h1 == 2 && h0 > 3 {
		return time.Time{}, false
	}
	if n == 19 {
		c.noOffset = true
	}
	into := int64(h1)*36000 + int64(h0)*3600 + int64(m1)*600 + int64(m0)*60 + int64(s1)*10 + int64(s0)
	return time.Unix(c.day+into, 0).UTC(), true
}

// readDate reads YYYY-MM-DD or YYYYMMDD as seconds since 1970.
func readDate(b []byte) (sec int64, rest []byte, basic, ok bool) {
	var year, month, dom int
	var a, m, d bool
	switch {
	case len(b) >= 10 && b[4] == '-' && b[7] == '-':
		year, a = whole(b[:4])
		month, m = whole(b[5:7])
		dom, d = whole(b[8:10])
		rest = b[10:]
	case len(b) >= 8:
		year, a = whole(b[:4])
		month, m = whole(b[4:6])
		dom, d = whole(b[6:8])
		rest, basic = b[8:], true
	}
	if !a || !m || !d || month < 1 || month > 12 || dom < 1 || year < 1 {
		return 0, nil, false, false
	}
	t := time.Date(year, time.Month(month), dom, 0, 0, 0, 0, time.UTC)
	return t.Unix(), rest, basic, t.Day() == dom // the 31st of February becomes March
}

// readClock reads hh:mm[:ss[.f]] or hhmm[ss[.f]] as seconds of the day. A leap
// second, :60, becomes :59: the clocks of computers have none.
func readClock(b []byte, basic bool) (sec, nano int64, rest []byte, leap, ok bool) {
	var part [3]int64
	n := 0
	for ; n < 3; n++ {
		if n > 0 && !basic {
			if len(b) == 0 || b[0] != ':' {
				break
			}
			b = b[1:]
		}
		if n > 0 && basic && (len(b) == 0 || b[0]-'0' > 9) {
			break
		}
		if len(b) < 2 {
			return 0, 0, nil, false, false
		}
		v, fine := whole(b[:2])
		if !fine {
			return 0, 0, nil, false, false
		}
		part[n] = int64(v)
		b = b[2:]
	}
	if n == 3 && len(b) > 0 && b[0] == '.' {
		unit := int64(100_000_000)
		for b = b[1:]; len(b) > 0 && b[0]-'0' <= 9; b = b[1:] {
			nano += unit * int64(b[0]-'0')
			unit /= 10
		}
	}
	if part[2] == 60 {
		part[2], nano, leap = 59, 0, true
	}
	sec = part[0]*3600 + part[1]*60 + part[2]
	return sec, nano, b, leap, n >= 2 && part[1] < 60 && part[2] < 60 && sec <= day
}

// readOffset reads nothing, Z, ±hh, ±hhmm or ±hh:mm in seconds.
func readOffset(b []byte) (sec int64, zoned, ok bool) {
	if len(b) == 0 {
		return 0, false, true
	}
	if string(b) == "Z" || string(b) == "z" {
		return 0, true, true
	}
	sign := int64(1)
	switch b[0] {
	case '-':
		sign = -1
	case '+':
	default:
		return 0, false, false
	}
	b = b[1:]
	if len(b) == 5 && b[2] == ':' {
		b = append(append(make([]byte, 0, 4), b[:2]...), b[3:]...)
	}
	if len(b) == 2 {
		b = append(append(make([]byte, 0, 4), b...), '0', '0')
	}
	v, fine := whole(b)
	if !fine || len(b) != 4 || v%100 > 59 || v/100 > 23 {
		return 0, false, false
	}
	return sign * int64(v/100*3600+v%100*60), true, true
}

// timeScale says how a number is a time: so many seconds a unit, after an
// origin. A zero unit is a time stamp in words (ISO 8601).
type timeScale struct {
	unit   float64
	origin time.Time
}

// at is the time of a number. Days with six decimals, as in NASA Ames files, are
// coarser than a second is long by rounding; those are put on the whole second
// that they mean.
func (s timeScale) at(x float64) (time.Time, bool) {
	sec := x * s.unit
	const farthest = 1e11 // s, some 3000 years
	if !(math.Abs(sec) < farthest) {
		return time.Time{}, false
	}
	floor := math.Floor(sec)
	frac := sec - floor
	const snap = 0.06 // s: half of 1e-6 days, and a little
	if s.unit >= day {
		if near := math.Round(sec); math.Abs(sec-near) < snap {
			floor, frac = near, 0
		}
	}
	micro := math.Round(frac * 1e6)
	return time.Unix(s.origin.Unix()+int64(floor), int64(s.origin.Nanosecond())+int64(micro)*1000).UTC(), true
}

var timeUnits = map[string]float64{
	"s": 1, "sec": 1, "secs": 1, "second": 1, "seconds": 1,
	"min": 60, "mins": 60, "minute": 60, "minutes": 60,
	"h": 3600, "hr": 3600, "hrs": 3600, "hour": 3600, "hours": 3600,
	"d": day, "day": day, "days": day,
	"ms": 1e-3, "millisecond": 1e-3, "milliseconds": 1e-3,
}

// isoUnit is the unit of time stamps in words.
const isoUnit = "iso"

// rightTime is what a unit of time may be.
const rightTime = `"iso", "seconds since 2026-03-14" (also minutes, hours, days), "seconds of day 2026-03-14" or "day of year 2026"`

// parseTimeUnit reads "iso", "seconds since DATE", "seconds of day DATE", "day of
// year YYYY" (1 is the start of 1 January).
func parseTimeUnit(text string) (timeScale, bool) {
	words := strings.Fields(strings.ToLower(text))
	if len(words) == 1 && words[0] == isoUnit {
		return timeScale{}, true
	}
	if len(words) == 4 && strings.TrimSuffix(words[0], "s") == "day" && words[1] == "of" && words[2] == "year" {
		year, ok := whole([]byte(words[3]))
		if !ok || len(words[3]) != 4 {
			return timeScale{}, false
		}
		return timeScale{day, time.Date(year, 1, 0, 0, 0, 0, 0, time.UTC)}, true
	}
	var origin string
	switch {
	case len(words) >= 3 && (words[1] == "since" || words[1] == "from" || words[1] == "after"):
		origin = strings.Join(words[2:], " ")
	case len(words) == 4 && words[1] == "of" && words[2] == "day":
		origin = words[3]
	default:
		return timeScale{}, false
	}
	unit, known := timeUnits[words[0]]
	var c clock
	origin = strings.TrimSuffix(strings.TrimSuffix(origin, " utc"), " z")
	at, ok := c.read([]byte(strings.ToUpper(origin)))
	return timeScale{unit, at}, known && ok
}
