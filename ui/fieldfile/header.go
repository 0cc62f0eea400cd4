package fieldfile

import (
	"io"
	"math"
	"strings"
	"time"
)

// The headers of ICARTT and NASA Ames are the same list of lines; they differ in
// what parts the numbers and in what the comments say.

// formats of FFI that are not 1001, to name them.
func ffiText(ffi int) string {
	if ffi == 2110 || ffi == 2310 || ffi == 2010 || ffi == 2160 {
		return itoa(ffi) + " (two independent variables)"
	}
	return itoa(ffi)
}

// firstLine reads "NLHEAD, FFI[, version]" (ICARTT, comma) or "NLHEAD FFI".
func firstLine(line []byte) (nlhead, ffi int, comma, ok bool) {
	text := strings.TrimSpace(string(line[:min(len(line), 200)]))
	comma = strings.Contains(text, ",")
	parts := splitAny(text, comma)
	if len(parts) < 2 || !comma && len(parts) > 2 {
		return 0, 0, false, false
	}
	nlhead, a := whole([]byte(parts[0]))
	ffi, b := whole([]byte(parts[1]))
	const least, most = 1001, 9999
	ok = a && b && ffi >= least && ffi <= most && len(parts[1]) == 4
	if len(parts) > 2 { // a version is a word; a third number is a record of CSV
		_, isNumber := number([]byte(parts[2]))
		ok = ok && !isNumber
	}
	return nlhead, ffi, comma, ok
}

// splitAny parts by commas (blanks around them dropped) or by blanks.
func splitAny(text string, comma bool) []string {
	if !comma {
		return strings.Fields(text)
	}
	parts := strings.Split(text, ",")
	for i := range parts {
		parts[i] = strings.TrimSpace(parts[i])
	}
	return parts
}

// headerReader walks through the header line by line.
type headerReader struct {
	f     *File
	comma bool // ICARTT
}

// most of anything that a header counts, so that a wrong number cannot fill the
// memory.
const mostInHeader = 100000

// line returns the next line; what names it in messages.
func (h *headerReader) line(what string) (string, error) {
	line, err := h.f.lines.next()
	if err == io.EOF {
		return "", h.f.wrongAt(h.f.lines.number+1, 0, "the header ends before "+what, "the complete file")
	}
	if err != nil {
		return "", h.f.broken(err)
	}
	h.checkASCII(line)
	return strings.TrimSpace(string(line)), nil
}

// checkASCII notes what the formats do not allow and readers take all the same.
func (h *headerReader) checkASCII(line []byte) {
	for _, c := range line {
		if c >= 0x80 {
			h.f.notes.add("not_ascii", h.f.lines.number, "the header has signs that are not ASCII")
			return
		}
	}
}

func (h *headerReader) wrong(text, right string) error {
	return h.f.wrongAt(h.f.lines.number, 1, quoted(text)+" in the header", right)
}

// count reads a line that is one whole number.
func (h *headerReader) count(what string) (int, error) {
	text, err := h.line(what)
	if err != nil {
		return 0, err
	}
	first, _, _ := strings.Cut(text, ",")
	n, ok := whole([]byte(strings.TrimSpace(first)))
	if !ok || n > mostInHeader {
		return 0, h.wrong(text, what+": a whole number")
	}
	return n, nil
}

// numbers reads n numbers: one line, or in NASA Ames as many lines as it takes.
func (h *headerReader) numbers(n int, what string) (values []float64, texts []string, err error) {
	for len(values) < n {
		line, err := h.line(what)
		if err != nil {
			return nil, nil, err
		}
		at := h.f.lines.number
		for _, p := range splitAny(line, h.comma) {
			x, ok := h.f.strangeOrPlain([]byte(p))
			if !ok {
				if strings.EqualFold(p, "n/a") {
					x, ok = math.NaN(), true
				} else {
					return nil, nil, h.f.wrongAt(at, 1, quoted(p)+" is no number", what+": "+itoa(n)+" numbers")
				}
			}
			values, texts = append(values, x), append(texts, clean(p))
		}
		if h.comma {
			break
		}
	}
	if len(values) != n {
		return nil, nil, h.f.wrongAt(h.f.lines.number, 0, itoa(len(values))+" numbers", what+": "+itoa(n)+" numbers, one for each variable")
	}
	return values, texts, nil
}

func (f *File) strangeOrPlain(b []byte) (float64, bool) {
	if x, ok := number(b); ok {
		return x, true
	}
	return f.strange(b)
}

// texts reads that many lines of comments.
func (h *headerReader) texts(n int, what string) ([]string, error) {
	var all []string
	for range n {
		line, err := h.f.lines.next() // blanks in front mean something here
		if err == io.EOF {
			return nil, h.f.wrongAt(h.f.lines.number+1, 0, "the header ends inside "+what, itoa(n)+" lines")
		}
		if err != nil {
			return nil, h.f.broken(err)
		}
		h.checkASCII(line)
		all = append(all, strings.TrimRight(string(line), " \t"))
	}
	return all, nil
}

// top is what stands before the variables.
type top struct {
	nlhead int
	axis   string // line 9
	dx     float64
}

// readTop reads lines 1 to 9.
func (h *headerReader) readTop() (t top, err error) {
	f := h.f
	line, err := h.line("line 1")
	if err != nil {
		return t, err
	}
	t.nlhead, _, _, _ = firstLine([]byte(line))
	for _, p := range []*string{&f.Investigator, &f.Organisation, &f.Source, &f.Mission} {
		if line, err = h.line("line 5, the mission"); err != nil {
			return t, err
		}
		*p = clean(line)
	}
	if _, err = h.line("line 6, the volume"); err != nil {
		return t, err
	}
	if err = h.readDates(); err != nil {
		return t, err
	}
	if line, err = h.line("line 8, the interval"); err != nil {
		return t, err
	}
	first, _, _ := strings.Cut(strings.ReplaceAll(line, ",", " "), " ")
	x, ok := f.strangeOrPlain([]byte(first))
	if !ok || !(x >= 0) {
		return t, h.wrong(line, "line 8: the interval of the records, 0 where it is not constant")
	}
	t.dx = x
	t.axis, err = h.line("line 9, the independent variable")
	return t, err
}

// readDates reads line 7: the date of the first datum and that of the revision.
func (h *headerReader) readDates() error {
	line, err := h.line("line 7, the dates")
	if err != nil {
		return err
	}
	parts := splitAny(line, strings.Contains(line, ","))
	right := "line 7: year, month, day of the first datum and of the revision, such as 2026, 03, 14, 2026, 05, 02"
	if len(parts) < 6 {
		return h.wrong(line, right)
	}
	var n [6]int
	for i := range n {
		v, ok := whole([]byte(parts[i]))
		if !ok {
			return h.wrong(line, right)
		}
		n[i] = v
	}
	begin, okBegin := date(n[0], n[1], n[2])
	revised, okRevised := date(n[3], n[4], n[5])
	if !okBegin {
		return h.wrong(line, right)
	}
	h.f.Begin = begin
	if okRevised {
		h.f.Revised = revised
	} else {
		h.f.notes.add("revision_date", h.f.lines.number, "the date of the revision is none: %s", quoted(line))
	}
	return nil
}

func date(year, month, dom int) (time.Time, bool) {
	t := time.Date(year, time.Month(month), dom, 0, 0, 0, 0, time.UTC)
	return t, year > 0 && year < 10000 && month >= 1 && month <= 12 && t.Day() == dom
}

// readVariables reads NV, the scale factors and the missing codes, and calls
// describe for each of the NV lines after them.
func (h *headerReader) readVariables(describe func(line string) Column) error {
	nv, err := h.count("the number of variables")
	if err != nil {
		return err
	}
	if nv == 0 {
		return h.f.wrongAt(h.f.lines.number, 1, "no variables", "the number of variables, at least 1")
	}
	scales, _, err := h.numbers(nv, "the scale factors")
	if err != nil {
		return err
	}
	codes, texts, err := h.numbers(nv, "the missing-data codes")
	if err != nil {
		return err
	}
	for i := range nv {
		line, err := h.line("the name of variable " + itoa(i+1) + " of " + itoa(nv))
		if err != nil {
			return err
		}
		c := describe(line)
		c.Scale, c.Missing, c.missing = scales[i], texts[i], codes[i]
		if math.IsNaN(c.Scale) || c.Scale == 0 {
			return h.f.wrongAt(h.f.lines.number, 0, "the scale factor of "+quoted(c.Name)+" is "+quoted(short(c.Scale)), "a number other than 0")
		}
		h.f.Columns = append(h.f.Columns, c)
	}
	return nil
}

// readBody reads the variables and both blocks of comments. The special ones are
// free text; the normal ones are returned.
func (h *headerReader) readBody(t top, describe func(line string) Column) (normal []string, err error) {
	if err := h.readVariables(describe); err != nil {
		return nil, err
	}
	n, err := h.count("the number of special comments")
	if err != nil {
		return nil, err
	}
	special, err := h.texts(n, "the special comments")
	if err != nil {
		return nil, err
	}
	for _, line := range special {
		h.f.Comments = append(h.f.Comments, clean(line))
	}
	if n, err = h.count("the number of normal comments"); err != nil {
		return nil, err
	}
	if normal, err = h.texts(n, "the normal comments"); err != nil {
		return nil, err
	}
	if got := h.f.lines.number; got != t.nlhead {
		h.f.notes.add("nlhead", 1, "line 1 says %d header lines, the header counts %d: the counts are trusted", t.nlhead, got)
	}
	return normal, nil
}
