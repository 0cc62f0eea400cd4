package command

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/term"
	"github.com/spf13/cobra"

	"dropcrest/ui/answer"
	_ "dropcrest/ui/dark" // nobody asks the terminal for its background
	"dropcrest/ui/plain"
	"dropcrest/ui/terminal"
)

// Exit codes.
const (
	done   = 0
	failed = 1 // the data or the computation failed
	misuse = 2 // the command line is wrong
)

// Main runs dropcrest with these arguments (without the program's name) on the
// process's own files and returns the exit code. published holds the files of
// published values that verify recomputes, demo those of the invented station.
func Main(args []string, published, demo fs.FS) int {
	return run(context.Background(), args, world{
		in: os.Stdin, out: os.Stdout, err: os.Stderr, env: os.Getenv, published: published, demo: demo,
	})
}

// world is all that a command touches outside the program.
type world struct {
	in        io.Reader
	out, err  io.Writer
	env       func(string) string
	published fs.FS
	demo      fs.FS
	model     func(tea.Model) tea.Model // nil: the screen as it is; for tests
}

func run(ctx context.Context, args []string, w world) int {
	return w.execute(ctx, newRoot(w), args)
}

// execute runs a tree of commands and says what went wrong.
func (w world) execute(ctx context.Context, root *cobra.Command, args []string) int {
	root.SetArgs(args)
	root.SetIn(w.in)
	root.SetOut(w.out)
	root.SetErr(w.err)
	err := root.ExecuteContext(ctx)
	if err == nil {
		return done
	}
	var exit exitError
	if errors.As(err, &exit) && exit.err == nil {
		return exit.code
	}
	w.complainAll(err)
	var usage *usageError
	switch {
	case errors.As(err, &exit):
		return exit.code
	case errors.As(err, &usage):
		return misuse
	}
	return failed
}

// complain writes one message to stderr. Messages quote files and arguments, so
// whatever could drive a terminal is taken out.
func (w world) complain(kind, text string) {
	text = plain.Clean(text)
	if !terminal.UTF8(w.env) {
		text = plain.ASCII(text)
	}
	fmt.Fprintf(w.err, "dropcrest: %s: %s\n", kind, text)
}

// complainAll says what went wrong; of a file all of it, one line each.
func (w world) complainAll(err error) {
	for _, text := range complaints(err) {
		w.complain("error", text)
	}
}

// usageError is a wrong command line: exit code 2.
type usageError struct{ text string }

func (e *usageError) Error() string { return e.text }

func misused(format string, values ...any) error { return &usageError{fmt.Sprintf(format, values...)} }

// exitError ends the program with a code of its own; without err nothing is said.
type exitError struct {
	code int
	err  error
}

func (e exitError) Error() string {
	if e.err == nil {
		return fmt.Sprintf("exit %d", e.code)
	}
	return e.err.Error()
}

func (e exitError) Unwrap() error { return e.err }

// newRoot builds the tree of commands.
func newRoot(w world) *cobra.Command {
	root := &cobra.Command{
		Use:   "dropcrest",
		Short: "A workbench for the activation of cloud droplets",
		Long: "A workbench for people who work with the activation of cloud droplets (Köhler theory). " +
			"Without a command it opens the screen; on a pipe or a dumb terminal it prints the Curve answer as text.",
		Example:       "dropcrest curve --dry-diameter 50nm --component \"sodium chloride\"",
		SilenceUsage:  true,
		SilenceErrors: true,
		Version:       version(),
		Args:          noCommand,
	}
	root.SetVersionTemplate("dropcrest {{.Version}}\n")
	root.SetFlagErrorFunc(flagError)
	root.SetHelpFunc(func(c *cobra.Command, _ []string) { w.help(c) })
	root.SetHelpCommand(helpCommand())
	root.CompletionOptions.HiddenDefaultCmd = false
	w.addScreen(root)
	root.InitDefaultHelpFlag()
	root.InitDefaultVersionFlag()
	for _, q := range answer.Questions() {
		root.AddCommand(w.newQuestion(q))
	}
	root.AddCommand(w.newSubstances(), w.newVerify())
	refuseOtherShells(root)
	return root
}

// isTerminal reports whether a stream of the world is a terminal.
func isTerminal(stream any) bool {
	f, ok := stream.(*os.File)
	return ok && terminal.Is(f)
}

// width is how wide text may be: that of the terminal within reason, else 80.
func (w world) width() int {
	if f, ok := w.out.(*os.File); ok {
		if columns, _, err := term.GetSize(f.Fd()); err == nil && columns > 0 {
			return min(max(columns, 60), 100)
		}
	}
	return 80
}
