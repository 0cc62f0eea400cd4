package fieldfile

import (
	"strings"
	"testing"
)

// A column that cannot be told is asked for, until a line says what it holds.
func TestAnsweredQuestions(t *testing.T) {
	open := func(lines ...string) *File {
		f, err := Open("a.csv", strings.NewReader("start_time,ccn_0.1,ccn_0.2\n2026-03-14T00:00:00Z,1,2\n"), Options{})
		if err != nil {
			t.Fatal(err)
		}
		if err := f.Use(lines...); err != nil {
			t.Fatal(err)
		}
		return f
	}
	for _, c := range []struct {
		lines []string
		asked string
	}{
		{nil, "ccn_0.1"},
		{[]string{"ccn_0.1=ccn @0.1% in cm-3 at stp"}, "ccn_0.2"},
		{[]string{"ccn_*=ccn @*% in cm-3 at stp"}, ""},
		{[]string{"ccn_0.1=", "ccn_0.2="}, ""},
	} {
		asked := ""
		for _, n := range open(c.lines...).Notes() {
			if n.Code == "ask" {
				asked = n.Text
			}
		}
		if (asked == "") != (c.asked == "") || !strings.Contains(asked, c.asked) {
			t.Errorf("%q: %q is asked, want %q", c.lines, asked, c.asked)
		}
	}
}
