package study

import "headfall/network"

// mustEmpty returns the vessels that the plan must empty: those that a limit names, or else those that the free valves drain.
func mustEmpty(p *network.Plant) []string {
	var tags []string
	add := func(tag string) {
		for _, v := range p.Vessels {
			if e, _ := p.EmptyLevel(v); v.Tag == tag && v.StartLevel() > e {
				for _, t := range tags {
					if t == tag {
						return
					}
				}
				tags = append(tags, tag)
			}
		}
	}
	for _, l := range p.Limits {
		if l.Must.Subject == network.Emptied {
			add(l.Must.Of[0])
		}
	}
	if len(tags) > 0 {
		return tags
	}
	for _, s := range p.Steps {
		if s.Free == nil || s.Action != network.MoveValve {
			continue
		}
		if l, _ := valveLine(p, s.Target); l != nil {
			for _, v := range feeding(p, l) {
				add(v.Tag)
			}
		}
	}
	return tags
}

// finishOf returns when the last of the vessels is empty; ok is false when one is not.
func finishOf(res *network.Result, must []string) (at float64, ok bool) {
	for _, tag := range must {
		v := res.Vessels[tag]
		if v == nil || v.EmptiedAt == nil {
			return 0, false
		}
		at = max(at, *v.EmptiedAt)
	}
	return at, true
}

// finishBand is the band of a finish: the latest ends of the vessels' bands; nil where it is not always reached.
func finishBand(res *network.Result, must []string) (low, high *float64) {
	always := true
	for _, tag := range must {
		b, ok := res.Bands["emptied_at_s"][tag]
		if !ok {
			return nil, nil
		}
		if b.Low != nil && (low == nil || *b.Low > *low) {
			low = b.Low
		}
		if b.High == nil {
			always = false
		} else if high == nil || *b.High > *high {
			high = b.High
		}
	}
	if !always {
		high = nil
	}
	return low, high
}
