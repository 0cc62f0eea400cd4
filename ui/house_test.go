package ui

import (
	"fmt"
	"go/ast"
	"go/parser"
	"go/token"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strconv"
	"strings"
	"testing"
	"testing/fstest"
)

// floors from the top to the ground: a package may import its own floor and
// those below it.
var floors = []string{"ui", "koehler", "solutes", "atmos"}

func floorOf(folder string) int {
	top, _, _ := strings.Cut(folder, "/")
	for i, f := range floors {
		if f == top {
			return i
		}
	}
	return -1
}

// directionFaults lists the imports that go upwards, and below ui those that
// are neither the standard library's nor gonum's. It reads the files themselves:
// a test that asks the go command is answered from the test cache.
func directionFaults(house fs.FS) ([]string, error) {
	var faults []string
	err := fs.WalkDir(house, ".", func(name string, d fs.DirEntry, err error) error {
		if err != nil {
			return err
		}
		if d.IsDir() && (name == ".git" || path.Base(name) == "testdata") {
			return fs.SkipDir
		}
		floor := floorOf(path.Dir(name))
		if d.IsDir() || floor < 0 || !strings.HasSuffix(name, ".go") {
			return nil
		}
		src, err := fs.ReadFile(house, name)
		if err != nil {
			return err
		}
		file, err := parser.ParseFile(token.NewFileSet(), name, src, parser.ImportsOnly)
		if err != nil {
			return err
		}
		for _, spec := range file.Imports {
			if why := importFault(floor, spec); why != "" {
				faults = append(faults, fmt.Sprintf("%s: %s", name, why))
			}
		}
		return nil
	})
	return faults, err
}

func importFault(floor int, spec *ast.ImportSpec) string {
	imported, err := strconv.Unquote(spec.Path.Value)
	if err != nil {
		return err.Error()
	}
	if own, ok := strings.CutPrefix(imported, "dropcrest/"); ok {
		if floorOf(own) < floor {
			return fmt.Sprintf("%s imports %s: an arrow upwards", floors[floor], imported)
		}
		return ""
	}
	first, _, _ := strings.Cut(imported, "/")
	foreign := strings.Contains(first, ".")
	if foreign && floor > 0 && first != "gonum.org" {
		return fmt.Sprintf("%s imports %s: below ui only the standard library and gonum", floors[floor], imported)
	}
	return ""
}

func TestArrowsPointDown(t *testing.T) {
	faults, err := directionFaults(os.DirFS(".."))
	if err != nil {
		t.Fatal(err)
	}
	for _, f := range faults {
		t.Error(f)
	}
}

// The twin: a house with one arrow turned must be found out, or the test above
// proves nothing.
func TestATurnedArrowIsFound(t *testing.T) {
	file := func(imports string) *fstest.MapFile {
		return &fstest.MapFile{Data: []byte("package p\n\nimport " + imports + "\n")}
	}
	for name, c := range map[string]struct {
		house fstest.MapFS
		want  int
	}{
		"all down":          {fstest.MapFS{"ui/screen/a.go": file(`"dropcrest/koehler"`), "koehler/a.go": file(`"dropcrest/atmos"`)}, 0},
		"solutes to ui":     {fstest.MapFS{"solutes/a.go": file(`"dropcrest/ui/scenario"`)}, 1},
		"atmos to koehler":  {fstest.MapFS{"atmos/aerosol/a.go": file(`"dropcrest/koehler/kappa"`)}, 1},
		"a test file too":   {fstest.MapFS{"atmos/a_test.go": file(`"dropcrest/solutes"`)}, 1},
		"interface library": {fstest.MapFS{"koehler/a.go": file(`"github.com/spf13/cobra"`)}, 1},
		"gonum is welcome":  {fstest.MapFS{"koehler/a.go": file(`"gonum.org/v1/gonum/optimize"`)}, 0},
	} {
		faults, err := directionFaults(c.house)
		if err != nil {
			t.Fatal(err)
		}
		if len(faults) != c.want {
			t.Errorf("%s: %d faults, want %d: %v", name, len(faults), c.want, faults)
		}
	}
}

// Every exported name of the lower floors is documented: they are a library.
func TestLowerFloorsAreDocumented(t *testing.T) {
	for _, floor := range floors[1:] {
		err := filepath.WalkDir(filepath.Join("..", floor), func(name string, d fs.DirEntry, err error) error {
			if err != nil || d.IsDir() || !strings.HasSuffix(name, ".go") || strings.HasSuffix(name, "_test.go") {
				return err
			}
			file, err := parser.ParseFile(token.NewFileSet(), name, nil, parser.ParseComments)
			if err != nil {
				return err
			}
			for _, missing := range undocumented(file) {
				t.Errorf("%s: %s has no comment", name, missing)
			}
			return nil
		})
		if err != nil {
			t.Fatal(err)
		}
	}
}

func undocumented(file *ast.File) []string {
	var names []string
	for _, decl := range file.Decls {
		switch d := decl.(type) {
		case *ast.FuncDecl:
			if d.Name.IsExported() && d.Doc == nil && exportedReceiver(d) {
				names = append(names, d.Name.Name)
			}
		case *ast.GenDecl:
			for _, spec := range d.Specs {
				if name := bareSpec(d, spec); name != "" {
					names = append(names, name)
				}
			}
		}
	}
	return names
}

func exportedReceiver(d *ast.FuncDecl) bool {
	if d.Recv == nil {
		return true
	}
	typ := d.Recv.List[0].Type
	if star, ok := typ.(*ast.StarExpr); ok {
		typ = star.X
	}
	id, ok := typ.(*ast.Ident)
	return ok && id.IsExported()
}

// bareSpec names an exported type, constant or variable that neither its own
// line nor its group explains.
func bareSpec(d *ast.GenDecl, spec ast.Spec) string {
	switch s := spec.(type) {
	case *ast.TypeSpec:
		if s.Name.IsExported() && d.Doc == nil && s.Doc == nil {
			return s.Name.Name
		}
	case *ast.ValueSpec:
		for _, n := range s.Names {
			if n.IsExported() && d.Doc == nil && s.Doc == nil && s.Comment == nil {
				return n.Name
			}
		}
	}
	return ""
}
