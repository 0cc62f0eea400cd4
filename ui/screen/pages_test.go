package screen

import (
	"context"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
)

// season is an invented question about data: three pictures, 96 records. It is
// live unless a file of one's own is among the data.
func season() answer.Question {
	return answer.Question{
		Key: "season", Title: "Season", Says: "A question for tests.",
		Groups: []answer.Group{{Title: "All", Keys: []string{"population", "mode", "bins", "data", "map", "record", "mixing", "supersaturation"}}},
		Live: func(s scenario.Scenario) bool {
			for _, d := range s.Data {
				if d.Name != scenario.DemoData {
					return false
				}
			}
			return true
		},
		Statement: func(s scenario.Scenario) []string {
			of := map[string]string{"modes": "{mode}", "bins": "{bins}"}[s.Population]
			if of == "" {
				of = "{data}, record {record}"
			}
			return []string{"Particles {population}: " + of + ",", "columns {map}, {mixing} mixed, counted at {supersaturation}, all else {further}."}
		},
		Ask: askSeason,
	}
}

func askSeason(_ context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
	if s.Population == "bins" && s.Bins == "" {
		return answer.Answer{}, &answer.InputError{Input: "bins", Text: "no file of bins"}
	}
	n := s.Record.Number
	counts := figure.Figure{Key: "counts", Title: "CCN against supersaturation, %", X: figure.Axis{Unit: "%", Log: true}, Y: figure.Axis{Log: true}}
	counts.Lines = []figure.Line{{X: []float64{0.1, 1}, Y: []float64{100 * (1 + n), 900 * (1 + n)}}}
	gap := math.NaN()
	counts.Points = []figure.Point{{X: 0.3, Y: 300 * (1 + n), YLow: 250 * (1 + n), YHigh: 350 * (1 + n), XLow: gap, XHigh: gap}}
	sizes := figure.Figure{Key: "sizes", Title: "dN/dlog D against size, nm", X: figure.Axis{Unit: "nm", Log: true},
		Lines: []figure.Line{{X: []float64{10, 100, 500}, Y: []float64{0, 10, 0}}}}
	ratio := figure.Figure{Key: "ratio", Title: "ratio against time", X: figure.Axis{Time: true}}
	for i := range 96 {
		ratio.Points = append(ratio.Points, figure.Point{X: 1.7735e9 + 900*float64(i), Y: 1, XLow: gap, XHigh: gap, YLow: gap, YHigh: gap})
	}
	a := answer.Answer{
		Finding: []string{fmt.Sprintf("It is record %g, %s.", n, s.Mixing)},
		Figures: []figure.Figure{counts, sizes, ratio}, Others: []figure.Line{{Says: "other", X: []float64{0.1, 1}, Y: []float64{5, 50}}},
	}
	for _, name := range []string{"counts", "closure"} {
		a.Tables = append(a.Tables, answer.Table{Key: name, Title: "Table of " + name,
			Columns: []answer.Column{{Key: name + "_per_m3", Says: name}}, Rows: [][]any{{n}}})
	}
	if s.Population == "data" {
		a.Record, a.Records = int(n), 96
	}
	return a, nil
}

// onSeason is the screen on the Curve page and the invented one, which is open.
func onSeason(t *testing.T) *model {
	t.Helper()
	m := opened(onTerminal("plain"), 80, 24)
	m.questions = []answer.Question{m.questions[0], season()}
	press(m, "tab")
	if m.question.Key != "season" || m.unsolved != "" {
		t.Fatalf("the page is %s: %s", m.question.Key, m.unsolved)
	}
	return m
}

// A page comes back with its cursor, its picture and what was held on it, and the
// held curves of one page are not on the other.
func TestPagesKeepTheirLeaf(t *testing.T) {
	m := onSeason(t)
	press(m, "right right space n space v end")
	before := m.View()
	press(m, "tab")
	if len(m.held) != 0 || m.cursor != "dry-diameter" || strings.Contains(m.View(), "held") {
		t.Errorf("on the Curve page: %d held, cursor on %s", len(m.held), m.cursor)
	}
	press(m, "space right")
	if m.held[0].letter != 'A' {
		t.Errorf("the first one held here is %c", m.held[0].letter)
	}
	press(m, "tab")
	if m.View() != before {
		t.Errorf("the page has changed from\n%s\nto\n%s", before, m.View())
	}
	press(m, "shift+tab")
	if len(m.held) != 1 || m.cursor != "dry-size-is" {
		t.Errorf("back on the Curve page: %d held, cursor on %s", len(m.held), m.cursor)
	}
}

// A page that was left is not asked again, unless the scenario has changed.
func TestAnswersWait(t *testing.T) {
	asked := 0
	m := opened(onTerminal("plain"), 80, 24)
	q := season()
	q.Ask = func(ctx context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
		asked++
		return askSeason(ctx, env, s)
	}
	m.questions = []answer.Question{m.questions[0], q}
	press(m, "tab tab tab")
	if asked != 1 {
		t.Errorf("asked %d times", asked)
	}
	press(m, "tab up tab")
	if asked != 2 {
		t.Errorf("after a change asked %d times", asked)
	}
}

// v goes through the pictures and comes round; each keeps its own frame. Where
// there is one picture the key is neither bound nor named.
func TestOtherPictures(t *testing.T) {
	m := onSeason(t)
	for _, want := range []string{"CCN against supersaturation, %  ", "dN/dlog D against size, nm", "ratio against time", "CCN against"} {
		if view := m.View(); !strings.Contains(view, want) {
			t.Errorf("no %q in\n%s", want, view)
		}
		press(m, "v")
	}
	if !strings.Contains(m.help(), "v view") || len(m.frames) != 3 {
		t.Errorf("help %q, %d frames", m.help(), len(m.frames))
	}
	press(m, "space tab")
	before := m.View()
	press(m, "v n p")
	if m.View() != before || strings.Contains(m.help(), "v view") {
		t.Errorf("on a page of one picture:\n%s", m.View())
	}
}

// Held curves and other lines are in the picture that they belong to.
func TestHeldInEveryPicture(t *testing.T) {
	m := onSeason(t)
	press(m, "space n o")
	for i, want := range []int{3, 2, 0} {
		if got := len(m.figure().Lines); got != want {
			t.Errorf("picture %d has %d lines, want %d", i+1, got, want)
		}
		press(m, "v")
	}
	if got, want := m.heldLine(78), "held: A record 1"; got != want {
		t.Errorf("the line is %q, want %q", got, want)
	}
}

func TestRecords(t *testing.T) {
	m := onSeason(t)
	if !strings.Contains(m.View(), "record 1 of 96") {
		t.Errorf("no record in\n%s", m.View())
	}
	press(m, "n n")
	if view := m.View(); !strings.Contains(view, "record 3 of 96") || !strings.Contains(view, "It is record 3") || len(m.history.Past) != 1 {
		t.Errorf("%d entries, view\n%s", len(m.history.Past), view)
	}
	press(m, "p p p")
	if m.scenario.Record.Number != 1 || m.message != "this is the first record" {
		t.Errorf("record %v, %q", m.scenario.Record, m.message)
	}
	if err := m.set("record", "96"); err != nil {
		t.Fatal(err)
	}
	press(m, "n")
	if m.scenario.Record.Number != 96 || m.message != "record 96 is the last one" {
		t.Errorf("record %v, %q", m.scenario.Record, m.message)
	}
	if err := m.set("record", "all"); err != nil {
		t.Fatal(err)
	}
	press(m, "home")
	if !strings.Contains(m.View(), "all of 96 records") {
		t.Errorf("no records in\n%s", m.View())
	}
	press(m, "p")
	if m.scenario.Record.Number != 96 {
		t.Errorf("before all of them is %v", m.scenario.Record)
	}
	press(m, "u n")
	if m.scenario.Record.Number != 1 {
		t.Errorf("after all of them is %v", m.scenario.Record)
	}
	if err := m.set("population", "modes"); err != nil {
		t.Fatal(err)
	}
	press(m, "n")
	if strings.Contains(m.View(), " of 96") || strings.Contains(m.help(), "record") {
		t.Errorf("modes have records in\n%s", m.View())
	}
}

// The held curves of a session are held again on their page.
func TestResumeHoldsOnItsPage(t *testing.T) {
	m := onSeason(t)
	press(m, "space tab space")
	state := m.state(time.Time{})
	if len(state.Held) != 2 || state.Held[0].Page != "curve" || state.Held[1].Page != "season" {
		t.Fatalf("kept: %v", state.Held)
	}
	again := opened(onTerminal("plain"), 80, 24)
	again.questions = m.questions
	again.offered = &state
	press(again, "enter")
	if len(again.held) != 1 || len(again.state(time.Time{}).Held) != 2 {
		t.Errorf("%d held, %d kept", len(again.held), len(again.state(time.Time{}).Held))
	}
	press(again, "tab")
	if len(again.held) != 1 || len(again.held[0].parts) == 0 || again.question.Key != "season" {
		t.Errorf("%d held on %s", len(again.held), again.question.Key)
	}
}

// What takes its time is held again when it is there.
func TestResumeHoldsLater(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	q := season()
	q.Live = func(scenario.Scenario) bool { return false }
	m.questions = []answer.Question{m.questions[0], q}
	m.waiting["season"] = []session.Held{{Page: "season", Letter: 'B', Scenario: scenario.Default()}}
	m.turn(1)
	if len(m.held) != 0 || len(m.state(time.Time{}).Held) != 1 || m.freeLetter() != 'A' {
		t.Fatalf("%d held, %d kept", len(m.held), len(m.state(time.Time{}).Held))
	}
	for _, cmd := range m.todo[len(m.todo)-1:] {
		m.Update(cmd())
	}
	if len(m.held) != 1 || m.held[0].letter != 'B' || len(m.state(time.Time{}).Held) != 1 {
		t.Errorf("%d held, %d kept", len(m.held), len(m.state(time.Time{}).Held))
	}
}

// Bins without their file have no answer: the name is asked for, and Esc leaves
// everything as it was.
func TestFileThatIsLacking(t *testing.T) {
	name := filepath.Join(t.TempDir(), "bins.csv")
	if err := os.WriteFile(name, nil, 0o644); err != nil {
		t.Fatal(err)
	}
	for _, keys := range []string{"home down down", "home enter end enter"} {
		m := onSeason(t)
		press(m, keys)
		if e, ok := m.panel.(*entry); !ok || e.says != "file of bins" || m.scenario.Population == "bins" {
			t.Fatalf("%s: the panel is %T on %s", keys, m.panel, m.scenario.Population)
		}
		press(m, "esc")
		if m.panel != nil || m.scenario.Population == "bins" {
			t.Errorf("%s: after Esc %T on %s", keys, m.panel, m.scenario.Population)
		}
		press(m, keys)
		m.Update(keyOf("paste:" + name))
		press(m, "enter")
		if m.scenario.Population != "bins" || m.scenario.Bins != name || m.panel != nil {
			t.Errorf("%s: population %s of %q, panel %T", keys, m.scenario.Population, m.scenario.Bins, m.panel)
		}
		press(m, "u")
		if m.scenario.Population == "bins" || m.scenario.Bins != "" {
			t.Errorf("%s: undone to %s of %q", keys, m.scenario.Population, m.scenario.Bins)
		}
	}
}

// .csv holds the table that Tab has chosen, a picture is the one that is shown.
func TestWriteWhatIsShown(t *testing.T) {
	dir := t.TempDir()
	m := onSeason(t)
	press(m, "v w")
	if lines := strings.Join(m.panel.lines(80, 9, m), ""); !strings.Contains(lines, `"Table of counts" (Tab: another one)`) {
		t.Errorf("the panel says\n%s", lines)
	}
	for name, c := range map[string]struct{ keys, holds string }{
		"first.csv": {"", "counts_per_m3"}, "second.csv": {"tab", "closure_per_m3"}, "shown.svg": {"", "dN/dlog D against size, nm"},
	} {
		m.panel = newWrite(m)
		press(m, c.keys)
		m.Update(keyOf("paste:" + filepath.Join(dir, name)))
		_, cmd := m.Update(keyOf("enter"))
		m.Update(only(t, cmd))
		got, err := os.ReadFile(filepath.Join(dir, name))
		if err != nil || !strings.Contains(string(got), c.holds) {
			t.Errorf("%s: %v, no %q in %.80q", name, err, c.holds, got)
		}
	}
}
