package answer

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"time"

	"dropcrest/atmos"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// dataFiles are the open files of a scenario.
type dataFiles struct {
	files   []*fieldfile.File
	offsets []time.Duration // of their clocks
	readers []*counted
	mapping []string
	told    int64 // bytes, the last progress that was told
}

// openData opens the files of a scenario and names their columns.
func openData(env Env, s scenario.Scenario) (*dataFiles, error) {
	d := &dataFiles{}
	for _, f := range s.Data {
		names := []string{f.Name}
		if f.Name == scenario.DemoData {
			names = demoFiles
		}
		for _, name := range names {
			if err := d.open(env, name, f); err != nil {
				d.close()
				return nil, dataError(err)
			}
		}
	}
	if err := useMap(d.files, s.Map); err != nil {
		d.close()
		return nil, err
	}
	for _, f := range d.files {
		for _, line := range f.Mapping() {
			d.mapping = append(d.mapping, f.Name()+": "+line)
		}
	}
	return d, nil
}

// dataError names the input that a file which cannot be read belongs to.
func dataError(err error) error {
	var in *InputError
	if errors.As(err, &in) {
		return err
	}
	return &InputError{Input: "data", Text: plain.Clean(err.Error())}
}

// open opens one file and counts its bytes.
func (d *dataFiles) open(env Env, name string, f scenario.DataFile) error {
	in, err := openFile(env, name, f.Name == scenario.DemoData)
	if err != nil {
		return err
	}
	r := &counted{ReadCloser: in}
	if info := infoOf(in); info != nil {
		r.size = info.Size()
	}
	d.readers = append(d.readers, r)
	file, err := fieldfile.Open(name, r, fieldfile.Options{})
	if err != nil {
		return err
	}
	d.files = append(d.files, file)
	d.offsets = append(d.offsets, time.Duration(f.Offset*float64(time.Second)))
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

// infoOf is what is known of an open file from outside; nil: nothing.
func infoOf(in io.Reader) fs.FileInfo {
	f, ok := in.(fs.File)
	if !ok {
		return nil
	}
	info, err := f.Stat()
	if err != nil {
		return nil
	}
	return info
}

// merge begins to read the files on one time axis. The recorder looks at each
// reading before it is averaged.
func (d *dataFiles) merge(s scenario.Scenario, r *recorder) *fieldfile.Merger {
	how := fieldfile.Merging{}
	if s.Every.Word == "" {
		how.Every = time.Duration(s.Every.Number * float64(time.Second))
	}
	switch s.Average {
	case "median":
		how.Average = fieldfile.Median
	case "quartile-mean":
		how.Average = fieldfile.QuartileMean
	}
	sources := make([]fieldfile.Source, len(d.files))
	for i, f := range d.files {
		sources[i] = fieldfile.Source{Samples: f.Samples(), Offset: d.offsets[i], Look: r.readings()}
	}
	return fieldfile.Merge(how, sources...)
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
	if done == d.told {
		return // files are read in blocks of many records
	}
	d.told = done
	env.Progress(done, max(total, done))
}

// notes are what there is to say about the files; with several of them each note
// names its own.
func (d *dataFiles) notes() []atmos.Note {
	var out []atmos.Note
	for _, f := range d.files {
		for _, n := range f.Notes() {
			text := capital(sentenceOf(fmt.Sprint(n)))
			if len(d.files) > 1 {
				text = f.Name() + ": " + sentenceOf(fmt.Sprint(n))
			}
			out = append(out, atmos.Note{Code: "data-file", Input: "data", Text: text})
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
