package substancefile

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"runtime"

	"dropcrest/solutes"
)

// Default is the file of the user's substances by the XDG base directory rules:
// substances.toml in $XDG_CONFIG_HOME/dropcrest, or in ~/.config/dropcrest when that
// variable is empty or not an absolute path; on Windows without either in
// %AppData%\dropcrest. It is "" when there is no such folder, and need not exist.
func Default(env func(string) string) string {
	folder := ""
	config, home, roaming := env("XDG_CONFIG_HOME"), env("HOME"), env("AppData")
	switch {
	case filepath.IsAbs(config):
		folder = config
	case filepath.IsAbs(home):
		folder = filepath.Join(home, ".config")
	case runtime.GOOS == "windows" && filepath.IsAbs(roaming):
		folder = roaming
	default:
		return ""
	}
	return filepath.Join(folder, "dropcrest", "substances.toml")
}

// Open returns the catalogue with the substances of a file. Errors name the file;
// those of its text are scenario.FileErrors.
func Open(c *solutes.Catalogue, name string) (*solutes.Catalogue, error) {
	f, err := os.Open(name)
	if err != nil {
		var p *fs.PathError
		if errors.As(err, &p) {
			err = p.Err
		}
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	defer f.Close()
	if info, err := f.Stat(); err == nil && info.IsDir() {
		return nil, fmt.Errorf("%s is a folder, want a file of substances", name)
	}
	return Extend(c, name, f)
}

// OpenDefault is Open on the default file, and the catalogue as it is when there
// is none.
func OpenDefault(c *solutes.Catalogue, env func(string) string) (*solutes.Catalogue, error) {
	name := Default(env)
	if name == "" {
		return c, nil
	}
	// A named pipe would make Open wait for ever.
	switch info, err := os.Stat(name); {
	case errors.Is(err, fs.ErrNotExist):
		return c, nil
	case err == nil && !info.Mode().IsRegular() && !info.IsDir():
		return nil, fmt.Errorf("%s is no ordinary file, want a file of substances", name)
	}
	return Open(c, name)
}
