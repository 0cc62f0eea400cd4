package fieldfile

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"slices"
	"strings"
	"time"

	"dropcrest/ui/plain"
)

// Format is a form of file that can be read.
type Format string

// The formats.
const (
	CSV      Format = "CSV"
	ICARTT   Format = "ICARTT"
	NASAAmes Format = "NASA Ames 1001"
)

// Options are the reader's habits; the zero value is the standard.
type Options struct {
	// Lenient also takes what the standards do not allow: CSV parted by semicolons
	// or tabs (with decimal commas beside semicolons) and with # lines before the
	// header, ICARTT parted by tabs or blanks, blank lines between records.
	Lenient bool
}

// Column describes one column. Texts are clean: they cannot drive a terminal.
type Column struct {
	Name     string // unique in the file
	Unit     string // "" where the file gives none
	Standard string // standard name
	Long     string
	Tags     map[string]string // EBAS: D, Statistics, Location, ...
	Missing  string            // the code, as the file writes it
	Scale    float64           // a stored number times this is the value
	// Limits of detection and uncertainty, in the column's own unit; NaN where the
	// file gives none.
	Lower, Upper, Uncertainty float64

	flag    int // index of the flag column that judges this one; -1: none
	time    string
	missing float64 // NaN: no code
}

// Attribute is one named comment of a header.
type Attribute struct{ Key, Value string }

// Header is what a file says about itself.
type Header struct {
	Format       Format
	Investigator string
	Organisation string
	Source       string
	Mission      string
	Begin        time.Time     // reference date of the time axis; zero: none
	Revised      time.Time     // date of the revision
	Interval     time.Duration // between records; 0: not constant or not said
	Attributes   []Attribute   // ICARTT keywords, EBAS metadata
	Comments     []string      // the free lines
	Columns      []Column
	flagColumns  []int
	below, above limit // codes of the limits of detection
}

// Attribute returns a named comment, "" where there is none.
func (h *Header) Attribute(key string) string {
	for _, a := range h.Attributes {
		if strings.EqualFold(a.Key, key) {
			return a.Value
		}
	}
	return ""
}

// File is an open file whose header is read.
type File struct {
	Header
	name    string
	opt     Options
	lines   *lines
	rows    rows
	row     row
	roles   []Role
	steps   []step
	texts   bool
	clock   clock
	notes   notes
	asks    []question // columns that are not used, until Use says what they hold
	flags   flagCount
	failure error
	last    time.Time // start of the last record
}

// row is one record as text. Fields and text are valid until the next one.
type row struct {
	line   int
	text   []byte // the line, where the fields still lie in it
	fields [][]byte
	starts []int // of the fields in text, where quoted
	quoted bool  // fields may be copies; else they are parts of text
}

// rows hands out records as text; io.EOF ends them.
type rows interface {
	next(*row) error
}

// Open recognises the format, reads the header and guesses the columns. The name
// stands in messages only. Errors are *Error.
func Open(name string, r io.Reader, opt Options) (*File, error) {
	f := &File{name: plain.Clean(name), opt: opt, lines: newLines(r)}
	const enough = 4096
	head := f.lines.head(enough)
	if bytes.HasPrefix(head, []byte("\xEF\xBB\xBF")) {
		f.lines.skip(3)
		head = f.lines.head(enough)
	}
	if len(head) == 0 && f.lines.end != io.EOF {
		return nil, f.broken(f.lines.end)
	}
	if len(bytes.TrimSpace(head)) == 0 {
		return nil, f.wrong("the file is empty", "a header and records")
	}
	if problem, right := foreign(head); problem != "" {
		return nil, f.wrong(problem, right)
	}
	if err := f.open(head); err != nil {
		return nil, err
	}
	f.uniqueNames()
	f.roles = f.guess()
	if err := f.setRoles(f.roles); err != nil {
		return nil, err
	}
	return f, nil
}

func (f *File) open(head []byte) error {
	first, _, _ := bytes.Cut(head, []byte("\n"))
	switch _, ffi, comma, ok := firstLine(first); {
	case ok && ffi != 1001:
		return f.wrongAt(1, 0, "file format index "+clean(ffiText(ffi))+" is not read", "the data as FFI 1001: one column a variable (a size bin each)")
	case ok && comma:
		return f.openICARTT()
	case ok:
		return f.openAmes()
	}
	return f.openCSV()
}

// foreign recognises files that are no text.
func foreign(head []byte) (problem, right string) {
	const export = "an export as CSV (ncdump or xarray's to_dataframe().to_csv()), ICARTT or NASA Ames, " +
		"with time stamps, supersaturation or diameter in the column names, and units"
	has := func(magic string) bool { return bytes.HasPrefix(head, []byte(magic)) }
	switch {
	case has("CDF\x01"), has("CDF\x02"), has("CDF\x05"):
		return "this is netCDF (classic), which is not read", export
	case has("\x89HDF\r\n\x1a\n"):
		return "this is netCDF-4 or HDF5, which is not read", export
	case has("\x1f\x8b"), has("BZh"), has("\xFD7zXZ"), has("\x28\xB5\x2F\xFD"):
		return "this file is compressed", "the unpacked file"
	case has("PK\x03\x04"):
		return "this is a zip archive or a spreadsheet", "an export as CSV"
	case has("\xFF\xFE"), has("\xFE\xFF"):
		return "this text is UTF-16", "UTF-8"
	case bytes.IndexByte(head, 0) >= 0:
		return "this is no text", "CSV, ICARTT or NASA Ames 1001"
	}
	return "", ""
}

// wrong is an error of the file as a whole.
func (f *File) wrong(problem, right string) error { return f.wrongAt(0, 0, problem, right) }

func (f *File) wrongAt(line, column int, problem, right string) error {
	return &Error{File: f.name, Line: line, Column: column, Problem: problem, Right: right}
}

// broken is a failure of the source.
func (f *File) broken(err error) error {
	line := f.lines.number + 1
	var path *fs.PathError
	switch {
	case errors.As(err, &path):
		err = path.Err // the name stands in front already
	case err == errLongLine:
		return f.wrongAt(line, 0, err.Error(), "one record a line (LF or CR LF)")
	}
	return &Error{File: f.name, Line: line, Problem: "cannot be read: " + err.Error(), Err: err}
}

// Name is the name the file was opened by.
func (f *File) Name() string { return f.name }

// Notes is what is worth knowing about what was read so far.
func (f *File) Notes() []Note {
	all := slices.Clone(f.notes.list)
	if n := len(f.asks); n > 0 {
		first := f.asks[0]
		all = append(all, Note{Code: "ask", Count: n, Text: fmt.Sprintf("column %s is not used: say %s", quoted(f.Columns[first.column].Name), first.say)})
	}
	return append(all, f.flags.notes()...)
}

// question is about a column whose meaning cannot be told.
type question struct {
	column int
	say    string // what to say
}

// uniqueNames gives a second column of the same name a number.
func (f *File) uniqueNames() {
	seen := map[string]int{}
	for i := range f.Columns {
		c := &f.Columns[i]
		seen[c.Name]++
		if n := seen[c.Name]; n > 1 {
			first := c.Name
			for seen[c.Name] > 0 {
				c.Name = first + "#" + itoa(n)
				n++
			}
			seen[c.Name]++
			f.notes.add("twice", 0, "column %s appears more than once; the next is called %s", quoted(first), c.Name)
		}
	}
}
