package answer

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler/counter"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// demoScans is the file of salt scans of the invented station.
const demoScans = "scans.csv"

// scanLog is what files of salt scans say, in the order of their rows.
type scanLog struct {
	rows    []counter.Row
	mapping []string // column=quantity, as it was understood
	notes   []atmos.Note
}

// readScans reads the files of a scenario. A row without what a scan needs is kept
// and marked, so that the record says why it was left out.
func readScans(ctx context.Context, env Env, s scenario.Scenario) (scanLog, error) {
	var log scanLog
	for i, c := range s.Counted {
		log.rows = append(log.rows, counter.Row{TemperatureDifference: c.Difference, DryDiameter: c.Diameter, CN: c.CN, CCN: c.CCN, Line: i + 1})
	}
	if len(log.rows) > 0 {
		return log, nil
	}
	for _, f := range s.Scans {
		if err := log.read(ctx, env, s, f); err != nil {
			return log, scanError(err)
		}
	}
	if len(log.rows) == 0 {
		return log, &InputError{Input: "scans", Text: "the files of scans have no rows"}
	}
	return log, nil
}

func scanError(err error) error {
	var in *InputError
	if errors.As(err, &in) || errors.Is(err, context.Canceled) {
		return err
	}
	return &InputError{Input: "scans", Text: err.Error()}
}

// openScans opens one file, the built-in one by its word.
func openScans(env Env, name string) (io.ReadCloser, error) {
	if name == scenario.DemoData {
		if env.Demo == nil {
			return nil, errors.New("the data of the demo station are not part of this build")
		}
		return env.Demo.Open(demoScans)
	}
	if name == "" {
		return nil, errors.New("a file of scans has no name")
	}
	if env.Open == nil {
		return nil, fs.ErrNotExist
	}
	return env.Open(name)
}

func (l *scanLog) read(ctx context.Context, env Env, s scenario.Scenario, f scenario.DataFile) error {
	in, err := openScans(env, f.Name)
	if err != nil {
		return err
	}
	defer in.Close()
	file, err := fieldfile.Open(f.Name, in, fieldfile.Options{})
	if err != nil {
		return err
	}
	lines := make([]string, len(s.ScansMap))
	for i, m := range s.ScansMap {
		lines[i] = m.Text
	}
	if err := file.Use(lines...); err != nil {
		return &InputError{Input: "scans-map", Text: err.Error()}
	}
	l.mapping = append(l.mapping, file.Mapping()...)
	columns := columnsOf(file)
	if missing := columns.missing(); missing != "" {
		return fmt.Errorf("%s: no column of %s is known: say which one it is by map, as in \"column=%s\"", f.Name, missing, missing)
	}
	var rec fieldfile.Record
	for {
		if err := ctx.Err(); err != nil {
			return err
		}
		err := file.Read(&rec)
		if err == io.EOF {
			break
		}
		if err != nil {
			return err
		}
		l.rows = append(l.rows, columns.row(&rec, f.Offset))
	}
	for _, n := range file.Notes() {
		l.notes = append(l.notes, atmos.Note{Code: "scan-file", Input: "scans", Text: fmt.Sprint(n)})
	}
	return nil
}

// scanColumns are the places of the columns that a scan is made of, -1: not there.
type scanColumns map[fieldfile.Quantity]int

func columnsOf(f *fieldfile.File) scanColumns {
	c := scanColumns{}
	for i, r := range f.Roles() {
		if _, there := c[r.Quantity]; !there {
			c[r.Quantity] = i
		}
	}
	return c
}

// missing is the first quantity without which there is no scan.
func (c scanColumns) missing() string {
	for _, want := range [][]fieldfile.Quantity{
		{fieldfile.TemperatureDifference}, {fieldfile.Diameter}, {fieldfile.CCNCounted, fieldfile.CCN}, {fieldfile.CNCounted, fieldfile.CN},
	} {
		found := false
		for _, q := range want {
			_, there := c[q]
			found = found || there
		}
		if !found {
			return want[0].String()
		}
	}
	return ""
}

// cell is the value of a quantity, NaN where there is none.
func (c scanColumns) cell(rec *fieldfile.Record, q fieldfile.Quantity) float64 {
	i, there := c[q]
	if !there {
		return math.NaN()
	}
	return rec.Cells[i].Or(math.NaN())
}

func (c scanColumns) row(rec *fieldfile.Record, offset float64) counter.Row {
	known := func(q fieldfile.Quantity) float64 {
		if x := c.cell(rec, q); x > 0 {
			return x
		}
		return 0
	}
	r := counter.Row{
		TemperatureDifference: c.cell(rec, fieldfile.TemperatureDifference),
		DryDiameter:           c.cell(rec, fieldfile.Diameter),
		Flow:                  known(fieldfile.SampleFlow),
		Pressure:              known(fieldfile.Pressure),
		Duration:              known(fieldfile.SamplingTime),
		Line:                  rec.Line,
	}
	if i, there := c[fieldfile.Salt]; there && rec.Text != nil {
		r.Salt = rec.Text[i]
	}
	if !rec.Start.IsZero() {
		r.Time = float64(rec.Start.UnixNano())/1e9 + offset
		if d := rec.End.Sub(rec.Start).Seconds(); d > 0 && r.Duration == 0 {
			r.Duration = d
		}
	}
	r.CN = c.counts(rec, fieldfile.CNCounted, fieldfile.CN, r)
	r.CCN = c.counts(rec, fieldfile.CCNCounted, fieldfile.CCN, r)
	switch {
	case math.IsNaN(r.TemperatureDifference), math.IsNaN(r.DryDiameter):
		r.Reject = "its setting is missing"
	case math.IsNaN(r.CN) || math.IsNaN(r.CCN):
		r.Reject = "a count is missing"
	}
	return r
}

// counts are those of the file, or follow from a concentration with flow and time.
func (c scanColumns) counts(rec *fieldfile.Record, counted, concentration fieldfile.Quantity, r counter.Row) float64 {
	if _, there := c[counted]; there {
		return c.cell(rec, counted)
	}
	if r.Flow > 0 && r.Duration > 0 {
		return counter.Counts(c.cell(rec, concentration), r.Flow, r.Duration)
	}
	return math.NaN()
}
