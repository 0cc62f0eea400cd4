package screen

import (
	"fmt"
	"os"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/figure"
	"dropcrest/ui/scenario"
)

// The page as a person sees it: on the usual window, a large one, the least one,
// without UTF-8, and once with its colours.
func TestScreens(t *testing.T) {
	look(t, "", map[string]sight{
		"start_80x24":        {"plain", 80, 24, "", nil},
		"start_80x24_ascii":  {"ascii", 80, 24, "", nil},
		"start_80x24_colour": {"colour", 80, 24, "", nil},
		"start_160x48":       {"plain", 160, 48, "", nil},
		"start_60x18":        {"plain", 60, 18, "", nil},
		"held_80x24":         {"plain", 80, 24, "space pgup", nil},
		"held_80x24_ascii":   {"ascii", 80, 24, "space pgup o", nil},
		"finding_80x24":      {"plain", 80, 24, "end", nil},
		"entry_80x24":        {"plain", 80, 24, "5 0", nil},
		"undone_80x24":       {"plain", 80, 24, "up up right right u", nil},
		"long_80x24":         {"plain", 80, 24, "right down home right right right down", nil},
		"small_40x10":        {"plain", 40, 10, "", nil},
		"rows_80x24":         {"plain", 80, 24, "right right enter a", nil},
		"further_80x24":      {"plain", 80, 24, "end left enter tab down", nil},
		"readme":             {"plain", 80, 24, "space pgup", nil},
	})
}

// states are keys that lead to every state of the page, and the scenario they
// start from.
func states() map[string]struct {
	keys string
	from func(*scenario.Scenario)
} {
	type state = struct {
		keys string
		from func(*scenario.Scenario)
	}
	long := func(s *scenario.Scenario) {
		s.DrySizeIs, s.ShapeFactor = "mobility", 1.08
		s.WaterActivity, s.Kelvin, s.SolutionDensity = "kappa", "compressible", "measured"
		s.SharesBy = "mass"
		s.Components = append(s.Components, scenario.Component{Substance: "sodium chloride", Share: 0.25, Kappa: scenario.Measure{Word: "catalogue"},
			Density: scenario.Measure{Word: "catalogue"}, MolarMass: scenario.Measure{Word: "catalogue"}, Ions: scenario.Measure{Word: "catalogue"}})
	}
	modes := func(s *scenario.Scenario) { s.Population, s.Fit = "modes", "erf2" }
	giant := func(s *scenario.Scenario) { s.DryDiameter, s.Temperature, s.RelativeHumidity = 9e-6, 240, 0.3 }
	return map[string]state{
		"start":      {"", nil},
		"stepped":    {"up up pgdown", nil},
		"held":       {"space up space up space up space up space up space o", nil},
		"finding":    {"end", nil},
		"entry":      {"5 0", nil},
		"refused":    {"5 k enter", nil},
		"list":       {"right enter", nil},
		"narrowed":   {"right right right enter k", nil},
		"rows":       {"right right enter", nil},
		"more rows":  {"right right enter a a", nil},
		"substances": {"right right enter enter", nil},
		"about":      {"i", nil},
		"why":        {"end i", nil},
		"table":      {"t", nil},
		"write":      {"w n o t h i n g", nil},
		"help":       {"?", nil},
		"long":       {"", long},
		"long held":  {"space end", long},

		"spectrum":         {"tab", nil},
		"spectrum held":    {"tab space n space v tab space tab end", nil},
		"spectrum sizes":   {"tab v v n", nil},
		"spectrum files":   {"tab right enter a m tab", nil},
		"spectrum columns": {"tab end left enter tab tab enter", nil},
		"spectrum series":  {"tab end left left left enter", nil},
		"spectrum write":   {"tab v w tab", nil},
		"spectrum table":   {"tab t right", nil},
		"modes":            {"tab", modes},
		"mode rows":        {"tab right enter a right right", modes},
		"modes held":       {"tab right right right space down v o end i", modes},
		"giant":            {"", giant},

		"kappa":         {"tab tab", nil},
		"kappa held":    {"tab tab space up space end", nil},
		"kappa entry":   {"tab tab 5 0", nil},
		"kappa several": {"tab tab", points(activated, scanned, grown)},
		"kappa rows":    {"tab tab enter tab tab", points(activated, scanned, grown)},
		"kappa further": {"tab tab end left enter", points(grown)},
		"kappa table":   {"tab tab t", points(activated, grown)},
		"kappa why":     {"tab tab end i", nil},

		"ledger":         {"l n n", nil},
		"ledger budget":  {"l v", nil},
		"ledger table":   {"l t", nil},
		"ledger counts":  {"tab l end", nil},
		"ledger further": {"l end left enter", nil},
		"ledger long":    {"l", long},
		"ledger modes":   {"tab l", modes},
	}
}

// No line is wider and no view higher than the window, in every state, from the
// least window on.
func TestEveryWindowFits(t *testing.T) {
	if testing.Short() { // the race detector has nothing to find in more of them
		everyWindow(t, []int{60, 80}, []int{18, 24})
		return
	}
	everyWindow(t, []int{60, 61, 79, 80, 99, 100, 101, 102, 200}, []int{18, 19, 20, 21, 22, 23, 24, 29, 30, 60})
}

// The same for every single width and every single height.
func TestEveryWindowFitsLong(t *testing.T) {
	if os.Getenv("DROPCREST_LONG") == "" {
		t.Skip("DROPCREST_LONG is not set")
	}
	everyWindow(t, through(60, 200), []int{18, 22, 24, 48})
	everyWindow(t, []int{60, 80, 100, 160, 200}, through(18, 60))
}

func everyWindow(t *testing.T, widths, heights []int) {
	for name, s := range states() {
		t.Run(name, func(t *testing.T) {
			for _, terminal := range []string{"colour", "ascii"} {
				o := onTerminal(terminal)
				if s.from != nil {
					s.from(&o.Scenario)
				}
				m := opened(o, 80, 24)
				if m.unsolved != "" {
					t.Fatalf("no answer: %s", m.unsolved)
				}
				press(m, s.keys)
				if m.unsolved != "" {
					t.Fatalf("no answer after %s: %s", s.keys, m.unsolved)
				}
				for _, w := range widths {
					for _, h := range heights {
						m.Update(tea.WindowSizeMsg{Width: w, Height: h})
						fits(t, m, w, h)
					}
				}
			}
		})
	}
}

func through(lo, hi int) (out []int) {
	for n := lo; n <= hi; n++ {
		out = append(out, n)
	}
	return out
}

// fits checks that the view fills the window and goes nowhere beyond it.
func fits(t *testing.T, m *model, w, h int) {
	t.Helper()
	lines := strings.Split(m.View(), "\n")
	if len(lines) != h && !m.tooSmall() || len(lines) > h {
		t.Errorf("%dx%d: %d lines", w, h, len(lines))
	}
	for i, line := range lines {
		if n := ansi.StringWidth(line); n > w {
			t.Errorf("%dx%d: line %d has %d columns: %q", w, h, i+1, n, line)
		}
	}
}

// The chosen slot stands in <>, all others in [], and nothing else moves when the
// choice moves.
func TestTheChoiceMovesNothing(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	still := strings.NewReplacer("<", "[", ">", "]")
	clean := func() string { return still.Replace(strings.Join(m.statement(80), "\n")) }
	begin := clean()
	for range len(m.slots()) - 1 {
		shown := strings.Join(m.statement(80), "\n")
		if strings.Count(shown, "<") != 1 || strings.Count(shown, ">") != 1 {
			t.Errorf("cursor on %s: not one slot in <>:\n%s", m.cursor, shown)
		}
		if clean() != begin {
			t.Errorf("cursor on %s: the statement has moved:\n%s", m.cursor, shown)
		}
		press(m, "right")
	}
	if !m.onFinding() {
		t.Errorf("the last place is %s, want the finding", m.cursor)
	}
}

// A picture that has no room becomes words, and words come back as a picture.
func TestNoRoomForAPicture(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	if lines := m.draw(80, leastRows); !strings.Contains(strings.Join(lines, "\n"), "crest 0.147 %") {
		t.Errorf("words say %q", lines)
	}
	if lines := m.draw(80, leastRows+1); !strings.Contains(strings.Join(lines, "\n"), "◆") {
		t.Errorf("the picture is %q", lines)
	}
}

// A picture of bars fits every window, and with held curves about too; where there
// is no room for it its rows become words.
func TestPictureOfBars(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "space pgup o")
	bars := figure.Figure{Key: "bars", Title: "costs"}
	for i := range 20 {
		bars.Bars = append(bars.Bars, figure.Bar{Says: fmt.Sprintf("assumption %d", i+1), Value: float64(i - 9), Text: "a value", Chosen: i == 12})
	}
	m.answer.Figures = []figure.Figure{bars}
	for _, w := range []int{60, 80, 100} {
		for h := range 30 {
			lines := m.draw(w, h)
			says := strings.Join(lines, "\n")
			for _, line := range lines {
				if ansi.StringWidth(line) > w {
					t.Errorf("%d x %d: %q is too wide", w, h, line)
				}
			}
			switch {
			case len(lines) > h:
				t.Errorf("%d x %d: %d lines", w, h, len(lines))
			case h > leastRows && !strings.Contains(says, "▸ 13  assumption 13"):
				t.Errorf("%d x %d: the chosen bar is not in\n%s", w, h, says)
			case h > 0 && h <= leastRows && !strings.HasPrefix(says, " assumption 1 a value"):
				t.Errorf("%d x %d: words say\n%s", w, h, says)
			}
		}
	}
}

// The view is the same whether it was just drawn or kept from before.
func TestViewIsStill(t *testing.T) {
	m := opened(onTerminal("colour"), 80, 24)
	press(m, "space pgup o")
	kept := m.View()
	m.redraw()
	if m.View() != kept {
		t.Error("drawn anew it differs")
	}
}

// What a file or a session says cannot drive the terminal.
func TestTextFromFilesIsCleaned(t *testing.T) {
	o := onTerminal("plain")
	o.Note = fmt.Errorf("evil \x1b[31mred\u202e name")
	o.Scenario.Components[0].Substance = "no\x1b]0;such\x07"
	m := opened(o, 80, 24)
	if view := m.View(); strings.ContainsAny(view, "\x1b\x07\u202e") {
		t.Errorf("the view is %q", view)
	}
	if m.unsolved == "" {
		t.Error("an unknown substance has an answer")
	}
}

// What the finding leaves to i is counted, where there is room for more than its
// first sentence.
func TestUnsaidNotesAreCounted(t *testing.T) {
	o := onTerminal("plain")
	o.Scenario.Temperature = 243.15
	m := opened(o, 80, 24)
	text := strings.Join(m.finding(200, 99), " ")
	if n := len(m.answer.Notes) - 1; n < 2 || !strings.HasSuffix(text, fmt.Sprintf("(%d more notes: End, i)", n)) {
		t.Errorf("%d notes, finding %q", len(m.answer.Notes), text)
	}
	if start := strings.Join(opened(onTerminal("plain"), 80, 24).finding(80, 99), " "); strings.Contains(start, "more note") {
		t.Errorf("notes of a particle that has none: %q", start)
	}
}

// A scenario without an answer is shown with the reason, and can be put right.
func TestUnsolvedStart(t *testing.T) {
	o := onTerminal("plain")
	o.Scenario.Components[0].Substance = "amonium sulfat"
	m := opened(o, 80, 24)
	if view := m.View(); !strings.Contains(view, "There is no answer") || !strings.Contains(view, "ammonium bisulfate") {
		t.Errorf("the view does not say why there is no answer:\n%s", view)
	}
	if err := m.set("component[0].substance", "sodium chloride"); err != nil {
		t.Fatal(err)
	}
	if view := m.View(); strings.Contains(view, "no answer") || !strings.Contains(view, "activates at") {
		t.Errorf("the view after the repair:\n%s", view)
	}
}
