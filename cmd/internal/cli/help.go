package cli

import "github.com/spf13/cobra"

// help shows the help of a command; one that is not known is refused as on any other line.
func (a *app) help() *cobra.Command {
	return &cobra.Command{
		Use:   "help [COMMAND]",
		Short: "What a command does, with examples",
		RunE: func(c *cobra.Command, args []string) error {
			of, rest, err := c.Root().Find(args)
			if err != nil || len(rest) > 0 && of == c.Root() {
				return a.noCommand(c.Root(), rest)
			}
			return of.Help()
		},
	}
}
