package form

import (
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"dropcrest/ui/answer"
)

// recordColumns and recordRow are records as the Spectrum question has them.
var recordColumns = func() (out []answer.Column) {
	for _, key := range []string{"record", "start_time", "end_time", "supersaturation_percent", "ccn_per_m3", "critical_dry_diameter_m",
		"measured_ccn_per_m3", "uncertainty", "flag", "ratio", "kappa", "kappa_by_count", "no_kappa"} {
		out = append(out, answer.Column{Key: key, Says: key})
	}
	return out
}()

func recordRow(i int) []any {
	start := fmt.Sprintf("2026-03-14T%02d:%02d:%02dZ", i/3600%24, i/60%60, i%60)
	return []any{i + 1, start, start, 0.2, 3.110179353357339e8, 1.044563207473361e-07, 2.9871234e8, 1.2e6, nil, 1.0411, 0.3, 0.2876, nil}
}

// One answer is written alike when its rows stream and when they were collected.
func TestStreamedAsCollected(t *testing.T) {
	s := sheet(t)
	s.Question.Formats = []string{"jsonl", "icartt"}
	records := answer.Table{Key: RecordsTable, Columns: recordColumns}
	for i := range 3 {
		records.Rows = append(records.Rows, recordRow(i))
	}
	s.Answer.Tables = append(s.Answer.Tables, records)
	s.Table = RecordsTable
	for _, format := range []string{"csv", "jsonl", "icartt"} {
		var collected, streamed bytes.Buffer
		if err := s.Write(&collected, format); err != nil {
			t.Fatal(err)
		}
		out := NewStream(&streamed, format)
		if err := out.Columns(records.Key, records.Columns); err != nil {
			t.Fatal(err)
		}
		for _, row := range records.Rows {
			if err := out.Row("another", []any{1}); err != nil {
				t.Error(err)
			}
			if err := out.Row(records.Key, row); err != nil {
				t.Fatal(err)
			}
		}
		if err := out.Close(s); err != nil {
			t.Fatal(err)
		}
		if collected.String() != streamed.String() || collected.Len() == 0 {
			t.Errorf("%s: streamed\n%s\ncollected\n%s", format, &streamed, &collected)
		}
	}
}

// ICARTT says what it cannot hold.
func TestICARTTRefuses(t *testing.T) {
	begin := func(columns []answer.Column) (*Stream, error) {
		out := NewStream(io.Discard, "icartt")
		return out, out.Columns(RecordsTable, columns)
	}
	if _, err := begin(recordColumns[:2]); err == nil || !strings.Contains(err.Error(), "no end_time") {
		t.Errorf("columns missing: %v", err)
	}
	out, err := begin(recordColumns)
	for i := 0; err == nil && i < 100; i++ {
		row := recordRow(0)
		row[3] = 0.1 + float64(i)/100
		err = out.Row(RecordsTable, row)
	}
	if err == nil || !strings.Contains(err.Error(), "64 supersaturations") {
		t.Errorf("many supersaturations: %v", err)
	}
	out, _ = begin(recordColumns)
	if err := out.Close(sheet(t)); err == nil || !strings.Contains(err.Error(), "no record") {
		t.Errorf("no record: %v", err)
	}
}

// The text form shows the tables that the question names, without empty columns.
func TestTextShowsTables(t *testing.T) {
	s := sheet(t)
	s.Question.Tabled = func(answer.Answer) []string { return []string{"counts"} }
	s.Answer.Tables = append(s.Answer.Tables, answer.Table{Key: "counts", Title: "Counts", Columns: []answer.Column{{Says: "κ"}, {Says: "flag"}, {Says: "none"}},
		Rows: [][]any{{0.25, nil, nil}, {0.5, "low", nil}}})
	s.ASCII = true
	var b bytes.Buffer
	if err := s.Write(&b, "text"); err != nil {
		t.Fatal(err)
	}
	if want := "\nCounts\n   kappa  flag\n0.250000  -\n0.500000  low\n"; !strings.Contains(b.String(), want) {
		t.Errorf("no %q in\n%s", want, b.String())
	}
}

// A row of 13 columns, as a campaign has them by the 100 000.
func BenchmarkStream(b *testing.B) {
	row := recordRow(0)
	for _, format := range []string{"csv", "jsonl", "json"} {
		b.Run(format, func(b *testing.B) {
			out := NewStream(io.Discard, format)
			if err := out.Columns(RecordsTable, recordColumns); err != nil {
				b.Fatal(err)
			}
			b.ReportAllocs()
			for b.Loop() {
				if err := out.Row(RecordsTable, row); err != nil {
					b.Fatal(err)
				}
			}
		})
	}
}
