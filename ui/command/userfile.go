package command

import (
	"errors"
	"strings"

	"github.com/spf13/cobra"

	"dropcrest/solutes"
	"dropcrest/ui/scenario"
	"dropcrest/ui/substancefile"
)

// substances adds --substances.
func (o *options) substances(w world) {
	o.env = w.env
	o.set.StringVar(&o.substancesFile, "substances", "", "`FILE` with substances of one's own. "+
		"Default: dropcrest/substances.toml in $XDG_CONFIG_HOME or ~/.config, if there is one.")
	o.group("substances", outputGroup)
}

// catalogue is the embedded catalogue with the substances of the user. It is read
// once.
func (o *options) catalogue() (*solutes.Catalogue, error) {
	if o.known != nil {
		return o.known, nil
	}
	var err error
	switch {
	case o.substancesFile != "":
		o.known, err = substancefile.Open(solutes.Standard(), o.substancesFile)
		if err != nil {
			err = fileError{"--substances: ", err}
		}
	case o.set.Changed("substances"):
		err = misused("--substances needs the name of a file")
	default:
		o.known, err = substancefile.OpenDefault(solutes.Standard(), o.env)
	}
	return o.known, err
}

// names completes names of substances. A file that cannot be read is no reason to
// complete nothing.
func (o *options) names() cobra.CompletionFunc {
	return func(*cobra.Command, []string, string) ([]string, cobra.ShellCompDirective) {
		c, err := o.catalogue()
		if err != nil {
			c = solutes.Standard()
		}
		var names []string
		for _, s := range c.All() {
			names = append(names, s.Name)
		}
		return names, cobra.ShellCompDirectiveNoFileComp
	}
}

// fileError is what is wrong with a file that an option names.
type fileError struct {
	option string // "--from: "
	err    error
}

func (e fileError) Error() string { return e.option + e.err.Error() }
func (e fileError) Unwrap() error { return e.err }

// complaints are the messages of an error, one line each; of a file all that is
// wrong with it.
func complaints(err error) []string {
	var list scenario.FileErrors
	if !errors.As(err, &list) {
		return []string{err.Error()}
	}
	option := ""
	var of fileError
	if errors.As(err, &of) {
		option = of.option
	}
	var out []string
	for _, e := range list {
		out = append(out, option+strings.TrimSpace(e.Error()))
	}
	return out
}
