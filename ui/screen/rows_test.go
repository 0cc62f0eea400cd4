package screen

import (
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/scenario"
)

// The rows as they are drawn, in the states that a person meets.
func TestRowsGolden(t *testing.T) {
	for name, c := range map[string]struct {
		d    *desk
		keys []string
	}{
		"one":       {newDesk(t), nil},
		"mixture":   {mixture(t), []string{"tab"}},
		"entry":     {mixture(t), []string{"0.5"}},
		"refused":   {mixture(t), []string{"up", "5 kg", "enter"}},
		"above":     {mixture(t), []string{"shift+tab", "down"}},
		"own":       {mixture(t), []string{"right", "right", "0.3", "esc", "enter", "enter", "tab"}},
		"unnoticed": {newDesk(t, "component", "kappa=0.2 density=1.3g/cm3 share=0.5", "component", "black carbon share=0.5"), nil},
	} {
		t.Run(name, func(t *testing.T) {
			c.d.t = t
			golden.RequireEqual(t, c.d.rows().press(c.keys...).reads(80, 16))
		})
	}
}

func TestRowsChange(t *testing.T) {
	share, substance := "component[1].share", "component[1].substance"
	for name, c := range map[string]struct {
		keys []string
		path string
		want string
	}{
		"a number":            {[]string{"tab", "0.5", "enter"}, share, "0.50"},
		"a step":              {[]string{"tab", "up"}, share, "0.30"},
		"a big step":          {[]string{"tab", "pgup"}, share, "0.50"},
		"another substance":   {[]string{"tab", "right", "enter", "kcl", "enter"}, substance, "potassium chloride"},
		"the list is left":    {[]string{"tab", "right", "enter", "kcl", "esc"}, substance, "sodium chloride"},
		"a value for a word":  {[]string{"tab", "right", "right", "0.3", "enter"}, "component[1].kappa", "0.3"},
		"a value by the list": {[]string{"tab", "right", "right", "enter", "end", "enter", "0.3", "enter"}, "component[1].kappa", "0.3"},
		"esc, then enter":     {[]string{"tab", "0.7", "esc", "enter", "enter"}, share, "0.70"},
		"undone":              {[]string{"tab", "0.7", "enter", "u"}, share, "0.25"},
		"redone":              {[]string{"tab", "0.7", "enter", "u", "U"}, share, "0.70"},
		"the kind of shares":  {[]string{"left", "enter", "down", "enter"}, "shares-by", "mass"},
		"from end to start":   {[]string{"right", "right", "right", "right", "right", "right", "right", "0.7", "enter"}, share, "0.70"},
		"no letter starts":    {[]string{"tab", "x", "z"}, share, "0.25"},
	} {
		t.Run(name, func(t *testing.T) {
			d := mixture(t).rows().press(c.keys...).shows(scenario.Path(c.path), c.want)
			if _, ok := d.panel.(*rows); !ok {
				t.Fatalf("a %T is open", d.panel)
			}
			d.press("esc").closed()
		})
	}
}

// Characters that arrive at once on a slow line are typed, and a pasted number too;
// other text would drive the rows and means nothing.
func TestRowsBursts(t *testing.T) {
	share := scenario.Path("component[1].share")
	for name, c := range map[string]struct {
		keys  []string // each is one message
		typed string   // in the entry; "" when none is open
		want  string   // the share after Enter
	}{
		"at once":                 {[]string{"0.5"}, "0.5", "0.50"},
		"begun, then at once":     {[]string{"0", ".75"}, "0.75", "0.75"},
		"at once, then at once":   {[]string{"0.", "75"}, "0.75", "0.75"},
		"one digit several times": {[]string{"11"}, "11", "11.00"},
		"pasted":                  {[]string{"paste: 0.5\n"}, "0.5", "0.50"},
		"pasted digit":            {[]string{"paste:2"}, "2", "2.00"},
		"pasted into an entry":    {[]string{"0", "paste:.5\x1b\r\u202e"}, "0.5", "0.50"},
		"controls":                {[]string{"0.5\x1b\x07"}, "0.5", "0.50"},
		"piece of a key":          {[]string{"[5~"}, "", "0.25"},
		"letters":                 {[]string{"da"}, "", "0.25"},
		"pasted letters":          {[]string{"paste:da"}, "", "0.25"},
		"pasted nothing":          {[]string{"paste:\n"}, "", "0.25"},
	} {
		t.Run(name, func(t *testing.T) {
			d := mixture(t).rows().press("tab")
			for _, k := range c.keys {
				d.Update(keyOf(k))
			}
			typed := ""
			if e := d.panel.(*rows).entry; e != nil {
				typed = e.field.String()
				d.press("enter")
			}
			if typed != c.typed {
				t.Errorf("%q is typed, want %q", typed, c.typed)
			}
			if n := len(d.scenario.Components); n != 2 {
				t.Errorf("%d components", n)
			}
			d.shows(share, c.want)
		})
	}
}

// Pasted text begins the name of a file, but text that arrives at once does not; a
// list among the settings takes neither.
func TestRowsPastedText(t *testing.T) {
	m := onSeason(t)
	press(m, "right enter")
	r := m.panel.(*rows)
	if m.Update(keyOf("b.csv")); r.entry != nil {
		t.Errorf("%q is typed", r.entry.field.String())
	}
	if m.Update(keyOf("paste:b.csv")); r.entry == nil || r.entry.field.String() != "b.csv" {
		t.Errorf("the entry is %v", r.entry)
	}
	l, _ := m.listOf("data")
	if e := m.begun(listSlot{l}, keyOf("paste:b.csv"), r); e != nil {
		t.Errorf("%q is typed into a list", e.field.String())
	}
}

// a adds and chooses a row, d drops the chosen one; the last one stays.
func TestRowsAddAndDrop(t *testing.T) {
	d := mixture(t).rows().press("a").says("3 [1.00] of <ammonium bisulfate>", "2.25 in all")
	if n := len(d.scenario.Components); n != 3 {
		t.Fatalf("%d components", n)
	}
	d.press("shift+tab", "d").shows("component[1].substance", "ammonium bisulfate").press("d")
	if n := len(d.scenario.Components); n != 1 {
		t.Fatalf("%d components", n)
	}
	d.press("d").says("cannot be dropped").shows("component[0].substance", "ammonium sulfate")
	d.press("u", "u", "u").shows("component[1].share", "0.25")
}

// Undo can take the chosen row away.
func TestRowsSettle(t *testing.T) {
	d := newDesk(t).rows().press("a", "right", "right", "u")
	if n := len(d.scenario.Components); n != 1 {
		t.Fatalf("%d components", n)
	}
	d.says("1 [1.00] of").press("right", "tab", "left", "shift+tab", "up")
	d.reads(80, 16)
}

// About a slot comes back to the rows.
func TestRowsAbout(t *testing.T) {
	d := mixture(t).rows().press("i").says("About: share").press("i")
	if _, ok := d.panel.(*rows); !ok {
		t.Errorf("a %T is open", d.panel)
	}
}

// The chosen slot is seen in the least room.
func TestRowsShowTheChoice(t *testing.T) {
	d := mixture(t).rows().press("aaa")
	d.press("tab", "tab", "home")
	for range 100 {
		if got := d.reads(60, 6); strings.Count(got, "<") != 1 {
			t.Fatalf("the choice is not seen once:\n%s", got)
		}
		before := *d.panel.(*rows)
		d.send(tea.KeyMsg{Type: tea.KeyLeft})
		if after := *d.panel.(*rows); after.row == before.row && after.slot == before.slot {
			return
		}
	}
	t.Error("left never ends")
}

// A list that has no sentence of its own reads all the same.
func TestRowsWithoutASentence(t *testing.T) {
	d := mixture(t)
	l, _ := d.listOf("component")
	f := formOf(otherList{l})
	if f.head != "Rows of layers:" || f.row != "{substance}, {share}" || f.shares {
		t.Errorf("the form is %+v", f)
	}
}

// otherList is the composition under another name.
type otherList struct{ scenario.RowList }

func (otherList) Key() string  { return "layer" }
func (otherList) Says() string { return "layers" }
