package main

import "github.com/spf13/cobra"

// shells are those that a completion can be printed for.
var shells = [...]string{"bash", "zsh", "fish"}

// completionCommand takes the place of cobra's own, which speaks of more
// shells than are tried here.
func completionCommand() *cobra.Command {
	return &cobra.Command{
		Use:   "completion SHELL",
		Short: "completion of commands and options for bash, zsh or fish",
		Example: `  sagcrest completion bash > /etc/bash_completion.d/sagcrest
  sagcrest completion zsh > "${fpath[1]}/_sagcrest"
  sagcrest completion fish > ~/.config/fish/completions/sagcrest.fish`,
		Args:      exactly("SHELL"),
		ValidArgs: shells[:],
		RunE: func(c *cobra.Command, args []string) error {
			root, out := c.Root(), c.OutOrStdout()
			switch args[0] {
			case "bash":
				return root.GenBashCompletionV2(out, true)
			case "zsh":
				return root.GenZshCompletion(out)
			case "fish":
				return root.GenFishCompletion(out, true)
			}
			return unknown("shell", args[0], shells[:])
		},
	}
}
