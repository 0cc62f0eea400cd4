package fieldfile

import (
	"bufio"
	"fmt"
	"io"
	"math"
	"slices"
	"strings"
	"time"

	"dropcrest/ui/plain"
)

// The codes that written ICARTT files use. A value as large as they are is an
// error, not a missing value.
const (
	writtenMissing = -9999999
	writtenBelow   = -8888888
	writtenAbove   = -7777777
)

// ICARTTHeader is what a written file says about itself. Empty texts become
// "N/A".
type ICARTTHeader struct {
	Investigator, Organisation, Source, Mission string
	Begin, Revised                              time.Time // dates; Begin is that of the first record
	Interval                                    time.Duration
	Keywords                                    map[string]string // PI_CONTACT_INFO and so on
	Revision                                    string            // "R0"; "": R0
	RevisionText                                string
	Comments                                    []string // special comments
}

// ICARTTWriter writes FFI 1001 of ICARTT V2, holding one record at a time.
type ICARTTWriter struct {
	out     *bufio.Writer
	columns []Output
	names   []string
	units   []unit
	begin   time.Time
	last    float64
	any     bool
	scratch []byte
}

// NewICARTTWriter writes the header: Time_Start, Time_Stop, then the columns.
// Whoever opened w sees to it that the file appears whole or not at all.
func NewICARTTWriter(w io.Writer, h ICARTTHeader, columns []Output) (*ICARTTWriter, error) {
	begin := h.Begin.UTC().Truncate(day * time.Second)
	t := &ICARTTWriter{out: bufio.NewWriter(w), columns: columns, begin: begin}
	t.names = []string{"Time_Start", "Time_Stop"}
	for _, o := range columns {
		if declared[o.Role.Quantity].kind != asNumber {
			return nil, fmt.Errorf("%s is text: want numbers only in ICARTT", o.Role.Quantity)
		}
		t.names = append(t.names, shortName(o.name(), t.names))
	}
	for _, line := range t.header(h) {
		if _, err := t.out.WriteString(line + "\n"); err != nil {
			return nil, err
		}
	}
	return t, nil
}

// header makes the lines of the header; the first counts them.
func (t *ICARTTWriter) header(h ICARTTHeader) []string {
	nv := len(t.names) - 1
	repeat := func(text string) string { return strings.TrimSuffix(strings.Repeat(text+", ", nv), ", ") }
	lines := []string{"", given(h.Investigator), given(h.Organisation), given(h.Source), given(h.Mission), "1, 1",
		dates(t.begin) + ", " + dates(h.Revised.UTC()), string(digits(nil, h.Interval.Seconds())),
		"Time_Start, seconds, Time_Start, start of the record", itoa(nv), repeat("1"), repeat(itoa(writtenMissing)),
		"Time_Stop, seconds, Time_Stop, end of the record"}
	for i, o := range t.columns {
		u, _, name := o.unit()
		t.units = append(t.units, u)
		lines = append(lines, t.names[i+2]+", "+name+", "+standardName(o)+", "+ascii(longName(o)))
	}
	lines = append(lines, itoa(len(h.Comments)))
	for _, c := range h.Comments {
		lines = append(lines, ascii(c))
	}
	normal := normalComments(h, t.names)
	lines = append(append(lines, itoa(len(normal))), normal...)
	lines[0] = fmt.Sprintf("%d, 1001, V02_2016", len(lines))
	return lines
}

func normalComments(h ICARTTHeader, names []string) []string {
	var lines []string
	for _, key := range icarttKeys {
		value := given(h.Keywords[key])
		switch key {
		case "ULOD_FLAG":
			value = itoa(writtenAbove)
		case "LLOD_FLAG":
			value = itoa(writtenBelow)
		case "REVISION":
			value = ascii(h.Revision)
			if value == "" {
				value = "R0"
			}
			lines = append(lines, key+": "+value)
			key, value = value, given(h.RevisionText)
		}
		lines = append(lines, key+": "+value)
	}
	return append(lines, strings.Join(names, ", "))
}

// given is a text of the header on one line, "N/A" where there is none.
func given(s string) string {
	if s = ascii(s); s == "" {
		return "N/A"
	}
	return s
}

func ascii(s string) string { return strings.TrimSpace(plain.ASCII(plain.Clean(s))) }

func dates(t time.Time) string { return t.Format("2006, 01, 02") }

func standardName(o Output) string { return o.Role.Quantity.String() }

func longName(o Output) string {
	if o.Long != "" {
		return o.Long
	}
	d := declared[o.Role.Quantity]
	text := d.says
	switch {
	case o.Role.From > 0:
		text += fmt.Sprintf(", diameter %s to %s nm", short(o.Role.From*1e9), short(o.Role.To*1e9))
	case o.Role.At > 0 && d.at == atDiameter:
		text += fmt.Sprintf(" at a diameter of %s nm", short(o.Role.At*1e9))
	case o.Role.At > 0:
		text += fmt.Sprintf(" at %s %% supersaturation", short(o.Role.At*100))
	}
	switch o.Role.Basis {
	case Standard:
		text += ", at STP (273.15 K, 1013.25 hPa)"
	case Ambient:
		text += ", ambient"
	}
	return text
}

// shortName makes a name of ICARTT: a letter first, then letters, digits and
// underscores, at most 31, none twice.
func shortName(name string, taken []string) string {
	const longest = 31
	var b strings.Builder
	for _, r := range strings.ReplaceAll(strings.ReplaceAll(ascii(name), "..", "_"), ".", "p") {
		letter := 'a' <= r && r <= 'z' || 'A' <= r && r <= 'Z'
		switch {
		case letter, b.Len() > 0 && (isDigit(byte(r)) || r == '_'):
			b.WriteRune(r)
		case b.Len() > 0:
			b.WriteByte('_')
		}
	}
	base := b.String()
	if base == "" {
		base = "x"
	}
	out := base[:min(len(base), longest)]
	for n := 2; slices.Contains(taken, out); n++ {
		tail := "_" + itoa(n)
		out = base[:min(len(base), longest-len(tail))] + tail
	}
	return out
}

// Write writes a record; times have to rise.
func (t *ICARTTWriter) Write(rec *Record) error {
	start := rec.Start.Sub(t.begin).Seconds()
	if rec.Start.IsZero() || t.any && !(start > t.last) {
		return fmt.Errorf("the record of %s is not later than the one before: want rising times in ICARTT", rec.Start.Format(time.RFC3339))
	}
	t.any, t.last = true, start
	b := digits(t.scratch[:0], start)
	b = append(b, ", "...)
	b = digits(b, rec.End.Sub(t.begin).Seconds())
	for i := range t.columns {
		b = append(b, ", "...)
		x := t.units[i].fromSI(rec.Cells[i].X)
		switch rec.Cells[i].State {
		case Missing:
			x = writtenMissing
		case Below:
			x = writtenBelow
		case Above:
			x = writtenAbove
		case Value:
			if !(x > writtenAbove) || math.IsInf(x, 0) {
				return fmt.Errorf("%s of %s cannot be told from a code: want a value above %d", short(x), t.names[i+2], writtenAbove)
			}
		}
		b = digits(b, x)
	}
	t.scratch = append(b, '\n')
	_, err := t.out.Write(t.scratch)
	return err
}

// Flush writes what is left. It must be called once at the end.
func (t *ICARTTWriter) Flush() error { return t.out.Flush() }
