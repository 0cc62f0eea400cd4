package command_test

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"

	"dropcrest/ui/command"
)

// publishedFolder names the folder of published values for the program that a
// script starts; the program itself has them embedded.
const publishedFolder = "DROPCREST_TEST_PUBLISHED"

// TestMain makes the test binary dropcrest when it is started under that name.
func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){"dropcrest": func() {
		if folder := os.Getenv(publishedFolder); folder != "" {
			os.Exit(command.Main(os.Args[1:], os.DirFS(folder)))
		}
		os.Exit(command.Main(os.Args[1:], nil))
	}, "dropcrest-panics": func() { os.Exit(command.MainPanicking(os.Args[1:])) }})
}

func TestScripts(t *testing.T) {
	published, err := filepath.Abs("../../testdata/published")
	if err != nil {
		t.Fatal(err)
	}
	testscript.Run(t, testscript.Params{
		Dir: "testdata/script",
		Setup: func(e *testscript.Env) error {
			e.Setenv(publishedFolder, published)
			e.Setenv("LANG", "C.UTF-8")
			e.Setenv("TERM", "xterm")
			return nil
		},
		UpdateScripts: os.Getenv("UPDATE_SCRIPTS") != "",
	})
}
