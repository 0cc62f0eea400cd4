package command

import (
	"errors"
	"fmt"
	"io"
	"os"

	"dropcrest/ui/answer"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// environment is what an answer may use.
func (o *options) environment(w world) (answer.Env, error) {
	c, err := o.catalogue()
	return answer.Env{Substances: c, Version: version(), Open: openMeasured, Demo: w.demo}, err
}

// openError is a measured file that cannot be opened.
type openError struct {
	name string
	err  error
}

func (e *openError) Error() string { return e.err.Error() }
func (e *openError) Unwrap() error { return e.err }

// openMeasured opens a measured file.
func openMeasured(name string) (io.ReadCloser, error) {
	if name == "" {
		return nil, &openError{name, errors.New("want the name of a file")}
	}
	f, err := os.Open(name)
	if err != nil {
		return nil, &openError{name, pathError(err)}
	}
	if info, err := f.Stat(); err == nil && info.IsDir() {
		_ = f.Close()
		return nil, &openError{name, fmt.Errorf("%s is a folder, want a file of measured data", name)}
	}
	return f, nil
}

// questionError names the option that an error of the question belongs to.
func questionError(err error, q answer.Question, s scenario.Scenario) error {
	var in *answer.InputError
	var open *openError
	var content *fieldfile.Error
	key := ""
	switch {
	case errors.As(err, &in):
		key = in.Input
		if option, ok := q.OptionOf(scenario.Path(in.Input)); ok {
			key = option
		}
	case errors.As(err, &open):
		key = fileOption(open.name, q, s)
	case errors.As(err, &content):
		key = fileOption(content.File, q, s)
	}
	if key == "" {
		return err
	}
	return fmt.Errorf("--%s: %w", key, err)
}

// fileOption is the option that has named a measured file.
func fileOption(name string, q answer.Question, s scenario.Scenario) string {
	for _, in := range q.Inputs(&s) {
		_, value := in.SI()
		if given, _ := value.(string); in.Kind() != scenario.File || plain.Clean(given) != name || !q.Uses(in) {
			continue
		}
		option, _ := q.OptionOf(in.Path())
		return option
	}
	for _, list := range []scenario.Path{"data", "scans"} {
		if option, ok := q.OptionOf(list); ok {
			return option
		}
	}
	return ""
}
