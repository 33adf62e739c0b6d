package cli

import (
	"math"
	"sort"
	"strings"

	"github.com/spf13/cobra"
	"github.com/spf13/pflag"

	"headfall/elements"
	"headfall/network"
	"headfall/scenarios"
)

type completer = cobra.CompletionFunc

// complete tells the shells what may stand where: a command's arguments by its use line, a flag's value by the flag's name.
func (a *app) complete(root *cobra.Command) {
	arguments := map[string]completer{
		"FILE": firstArg(ends("yaml", "yml")), "[FILE…]": ends("yaml", "yml"), "PART…": ends("jsonl"),
		"[NAME]": firstArg(kindNames), "SHELL": firstArg(words(shells...)),
	}
	values := map[string]completer{
		"set": a.ofPlant(numbersOf("=")), "vary": a.ofPlant(numbersOf("")), "valve": a.ofPlant(valvesOf), "case": a.ofPlant(casesOf),
		"done": a.ofPlant(stepsOf("=")), "not-done": a.ofPlant(stepsOf("")), "need": a.ofPlant(limitsOf),
		"method": words(methods...), "color": words(colors...), "demo": demoNames,
		"json": ends("json", "jsonl"), "html": ends("html"), "csv": ends("csv"), "xlsx": ends("xlsx"), "readings": ends("csv"), "plan": ends("yaml", "yml"),
	}
	for _, c := range append(root.Commands(), root) {
		if c.ValidArgsFunction == nil {
			c.ValidArgsFunction = nothing
			for _, word := range strings.Fields(c.Use) {
				if found := arguments[word]; found != nil {
					c.ValidArgsFunction = found
				}
			}
		}
		c.Flags().VisitAll(func(f *pflag.Flag) { a.completeFlag(c, f, values) })
		c.PersistentFlags().VisitAll(func(f *pflag.Flag) { a.completeFlag(c, f, values) })
	}
}

// completeFlag completes a flag's value; of one that nothing is known of, nothing.
func (a *app) completeFlag(c *cobra.Command, f *pflag.Flag, values map[string]completer) {
	found := values[f.Name]
	if found == nil {
		found = nothing
	}
	_ = c.RegisterFlagCompletionFunc(f.Name, found) // fails for one that has it already: a flag that all share
}

// ends completes files with one of these endings.
func ends(endings ...string) completer {
	return func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		return endings, cobra.ShellCompDirectiveFilterFileExt
	}
}

// words completes fixed words.
func words(list ...string) completer {
	return func(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
		return list, cobra.ShellCompDirectiveNoFileComp
	}
}

// nothing completes nothing, not even files.
func nothing(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
	return nil, cobra.ShellCompDirectiveNoFileComp
}

// firstArg completes the first argument only.
func firstArg(of completer) completer {
	return func(c *cobra.Command, args []string, word string) ([]cobra.Completion, cobra.ShellCompDirective) {
		if len(args) > 0 {
			return nil, cobra.ShellCompDirectiveNoFileComp
		}
		return of(c, args, word)
	}
}

// ofPlant completes from the plant of the FILE that stands on the command line already; without one, or with a file that has faults, nothing.
func (a *app) ofPlant(list func(*network.Plant) []cobra.Completion) completer {
	return func(c *cobra.Command, args []string, word string) ([]cobra.Completion, cobra.ShellCompDirective) {
		if len(args) == 0 || args[0] == "-" {
			return nil, cobra.ShellCompDirectiveNoFileComp
		}
		src, err := a.read(c.Context(), args[0])
		if err != nil {
			return nil, cobra.ShellCompDirectiveNoFileComp
		}
		plant, err := a.load(src, &options{})
		if err != nil {
			return nil, cobra.ShellCompDirectiveNoFileComp
		}
		var fit []cobra.Completion
		directive := cobra.ShellCompDirectiveNoFileComp
		for _, found := range list(plant) {
			if name, _, _ := strings.Cut(found, "\t"); strings.HasPrefix(name, word) {
				fit = append(fit, found)
				if strings.HasSuffix(name, "=") {
					directive |= cobra.ShellCompDirectiveNoSpace // a value follows
				}
			}
		}
		return fit, directive
	}
}

// numbersOf are the names that --vary takes; with an ending, as --set takes them.
func numbersOf(ending string) func(*network.Plant) []cobra.Completion {
	return func(p *network.Plant) (all []cobra.Completion) {
		for _, n := range p.Numbers {
			what := n.Value.Text
			if what == "" {
				what = n.Value.Echo()
			}
			if n.Default {
				what += ", the default"
			}
			all = append(all, cobra.CompletionWithDesc(n.Name+ending, what))
		}
		return all
	}
}

// valvesOf are the valves of the lines, each with its position before the first step and where it is found.
func valvesOf(p *network.Plant) (all []cobra.Completion) {
	for _, row := range p.LineUp() {
		if row.Kind == "valve" {
			what := row.Position
			if row.Where != "" {
				what += ", " + row.Where
			}
			all = append(all, cobra.CompletionWithDesc(row.Valve, what))
		}
	}
	return all
}

// stepsOf are the steps by their id; with an ending, as --done takes them.
func stepsOf(ending string) func(*network.Plant) []cobra.Completion {
	return func(p *network.Plant) (all []cobra.Completion) {
		for _, s := range p.Steps {
			all = append(all, cobra.CompletionWithDesc(s.ID+ending, s.Says(math.NaN())))
		}
		return all
	}
}

func casesOf(p *network.Plant) []cobra.Completion { return p.CaseNames }

// limitsOf are the limits as --need names them.
func limitsOf(p *network.Plant) (all []cobra.Completion) {
	for _, l := range p.Limits {
		if of := l.Must.Of; len(of) > 0 && l.Must.Subject != network.Emptied {
			all = append(all, cobra.CompletionWithDesc(l.Must.Subject.String()+":"+of[0]+"=", l.Says()))
		}
	}
	return all
}

// kindNames are all kinds, each with what it is.
func kindNames(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
	seen := map[string]bool{}
	var all []cobra.Completion
	for _, room := range elements.Rooms() {
		for _, k := range elements.Kinds(room) {
			if !seen[k.Name] {
				seen[k.Name] = true
				all = append(all, cobra.CompletionWithDesc(k.Name, k.Doc))
			}
		}
	}
	sort.Strings(all)
	return all, cobra.ShellCompDirectiveNoFileComp
}

// demoNames are the demo plants.
func demoNames(*cobra.Command, []string, string) ([]cobra.Completion, cobra.ShellCompDirective) {
	return scenarios.Demos(), cobra.ShellCompDirectiveNoFileComp
}
