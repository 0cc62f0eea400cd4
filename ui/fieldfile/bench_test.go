package fieldfile

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"io"
	"math/rand/v2"
	"os"
	"runtime"
	"strings"
	"testing"
	"time"
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
		readBenchRows(b, f)
	}
	rowsPerSecond(b)
}

func readBenchRows(b *testing.B, f *File) {
	var rec Record
	n := 0
	err := f.Read(&rec)
	for ; err == nil; err = f.Read(&rec) {
		n++
	}
	if err != io.EOF || n != benchRows || !rec.Cells[7].OK() {
		b.Fatal(n, err)
	}
}

// standardRows reads records by encoding/csv, for comparison: what it would take
// to build on it.
type standardRows struct {
	r    *csv.Reader
	line []byte
}

func (s *standardRows) next(r *row) error {
	fields, err := s.r.Read()
	if err != nil {
		return err
	}
	r.fields, s.line = r.fields[:0], s.line[:0]
	for _, field := range fields {
		from := len(s.line)
		s.line = append(s.line, field...)
		r.fields = append(r.fields, s.line[from:])
	}
	return nil
}

// BenchmarkEncodingCSV8Columns is the same job on top of the standard library.
func BenchmarkEncodingCSV8Columns(b *testing.B) {
	data := campaign(benchRows)
	header := data[:bytes.IndexByte(data, '\n')+1]
	b.SetBytes(int64(len(data)))
	b.ReportAllocs()
	for b.Loop() {
		f, err := Open("bench.csv", bytes.NewReader(header), Options{})
		if err != nil {
			b.Fatal(err)
		}
		r := csv.NewReader(bytes.NewReader(data[len(header):]))
		r.ReuseRecord = true
		f.rows = &standardRows{r: r}
		readBenchRows(b, f)
	}
	rowsPerSecond(b)
}

func benchmarkDemo(b *testing.B, name string) {
	data := readDemo(b, name)
	b.SetBytes(int64(len(data)))
	b.ReportAllocs()
	var rec Record
	for b.Loop() {
		f, err := Open(name, strings.NewReader(data), Options{})
		if err != nil {
			b.Fatal(err)
		}
		for err = f.Read(&rec); err == nil; err = f.Read(&rec) {
		}
		if err != io.EOF {
			b.Fatal(err)
		}
	}
}

func BenchmarkReadDemoICARTT(b *testing.B)   { benchmarkDemo(b, demoCCN) }
func BenchmarkReadDemoNASAAmes(b *testing.B) { benchmarkDemo(b, demoSizes) }

// BenchmarkMerge2Days puts the three files of the demo on one time axis: 96
// windows, 288 size scans of 40 bins, 576 records of composition.
func BenchmarkMerge2Days(b *testing.B) {
	b.ReportAllocs()
	var texts []string
	for _, name := range []string{demoCCN, demoSizes, demoAir} {
		texts = append(texts, readDemo(b, name))
	}
	var s Sample
	for b.Loop() {
		var sources []Source
		for _, text := range texts {
			f, err := Open("f", strings.NewReader(text), Options{})
			if err != nil {
				b.Fatal(err)
			}
			sources = append(sources, Source{Samples: f.Samples()})
		}
		m := Merge(Merging{}, sources...)
		err := m.Next(&s)
		for ; err == nil; err = m.Next(&s) {
		}
		if err != io.EOF {
			b.Fatal(err)
		}
	}
}

func BenchmarkWriteCSV8Columns(b *testing.B) {
	b.ReportAllocs()
	rec := writtenRecords()[0]
	for b.Loop() {
		w, err := NewCSVWriter(io.Discard, writtenColumns)
		for i := 0; err == nil && i < 1000; i++ {
			err = w.Write(&rec)
		}
		if err != nil || w.Flush() != nil {
			b.Fatal(err)
		}
	}
}

// endless gives the same rows again and again, up to a size.
type endless struct {
	rows []byte
	at   int
	left int64
}

func (e *endless) Read(b []byte) (int, error) {
	if e.left <= 0 {
		return 0, io.EOF
	}
	n := copy(b, e.rows[e.at:])
	e.at = (e.at + n) % len(e.rows)
	e.left -= int64(n)
	return n, nil
}

// A file of a gigabyte is read at constant memory. It runs with DROPCREST_LONG=1.
func TestLongGigabyte(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") != "1" {
		t.Skip("set DROPCREST_LONG=1")
	}
	data := campaign(benchRows)
	header := bytes.IndexByte(data, '\n') + 1
	rows := data[header:]
	size := int64(1_000_000_000/len(rows)) * int64(len(rows))
	heap := func() uint64 {
		runtime.GC()
		var m runtime.MemStats
		runtime.ReadMemStats(&m)
		return m.HeapAlloc
	}
	before := heap()
	begin := time.Now()
	f, err := Open("f", io.MultiReader(bytes.NewReader(data[:header]), &endless{rows: rows, left: size}), Options{})
	if err != nil {
		t.Fatal(err)
	}
	var rec Record
	n, most := 0, uint64(0)
	for err = f.Read(&rec); err == nil; err = f.Read(&rec) {
		if n++; n%2_000_000 == 0 {
			most = max(most, heap())
		}
	}
	if err != io.EOF || n != int(size)/len(rows)*benchRows {
		t.Fatalf("%d records, %v", n, err)
	}
	const allowed = 1 << 20 // the buffer of 64 KiB, the header, one record
	if most > before+allowed {
		t.Errorf("the heap grew by %d bytes, want at most %d", most-before, allowed)
	}
	t.Logf("%d rows of 8 columns, %d bytes, in %v; heap grown by %d bytes", n, size, time.Since(begin), int64(most)-int64(before))
}
