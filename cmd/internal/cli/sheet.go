package cli

import (
	"context"
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"headfall/network"
	"headfall/viz"
	"headfall/viz/export"
)

func init() { register(groupPlan, newSheet) }

func newSheet(a *app) *cobra.Command {
	var html string
	var plain bool
	c := &cobra.Command{
		Use:   "sheet FILE",
		Short: "The paper for the plant: line-up, sequence, holds, handover",
		Long: `Sheet calculates the plan and writes the page that goes to the plant: every valve's position before the
first step, the steps with clock, action and what to expect, when to stop, how long a hold may last, and
the handover blocks. Print it from a browser, or take it as text. The exit code is that of run.`,
		Example: `  headfall sheet plant.yaml                    # writes plant-sheet.html
  headfall sheet plant.yaml --text             # prints it as text`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.sheet(c.Context(), args[0], html, plain) },
	}
	c.Flags().StringVar(&html, "html", "", "write the sheet to `PATH` instead")
	c.Flags().BoolVar(&plain, "text", false, "print the sheet as text")
	return c
}

func (a *app) sheet(ctx context.Context, path, html string, plain bool) error {
	if html != "" && plain {
		return bad("leave one of them out", "--html and --text do not go together")
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	if html == "" && !plain {
		html = p.src.base() + "-sheet.html"
	}
	var res *network.Result
	var files outputs
	files.add(html, func(w io.Writer) error { return viz.WriteSheet(w, viz.Page{Plant: p.plant, Result: res}) })
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, res) })
	if err := files.check(p.src.path); err != nil {
		return err
	}
	if res, err = a.answer(ctx, p.src, p.plant); err != nil {
		return err
	}
	a.settled = res.ExitCode
	if err := files.save(a.Out); err != nil {
		return err
	}
	if plain {
		err = buffered(a.words(files), func(w io.Writer) error { return viz.SheetText(w, viz.Page{Plant: p.plant, Result: res}) })
	} else if !a.opt.quiet {
		_, err = fmt.Fprintln(a.words(files), "wrote", html)
	}
	if err != nil {
		return err
	}
	return code(res.ExitCode)
}
