package session

import (
	"runtime"
	"strings"
	"testing"
)

func TestDir(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("the paths below are those of Unix")
	}
	for name, c := range map[string]struct {
		vars map[string]string
		want string // "" for an error
	}{
		"the variable":          {map[string]string{"XDG_STATE_HOME": "/var/state", "HOME": "/home/ann"}, "/var/state/dropcrest"},
		"no variable":           {map[string]string{"HOME": "/home/ann"}, "/home/ann/.local/state/dropcrest"},
		"an empty one":          {map[string]string{"XDG_STATE_HOME": "", "HOME": "/home/ann"}, "/home/ann/.local/state/dropcrest"},
		"a relative one":        {map[string]string{"XDG_STATE_HOME": "state", "HOME": "/home/ann"}, "/home/ann/.local/state/dropcrest"},
		"with a slash too many": {map[string]string{"XDG_STATE_HOME": "/var/state/"}, "/var/state/dropcrest"},
		"nothing":               {nil, ""},
		"a relative home":       {map[string]string{"HOME": "ann"}, ""},
	} {
		got, err := Dir(func(v string) string { return c.vars[v] })
		if got != c.want || (err == nil) != (c.want != "") {
			t.Errorf("%s: %q, error %v, want %q", name, got, err, c.want)
		}
		if err != nil && !strings.Contains(err.Error(), "set XDG_STATE_HOME") {
			t.Errorf("%s: the error does not say what would be right: %v", name, err)
		}
	}
}
