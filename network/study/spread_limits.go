package study

import (
	"math"

	"headfall/network"
)

// columns are the samples that were calculated, with the ranks of what was drawn.
type columns struct {
	units  []SpreadUnit
	doubts []Doubt
	ranked [][]float64
}

func (c *columns) rankDraws() {
	for k := range c.doubts {
		c.ranked = append(c.ranked, ranks(c.of(func(u *SpreadUnit) float64 { return u.Drawn[k] })))
	}
}

func (c *columns) of(pick func(*SpreadUnit) float64) []float64 {
	all := make([]float64, len(c.units))
	for i := range c.units {
		all[i] = pick(&c.units[i])
	}
	return all
}

func (c *columns) count(is func(*SpreadUnit) bool) (n int) {
	for i := range c.units {
		if is(&c.units[i]) {
			n++
		}
	}
	return n
}

// limit makes the row of limit i, which is l in the plan itself.
func (c *columns) limit(i int, l *network.LimitResult) *SpreadLimit {
	x := &SpreadLimit{ID: l.ID, Says: l.Says, Subject: l.Subject, UnitSI: l.UnitSI, Implicit: l.Implicit, Verdict: l.Verdict, Planned: l.Margin}
	margins := c.of(func(u *SpreadUnit) float64 { return u.Margin[i] })
	x.Margin = bandOf(present(margins))
	x.Fails = chance(c.count(func(u *SpreadUnit) bool { return u.Fails[i] }), len(c.units))
	for k := range margins { // a margin that is not there is that of a time which never came: the worst
		if math.IsNaN(margins[k]) {
			margins[k] = math.Inf(-1)
		}
	}
	x.Influences = influences(c.doubts, c.ranked, margins)
	if x.Verdict == network.Holds && x.Fails.Share > FailsAllowed {
		x.Verdict = network.TooClose
	}
	mid := *l
	if x.Margin.Mid != nil {
		mid.Margin = x.Margin.Mid
	}
	x.tight = mid.Share()
	return x
}

// measureFirst names the doubt that does most to the limit in most danger: the one nearest to an even chance of failing, else the one with the least
// margin that any doubt moves; failing limits altogether, to the last vessel's empty time.
func (s *SpreadResult) measureFirst(vessels []string) *Measure {
	var worst *SpreadLimit
	for _, l := range s.Limits {
		if len(l.Influences) > 0 && (worst == nil || l.danger(worst)) {
			worst = l
		}
	}
	if worst != nil {
		in := worst.Influences[0]
		return &Measure{in.What, in.Doubt, worst.Says, in.Share}
	}
	for _, tag := range vessels {
		if in := s.Influences["emptied_at_s "+tag]; len(in) > 0 {
			return &Measure{in[0].What, in[0].Doubt, "the time at which " + tag + " is empty", in[0].Share}
		}
	}
	return nil
}

// danger ranks limits by how undecided they are, then by how tight.
func (l *SpreadLimit) danger(o *SpreadLimit) bool {
	a, b := l.Fails.Share*(1-l.Fails.Share), o.Fails.Share*(1-o.Fails.Share)
	if a != b {
		return a > b
	}
	return math.Abs(l.tight) < math.Abs(o.tight)
}
