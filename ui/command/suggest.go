package command

import (
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"
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
		if near := nearest(name, optionNames(cmd)); near != "" {
			return misused("unknown option --%s: did you mean --%s?", name, near)
		}
		return misused("unknown option --%s: %s", name, seeHelp)
	}
	var empty *pflag.ValueRequiredError
	if errors.As(err, &empty) {
		return misused("--%s needs a value: %s", empty.GetSpecifiedName(), seeHelp)
	}
	var invalid *pflag.InvalidValueError
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
	if near := nearest(name, names); near != "" {
		return misused("unknown command %q: did you mean %q?", name, near)
	}
	return misused("unknown command %q: the commands are %s", name, strings.Join(names, ", "))
}

// noArguments refuses arguments that are no options.
func noArguments(cmd *cobra.Command, args []string) error {
	if len(args) == 0 {
		return nil
	}
	return misused("%s takes no argument %q: values belong to options, as in --option %q", cmd.CommandPath(), args[0], args[0])
}

// nearest is the name that is meant by a mistyped one, "" when none is close: at
// most a third of its letters differ, or one is the beginning of the other.
func nearest(typed string, names []string) string {
	best, least := "", 1+len(typed)/3
	for _, name := range names {
		d := distance(strings.ToLower(typed), name)
		if len(typed) >= 3 && strings.HasPrefix(name, strings.ToLower(typed)) {
			d = min(d, 1)
		}
		if d <= least && (best == "" || d < least) {
			best, least = name, d
		}
	}
	return best
}

// distance is the number of letters to insert, drop or exchange.
func distance(a, b string) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := range len(a) {
		diagonal := row[0]
		row[0] = i + 1
		for j := range len(b) {
			cost := diagonal
			if a[i] != b[j] {
				cost++
			}
			diagonal = row[j+1]
			row[j+1] = min(cost, row[j]+1, row[j+1]+1)
		}
	}
	return row[len(b)]
}
