package fieldfile

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"math/rand/v2"
	"strconv"
	"testing"
)

// campaign is a CSV file of 8 columns: a time and seven numbers.
func campaign(rows int) []byte {
	var b bytes.Buffer
	r := rand.New(rand.NewPCG(1, 2))
	b.WriteString("time,ccn_at_0.1_percent (cm-3),ccn_at_0.2_percent (cm-3),ccn_at_0.5_percent (cm-3),cn (cm-3),temperature (K),pressure (hPa),kappa\n")
	for i := range rows {
		fmt.Fprintf(&b, "2026-03-14T%02d:%02d:%02dZ", i/3600%24, i/60%60, i%60)
		for range 7 {
			fmt.Fprintf(&b, ",%.4g", r.Float64()*1000)
		}
		b.WriteByte('\n')
	}
	return b.Bytes()
}

const benchRows = 100000

func rowsPerSecond(b *testing.B) {
	b.ReportMetric(benchRows*float64(b.N)/b.Elapsed().Seconds(), "rows/s")
}

func BenchmarkReadCSV8Columns(b *testing.B) {
	data := campaign(benchRows)
	b.SetBytes(int64(len(data)))
	b.ReportAllocs()
	for b.Loop() {
		f, err := Open("bench.csv", bytes.NewReader(data), Options{})
		if err != nil {
			b.Fatal(err)
		}
		var rec Record
		n := 0
		for err = f.Read(&rec); err == nil; err = f.Read(&rec) {
			n++
		}
		if err != io.EOF || n != benchRows || !rec.Cells[7].OK() {
			b.Fatal(n, err)
		}
	}
	rowsPerSecond(b)
}

// BenchmarkEncodingCSV8Columns is what the standard library alone would take
// for the same file, its time stamps left unread.
func BenchmarkEncodingCSV8Columns(b *testing.B) {
	data := campaign(benchRows)
	b.SetBytes(int64(len(data)))
	b.ReportAllocs()
	for b.Loop() {
		r := csv.NewReader(bytes.NewReader(data))
		r.ReuseRecord = true
		if _, err := r.Read(); err != nil {
			b.Fatal(err)
		}
		sum := 0.0
		for {
			fields, err := r.Read()
			if err == io.EOF {
				break
			}
			for _, field := range fields[1:] {
				x, _ := strconv.ParseFloat(field, 64)
				sum += x
			}
		}
	}
	rowsPerSecond(b)
}
