//go:build unix

package session

import (
	"bufio"
	"fmt"
	"os"
	"os/exec"
	"testing"
	"time"

	"dropcrest/ui/scenario"
)

// asSaver makes the test binary a program that saves until it is killed.
const asSaver = "DROPCREST_SESSION_TEST_SAVER"

func TestMain(m *testing.M) {
	if dir := os.Getenv(asSaver); dir != "" {
		saver(dir)
	}
	os.Exit(m.Run())
}

// saver saves one state after the other, each of which says in three places what
// its number is. It says so once it has begun.
func saver(dir string) {
	st, last, _, err := Open(dir)
	if err != nil || !st.Owned() {
		fmt.Println("no session:", err)
		os.Exit(1)
	}
	first := max(100, int(last.Scenario.DryDiameter*1e9+0.5))
	for n := first + 1; ; n++ {
		if err := st.Save(numbered(n)); err != nil {
			fmt.Println("not saved:", err)
			os.Exit(1)
		}
		if n == first+1 {
			fmt.Println("saving")
		}
	}
}

func numbered(n int) State {
	e := scenario.Entry{Path: "dry-diameter", Says: "x", Before: sized(float64(n - 1)), After: sized(float64(n))}
	return State{Page: fmt.Sprint(n), Scenario: sized(float64(n)), History: scenario.History{Past: []scenario.Entry{e}}}
}

// kill -9 at any moment leaves a session that is whole, at most one save old, and
// that nobody owns.
func TestKill9(t *testing.T) {
	dir := t.TempDir()
	for round := range 12 {
		cmd := exec.Command(os.Args[0])
		cmd.Env = append(os.Environ(), asSaver+"="+dir)
		out, err := cmd.StdoutPipe()
		if err != nil {
			t.Fatal(err)
		}
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		if line, err := bufio.NewReader(out).ReadString('\n'); line != "saving\n" {
			t.Fatalf("the saver said %q, error %v", line, err)
		}
		busy, _, _, _ := Open(dir)
		if busy.Owned() {
			t.Fatal("two programs own the session")
		}
		time.Sleep(time.Duration(round*700) * time.Microsecond)
		_ = cmd.Process.Kill()
		_ = cmd.Wait()
		st, got, found, err := Open(dir)
		if err != nil || !found || !st.Owned() {
			t.Fatalf("found %t, owned %t, note %v", found, st.Owned(), err)
		}
		past := got.History.Past
		if len(past) == 0 || past[len(past)-1].After.DryDiameter != got.Scenario.DryDiameter {
			t.Errorf("the undo list does not lead to the question: %v m", got.Scenario.DryDiameter)
		}
		if around := sized(atoi(got.Page)).DryDiameter; got.Scenario.DryDiameter != around && past[len(past)-1].Before.DryDiameter != around {
			t.Errorf("page %s and question %v m are more than one save apart", got.Page, got.Scenario.DryDiameter)
		}
		_ = st.Close()
	}
}

func atoi(s string) (f float64) {
	_, _ = fmt.Sscan(s, &f)
	return f
}

func BenchmarkSave(b *testing.B) {
	st, _, _, err := Open(b.TempDir())
	if err != nil {
		b.Fatal(err)
	}
	defer st.Close()
	state := long()
	b.ReportAllocs()
	for b.Loop() {
		state.Saved = time.Time{}
		if err := st.Save(state); err != nil {
			b.Fatal(err)
		}
	}
}

// BenchmarkOpen reads a long session; it is part of the time to the first frame.
func BenchmarkOpen(b *testing.B) {
	dir := b.TempDir()
	st, _, _, err := Open(dir)
	if err != nil {
		b.Fatal(err)
	}
	if err := st.Save(long()); err != nil {
		b.Fatal(err)
	}
	_ = st.Close()
	b.ReportAllocs()
	for b.Loop() {
		st, _, found, err := Open(dir)
		if err != nil || !found {
			b.Fatal(err)
		}
		_ = st.Close()
	}
}

// long is a session with a full undo list.
func long() State {
	state := full()
	for n := range keptEntries {
		state.History.Past = append(state.History.Past, numbered(n+100).History.Past...)
	}
	return state
}
