package fieldfile

import (
	"math"
	"math/rand/v2"
	"strconv"
	"strings"
	"testing"
	"time"
)

// Every number that strconv reads from plain decimal text is read alike, to the
// last bit.
func TestNumberAgreesWithStrconv(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 4))
	for range 200000 {
		x := math.Exp(r.NormFloat64()*20) * float64(r.IntN(3)-1)
		text := strconv.FormatFloat(x, "feg"[r.IntN(3)], r.IntN(20)-1, 64)
		want, err := strconv.ParseFloat(text, 64)
		got, ok := number([]byte(text))
		if ok != (err == nil) || got != want {
			t.Fatalf("%s: got %v %v, want %v", text, got, ok, want)
		}
	}
}

func TestNoNumber(t *testing.T) {
	for _, text := range []string{"", "+", "-", ".", "e5", "1e", "1e+", "1.2.3", "1,5", "0x10", "inf", "NaN", "1_0", " 1", "1 ", "--1", "1e5.5", "1-2", "1e999",
		strings.Repeat("1", 500)} {
		if x, ok := number([]byte(text)); ok {
			t.Errorf("%q is %v", text, x)
		}
	}
}

func TestStamps(t *testing.T) {
	utc := func(s string) time.Time {
		v, err := time.Parse(time.RFC3339Nano, s)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	for text, want := range map[string]string{
		"2026-03-14T08:30:00Z":        "2026-03-14T08:30:00Z",
		"2026-03-14t08:30:00z":        "2026-03-14T08:30:00Z",
		"2026-03-14 08:30:00":         "2026-03-14T08:30:00Z",
		"2026-03-14T08:30":            "2026-03-14T08:30:00Z",
		"2026-03-14":                  "2026-03-14T00:00:00Z",
		"2026-03-14T08:30:00.25Z":     "2026-03-14T08:30:00.25Z",
		"2026-03-14T08:30:00.1234567": "2026-03-14T08:30:00.1234567Z",
		"2026-03-14T08:30:00+01:30":   "2026-03-14T07:00:00Z",
		"2026-03-14T23:30:00-0100":    "2026-03-15T00:30:00Z",
		"2026-03-14T08:30:00+01":      "2026-03-14T07:30:00Z",
		"20260314T083000Z":            "2026-03-14T08:30:00Z",
		"20260314T0830":               "2026-03-14T08:30:00Z",
		"20260314":                    "2026-03-14T00:00:00Z",
		"2026-12-31T23:59:60Z":        "2026-12-31T23:59:59Z",
		"2026-03-14T24:00:00Z":        "2026-03-15T00:00:00Z",
		"2024-02-29T00:00:00Z":        "2024-02-29T00:00:00Z",
		" 2026-03-14T08:30:00Z ":      "2026-03-14T08:30:00Z",
	} {
		var c clock
		got, ok := c.read([]byte(text))
		if !ok || !got.Equal(utc(want)) {
			t.Errorf("%q: got %v %v, want %s", text, got, ok, want)
		}
		if again, ok := c.read([]byte(text)); !ok || !again.Equal(got) {
			t.Errorf("%q read again: %v", text, again)
		}
	}
	for _, text := range []string{"", "2026", "2026-3-14", "14.03.2026", "2026-13-01", "2026-02-29", "2026-00-10", "2026-03-14T", "2026-03-14T8:30", "2026-03-14T08",
		"2026-03-14T08:61", "2026-03-14T25:00:00Z", "2026-03-14T08:30:61Z", "2026-03-14T24:00:01Z", "2026-03-14T08:30:00 UTC+1", "2026-03-14T08:30:00+1", "2026-03-14x08:30:00Z",
		"2026-03-14T08:30:00+25:00", "2026-03-14T08:30:00.5.5", "2026-03-14T0830", "0000-01-01", "2026-03-14T29:00:00Z"} {
		var c clock
		if got, ok := c.read([]byte(text)); ok {
			t.Errorf("%q is %v", text, got)
		}
	}
}

func TestNumbersAsTimes(t *testing.T) {
	for _, c := range []struct {
		unit string
		x    float64
		want string
	}{
		{"seconds since 2026-03-14", 3600, "2026-03-14T01:00:00Z"},
		{"seconds since 2026-03-14 00:00:00", 90000.5, "2026-03-15T01:00:00.5Z"},
		{"seconds since 1970-01-01T00:00:00Z", 1773446400, "2026-03-14T00:00:00Z"},
		{"seconds since 2026-03-14 02:00:00 UTC", -3600, "2026-03-14T01:00:00Z"},
		{"hours since 2026-03-14", 1.5, "2026-03-14T01:30:00Z"},
		{"minutes since 2026-03-14", 90, "2026-03-14T01:30:00Z"},
		{"days since 2026-03-14", 0.041667, "2026-03-14T01:00:00Z"}, // an hour in six decimals
		{"days since 2026-03-14", 0.0000005, "2026-03-14T00:00:00Z"},
		{"day of year 2026", 1, "2026-01-01T00:00:00Z"},
		{"day of year 2024", 60.5, "2024-02-29T12:00:00Z"},
		{"seconds of day 2026-03-14", 86400, "2026-03-15T00:00:00Z"},
	} {
		s, ok := parseTimeUnit(c.unit)
		if !ok {
			t.Errorf("%q is no unit", c.unit)
			continue
		}
		got, ok := s.at(c.x)
		if !ok || got.Format(time.RFC3339Nano) != c.want {
			t.Errorf("%v %s: got %v %v, want %s", c.x, c.unit, got, ok, c.want)
		}
	}
	for _, unit := range []string{"", "seconds", "seconds since", "seconds since yesterday", "fortnights since 2026-03-14", "day of year 26", "hours of 2026-03-14"} {
		if _, ok := parseTimeUnit(unit); ok {
			t.Errorf("%q is a unit", unit)
		}
	}
	if _, ok := (timeScale{unit: 1}).at(1e300); ok {
		t.Error("1e300 s is a time")
	}
}
