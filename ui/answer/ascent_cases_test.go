package answer

import (
	"context"
	"errors"
	"io"
	"io/fs"
	"math"
	"strings"
	"testing"
)

// withFile reads one file from a text.
func withFile(text string) Env {
	env := stationEnv()
	env.Workers = 2
	env.Open = func(name string) (io.ReadCloser, error) {
		if name != "cases.csv" {
			return nil, &fs.PathError{Op: "open", Path: name, Err: fs.ErrNotExist}
		}
		return io.NopCloser(strings.NewReader(text)), nil
	}
	return env
}

const someCases = `# invented
case,updraft,start_humidity_percent,mode[0].N
slow,0.1m/s,95,850/cm3
fast,2m/s,97,850/cm3
wrong,2,97,850/cm3
standard,0.5 m/s,95,850/cm3stp

"short",,
as asked,,,
`

// Each row is an ascent of its own, in the order of the file.
func TestAscentCases(t *testing.T) {
	env := withFile(someCases)
	s := modesOfKappa(t, "cases=cases.csv")
	a, err := askAscent(context.Background(), env, s)
	if err != nil {
		t.Fatal(err)
	}
	rows := a.Tables[0].Rows
	if f := a.Facts.(CasesFacts); f != (CasesFacts{6, 2}) || len(rows) != 6 {
		t.Fatalf("%+v, %d rows", f, len(rows))
	}
	for i, want := range []struct {
		line    float64
		label   any
		problem string
		values  []string
	}{
		{3, "slow", "", []string{"updraft=0.1m/s"}},
		{4, "fast", "", []string{"updraft=2m/s", "start-humidity=97%"}},
		{5, "wrong", "column 2, updraft: 2 has no unit", nil},
		{6, "standard", "", []string{"mode[0].air=stp"}},
		{8, nil, "3 cells: want 4", nil},
		{9, "as asked", "", []string{}},
	} {
		row := rows[i]
		if len(row) != len(caseColumns) {
			t.Fatalf("%d cells", len(row))
		}
		if row[0] != want.line || row[1] != want.label {
			t.Errorf("row %d is %v of line %v, want %v of %v", i, row[1], row[0], want.label, want.line)
		}
		if want.problem != "" {
			if text, _ := row[14].(string); !strings.Contains(text, want.problem) || row[6] != nil {
				t.Errorf("%v: %v, want %q", row[1], row, want.problem)
			}
			continue
		}
		one := modesOfKappa(t)
		for _, v := range want.values {
			key, text, _ := strings.Cut(v, "=")
			setInput(t, &one, key, text)
		}
		_, f := rises(t, one)
		if got, ok := row[6].(float64); !ok || !(math.Abs(got/float64(f.Droplets)-1) < 1e-4) { // of the tolerance
			t.Errorf("%v: %v droplets, asked alone %g", row[1], row[6], f.Droplets)
		}
	}
}

// Rows stream in order, and parts of a file are the whole, each row once.
func TestAscentCasesStream(t *testing.T) {
	s := modesOfKappa(t, "cases=cases.csv")
	seen := map[float64]int{}
	for k := 1; k <= 4; k++ {
		env := withFile(someCases)
		last, columns := 0.0, 0
		env.Columns = func(table string, of []Column) error { columns = len(of); return nil }
		env.Row = func(table string, row []any) error {
			line := row[0].(float64)
			if line <= last || len(row) != columns || table != "cases" {
				t.Errorf("row of line %g after %g, %d cells in %d columns of %s", line, last, len(row), columns, table)
			}
			last = line
			seen[line]++
			return nil
		}
		a, err := AscentCases(context.Background(), env, s, Part{k, 4})
		if err != nil {
			t.Fatal(err)
		}
		if len(a.Tables[0].Rows) != 0 {
			t.Error("rows are streamed and collected")
		}
	}
	for _, line := range []float64{3, 4, 5, 6, 8, 9} {
		if seen[line] != 1 {
			t.Errorf("line %g is there %d times", line, seen[line])
		}
	}
}

func TestAscentCasesErrors(t *testing.T) {
	for name, c := range map[string]struct {
		text string
		part Part
		want string
	}{
		"empty":    {"", Part{}, "cases.csv:1: no line with the names"},
		"head":     {"updrft\n1m/s\n", Part{}, "cases.csv:1: column 1, updrft: no quantity has this name: did you mean updraft?"},
		"quotes":   {"updraft\n\"1m/s\n", Part{}, "cases.csv:2: extraneous or missing"},
		"part":     {someCases, Part{5, 4}, "part 5 of 4: want k/n"},
		"part 0":   {someCases, Part{0, 4}, "part 0 of 4: want k/n"},
		"escapes":  {"\x1b[2Jupdraft\n1m/s\n", Part{}, "no quantity has this name"},
		"two same": {"updraft,updraft\n", Part{}, "column 2, updraft: the quantity stands twice"},
	} {
		_, err := AscentCases(context.Background(), withFile(c.text), modesOfKappa(t, "cases=cases.csv"), c.part)
		var in *InputError
		if !errors.As(err, &in) || in.Input != "cases" || !strings.Contains(in.Text, c.want) || strings.Contains(in.Text, "\x1b") {
			t.Errorf("%s: %v, want %q", name, err, c.want)
		}
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	if _, err := AscentCases(ctx, withFile(someCases), modesOfKappa(t, "cases=cases.csv"), Part{}); !errors.Is(err, context.Canceled) {
		t.Errorf("stopped: %v", err)
	}
}

func TestPartOfCases(t *testing.T) {
	for text, want := range map[string]Part{"": {}, "3/64": {3, 64}, " 1 / 1 ": {1, 1}} {
		if got, err := readPart(text); err != nil || got != want {
			t.Errorf("%q is %v, %v", text, got, err)
		}
	}
	for _, text := range []string{"3", "0/4", "5/4", "a/b", "1/0", "/"} {
		var in *InputError
		if _, err := readPart(text); !errors.As(err, &in) || in.Input != "part" {
			t.Errorf("%q: %v", text, err)
		}
	}
}
