package answer

import (
	"context"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/scenario"
)

// written is a new file with that text.
func written(t testing.TB, name, text string) string {
	t.Helper()
	file := filepath.Join(t.TempDir(), name)
	if err := os.WriteFile(file, []byte(text), 0o644); err != nil {
		t.Fatal(err)
	}
	return file
}

// ofText is a scenario of one file with that text.
func ofText(t *testing.T, text string, lines ...string) scenario.Scenario {
	t.Helper()
	s := scenario.Default()
	s.Data = []scenario.DataFile{{Name: written(t, "data.csv", text)}}
	for _, l := range lines {
		s.Map = append(s.Map, scenario.MapLine{Text: l})
	}
	return s
}

func allRecords(t *testing.T, s scenario.Scenario) ([]*observation, campaignFacts) {
	t.Helper()
	var out []*observation
	facts, err := campaign(context.Background(), stationEnv(), s, func(o *observation) error {
		out = append(out, o)
		return nil
	})
	if err != nil {
		t.Fatal(err)
	}
	return out, facts
}

func rejectedFor(facts campaignFacts, part string) int {
	n := 0
	for _, r := range facts.rejected {
		if strings.Contains(r.Reason, part) {
			n += r.Count
		}
	}
	return n
}

func isNoted(facts campaignFacts, code string) bool {
	for _, n := range facts.notes {
		if n.Code == code {
			return true
		}
	}
	return false
}

// stepping is a counter that steps through supersaturations, ten readings of a minute
// at each, the first three of which are half of what they should be: 1000 s/% per cm³.
func stepping(column string, row func(level, n float64) string) string {
	var b strings.Builder
	b.WriteString("time," + column + "\n")
	at := time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)
	for range 2 {
		for _, level := range []float64{0.1, 0.2, 0.4} {
			for i := range 10 {
				n := 1000 * level
				if i < 3 {
					n /= 2
				}
				fmt.Fprintf(&b, "%s,%s\n", at.Format(time.RFC3339), row(level, n))
				at = at.Add(time.Minute)
			}
		}
	}
	return b.String()
}

// Readings before the counter has settled are left out before anything is averaged,
// but not where no level is held over several readings.
func TestSettling(t *testing.T) {
	text := stepping("supersaturation (%),ccn at STP (cm-3)", func(level, n float64) string { return fmt.Sprint(level, ",", n) })
	for name, every := range map[string]scenario.Measure{"readings": {Word: "records"}, "half hours": {Number: 1800}} {
		t.Run(name, func(t *testing.T) {
			s := ofText(t, text)
			s.Every = every
			records, facts := allRecords(t, s)
			// Five of six levels: how long the first one had been held is not known.
			if n := rejectedFor(facts, "supersaturation changed"); n != 15 {
				t.Errorf("%d readings are left out, want 15: %v", n, facts.rejected)
			}
			own := 0
			for _, o := range records {
				for _, r := range o.rejected {
					own += r.Count
				}
				for _, c := range o.counts {
					if want := 1e9 * 100 * c.s; o.start.Hour() > 0 && math.Abs(c.count/want-1) > 1e-9 || c.s > 0.0011 && math.Abs(c.count/want-1) > 1e-9 {
						t.Errorf("%v at %g: %g per m³, want %g", o.start, c.s, c.count, want)
					}
				}
			}
			if own != 15 {
				t.Errorf("records have %d readings left out, want 15", own)
			}
		})
	}
	s := ofText(t, text)
	s.Rules = []scenario.Rule{{Key: spectrum.Settling, Flag: scenario.Measure{Word: "never"}, Reject: scenario.Measure{Word: "never"}}}
	if _, facts := allRecords(t, s); len(facts.rejected) > 0 {
		t.Errorf("a rule that never rejects left out %v", facts.rejected)
	}
	var means strings.Builder
	means.WriteString("time,supersaturation (%),ccn at STP (cm-3)\n")
	for i, level := range []float64{0.1, 0.2, 0.4, 0.1, 0.2, 0.4} {
		fmt.Fprintf(&means, "2026-03-14T00:%02d:00Z,%g,%g\n", 5*i, level, 1000*level)
	}
	if _, facts := allRecords(t, ofText(t, means.String())); len(facts.rejected) > 0 {
		t.Errorf("of means of levels %v are left out", facts.rejected)
	}
}

// Counted drops with flow and time are a number with the uncertainty of counting.
func TestCountsByFlow(t *testing.T) {
	// 50 cm³/min for 60 s are 50 cm³.
	text := "start_time,end_time,supersaturation (%),drops,flow (cm3/min),seconds (s)\n" +
		"2026-03-14T00:00:00Z,2026-03-14T00:01:00Z,0.2,10000,50,60\n" +
		"2026-03-14T00:01:00Z,2026-03-14T00:02:00Z,0.2,5,50,60\n"
	records, facts := allRecords(t, ofText(t, text, "drops=ccn_counted", "flow (cm3/min)=sample_flow", "seconds (s)=sampling_time"))
	if len(records) != 2 || len(records[0].counts) != 1 {
		t.Fatalf("%d records, the first with %v", len(records), records[0])
	}
	if c := records[0].counts[0]; math.Abs(c.count/200e6-1) > 1e-12 || math.Abs(c.uncertainty/2e6-1) > 1e-12 {
		t.Errorf("%g ± %g per m³, want 2e8 ± 2e6", c.count, c.uncertainty)
	}
	if n := rejectedFor(facts, "counted drops"); n != 1 || len(records[1].counts) != 0 {
		t.Errorf("%d are left out for too few drops, want 1", n)
	}
}

// The instrument's own word on its temperatures counts.
func TestStability(t *testing.T) {
	text := "time,ccn @0.2% at STP (cm-3),status\n2026-03-14T00:00:00Z,300,stable\n2026-03-14T00:05:00Z,400,unstable\n2026-03-14T00:10:00Z,500,warm\n"
	_, facts := allRecords(t, ofText(t, text, "ccn @0.2% at STP (cm-3)=ccn @0.2% in cm-3 at stp", "status=status"))
	if n := rejectedFor(facts, "stable temperatures"); n != 1 {
		t.Errorf("%d are left out for temperatures, want 1: %v", n, facts.rejected)
	}
}

// Concentrations come to 273.15 K and 1013.25 hPa, uncertainties with them; without
// temperature and pressure those at ambient air are left out, and counted.
func TestStateOfAir(t *testing.T) {
	header := "time,ccn (cm-3),cn (cm-3),u (cm-3),temperature (C),pressure (hPa)\n"
	lines := []string{"ccn (cm-3)=ccn @0.2% in cm-3 at ambient", "cn (cm-3)=cn in cm-3 at ambient", "u (cm-3)=ccn_uncertainty @0.2% in cm-3 at ambient"}
	records, facts := allRecords(t, ofText(t, header+
		"2026-03-14T00:00:00Z,300,1000,30,27,900\n2026-03-14T00:05:00Z,300,1000,30,,900\n", lines...))
	// The ideal gas: 300.15 K and 900 hPa to 273.15 K and 1013.25 hPa.
	factor := 1013.25 / 900 * 300.15 / 273.15
	if len(records[0].counts) != 1 {
		t.Fatalf("the first record has %v", records[0].counts)
	}
	if c := records[0].counts[0]; math.Abs(c.count/(300e6*factor)-1) > 1e-12 || math.Abs(c.uncertainty/(30e6*factor)-1) > 1e-12 {
		t.Errorf("%g ± %g per m³, want %g ± %g", c.count, c.uncertainty, 300e6*factor, 30e6*factor)
	}
	if n := rejectedFor(facts, "ambient air"); n != 1 || !isNoted(facts, "air-not-known") {
		t.Errorf("%d are left out for air that is not known, want 1, with a note: %v", n, facts)
	}
	_, facts = allRecords(t, ofText(t, "time,ccn (cm-3)\n2026-03-14T00:00:00Z,300\n", "ccn (cm-3)=ccn @0.2% in cm-3"))
	if !isNoted(facts, "air-not-stated") {
		t.Error("nothing is said of air that the data do not state")
	}
}

// A composition of which a part is missing is none; what was never measured is said.
func TestIncompleteComposition(t *testing.T) {
	text := "time,organic (ug/m3),sulfate (ug/m3),ammonium (ug/m3)\n2026-03-14T00:00:00Z,1,1,0.37\n2026-03-14T00:05:00Z,,1,0.37\n2026-03-14T00:10:00Z,,,\n"
	records, facts := allRecords(t, ofText(t, text))
	if k := records[0].kappa; !(k > 0.1 && k < 0.61) {
		t.Errorf("κ of organic matter and ammonium sulfate is %g", k)
	}
	if !math.IsNaN(records[1].kappa) || !math.IsNaN(records[2].kappa) || !isNoted(facts, "composition-incomplete") {
		t.Errorf("κ without organic matter is %g, notes %v", records[1].kappa, facts.notes)
	}
	if isNoted(facts, "composition-in-part") {
		t.Error("said to be in part what has organic matter and sulfate")
	}
	_, facts = allRecords(t, ofText(t, "time,sulfate (ug/m3),ammonium (ug/m3)\n2026-03-14T00:00:00Z,1,0.37\n"))
	if !isNoted(facts, "composition-in-part") {
		t.Error("nothing is said of organic matter that was not measured")
	}
}

// A burst of local pollution is flagged once the usual number is known.
func TestSpikes(t *testing.T) {
	var b strings.Builder
	b.WriteString("time,cn at STP (cm-3),ccn (cm-3)\n")
	for i := range 40 {
		cn := 1000
		if i == 30 {
			cn = 5000
		}
		fmt.Fprintf(&b, "2026-03-14T00:%02d:00Z,%d,300\n", i, cn)
	}
	records, _ := allRecords(t, ofText(t, b.String(), "ccn (cm-3)=ccn @0.2% in cm-3 at stp"))
	for i, o := range records {
		if is := o.counts[0].flag == spectrum.Spike; is != (i == 30) {
			t.Errorf("record %d is flagged %q", i+1, o.counts[0].flag)
		}
	}
}

// A line of the mapping counts in the files that have its column, or in the one that
// it names, and what is shown is read back.
func TestMapOfSeveralFiles(t *testing.T) {
	for name, c := range map[string]struct {
		line  string
		says  string // of the error; "": none
		lost  string // a line of the mapping that is gone
		lines int    // how many
	}{
		"one of three":     {line: "temperature (C)=unused", lost: "station.csv: temperature (C)", lines: 1},
		"by file":          {line: "sizes.nas: dn01=unused", lost: "sizes.nas: dn01", lines: 1},
		"in two":           {line: "start_time=start_time"},
		"of another file":  {line: "station.csv: dn01=unused", says: "station.csv: no column"},
		"of no file":       {line: "zzz=unused", says: "no file of the data has a column"},
		"near":             {line: "temperature (X)=unused", says: "want temperature (C)?"},
		"no quantity":      {line: "temperature (C)=temprature in C", says: "temperature?"},
		"no line":          {line: "zzz", says: "want column=quantity"},
		"drives nothing":   {line: "\x1b[2Jzzz=unused", says: `column "[2Jzzz"`},
		"a pattern":        {line: "CCN_0p*=unused", lost: "CCN_0p10", lines: 4},
		"name with an end": {line: "=unused", says: "no file of the data"},
	} {
		t.Run(name, func(t *testing.T) {
			s := scenario.Default()
			usual, err := openData(stationEnv(), s)
			if err != nil {
				t.Fatal(err)
			}
			usual.close()
			s.Map = []scenario.MapLine{{Text: c.line}}
			d, err := openData(stationEnv(), s)
			if c.says != "" {
				var in *InputError
				if !errors.As(err, &in) || in.Input != "map" || !strings.Contains(in.Text, c.says) || strings.ContainsRune(in.Text, 0x1b) {
					t.Errorf("error %v, want one on map that says %q", err, c.says)
				}
				return
			}
			if err != nil {
				t.Fatal(err)
			}
			d.close()
			if n := len(usual.mapping) - len(d.mapping); n != c.lines || c.lost != "" && strings.Contains(strings.Join(d.mapping, "\n"), c.lost) {
				t.Errorf("%d lines are gone, want %d: %v", n, c.lines, d.mapping)
			}
		})
	}
	s := scenario.Default()
	before, err := openData(stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	before.close()
	for _, line := range before.mapping {
		s.Map = append(s.Map, scenario.MapLine{Text: line})
	}
	after, err := openData(stationEnv(), s)
	if err != nil {
		t.Fatal(err)
	}
	after.close()
	if got, want := strings.Join(after.mapping, "\n"), strings.Join(before.mapping, "\n"); got != want {
		t.Errorf("the mapping that was shown is read back as\n%s\nwant\n%s", got, want)
	}
}
