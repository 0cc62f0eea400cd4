package screen

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/answer"
	"dropcrest/ui/form"
	"dropcrest/ui/scenario"
)

func TestReaderScrolls(t *testing.T) {
	var text []string
	for i := range 30 {
		text = append(text, fmt.Sprintf("line %d", i+1))
	}
	for name, c := range map[string]struct {
		keys  []string
		first int
	}{
		"at first":       {nil, 1},
		"down":           {[]string{"down", "down"}, 3},
		"not above":      {[]string{"up"}, 1},
		"a page":         {[]string{"pgdown"}, 9},
		"a page back":    {[]string{"pgdown", "pgdown", "pgup"}, 9},
		"end":            {[]string{"end"}, 22},
		"not below":      {[]string{"end", "down", "pgdown", "up"}, 21},
		"home":           {[]string{"end", "home"}, 1},
		"nothing is set": {[]string{"x", "5", "tab"}, 1},
	} {
		d := newDesk(t).open(newReader("Text", text))
		for _, k := range c.keys {
			d.reads(40, 10)
			d.press(k)
		}
		want := fmt.Sprintf(" Text  (line %d to %d of 30)\n line %d\n", c.first, c.first+8, c.first)
		if got := d.reads(40, 10); !strings.HasPrefix(got, want) {
			t.Errorf("%s: reads\n%s\nwant first\n%s", name, got, want)
		}
	}
}

func TestReadersClose(t *testing.T) {
	for name, c := range map[string]struct {
		open func(*model) panel
		key  string
	}{
		"about": {newAbout, "i"}, "table": {newTable, "t"}, "help": {newHelp, "?"},
	} {
		for _, k := range []string{c.key, "esc", "enter"} {
			d := newDesk(t)
			d.open(c.open(d.model)).press(k)
			if d.panel != nil {
				t.Errorf("%s: %s does not close it", name, k)
			}
		}
	}
}

// About every input: nothing that is declared is left out.
func TestAboutSaysAll(t *testing.T) {
	s := scenario.Default()
	for _, in := range scenario.Inputs(&s) {
		d := newDesk(t)
		d.open(aboutInput(d.at(in.Path()), nil, d.model))
		got := strings.Join(strings.Fields(d.reads(200, 60)), " ")
		for _, want := range []string{in.Help(), in.Origin(), in.Key(), in.Show(d.style())} {
			if !strings.Contains(got, strings.Join(strings.Fields(want), " ")) {
				t.Errorf("%s: %q is not said:\n%s", in.Path(), want, got)
			}
		}
	}
}

func TestAboutFindingGivesReasons(t *testing.T) {
	d := newDesk(t)
	d.cursor = finding
	d.open(newAbout(d.model))
	got := strings.Join(strings.Fields(d.reads(100, 200)), " ")
	for _, why := range d.answer.Why {
		if !strings.Contains(got, strings.Join(strings.Fields(why), " ")) {
			t.Errorf("%q is not said", why)
		}
	}
}

func TestTableGolden(t *testing.T) {
	for name, c := range map[string]struct {
		w    int
		keys []string
	}{
		"curve": {80, nil}, "narrow": {60, []string{"pgdown"}}, "extrema": {80, []string{"right"}},
		"haze": {80, []string{"right", "right", "right"}}, "back": {80, []string{"pgdown", "right", "left"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := newDesk(t)
			d.open(newTable(d.model))
			d.reads(c.w, 12)
			golden.RequireEqual(t, d.press(c.keys...).reads(c.w, 12))
		})
	}
}

// Numbers stand to the right, words to the left, gaps are shown, and what does
// not fit is announced.
func TestTabulate(t *testing.T) {
	d := newDesk(t)
	tab := answer.Table{
		Columns: []answer.Column{{Key: "a", Says: "kind"}, {Key: "b", Says: "size, m"}, {Key: "c", Says: "supersaturation, %"}},
		Rows:    [][]any{{"maximum", 1.5e-7, -0.25}, {"x", nil, 10.0}},
	}
	for name, c := range map[string]struct {
		w    int
		want []string
	}{
		"room": {60, []string{
			"kind         size, m  supersaturation, %",
			"maximum  1.50000e-07           -0.250000",
			"x                  -             10.0000"}},
		"little": {34, []string{
			"                      supersatura-",
			"kind         size, m       tion, %",
			"maximum  1.50000e-07     -0.250000",
			"x                  -       10.0000"}},
		"less": {24, []string{
			"                    ...",
			"kind       size, m  ...",
			"maximum  1.500e-07  ...",
			"x                -  ..."}},
	} {
		heads, body := form.Tabulate(tab, c.w, d.model.text)
		if got := append(heads, body...); !slices.Equal(got, c.want) {
			t.Errorf("%s:\n%s\nwant\n%s", name, strings.Join(got, "\n"), strings.Join(c.want, "\n"))
		}
	}
}

// What a key does stands in a column of its own, also where it takes several lines.
func TestHelpKeepsItsColumn(t *testing.T) {
	m := opened(onTerminal("plain"), 60, 40)
	for _, line := range newHelp(m).lines(60, 200, m)[1:] {
		if key := strings.TrimSpace(string([]rune(line + strings.Repeat(" ", 18))[:18])); strings.HasPrefix(line, "   ") && strings.Contains(key, "  ") {
			t.Errorf("no column in %q", line)
		}
		if r := []rune(line); strings.HasPrefix(line, "   ") && (len(r) < 18 || r[17] != ' ' || len(r) > 60) {
			t.Errorf("no column in %q", line)
		}
	}
}
