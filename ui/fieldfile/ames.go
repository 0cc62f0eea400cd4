package fieldfile

import (
	"math"
	"strings"
	"time"
)

// openAmes reads the header of NASA Ames 1001, with or without what EBAS adds.
func (f *File) openAmes() error {
	f.Format = NASAAmes
	h := &headerReader{f: f}
	t, err := h.readTop()
	if err != nil {
		return err
	}
	axis := newColumn(amesName(t.axis))
	axis.Long = clean(t.axis)
	f.Columns = append(f.Columns, axis)
	normal, err := h.readBody(t, ebasVariable)
	if err != nil {
		return err
	}
	f.readMetadata(normal)
	f.nameColumns(normal)
	f.setAxis(t)
	f.findFlags()
	rows := &tableRows{f: f, parting: ' '}
	f.rows = rows
	return rows.detectWrap()
}

// amesName is the first words of a variable's line.
func amesName(line string) string {
	name, _, _ := strings.Cut(line, ",")
	name = clean(name)
	const longest = 60
	if r := []rune(name); len(r) > longest {
		name = string(r[:longest])
	}
	return name
}

// ebasVariable reads "parameter, unit[, Tag=value]*"; a plain VNAME is only a
// name.
func ebasVariable(line string) Column {
	parts := splitAny(line, true)
	c := newColumn(amesName(line))
	c.Standard, c.Long = c.Name, clean(line)
	for i, p := range parts[1:] {
		tag, value, tagged := strings.Cut(p, "=")
		switch {
		case tagged:
			if c.Tags == nil {
				c.Tags = map[string]string{}
			}
			c.Tags[clean(tag)] = clean(value)
		case i == 0:
			c.Unit = clean(p)
		}
	}
	return c
}

// readMetadata takes "Tag: value" out of the normal comments.
func (f *File) readMetadata(normal []string) {
	for _, line := range normal[:max(0, len(normal)-1)] {
		key, value, ok := strings.Cut(line, ":")
		if !ok || strings.TrimSpace(key) == "" {
			f.Comments = append(f.Comments, clean(line))
			continue
		}
		f.Attributes = append(f.Attributes, Attribute{clean(key), clean(value)})
	}
}

// nameColumns takes the names of the last comment, which in EBAS is the line of
// column names, where it has one for each column.
func (f *File) nameColumns(normal []string) {
	if len(normal) == 0 {
		return
	}
	names := strings.Fields(normal[len(normal)-1])
	if len(names) != len(f.Columns) {
		if f.isEBAS() {
			f.notes.add("names", f.lines.number, "the line of column names has %d names for %d columns: the position counts", len(names), len(f.Columns))
		}
		return
	}
	for i, n := range names {
		f.Columns[i].Name = clean(n)
	}
}

func (f *File) isEBAS() bool { return strings.HasPrefix(f.Attribute("Data definition"), "EBAS") }

// setAxis finds the unit and the origin of the time: for EBAS days since
// Startdate, elsewhere what line 9 says, since the date of line 7.
func (f *File) setAxis(t top) {
	unit, origin := "", f.Begin
	for _, word := range strings.FieldsFunc(strings.ToLower(f.Columns[0].Long), func(r rune) bool { return !('a' <= r && r <= 'z') }) {
		if _, ok := timeUnits[word]; ok && unit == "" && len(word) > 1 {
			unit = word
		}
	}
	if f.isEBAS() {
		unit = "days"
		if at, ok := new(clock).read([]byte(startDate(f.Attribute("Startdate")))); ok {
			origin = at
		}
	}
	if unit == "" {
		return // the mapping has to say it
	}
	f.Interval = seconds(t.dx * timeUnits[unit])
	if timeUnits[unit] == day { // 0.041667 days is an hour
		f.Interval = f.Interval.Round(time.Second)
	}
	text := unit + " since " + origin.Format("2006-01-02T15:04:05Z")
	f.Columns[0].time = text
	for i := range f.Columns[1:] {
		c := &f.Columns[i+1]
		if strings.Contains(strings.ToLower(c.Standard), "time") && strings.Contains(strings.ToLower(c.Long), unit) {
			c.time = text
		}
	}
}

// ebasBasis is what the metadata of EBAS say on the state of the air: the keys
// "Volume std. temperature" and "Volume std. pressure" (from memory), or that size
// distributions of level 1 and 2 are at 273.15 K and 1013.25 hPa.
func (f *File) ebasBasis(q Quantity) Basis {
	if !f.isEBAS() {
		return Unstated
	}
	t, p := f.Attribute("Volume std. temperature"), f.Attribute("Volume std. pressure")
	level := f.Attribute("Data level")
	switch {
	case strings.HasPrefix(t, "273.15") && strings.HasPrefix(p, "1013.25"):
		return Standard
	case strings.EqualFold(t, "ambient") && strings.EqualFold(p, "ambient"):
		return Ambient
	case t == "" && q.IsSize() && (strings.HasPrefix(level, "1") || strings.HasPrefix(level, "2")):
		return Standard
	}
	return Unstated
}

// startDate brings YYYYMMDDhhmmss into the basic form of ISO 8601.
func startDate(s string) string {
	const date = 8
	if len(s) > date {
		return s[:date] + "T" + s[date:] + "Z"
	}
	return s
}

// findFlags tells each column which flag column judges it: the next one.
func (f *File) findFlags() {
	flag := -1
	for i := len(f.Columns) - 1; i > 0; i-- {
		c := &f.Columns[i]
		if strings.HasPrefix(strings.ToLower(c.Standard), "numflag") {
			flag = i
			f.flagColumns = append([]int{i}, f.flagColumns...)
			c.missing = math.NaN() // a flag is never missing
			continue
		}
		if c.time == "" {
			c.flag = flag
		}
	}
}

// detectWrap looks at the first record: a line that is too short means that
// records go over several lines.
func (t *tableRows) detectWrap() error {
	line, err := t.f.lines.next()
	if err != nil {
		return nil // no record: next says so
	}
	var r row
	t.split(&r, line)
	t.f.lines.again()
	if n := len(r.fields); n > 0 && n < len(t.f.Columns) && t.f.lines.ended {
		t.wrapped = true
		t.f.notes.add("wrapped", t.f.lines.number+1, "records go over several lines")
	}
	return nil
}
