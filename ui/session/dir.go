package session

import (
	"errors"
	"path/filepath"
	"runtime"
)

// Dir is the folder of the session by the XDG base directory rules:
// $XDG_STATE_HOME/dropcrest, and ~/.local/state/dropcrest when that variable is
// empty or not an absolute path. On Windows without either it is
// %LocalAppData%\dropcrest. The folder need not exist.
func Dir(env func(string) string) (string, error) {
	if state := env("XDG_STATE_HOME"); filepath.IsAbs(state) {
		return filepath.Join(state, "dropcrest"), nil
	}
	if home := env("HOME"); filepath.IsAbs(home) {
		return filepath.Join(home, ".local", "state", "dropcrest"), nil
	}
	if local := env("LocalAppData"); runtime.GOOS == "windows" && filepath.IsAbs(local) {
		return filepath.Join(local, "dropcrest"), nil
	}
	return "", errors.New("no folder for the session: neither XDG_STATE_HOME nor HOME is an absolute path; " +
		"set XDG_STATE_HOME to a folder that can be written")
}
