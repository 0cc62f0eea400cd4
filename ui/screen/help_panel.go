package screen

import (
	"strings"

	"dropcrest/ui/scenario"
)

// newHelp is the list of keys, made from the bindings themselves.
func newHelp(m *model) panel {
	text := keyLines(m.keys.page())
	for _, p := range []struct {
		title string
		panel panel
	}{
		{"while typing", &entry{}},
		{"while typing the name of a file", &entry{kind: scenario.File}},
		{"in a list of words", &list{}},
		{"in rows", &rows{list: "component"}},
		{"in a text", &reader{}},
		{"in a table", &table{}},
		{"where a file is written", &writer{}},
	} {
		text = append(text, "", p.title)
		text = append(text, keyTable(helpItems(p.panel.keys(m.keys)))...)
	}
	return &reader{title: "Keys", text: text, opener: m.keys.Help, hang: keyColumn}
}

// keyColumn is where in a list of keys it stands what they do.
const keyColumn = 17

// keyTable is one line a key, aligned.
func keyTable(names, does []string) []string {
	out := make([]string, len(names))
	for i, n := range names {
		out[i] = strings.TrimRight("  "+padded(n, keyColumn-4)+"  "+does[i], " ")
	}
	return out
}
