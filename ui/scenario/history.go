package scenario

import "strings"

// History is the undo list of a scenario. A run of steps on one input is one
// entry. The zero History is empty; it is a plain value that can be saved.
type History struct {
	Past   []Entry
	Future []Entry // the entry that Redo takes up is the last one

	run Path // the input that was stepped last, "" when no run goes on
}

// Entry is one change.
type Entry struct {
	Path   Path // the input that was changed, "" for several
	Says   string
	Before Scenario
	After  Scenario
}

// mostEntries is more than anybody steps back.
const mostEntries = 200

// Add notes a change; step says that it was a step on that input, so that a run
// of them becomes one entry. A run that ends where it began leaves no entry.
func (h *History) Add(p Path, before, after Scenario, step bool) {
	last := len(h.Past) - 1
	if step && h.run == p && p != "" && last >= 0 {
		before = h.Past[last].Before
		h.Past = h.Past[:last:last]
	}
	h.run = ""
	h.Future = nil
	if before.Equal(after) {
		return
	}
	if step {
		h.run = p
	}
	e := Entry{p, strings.Join(Changes(before, after), ", "), before.Clone(), after.Clone()}
	if e.Says == "" {
		e.Says = "a change in the last digits"
	}
	if len(h.Past) >= mostEntries {
		h.Past = h.Past[len(h.Past)-mostEntries+1:]
	}
	h.Past = append(h.Past[:len(h.Past):len(h.Past)], e)
}

// EndRun makes the next step an entry of its own.
func (h *History) EndRun() { h.run = "" }

// Undo takes the last change back: the scenario is then the Before of the entry.
func (h *History) Undo() (Entry, bool) { return h.move(&h.Past, &h.Future) }

// Redo does the last undone change again: the scenario is then the After of the entry.
func (h *History) Redo() (Entry, bool) { return h.move(&h.Future, &h.Past) }

func (h *History) move(from, to *[]Entry) (Entry, bool) {
	h.run = ""
	last := len(*from) - 1
	if last < 0 {
		return Entry{}, false
	}
	e := (*from)[last]
	*from = (*from)[:last:last]
	*to = append((*to)[:len(*to):len(*to)], e)
	return e, true
}
