package screen

import (
	"reflect"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/charmbracelet/bubbles/key"
)

// bindings are all bindings of the map by the name of their field.
func bindings(k keyMap) map[string]key.Binding {
	out := map[string]key.Binding{}
	v := reflect.ValueOf(k)
	for i := range v.NumField() {
		out[v.Type().Field(i).Name] = v.Field(i).Interface().(key.Binding)
	}
	return out
}

// No key means two things at one place.
func TestKeysAreUnique(t *testing.T) {
	k := newKeyMap(false, 2)
	k.Stop.SetEnabled(true)
	places := map[string][]key.Binding{
		"page": k.page(), "entry": (&entry{}).keys(k), "list": (&list{}).keys(k), "rows": (&rows{}).keys(k),
		"reader": (&reader{}).keys(k), "table": (&table{}).keys(k), "writer": (&writer{}).keys(k),
	}
	for place, bs := range places {
		seen := map[string]string{}
		for _, b := range bs {
			if len(b.Keys()) == 0 {
				t.Errorf("%s: a binding without a key: %v", place, b.Help())
			}
			for _, name := range b.Keys() {
				if seen[name] != "" {
					t.Errorf("%s: %q is bound to %q and to %q", place, name, seen[name], b.Help().Desc)
				}
				seen[name] = b.Help().Desc
			}
		}
	}
}

// Every binding says what it does, stands in some list, and the keys of the page
// all stand in the list of keys.
func TestHelpMentionsEveryKey(t *testing.T) {
	m := opened(onTerminal("plain"), 100, 60)
	press(m, "?")
	text := strings.Join(m.panel.lines(100, 200, m), "\n")
	for name, b := range bindings(m.keys) {
		if b.Help().Key == "" || b.Help().Desc == "" {
			t.Errorf("%s says nothing", name)
		}
		if b.Enabled() && (!strings.Contains(text, b.Help().Key) || !strings.Contains(text, b.Help().Desc)) {
			t.Errorf("the list of keys does not say %s: %s", b.Help().Key, b.Help().Desc)
		}
	}
	if names, _ := helpItems(newKeyMap(false, 1).page()); slices.ContainsFunc(names, func(n string) bool { return strings.Contains(n, "Tab") }) {
		t.Errorf("there is one page, and a key to turn pages: %v", names)
	}
}

func TestHelpLine(t *testing.T) {
	k := newKeyMap(false, 1)
	for w, want := range map[int]string{
		78: "←→ choose  ↑↓ change  0-9 type  Enter open  Space hold  u undo  q leave  ? keys",
		30: "←→ choose  ↑↓ change  ? keys",
		10: "? keys",
	} {
		got := helpLine(k.short(), w)
		if utf8.RuneCountInString(got) > w {
			t.Errorf("%d columns: %q is too long", w, got)
		}
		if w < 78 && got != want {
			t.Errorf("%d columns: %q, want %q", w, got, want)
		}
	}
	if got := helpLine(newKeyMap(true, 1).short(), 60); !strings.HasPrefix(got, "left/right choose  up/down change") {
		t.Errorf("in ASCII: %q", got)
	}
}
