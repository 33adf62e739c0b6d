package cli

import (
	"embed"
	"fmt"
	"path"
	"slices"
	"strings"
	"text/tabwriter"

	"github.com/spf13/cobra"

	"headfall/elements/quantity"
)

// topics are the pages of the help that belong to no command: a title, the text, examples.
//
//go:embed topics/*.txt
var topics embed.FS

func init() {
	files, err := topics.ReadDir("topics")
	if err != nil {
		panic(err) // they are embedded
	}
	for _, f := range files {
		data, err := topics.ReadFile(path.Join("topics", f.Name()))
		if err != nil {
			panic(err)
		}
		name := strings.TrimSuffix(f.Name(), ".txt")
		register("", func(*app) *cobra.Command { return topic(name, string(data)) })
	}
}

// topic makes a page of the help. It has nothing to run, and that is how it is told from a command.
func topic(name, page string) *cobra.Command {
	title, rest, _ := strings.Cut(page, "\n")
	long, examples, _ := strings.Cut(rest, "\nExamples:\n")
	c := &cobra.Command{
		Use: name, Short: title, Example: strings.TrimRight(examples, "\n"), DisableFlagsInUseLine: true,
		Long: strings.ReplaceAll(strings.Trim(long, "\n"), "{{units}}", unitTable()),
	}
	c.SetHelpFunc(func(c *cobra.Command, _ []string) {
		fmt.Fprintf(c.OutOrStdout(), "%s\n\n%s\n\nExamples:\n%s\n", c.Short, c.Long, c.Example)
	})
	return c
}

func isTopic(c *cobra.Command) bool { return c.IsAdditionalHelpTopicCommand() }

// measured are the dimensions that a person writes a unit for, in the order in which they are met.
var measured = []quantity.Dim{quantity.Length, quantity.Area, quantity.Volume, quantity.Flow, quantity.Time, quantity.Pressure, quantity.Temperature,
	quantity.Velocity, quantity.Density, quantity.Viscosity, quantity.SurfaceTension, quantity.Angle, quantity.Acceleration,
	quantity.ResistanceLinear, quantity.ResistanceQuadratic}

// rates are the dimensions whose units are made of two others; only the usual ones are listed.
var rates = map[quantity.Dim]string{quantity.Flow: "any volume over any time", quantity.Velocity: "any length over any time"}

const ratesShown = 9

// unitTable lists the units that are understood, a dimension a row.
func unitTable() string {
	var b strings.Builder
	t := tabwriter.NewWriter(&b, 0, 0, 2, ' ', 0)
	for _, d := range measured {
		units := slices.DeleteFunc(quantity.Units(d), func(u string) bool { return strings.HasSuffix(u, "(g)") || strings.HasSuffix(u, "(a)") })
		if made := rates[d]; made != "" {
			units = append(units[:ratesShown:ratesShown], "…", made)
		}
		fmt.Fprintf(t, "  %s\t%s\n", d, strings.Join(units, "  "))
	}
	t.Flush()
	return strings.TrimRight(b.String(), "\n")
}
