package study

import (
	"fmt"

	"headfall/network"
)

// sameLimits puts the limits of the first plan in place of a plan's own.
func (r *CompareResult) sameLimits(c Contender, first *network.Plant) Load {
	if p, err := c.Load(); err == nil && fmt.Sprint(saysLimits(p)) != fmt.Sprint(saysLimits(first)) {
		r.Notes = append(r.Notes, fmt.Sprintf("%s is judged by the limits of %s, not by its own", c.File, first.File))
	}
	return func() (*network.Plant, error) {
		p, err := c.Load()
		if err != nil {
			return nil, err
		}
		p.Limits = first.Limits
		for _, l := range first.Limits {
			for _, tag := range l.Must.Of {
				if !knows(p, tag) {
					return nil, Misuse{fmt.Errorf("%s has no %s: it cannot be judged by the limit on the %s", c.File, tag, l.Says())}
				}
			}
		}
		return p, nil
	}
}

func saysLimits(p *network.Plant) (all []string) {
	for _, l := range p.Limits {
		all = append(all, l.Says())
	}
	return all
}

// knows tells whether a plant has something of a tag that limits look at.
func knows(p *network.Plant, tag string) bool {
	for _, v := range p.Vessels {
		if v.Tag == tag {
			return true
		}
	}
	for _, l := range p.Lines {
		if l.Tag == tag {
			return true
		}
	}
	for _, o := range p.Outside {
		if o.Tag == tag {
			return true
		}
	}
	for _, r := range p.LineUp() {
		if r.Valve == tag {
			return true
		}
	}
	return false
}
