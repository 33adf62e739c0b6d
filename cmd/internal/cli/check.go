package cli

import (
	"context"
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/scenarios"
	"headfall/viz/export"
)

func init() { register(groupFile, newCheck) }

func newCheck(a *app) *cobra.Command {
	normalise := false
	c := &cobra.Command{
		Use:   "check FILE",
		Short: "Read and check the file; show what was understood",
		Long: `Check reads the file and calculates nothing. It shows the plant as it was understood, with every default
that was used and every doubt that was assumed, what the lines hold, how everything stands before the
first step, and what is odd. Every fault is shown with its place, and the nearest right spelling.

With --normalise it writes the file in plain block form, everything quoted that could be read in two ways.`,
		Example: `  headfall check plant.yaml
  headfall check plant.yaml --set V-1.kv=80
  headfall check plant.yaml --normalise > plain.yaml`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.check(c.Context(), args[0], normalise) },
	}
	c.Flags().BoolVar(&normalise, "normalise", false, "write the file in plain quoted block form to standard output")
	return c
}

func (a *app) check(ctx context.Context, path string, normalise bool) error {
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	if normalise {
		return a.normalise(p.src)
	}
	var files outputs
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, understood(p.plant)) })
	if err := files.check(p.src.path); err != nil {
		return err
	}
	if err := files.save(a.Out); err != nil {
		return err
	}
	out := a.words(files)
	if err := text.Check(out, p.plant, text.Options{Width: a.Width, Quiet: a.opt.quiet}); err != nil {
		return err
	}
	if len(p.plant.Warnings) > 0 && !a.opt.quiet {
		_, err = fmt.Fprintf(out, "\nWarnings\n%v\n", scenarios.Locate(p.plant, p.plant.Warnings))
	}
	return err
}

func (a *app) normalise(src *source) error {
	plain, err := scenarios.Normalise(src.name, src.data)
	if err != nil {
		return &Exit{Code: ExitBad, Err: err}
	}
	_, err = a.Out.Write(plain)
	return err
}

// understood is what check writes as JSON.
func understood(p *network.Plant) any {
	type number struct {
		Name    string  `json:"name"`
		SI      float64 `json:"si"`
		Written string  `json:"written"`
		Default bool    `json:"default"`
		Assumed bool    `json:"doubt_assumed"`
	}
	type warning struct {
		Line   int    `json:"line"`
		Column int    `json:"column"`
		Says   string `json:"says"`
		Hint   string `json:"hint"`
	}
	answer := struct {
		Schema   int                `json:"schema"`
		Command  string             `json:"command"`
		Title    string             `json:"title"`
		Revision string             `json:"revision"`
		File     string             `json:"file"`
		SHA256   string             `json:"sha256"`
		Numbers  []number           `json:"numbers"`
		Defaults []string           `json:"defaults"`
		Warnings []warning          `json:"warnings"`
		Holds    map[string]float64 `json:"line_holds_m3"`
	}{1, "check", p.Title, p.Revision, p.File, p.SHA256, nil, p.Defaults, nil, map[string]float64{}}
	for _, n := range p.Numbers {
		answer.Numbers = append(answer.Numbers, number{n.Name, n.Value.SI, n.Value.Echo(), n.Default, n.Assumed})
	}
	for _, w := range p.Warnings {
		answer.Warnings = append(answer.Warnings, warning{w.At.Line, w.At.Column, w.Says, w.Hint})
	}
	for _, l := range p.Lines {
		answer.Holds[l.Tag] = text.LineVolume(l)
	}
	return answer
}
