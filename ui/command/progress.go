package command

import (
	"fmt"
	"io"
	"strings"
	"sync"
	"time"

	"dropcrest/ui/terminal"
)

// showAfter is how long work may take before it is spoken of.
const showAfter = 300 * time.Millisecond

// meter shows in per cent how far work is, in one line of a terminal that is blank
// again in the end.
type meter struct {
	to io.Writer

	mu      sync.Mutex
	start   time.Time
	percent int64
	width   int // of what stands in the line
}

// newMeter is a meter on standard error; nil when that is no terminal, or when the
// answer itself runs over the terminal.
func (w world) newMeter(out string, streams bool) *meter {
	onScreen := (out == "" || out == "-") && isTerminal(w.out)
	if onScreen && streams || !isTerminal(w.err) || terminal.Dumb(w.env) {
		return nil
	}
	return &meter{to: w.err, start: time.Now()}
}

// tell is env.Progress of an answer.
func (m *meter) tell(done, total int64) {
	if m == nil {
		return
	}
	m.mu.Lock()
	defer m.mu.Unlock()
	if total <= 0 || time.Since(m.start) < showAfter {
		return
	}
	percent := min(max(100*done/total, 0), 100)
	if m.width > 0 && percent == m.percent {
		return
	}
	m.percent = percent
	m.line(fmt.Sprintf("dropcrest: %d %%", percent))
}

// line writes a text over what stands in the line.
func (m *meter) line(text string) {
	fmt.Fprintf(m.to, "\r%s%s", text, strings.Repeat(" ", max(m.width-len(text), 0)))
	m.width = len(text)
}

// end blanks the line.
func (m *meter) end() {
	if m == nil {
		return
	}
	m.mu.Lock()
	defer m.mu.Unlock()
	if m.width > 0 {
		m.line("")
		fmt.Fprint(m.to, "\r")
	}
	m.start = time.Now().Add(time.Hour) // what comes late is not shown
}
