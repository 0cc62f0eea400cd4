package command

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"dropcrest/ui/answer"
	"dropcrest/ui/near"
)

// flagError says about an option what is wrong and what would be right.
func flagError(cmd *cobra.Command, err error) error {
	if errors.Is(err, pflag.ErrHelp) {
		return err
	}
	seeHelp := fmt.Sprintf("%s --help lists the options", cmd.CommandPath())
	var unknown *pflag.NotExistError
	if errors.As(err, &unknown) {
		name := unknown.GetSpecifiedName()
		if short := unknown.GetSpecifiedShortnames(); short != "" {
			return misused("unknown option -%s: %s", name, seeHelp)
		}
		if word := near.Word(name, optionNames(cmd)); word != "" {
			return misused("unknown option --%s: did you mean --%s?", name, word)
		}
		if like := optionsLike(cmd, name); len(like) > 0 {
			return misused("unknown option --%s: did you mean --%s?", name, strings.Join(like, " or --"))
		}
		if owner := commandWith(cmd, name); owner != nil {
			return misused("unknown option --%s: it belongs to a command, as in %s --%s", name, owner.CommandPath(), name)
		}
		return misused("unknown option --%s: %s", name, seeHelp)
	}
	var empty *pflag.ValueRequiredError
	if errors.As(err, &empty) {
		return misused("--%s needs a value: %s", empty.GetSpecifiedName(), seeHelp)
	}
	var invalid *pflag.InvalidValueError
	if errors.As(err, &invalid) && invalid.GetFlag().Value.Type() == "bool" {
		return misused("--%s is a switch: give it without a value", invalid.GetFlag().Name)
	}
	if errors.As(err, &invalid) {
		return misused("--%s: %v", invalid.GetFlag().Name, invalid.Unwrap())
	}
	return misused("%v: %s", err, seeHelp)
}

func optionNames(cmd *cobra.Command) []string {
	var names []string
	cmd.Flags().VisitAll(func(f *pflag.Flag) {
		if !f.Hidden {
			names = append(names, f.Name)
		}
	})
	return names
}

// optionsLike are the options that have the word as a part of their name.
func optionsLike(cmd *cobra.Command, word string) []string {
	return slices.DeleteFunc(optionNames(cmd), func(name string) bool {
		return len(word) < 3 || !slices.Contains(strings.Split(name, "-"), strings.ToLower(word))
	})
}

// commandWith is the command below cmd that has the option, nil if none has.
func commandWith(root *cobra.Command, name string) *cobra.Command {
	for _, q := range answer.Questions() { // in the order of the pages
		if c, _, err := root.Find([]string{q.Key}); err == nil && c != root && c.Flags().Lookup(name) != nil {
			return c
		}
	}
	for _, c := range root.Commands() {
		if c.IsAvailableCommand() && c.Flags().Lookup(name) != nil {
			return c
		}
	}
	return nil
}

// noCommand is the argument check of the root: an argument there is a command
// that does not exist.
func noCommand(root *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	return unknownCommand(root, args[0])
}

func unknownCommand(root *cobra.Command, name string) error {
	var names []string
	for _, c := range root.Commands() {
		if c.IsAvailableCommand() {
			names = append(names, c.Name())
		}
	}
	if word := near.Word(name, names); word != "" {
		return misused("unknown command %q: did you mean %q?", name, word)
	}
	return misused("unknown command %q: the commands are %s", name, strings.Join(names, ", "))
}

// noArguments refuses arguments that are no options.
func noArguments(cmd *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	return misused("%s takes no argument %q: a value stands after its option, in quotes if it has blanks", cmd.CommandPath(), args[0])
}
