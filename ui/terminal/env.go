package terminal

import (
	"os"
	"runtime"
	"strings"

	"github.com/charmbracelet/x/term"
)

// Is reports whether f is a terminal. A nil file is none.
func Is(f *os.File) bool { return f != nil && term.IsTerminal(f.Fd()) }

// UTF8 reports whether the locale writes UTF-8. POSIX asks LC_ALL, then LC_CTYPE,
// then LANG; the first that is not empty decides. None at all is the C locale,
// which is ASCII, except on Windows, where consoles take UTF-8 and nobody sets
// these variables.
func UTF8(env func(string) string) bool {
	for _, name := range []string{"LC_ALL", "LC_CTYPE", "LANG"} {
		if value := env(name); value != "" {
			return codeset(value) == "utf8"
		}
	}
	return runtime.GOOS == "windows"
}

// codeset is the part of a locale name that says how characters are written,
// "utf8" for de_DE.UTF-8@euro. "UTF-8" alone is what macOS sets over ssh.
func codeset(locale string) string {
	name, _, _ := strings.Cut(locale, "@")
	if _, after, found := strings.Cut(name, "."); found {
		name = after
	}
	return strings.ToLower(strings.ReplaceAll(name, "-", ""))
}

// Dumb reports whether the terminal cannot move its cursor, or does not say
// what it can: the screen is not opened there.
func Dumb(env func(string) string) bool {
	kind := env("TERM")
	return kind == "dumb" || kind == "" && runtime.GOOS != "windows"
}

// NoColor reports whether colours are to be left out: NO_COLOR is set and not
// empty, whatever its value (no-color.org), or the terminal is dumb.
func NoColor(env func(string) string) bool { return env("NO_COLOR") != "" || Dumb(env) }
