package command_test

import (
	"io/fs"
	"os"
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"dropcrest/ui/command"
)

// publishedFolder names the folder of published values for the program that a
// script starts, demoFolder that of the demo; the program itself has them embedded.
const (
	publishedFolder = "DROPCREST_TEST_PUBLISHED"
	demoFolder      = "DROPCREST_TEST_DEMO"
)

// folder is the folder that a variable names, nil if none.
func folder(variable string) fs.FS {
	if name := os.Getenv(variable); name != "" {
		return os.DirFS(name)
	}
	return nil
}

// TestMain makes the test binary dropcrest when it is started under that name.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"dropcrest": func() {
		os.Exit(command.Main(os.Args[1:], folder(publishedFolder), folder(demoFolder)))
	}, "dropcrest-panics": func() { os.Exit(command.MainPanicking(os.Args[1:])) }})
}

func TestScripts(t *testing.T) {
	if testing.Short() {
		t.Skip("every command of a script starts the program, which takes long with the race detector")
	}
	data, err := filepath.Abs("../../testdata")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: "testdata/script",
		Setup: func(e *testscript.Env) error {
			e.Setenv(publishedFolder, filepath.Join(data, "published"))
			e.Setenv(demoFolder, filepath.Join(data, "demo"))
			e.Setenv("LANG", "C.UTF-8")
			e.Setenv("TERM", "xterm")
			return nil
		},
		UpdateScripts: os.Getenv("UPDATE_SCRIPTS") != "",
	})
}
