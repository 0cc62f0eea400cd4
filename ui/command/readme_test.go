package command

import (
	"bytes"
	"context"
	"fmt"
	"os"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
	"dropcrest/ui/screen"
)

// The README's lists are made of the tables of the program. To write them anew:
// UPDATE_README=1 go test -run TestReadme ./ui/command
func TestReadme(t *testing.T) {
	const name = "../../README.md"
	text, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	picture, err := os.ReadFile("../screen/testdata/TestScreens/readme.golden")
	if err != nil {
		t.Fatal(err)
	}
	want := string(text)
	for mark, lines := range map[string][]string{
		"screen":    append(append([]string{"```"}, strings.Split(strings.TrimRight(string(picture), "\n"), "\n")...), "```"),
		"keys":      keyRows(),
		"questions": questionRows(),
		"options":   optionRows(),
		"ledger":    ledgerLines(t),
	} {
		want = between(t, want, mark, strings.Join(lines, "\n"))
	}
	if os.Getenv("UPDATE_README") != "" {
		if err := os.WriteFile(name, []byte(want), 0o644); err != nil {
			t.Fatal(err)
		}
		return
	}
	got := strings.Split(string(text), "\n")
	for i, line := range strings.Split(want, "\n") {
		if i >= len(got) || got[i] != line {
			t.Fatalf("README.md:%d is not what the program says: want %q", i+1, line)
		}
	}
}

// between puts a text between the marks of a part of the README.
func between(t *testing.T, text, mark, part string) string {
	t.Helper()
	first, last := "<!-- "+mark+" -->\n", "\n<!-- end of "+mark+" -->"
	before, rest, found := strings.Cut(text, first)
	_, after, ended := strings.Cut(rest, last)
	if !found || !ended {
		t.Fatalf("README.md has no part between %q and %q", strings.TrimSpace(first), strings.TrimSpace(last))
	}
	return before + first + part + last + after
}

// ledgerLines are what the program prints for the example of a ledger.
func ledgerLines(t *testing.T) []string {
	t.Helper()
	var out, complaints bytes.Buffer
	w := world{out: &out, err: &complaints, env: func(name string) string { return map[string]string{"LANG": "C.UTF-8", "COLUMNS": "100"}[name] }}
	if code := run(context.Background(), []string{"ledger", "--dry-diameter", "20nm", "--temperature", "5C"}, w); code != done || complaints.Len() > 0 {
		t.Fatalf("exit code %d: %s", code, complaints.String())
	}
	return slices.Concat([]string{"```", "$ dropcrest ledger --dry-diameter 20nm --temperature 5C"}, strings.Split(strings.TrimRight(out.String(), "\n"), "\n"), []string{"```"})
}

func keyRows() []string {
	rows := []string{"| key | what it does |", "|---|---|"}
	for _, k := range screen.Keys() {
		rows = append(rows, fmt.Sprintf("| %s | %s |", k.Name, k.Does))
	}
	return rows
}

func questionRows() []string {
	rows := []string{"| page | command | the question it answers |", "|---|---|---|"}
	for _, q := range answer.Questions() {
		rows = append(rows, fmt.Sprintf("| %s | `dropcrest %s` | %s |", q.Title, q.Key, q.Says))
	}
	return rows
}

// optionRows are the options of all questions, each once, in their order.
func optionRows() []string {
	rows := []string{"| option | what it is | default | command |", "|---|---|---|---|"}
	s := scenario.Default()
	var said []string
	for _, q := range answer.Questions() {
		for _, g := range q.Groups {
			for option, path := range g.Options() {
				if name := option + " " + string(path); !slices.Contains(said, name) {
					said = append(said, name)
					rows = append(rows, optionRow(&s, option, path))
				}
			}
		}
	}
	return rows
}

func optionRow(s *scenario.Scenario, key string, path scenario.Path) string {
	var of []string
	for _, q := range answer.Questions() {
		if option, ok := q.OptionOf(path); ok && option == key {
			of = append(of, q.Key)
		}
	}
	row := func(what, shown string) string {
		return fmt.Sprintf("| `--%s` | %s | %s | %s |", key, what, shown, strings.Join(of, ", "))
	}
	for _, l := range scenario.Lists(s) {
		if scenario.Path(l.Key()) == path {
			return row(l.Says()+", may be given several times", l.Show(scenario.Style{}))
		}
	}
	in, _ := scenario.Find(s, path)
	what := in.Says()
	if r := in.Range(); r != "" {
		what += ": " + r
	}
	return row(what, in.Show(scenario.Style{}))
}
