package cli

import (
	"slices"

	"github.com/spf13/cobra"
)

// help shows the help of a command or a topic; one that is not known is refused as on any other line.
func (a *app) help() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND or TOPIC]",
		Short: "What a command does, with examples; how to write the file",
		Example: `  headfall help run
  headfall help units`,
		ValidArgsFunction: firstArg(func(c *cobra.Command, _ []string, _ string) (all []cobra.Completion, d cobra.ShellCompDirective) {
			for _, sub := range c.Root().Commands() {
				if !sub.Hidden && sub.Name() != "help" {
					all = append(all, cobra.CompletionWithDesc(sub.Name(), sub.Short))
				}
			}
			return all, cobra.ShellCompDirectiveNoFileComp
		}),
		RunE: func(c *cobra.Command, args []string) error {
			of, rest, err := c.Root().Find(args)
			if err != nil || len(rest) > 0 && (of == c.Root() || isTopic(of)) {
				return a.noCommand(c.Root(), slices.Concat(rest, args)[:1])
			}
			return of.Help()
		},
	}
}
