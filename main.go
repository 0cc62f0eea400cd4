// Command dropcrest is a terminal workbench for people who work with the
// activation of cloud droplets.
package main

import (
	"embed"
	"io/fs"
	"os"

	"dropcrest/ui/command"
)

// The files are embedded here because no folder can embed what is in another one.
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
