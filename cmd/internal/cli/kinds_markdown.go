package cli

import (
	"fmt"
	"io"
	"strings"

	"headfall/elements"
	"headfall/elements/friction"
)

// writeMarkdown writes kinds as a page: what each is, its parameters, its law, where it holds, where it comes from.
func writeMarkdown(w io.Writer, kinds []*elements.Kind) {
	fmt.Fprint(w, "# What a plant may be built of\n\nWritten by `headfall kinds --markdown`.\n")
	room := elements.Room("")
	for _, k := range kinds {
		if k.Room != room {
			room = k.Room
			fmt.Fprintf(w, "\n## %s\n", strings.ToUpper(places[room][:1])+places[room][1:])
		}
		fmt.Fprintf(w, "\n### %s\n\n%s\n", k.Name, k.Doc)
		if list := paramsOf(k); len(list) > 0 {
			fmt.Fprint(w, "\n| key | written | | what |\n|---|---|---|---|\n")
			markdownParams(w, "", list)
		}
		if k.Name == "fittings" {
			markdownFittings(w)
		}
		for _, x := range []struct{ label, text string }{{"Law", k.Law}, {"Holds for", k.Valid}, {"Source", k.Source}} {
			if x.text != "" {
				fmt.Fprintf(w, "\n%s: %s\n", x.label, strings.Join(strings.Fields(x.text), " "))
			}
		}
		if k.Sample != "" {
			fmt.Fprintf(w, "\n```yaml\n%s\n```\n", specimen(k))
		}
	}
}

// markdownParams writes a row a parameter, those of a group with its key in front.
func markdownParams(w io.Writer, under string, list []*elements.Param) {
	for _, p := range list {
		key := p.Key
		if p.Form == elements.Counts {
			key = "name: count"
		}
		fmt.Fprintf(w, "| `%s` | %s | %s | %s |\n", under+key, cell(written(p)), cell(need(p)), cell(p.Help))
		if p.Form == elements.Group {
			markdownParams(w, under+p.Key+".", p.Inner.List)
		}
	}
}

func markdownFittings(w io.Writer) {
	fmt.Fprint(w, "\n| fitting | K at 50 mm | K at 100 mm | | source |\n|---|---|---|---|---|\n")
	for _, f := range fittingsByName() {
		fmt.Fprintf(w, "| `%s` | %.2f | %.2f | %s | %s |\n", f.Name, fittingK(f.Name, 0.05), fittingK(f.Name, 0.1), cell(f.Says), cell(f.Source))
	}
}

func fittingK(name string, bore float64) float64 {
	k, _ := friction.FittingK(name, bore)
	return k
}

// cell is a text within a table.
func cell(s string) string { return strings.ReplaceAll(s, "|", "\\|") }
