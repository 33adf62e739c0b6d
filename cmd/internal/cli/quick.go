package cli

import (
	"context"
	"fmt"
	"io"

	"github.com/spf13/cobra"

	"headfall/cmd/internal/text"
	"headfall/network"
	"headfall/network/study"
	"headfall/viz/export"
)

func init() { register(groupPlan, newQuick) }

func newQuick(a *app) *cobra.Command {
	o := quickFlags{}
	c := &cobra.Command{
		Use:   "quick",
		Short: "One vessel, one hole or line, from flags; three lines of answer",
		Long: `Quick answers without a file: one open vessel drains through a hole, or through a line with or without a valve.
The vessel is an upright cylinder (--diameter), a lying one (--diameter and --lying) or a box (--length and
--width). The outlet is a sharp hole (--hole) or a line (--bore and --pipe, with --k for fittings and --kv for a
valve). Doubts are allowed for as in run: Kv ± 15 %, Cd ± 5 %, K ± 20 %, level ± 20 mm.

JSON: {"schema": 1, "command": "quick", "exit_code": 0, "complete": true, "emptied_at_s": 4310,
 "emptied_low_s": 4100, "emptied_high_s": 4560, "empty_at_m": 0.016, "half_at_s": 1280, "start_volume_m3": 9.42,
 "peak_flow_m3_s": 0.0041, "left_m3": 0.05}

Exit code 0: it empties. 1: it does not. 2: bad usage. 3: the calculation could not finish. 130: interrupted.`,
		Example: `  headfall quick --diameter 2m --level 3m --hole 40mm
  headfall quick --length 6m --width 3m --level 1.7m --bore 78mm --pipe 11m --k 3.5 --kv 110 --drop 0.9m
  headfall quick --diameter 2.4m --lying 6m --level 2m --bore 50mm --pipe 8m --inflow 2m3/h --at 06:30`,
		Args: none,
		RunE: func(c *cobra.Command, args []string) error { return a.quick(c.Context(), o) },
	}
	o.bind(c.Flags())
	return c
}

const (
	quickSamples = 60
	quickDays    = 30 // it is followed for so long
)

func (a *app) quick(ctx context.Context, o quickFlags) error {
	yaml, err := o.plan()
	if err != nil {
		return err
	}
	src := &source{path: "-", name: "quick", data: []byte(yaml)}
	load := func() (*network.Plant, error) {
		p, err := a.load(src, &options{})
		if err != nil {
			return nil, err
		}
		half, _ := p.Vessels[0].Shape.Level(p.Vessels[0].StartVolume() / 2)
		p.Milestones = []*network.Milestone{{Name: "half", When: network.Condition{Subject: network.Level, Of: []string{"VESSEL"}, Bound: half}}}
		return p, nil
	}
	plant, err := load()
	if err != nil {
		return err
	}
	var res text.QuickResult
	files := outputs{}
	files.add(a.opt.json, func(w io.Writer) error { return export.JSON(w, &res) })
	if err := files.check(src.path); err != nil {
		return err
	}
	ctx, cancel := a.within(ctx)
	defer cancel()
	opt := a.opt.study()
	opt.Samples = quickSamples
	run, err := study.Judge(ctx, load, opt)
	if err != nil {
		return a.unfinished(ctx, err)
	}
	res = text.QuickOf(run)
	return a.tell(files, res.ExitCode, func(w io.Writer, opt text.Options) error {
		return text.Quick(w, plant, &res, fmt.Sprintf("%s through %s", o.vessel, o.outlet), opt)
	})
}
