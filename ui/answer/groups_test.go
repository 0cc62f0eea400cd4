package answer

import (
	"slices"
	"testing"

	"dropcrest/ui/scenario"
)

// An option may be called otherwise than what it sets.
func TestOptionsThatDiffer(t *testing.T) {
	q := Question{Groups: []Group{
		{"One", []string{"dry-diameter=point[0].dry-diameter", "point"}},
		{"Two", []string{"points=points-file", "trials"}},
	}}
	for option, want := range map[string]scenario.Path{
		"dry-diameter": "point[0].dry-diameter",
		"point":        "point",
		"points":       "points-file",
		"trials":       "trials",
	} {
		if got, ok := q.PathOf(option); !ok || got != want {
			t.Errorf("option %s sets %q, want %q", option, got, want)
		}
		if got, ok := q.OptionOf(want); !ok || got != option {
			t.Errorf("%s is set by option %q, want %q", want, got, option)
		}
	}
	for path, want := range map[string]bool{
		"points-file": true, "trials": true, "point": true, "point[0].dry-diameter": true,
		"points": false, "dry-diameter": false, "point[0].supersaturation": false,
	} {
		if q.LooksAt(path) != want {
			t.Errorf("looks at %s: %v, want %v", path, !want, want)
		}
	}
	s := scenario.Default()
	var inputs, lists []string
	for _, in := range q.Inputs(&s) {
		inputs = append(inputs, string(in.Path()))
	}
	for _, l := range q.Lists(&s) {
		lists = append(lists, l.Key())
	}
	if !slices.Equal(inputs, []string{"points-file", "trials"}) || !slices.Equal(lists, []string{"point"}) {
		t.Errorf("inputs %q, lists %q", inputs, lists)
	}
	for option, path := range q.Groups[0].Options() {
		if option != "dry-diameter" || path != "point[0].dry-diameter" {
			t.Errorf("the first option is %s=%s", option, path)
		}
		break
	}
}

// Every option of every question sets something, and no two set the same.
func TestOptionsSetSomething(t *testing.T) {
	s := scenario.Default()
	for _, q := range Questions() {
		seen := map[string]bool{}
		for _, g := range q.Groups {
			for option, path := range g.Options() {
				_, isInput := scenario.Find(&s, path)
				isList := slices.ContainsFunc(scenario.Lists(&s), func(l scenario.RowList) bool { return l.Key() == string(path) })
				if !isInput && !isList {
					t.Errorf("%s: option %s sets %s, which there is not", q.Key, option, path)
				}
				// the ledger has the options of all its pages, which call bins otherwise
				if seen[option] || seen["="+string(path)] && option != "bins-file" {
					t.Errorf("%s: %s=%s stands twice", q.Key, option, path)
				}
				seen[option], seen["="+string(path)] = true, true
			}
		}
	}
}
