package answer

import (
	"encoding/json"
	"math"
	"strconv"
	"testing"
)

func TestNumberJSON(t *testing.T) {
	for _, x := range []float64{0, 1, -1, 0.1, 1.0 / 3, 1e-7, 4.9e-324, math.MaxFloat64, -2.5e-5, 123456789.125} {
		text, err := json.Marshal(Number(x))
		if err != nil {
			t.Fatal(err)
		}
		if back, err := strconv.ParseFloat(string(text), 64); err != nil || back != x {
			t.Errorf("%g is written as %s and read back as %g (%v)", x, text, back, err)
		}
	}
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1)} {
		if text, err := json.Marshal(Number(x)); err != nil || string(text) != "null" {
			t.Errorf("%g is written as %s (%v), want null", x, text, err)
		}
	}
}

func TestFiguresInSentences(t *testing.T) {
	for _, c := range []struct{ got, want string }{
		{percent(0.00094), "0.094 %"},
		{percent(0.0149934), "1.499 %"},
		{percent(0.0000612), "0.00612 %"},
		{percent(0.15321), "15.32 %"},
		{percent(0), "0.000 %"},
		{percent(-0.0012), "-0.120 %"},
		{humidity(0.95), "95.0 %"},
		{humidity(0.9925), "99.25 %"},
		{humidity(1.0003), "100.03 %"},
		{micrometres(0.764e-6), "0.764 µm"},
		{micrometres(12.34e-6), "12.3 µm"},
		{micrometres(123.4e-6), "123 µm"},
		{micrometres(0.9996e-6), "1.00 µm"},
		{activity(0.999527), "0.99953"},
		{activity(0.9999951), "0.9999951"},
		{activity(0.5), "0.50000"},
		{activity(1), "1.00000"},
		{digits(10.94, 3), "10.9"},
		{digits(0.0432, 3), "0.0432"},
	} {
		if c.got != c.want {
			t.Errorf("got %q, want %q", c.got, c.want)
		}
	}
}

func TestFill(t *testing.T) {
	value := func(slot string) string { return "<" + slot + ">" }
	for in, want := range map[string]string{
		"of {a} and {b-c},": "of <a> and <b-c>,",
		"no slot":           "no slot",
		"open {a":           "open {a",
		"":                  "",
	} {
		if got := Fill(in, value); got != want {
			t.Errorf("%q gives %q, want %q", in, got, want)
		}
	}
}
