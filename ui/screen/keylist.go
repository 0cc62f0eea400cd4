package screen

import "github.com/charmbracelet/bubbles/key"

// Key is one line of the list of keys.
type Key struct{ Name, Does string }

// Keys lists the keys of the pages, those that do the same in one line.
func Keys() []Key {
	const several = 2 // pages, so that the keys that turn them are named
	k := newKeyMap(false, several)
	for _, b := range []*key.Binding{&k.Picture, &k.NextRecord, &k.RecordBefore} {
		b.SetEnabled(true)
	}
	names, does := helpItems(k.page())
	out := make([]Key, len(names))
	for i := range names {
		out[i] = Key{names[i], inFull(does[i])}
	}
	return out
}

// meanings say in a list of keys what the help line says in a word.
var meanings = map[string]string{
	"choose":      "choose a slot of the question; behind the last slot stands the finding",
	"change":      "change its value by a natural step; in a list of words: the word above, below",
	"type":        "type a value with its unit, such as 0.25 um; so do . - +",
	"open":        "open what lies behind the slot: an entry, a list of words, rows",
	"page":        "next page",
	"record":      "next and previous record of the data, or row of a ledger",
	"row":         "next and previous row, which is explained",
	"ledger":      "ledger of the answer: what each assumption costs; and back",
	"back":        "back to the page that the ledger was opened from",
	"view":        "another picture of the answer, where there are several",
	"hold":        "hold this curve, with a letter, to compare others with it",
	"other lines": "other lines behind the curve, such as Kelvin only: all, each alone, none",
	"table":       "table of the numbers behind the picture",
	"about":       "about the slot: what it is, its range, where its default comes from; about the finding: formulas, constants, sources",
	"undo":        "undo the last change; a run of steps on one slot is one change",
	"redo":        "redo what was undone",
	"keys":        "keys: this list",
	"leave":       "leave; the session is kept, and so it is by ctrl+c",
}

func inFull(does string) string {
	if text, ok := meanings[does]; ok {
		return text
	}
	return does
}

// list of keys with what they do in full, as lines of a text.
func keyLines(bindings []key.Binding) []string {
	names, does := helpItems(bindings)
	for i := range does {
		does[i] = inFull(does[i])
	}
	return keyTable(names, does)
}
