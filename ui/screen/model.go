package screen

import (
	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
)

// model is the whole screen. It is a pointer, so that panels and commands look at
// one and the same thing; only Update changes it.
type model struct {
	env       answer.Env
	questions []answer.Question
	question  answer.Question
	scenario  scenario.Scenario
	answer    answer.Answer
	unsolved  string // why the scenario has no answer; only at the start
	leaf             // of the open page
	leaves    map[string]leaf
	waiting   map[string][]session.Held // of a session, for pages that were not open yet
	backTo    string                    // the page that the ledger was opened from; "": none
	history   scenario.History
	left      map[scenario.Path]string // what Esc left behind in an entry

	panel   panel
	message string // one line, until the next key
	keys    keyMap
	styles  styles
	ascii   bool

	width, height int
	drawn         drawing
	work          work
	keeper        keeper
	offered       *session.State // the session that Enter takes up
	offer         string         // in words, on the message line while nothing else is said
	todo          []tea.Cmd      // what Update hands to Bubble Tea at its end
	fatal         error          // why the program ends, nil for a wish
}

// leaf is what a page keeps while another one is open.
type leaf struct {
	cursor scenario.Path // the chosen slot: an input, a list, or finding
	held   []held
	others int                     // which of Answer.Others are shown
	shown  int                     // which of Answer.Figures is shown
	frames map[string]figure.Frame // by the key of the figure
	reply  *reply                  // the answer that was there when the page was left
}

// reply is an answer with what it answers.
type reply struct {
	scenario scenario.Scenario
	answer   answer.Answer
}

// finding is the place of the cursor behind the last slot.
const finding scenario.Path = "finding"

// newModel is the screen on the scenario of the options, or on the default one.
func newModel(o Options) *model {
	ascii := o.Plain || !utf8Locale(o)
	questions := answer.Questions()
	m := &model{
		env: o.Env, questions: questions, question: questions[0], scenario: o.Scenario.Clone(),
		leaf: newLeaf(), leaves: map[string]leaf{}, waiting: map[string][]session.Held{}, left: map[scenario.Path]string{}, keys: newKeyMap(ascii, len(questions)),
		styles: newStyles(coloured(o)), ascii: ascii, keeper: keeper{store: o.Store},
	}
	m.env.Kept = &answer.Kept{}
	m.answerFirst()
	m.settle(0)
	m.greet(o)
	return m
}

// input is the input under the cursor; false on a list and on the finding.
func (m *model) input() (scenario.Input, bool) { return scenario.Find(&m.scenario, m.cursor) }

// list is the list of rows under the cursor.
func (m *model) list() (scenario.RowList, bool) { return m.listOf(string(m.cursor)) }

func (m *model) listOf(key string) (scenario.RowList, bool) {
	for _, l := range scenario.Lists(&m.scenario) {
		if l.Key() == key {
			return l, true
		}
	}
	return nil, false
}

// onFinding reports whether the cursor is on the finding.
func (m *model) onFinding() bool { return m.cursor == finding }

// say writes the message line.
func (m *model) say(text string) { m.message = text }

// do hands a command to Bubble Tea at the end of this Update.
func (m *model) do(c tea.Cmd) { m.todo = append(m.todo, c) }

// text is s as this terminal can show it: without anything that could drive it.
func (m *model) text(s string) string {
	s = plain.Clean(s)
	if m.ascii {
		return plain.ASCII(s)
	}
	return s
}

// style is how values are written.
func (m *model) style() scenario.Style { return scenario.Style{ASCII: m.ascii} }

// Init asks nothing of the terminal.
func (m *model) Init() tea.Cmd { return m.flush() }

// flush is what there is to do outside Update.
func (m *model) flush() tea.Cmd {
	if len(m.todo) == 0 {
		return nil
	}
	todo := m.todo
	m.todo = nil
	return tea.Batch(todo...)
}
