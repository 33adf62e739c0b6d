package cli

import (
	"context"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"headfall/network"
)

// The groups of the help.
const (
	groupPlan  = "plan"
	groupWhat  = "what"
	groupFile  = "file"
	groupAbout = "about"
)

var groups = []cobra.Group{
	{ID: groupPlan, Title: "The plan:"}, {ID: groupWhat, Title: "What if:"}, {ID: groupFile, Title: "The file:"}, {ID: groupAbout, Title: "About:"},
}

// verb is a command that registered itself.
type verb struct {
	group string
	make  func(*app) *cobra.Command
}

var verbs []verb

// register enters a command; each command's file calls it in its own init.
func register(group string, make func(*app) *cobra.Command) {
	verbs = append(verbs, verb{group, make})
}

// app is one call of the program.
type app struct {
	*Streams
	*engine
	opt     options
	settled int // exit code as far as it is known
}

// Main runs one command line and returns the exit code.
func Main(ctx context.Context, s *Streams, args []string) int {
	return (&app{Streams: s, engine: standard()}).main(ctx, args)
}

func (a *app) main(ctx context.Context, args []string) int {
	own := *a.Streams
	out := &watched{Writer: own.Out}
	own.Out, a.Streams = out, &own
	root := a.root()
	root.SetArgs(args)
	err := root.ExecuteContext(ctx)
	if out.err != nil { // also where what printed did not tell
		err = out.err
	}
	return a.finish(err)
}

func (a *app) root() *cobra.Command {
	root := &cobra.Command{
		Use:   "headfall COMMAND FILE",
		Short: "Plan gravity drain-downs of connected vessels",
		Long: `headfall reads a plant, what is in it, what will be done to it and what must not happen,
and answers whether the sequence can run as written: when each vessel is empty, how much
room is left in every other one, what runs backwards, and what goes over first.`,
		Example: `  headfall new plant.yaml          # a commented file to start from
  headfall check plant.yaml        # what was understood, with every default
  headfall run plant.yaml          # the verdict, and plant.html`,
		SilenceErrors: true, SilenceUsage: true,
		Version: network.Version(),
		Args:    cobra.ArbitraryArgs,
		RunE:    func(c *cobra.Command, args []string) error { return a.noCommand(c, args) },
	}
	root.SetVersionTemplate("headfall {{.Version}}\n")
	root.SetIn(a.In)
	root.SetOut(a.Out)
	root.SetErr(a.Err)
	root.CompletionOptions.DisableDefaultCmd = true // completion.go has its own
	for _, g := range groups {
		if slices.ContainsFunc(verbs, func(v verb) bool { return v.group == g.ID }) {
			root.AddGroup(&g)
		}
	}
	root.SetHelpCommand(a.help())
	root.SetHelpCommandGroupID(groupAbout)
	root.SetFlagErrorFunc(func(c *cobra.Command, err error) error { return badFlag(c, err) })
	a.opt.bind(root)
	for _, v := range verbs {
		c := v.make(a)
		c.GroupID = v.group
		root.AddCommand(c)
	}
	a.complete(root)
	return root
}

// noCommand answers a command line without a command that is known.
func (a *app) noCommand(c *cobra.Command, args []string) error {
	if len(args) == 0 {
		return c.Help()
	}
	word := args[0]
	if strings.HasSuffix(word, ".yaml") || strings.HasSuffix(word, ".yml") {
		return bad("headfall run "+word, "%q is a file; say what to do with it", word)
	}
	var names []string
	for _, sub := range c.Commands() {
		if sub.IsAvailableCommand() || isTopic(sub) {
			names = append(names, sub.Name())
		}
	}
	hint := "headfall help lists the commands"
	if near := nearest(word, names); near != "" {
		hint = fmt.Sprintf("did you mean headfall %s?", near)
	}
	return bad(hint, "there is no command %q", word)
}

// oneFile wants exactly one FILE.
func oneFile(c *cobra.Command, args []string) error {
	switch {
	case len(args) == 0:
		return bad("headfall "+c.Name()+" plant.yaml, or - for standard input", "%s needs a FILE", c.Name())
	case len(args) > 1:
		return bad("headfall help "+c.Name(), "%s takes one FILE, got %d", c.Name(), len(args))
	}
	return nil
}

// none wants no argument.
func none(c *cobra.Command, args []string) error {
	if len(args) > 0 {
		return bad("headfall help "+c.Name(), "%s takes no argument, got %q", c.Name(), args[0])
	}
	return nil
}
