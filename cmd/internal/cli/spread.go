package cli

import (
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"headfall/network"
	"headfall/network/study"
)

func init() { register(groupWhat, newSpread) }

type spreadOptions struct {
	many
	samples int
	seed    int64
}

func newSpread(a *app) *cobra.Command {
	var o spreadOptions
	c := &cobra.Command{
		Use:   "spread FILE",
		Short: "How much the doubts in the numbers matter, and which to measure first",
		Long: `Spread runs the plan many times with every doubtful number drawn anew (a Latin hypercube with a fixed seed), holds at
zero wait and at their longest. It gives the bands of empty times, peak levels and margins (5, 50 and 95 %
points), the chance of each limit failing with its interval (Wilson, 95 %), and what each doubt does to it:
Spearman's rank correlation, and the share of the variance that goes back to it. What does most to the limit in
most danger is worth measuring first.

JSON: one object; each of its limits is as
  {"id": 1, "says": "level of SUMP below 1.9 m", "subject": "level", "unit_si": "m", "implicit": false,
   "verdict": "too_close", "margin_si": 0.12, "margin_band_si": {"low": -0.03, "mid": 0.11, "high": 0.24},
   "fails": {"share": 0.081, "low": 0.066, "high": 0.1},
   "influences": [{"what": "V-1.kv", "doubt": "± 15 %", "rank_correlation": -0.93, "share_of_variance": 0.86}]}
and "measure_first" as
  {"what": "V-1.kv", "doubt": "± 15 %", "for": "level of SUMP below 1.9 m", "share_of_variance": 0.86}
and "finish", how many samples end when, as
  {"of": "the last of T-1, T-2 is empty", "from_s": 7080, "bin_s": 35.2, "counts": [1, 4, 9], "never": 0}

Exit code 0: every limit holds, and in at least 95 % of the samples. 1: not so. 2: bad usage, a bad file, or
nothing in it carries a doubt. 3: the calculation could not finish. 130: interrupted; what was done is kept and
marked.`,
		Example: `  headfall spread plant.yaml
  headfall spread plant.yaml --samples 5000 --seed 7 --json spread.json
  headfall spread plant.yaml --html spread.html
  headfall spread plant.yaml --samples 20000 --shard auto/32 --json part.jsonl    # in a job array`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error { return a.spread(c.Context(), args[0], o) },
	}
	f := c.Flags()
	f.SortFlags = false
	f.IntVar(&o.samples, "samples", study.SpreadSamples, "`COUNT` of samples")
	f.Int64Var(&o.seed, "seed", study.DefaultSeed, "`NUMBER` where the draws begin; the same seed gives the same samples")
	o.many.bind(f)
	return c
}

const (
	mostSamples = 10_000_000 // of one study
	mostMemory  = 2 << 30    // bytes that the samples of one part may take
)

// affordable refuses more samples than fit into memory; of are the parts that they are shared among.
func affordable(p *network.Plant, samples, of int) error {
	doubts := 0
	for _, n := range p.Numbers {
		if n.Value.Doubt.Stated() {
			doubts++
		}
	}
	limits := len(p.Limits) + len(p.Vessels)                                     // with the rims
	each := 256 + 16*doubts + 16*len(p.Vessels) + 9*limits + 8*len(p.Milestones) // bytes: draws, levels and times of vessels, margins
	part := samples / max(of, 1)
	if part <= mostMemory/each {
		return nil
	}
	return bad(fmt.Sprintf("as --samples %d, or in parts: --shard 1/%d", mostMemory/each, part/(mostMemory/each)+1),
		"%d samples of this plant take about %.1f GB of memory, %d GB are taken", part, float64(part)*float64(each)/(1<<30), mostMemory>>30)
}

func (a *app) spread(ctx context.Context, path string, o spreadOptions) error {
	if o.samples < 1 || o.samples > mostSamples {
		return bad("as --samples 1000", "--samples must lie between 1 and %d", mostSamples)
	}
	p, err := a.open(ctx, path)
	if err != nil {
		return err
	}
	bar := a.progress("sampling")
	opt := study.SpreadOptions{Samples: o.samples, Seed: o.seed}
	if opt.Common, err = a.common(o.many, bar); err != nil {
		return err
	}
	if err := affordable(p.plant, o.samples, opt.Shard.Of); err != nil {
		return err
	}
	s := cases[study.SpreadHead, study.SpreadUnit]{command: "spread", many: o.many, shard: opt.Shard, bar: bar}
	s.calculate = func(ctx context.Context) (*study.SpreadPart, error) {
		part, err := study.Spread(ctx, p.load, opt)
		if errors.Is(err, study.ErrNoDoubts) {
			err = bad("write ± behind a number, or assume: {doubts: default}", "%s: %w", p.src.name, err)
		}
		return part, err
	}
	s.join = func(part *study.SpreadPart) *study.Merged { return &study.Merged{Spread: study.SpreadOf(part)} }
	return s.conclude(ctx, a, p)
}
