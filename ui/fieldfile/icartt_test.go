package fieldfile

import (
	"math"
	"strings"
	"testing"
	"time"
)

// icarttFile is a small correct file, by lines, so that a test can damage one.
func icarttFile() []string {
	lines := []string{"36, 1001, V02_2016", "Last, First; Other, Name", "An organisation", "A counter", "A mission", "1, 1",
		"2026, 03, 14, 2026, 05, 02", "60", "Time_Start, seconds, Time_Start, start", "3",
		"1, 0.1, 1", "-9999, -99999, -9999.99",
		"Time_Stop, seconds", "CCN, cm-3, AerMP_CCN, CCN at 0.30 % supersaturation, at STP", "T, K, Temperature, air temperature",
		"1", "a special comment",
		"18", "free text before the keywords",
		"PI_CONTACT_INFO: nobody", "PLATFORM : a tower", "LOCATION: N/A", "ASSOCIATED_DATA: N/A", "INSTRUMENT_INFO: a counter", "  with a second line",
		"DATA_INFO: N/A", "UNCERTAINTY: N/A, 12, 0.5", "ULOD_FLAG: -7777", "ULOD_VALUE: N/A, 20000, N/A", "LLOD_FLAG: -8888", "LLOD_VALUE: N/A, 5, N/A",
		"DM_CONTACT_INFO: N/A", "PROJECT_INFO: N/A", "STIPULATIONS_ON_USE: N/A", "OTHER_COMMENTS: N/A", "REVISION: R1", "R1: newer", "R0: older", "Time_Start, Time_Stop, CCN, T"}
	lines[17] = "21"
	lines[0] = "39, 1001, V02_2016"
	return append(lines,
		"0, 60, 1000, 280.5",
		"60, 120, -99999.0, -9999.99",
		"120,180,-8888,-7777",
		"180 , 240 , -88888 , 281",
		"86400, 86460, 2000, 282")
}

func byLines(lines []string) string { return strings.Join(lines, "\n") + "\n" }

func TestICARTTHeaderAndStates(t *testing.T) {
	f := open(t, byLines(icarttFile()))
	if f.Format != ICARTT || f.Investigator != "Last, First; Other, Name" || f.Mission != "A mission" ||
		!f.Begin.Equal(time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)) || !f.Revised.Equal(time.Date(2026, 5, 2, 0, 0, 0, 0, time.UTC)) || f.Interval != time.Minute {
		t.Errorf("header %+v", f.Header)
	}
	for key, want := range map[string]string{"PLATFORM": "a tower", "INSTRUMENT_INFO": "a counter\nwith a second line", "REVISION": "R1", "R0": "older"} {
		if got := f.Attribute(key); got != want {
			t.Errorf("%s is %q, want %q", key, got, want)
		}
	}
	if len(f.Comments) != 2 {
		t.Errorf("comments %q", f.Comments)
	}
	if c := f.Columns[2]; c.Unit != "cm-3" || c.Standard != "AerMP_CCN" || c.Long != "CCN at 0.30 % supersaturation, at STP" || c.Uncertainty != 12 || c.Lower != 5 || c.Upper != 20000 {
		t.Errorf("column %+v", c)
	}
	want := []string{"Time_Start=start_time in seconds since 2026-03-14", "Time_Stop=end_time in seconds since 2026-03-14", "CCN=ccn @0.3% in cm-3 at stp", "T=temperature in K"}
	if got := f.Mapping(); strings.Join(got, "|") != strings.Join(want, "|") {
		t.Errorf("mapping %q, want %q", got, want)
	}
	if n := f.Notes(); len(n) != 0 {
		t.Errorf("notes on a correct file: %v", n)
	}
	got := all(t, f)
	cells := [][2]Cell{{{1e8, Value}, {280.5, Value}}, {{}, {}}, {{5e6, Below}, {math.NaN(), Above}}, {{5e6, Below}, {281, Value}}, {{2e8, Value}, {282, Value}}}
	for i, w := range cells {
		if !sameCell(got[i].Cells[2], w[0]) || !sameCell(got[i].Cells[3], w[1]) {
			t.Errorf("record %d: %v, want %v", i, got[i].Cells[2:], w)
		}
	}
	if last := got[4]; !last.Start.Equal(time.Date(2026, 3, 15, 0, 0, 0, 0, time.UTC)) || last.End.Sub(last.Start) != time.Minute {
		t.Errorf("after midnight: %v to %v", last.Start, last.End)
	}
}

func TestICARTTDamagedHeaders(t *testing.T) {
	for name, c := range map[string]struct {
		at, line int // index in the file, line of the error
		text     string
		says     string
	}{
		"dates too few":          {6, 7, "2026, 03, 14", "line 7: year, month, day"},
		"no such date":           {6, 7, "2026, 02, 30, 2026, 05, 02", "line 7"},
		"interval a word":        {7, 8, "often", "line 8"},
		"number of variables":    {9, 10, "three", "the number of variables: a whole number"},
		"no variables":           {9, 10, "0", "no variables"},
		"absurd number":          {9, 10, "999999999", "whole number"},
		"too few scales":         {10, 11, "1, 1", "2 numbers: want the scale factors: 3 numbers"},
		"too many codes":         {11, 12, "-9999, -9999, -9999, -9999", "4 numbers: want the missing-data codes: 3"},
		"scale a word":           {10, 11, "1, one, 1", `"one" is no number`},
		"scale of zero":          {10, 14, "1, 0, 1", "scale factor"},
		"special comment number": {15, 16, "one", "number of special comments"},
		"normal comment number":  {17, 18, "-3", "number of normal comments"},
		"row too short":          {39, 40, "0, 60, 1000", "3 values instead of 4"},
		"row too long":           {39, 40, "0, 60, 1000,5, 280,5", "6 values instead of 4: want one value for each variable and the time; decimal commas"},
		"blanks as delimiter":    {39, 40, "0 60 1000 280.5", "parted by commas"},
		"value a word":           {39, 40, "0, 60, many, 280.5", `"many" is no number (column CCN)`},
		"value empty":            {39, 40, "0, 60, , 280.5", `"" is no number`},
		"time a word":            {39, 40, "noon, 60, 1000, 280.5", `"noon" is no time`},
		"empty line inside":      {40, 41, "", "an empty line between records"},
	} {
		t.Run(name, func(t *testing.T) {
			lines := icarttFile()
			lines[c.at] = c.text
			err := failure(byLines(lines), Options{})
			if err == nil || !strings.Contains(err.Error(), c.says) || !strings.HasPrefix(err.Error(), "f:"+itoa(c.line)+":") {
				t.Errorf("got %v, want line %d and %q", err, c.line, c.says)
			}
		})
	}
}

// Wherever the file is cut, there is an error or fewer records, never a panic and
// never a value that was not there.
func TestICARTTCutAnywhere(t *testing.T) {
	text := byLines(icarttFile())
	header := strings.LastIndex(text, "Time_Start") // the last line of the header
	for n := range text {
		f, err := Open("f", strings.NewReader(text[:n]), Options{})
		if err == nil && f.Format != ICARTT {
			continue // the first line alone is CSV
		}
		if n < header && err == nil {
			t.Fatalf("cut at %d inside the header: no error", n)
		}
		if err == nil {
			got, _ := readAll(f)
			if len(got) > 5 {
				t.Fatalf("cut at %d: %d records", n, len(got))
			}
		}
	}
}

func TestICARTTNotes(t *testing.T) {
	for code, change := range map[string]func([]string){
		"nlhead":          func(l []string) { l[0] = "40, 1001" },
		"names":           func(l []string) { l[38] = "Time_Start, Time_Stop, CCN, Temperature" },
		"keywords":        func(l []string) { l[35] = "REVISON: R1" }, // seen in the wild
		"short_name":      func(l []string) { l[14] = "2T, K" },
		"llod_is_missing": func(l []string) { l[11] = "-9999, -8888, -9999.99" },
		"nines":           func(l []string) { l[39] = "0, 60, -9999, 280" },
		"time_still":      func(l []string) { l[40] = "0, 60, 1, 280" },
		"not_ascii":       func(l []string) { l[2] = "Zürich" },
		"time_back":       func(l []string) { l[40] = "-60, 0, 1, 280" },
		"revision_date":   func(l []string) { l[6] = "2026, 03, 14, 0, 0, 0" },
	} {
		lines := icarttFile()
		change(lines)
		f := open(t, byLines(lines))
		if len(all(t, f)) != 5 {
			t.Errorf("%s: records are lost", code)
		}
		if !noted(f, code) {
			t.Errorf("%s is not noted: %v", code, f.Notes())
		}
	}
}

// V1.1 files have only name and unit; real files end with CR LF.
func TestICARTTOldAndOtherLineEnds(t *testing.T) {
	lines := icarttFile()
	lines[0], lines[13], lines[14] = "39,1001", "CCN, cm-3", "T, K, air temperature"
	f := open(t, strings.Join(lines, "\r\n")+"\r\n\r\n", "CCN=ccn @0.3%")
	if got := all(t, f); len(got) != 5 || got[0].Cells[2].X != 1e8 {
		t.Errorf("got %v", got)
	}
}

func TestICARTTLenientBlanks(t *testing.T) {
	lines := icarttFile()
	for i := 39; i < len(lines); i++ {
		lines[i] = strings.ReplaceAll(lines[i], ",", " ")
	}
	lines[40] = lines[40] + "\n\n"
	f, err := Open("f", strings.NewReader(byLines(lines)), Options{Lenient: true})
	if err != nil {
		t.Fatal(err)
	}
	if got := all(t, f); len(got) != 5 || got[3].Cells[3].X != 281 {
		t.Errorf("got %v", got)
	}
}

// A limit code that is no row of digits is compared as it stands, and one code
// may serve as another file's value.
func TestOtherLimitCodes(t *testing.T) {
	lines := icarttFile()
	lines[27], lines[29] = "ULOD_FLAG: 99", "LLOD_FLAG: -1"
	lines[41] = "120,180,-1,99"
	got := all(t, open(t, byLines(lines)))
	if got[2].Cells[2].State != Below || got[2].Cells[3].State != Above || !alike(got[3].Cells[2].X, -88888e5) {
		t.Errorf("got %v and %v", got[2].Cells, got[3].Cells)
	}
}
