package command

import "github.com/spf13/cobra"

// refuseOtherShells makes "completion" without a shell that it knows an error;
// cobra prints help there and says that all is well.
func refuseOtherShells(root *cobra.Command) {
	root.InitDefaultCompletionCmd()
	for _, c := range root.Commands() {
		if c.Name() == "completion" {
			c.Short = "Write the completion script of a shell"
			c.Args = cobra.ArbitraryArgs
			c.RunE = func(*cobra.Command, []string) error {
				return misused("completion needs one of the shells bash, zsh, fish, powershell")
			}
		}
	}
}
