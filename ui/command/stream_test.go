package command

import (
	"bytes"
	"context"
	"encoding/csv"
	"encoding/json"
	"errors"
	"io"
	"os"
	"path/filepath"
	"runtime"
	"slices"
	"strings"
	"syscall"
	"testing"
	"time"

	"dropcrest/ui/answer"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
	"dropcrest/ui/terminal"
)

// campaign is a question of invented records; after stop of them it ends with err.
type campaign struct {
	records, stop int
	err           error
	midway        func()
}

func (c campaign) question() answer.Question {
	return answer.Question{
		Key: "campaign", Title: "Campaign", Says: "An invented question?",
		Groups:    []answer.Group{{Title: "Data", Keys: []string{"population", "mode", "bins", "data", "record", "kappa", "water-activity", "map"}}},
		Statement: func(scenario.Scenario) []string { return []string{"Records of {data}."} },
		Formats:   []string{"jsonl", "icartt"},
		Ask:       c.ask,
	}
}

func (c campaign) ask(ctx context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
	a := answer.Answer{
		Finding: []string{"All is invented."},
		Facts:   map[string]any{"closure": map[string]any{"ratio": 1.25}},
		Tables:  []answer.Table{{Key: "spectrum", Columns: []answer.Column{{Key: "supersaturation_percent"}}, Rows: [][]any{{0.1}}}},
	}
	if !s.Record.Is("all") {
		return a, nil
	}
	var columns []answer.Column
	for _, key := range []string{"record", "start_time", "end_time", "supersaturation_percent", "ccn_per_m3", "measured_ccn_per_m3", "uncertainty", "flag", "ratio", "kappa"} {
		columns = append(columns, answer.Column{Key: key})
	}
	if env.Columns != nil {
		if err := env.Columns("records", columns); err != nil {
			return a, err
		}
	}
	for i := range c.records {
		env.Progress(int64(i), int64(c.records))
		if i == c.stop && c.midway != nil {
			c.midway()
		}
		if err := ctx.Err(); err != nil {
			return a, err
		}
		if i == c.stop && c.err != nil {
			return a, c.err
		}
		begin := time.Date(2026, 3, 1, i, 0, 0, 0, time.UTC)
		start, end := begin.Format(time.RFC3339), begin.Add(59*time.Minute).Format(time.RFC3339)
		for _, level := range []float64{0.4, 0.1} { // not in order
			row := []any{i + 1, start, end, level, 1e9 * level, 9e8 * level, 1e6, nil, 10. / 9, 0.3}
			if i == 1 {
				row[5], row[6], row[7], row[8] = nil, nil, "below, <limit>", nil
			}
			if err := env.Row("records", row); err != nil {
				return a, errors.New("the row was refused") // what an answer says does not count
			}
		}
	}
	return a, nil
}

// command runs the question as a command.
func (c campaign) command(w world, args ...string) (code int, out, messages string) {
	var stdout, stderr bytes.Buffer
	if w.out == nil {
		w.out = &stdout
	}
	w.in, w.err, w.env = strings.NewReader(""), &stderr, func(string) string { return "" }
	root := newRoot(w)
	root.AddCommand(w.newQuestion(c.question()))
	code = w.execute(context.Background(), root, append([]string{"campaign"}, args...))
	return code, stdout.String(), stderr.String()
}

func TestRecordsStream(t *testing.T) {
	c := campaign{records: 3, stop: -1}
	code, out, messages := c.command(world{}, "--record", "all", "--as", "csv")
	rows, err := csv.NewReader(strings.NewReader(out)).ReadAll()
	if code != done || err != nil || len(rows) != 7 || strings.Count(out, "\r\n") != 7 || messages != "" {
		t.Fatalf("csv: exit %d, %d rows (%v), stderr %q:\n%s", code, len(rows), err, messages, out)
	}
	if want := []string{"2", "2026-03-01T01:00:00Z", "2026-03-01T01:59:00Z", "0.4", "4e+08", "", "", "below, <limit>", "", "0.3"}; !slices.Equal(rows[3], want) {
		t.Errorf("csv: row %q, want %q", rows[3], want)
	}

	code, out, _ = c.command(world{}, "--record", "all", "--as", "jsonl")
	lines := strings.Split(strings.TrimSuffix(out, "\n"), "\n")
	if want := `{"record":2,"start_time":"2026-03-01T01:00:00Z","end_time":"2026-03-01T01:59:00Z","supersaturation_percent":0.4,"ccn_per_m3":400000000,` +
		`"measured_ccn_per_m3":null,"uncertainty":null,"flag":"below, <limit>","ratio":null,"kappa":0.3}`; code != done || len(lines) != 6 || lines[2] != want {
		t.Errorf("jsonl: exit %d, %d lines, the third is\n%s, want\n%s", code, len(lines), lines[2], want)
	}

	for _, n := range []int{0, 3} {
		code, out, _ = campaign{records: n, stop: -1}.command(world{}, "--record", "all", "--as", "json")
		var all struct {
			Records []map[string]any
			Closure struct{ Ratio float64 }
			Version string
		}
		if err := json.Unmarshal([]byte(out), &all); code != done || err != nil || len(all.Records) != 2*n || all.Records == nil || all.Closure.Ratio != 1.25 || all.Version == "" {
			t.Errorf("json: exit %d, %v, %d records, closure %v:\n%s", code, err, len(all.Records), all.Closure, out)
		}
	}
}

// The ICARTT file is read back by the guess alone: measured counts are found, what is
// predicted beside them is left.
func TestRecordsAsICARTT(t *testing.T) {
	name := filepath.Join(t.TempDir(), "closure.ict")
	if code, _, messages := (campaign{records: 3, stop: -1}).command(world{}, "--record", "all", "--out", name); code != done {
		t.Fatal(messages)
	}
	in, err := os.Open(name)
	if err != nil {
		t.Fatal(err)
	}
	defer in.Close()
	f, err := fieldfile.Open(name, in, fieldfile.Options{})
	if err != nil {
		t.Fatal(err)
	}
	var got []string
	for i, r := range f.Roles() {
		if r.Quantity == fieldfile.CCN {
			got = append(got, f.Columns[i].Name)
		}
	}
	if want := []string{"ccn_at_0p1_percent", "ccn_at_0p4_percent"}; !slices.Equal(got, want) {
		t.Errorf("counts in %q, want %q", got, want)
	}
	var states []fieldfile.State
	var rec fieldfile.Record
	for f.Read(&rec) == nil {
		for i, c := range f.Columns {
			if c.Name == "ccn_at_0p4_percent" {
				states = append(states, rec.Cells[i].State)
				if rec.Cells[i].OK() && rec.Cells[i].X != 3.6e8 {
					t.Errorf("count %v, want 3.6e8", rec.Cells[i].X)
				}
			}
		}
	}
	if want := []fieldfile.State{fieldfile.Value, fieldfile.Missing, fieldfile.Value}; !slices.Equal(states, want) {
		t.Errorf("states %v, want %v", states, want)
	}
	code, _, messages := campaign{}.command(world{}, "--as", "icartt")
	if code != misuse || !strings.Contains(messages, "--as icartt") || !strings.Contains(messages, "--record all") {
		t.Errorf("one record: exit %d, %s", code, messages)
	}
}

// A file is written whole or not at all, however the work ends.
func TestNothingHalfWritten(t *testing.T) {
	interrupt := func() {
		self, err := os.FindProcess(os.Getpid())
		if err == nil {
			err = self.Signal(os.Interrupt)
		}
		if err != nil {
			t.Error(err)
		}
	}
	for _, c := range []struct {
		name  string
		of    campaign
		code  int
		says  string
		isOld bool
	}{
		{"whole", campaign{records: 5000, stop: -1}, done, "", false},
		{"error", campaign{records: 5000, stop: 4000, err: &fieldfile.Error{File: "a.csv", Line: 7, Problem: "broken"}}, failed, "dropcrest: error: --data: a.csv:7: broken", true},
		{"input", campaign{records: 5000, stop: 4000, err: &answer.InputError{Input: "map", Text: "no such column"}}, failed, "dropcrest: error: --map: no such column", true},
		{"ctrl+c", campaign{records: 1 << 30, stop: 4000, midway: interrupt}, 130, "", true},
	} {
		for _, form := range []string{"csv", "jsonl", "json", "icartt", "text"} {
			if c.name == "ctrl+c" && form == "icartt" || runtime.GOOS == "windows" {
				continue // it would hold what comes until the signal is seen
			}
			dir := t.TempDir()
			name := filepath.Join(dir, "out")
			if err := os.WriteFile(name, []byte("old"), 0o600); err != nil {
				t.Fatal(err)
			}
			code, _, messages := c.of.command(world{}, "--record", "all", "--as", form, "--out", name)
			if code != c.code || strings.TrimSpace(messages) != c.says {
				t.Errorf("%s, %s: exit %d, stderr %q, want %d, %q", c.name, form, code, messages, c.code, c.says)
			}
			text, err := os.ReadFile(name)
			if err != nil || (string(text) == "old") != c.isOld {
				t.Errorf("%s, %s: the file holds %.20q (%v)", c.name, form, text, err)
			}
			if entries, err := os.ReadDir(dir); err != nil || len(entries) != 1 {
				t.Errorf("%s, %s: the folder holds %v (%v)", c.name, form, entries, err)
			}
		}
	}
}

// failing fails after some bytes, as a pipe does whose reader has gone.
type failing struct {
	room int
	err  error
}

func (f *failing) Write(b []byte) (int, error) {
	if f.room -= len(b); f.room < 0 {
		return 0, f.err
	}
	return len(b), nil
}

func TestOutputFails(t *testing.T) {
	for _, c := range []struct {
		err  error
		code int
		says string
	}{
		{&os.PathError{Op: "write", Path: "|1", Err: syscall.EPIPE}, brokenPipe, ""},
		{syscall.ENOSPC, failed, "dropcrest: error: standard output: " + syscall.ENOSPC.Error()},
		{io.ErrShortWrite, failed, "dropcrest: error: standard output: short write"},
	} {
		for _, form := range []string{"csv", "jsonl", "json", "icartt"} {
			code, _, messages := campaign{records: 20000, stop: -1}.command(world{out: &failing{100000, c.err}}, "--record", "all", "--as", form)
			if code != c.code || strings.TrimSpace(messages) != c.says {
				t.Errorf("%v, %s: exit %d, stderr %q, want %d, %q", c.err, form, code, messages, c.code, c.says)
			}
		}
	}
}

// Rows that stream are kept nowhere.
func TestStreamTakesNoMemory(t *testing.T) {
	for _, form := range []string{"csv", "jsonl", "json", "text"} {
		var least, most uint64
		look := func() {
			runtime.GC()
			var m runtime.MemStats
			runtime.ReadMemStats(&m)
			least, most = min(least, m.HeapAlloc), max(most, m.HeapAlloc)
			if least == 0 {
				least = m.HeapAlloc
			}
		}
		look()
		c := campaign{records: 20000, stop: 19999, midway: look}
		if code, _, messages := c.command(world{out: io.Discard}, "--record", "all", "--as", form); code != done {
			t.Fatal(messages)
		}
		if grown := most - least; grown > 4<<20 { // 40 000 rows as they are would be 10 MB
			t.Errorf("%s: the heap grew by %d kB", form, grown>>10)
		}
	}
}

// The meter shows nothing before its time, rewrites one line, and blanks it.
func TestMeter(t *testing.T) {
	var b bytes.Buffer
	m := &meter{to: &b}
	m.tell(100, 100) // the zero time is long ago
	m.tell(100, 100)
	m.tell(1, 2)
	m.tell(1, 0)
	m.end()
	m.tell(1, 3)
	if want := "\rdropcrest: 100 %\rdropcrest: 50 % \r               \r"; b.String() != want {
		t.Errorf("%q, want %q", b.String(), want)
	}
	w := world{out: io.Discard, err: &b, env: func(string) string { return "" }}
	if w.newMeter("", false) != nil {
		t.Error("a meter on what is no terminal")
	}
	var none *meter
	none.tell(1, 2)
	none.end()
	if terminal.Is(os.Stderr) {
		w.err = os.Stderr
		m = w.newMeter("", false)
		m.tell(1, 2)
		if m.width != 0 {
			t.Error("shown before its time")
		}
	}
}
