package verify

import (
	"errors"
	"fmt"
	"math"
	"os"
	"strings"
	"testing"
	"testing/fstest"
)

// TestPublished recomputes every published value of the project.
func TestPublished(t *testing.T) {
	rows, err := Run(os.DirFS("../../testdata/published"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	if len(rows) < 80 {
		t.Errorf("%d published values, want at least the 80 of water and air", len(rows))
	}
	for _, r := range rows {
		if r.Verdict != Agrees {
			t.Errorf("%s, %s: computed %.9g, published %.9g %s, off by %.3g, tolerance %.3g (%s)",
				r.Quantity, r.Condition, r.Computed, r.Published, r.Unit, r.Difference, r.Tolerance, r.Source)
		}
	}
}

const head = "check,arguments,quantity,condition,published,tolerance,unit,source,seen,remark\n"

// folder is a folder with one file.
func folder(text string) fstest.MapFS {
	return fstest.MapFS{"x.csv": &fstest.MapFile{Data: []byte(text)}}
}

// twice is a check for the engine's own tests.
func twice() Options {
	return Options{Checks: map[string]Check{
		"twice":  func(a Args) (float64, error) { return 2 * a.Number("x"), nil },
		"refuse": func(Args) (float64, error) { return 0, errors.New("refused") },
		"lost":   func(Args) (float64, error) { return math.NaN(), nil },
	}}
}

func TestVerdicts(t *testing.T) {
	for _, c := range []struct {
		name, published, tolerance, unit string
		want                             Verdict
	}{
		{"equal", "4", "0", "1", Agrees},
		{"wrong value", "4.1", "0.05", "1", Fails},
		{"wrong by sign", "-4", "1", "1", Fails},
		{"inside absolute", "4.1", "0.2", "1", Agrees},
		{"inside relative", "4.1", "0.03rel", "1", Agrees},
		{"outside relative", "4.1", "0.02rel", "1", Fails},
		{"relative of a negative value", "-4", "0.1rel", "1", Fails},
		{"in percent", "400", "0", "%", Agrees},
		{"in the wrong unit", "4", "0.1", "%", Fails},
	} {
		text := head + fmt.Sprintf("twice,x=2,q,c,%s,%s,%s,s,read,r\n", c.published, c.tolerance, c.unit)
		rows, err := Run(folder(text), twice())
		if err != nil || len(rows) != 1 {
			t.Errorf("%s: %d rows, error %v", c.name, len(rows), err)
			continue
		}
		if rows[0].Verdict != c.want {
			t.Errorf("%s: %q, want %q", c.name, rows[0].Verdict, c.want)
		}
	}
}

// TestWrongPublishedValueFails spoils each true value by more than its
// tolerance: the check must notice every single one.
func TestWrongPublishedValueFails(t *testing.T) {
	rows, err := Run(os.DirFS("../../testdata/published"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	data, err := os.ReadFile("../../testdata/published/water_air.csv")
	if err != nil {
		t.Fatal(err)
	}
	if !strings.Contains(string(data), ",71.6859625,") {
		t.Fatal("the surface tension at 300 K is not in the file")
	}
	spoilt := strings.Replace(string(data), ",71.6859625,", ",71.6859635,", 1)
	failed := 0
	bad, err := Run(folder(spoilt), Options{})
	if err != nil {
		t.Fatal(err)
	}
	for _, r := range bad {
		if r.Verdict == Fails {
			failed++
		}
	}
	if failed != 1 {
		t.Errorf("%d rows fail with one wrong value, want 1", failed)
	}
	for _, r := range rows {
		wrong := r.Published + 2.01*r.Tolerance + 1e-9*math.Abs(r.Published)
		if verdict(r.Computed-wrong, r.Tolerance) != Fails {
			t.Errorf("%s, %s: %g would pass for %g", r.Quantity, r.Condition, wrong, r.Published)
		}
	}
}

// A value that was computed for this project says so and is not passed off as
// one that somebody published; the words have their meaning in every file.
func TestSeen(t *testing.T) {
	for _, word := range SeenWords() {
		rows, err := Run(folder(head+"twice,x=2,q,c,4,0,1,s,"+word+",\n"), twice())
		if err != nil || len(rows) != 1 || rows[0].Seen != word {
			t.Errorf("%s: rows %v, error %v", word, rows, err)
		}
	}
	rows, err := Run(os.DirFS("../../testdata/published"), Options{})
	if err != nil {
		t.Fatal(err)
	}
	count := map[string]int{}
	for _, r := range rows {
		count[r.Seen]++
		ours := strings.Contains(r.Source, "computed for this project") || strings.HasSuffix(r.Source, "evaluated")
		if ours != (r.Seen == "computed") {
			t.Errorf("%s, %s: the source %q is marked %s", r.Quantity, r.Condition, r.Source, r.Seen)
		}
	}
	for _, word := range SeenWords() {
		if count[word] == 0 {
			t.Errorf("no value is marked %s", word)
		}
	}
}

func TestComputedNaNFails(t *testing.T) {
	rows, err := Run(folder(head+"lost,,q,c,4,1,1,s,read,\n"), twice())
	if err != nil || len(rows) != 1 || rows[0].Verdict != Fails {
		t.Errorf("rows %+v, error %v", rows, err)
	}
}

func TestErrorsNamePlaceAndReason(t *testing.T) {
	good := "twice,x=2,q,c,4,0,1,s,read,r\n"
	for _, c := range []struct {
		name, text   string
		line, column int
		want         string
	}{
		{"empty file", "", 1, 1, "empty"},
		{"wrong header", "check,args\n", 1, 7, `column "args"`},
		{"short header", "check,arguments\n", 1, 1, "the columns are"},
		{"long header", strings.TrimSuffix(head, "\n") + ",more\n", 1, len(head) + 1, `column "more"`},
		{"short row", head + "twice,x=2\n", 2, 1, "2 columns, should be 10"},
		{"unknown check", head + "thrice,x=2,q,c,4,0,1,s,read,\n", 2, 1, `unknown check "thrice"`},
		{"unknown unit", head + "twice,x=2,q,c,4,0,inch,s,read,\n", 2, 19, `unknown unit "inch"`},
		{"published is no number", head + "twice,x=2,q,c,four,0,1,s,read,\n", 2, 15, `"four" is not a finite number`},
		{"published is NaN", head + "twice,x=2,q,c,NaN,0,1,s,read,\n", 2, 15, "not a finite number"},
		{"tolerance is empty", head + "twice,x=2,q,c,4,,1,s,read,\n", 2, 17, "such as 0.01"},
		{"tolerance is negative", head + "twice,x=2,q,c,4,-1,1,s,read,\n", 2, 17, "at least 0"},
		{"tolerance is NaN", head + "twice,x=2,q,c,4,NaN,1,s,read,\n", 2, 17, "at least 0"},
		{"no source", head + "twice,x=2,q,c,4,0,1, ,read,\n", 2, 21, "source is empty"},
		{"seen is unknown", head + "twice,x=2,q,c,4,0,1,s,yes,\n", 2, 23, "one of read, memory, computed"},
		{"row twice", head + good + good, 3, 1, "stand at x.csv:2"},
		{"argument missing", head + "twice,,q,c,4,0,1,s,read,\n", 2, 7, `argument "x" is missing`},
		{"argument no number", head + "twice,x=y,q,c,4,0,1,s,read,\n", 2, 7, "x=y is not a finite number"},
		{"argument infinite", head + "twice,x=Inf,q,c,4,0,1,s,read,\n", 2, 7, "not a finite number"},
		{"argument not used", head + "twice,x=2 z=1,q,c,4,0,1,s,read,\n", 2, 7, `argument "z" is not used`},
		{"argument without key", head + "twice,2,q,c,4,0,1,s,read,\n", 2, 7, "key=value"},
		{"argument twice", head + "twice,x=1 x=2,q,c,4,0,1,s,read,\n", 2, 7, "given twice"},
		{"check refuses", head + "refuse,,q,c,4,0,1,s,read,\n", 2, 8, "refused"},
		{"quote not closed", head + "\"twice,x=2", 2, 11, "quote"},
	} {
		_, err := Run(folder(c.text), twice())
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("%s: error %v has no place", c.name, err)
			continue
		}
		if e.File != "x.csv" || e.Line != c.line || e.Column != c.column || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s: %q, want line %d, column %d and %q", c.name, err, c.line, c.column, c.want)
		}
	}
}

func TestNoFiles(t *testing.T) {
	if _, err := Run(fstest.MapFS{}, Options{}); err == nil {
		t.Error("an empty folder gives no error")
	}
}

func TestFilesInOrder(t *testing.T) {
	file := func(q string) *fstest.MapFile {
		return &fstest.MapFile{Data: []byte(head + "twice,x=2," + q + ",c,4,0,1," + q + ",memory,\n")}
	}
	rows, err := Run(fstest.MapFS{"b.csv": file("b"), "a.csv": file("a"), "notes.txt": file("n")}, twice())
	if err != nil || len(rows) != 2 || rows[0].Quantity != "a" || rows[1].Quantity != "b" {
		t.Errorf("rows %+v, error %v", rows, err)
	}
}

func TestSameRowInTwoFiles(t *testing.T) {
	file := &fstest.MapFile{Data: []byte(head + "twice,x=2,q,c,4,0,1,s,read,\n")}
	if _, err := Run(fstest.MapFS{"a.csv": file, "b.csv": file}, twice()); err == nil {
		t.Error("the same row in two files gives no error")
	}
}

func TestArgsTextWithBlanks(t *testing.T) {
	a, err := ParseArgs("  substance=sodium chloride  m=1 ")
	if err != nil {
		t.Fatal(err)
	}
	if got := a.Text("substance"); got != "sodium chloride" {
		t.Errorf("substance %q", got)
	}
	if got := a.NumberOr("m", 2); got != 1 {
		t.Errorf("m %v", got)
	}
	if got := a.NumberOr("n", 2); got != 2 {
		t.Errorf("n %v", got)
	}
	if err := a.trouble(); err != nil {
		t.Error(err)
	}
}

func FuzzRun(f *testing.F) {
	f.Add(head + "twice,x=2,q,c,4,0,1,s,read,\n")
	f.Add(head + "twice,x=\"2\",q\n")
	f.Add("\ufeff" + head)
	f.Fuzz(func(t *testing.T, text string) {
		rows, err := Run(folder(text), twice())
		if err != nil && !strings.HasPrefix(err.Error(), "x.csv:") {
			t.Errorf("error without a place: %v", err)
		}
		for _, r := range rows {
			if r.Verdict == Agrees && !(math.Abs(r.Computed-r.Published) <= r.Tolerance) {
				t.Errorf("agrees: %+v", r)
			}
		}
	})
}
