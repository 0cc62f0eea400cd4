package screen

import (
	"context"
	"errors"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// slow is a question that is worked out beside the keys.
func slow(ask func(context.Context, answer.Env, scenario.Scenario) (answer.Answer, error)) answer.Question {
	return answer.Question{
		Key: "slow", Title: "Slow", Says: "A question for tests.",
		Statement: func(scenario.Scenario) []string { return []string{"A size of {dry-diameter}."} },
		Ask:       ask,
		Live:      func(scenario.Scenario) bool { return false },
	}
}

// sizes answers with the size that was asked about.
func sizes(_ context.Context, _ answer.Env, s scenario.Scenario) (answer.Answer, error) {
	in, _ := scenario.Find(&s, "dry-diameter")
	return answer.Answer{Finding: []string{"It is " + in.Show(scenario.Style{}) + "."}}, nil
}

// onSlow is the screen on a slow question, with the answer to its start.
func onSlow(t *testing.T, q answer.Question) *model {
	t.Helper()
	m := opened(onTerminal("plain"), 80, 24)
	m.questions = []answer.Question{m.questions[0], q}
	m.keys = newKeyMap(false, len(m.questions))
	_, cmd := m.Update(keyOf("tab"))
	m.Update(answerOf(t, cmd))
	return m
}

// answerOf runs the commands of a batch until one brings an answer; ticks are
// left out by their place: the work comes first.
func answerOf(t *testing.T, cmd tea.Cmd) tea.Msg {
	t.Helper()
	batch, ok := cmd().(tea.BatchMsg)
	if !ok {
		t.Fatal("no work was handed out")
	}
	return batch[0]()
}

// The answer to an earlier question does not count, and the one shown is marked
// as old until the right one is there.
func TestOldAnswersAreDropped(t *testing.T) {
	m := onSlow(t, slow(sizes))
	if !strings.Contains(m.View(), "It is 100 nm.") {
		t.Fatalf("the first answer:\n%s", m.View())
	}
	_, first := m.Update(keyOf("up"))
	_, second := m.Update(keyOf("up"))
	if !strings.Contains(m.View(), "(of the question before) It is 100 nm.") {
		t.Errorf("the old answer is not marked:\n%s", m.View())
	}
	m.Update(answerOf(t, first))
	if !m.work.old {
		t.Error("a dropped answer was taken")
	}
	m.Update(answerOf(t, second))
	if view := m.View(); m.work.old || !strings.Contains(view, " It is 120 nm.") {
		t.Errorf("the right answer is not there:\n%s", view)
	}
}

// Percent are shown once the work takes long, and Esc stops it: panel first.
func TestProgressAndStop(t *testing.T) {
	var got context.Context
	q := slow(func(ctx context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
		got = ctx
		env.Progress(42, 100)
		return sizes(ctx, env, s)
	})
	m := onSlow(t, q)
	_, cmd := m.Update(keyOf("up"))
	late := answerOf(t, cmd)
	if strings.Contains(m.View(), "working") {
		t.Error("short work is spoken of")
	}
	m.Update(lookAtWork{m.work.revision})
	if !strings.Contains(m.View(), "working  42 % [####......] Esc stops it") {
		t.Errorf("no progress in\n%s", m.View())
	}
	press(m, "? esc")
	if m.work.cancel == nil {
		t.Fatal("Esc has stopped the work, not closed the panel")
	}
	press(m, "esc")
	if m.work.cancel != nil || got.Err() == nil || !m.work.old {
		t.Error("Esc did not stop the work")
	}
	m.Update(late)
	if !m.work.old {
		t.Error("the answer of stopped work was taken")
	}
}

// A question that fails keeps the last answer, marked as old.
func TestWorkFails(t *testing.T) {
	fails := false
	m := onSlow(t, slow(func(ctx context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
		if fails {
			return answer.Answer{}, errors.New("too dry")
		}
		return sizes(ctx, env, s)
	}))
	fails = true
	_, cmd := m.Update(keyOf("up"))
	m.Update(answerOf(t, cmd))
	if view := m.View(); !strings.Contains(view, "(of the question before) It is 100 nm.") || !strings.Contains(view, "too dry") {
		t.Errorf("after a failure:\n%s", view)
	}
}

// A fault in a command ends the program through Update.
func TestFaultOfACommand(t *testing.T) {
	m := onSlow(t, slow(sizes))
	m.question.Ask = func(context.Context, answer.Env, scenario.Scenario) (answer.Answer, error) { panic("lost") }
	_, cmd := m.Update(keyOf("up"))
	msg := answerOf(t, cmd)
	if f, ok := msg.(fault); !ok || !strings.Contains(f.Error(), "lost") {
		t.Fatalf("the panic became %v", msg)
	}
	if _, cmd := m.Update(msg); !quits(cmd) || m.fatal == nil {
		t.Error("the program goes on")
	}
}

// Turning pages goes round through all of them.
func TestTurnPages(t *testing.T) {
	m := onSlow(t, slow(sizes))
	if !strings.Contains(m.View(), " Curve   SLOW") || !strings.Contains(m.help(), "Tab page") {
		t.Errorf("header and help line:\n%s", m.View())
	}
	press(m, "tab")
	if !strings.Contains(m.View(), " CURVE   Slow") || !strings.Contains(m.View(), "activates at") {
		t.Errorf("after another Tab:\n%s", m.View())
	}
	press(m, "shift+tab")
	if m.question.Key != "slow" {
		t.Errorf("Shift-Tab leads to %s", m.question.Key)
	}
}
