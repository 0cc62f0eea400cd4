package answer

import (
	"fmt"
	"strings"

	"dropcrest/ui/fieldfile"
	"dropcrest/ui/near"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// useMap gives columns the meaning that the scenario says. A line counts in the
// files that have its column, or only in the one that it names in front, as the
// mapping that is shown does: "sizes.nas: D_12=unused". One that no column answers
// to is wrong.
func useMap(files []*fieldfile.File, lines []scenario.MapLine) error {
	own := make([][]string, len(files)) // the lines of each file
	for _, m := range lines {
		text, only := fileOf(files, m.Text)
		found := false
		for i, f := range files {
			if (only == nil || only == f) && f.Names(text) {
				own[i], found = append(own[i], text), true
			}
		}
		if !found {
			return &InputError{Input: "map", Text: noColumn(files, only, text)}
		}
	}
	for i, f := range files {
		if err := f.Use(own[i]...); err != nil {
			return &InputError{Input: "map", Text: err.Error()}
		}
	}
	return nil
}

// fileOf is the line without the name of a file in front of it, and that file; nil
// where it names none.
func fileOf(files []*fieldfile.File, line string) (string, *fieldfile.File) {
	for _, f := range files {
		if rest, ok := strings.CutPrefix(line, f.Name()+": "); ok {
			return rest, f
		}
	}
	return line, nil
}

// noColumn says that no file has the column of a line, and which one may be meant.
func noColumn(files []*fieldfile.File, only *fieldfile.File, line string) string {
	if only != nil {
		files = []*fieldfile.File{only}
	}
	if len(files) == 1 {
		return files[0].Use(line).Error() // it knows its columns
	}
	end := strings.LastIndex(line, "=")
	if end < 0 {
		return fmt.Sprintf("%q maps nothing: want column=quantity", plain.Clean(line))
	}
	column := strings.TrimSpace(plain.Clean(line[:end]))
	var names []string
	for _, f := range files {
		for _, c := range f.Columns {
			names = append(names, c.Name)
		}
	}
	right := near.Word(column, names)
	if right != "" {
		right += "?"
	} else {
		const some = 6 // of each file: sizes fill hundreds
		for _, f := range files {
			for _, c := range f.Columns[:min(len(f.Columns), some)] {
				right += c.Name + ", "
			}
			right += "… of " + f.Name() + "; "
		}
		right = "one such as " + strings.TrimSuffix(right, "; ")
	}
	return fmt.Sprintf("no file of the data has a column %q: want %s", column, right)
}
