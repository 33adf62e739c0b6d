package study

import (
	"fmt"

	"headfall/elements/quantity"
	"headfall/network"
)

// broken runs the plan once more with the lines that may run part full broken: air at their last high point, or at their upper end where they have none.
// Full-pipe flow is the upper estimate, this the lower; both are said with the flag.
func (j *judgement) broken() error {
	tags := map[string]bool{}
	for _, f := range j.res.Flags {
		if f.Kind == "part_full" {
			tags[f.Where] = true
		}
	}
	if len(tags) == 0 || !j.res.Complete {
		return nil
	}
	other, err := j.single(network.Changes{Break: tags})
	if !calculable(err) {
		return err
	}
	for _, f := range j.res.Flags {
		if f.Kind != "part_full" {
			continue
		}
		if err != nil || !other.Complete {
			f.Says += "; with air standing in it the plan could not be calculated"
			continue
		}
		f.Says += "; " + j.brokenSays(f.Where, other)
	}
	return nil
}

// brokenSays gives the answer of the other run about one line: its peak flow, and when what it drains is empty.
func (j *judgement) brokenSays(line string, other *network.Result) string {
	show := &j.plant.Show
	flow := func(r *network.Result) string {
		return quantity.Format(r.Lines[line].PeakFlow, quantity.Flow, show.Flow, 3)
	}
	says := "with air standing in it, it carries no less at its peak"
	if broken, full := flow(other), flow(j.res); broken != full {
		says = fmt.Sprintf("with air standing in it, it carries at most %s instead of %s", broken, full)
	}
	for _, l := range j.plant.Lines {
		if l.Tag != line {
			continue
		}
		a, b := j.res.Vessels[l.From], other.Vessels[l.From]
		switch {
		case a == nil || a.EmptiedAt == nil && b.EmptiedAt == nil:
		case b.EmptiedAt == nil:
			says += fmt.Sprintf(", and %s is not emptied, instead of in %s", l.From, quantity.FormatDuration(*a.EmptiedAt))
		case a.EmptiedAt == nil:
			says += fmt.Sprintf(", and %s is emptied in %s, otherwise not", l.From, quantity.FormatDuration(*b.EmptiedAt))
		default:
			says += fmt.Sprintf(", and %s is emptied in %s instead of %s", l.From, quantity.FormatDuration(*b.EmptiedAt), quantity.FormatDuration(*a.EmptiedAt))
		}
	}
	return says
}
