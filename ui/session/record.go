package session

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"
	"time"

	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// version of session.json. It grows when an older program could not make sense
// of the file.
const version = 1

// keptEntries is how many entries of the undo list are kept on either side: more
// than anybody steps back, few enough to be read within a frame.
const keptEntries = 100

// record is session.json. Scenarios are stored as the text of a scenario file, so
// that reading them checks every value as it checks that of any file; equal ones
// are stored once, and the rest of the record refers to them by their place.
type record struct {
	Version   int           `json:"version"`
	About     string        `json:"about"`
	Saved     time.Time     `json:"saved"`
	Page      string        `json:"page"`
	Cursor    string        `json:"cursor"`
	Scenario  int           `json:"scenario"`
	Held      []heldRecord  `json:"held"`
	Past      []entryRecord `json:"past"`
	Future    []entryRecord `json:"future"`
	Scenarios []string      `json:"scenarios"`
}

type heldRecord struct {
	Page     string `json:"page,omitempty"`
	Letter   string `json:"letter"`
	Scenario int    `json:"scenario"`
}

type entryRecord struct {
	Path   string `json:"path"`
	Says   string `json:"says"`
	Before int    `json:"before"`
	After  int    `json:"after"`
}

const about = "What lay around the question when dropcrest stopped. The question itself is in " + scenarioFile + "."

// encode is the content of the two files.
func encode(state State) (question, around []byte, err error) {
	b := builder{place: map[string]int{}}
	rec := record{
		Version: version, About: about, Saved: state.Saved.UTC(),
		Page: state.Page, Cursor: string(state.Cursor),
		Scenario: b.put(state.Scenario),
		Past:     b.entries(state.History.Past),
		Future:   b.entries(state.History.Future),
	}
	for _, h := range state.Held {
		rec.Held = append(rec.Held, heldRecord{h.Page, string(h.Letter), b.put(h.Scenario)})
	}
	if b.err != nil {
		return nil, nil, b.err
	}
	rec.Scenarios = b.texts
	var out bytes.Buffer
	enc := json.NewEncoder(&out)
	enc.SetEscapeHTML(false)
	enc.SetIndent("", " ")
	if err := enc.Encode(rec); err != nil {
		return nil, nil, err
	}
	return []byte(b.texts[rec.Scenario]), out.Bytes(), nil
}

// builder collects the scenarios of a record.
type builder struct {
	texts []string
	place map[string]int
	err   error // the first
}

func (b *builder) put(s scenario.Scenario) int {
	var text strings.Builder
	if err := scenario.Encode(&text, s); err != nil && b.err == nil {
		b.err = err
	}
	at, known := b.place[text.String()]
	if !known {
		at = len(b.texts)
		b.texts = append(b.texts, text.String())
		b.place[text.String()] = at
	}
	return at
}

// entries keeps the last entries of a list: both lists of a history have the
// entry that comes next at their end.
func (b *builder) entries(list []scenario.Entry) []entryRecord {
	var out []entryRecord
	for _, e := range list[max(0, len(list)-keptEntries):] {
		out = append(out, entryRecord{string(e.Path), e.Says, b.put(e.Before), b.put(e.After)})
	}
	return out
}

// decode reads session.json. What it returns has passed the checks of a scenario
// file, refers to nothing that is missing, and cannot drive a terminal.
func decode(data []byte) (State, error) {
	var head struct{ Version int }
	if err := json.Unmarshal(data, &head); err != nil {
		return State{}, err
	}
	if head.Version != version {
		return State{}, fmt.Errorf("it is of version %d, this program reads version %d", head.Version, version)
	}
	var rec record
	if err := json.Unmarshal(data, &rec); err != nil {
		return State{}, err
	}
	return rec.state()
}

func (rec record) state() (State, error) {
	l := library{}
	for i, text := range rec.Scenarios {
		s, err := scenario.DecodeUsing(nil, fmt.Sprintf("scenario %d of %s", i, sessionFile), strings.NewReader(text))
		if err != nil {
			return State{}, err
		}
		l.scenarios = append(l.scenarios, cleaned(s))
	}
	state := State{
		Page: plain.Clean(rec.Page), Cursor: scenario.Path(plain.Clean(rec.Cursor)), Saved: rec.Saved,
		Scenario: l.get(rec.Scenario),
		History:  scenario.History{Past: l.entries(rec.Past), Future: l.entries(rec.Future)},
	}
	for _, h := range rec.Held {
		if len(h.Letter) != 1 || h.Letter < "A" || h.Letter > "Z" {
			return State{}, fmt.Errorf("held curve %q: a letter from A to Z is expected", h.Letter)
		}
		state.Held = append(state.Held, Held{plain.Clean(h.Page), rune(h.Letter[0]), l.get(h.Scenario)})
	}
	return state, l.err
}

// library hands out the scenarios of a record.
type library struct {
	scenarios []scenario.Scenario
	err       error // the first
}

// get returns a scenario that shares nothing with the others.
func (l *library) get(at int) scenario.Scenario {
	if at < 0 || at >= len(l.scenarios) {
		if l.err == nil {
			l.err = fmt.Errorf("it refers to scenario %d and has %d", at, len(l.scenarios))
		}
		return scenario.Scenario{}
	}
	return l.scenarios[at].Clone()
}

func (l *library) entries(list []entryRecord) []scenario.Entry {
	var out []scenario.Entry
	for _, e := range list {
		out = append(out, scenario.Entry{
			Path: scenario.Path(plain.Clean(e.Path)), Says: plain.Clean(e.Says),
			Before: l.get(e.Before), After: l.get(e.After),
		})
	}
	return out
}

// cleaned takes out of the free texts of a scenario whatever could drive a
// terminal. The other words were compared with those that are allowed.
func cleaned(s scenario.Scenario) scenario.Scenario {
	for i := range s.Components {
		s.Components[i].Substance = plain.Clean(s.Components[i].Substance)
	}
	return s
}

// oneLine makes a message safe to be shown in one line.
func oneLine(s string) string { return plain.Clean(strings.ReplaceAll(s, "\n", "; ")) }
