// Command dropcrest is a terminal workbench for people who work with the
// activation of cloud droplets.
package main

import (
	"embed"
	"io/fs"
	"os"

	"dropcrest/ui/command"
)

// go:embed reaches no parent folder, so the files are embedded here.
//
//go:embed testdata/published
var testdata embed.FS

func main() {
	published, err := fs.Sub(testdata, "testdata/published")
	if err != nil {
		panic(err) // the folder is part of this program
	}
	os.Exit(command.Main(os.Args[1:], published))
}
