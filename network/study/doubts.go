package study

import (
	"context"
	"fmt"
	"strings"

	"headfall/elements/quantity"
	"headfall/network"
)

// doubts samples what is doubtful and lays the bands over the result: a limit that holds in the middle but fails too often is too close to call.
func (j *judgement) doubts() error {
	j.res.Assumptions = assumptions(j.plant)
	j.res.Allowance = network.Allowance{Doubts: "none"}
	draws := NewDraws(j.plant, j.opt.Samples, j.opt.Seed)
	if j.opt.Samples < 0 || len(draws.Numbers) == 0 {
		return nil
	}
	many := &Runner{Load: j.run.Load, Model: sampled(j.run.Model), Workers: j.run.Workers, Progress: j.part(0.2, 1)}
	at := bandTimes(j.plant, j.res)
	samples, done, err := Each(j.ctx, many, j.opt.Samples, func(ctx context.Context, b *Bench, i int) (sample, error) {
		return takeSample(ctx, b, draws, i, j.holds, at)
	})
	kept := calculated(samples, done)
	j.res.Allowance = network.Allowance{Doubts: j.plant.Assume.Doubts, Samples: len(kept), Seed: j.opt.Seed}
	if len(kept) > 0 {
		j.lay(kept)
	}
	j.res.Decide()
	j.stalls(kept)
	if n := len(samples) - len(kept); n > 0 && err == nil {
		j.leftOut(n, len(samples), whyNot(samples))
	}
	return err
}

// leftOut tells of samples that could not be calculated. They may have failed any limit: a plan that holds is too close to call when they are more
// than a share that may fail; one that fails does so without them.
func (j *judgement) leftOut(n, of int, why string) {
	j.res.Cautions = append(j.res.Cautions, fmt.Sprintf("%d of %d samples of the doubts could not be calculated and are left out (%s).", n, of, why))
	if float64(n) > FailsAllowed*float64(of) && j.res.Verdict == network.Run {
		j.res.Verdict, j.res.ExitCode = network.TooClose, 1
	}
}

// stalls makes a plan too close to call whose steps are all reached in the middle, but not in enough of the samples.
func (j *judgement) stalls(samples []sample) {
	share := portion(samples, func(s *sample) bool { return s.stalls })
	if len(samples) == 0 || share <= FailsAllowed || j.res.Verdict != network.Run {
		return
	}
	j.res.Verdict, j.res.ExitCode = network.TooClose, 1
	j.res.Cautions = append(j.res.Cautions, fmt.Sprintf("In %.2g %% of the samples some step is never reached.", 100*share))
}

// calculated returns the samples that were carried out and came to an end.
func calculated(samples []sample, done []bool) (kept []sample) {
	for i, s := range samples {
		if done[i] && s.failed == "" {
			kept = append(kept, s)
		}
	}
	return kept
}

func whyNot(samples []sample) string {
	for _, s := range samples {
		if s.failed != "" {
			return s.failed
		}
	}
	return ""
}

// lay puts the bands of the samples over the result.
func (j *judgement) lay(samples []sample) {
	r := j.res
	r.Bands = vesselBands(j.plant, samples)
	r.SeriesBand = seriesBand(j.plant, samples)
	for i, s := range r.Steps {
		if s.Expect == nil {
			continue
		}
		b := bandOf(present(pluck(samples, func(s *sample) float64 { return s.expect[i] })))
		if b.Low != nil && b.High != nil {
			s.Expect.Low, s.Expect.High = min(*b.Low, s.Expect.Mid), max(*b.High, s.Expect.Mid)
		}
	}
	for i, l := range r.Limits {
		b := bandOf(present(pluck(samples, func(s *sample) float64 { return s.margin[i] })))
		l.MarginLow, l.MarginHigh = b.Low, b.High
		l.FailsShare = portion(samples, func(s *sample) bool { return s.fails[i] })
		if l.Verdict == network.Holds && l.FailsShare > FailsAllowed {
			l.Verdict = network.TooClose
		}
	}
}

// vesselBands are the bands of empty times and peak levels, by vessel; a vessel that is never empty in any sample has none.
func vesselBands(p *network.Plant, samples []sample) map[string]map[string]network.Band {
	bands := map[string]map[string]network.Band{"emptied_at_s": {}, "peak_level_m": {}}
	for i, v := range p.Vessels {
		if c := pluck(samples, func(s *sample) float64 { return s.emptied[i] }); !never(c) {
			bands["emptied_at_s"][v.Tag] = bandOf(c)
		}
		bands["peak_level_m"][v.Tag] = bandOf(pluck(samples, func(s *sample) float64 { return s.peak[i] }))
	}
	return bands
}

func portion(samples []sample, is func(*sample) bool) float64 {
	n := 0
	for i := range samples {
		if is(&samples[i]) {
			n++
		}
	}
	return float64(n) / float64(len(samples))
}

// assumptions lists the doubts allowed for: those that the file leaves unstated first.
func assumptions(p *network.Plant) []network.Assumption {
	list := []network.Assumption{}
	for _, assumed := range []bool{true, false} {
		for _, n := range p.Numbers {
			if n.Value.Doubt.Stated() && n.Assumed == assumed {
				because := "as stated"
				if assumed {
					because = "no doubt stated"
				}
				list = append(list, network.Assumption{What: n.Name + " " + SaysDoubt(n), Because: because})
			}
		}
	}
	if len(p.Assume.Together) > 0 {
		list = append(list, network.Assumption{What: strings.Join(p.Assume.Together, ", ") + " drawn together", Because: "as stated"})
	}
	return list
}

// SaysDoubt writes the doubt of a number: "± 15 %", "± 20 mm", "× or ÷ 2", "0.58 to 0.66".
func SaysDoubt(n *network.Number) string {
	d, v := n.Value.Doubt, n.Value.SI
	unit := n.Value.Unit
	if n.Key == "level" && n.Assumed {
		unit = "mm"
	}
	switch {
	case d.Kind == quantity.Factor:
		return fmt.Sprintf("× or ÷ %.4g", d.Factor)
	case d.Kind == quantity.Uniform:
		return brief(d.Low, n.Dim, unit) + " to " + brief(d.High, n.Dim, unit)
	case v == 0 || n.Dim == quantity.Length && !n.Assumed || n.Key == "level" || unit == "%":
		return "± " + brief(d.Half, n.Dim, unit)
	}
	return fmt.Sprintf("± %.3g %%", 100*d.Half/v)
}

// brief writes a quantity without trailing zeros.
func brief(si float64, dim quantity.Dim, unit string) string {
	x, err := quantity.Convert(si, dim, unit)
	if err != nil {
		x, unit = si, quantity.SIUnit(dim)
	}
	return strings.TrimSpace(fmt.Sprintf("%.4g %s", x, unit))
}
