package cli

import (
	"io"
	"slices"

	"github.com/spf13/cobra"
)

func init() { register(groupAbout, newCompletion) }

var shells = []string{"bash", "zsh", "fish", "powershell"}

func newCompletion(a *app) *cobra.Command {
	return &cobra.Command{
		Use:   "completion SHELL",
		Short: "Completion for bash, zsh, fish or powershell",
		Long: `Completion prints a script that teaches the shell to complete commands, flags and plant files, and, from the FILE
that stands on the line already, the names for --set and --vary, valves, steps, limits and cases.

  bash         in ~/.bashrc:  source <(headfall completion bash)      (needs the package bash-completion)
  zsh          headfall completion zsh > a file _headfall in a folder of $fpath
  fish         headfall completion fish > ~/.config/fish/completions/headfall.fish
  powershell   in $PROFILE:  headfall completion powershell | Out-String | Invoke-Expression`,
		Example: `  headfall completion bash > headfall.bash
  headfall completion zsh > _headfall`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) != 1 {
				return bad("headfall completion bash", "completion takes one SHELL, got %d", len(args))
			}
			if !slices.Contains(shells, args[0]) {
				return bad(among(args[0], shells), "there is no completion for %q", args[0])
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error {
			root := c.Root()
			return buffered(a.Out, func(w io.Writer) error {
				switch args[0] {
				case "bash":
					return root.GenBashCompletionV2(w, true)
				case "zsh":
					return root.GenZshCompletion(w)
				case "fish":
					return root.GenFishCompletion(w, true)
				}
				return root.GenPowerShellCompletionWithDesc(w)
			})
		},
	}
}
