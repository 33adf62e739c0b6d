package study

import (
	"headfall/network"
)

// SpreadResult is what a spread gives back.
type SpreadResult struct {
	Head
	Verdict network.Verdict `json:"verdict"`
	Outcome
	Samples    int                                `json:"samples"`         // calculated
	NotDone    int                                `json:"not_calculated"`  // tried, but the calculation could not finish
	AnyFails   Chance                             `json:"any_limit_fails"` // or some step is never reached
	Stalls     Chance                             `json:"some_step_never_reached"`
	Bands      map[string]map[string]network.Band `json:"bands"`
	Limits     []*SpreadLimit                     `json:"limits"`
	Influences map[string][]Influence             `json:"influences"` // on empty times and peaks: "emptied_at_s T-1"
	Doubts     []Doubt                            `json:"doubts"`
	Measure    *Measure                           `json:"measure_first"`
	Finish     *Histogram                         `json:"finish"` // nil when nothing is ever empty
}

// Chance is how often something came, with its interval at 95 % (Wilson).
type Chance struct {
	Share float64 `json:"share"`
	Low   float64 `json:"low"`
	High  float64 `json:"high"`
}

// SpreadLimit is what the samples make of a limit.
type SpreadLimit struct {
	ID         int             `json:"id"`
	Says       string          `json:"says"`
	Subject    string          `json:"subject"`
	UnitSI     string          `json:"unit_si"`
	Implicit   bool            `json:"implicit"`
	Verdict    network.Verdict `json:"verdict"` // holds | fails | too_close
	Planned    *float64        `json:"margin_si"`
	Margin     network.Band    `json:"margin_band_si"`
	Fails      Chance          `json:"fails"`
	Influences []Influence     `json:"influences"`

	tight float64 // middle margin as a share of the bound
}

// Measure is the doubt that is worth measuring first.
type Measure struct {
	What  string  `json:"what"`
	Doubt string  `json:"doubt"`
	For   string  `json:"for"` // the limit, or the time, that it decides
	Share float64 `json:"share_of_variance"`
}

func chance(k, n int) Chance {
	low, high := Wilson(k, n, 0.95)
	c := Chance{Low: low, High: high}
	if n > 0 {
		c.Share = float64(k) / float64(n)
	}
	return c
}

// SpreadOf puts the samples of a whole spread together.
func SpreadOf(p *SpreadPart) *SpreadResult {
	h := &p.Head
	s := &SpreadResult{Head: h.Head, Outcome: outcomeOf(p.complete()), Doubts: h.Doubts, Verdict: h.Verdict,
		Bands: map[string]map[string]network.Band{}, Limits: []*SpreadLimit{}, Influences: map[string][]Influence{}}
	c := &columns{doubts: h.Doubts}
	for i := range p.Count {
		if u, ok := p.Units[i]; ok && u.Failed == "" {
			c.units = append(c.units, u)
		} else if ok {
			s.NotDone++
		}
	}
	s.Samples = len(c.units)
	c.rankDraws()
	s.AnyFails = chance(c.count(func(u *SpreadUnit) bool { return !u.Whole }), s.Samples)
	s.Stalls = chance(c.count(func(u *SpreadUnit) bool { return u.Stalls }), s.Samples)
	s.moments(c, "emptied_at_s", h.Vessels, func(u *SpreadUnit) gaps { return u.Emptied })
	s.moments(c, "peak_level_m", h.Vessels, func(u *SpreadUnit) gaps { return u.Peak })
	s.moments(c, "milestone_at_s", h.Milestones, func(u *SpreadUnit) gaps { return u.Milestones })
	for i, l := range h.Limits {
		s.Limits = append(s.Limits, c.limit(i, l))
	}
	s.decide()
	s.Finish = c.finishes(h.Vessels, s.Bands["emptied_at_s"])
	s.Measure = s.measureFirst(h.Vessels)
	return s
}

// moments lays the bands and influences of one number a vessel.
func (s *SpreadResult) moments(c *columns, name string, tags []string, pick func(*SpreadUnit) gaps) {
	s.Bands[name] = map[string]network.Band{}
	for i, tag := range tags {
		v := c.of(func(u *SpreadUnit) float64 { return pick(u)[i] })
		if len(v) == 0 || never(v) {
			continue
		}
		s.Bands[name][tag] = bandOf(v)
		if in := influences(c.doubts, c.ranked, v); len(in) > 0 {
			s.Influences[name+" "+tag] = in
		}
	}
}

// decide gives the verdict as run does.
func (s *SpreadResult) decide() {
	if s.Verdict == network.Run && s.Stalls.Share > FailsAllowed {
		s.Verdict = network.TooClose
	}
	if s.Verdict == network.Run {
		for _, l := range s.Limits {
			if l.Verdict == network.TooClose {
				s.Verdict = network.TooClose
			}
		}
	}
	s.ExitCode = exitOf(s.Verdict)
}
