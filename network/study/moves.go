package study

import (
	"context"
	"math"

	"headfall/network"
)

// MovedStep is how early and how late a step may be with every limit holding. nil: not known, since the plan itself fails.
type MovedStep struct {
	ID        string   `json:"id"`
	Says      string   `json:"says"`
	At        float64  `json:"planned_at_s"`
	Earliest  *float64 `json:"earliest_at_s"`
	Latest    *float64 `json:"latest_at_s"`
	Unbounded bool     `json:"latest_is_end"` // it holds up to the end of the run
	Fixed     bool     `json:"earliest_is_first_possible"`
}

// move looks for the earliest and latest time of one step.
type move struct {
	id, says    string
	at          float64
	early, late float64 // s that it may be moved at most
}

// movesOf lists the steps that can be moved; none when the plan itself does not hold.
func movesOf(p *network.Plant, nominal, worse *network.Result) (all []*move) {
	if worse.Verdict != network.Run {
		return nil
	}
	steps := results(nominal)
	for _, s := range p.Steps {
		if r := steps[s.ID]; r != nil && r.Done != nil {
			all = append(all, &move{s.ID, ordered(r), *r.Done, min(*r.Done, room(s)), p.RunFor - *r.Done})
		}
	}
	return all
}

// moveTrials is the number of even parts that are tried before the last one that holds is bisected.
const moveTrials = 12

func (m *move) find(ctx context.Context, b *Bench) (*MovedStep, error) {
	x := &MovedStep{ID: m.id, Says: m.says, At: m.at}
	late, all, err := m.far(ctx, b, m.late, 1)
	if err != nil {
		return nil, err
	}
	early, first, err := m.far(ctx, b, m.early, -1)
	if err != nil {
		return nil, err
	}
	latest, earliest := m.at+late, m.at-early
	x.Latest, x.Unbounded, x.Earliest, x.Fixed = &latest, all, &earliest, first
	return x, nil
}

// far returns how far the step can be moved one way, up to most, with every limit holding all the way, and whether that is all of it.
func (m *move) far(ctx context.Context, b *Bench, most, way float64) (by float64, all bool, err error) {
	ok := func(shift float64) (bool, error) {
		r, err := b.Brief(ctx, network.RunOptions{Changes: network.Changes{Shift: one(m.id, way*shift)}})
		if ctx.Err() != nil {
			return false, context.Cause(ctx)
		}
		return err == nil && r.Holds(), nil
	}
	lo, hi := 0.0, 0.0
	for i := 1; i <= moveTrials; i++ {
		hi = most * ease(float64(i)/moveTrials)
		held, err := ok(hi)
		if err != nil {
			return 0, false, err
		}
		if !held {
			break
		}
		lo = hi
	}
	if lo == most || most <= 0 {
		return math.Max(most, 0), true, nil
	}
	by, err = bisect(lo, hi, finest, ok)
	return by, false, err
}

// ease spaces trials closely near no shift, where limits go first.
func ease(u float64) float64 { return u * u }
