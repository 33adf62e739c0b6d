package network

import "headfall/elements"

// setLeak lets every check valve of the line pass a share of its Kv in reverse, where it does not state more itself.
func (l *line) setLeak(leak float64) {
	if !l.checks {
		return
	}
	l.oneWay, l.crack = false, 0
	for i, f := range l.plan.Parts {
		one, ok := f.Part.(elements.OneWay)
		if !ok {
			continue
		}
		l.locals[i].Leak = leak
		if one.Leak() == 0 && leak == 0 {
			l.oneWay = true
			l.crack += one.Cracking()
		}
	}
}

// blockVent leaves a vent of a cover the share of its opening that is not blocked.
func (s *system) blockVent(tag string, blocked float64) {
	for i := range s.stations {
		for k := range s.stations[i].vents {
			if v := &s.stations[i].vents[k]; v.plan.Tag == tag {
				v.at.Opening = 1 - blocked
			}
		}
	}
}
