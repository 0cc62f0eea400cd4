package screen

import (
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

func TestListOpensWhereTheValueIs(t *testing.T) {
	for name, c := range map[string]struct {
		change []string
		at     int
	}{
		"first word":  {nil, 0},
		"second word": {[]string{"surface-tension", "solution"}, 1},
		"a number":    {[]string{"surface-tension", "60"}, 2},
	} {
		d := newDesk(t, c.change...)
		if got := newList(d.at("surface-tension")).(*list).at; got != c.at {
			t.Errorf("%s: at %d, want %d", name, got, c.at)
		}
	}
}

func TestListTakes(t *testing.T) {
	const substance = "component[0].substance"
	for name, c := range map[string]struct {
		path string
		keys []string
		want string
	}{
		"the next item":         {"surface-tension", []string{"down", "enter"}, "the solution"},
		"the first of narrowed": {substance, []string{"sodium chl", "enter"}, "sodium chloride"},
		"by formula":            {substance, []string{"nacl", "enter"}, "sodium chloride"},
		"pieces in any order":   {substance, []string{"sulfate potassium", "enter"}, "potassium sulfate"},
		"widened again":         {substance, []string{"xyz", "backspace", "backspace", "backspace", "enter"}, "sodium chloride"},
		"no wrap-around":        {"surface-tension", []string{"up", "up", "enter"}, "pure water"},
		"a value":               {"surface-tension", []string{"end", "enter", "60", "enter"}, "60.0 mN/m"},
		"a digit":               {"surface-tension", []string{"60 mN/m", "enter"}, "60.0 mN/m"},
		"a name not in it":      {substance, []string{"table salt", "enter"}, "sodium chloride"},
		"esc":                   {"surface-tension", []string{"down", "esc"}, "pure water"},
	} {
		t.Run(name, func(t *testing.T) {
			d := newDesk(t)
			d.open(newList(d.at(scenario.Path(c.path)))).press(c.keys...).closed().shows(scenario.Path(c.path), c.want)
		})
	}
}

func TestListRefuses(t *testing.T) {
	d := newDesk(t)
	d.open(newList(d.at("water-activity"))).press("xyz", "enter").says(`no item holds "xyz"`)
	d.open(newList(d.at("component[0].substance"))).press("amonium sulphat", "enter").
		says("error: no substance", "ammonium sulfate,").shows("component[0].substance", "ammonium sulfate")
}

// Words that begin with what is typed come first; the chosen one is always seen.
func TestListNarrows(t *testing.T) {
	d := newDesk(t)
	l := newList(d.at("component[0].substance")).(*list)
	d.open(l).press("su")
	if items := l.items(); !strings.HasPrefix(items[0].Word, "su") {
		t.Errorf("the first of %d items is %q", len(items), items[0].Word)
	}
	d.press("backspace", "backspace", "home")
	for range len(l.all) + 2 {
		chosen := l.items()[l.at].Word
		if got := d.reads(80, 7); !strings.Contains(got, "> "+chosen) {
			t.Fatalf("%q is chosen and not seen:\n%s", chosen, got)
		}
		d.press("down")
	}
	if l.at != len(l.all)-1 {
		t.Errorf("at %d of %d", l.at, len(l.all))
	}
}

// A name that is in no list is said not to be, before Enter looks it up.
func TestListWithoutItems(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "right right enter enter x x")
	if view := m.View(); !strings.Contains(view, "none of the list; Enter looks it up") {
		t.Errorf("no word of it in\n%s", view)
	}
}
