package fieldfile

import (
	"fmt"
	"slices"
	"strings"

	"dropcrest/ui/near"
)

// Roles is what each column holds, in the order of the file.
func (f *File) Roles() []Role { return append([]Role(nil), f.roles...) }

// Mapping is the text of the roles, a line a column: "column=role". Use reads it
// back. Columns that are not used are left out.
func (f *File) Mapping() []string {
	var lines []string
	for i, r := range f.roles {
		if r.Quantity != Unused {
			lines = append(lines, f.Columns[i].Name+"="+r.String())
		}
	}
	return lines
}

// Use changes what columns hold. Each line is "column=role"; the column may
// contain one * that stands for a number, which the role takes over by *, so that
// "N_*=dN/dlog10D @*nm in cm-3" serves a hundred columns. Without "in" the
// column's own unit stays. After an error nothing is changed.
func (f *File) Use(lines ...string) error {
	roles := f.Roles()
	for _, line := range lines {
		if err := f.use(roles, line); err != nil {
			return &Error{File: f.name, Problem: err.Error()}
		}
	}
	return f.setRoles(roles)
}

// Names reports whether a line of Use names a column of the file. A line without
// "=" names none.
func (f *File) Names(line string) bool {
	i := strings.LastIndex(line, "=")
	return i >= 0 && slices.ContainsFunc(f.Columns, func(c Column) bool {
		_, ok := match(strings.TrimSpace(line[:i]), c.Name)
		return ok
	})
}

func (f *File) use(roles []Role, line string) error {
	i := strings.LastIndex(line, "=")
	if i < 0 {
		return fmt.Errorf("%s maps nothing: want column=quantity", quoted(line))
	}
	pattern, text := strings.TrimSpace(line[:i]), line[i+1:]
	if strings.TrimSpace(text) == "" {
		text = declared[Unused].key
	}
	found := false
	for c := range f.Columns {
		middle, ok := match(pattern, f.Columns[c].Name)
		if !ok {
			continue
		}
		found = true
		r, err := ParseRole(f.completed(c, strings.ReplaceAll(text, "*", middle)))
		if err != nil {
			return fmt.Errorf("column %s: %w", quoted(f.Columns[c].Name), err)
		}
		if r.Quantity == Flag && !slices.Contains(f.flagColumns, c) {
			return fmt.Errorf("column %s holds no flags: want a numflag column of NASA Ames", quoted(f.Columns[c].Name))
		}
		roles[c] = r
		f.asks = slices.DeleteFunc(f.asks, func(q question) bool { return q.column == c }) // answered
	}
	if found {
		return nil
	}
	names := make([]string, len(f.Columns))
	for c := range f.Columns {
		names[c] = f.Columns[c].Name
	}
	right := "one of " + strings.Join(names[:min(len(names), 12)], ", ")
	if word := near.Word(pattern, names); word != "" {
		right = word + "?"
	}
	return fmt.Errorf("no column %s: want %s", quoted(pattern), right)
}

// completed adds the column's own unit and air to a role that names none.
func (f *File) completed(c int, text string) string {
	q, _, _ := strings.Cut(strings.TrimSpace(text), " ")
	quantity, ok := quantityOf(q)
	if !ok || strings.Contains(text, " in ") {
		return text
	}
	own := f.Columns[c].Unit
	switch declared[quantity].kind {
	case asTime:
		own = isoUnit
		if f.Columns[c].time != "" {
			own = f.Columns[c].time
		}
	case asText, asFlags:
		own = ""
	case asNumber:
		if own == "" && !declared[quantity].dim.free {
			return text // let it be asked for
		}
	}
	if own == "" {
		return text
	}
	if i := strings.LastIndex(text, " at "); i >= 0 {
		return text[:i] + " in " + own + text[i:]
	}
	return text + " in " + own
}

// match compares a name with a pattern whose * stands for a number.
func match(pattern, name string) (middle string, ok bool) {
	before, after, wild := strings.Cut(pattern, "*")
	if !wild {
		return "", pattern == name
	}
	if len(name) < len(before)+len(after) || !strings.HasPrefix(name, before) || !strings.HasSuffix(name, after) {
		return "", false
	}
	middle = name[len(before) : len(name)-len(after)]
	if _, ok := number([]byte(middle)); ok {
		return middle, true
	}
	middle = strings.Replace(middle, "p", ".", 1) // 0p3: ICARTT names have no point
	_, ok = number([]byte(middle))
	return middle, ok
}
