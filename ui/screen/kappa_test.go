package screen

import (
	"context"
	"errors"
	"strings"
	"testing"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// points puts measurements in place of the one that a new user meets.
func points(rows ...string) func(*scenario.Scenario) {
	return func(s *scenario.Scenario) {
		for i, row := range rows {
			if err := scenario.SetRow(s, "point", row, i == 0); err != nil {
				panic(err)
			}
		}
		s.Trials.Number = 10000
	}
}

const (
	activated = "dry-diameter=60nm±3%rel±2%rel common supersaturation=0.40%±5%rel±2%rel common"
	scanned   = "dry-diameter=70nm±3%rel±2%rel common supersaturation=0.30%±5%rel±2%rel common width=0.2"
	grown     = "dry-diameter=100nm±3%rel growth-factor=1.4±0.02 relative-humidity=90%±1%abs"
)

// The Kappa page as a person sees it.
func TestKappaScreens(t *testing.T) {
	three := points(activated, scanned, grown)
	look(t, "tab tab ", map[string]sight{
		"start_80x24":       {"plain", 80, 24, "", nil},
		"start_80x24_ascii": {"ascii", 80, 24, "", nil},
		"start_160x48":      {"plain", 160, 48, "", nil},
		"start_60x18":       {"plain", 60, 18, "", nil},
		"several_80x24":     {"plain", 80, 24, "", three},
		"several_160x48":    {"plain", 160, 48, "", three},
		"rows_80x24":        {"plain", 80, 24, "enter", three},
		"rows_60x18":        {"plain", 60, 18, "enter tab tab", three},
		"growth_80x24":      {"plain", 80, 24, "", points(grown)},
		"further_80x24":     {"plain", 80, 24, "end left enter", nil},
		"why_80x24":         {"plain", 80, 24, "end i", nil},
	})
}

// The measurements of the demo are looked at by keys alone.
func TestDemoPointsByKeys(t *testing.T) {
	m := opened(onTerminal("plain"), 160, 48)
	press(m, "tab tab end left enter enter d e m o")
	_, cmd := m.Update(keyOf("enter"))
	m.Update(answerOf(t, cmd))
	press(m, "esc")
	if view := m.View(); m.work.old || m.scenario.PointsFile != scenario.DemoData || !strings.Contains(view, "weighted mean of 8 points") || !strings.Contains(view, "weighted mean of 3 points") {
		t.Errorf("points of %q:\n%s", m.scenario.PointsFile, view)
	}
}

// A growth factor takes the place of the supersaturation and back, by keys alone,
// and a further measurement is added.
func TestFromActivationToGrowthByKeys(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "tab tab end left enter tab tab tab tab tab tab tab enter")
	if _, ok := m.panel.(*rows); !ok {
		t.Fatalf("a %T is open:\n%s", m.panel, m.View())
	}
	press(m, "right right 1 . 5 enter")
	p := m.scenario.Measurements[0]
	if p.Growth.Value != 1.5 || p.Supersaturation.Known() || !p.Humidity.Known() || !strings.Contains(m.View(), "grew") {
		t.Fatalf("%+v:\n%s", p, m.View())
	}
	press(m, "u")
	if p := m.scenario.Measurements[0]; p.Growth.Known() || !p.Supersaturation.Known() {
		t.Errorf("undone: %+v", p)
	}
	press(m, "a")
	if n := len(m.scenario.Measurements); n != 2 {
		t.Errorf("%d measurements", n)
	}
}

// Esc keeps what a question has to say when it is stopped, and only that.
func TestStopKeepsWhatThereIs(t *testing.T) {
	for name, c := range map[string]struct {
		finding []string
		err     error
		kept    bool
	}{
		"so far":       {[]string{"It is about 100 nm."}, context.Canceled, true},
		"nothing":      {nil, context.Canceled, false},
		"other errors": {[]string{"It is about 100 nm."}, errors.New("too dry"), false},
	} {
		t.Run(name, func(t *testing.T) {
			isStopped := false
			m := onSlow(t, slow(func(ctx context.Context, env answer.Env, s scenario.Scenario) (answer.Answer, error) {
				if isStopped {
					return answer.Answer{Finding: c.finding}, c.err
				}
				return sizes(ctx, env, s)
			}))
			isStopped = true
			_, cmd := m.Update(keyOf("up"))
			late := answerOf(t, cmd)
			press(m, "esc")
			if !m.work.old || !strings.Contains(m.View(), "stopped; the answer is of the question before") {
				t.Errorf("after Esc:\n%s", m.View())
			}
			m.Update(late)
			view := m.View()
			if m.work.old == c.kept || strings.Contains(view, "about 100 nm") != c.kept || strings.Contains(view, "this is what there is so far") != c.kept {
				t.Errorf("when it arrives:\n%s", view)
			}
		})
	}
}

// What was stopped does not come once another question has been asked.
func TestStoppedAnswerIsDropped(t *testing.T) {
	m := onSlow(t, slow(sizes))
	_, cmd := m.Update(keyOf("up"))
	only := answerOf(t, cmd).(answered)
	press(m, "esc")
	m.Update(keyOf("up"))
	only.err = context.Canceled
	m.Update(only)
	if !m.work.old {
		t.Errorf("it was taken:\n%s", m.View())
	}
}

// Ten million trials are stopped half-way and say how many were made.
func TestLongTrialsAreStopped(t *testing.T) {
	o := onTerminal("plain")
	o.Scenario.Trials.Number = 10000000
	m := opened(o, 80, 24)
	arrived := underWay(t, m, "tab tab")
	press(m, "esc")
	m.Update(<-arrived)
	press(m, "end")
	if view := m.View(); m.work.old || !strings.Contains(view, "κ is 0.428") || !strings.Contains(view, "by Monte Carlo") {
		t.Errorf("stopped:\n%s", view)
	}
	press(m, "i")
	if view := strings.Join(m.answer.Why, " "); !strings.Contains(view, "The work was stopped after") {
		t.Errorf("the notes do not say it: %s", view)
	}
}
