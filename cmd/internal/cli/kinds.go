package cli

import (
	"fmt"
	"io"
	"sort"
	"strings"
	"text/tabwriter"

	"github.com/spf13/cobra"

	"headfall/elements"
	"headfall/elements/friction"
)

func init() { register(groupFile, newKinds) }

func newKinds(a *app) *cobra.Command {
	markdown := false
	c := &cobra.Command{
		Use:   "kinds [NAME]",
		Short: "What a plant may be built of: parameters, law, source",
		Long: `Kinds lists everything that a plant may be built of. With a NAME it prints that kind's parameters with
their units and defaults, its law, where the law holds and where it comes from, and a specimen.`,
		Example: `  headfall kinds
  headfall kinds valve
  headfall kinds fittings          # with the loss coefficients
  headfall kinds --markdown > kinds.md`,
		RunE: func(c *cobra.Command, args []string) error {
			if len(args) > 1 {
				return bad("headfall help kinds", "kinds takes one NAME, got %d", len(args))
			}
			kinds, err := kindsNamed(args)
			if err != nil {
				return err
			}
			if a.opt.json != "" {
				return a.kindsJSON(kinds)
			}
			return buffered(a.Out, func(w io.Writer) error {
				if markdown {
					writeMarkdown(w, kinds)
					return nil
				}
				if len(args) == 0 {
					return listKinds(w)
				}
				for i, k := range kinds {
					if i > 0 {
						fmt.Fprintln(w)
					}
					showKind(w, k)
				}
				return nil
			})
		},
	}
	c.Flags().BoolVar(&markdown, "markdown", false, "all of it as a page in Markdown")
	return c
}

// kindsNamed returns the kinds of that name in every room, or all of them.
func kindsNamed(args []string) ([]*elements.Kind, error) {
	var all []*elements.Kind
	var names []string
	for _, room := range elements.Rooms() {
		for _, k := range elements.Kinds(room) {
			names = append(names, k.Name)
			if len(args) == 0 || k.Name == args[0] {
				all = append(all, k)
			}
		}
	}
	if len(all) > 0 || len(args) == 0 {
		return all, nil
	}
	hint := "headfall kinds lists them"
	if near := nearest(args[0], names); near != "" {
		hint = "did you mean " + near + "?"
	}
	return nil, bad(hint, "there is no kind %q", args[0])
}

// places are the headings of the list.
var places = map[elements.Room]string{
	elements.Parts: "parts of a line", elements.Shapes: "shape of a vessel", elements.Heads: "bottom, top or ends of a shape",
	elements.Vents: "vents of a covered vessel", elements.Liquids: "liquid", elements.Trims: "trim of a valve", elements.Beyond: "outside",
}

func listKinds(w io.Writer) error {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	for _, room := range elements.Rooms() {
		fmt.Fprintf(t, "%s\n", places[room])
		for _, k := range elements.Kinds(room) {
			fmt.Fprintf(t, "  %s\t%s\n", k.Name, k.Doc)
		}
	}
	return t.Flush()
}

// showKind prints all that is known of one kind.
func showKind(w io.Writer, k *elements.Kind) {
	fmt.Fprintf(w, "%s (%s)\n  %s\n\n", k.Name, places[k.Room], k.Doc)
	showParams(w, paramsOf(k))
	if k.Name == "fittings" && k.Room == elements.Parts {
		showFittings(w)
	}
	for _, x := range []struct{ label, text string }{{"law", k.Law}, {"holds for", k.Valid}, {"source", k.Source}} {
		if x.text != "" {
			fmt.Fprintf(w, "  %-10s %s\n", x.label, strings.ReplaceAll(strings.TrimSpace(x.text), "\n", "\n             "))
		}
	}
	if k.Sample != "" {
		fmt.Fprintf(w, "  %-10s %s\n", "specimen", specimen(k))
	}
}

func specimen(k *elements.Kind) string {
	inner := strings.TrimSuffix(strings.TrimPrefix(strings.TrimSpace(k.Sample), "{"), "}")
	return k.Name + ": {" + strings.TrimSpace(inner) + "}"
}

func showParams(w io.Writer, list []*elements.Param) {
	if len(list) == 0 {
		fmt.Fprint(w, "  no parameters\n\n")
		return
	}
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	paramRows(t, "  ", list)
	t.Flush()
	fmt.Fprintln(w)
}

// paramRows writes a row a parameter, those of a group under it.
func paramRows(w io.Writer, margin string, list []*elements.Param) {
	for _, p := range list {
		fmt.Fprintf(w, "%s%s\t%s\t%s\t%s\n", margin, p.Key, written(p), need(p), p.Help)
		if p.Form == elements.Group {
			paramRows(w, margin+"  ", p.Inner.List)
		}
	}
}

func need(p *elements.Param) string {
	switch {
	case p.Need == elements.Required:
		return "required"
	case p.Default != "":
		return "default " + p.Default
	}
	return "optional"
}

func fittingsByName() []friction.Fitting {
	list := friction.Fittings()
	sort.SliceStable(list, func(i, j int) bool { return list[i].Name < list[j].Name })
	return list
}

// showFittings prints the loss coefficients by name, in two bores.
func showFittings(w io.Writer) {
	t := tabwriter.NewWriter(w, 0, 0, 2, ' ', 0)
	fmt.Fprintf(t, "  fitting\tK at 50 mm\tK at 100 mm\t\tsource\n")
	for _, f := range fittingsByName() {
		fmt.Fprintf(t, "  %s\t%.2f\t%.2f\t%s\t%s\n", f.Name, fittingK(f.Name, 0.05), fittingK(f.Name, 0.1), f.Says, f.Source)
	}
	t.Flush()
	fmt.Fprintln(w)
}
