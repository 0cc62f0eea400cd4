package terminal

import (
	"os"
	"runtime"
	"testing"
)

// environment is an environment in which only these variables are set.
func environment(vars map[string]string) func(string) string {
	return func(name string) string { return vars[name] }
}

func TestUTF8(t *testing.T) {
	for name, c := range map[string]struct {
		vars map[string]string
		want bool
	}{
		"nothing set is the C locale":   {nil, runtime.GOOS == "windows"},
		"German":                        {map[string]string{"LANG": "de_DE.UTF-8"}, true},
		"spelt utf8":                    {map[string]string{"LANG": "en_US.utf8"}, true},
		"C with UTF-8":                  {map[string]string{"LANG": "C.UTF-8"}, true},
		"a modifier after it":           {map[string]string{"LANG": "sr_RS.UTF-8@latin"}, true},
		"the codeset alone, as macOS":   {map[string]string{"LC_CTYPE": "UTF-8"}, true},
		"C":                             {map[string]string{"LANG": "C"}, false},
		"Latin-1":                       {map[string]string{"LANG": "de_DE.ISO-8859-1"}, false},
		"no codeset said":               {map[string]string{"LANG": "de_DE"}, false},
		"a modifier that says UTF-8":    {map[string]string{"LANG": "de_DE@UTF-8"}, false},
		"LC_ALL before LANG":            {map[string]string{"LC_ALL": "C", "LANG": "de_DE.UTF-8"}, false},
		"LC_ALL before LC_CTYPE":        {map[string]string{"LC_ALL": "C.UTF-8", "LC_CTYPE": "C"}, true},
		"LC_CTYPE before LANG":          {map[string]string{"LC_CTYPE": "C", "LANG": "de_DE.UTF-8"}, false},
		"an empty one does not decide":  {map[string]string{"LC_ALL": "", "LANG": "de_DE.UTF-8"}, true},
		"other categories do not count": {map[string]string{"LC_TIME": "de_DE.UTF-8", "LANG": "C"}, false},
	} {
		if got := UTF8(environment(c.vars)); got != c.want {
			t.Errorf("%s: UTF8 is %t, want %t", name, got, c.want)
		}
	}
}

func TestColourAndDumb(t *testing.T) {
	for name, c := range map[string]struct {
		vars            map[string]string
		noColor, isDumb bool
	}{
		"an ordinary terminal":      {map[string]string{"TERM": "xterm-256color"}, false, false},
		"NO_COLOR, any value":       {map[string]string{"TERM": "xterm", "NO_COLOR": "0"}, true, false},
		"NO_COLOR empty is not set": {map[string]string{"TERM": "xterm", "NO_COLOR": ""}, false, false},
		"dumb":                      {map[string]string{"TERM": "dumb"}, true, true},
		"no TERM":                   {nil, runtime.GOOS != "windows", runtime.GOOS != "windows"},
	} {
		env := environment(c.vars)
		if got := NoColor(env); got != c.noColor {
			t.Errorf("%s: NoColor is %t, want %t", name, got, c.noColor)
		}
		if got := Dumb(env); got != c.isDumb {
			t.Errorf("%s: Dumb is %t, want %t", name, got, c.isDumb)
		}
	}
}

func TestIs(t *testing.T) {
	r, w, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	defer r.Close()
	defer w.Close()
	if Is(r) || Is(nil) {
		t.Error("a pipe, or no file, passes for a terminal")
	}
}
