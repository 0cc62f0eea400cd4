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
//go:embed testdata/published testdata/demo
var testdata embed.FS

func main() {
	os.Exit(command.Main(os.Args[1:], folder("testdata/published"), folder("testdata/demo")))
}

func folder(name string) fs.FS {
	files, err := fs.Sub(testdata, name)
	if err != nil {
		panic(err) // the folder is part of this program
	}
	return files
}
