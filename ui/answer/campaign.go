package answer

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"time"

	"dropcrest/atmos"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// demoFiles are the files of the invented station, the one with the counts first: its
// records, the longest ones, are the windows, so that no count counts twice.
var demoFiles = []string{"ccn-counts_demo-station_20260314_R0.ict", "sizes.nas", "station.csv"}

// mostKeptRecords is up to how many records of data are kept between two answers,
// so that stepping from one to the next is done within a frame.
const mostKeptRecords = 5000

// campaignFacts is what there is to say about data as a whole.
type campaignFacts struct {
	records  int
	mapping  []string // "file: column=quantity", as it was understood
	rejected []rejection
	notes    []atmos.Note
}

// campaign hands out the records of the data in their order, in constant memory:
// files opened and merged on time, in one state of air, points judged by the rules
// of quality. The observation belongs to each until it returns.
func campaign(ctx context.Context, env Env, s scenario.Scenario, each func(*observation) error) (campaignFacts, error) {
	files, err := openData(env, s)
	if err != nil {
		return campaignFacts{}, err
	}
	defer files.close()
	r, err := newRecorder(env, s)
	if err != nil {
		return campaignFacts{}, err
	}
	var sample fieldfile.Sample
	for {
		if err := ctx.Err(); err != nil {
			return campaignFacts{}, err
		}
		err := files.merger.Next(&sample)
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return campaignFacts{}, &InputError{Input: "data", Text: err.Error()}
		}
		if err := each(r.observe(&sample)); err != nil {
			return campaignFacts{}, err
		}
		files.tell(env)
	}
	facts := campaignFacts{records: r.number, mapping: files.mapping, rejected: r.rejected(), notes: append(files.notes(), r.notes...)}
	if facts.records == 0 {
		return facts, &InputError{Input: "data", Text: "the data have no records"}
	}
	return facts, nil
}

// dataFiles are the open files of a scenario.
type dataFiles struct {
	merger  *fieldfile.Merger
	files   []*fieldfile.File
	readers []*counted
	mapping []string
}

func openData(env Env, s scenario.Scenario) (*dataFiles, error) {
	d := &dataFiles{}
	var sources []fieldfile.Source
	for _, f := range s.Data {
		names := []string{f.Name}
		if f.Name == scenario.DemoData {
			names = demoFiles
		}
		for _, name := range names {
			source, err := d.open(env, s, name, f)
			if err != nil {
				d.close()
				return nil, dataError(err)
			}
			sources = append(sources, source)
		}
	}
	d.merger = fieldfile.Merge(merging(s), sources...)
	return d, nil
}

// dataError names the input that a file which cannot be read belongs to.
func dataError(err error) error {
	var in *InputError
	if errors.As(err, &in) {
		return err
	}
	return &InputError{Input: "data", Text: err.Error()}
}

func merging(s scenario.Scenario) fieldfile.Merging {
	m := fieldfile.Merging{}
	if s.Every.Word == "" {
		m.Every = time.Duration(s.Every.Number * float64(time.Second))
	}
	switch s.Average {
	case "median":
		m.Average = fieldfile.Median
	case "quartile-mean":
		m.Average = fieldfile.QuartileMean
	}
	return m
}

// open opens one file, names its columns and counts its bytes.
func (d *dataFiles) open(env Env, s scenario.Scenario, name string, f scenario.DataFile) (fieldfile.Source, error) {
	in, err := openFile(env, name, f.Name == scenario.DemoData)
	if err != nil {
		return fieldfile.Source{}, err
	}
	r := &counted{ReadCloser: in}
	if sized, ok := in.(fs.File); ok {
		if info, err := sized.Stat(); err == nil {
			r.size = info.Size()
		}
	}
	d.readers = append(d.readers, r)
	file, err := fieldfile.Open(name, r, fieldfile.Options{})
	if err != nil {
		return fieldfile.Source{}, err
	}
	if err := useMap(file, s.Map); err != nil {
		return fieldfile.Source{}, err
	}
	d.files = append(d.files, file)
	for _, line := range file.Mapping() {
		d.mapping = append(d.mapping, name+": "+line)
	}
	return fieldfile.Source{Samples: file.Samples(), Offset: time.Duration(f.Offset * float64(time.Second))}, nil
}

// useMap gives columns the meaning that the scenario says. A line counts in the
// files that have its column; one that no column answers to is wrong everywhere.
func useMap(file *fieldfile.File, lines []scenario.MapLine) error {
	for _, m := range lines {
		if err := file.Use(m.Text); err != nil {
			return &InputError{Input: "map", Text: err.Error()}
		}
	}
	return nil
}

// openFile opens a file of the person, or of the invented station.
func openFile(env Env, name string, demo bool) (io.ReadCloser, error) {
	switch {
	case demo && env.Demo == nil:
		return nil, errors.New("the data of the demo station are not part of this build")
	case demo:
		return env.Demo.Open(name)
	case name == "":
		return nil, errors.New("a file of the data has no name: give one, or demo for the invented station")
	case env.Open == nil:
		return nil, fmt.Errorf("%s: files cannot be opened here", name)
	}
	return env.Open(name)
}

func (d *dataFiles) close() {
	for _, r := range d.readers {
		_ = r.Close()
	}
}

// tell says how far the reading is, in bytes.
func (d *dataFiles) tell(env Env) {
	if env.Progress == nil {
		return
	}
	var done, total int64
	for _, r := range d.readers {
		done, total = done+r.read, total+r.size
	}
	env.Progress(done, max(total, done))
}

func (d *dataFiles) notes() []atmos.Note {
	var out []atmos.Note
	for _, f := range d.files {
		for _, n := range f.Notes() {
			out = append(out, atmos.Note{Code: "data-file", Input: "data", Text: capital(sentenceOf(fmt.Sprint(n)))})
		}
	}
	return out
}

// counted counts the bytes that are read.
type counted struct {
	io.ReadCloser
	read, size int64
}

func (c *counted) Read(p []byte) (int, error) {
	n, err := c.ReadCloser.Read(p)
	c.read += int64(n)
	return n, err
}
