package study

import (
	"fmt"
	"math"

	"headfall/elements"
	"headfall/network"
)

// lineup is a plant at one moment of its plan: where the valves stand and how full the vessels are.
type lineup struct {
	open   map[string]float64
	levels map[string]float64
	mode   map[string]elements.Mode
}

// lineupOf takes the plant at time t of a run: what steps up to then ordered counts as done.
func lineupOf(p *network.Plant, res *network.Result, t float64) lineup {
	s := lineup{open: map[string]float64{}, levels: map[string]float64{}, mode: map[string]elements.Mode{}}
	for i, done := range stepsDone(p, res) {
		if done == nil || *done > t {
			continue
		}
		switch st := p.Steps[i]; st.Action {
		case network.MoveValve:
			s.open[st.Target] = st.To
		case network.SetPump:
			s.mode[st.Target] = st.Mode
		}
	}
	for _, v := range p.Vessels {
		s.levels[v.Tag] = levelAt(res.Series, v.Tag, t)
	}
	return s
}

// levelsAt returns the levels with the vessels that a line drains at a share of the way from their outlet to their level.
func (s *lineup) levelsAt(p *network.Plant, l *network.Line, share float64, r *FlowsResult) map[string]float64 {
	levels := map[string]float64{}
	for tag, h := range s.levels {
		levels[tag] = h
	}
	for _, v := range feeding(p, l) {
		low := outletOf(p, v, l)
		top := s.levels[v.Tag]
		if top <= low+0.01 {
			top = v.RimLevel()
			if share == 1 {
				r.Notes = append(r.Notes, fmt.Sprintf("%s stands at its outlet then; full is its rim", v.Tag))
			}
		}
		levels[v.Tag] = low + share*(top-low)
	}
	return levels
}

// outletOf is the height, m above base, at which a vessel's way to a line leaves it.
func outletOf(p *network.Plant, v *network.Vessel, l *network.Line) float64 {
	if l.From == v.Tag {
		return l.Leaves.Height
	}
	low := math.Inf(1)
	for _, m := range p.Lines {
		if m.From == v.Tag && m.Leaves.Form != network.Crest {
			low = math.Min(low, m.Leaves.Height)
		}
	}
	if math.IsInf(low, 1) {
		return 0
	}
	return low
}

// moment is the time, s, that a plant is run to see what flows: nothing moves in it. Where liquid has to be set going it takes longer.
const (
	blink   = 1e-3
	settles = 30.0
)

// stand makes a plant in which nothing happens: no steps, batches, inflows or upsets, run for a moment with levels of its own.
func (s lineup) stand(load Load, levels map[string]float64) Load {
	return func() (*network.Plant, error) {
		p, err := load()
		if err != nil {
			return nil, err
		}
		p.Steps, p.Upsets, p.Limits, p.Milestones, p.Handover = nil, nil, nil, nil, nil
		p.RunFor = blink
		fluid := p.Liquid.Fluid()
		for _, l := range p.Lines {
			for _, f := range l.Parts {
				if in, ok := f.Part.(elements.Inertial); ok && in.Inertance(&fluid) > 0 {
					p.RunFor = settles
				}
				if d, ok := f.Part.(elements.Pumps); ok {
					if m, set := s.mode[d.Drive().Tag]; set {
						d.Drive().Mode = m
					}
				}
			}
		}
		p.ReportEvery = p.RunFor
		for _, v := range p.Vessels {
			v.Level, v.Inflow, v.Batches, v.Alarms = levels[v.Tag], nil, nil, nil
		}
		return p, p.Refresh()
	}
}
