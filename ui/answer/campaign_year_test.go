package answer

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"math"
	"os"
	"runtime"
	"strconv"
	"testing"
	"time"

	"dropcrest/atmos/aerosol"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// nextOf is the next observation, false after the last one.
func nextOf(m *fieldfile.Merger, r *recorder, o *observation) (bool, error) {
	var s fieldfile.Sample
	if err := m.Next(&s); err != nil {
		if errors.Is(err, io.EOF) {
			return false, nil
		}
		return false, err
	}
	*o = *r.observe(&s)
	return true, nil
}

const recordsOfYear = 365 * 24 * 12

var levelsOfYear = []float64{0.07, 0.1, 0.2, 0.3, 0.4, 0.6, 0.8, 1} // %

// yearOfRecords is an invented year of 5-minute records as CSV, written while it is
// read: 100 bins, 8 supersaturations, composition.
type yearOfRecords struct {
	left, next int
	buffer     bytes.Buffer
	grid       *aerosol.Grid
	values     []float64
}

func newYear(records int) *yearOfRecords {
	const bins = 100
	edges := make([]float64, bins+1)
	for i := range edges {
		edges[i] = 10e-9 * math.Pow(100, float64(i)/bins)
	}
	grid, err := aerosol.NewGrid(edges)
	if err != nil {
		panic(err) // edges ascend
	}
	y := &yearOfRecords{left: records, grid: grid}
	y.buffer.WriteString("start_time,end_time,cn at STP (cm-3),organic (ug/m3),sulfate (ug/m3),nitrate (ug/m3),ammonium (ug/m3),black carbon (ug/m3)")
	for _, s := range levelsOfYear {
		fmt.Fprintf(&y.buffer, ",ccn_%g,ccn_u_%g", s, s)
	}
	for i := range bins {
		fmt.Fprintf(&y.buffer, ",n_%.2f", grid.Midpoint(i)*1e9)
	}
	y.buffer.WriteString("\r\n")
	return y
}

// mapOfYear is how its columns are to be understood.
var mapOfYear = []string{"ccn_*=ccn @*% in cm-3 at stp", "ccn_u_*=ccn_uncertainty @*% in cm-3 at stp", "n_*=dN/dlog10D @*nm in cm-3 at stp"}

func (y *yearOfRecords) Read(p []byte) (int, error) {
	for y.buffer.Len() < len(p) && y.left > 0 {
		y.write()
	}
	return y.buffer.Read(p)
}

func (y *yearOfRecords) Close() error { return nil }

func (y *yearOfRecords) write() {
	phase := float64(y.next) / 288 // days
	number := 1200 + 400*math.Sin(2*math.Pi*phase)
	air := aerosol.Modes{{Concentration: number * 0.6e6, Median: 45e-9, GSD: 1.7}, {Concentration: number * 0.4e6, Median: (140 + 20*math.Cos(phase)) * 1e-9, GSD: 1.5}}
	line := y.buffer.AvailableBuffer()
	start := time.Date(2026, 1, 1, 0, 0, 0, 0, time.UTC).Add(time.Duration(y.next) * 5 * time.Minute)
	line = start.AppendFormat(line, time.RFC3339)
	line = append(line, ',')
	line = start.Add(5*time.Minute).AppendFormat(line, time.RFC3339)
	add := func(x float64) {
		line = append(line, ',')
		line = strconv.AppendFloat(line, x, 'f', 2, 64)
	}
	for _, x := range []float64{number, 1, 1, 0.3, 0.46, 0.1} {
		add(x)
	}
	for _, s := range levelsOfYear {
		n := air.Above(100e-9*math.Pow(s/0.2, -2.0/3)) * 1e-6
		add(n)
		add(n * 0.02)
	}
	y.values = air.Bins(y.grid).Values(y.values[:0], aerosol.PerLog10)
	for _, x := range y.values {
		add(x * 1e-6)
	}
	line = append(line, '\r', '\n')
	y.buffer.Write(line)
	y.left--
	y.next++
}

// askYear closes a year and returns how many rows came out.
func askYear(tb testing.TB, records int, tell func()) (rows int, a Answer) {
	tb.Helper()
	s := scenario.Default()
	s.Record = scenario.Measure{Word: "all"}
	s.Supersaturations = nil
	for _, x := range levelsOfYear {
		s.Supersaturations = append(s.Supersaturations, x/100)
	}
	s.Data = []scenario.DataFile{{Name: "year.csv"}}
	for _, line := range mapOfYear {
		s.Map = append(s.Map, scenario.MapLine{Text: line})
	}
	env := Env{
		Open:    func(string) (io.ReadCloser, error) { return newYear(records), nil },
		Columns: func(string, []Column) error { return nil },
		Row: func(string, []any) error {
			if rows++; rows%10000 == 0 {
				tell()
			}
			return nil
		},
	}
	a, err := askSpectrum(context.Background(), env, s)
	if err != nil {
		tb.Fatal(err)
	}
	return rows, a
}

// A day of the year goes through in every run: each record closes at each level.
func TestDayOfYear(t *testing.T) {
	rows, a := askYear(t, 288, func() {})
	if rows != 288*len(levelsOfYear) || a.Records != 288 {
		t.Errorf("%d rows of %d records", rows, a.Records)
	}
}

// Memory is bounded whatever the length of the data: beside what a month takes there
// are only the ratios and κ of which quantiles are exact, up to a million of each. A
// year may take 200 MB.
func TestLongYearInConstantMemory(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("DROPCREST_LONG is not set")
	}
	peak := func(records int) uint64 {
		most := uint64(0)
		var m runtime.MemStats
		tell := func() {
			runtime.GC()
			runtime.ReadMemStats(&m)
			most = max(most, m.HeapAlloc)
		}
		start := time.Now()
		rows, a := askYear(t, records, tell)
		tell()
		t.Logf("%d records in %.1f s, %.1f MB held, %.0f MB of the system", records, time.Since(start).Seconds(), float64(most)/1e6, float64(m.Sys)/1e6)
		if rows != records*len(levelsOfYear) || a.Records != records {
			t.Errorf("%d rows of %d records, want %d", rows, a.Records, records*len(levelsOfYear))
		}
		return most
	}
	month, year := peak(recordsOfYear/12), peak(recordsOfYear)
	if const200 := uint64(200e6); year > const200 || year > month+50e6 {
		t.Errorf("a year holds %.1f MB, a month %.1f MB", float64(year)/1e6, float64(month)/1e6)
	}
}

// Aim: a year in 30 s on two cores.
func BenchmarkLongYear(b *testing.B) {
	if os.Getenv("DROPCREST_LONG") == "" {
		b.Skip("DROPCREST_LONG is not set")
	}
	b.ReportAllocs()
	for b.Loop() {
		askYear(b, recordsOfYear, func() {})
	}
}

// The reading and judging of a record, without the writing of the invented file.
func BenchmarkCampaignOfDay(b *testing.B) {
	const records = 288
	text, err := io.ReadAll(newYear(records))
	if err != nil {
		b.Fatal(err)
	}
	s := scenario.Default()
	s.Data = []scenario.DataFile{{Name: "day.csv"}}
	for _, line := range mapOfYear {
		s.Map = append(s.Map, scenario.MapLine{Text: line})
	}
	env := Env{Open: func(string) (io.ReadCloser, error) { return io.NopCloser(bytes.NewReader(text)), nil }}
	b.ReportAllocs()
	b.SetBytes(int64(len(text)))
	for b.Loop() {
		if _, err := campaign(context.Background(), env, s, func(*observation) error { return nil }); err != nil {
			b.Fatal(err)
		}
	}
}
