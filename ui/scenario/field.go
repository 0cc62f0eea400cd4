package scenario

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"dropcrest/solutes"
	"dropcrest/ui/plain"
)

// field declares one quantity of a record R: the scenario itself or one of its
// rows. Slot, option, file key, help and error text are made of it.
type field[R any] struct {
	key, says, help, origin string

	quantity *quantity // of a number
	several  bool      // several numbers of that quantity
	words    []Option  // of a choice; of a number: words that may stand for it
	form     Kind      // of a text: Text, Name or File
	// check says what is wrong with a text; nil: nothing can be.
	check   func(text string) *ValueError
	endings map[string]func(*R) // what a text may end in and what that says of the record
	at      func(*R) any
	used    func(*Scenario) bool // nil: always
}

// slot is a field of one record of one scenario; it implements Input.
type slot[R any] struct {
	*field[R]
	s        *Scenario
	r        *R
	path     Path
	standard *R // the record with its defaults
}

func (i slot[R]) Path() Path     { return i.path }
func (i slot[R]) Key() string    { return i.key }
func (i slot[R]) Says() string   { return i.says }
func (i slot[R]) Help() string   { return i.help }
func (i slot[R]) Origin() string { return i.origin }
func (i slot[R]) Used() bool     { return i.used == nil || i.used(i.s) }

func (i slot[R]) Kind() Kind {
	switch {
	case i.several:
		return Numbers
	case i.quantity != nil:
		return Number
	case i.words != nil:
		return Choice
	case i.form != 0:
		return i.form
	}
	return Text
}

// isText reports whether the field holds a text of any kind.
func (i slot[R]) isText() bool { return i.quantity == nil && i.words == nil }

func (i slot[R]) Choices() []Option {
	if i.Kind() != Name {
		return slices.Clone(i.words)
	}
	var names []Option
	for _, x := range i.s.catalogue().All() {
		says := x.Name
		if x.Formula != "" {
			says += ", " + x.Formula
		}
		if _, embedded := solutes.Standard().Find(x.Name); !embedded {
			says += " (your own)"
		}
		names = append(names, Option{x.Name, says})
	}
	return names
}

func (i slot[R]) Range() string {
	words := make([]string, 0, len(i.words))
	for _, w := range i.words {
		words = append(words, w.Word)
	}
	switch {
	case i.Kind() == Name:
		return "a name, a formula or an alias of the catalogue"
	case i.Kind() == File:
		return "the name of a file"
	case i.Kind() == Text:
		return "text"
	case i.several:
		return "numbers with commas between them, each " + i.quantity.span()
	case i.quantity == nil:
		return strings.Join(words, ", ")
	}
	return strings.Join(append([]string{i.quantity.span()}, words...), ", or ")
}

// value copies what a field holds as a Measure: numbers as they are, words as words.
func value(at any) Measure {
	switch p := at.(type) {
	case *float64:
		return Measure{Number: *p}
	case *int:
		return Measure{Number: float64(*p)}
	case *string:
		return Measure{Word: *p}
	case *Measure:
		return *p
	case *[]float64:
		return Measure{Word: fmt.Sprint(*p)} // to be compared only
	case *Uncertain:
		return Measure{Word: fmt.Sprint(*p)} // likewise
	}
	panic(fmt.Sprintf("scenario: a field cannot be a %T", at))
}

func (i slot[R]) value() Measure { return value(i.at(i.r)) }

func (i slot[R]) assign(m Measure) {
	switch p := i.at(i.r).(type) {
	case *float64:
		*p = m.Number
	case *int:
		*p = int(m.Number)
	case *string:
		*p = m.Word
	case *Measure:
		*p = m
	}
}

// uncertain is the value of a field with an uncertainty; nil: it has none.
func (i slot[R]) uncertain() *Uncertain {
	u, _ := i.at(i.r).(*Uncertain)
	return u
}

// numbers are those of a field of several.
func (i slot[R]) numbers() []float64 { return *i.at(i.r).(*[]float64) }

func (i slot[R]) IsDefault() bool { return i.value() == value(i.at(i.standard)) }

// isWord reports whether a word stands in the field, which the number 0 is not.
func (i slot[R]) isWord() bool {
	return i.quantity == nil || !i.several && i.uncertain() == nil && i.value().Word != ""
}

func (i slot[R]) Show(st Style) string {
	m := i.value()
	text := m.Word
	switch {
	case i.uncertain() != nil:
		text = i.quantity.showUncertain(*i.uncertain())
	case i.several:
		text = i.quantity.showAll(i.numbers())
	case !i.isWord():
		text = i.quantity.show(m.Number)
	case i.Kind() == Name && m.Word == "":
		text = "values of its own"
	case i.isText() && m.Word == "":
		text = "none"
	default:
		if w, ok := i.word(m.Word); ok {
			text = w.Says
		}
	}
	if st.ASCII {
		return plain.ASCII(text)
	}
	return text
}

// exact is the value as a file keeps it.
func (i slot[R]) exact() string {
	if u := i.uncertain(); u != nil {
		return i.quantity.exactUncertain(*u)
	}
	if i.several {
		return i.quantity.exactAll(i.numbers())
	}
	if i.isWord() {
		return i.value().Word
	}
	return i.quantity.exact(i.value().Number)
}

func (i slot[R]) word(w string) (Option, bool) {
	for _, o := range i.words {
		if strings.EqualFold(o.Word, w) || strings.EqualFold(o.Says, w) {
			return o, true
		}
	}
	return Option{}, false
}

func (i slot[R]) SI() (key string, si any) {
	key = siKey(i.key, i.quantity)
	m := i.value()
	switch {
	case i.uncertain() != nil:
		return key, i.uncertainSI()
	case i.several:
		out := make([]float64, 0, len(i.numbers()))
		for _, x := range i.numbers() {
			if strings.HasPrefix(i.quantity.si, "percent") {
				x = i.quantity.units[0].fromSI(x)
			}
			out = append(out, x)
		}
		return key, out
	case i.isText() && m.Word == "":
		return key, nil
	case i.isWord():
		return key, m.Word
	case strings.HasPrefix(i.quantity.si, "percent"):
		return key, i.quantity.units[0].fromSI(m.Number)
	}
	return key, m.Number
}

func (i slot[R]) Set(text string) error         { return i.set(text, true) }
func (i slot[R]) SetWithUnit(text string) error { return i.set(text, false) }

func (i slot[R]) set(text string, bare bool) error {
	if i.several {
		return i.setAll(text, bare)
	}
	if u := i.uncertain(); u != nil {
		next, problem := i.quantity.readUncertain(plain.Clean(text), bare)
		if problem != nil {
			problem.Path = i.path
			return problem
		}
		*u = next
		return nil
	}
	text, says := i.ending(text)
	m, problem := i.read(text, bare)
	if problem != nil {
		problem.Path = i.path
		return problem
	}
	i.assign(m)
	if says != nil {
		says(i.r)
	}
	return nil
}

func (i slot[R]) read(text string, bare bool) (Measure, *ValueError) {
	text = strings.TrimSpace(text)
	if clean := plain.Clean(text); clean != text {
		return Measure{}, &ValueError{Given: clean, Problem: fmt.Sprintf("%q holds control characters", shortened(clean)), Right: i.Range()}
	}
	switch i.Kind() {
	case Name:
		return i.readName(text)
	case File, Text:
		m, problem := i.readText(text)
		if problem == nil && m.Word != "" && i.check != nil {
			problem = i.check(m.Word)
		}
		return m, problem
	}
	if w, ok := i.word(text); ok && text != "" {
		return Measure{Word: w.Word}, nil
	}
	if i.Kind() == Choice {
		return Measure{}, &ValueError{Given: text, Problem: fmt.Sprintf("%q is none of its words", shortened(text)), Right: i.Range()}
	}
	x, problem := i.quantity.read(text, bare)
	if problem != nil {
		for _, w := range i.words {
			problem.Right += ", or " + w.Word
		}
		return Measure{}, problem
	}
	return Measure{Number: x}, nil
}

func (i slot[R]) Step(dir int, big bool) error {
	if i.several || i.isText() && i.Kind() != Name {
		return &ValueError{Path: i.path, Problem: i.says + " has no steps", Right: "Enter, which opens it"}
	}
	if i.isWord() {
		return i.stepWord(dir)
	}
	q := i.quantity
	u := q.units[0]
	x := i.value().Number
	if m := i.uncertain(); m != nil {
		x = m.Value
		if !m.Known() {
			*m = Uncertain{Value: q.start}
			return nil
		}
	}
	shown := q.step.next(u.fromSI(x), dir > 0, big)
	for q.whole && shown != math.Trunc(shown) {
		shown = q.step.next(shown, dir > 0, big)
		if shown < 1 {
			shown = 0
		}
	}
	if q.step.ladder && dir > 0 && x == 0 {
		shown = u.fromSI(q.start) // no rung lies above nothing
	}
	to, err := u.toSI(fmt.Sprint(shown))
	if err != nil {
		return err
	}
	if q.open && to <= q.min {
		to = x
	}
	to = min(max(to, q.min), q.max)
	if to == x {
		return &ValueError{Path: i.path, Problem: i.says + " ends at " + q.show(x), Right: i.Range()}
	}
	if m := i.uncertain(); m != nil {
		*m = Uncertain{to, m.Own * to / x, m.Common * to / x} // the relative uncertainty stays
		return nil
	}
	i.assign(Measure{Number: to})
	return nil
}

// uncertainSI is the value with its uncertainties in SI, per cent where the key
// says so; null where it was not measured.
func (i slot[R]) uncertainSI() any {
	u := *i.uncertain()
	if !u.Known() {
		return nil
	}
	scale := 1.0
	if strings.HasPrefix(i.quantity.si, "percent") {
		scale = 100
	}
	return map[string]float64{"value": scale * u.Value, "standard_uncertainty": scale * u.Own, "common_standard_uncertainty": scale * u.Common}
}

// stepWord goes one word up or down its list; below the words that may stand for
// a number lies the number.
func (i slot[R]) stepWord(dir int) error {
	words := i.Choices()
	at := slices.IndexFunc(words, func(o Option) bool { return o.Word == i.value().Word })
	to := at + 1
	if dir > 0 {
		to = at - 1
	}
	switch {
	case i.quantity != nil && (to >= len(words) || len(words) == 1):
		i.assign(Measure{Number: i.quantity.start})
	case to < 0 || to >= len(words):
		return &ValueError{Path: i.path, Problem: "the list of " + i.says + " ends here", Right: i.Range()}
	default:
		i.assign(Measure{Word: words[to].Word})
	}
	return nil
}
