package answer

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"strings"
	"testing"
	"time"

	"dropcrest/ui/scenario"
)

// countsEvery is a file of that many counts, one a minute, each its own number per cm³.
func countsEvery(records int) string {
	var b strings.Builder
	b.WriteString("time,ccn at 0.3% STP (cm-3)\n")
	at := time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)
	for i := range records {
		fmt.Fprintf(&b, "%s,%d\n", at.Add(time.Duration(i)*time.Minute).Format(time.RFC3339), i+1)
	}
	return b.String()
}

const oneCount = "ccn at 0.3% STP (cm-3)=ccn @0.3% in cm-3 at stp"

// Around a record of long data others are kept, and all of them are found.
func TestLongDataAreKeptAround(t *testing.T) {
	const n = mostKeptRecords + 2000
	s := ofText(t, countsEvery(n), oneCount)
	reads := 0
	env := stationEnv()
	env.Kept = &Kept{}
	env.Progress = func(done, total int64) {
		if done == total {
			reads++
		}
	}
	for _, c := range []struct {
		record, reads int
	}{{6000, 1}, {6001, 1}, {5600, 1}, {6500, 1}, {6501, 2}, {1, 3}, {2, 3}, {400, 3}, {n, 4}, {n - 1, 4}} {
		o, facts, err := oneRecord(context.Background(), env, s, c.record)
		if err != nil {
			t.Fatal(err)
		}
		if o.number != c.record || len(o.counts) != 1 || int(o.counts[0].count/1e6+0.5) != c.record || facts.records != n {
			t.Errorf("record %d is %d of %d, counts %v", c.record, o.number, facts.records, o.counts)
		}
		if reads != c.reads {
			t.Errorf("up to record %d the file was read %d times, want %d", c.record, reads, c.reads)
		}
	}
	for _, beyond := range []int{0, n + 1} {
		var in *InputError
		if _, _, err := oneRecord(context.Background(), env, s, beyond); !errors.As(err, &in) || in.Input != "record" || reads != 4 {
			t.Errorf("record %d, after %d reads: %v", beyond, reads, err)
		}
	}
}

// A file that was written to is read again.
func TestChangedDataAreReadAgain(t *testing.T) {
	s := ofText(t, countsEvery(3), oneCount)
	env := stationEnv()
	env.Kept = &Kept{}
	if _, facts, err := oneRecord(context.Background(), env, s, 1); err != nil || facts.records != 3 {
		t.Fatalf("%d records, %v", facts.records, err)
	}
	if err := os.WriteFile(s.Data[0].Name, []byte(countsEvery(5)), 0o644); err != nil {
		t.Fatal(err)
	}
	if _, facts, err := oneRecord(context.Background(), env, s, 1); err != nil || facts.records != 5 {
		t.Errorf("%d records, %v, want 5", facts.records, err)
	}
}

// Where nothing is kept a file is opened once: it may be a pipe.
func TestDataAreOpenedOnce(t *testing.T) {
	s := ofText(t, countsEvery(3), oneCount)
	opened := 0
	env := Env{Open: func(name string) (io.ReadCloser, error) {
		opened++
		return os.Open(name)
	}}
	if _, _, err := oneRecord(context.Background(), env, s, 2); err != nil || opened != 1 {
		t.Errorf("opened %d times, %v", opened, err)
	}
}

// Progress rises to the bytes of all files.
func TestProgressOfData(t *testing.T) {
	env := stationEnv()
	last, size := int64(0), int64(0)
	env.Progress = func(done, total int64) {
		if done < last || done > total {
			t.Errorf("%d of %d bytes after %d", done, total, last)
		}
		last, size = done, total
	}
	if _, err := campaign(context.Background(), env, scenario.Default(), func(*observation) error { return nil }); err != nil {
		t.Fatal(err)
	}
	want := int64(0)
	for _, name := range demoFiles {
		info, err := os.Stat(stationFolder + "/" + name)
		if err != nil {
			t.Fatal(err)
		}
		want += info.Size()
	}
	if last != want || size != want {
		t.Errorf("the last progress is %d of %d bytes, want all of %d", last, size, want)
	}
}

// Where each record has sizes of its own, not all of them are remembered.
func TestGridsAreBounded(t *testing.T) {
	var b strings.Builder
	b.WriteString("time,diameter (nm),dN/dlog10D at STP (cm-3)\n")
	for i := range 100 {
		for k := range 5 {
			fmt.Fprintf(&b, "2026-03-14T%02d:%02d:00Z,%.3f,1000\n", i/60, i%60, 20*float64(k+1)+float64(i)/10)
		}
	}
	s := ofText(t, b.String())
	env := stationEnv()
	r, err := newRecorder(env, s)
	if err != nil {
		t.Fatal(err)
	}
	d, err := openData(env, s)
	if err != nil {
		t.Fatal(err)
	}
	defer d.close()
	sized := 0
	merger := d.merge(s, r)
	for {
		var o observation
		ok, err := nextOf(merger, r, &o)
		if err != nil {
			t.Fatal(err)
		}
		if !ok {
			break
		}
		if o.sizes != nil {
			sized++
		}
	}
	if sized != 100 || len(r.grids) > mostGrids {
		t.Errorf("%d of 100 records are sized, %d grids are held", sized, len(r.grids))
	}
}
