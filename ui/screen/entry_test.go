package screen

import (
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

func TestField(t *testing.T) {
	for name, c := range map[string]struct {
		keys []string
		want string
	}{
		"typed":               {[]string{"0.25 um"}, "0.25 um|"},
		"cursor in the text":  {[]string{"abc", "left", "left"}, "a|bc"},
		"insert":              {[]string{"ac", "left", "b"}, "ab|c"},
		"ends":                {[]string{"abc", "home", "x", "end", "y"}, "xabcy|"},
		"backspace":           {[]string{"abc", "left", "backspace"}, "a|c"},
		"delete":              {[]string{"abc", "home", "delete"}, "|bc"},
		"nothing to erase":    {[]string{"a", "delete", "home", "backspace"}, "|a"},
		"beyond both ends":    {[]string{"a", "right", "right", "left", "left", "left"}, "|a"},
		"other keys do not":   {[]string{"a", "up", "tab", "pgdown"}, "a|"},
		"letters are letters": {[]string{"quit"}, "quit|"},
	} {
		d := newDesk(t).open(newEntry(newDesk(t).at("dry-diameter"), 0, "")).press(c.keys...)
		if got := d.panel.(*entry).field.show(40); got != c.want {
			t.Errorf("%s: %q, want %q", name, got, c.want)
		}
	}
}

// However long the text is, the place that is typed at is seen.
func TestFieldShowsItsCursor(t *testing.T) {
	f := newField(strings.Repeat("0123456789", 20))
	for at := range len(f.text) + 1 {
		f.at = at
		for _, w := range []int{1, 2, 10, 80} {
			if got := f.show(w); !strings.Contains(got, "|") || len(got) > w {
				t.Fatalf("cursor at %d in %d columns: %q", at, w, got)
			}
		}
	}
}

func TestEntryTakes(t *testing.T) {
	for name, c := range map[string]struct{ path, typed, want string }{
		"a unit of its own":  {"dry-diameter", "0.25 um", "250 nm"},
		"the unit shown":     {"dry-diameter", "140", "140 nm"},
		"below zero":         {"temperature", "-5 C", "-5.0 °C"},
		"a word":             {"surface-tension", "solution", "the solution"},
		"a number for words": {"surface-tension", "60 mN/m", "60.0 mN/m"},
	} {
		t.Run(name, func(t *testing.T) {
			d := newDesk(t)
			first, rest := rune(c.typed[0]), c.typed[1:]
			in := d.at(scenario.Path(c.path))
			d.open(newEntry(in, first, "what was left is not wanted")).press(rest, "enter").closed().shows(scenario.Path(c.path), c.want)
			if len(d.history.Past) != 1 {
				t.Errorf("%d entries to undo, want 1", len(d.history.Past))
			}
		})
	}
}

func TestEntryRefuses(t *testing.T) {
	for name, c := range map[string]struct{ typed, says string }{
		"unit":     {"5 parsec", `error: no unit "parsec"`},
		"range":    {"0", "1 to 10000 nm"},
		"negative": {"-3", "too small"},
		"no value": {"nm", "is no number"},
		"comma":    {"0,25 um", "decimal sign is a point"},
	} {
		t.Run(name, func(t *testing.T) {
			d := newDesk(t)
			d.open(newEntry(d.at("dry-diameter"), 0, "")).press(c.typed, "enter").says(c.says, c.typed).shows("dry-diameter", "100 nm")
			d.press("backspace")
			if strings.Contains(d.reads(80, 16), "error") {
				t.Error("the error stays after the text has changed")
			}
		})
	}
}

// Esc keeps what was typed, the next Enter offers it again, and taking it ends that.
func TestEntryLeaves(t *testing.T) {
	d := newDesk(t)
	in := d.at("dry-diameter")
	d.open(newEntry(in, '2', "")).press("50", "esc").closed().shows("dry-diameter", "100 nm")
	if d.left["dry-diameter"] != "250" || !strings.Contains(d.message, "250") {
		t.Fatalf("left %q, message %q", d.left, d.message)
	}
	d.open(newEntry(in, 0, d.left["dry-diameter"])).says("dry size: 250|").press("enter").closed().shows("dry-diameter", "250 nm")
	if _, still := d.left["dry-diameter"]; still {
		t.Error("what was taken is offered again")
	}
	d.open(newEntry(in, 0, "")).press("enter").closed()
	d.open(newEntry(in, '1', "")).press("backspace", "esc").closed()
	if len(d.left) > 0 {
		t.Errorf("nothing was typed, left %q", d.left)
	}
	d.shows("dry-diameter", "250 nm")
}
