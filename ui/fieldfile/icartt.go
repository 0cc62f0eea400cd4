package fieldfile

import (
	"bytes"
	"math"
	"slices"
	"strings"
	"time"
)

// icarttKeys are the keywords of the normal comments, in their order. All are
// required; "N/A" is a value.
var icarttKeys = []string{
	"PI_CONTACT_INFO", "PLATFORM", "LOCATION", "ASSOCIATED_DATA", "INSTRUMENT_INFO", "DATA_INFO", "UNCERTAINTY",
	"ULOD_FLAG", "ULOD_VALUE", "LLOD_FLAG", "LLOD_VALUE", "DM_CONTACT_INFO", "PROJECT_INFO",
	"STIPULATIONS_ON_USE", "OTHER_COMMENTS", "REVISION",
}

// openICARTT reads the header of ICARTT, FFI 1001.
func (f *File) openICARTT() error {
	f.Format = ICARTT
	h := &headerReader{f: f, comma: true}
	t, err := h.readTop()
	if err != nil {
		return err
	}
	f.Interval = seconds(t.dx)
	axis := icarttVariable(t.axis)
	axis.time = "seconds since " + f.Begin.Format(time.DateOnly)
	f.Columns = append(f.Columns, axis)
	normal, err := h.readBody(t, icarttVariable)
	if err != nil {
		return err
	}
	f.readKeywords(normal)
	f.readLimits()
	for i := range f.Columns {
		f.checkShortName(f.Columns[i].Name)
		if u := strings.ToLower(f.Columns[i].Unit); i > 0 && strings.HasPrefix(u, "s") && isTimeName(f.Columns[i]) {
			f.Columns[i].time = axis.time // Time_Stop and Time_Mid are on the same axis
		}
	}
	f.rows = &tableRows{f: f, parting: f.parting()}
	return nil
}

// seconds as a duration; what no duration can hold is none.
func seconds(x float64) time.Duration {
	const longest = 1e8 // three years
	if !(x > 0 && x < longest) {
		return 0
	}
	return time.Duration(math.Round(x * 1e9))
}

// icarttVariable reads "shortname, units[, standardname[, longname]]"; the long
// name may contain commas.
func icarttVariable(line string) Column {
	parts := strings.SplitN(line, ",", 4)
	c := newColumn(clean(parts[0]))
	text := func(i int) string {
		if i >= len(parts) {
			return ""
		}
		s := clean(parts[i])
		if strings.EqualFold(s, "n/a") || i == 2 && strings.EqualFold(s, "none") {
			return ""
		}
		return s
	}
	c.Unit, c.Standard, c.Long = text(1), text(2), text(3)
	return c
}

// checkShortName notes names against the grammar: a letter, then letters, digits
// and underscores, at most 31.
func (f *File) checkShortName(name string) {
	const longest = 31
	good := name != "" && len(name) <= longest
	for i, c := range name {
		letter := 'a' <= c && c <= 'z' || 'A' <= c && c <= 'Z'
		if !letter && (i == 0 || !('0' <= c && c <= '9') && c != '_') {
			good = false
		}
	}
	if !good {
		f.notes.add("short_name", 0, "%s is no short name of ICARTT: a letter, then letters, digits and underscores, at most 31", quoted(name))
	}
}

// readKeywords parts the normal comments: free lines, keywords with their
// continuation lines, and last the short names.
func (f *File) readKeywords(normal []string) {
	if len(normal) == 0 {
		f.notes.add("no_comments", 0, "no normal comments: no keywords and no line of short names")
		return
	}
	f.checkNames(normal[len(normal)-1])
	for _, line := range normal[:len(normal)-1] {
		key, value, ok := keyword(line)
		switch n := len(f.Attributes); {
		case ok:
			f.Attributes = append(f.Attributes, Attribute{key, value})
		case n == 0:
			f.Comments = append(f.Comments, clean(line))
		case f.Attributes[n-1].Value == "":
			f.Attributes[n-1].Value = clean(line)
		default:
			f.Attributes[n-1].Value += "\n" + clean(line)
		}
	}
	var absent []string
	for _, key := range icarttKeys {
		if !slices.ContainsFunc(f.Attributes, func(a Attribute) bool { return a.Key == key }) {
			absent = append(absent, key)
		}
	}
	if len(absent) > 0 {
		f.notes.add("keywords", 0, "the header lacks %s", strings.Join(absent, ", "))
	}
}

// keyword reads "KEY: value"; a blank before the colon is tolerated. Revisions,
// "R1: text" and "RA: text", count as keys too.
func keyword(line string) (key, value string, ok bool) {
	key, value, ok = strings.Cut(line, ":")
	key = strings.TrimRight(key, " \t")
	if !ok {
		return "", "", false
	}
	revision := len(key) >= 2 && len(key) <= 3 && key[0] == 'R' && strings.Trim(key[1:], "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ") == ""
	if !revision && !slices.Contains(icarttKeys, key) {
		return "", "", false
	}
	return key, clean(value), true
}

// checkNames compares the line of short names with the declared ones.
func (f *File) checkNames(line string) {
	names := splitAny(line, strings.Contains(line, ","))
	if len(names) != len(f.Columns) {
		f.notes.add("names", f.lines.number, "the line of short names has %d names for %d columns: the position counts", len(names), len(f.Columns))
		return
	}
	for i, n := range names {
		if clean(n) != f.Columns[i].Name {
			f.notes.add("names", f.lines.number, "column %d is called %s in the line of short names and %s where it is declared: the position counts",
				i+1, quoted(n), quoted(f.Columns[i].Name))
		}
	}
}

// parting is what parts the values of the records: commas, and if lenient
// whatever the first record shows.
func (f *File) parting() byte {
	if !f.opt.Lenient {
		return ','
	}
	line, err := f.lines.next()
	if err != nil {
		return ','
	}
	f.lines.again()
	if bytes.IndexByte(line, ',') < 0 {
		f.notes.add("parted", f.lines.number+1, "values are parted by blanks or tabs instead of commas")
		return ' '
	}
	return ','
}

// isTimeName reports whether a column is called a time.
func isTimeName(c Column) bool {
	return strings.Contains(strings.ToLower(c.Name+" "+c.Standard), "time")
}
