package command

import (
	"errors"
	"fmt"
	"io"
	"syscall"

	"dropcrest/ui/whole"
)

// output is where an answer goes: a file that appears whole or not at all, or
// standard output. It remembers the first error of a write, because what writes
// may give another one.
type output struct {
	to   io.Writer
	file *whole.File // nil: standard output
	name string
	err  error
}

// open opens the output that --out names.
func (w world) open(out string) (*output, error) {
	if out == "" || out == "-" {
		return &output{to: w.out}, nil
	}
	f, err := whole.Create(out)
	if err != nil {
		return nil, fmt.Errorf("--out %s: %w", out, whole.Reason(err))
	}
	return &output{to: f, file: f, name: out}, nil
}

func (o *output) Write(data []byte) (int, error) {
	n, err := o.to.Write(data)
	if o.err == nil {
		o.err = err
	}
	return n, err
}

// commit makes the file appear.
func (o *output) commit() error {
	err := o.err
	if o.file != nil {
		err = o.file.Commit()
	}
	return o.problem(err)
}

// drop leaves nothing of the file. Standard output keeps what went there.
func (o *output) drop() {
	if o.file != nil {
		o.file.Drop()
	}
}

// brokenPipe is the exit code that shells know of a program whose reader has gone.
const brokenPipe = 128 + 13

// problem says what is wrong with the output. A reader that has seen enough, as
// head has, is nothing to talk about.
func (o *output) problem(err error) error {
	switch {
	case err == nil:
		return nil
	case o.file == nil && errors.Is(err, syscall.EPIPE):
		return exitError{code: brokenPipe}
	case o.file == nil:
		return fmt.Errorf("standard output: %w", whole.Reason(err))
	}
	return fmt.Errorf("--out %s: %w", o.name, whole.Reason(err))
}

// deliver writes a finished output to a file or to standard output.
func (w world) deliver(out string, data []byte) error {
	o, err := w.open(out)
	if err != nil {
		return err
	}
	_, _ = o.Write(data) // commit says what went wrong
	return o.commit()
}
