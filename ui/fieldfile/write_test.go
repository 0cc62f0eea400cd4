package fieldfile

import (
	"bytes"
	"math"
	"strings"
	"testing"
	"time"
)

var writtenColumns = []Output{
	{Role: Role{Quantity: CCN, At: 0.003, Basis: Standard}},
	{Role: Role{Quantity: CCN, At: 0.01, Unit: "cm-3"}},
	{Role: Role{Quantity: PerLogDiameter, At: 5e-8, Unit: "cm-3"}},
	{Role: Role{Quantity: PerLogDiameter, At: math.Sqrt(45e-9 * 55e-9), From: 45e-9, To: 55e-9}},
	{Role: Role{Quantity: Temperature}},
	{Role: Role{Quantity: Kappa}},
	{Role: Role{Quantity: Supersaturation}},
	{Role: Role{Quantity: Organic, Unit: "ug/m3"}},
}

func writtenRecords() []Record {
	begin := time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)
	var out []Record
	for i := range 4 {
		r := Record{Start: begin.Add(time.Duration(i) * time.Hour), End: begin.Add(time.Duration(i+1)*time.Hour - 500*time.Millisecond)}
		for j, x := range []float64{1.2345678901234567e8, 2e9, 3e9 / 7, 4e9, 281.15, 0.3, 0.00123, 5.5e-9} {
			c := Cell{x * (1 + float64(i)/10), Value}
			if i == 1 && j%2 == 0 {
				c = Cell{}
			}
			r.Cells = append(r.Cells, c)
		}
		out = append(out, r)
	}
	return out
}

// What is written is read back by the guess alone, with its states and, in SI,
// to 1e-15.
func TestWrittenCSVComesBack(t *testing.T) {
	records := writtenRecords()
	records[2].Cells[0] = Cell{5e6, Below}
	records[3].Cells[1] = Cell{7e9, Above}
	var b bytes.Buffer
	w, err := NewCSVWriter(&b, writtenColumns)
	if err != nil {
		t.Fatal(err)
	}
	for i := range records {
		if err := w.Write(&records[i]); err != nil {
			t.Fatal(err)
		}
	}
	if err := w.Flush(); err != nil {
		t.Fatal(err)
	}
	first, _, _ := strings.Cut(b.String(), "\r\n")
	want := "start_time,end_time,ccn_at_0.3_percent_stp_per_m3,ccn_at_1_percent_per_cm3,dN/dlog10D_at_50_nm_per_cm3,dN/dlog10D_at_45..55_nm_per_m3," +
		"temperature_k,kappa,supersaturation_percent,organic_ug_per_m3"
	if first != want {
		t.Errorf("names %q,\nwant  %q", first, want)
	}
	comesBack(t, b.String(), records)
}

func TestWrittenICARTTComesBack(t *testing.T) {
	records := writtenRecords()
	records[2].Cells[0].State = Below
	records[3].Cells[1].State = Above
	var b bytes.Buffer
	w, err := NewICARTTWriter(&b, ICARTTHeader{Investigator: "Nobody, Really\x1b[2J", Begin: records[0].Start, Revised: records[0].Start,
		Keywords: map[string]string{"PLATFORM": "a tower\nwith two lines", "LOCATION": "Zürich"}, Comments: []string{"one"}, RevisionText: "first"}, writtenColumns)
	if err != nil {
		t.Fatal(err)
	}
	for i := range records {
		if err := w.Write(&records[i]); err != nil {
			t.Fatal(err)
		}
	}
	if err := w.Write(&records[0]); err == nil {
		t.Error("time may run back")
	}
	if err := w.Write(&Record{Start: records[3].End, End: records[3].End, Cells: append([]Cell{{-1e13, Value}}, records[0].Cells[1:]...)}); err == nil {
		t.Error("a value may look like a code")
	}
	if err := w.Flush(); err != nil {
		t.Fatal(err)
	}
	for i := range b.Len() {
		if c := b.Bytes()[i]; c >= 0x80 || c < ' ' && c != '\n' {
			t.Fatalf("byte %#x in the file", c)
		}
	}
	records[2].Cells[0].X, records[3].Cells[1].X = math.NaN(), math.NaN() // ICARTT keeps no limit beside the code
	f := comesBack(t, b.String(), records)
	if n := f.Notes(); len(n) != 0 {
		t.Errorf("notes on a file of our own: %v", n)
	}
	if f.Attribute("PLATFORM") != "a tower with two lines" || f.Attribute("LOCATION") != "Zuerich" || f.Attribute("DATA_INFO") != "N/A" || f.Attribute("R0") != "first" {
		t.Errorf("attributes %v", f.Attributes)
	}
}

func comesBack(t *testing.T, text string, want []Record) *File {
	t.Helper()
	f := open(t, text)
	for _, n := range f.Notes() {
		t.Errorf("note: %v", n)
	}
	for i, r := range f.Roles()[2:] {
		w := writtenColumns[i].Role
		if r.Quantity != w.Quantity || math.Abs(r.At-w.At) > 1e-9*w.At || r.Basis != w.Basis || math.Abs(r.From-w.From) > 1e-9*w.From {
			t.Errorf("column %d comes back as %v, want %v", i, r, w)
		}
	}
	got := all(t, f)
	if len(got) != len(want) {
		t.Fatalf("%d records, want %d", len(got), len(want))
	}
	for i, r := range got {
		if !r.Start.Equal(want[i].Start) || !r.End.Equal(want[i].End) {
			t.Errorf("record %d: %v to %v, want %v to %v", i, r.Start, r.End, want[i].Start, want[i].End)
		}
		for j, c := range r.Cells[2:] {
			w := want[i].Cells[j]
			if c.State != w.State || c.State != Missing && !(math.Abs(c.X-w.X) <= 1e-15*math.Abs(w.X)) && !(math.IsNaN(c.X) && math.IsNaN(w.X)) {
				t.Errorf("record %d, column %d: %v, want %v", i, j, c, w)
			}
		}
	}
	return f
}

func TestShortNames(t *testing.T) {
	taken := []string{"kappa"}
	for name, want := range map[string]string{
		"kappa": "kappa_2", "ccn_at_0.3_percent_per_m3": "ccn_at_0p3_percent_per_m3", "0 start": "start", "κ": "kappa_2", "": "x", "a b/c": "a_b_c",
		"number_concentration_of_cloud_condensation_nuclei": "number_concentration_of_cloud_c",
	} {
		if got := shortName(name, taken); got != want {
			t.Errorf("%q becomes %q, want %q", name, got, want)
		}
	}
}
