package study

import (
	"context"
	"sort"

	"headfall/network"
)

// jumpTime is the time, s, over which a level is brought to its reading.
const jumpTime = 1.0

// corrected makes the plan with levels brought to readings on the way, and with changed outlets. A level is brought there by a batch of a
// second, which may be less than nothing; everything else goes on: steps, pumps, volumes of the day.
func (t *tracking) corrected(jumps []jump, scales []scaledOutlet) Load {
	return func() (*network.Plant, error) {
		p, err := t.load()
		if err != nil {
			return nil, err
		}
		for _, s := range scales {
			n := p.Numbers[s.number]
			setNumber(p, n, n.Value.SI*s.factor)
			if n.Value.Doubt.Stated() {
				n.Value.Doubt = normal(*n.At * s.doubt)
			}
		}
		for _, j := range jumps {
			for _, v := range p.Vessels {
				if v.Tag == j.vessel && j.volume != 0 {
					v.Batches = append(v.Batches, &network.Batch{ID: "reading of " + v.Tag, At: network.Moment{S: j.at, Given: true}, Volume: j.volume, Over: jumpTime})
				}
			}
		}
		return p, p.Refresh()
	}
}

// settle works out the volumes of jumps: in the order of time, each from a run with those before it.
func (t *tracking) settle(ctx context.Context, jumps []jump, scales []scaledOutlet) ([]jump, error) {
	jumps = append([]jump(nil), jumps...)
	sort.SliceStable(jumps, func(i, k int) bool { return jumps[i].at < jumps[k].at })
	for i := 0; i < len(jumps); {
		res, err := t.run(ctx, t.corrected(jumps[:i], scales), jumps[i].at+2*jumpTime)
		if err != nil {
			return nil, err
		}
		k := i
		for ; k < len(jumps) && jumps[k].at <= jumps[i].at+jumpTime; k++ {
			j := &jumps[k]
			v := t.vessel(j.vessel)
			now, _ := v.Shape.Volume(levelAt(res.Series, j.vessel, j.at))
			want, _ := v.Shape.Volume(max(0, j.level))
			j.volume = want - now
		}
		i = k
	}
	return jumps, nil
}

func (t *tracking) vessel(tag string) *network.Vessel {
	for _, v := range t.plant.Vessels {
		if v.Tag == tag {
			return v
		}
	}
	return nil
}

// firsts are the jumps to the first reading of each vessel, lasts those to the last.
func (t *tracking) firsts() (jumps []jump) {
	for _, tag := range t.opt.Readings.Vessels {
		if list := t.opt.Readings.Of(tag); len(list) > 0 {
			jumps = append(jumps, jump{vessel: tag, at: list[0].Time, level: list[0].Level})
		}
	}
	return jumps
}

func (t *tracking) lasts() (jumps []jump) {
	for _, tag := range t.opt.Readings.Vessels {
		if list := t.opt.Readings.Of(tag); len(list) > 1 {
			x := list[len(list)-1]
			jumps = append(jumps, jump{vessel: tag, at: x.Time, level: x.Level})
		}
	}
	return jumps
}
