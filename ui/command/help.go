package command

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"dropcrest/ui/plain"
	"dropcrest/ui/terminal"
)

// help prints the help text of a command: what it does, how it is called, one
// example, the options in groups.
func (w world) help(cmd *cobra.Command) {
	width := min(w.width(), 90)
	var b strings.Builder
	about := cmd.Long
	if about == "" {
		about = sentence(cmd.Short)
	}
	for _, paragraph := range strings.Split(about, "\n") {
		b.WriteString(plain.Wrap(paragraph, width, "") + "\n")
	}
	fmt.Fprintf(&b, "\nUsage: %s\n", usageLine(cmd))
	if cmd.Example != "" {
		fmt.Fprintf(&b, "Example: %s\n", cmd.Example)
	}
	writeCommands(&b, cmd, width)
	writeOptions(&b, cmd, width)
	if cmd.HasAvailableSubCommands() {
		fmt.Fprintf(&b, "\n%s COMMAND --help explains a command.\n", cmd.CommandPath())
	}
	text := b.String()
	if !terminal.UTF8(w.env) {
		text = plain.ASCII(text)
	}
	_, _ = fmt.Fprint(cmd.OutOrStdout(), text)
}

func usageLine(cmd *cobra.Command) string {
	line := cmd.CommandPath()
	if cmd.HasAvailableSubCommands() {
		if cmd.Runnable() {
			return line + " [options]\n       " + line + " COMMAND [options]"
		}
		return line + " COMMAND"
	}
	if _, arguments, found := strings.Cut(cmd.Use, " "); found {
		line += " " + arguments
	}
	return line + " [options]"
}

func writeCommands(b *strings.Builder, cmd *cobra.Command, width int) {
	if !cmd.HasAvailableSubCommands() {
		return
	}
	b.WriteString("\nCommands:\n")
	for _, c := range cmd.Commands() {
		if c.IsAvailableCommand() {
			b.WriteString(hang(c.Name(), c.Short, 14, width))
		}
	}
}

func writeOptions(b *strings.Builder, cmd *cobra.Command, width int) {
	var order []string
	groups := map[string][]*pflag.Flag{}
	cmd.LocalFlags().VisitAll(func(f *pflag.Flag) {
		if f.Hidden {
			return
		}
		group := "Help"
		if g := f.Annotations[groupKey]; len(g) > 0 {
			group = g[0]
		}
		if groups[group] == nil {
			order = append(order, group)
		}
		groups[group] = append(groups[group], f)
	})
	for _, group := range order {
		fmt.Fprintf(b, "\n%s:\n", group)
		for _, f := range groups[group] {
			b.WriteString(hang(optionName(f), sentence(optionHelp(f)), 28, width))
		}
	}
}

// optionName is an option as it is typed, "--kappa VALUE".
func optionName(f *pflag.Flag) string {
	name := "--" + f.Name
	if f.Shorthand != "" {
		name = "-" + f.Shorthand + ", " + name
	}
	if value, _ := pflag.UnquoteUsage(f); value != "" {
		name += " " + value
	}
	return name
}

func optionHelp(f *pflag.Flag) string {
	switch f.Name {
	case "help":
		return "Print this text."
	case "version":
		return "Print the version."
	}
	_, text := pflag.UnquoteUsage(f)
	return text
}

// hang writes a name and its explanation beside it, or below a long name.
func hang(name, text string, column, width int) string {
	body := plain.Wrap(text, width, strings.Repeat(" ", column))
	taken := 2 + utf8.RuneCountInString(name)
	if taken+2 > column {
		return "  " + name + "\n" + body + "\n"
	}
	return "  " + name + body[taken:] + "\n"
}

// helpCommand is "dropcrest help COMMAND".
func helpCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND]",
		Short: "Explain a command",
		RunE: func(cmd *cobra.Command, args []string) error {
			root := cmd.Root()
			found, rest, err := root.Find(args)
			if err != nil || found == root && len(args) > 0 || len(rest) > 0 && found.HasSubCommands() {
				return unknownCommand(root, args[0])
			}
			found.InitDefaultHelpFlag()
			return found.Help()
		},
	}
}
