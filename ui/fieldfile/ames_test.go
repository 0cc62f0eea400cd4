package fieldfile

import (
	"slices"
	"strings"
	"testing"
	"time"
)

// amesFile is a small EBAS file by lines; its records begin at index 27.
func amesFile() []string {
	lines := []string{"27 1001", "Last, First", "An organisation", "A spectrometer", "EMEP", "1 1", "2026 03 14 2026 05 02", "0.041667",
		"Days from the file reference point (start_time)", "5", "1 1 1 1 1", "9999.999999 9999.99 9.999 9999.99 9.999999999",
		"end_time of measurement, days from the file reference point",
		"particle_number_size_distribution, 1/cm3, D=50.00 nm, Statistics=arithmetic mean", "numflag, no unit",
		"cloud_condensation_nuclei_number_concentration, 1/cm3, Supersaturation=0.30 %", "numflag, no unit",
		"0", "8", "Data definition:     EBAS_1.1", "Startdate:           20260314000000", "Data level:          2", "Timezone:            UTC",
		"Station name:        An invented one", "Matrix:              aerosol", "a line without a key", "start_time end_time n50 flag_n ccn flag_ccn"}
	return append(lines,
		"0.000000 0.041667 1000.50 0.000 200.00 0.000000000",
		"0.041667 0.083333 9999.99 0.999 210.00 0.147559000",
		"0.083333 0.125000 1100.00 0.460 220.00 0.460100000",
		"0.125000 0.166667 1200.00 0.46 230.00 0.781",
		"0.166667 0.208333 1300.00 9.999 240.00 0.123")
}

func TestEBAS(t *testing.T) {
	f := open(t, byLines(amesFile()))
	if f.Format != NASAAmes || f.Interval != time.Hour || f.Attribute("station name") != "An invented one" || !slices.Contains(f.Comments, "a line without a key") {
		t.Errorf("header %+v", f.Header)
	}
	want := []string{"start_time=start_time in days since 2026-03-14T00:00:00Z", "end_time=end_time in days since 2026-03-14T00:00:00Z",
		"n50=dN/dlog10D @50nm in 1/cm3 at stp", "flag_n=flag", "ccn=ccn @0.3% in 1/cm3", "flag_ccn=flag"}
	if got := f.Mapping(); !slices.Equal(got, want) {
		t.Errorf("mapping %q, want %q", got, want)
	}
	got := all(t, f)
	states := [][2]Cell{{{1000.5e6, Value}, {200e6, Value}}, {{}, {210e6, Value}}, {{}, {220e6, Value}}, {{}, {230e6, Below}}, {{}, {240e6, Value}}}
	flags := [][]int{nil, {147, 559}, {460, 100}, {781}, {123}} // of the second flag column; 147559 is C40
	for i, w := range states {
		if !sameCell(got[i].Cells[2], w[0]) || !sameCell(got[i].Cells[4], w[1]) {
			t.Errorf("record %d: %v %v, want %v", i, got[i].Cells[2], got[i].Cells[4], w)
		}
		if !slices.Equal(got[i].Flags[1], flags[i]) {
			t.Errorf("record %d: flags %v, want %v", i, got[i].Flags[1], flags[i])
		}
	}
	if s := got[1].Start; !s.Equal(time.Date(2026, 3, 14, 1, 0, 0, 0, time.UTC)) || !got[1].End.Equal(s.Add(time.Hour)) {
		t.Errorf("times %v to %v", got[1].Start, got[1].End)
	}
	if d := f.Dropped(); d[460] != 2 || d[999] != 1 || len(d) != 2 {
		t.Errorf("dropped %v, want 460 twice and 999 once (the missing value was none to drop)", d)
	}
	for _, code := range []string{"flag123", "flag_missing", "dropped460"} {
		if !noted(f, code) {
			t.Errorf("%s is not noted: %v", code, f.Notes())
		}
	}
}

func TestAmesDamaged(t *testing.T) {
	for name, c := range map[string]struct {
		at, line int
		text     string
		says     string
	}{
		"dates":          {6, 7, "2026 13 14 2026 05 02", "line 7"},
		"interval":       {7, 8, "-1", "line 8"},
		"too many codes": {11, 12, "9 9 9 9 9 9", "6 numbers: want the missing-data codes: 5"},
		"code a word":    {11, 12, "9 9 x 9 9", `"x" is no number`},
		"flag a word":    {27, 28, "0 0.04 1 ok 1 0.000", `"ok" is no EBAS flag (column flag_n)`},
		"flag above one": {27, 28, "0 0.04 1 1.000 1 0.000", `"1.000" is no EBAS flag`},
		"flag exponent":  {27, 28, "0 0.04 1 1e-3 1 0.000", "no EBAS flag"},
		"too long":       {27, 28, "0 0.04 1 0.000 1 0.000 7", "7 values instead of 6"},
		"too short":      {28, 29, "0.04 0.08 1 0.000", "4 values instead of 6"},
		"decimal comma":  {27, 28, "0 0.04 1,5 0.000 1 0.000", `"1,5" is no number`},
	} {
		t.Run(name, func(t *testing.T) {
			lines := amesFile()
			lines[c.at] = c.text
			err := failure(byLines(lines), Options{})
			if err == nil || !strings.Contains(err.Error(), c.says) || !strings.HasPrefix(err.Error(), "f:"+itoa(c.line)+":") {
				t.Errorf("got %v, want line %d and %q", err, c.line, c.says)
			}
		})
	}
	text := byLines(amesFile())
	says(t, failure(text[:len(text)-20], Options{}), 32, 0, "the file ends inside a record")
}

// Plain NASA Ames: lists and records wrap, Fortran exponents, the unit of time in
// line 9, scale factors.
func TestPlainAmesWraps(t *testing.T) {
	text := byLines([]string{"19 1001", "A", "B", "C", "D", "1 1", "2026 03 14 2026 05 02", "60", "Elapsed time in seconds from 0000 UT", "3",
		"1.0D0 1.0E0", "0.1", "9999 9999", "99999",
		"cloud condensation nuclei at 0.3 % (ccn), 1/cm3", "air temperature, K", "kappa", "0", "0",
		"0 100", "280.0 3", "60 9999", "281 99999", "120 1.5D2 ", "282", "4"})
	f := open(t, text)
	want := []string{"Elapsed time in seconds from 0000 UT=time in seconds since 2026-03-14T00:00:00Z"}
	if got := f.Mapping(); got[0] != want[0] {
		t.Errorf("mapping %q", got)
	}
	got := all(t, f)
	tenth := 0.1
	if len(got) != 3 || got[0].Cells[3].X != 3*tenth || got[1].Cells[1].State != Missing || got[1].Cells[3].State != Missing || got[2].Cells[1].X != 150e6 {
		t.Errorf("got %v", got)
	}
	if f.Interval != time.Minute || !got[2].Start.Equal(f.Begin.Add(2*time.Minute)) {
		t.Errorf("times %v every %v", got[2].Start, f.Interval)
	}
	if !noted(f, "wrapped") {
		t.Error("wrapping is not noted")
	}
}

func TestAmesWithoutAUnitOfTimeAsks(t *testing.T) {
	lines := amesFile()
	lines[8], lines[19] = "When it was", "Data definition:     none"
	f := open(t, byLines(lines))
	if !noted(f, "ask") {
		t.Errorf("nothing asked: %v", f.Notes())
	}
	if err := f.Use(f.Columns[0].Name + "=time in days since 2026-03-14"); err != nil {
		t.Fatal(err)
	}
	if got := all(t, f); !got[1].Start.Equal(time.Date(2026, 3, 14, 1, 0, 0, 0, time.UTC)) {
		t.Errorf("time %v", got[1].Start)
	}
}

// The long layout of EBAS: one record a setting, the supersaturation beside the
// count, its uncertainty a second column of the same parameter.
func TestEBASLongLayout(t *testing.T) {
	const parameter = "cloud_condensation_nuclei_number_concentration, 1/cm3"
	lines := amesFile()
	lines[9], lines[10], lines[11] = "6", "1 1 1 1 1 1", "9999.999999 99.99 9999.99 9999.99 9999.99 9.999"
	lines[13], lines[14], lines[15] = "supersaturation, %", parameter, parameter+", Statistics=uncertainty"
	lines[16] = parameter + ", Statistics=percentile:15.87\nnumflag, no unit"
	lines[0], lines[26] = "28 1001", "start_time end_time ss ccn unc p15 flag"
	lines = append(lines[:27], "0.0 0.041667 0.10 100.00 3.00 90.00 0.000", "0.041667 0.083333 0.50 500.00 9.00 400.00 0.000")
	f := open(t, byLines(lines))
	want := []string{"ss=supersaturation in %", "ccn=ccn in 1/cm3", "unc=ccn_uncertainty in 1/cm3", "flag=flag"}
	if got := f.Mapping()[2:]; !slices.Equal(got, want) {
		t.Errorf("mapping %q, want %q; notes %v", got, want, f.Notes())
	}
	got := samples(t, f)
	if len(got) != 2 || got[1].Counts[0].At() != 0.005 || got[1].Counts[0].N.X != 5e8 || got[1].Counts[0].Uncertainty.X != 9e6 {
		t.Errorf("samples %+v", got)
	}
}
