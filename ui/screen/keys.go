package screen

import (
	"unicode/utf8"

	"github.com/charmbracelet/bubbles/key"
)

// keyMap is every key of the program. What a key does is written here once; the
// help line and the list of keys are made from it.
type keyMap struct {
	// on a page
	Left, Right, First, Last key.Binding
	Up, Down, BigUp, BigDown key.Binding
	Type, Open               key.Binding
	NextPage, PageBefore     key.Binding
	Hold, Release, Others    key.Binding
	Picture                  key.Binding // where an answer has several
	NextRecord, RecordBefore key.Binding // of data
	Ledger                   key.Binding // and back
	Table, Write, About      key.Binding
	Undo, Redo, Help, Quit   key.Binding
	Stop                     key.Binding // Esc while something is worked out

	// in panels
	Take, Leave             key.Binding // Enter, Esc
	NextField, FieldBefore  key.Binding // Tab in rows
	AddRow, DropRow         key.Binding
	LineUp, LineDown        key.Binding
	PageUp, PageDown        key.Binding
	TopLine, BottomLine     key.Binding
	FieldLeft, FieldRight   key.Binding
	EraseBefore, EraseUnder key.Binding
	Complete                key.Binding // Tab in the name of a file
	OtherTable              key.Binding // Tab where a file is written
}

// newKeyMap binds the keys. In ASCII the arrows are named in words. Pages can be
// turned only where there are several.
func newKeyMap(ascii bool, pages int) keyMap {
	left, right, up, down := "←", "→", "↑", "↓"
	if ascii {
		left, right, up, down = "left", "right", "up", "down"
	}
	k := keyMap{
		Left:    bind(left, "choose", "left"),
		Right:   bind(right, "choose", "right"),
		First:   bind("Home", "first and last slot", "home"),
		Last:    bind("End", "first and last slot", "end"),
		Up:      bind(up, "change", "up"),
		Down:    bind(down, "change", "down"),
		BigUp:   bind("PgUp", "change by a big step", "pgup"),
		BigDown: bind("PgDn", "change by a big step", "pgdown"),
		Type:    bind("0-9", "type", "0", "1", "2", "3", "4", "5", "6", "7", "8", "9", ".", "-", "+"),
		Open:    bind("Enter", "open", "enter"),

		NextPage:     bind("Tab", "page", "tab"),
		PageBefore:   bind("Shift-Tab", "page", "shift+tab"),
		Hold:         bind("Space", "hold", " "),
		Release:      bind("x", "release the last held curve", "x"),
		Others:       bind("o", "other lines", "o"),
		Picture:      bind("v", "view", "v"),
		NextRecord:   bind("n", "record", "n"),
		RecordBefore: bind("p", "record", "p"),
		Ledger:       bind("l", "ledger", "l"),
		Table:        bind("t", "table", "t"),
		Write:        bind("w", "write to a file", "w"),
		About:        bind("i", "about", "i"),
		Undo:         bind("u", "undo", "u"),
		Redo:         bind("U", "redo", "U"),
		Help:         bind("?", "keys", "?"),
		Quit:         bind("q", "leave", "q", "ctrl+c"),
		Stop:         bind("Esc", "stop the work", "esc"),

		Take:        bind("Enter", "take", "enter"),
		Leave:       bind("Esc", "leave", "esc"),
		NextField:   bind("Tab", "row", "tab"),
		FieldBefore: bind("Shift-Tab", "row", "shift+tab"),
		AddRow:      bind("a", "add", "a"),
		DropRow:     bind("d", "drop", "d"),
		LineUp:      bind(up, "move", "up"),
		LineDown:    bind(down, "move", "down"),
		PageUp:      bind("PgUp", "page", "pgup"),
		PageDown:    bind("PgDn", "page", "pgdown"),
		TopLine:     bind("Home", "ends", "home"),
		BottomLine:  bind("End", "ends", "end"),
		FieldLeft:   bind(left, "move", "left"),
		FieldRight:  bind(right, "move", "right"),
		EraseBefore: bind("Backspace", "erase", "backspace"),
		EraseUnder:  bind("Del", "erase", "delete"),
		OtherTable:  bind("Tab", "other table", "tab"),
		Complete:    bind("Tab", "complete", "tab"),
	}
	k.NextPage.SetEnabled(pages > 1)
	k.PageBefore.SetEnabled(pages > 1)
	for _, b := range []*key.Binding{&k.Stop, &k.Picture, &k.NextRecord, &k.RecordBefore} {
		b.SetEnabled(false)
	}
	return k
}

func bind(name, does string, keys ...string) key.Binding {
	return key.NewBinding(key.WithKeys(keys...), key.WithHelp(name, does))
}

// page are the bindings of a page in the order of the list of keys.
func (k keyMap) page() []key.Binding {
	return []key.Binding{
		k.Left, k.Right, k.First, k.Last, k.Up, k.Down, k.BigUp, k.BigDown, k.Type, k.Open,
		k.NextPage, k.PageBefore, k.NextRecord, k.RecordBefore, k.Picture, k.Hold, k.Release, k.Others, k.Ledger, k.Table, k.Write, k.About,
		k.Undo, k.Redo, k.Stop, k.Help, k.Quit,
	}
}

// short are the bindings of a page for the help line, the one that leads to all
// others last.
func (k keyMap) short() []key.Binding {
	return []key.Binding{
		k.Stop, k.Left, k.Right, k.Up, k.Down, k.NextRecord, k.RecordBefore, k.Picture, k.Type, k.Open, k.Hold, k.NextPage,
		k.Undo, k.Quit, k.Table, k.Ledger, k.Write, k.About, k.Others, k.Help,
	}
}

// helpItems names what the bindings do, neighbours that do the same in one item:
// "←→ choose".
func helpItems(bindings []key.Binding) (names, does []string) {
	for _, b := range bindings {
		if !b.Enabled() {
			continue
		}
		h := b.Help()
		if n := len(does) - 1; n >= 0 && does[n] == h.Desc {
			if utf8.RuneCountInString(h.Key) > 1 || isLetter(names[n]) {
				names[n] += "/"
			}
			names[n] += h.Key
			continue
		}
		names, does = append(names, h.Key), append(does, h.Desc)
	}
	return names, does
}

// isLetter reports whether a name ends with a letter, which would run together with
// the next one.
func isLetter(name string) bool {
	last := name[len(name)-1]
	return 'a' <= last && last <= 'z' || 'A' <= last && last <= 'Z'
}

// helpLine is one line of at most w columns that names the bindings. What does
// not fit is left out, but never the last one.
func helpLine(bindings []key.Binding, w int) string {
	names, does := helpItems(bindings)
	if len(names) == 0 {
		return ""
	}
	var items []string
	for i := range names {
		items = append(items, names[i]+" "+does[i])
	}
	last := items[len(items)-1]
	room := w - utf8.RuneCountInString(last)
	line := ""
	for _, item := range items[:len(items)-1] {
		n := utf8.RuneCountInString(item) + 2
		if n > room {
			break
		}
		line += item + "  "
		room -= n
	}
	return line + last
}
