package fieldfile

import (
	"io"
	"strconv"
	"time"
	"unicode/utf8"
)

// step reads one column of a record.
type step struct {
	column   int
	kind     kind
	quantity Quantity
	unit     unit
	scale    float64
	code     float64 // of a missing value; NaN: none
	lower    float64 // SI; NaN: not given
	upper    float64
	time     timeScale
	iso      bool
	flag     int // index in Record.Flags; -1: none
}

// setRoles takes the roles and makes the steps of them.
func (f *File) setRoles(roles []Role) error {
	var steps []step
	texts, judged := false, map[int]int{}
	for slot, column := range f.flagColumns {
		judged[column] = slot
		steps = append(steps, step{column: column, kind: asFlags, flag: slot})
	}
	for i, r := range roles {
		if r.Quantity == Unused || r.Quantity == Flag {
			continue
		}
		if err := r.check(); err != nil {
			return f.wrong("column "+quoted(f.Columns[i].Name)+": "+err.Error(), "")
		}
		c := f.Columns[i]
		s := step{column: i, kind: declared[r.Quantity].kind, quantity: r.Quantity, scale: c.Scale, code: c.missing, flag: -1}
		if slot, ok := judged[c.flag]; ok {
			s.flag = slot
		}
		switch s.kind {
		case asTime:
			s.time, _ = parseTimeUnit(r.Unit)
			s.iso = s.time.unit == 0
		case asNumber:
			s.unit = unit{1, 1, 0}
			if r.Quantity != Number {
				s.unit, _ = declared[r.Quantity].dim.unit(r.Unit)
			}
			if r.Quantity == PerLnDiameter {
				s.unit.mul *= perLn
			}
			s.lower, s.upper = s.unit.si(c.Lower), s.unit.si(c.Upper)
		case asText:
			texts = true
		}
		steps = append(steps, s)
	}
	f.roles, f.steps, f.texts = roles, steps, texts
	return nil
}

// Read reads the next record. It returns io.EOF at the end and an *Error where
// the file is wrong; after an error every further Read returns it again.
func (f *File) Read(rec *Record) error {
	if f.failure != nil {
		return f.failure
	}
	err := f.rows.next(&f.row)
	if err == nil {
		err = f.decode(rec)
	}
	if err != nil {
		f.failure = err
		f.noteHabits()
	}
	return err
}

// noteHabits tells what the clock met, once the file has been read.
func (f *File) noteHabits() {
	if f.clock.noOffset {
		f.notes.add("no_offset", 0, "time stamps without an offset are taken as UTC")
	}
	if f.clock.leap {
		f.notes.add("leap_second", 0, "a leap second (:60) is taken as :59")
	}
}

func (f *File) prepare(rec *Record) {
	n := len(f.Columns)
	if cap(rec.Cells) < n {
		rec.Cells = make([]Cell, n)
	}
	rec.Cells = rec.Cells[:n]
	clear(rec.Cells)
	switch {
	case !f.texts:
		rec.Text = nil
	case len(rec.Text) != n:
		rec.Text = make([]string, n)
	}
	if len(rec.Flags) != len(f.flagColumns) {
		rec.Flags = make([][]int, len(f.flagColumns))
	}
	rec.Line, rec.Start, rec.End = f.row.line, time.Time{}, time.Time{}
}

func (f *File) decode(rec *Record) error {
	f.prepare(rec)
	for i := range f.steps {
		s := &f.steps[i]
		field := f.row.fields[s.column]
		var ok bool
		switch s.kind {
		case asNumber:
			rec.Cells[s.column], ok = f.cell(s, field)
			if ok && s.flag >= 0 {
				f.judge(&rec.Cells[s.column], rec.Flags[s.flag])
			}
		case asTime:
			ok = f.stamp(s, field, rec)
		case asFlags:
			rec.Flags[s.flag], ok = f.readFlags(rec.Flags[s.flag][:0], field)
		case asText:
			ok = true
			if string(field) != rec.Text[s.column] {
				rec.Text[s.column] = clean(field)
			}
		}
		if !ok {
			return f.badField(s, field)
		}
	}
	f.closeTimes(rec)
	return nil
}

func (f *File) stamp(s *step, field []byte, rec *Record) bool {
	var t time.Time
	var ok bool
	if s.iso {
		t, ok = f.clock.read(field)
	} else if x, fine := f.strangeOrPlain(field); fine {
		if alike(x, s.code) {
			return true // no time in this record
		}
		t, ok = s.time.at(x * s.scale)
	}
	if !ok {
		return false
	}
	switch s.quantity {
	case EndTime:
		rec.End = t
	case MidTime:
		half := f.Interval / 2
		if rec.Start.IsZero() { // a start column says more
			rec.Start = t.Add(-half)
		}
		if rec.End.IsZero() && half > 0 {
			rec.End = t.Add(half)
		}
	default:
		rec.Start = t
	}
	return true
}

// closeTimes completes the interval of a record and notes when time runs back.
func (f *File) closeTimes(rec *Record) {
	switch {
	case rec.Start.IsZero() && rec.End.IsZero():
		return
	case rec.Start.IsZero():
		rec.Start = rec.End.Add(-f.Interval)
	case rec.End.IsZero():
		rec.End = rec.Start.Add(f.Interval)
	}
	if rec.End.Before(rec.Start) {
		f.notes.add("end_before_start", rec.Line, "a record ends before it starts; it is taken as an instant")
		rec.End = rec.Start
	}
	switch {
	case rec.Start.Before(f.last):
		f.notes.add("time_back", rec.Line, "time runs backwards")
	case f.Format != CSV && rec.Start.Equal(f.last):
		f.notes.add("time_still", rec.Line, "two records have the same time")
	}
	f.last = rec.Start
}

// badField is the error of a field that cannot be read.
func (f *File) badField(s *step, field []byte) error {
	r := f.roles[s.column]
	problem := quoted(field) + " is no number"
	right := "a number with a point as the decimal sign"
	switch {
	case s.kind == asFlags:
		problem, right = quoted(field)+" is no EBAS flag", "0. and three digits a flag, such as 0.000 or 0.147559"
	case s.kind == asTime && s.iso:
		problem, right = quoted(field)+" is no time", "a time such as 2026-03-14T08:30:00Z, or the unit of the numbers: "+
			f.Columns[s.column].Name+"="+r.Quantity.String()+" in seconds since 2026-03-14"
	case s.kind == asTime:
		problem, right = quoted(field)+" is no time", "a number: "+r.Unit
	case f.Format == CSV:
		right += `, nothing where a value is missing, "<0.5" below a limit`
	}
	return f.wrongAt(f.row.line, f.row.columnOf(s.column), problem+" (column "+f.Columns[s.column].Name+")", right)
}

// columnOf is the place of a field in its line, in characters from 1; 0 where
// it is not known. A field that lies in its line shares its end of memory.
func (r *row) columnOf(field int) int {
	start := -1
	switch {
	case r.text == nil:
	case r.quoted && field < len(r.starts):
		start = r.starts[field]
	case !r.quoted && field < len(r.fields):
		start = cap(r.text) - cap(r.fields[field])
	}
	if start < 0 {
		return 0
	}
	return utf8.RuneCount(r.text[:min(start, len(r.text))]) + 1
}

func itoa(n int) string { return strconv.Itoa(n) }

// end is the error of next at the end of the lines.
func (f *File) end(err error) error {
	if err == io.EOF {
		return io.EOF
	}
	return f.broken(err)
}
