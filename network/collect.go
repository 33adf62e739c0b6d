package network

import (
	"math"
	"slices"
	"time"

	"headfall/elements"
)

// result puts together what a run gives back.
func (sim *simulation) result() *Result {
	p := sim.plan
	r := &Result{Schema: 1, Command: "run", Program: Program{"headfall", Version()}, End: sim.t, Stopped: sim.stopped,
		Complete: sim.complete(), unreached: slices.Clone(sim.weigh().Unreached), Series: sim.obs.series,
		Bands: map[string]map[string]Band{}, Assumptions: []Assumption{}, Cautions: []string{}, Handover: []*HandoverBlock{},
		Allowance: Allowance{Doubts: "none"}}
	if sim.trouble != nil {
		r.Trouble = sim.trouble.Error()
	}
	r.Scenario = Scenario{Title: p.Title, Revision: p.Revision, File: p.File, SHA256: p.SHA256}
	if p.Case != "" {
		r.Scenario.Case = &p.Case
	}
	r.Scenario.Start = p.clock(0)
	sim.obs.closeRegimes()
	sim.vesselResults(r)
	sim.lineResults(r)
	sim.outsideResults(r)
	sim.pumpResults(r)
	sim.stepResults(r)
	sim.limitResults(r)
	r.stand()
	sim.alarmResults(r)
	sim.handoverResults(r)
	sim.balance(r)
	sim.finishFlags(r)
	r.LineUp = p.LineUp()
	r.Cautions = cautions(p, r)
	r.decide()
	st := sim.solver.Stats()
	r.Work = Work{Method: sim.method, Steps: st.Steps, Rejected: st.Rejected, Factorisations: st.Factorisations, Evaluations: st.Evaluations, Events: st.Events}
	return r
}

// clock returns the local wall clock t seconds after the start, or nil when the file has no start.
func (p *Plant) clock(t float64) *string {
	if p.Start.IsZero() || math.IsNaN(t) {
		return nil
	}
	s := p.Start.Add(time.Duration(math.Round(t * 1e9))).Format("2006-01-02T15:04:05")
	return &s
}

// opt returns nil for NaN.
func opt(v float64) *float64 {
	if math.IsNaN(v) || math.IsInf(v, 0) {
		return nil
	}
	return &v
}

func (sim *simulation) vesselResults(r *Result) {
	r.Vessels = make(map[string]*VesselResult, len(sim.plan.Vessels))
	o, s := sim.obs, sim.sys
	for i, v := range sim.plan.Vessels {
		st := &s.stations[i]
		vol := sim.y[i]
		level, _ := st.shape.Level(vol)
		e, why := sim.plan.EmptyLevel(v)
		b := &sim.brief.Vessels[i]
		x := &VesselResult{StartLevel: v.StartLevel(), EndLevel: level, StartVolume: v.StartVolume(), EndVolume: vol, Left: math.Max(0, vol), LeftWhy: why,
			PeakLevel: o.level[i].high, PeakAt: o.level[i].highAt, LowLevel: o.level[i].low, LowAt: o.level[i].lowAt,
			EmptyAtLevel: opt(e), EmptiedAt: opt(b.Emptied), Spilled: b.Spilled, PeakSpill: math.Max(0, o.spill[i].high)}
		if x.PeakLevel-x.StartLevel < standing {
			x.PeakAt = 0 // it stood still: what rounding adds is no peak
		}
		x.HeadroomTo.Rim = opt(b.ToRim)
		if sill := sim.plan.Sill(v); !math.IsNaN(sill) {
			x.HeadroomTo.Sill = opt(sill - x.PeakLevel)
		}
		if a := v.lowestAlarm(); !math.IsNaN(a) {
			x.HeadroomTo.Alarm = opt(a - x.PeakLevel)
		}
		x.In, x.Out = sim.inflow(i), 0
		if x.Spilled > 0 {
			x.FirstSpill, x.SpillEnds = opt(o.rims[i].first), opt(o.spilled[i])
		}
		if st.closed {
			x.Gas = sim.gasResult(i)
		}
		r.Vessels[v.Tag] = x
	}
	for k := range s.lines {
		l := &s.lines[k]
		if l.to.kind == toVessel {
			x := r.Vessels[sim.plan.Vessels[l.to.at].Tag]
			x.In, x.Out = x.In+sim.led.forward[k], x.Out+sim.led.backward[k]
		}
		if l.from.kind == toVessel {
			x := r.Vessels[sim.plan.Vessels[l.from.at].Tag]
			x.In, x.Out = x.In+sim.led.backward[k], x.Out+sim.led.forward[k]
		}
	}
	for i := range s.stations {
		st := &s.stations[i]
		if st.spillTo >= 0 {
			r.Vessels[sim.plan.Vessels[st.spillTo].Tag].In += sim.solver.Z()[len(s.lines)+i]
		}
	}
}

// inflow returns what came into vessel i from outside the plant so far, other than by lines, m³.
func (sim *simulation) inflow(i int) float64 {
	if k := sim.sys.stations[i].inflowZ; k >= 0 {
		return sim.solver.Z()[k]
	}
	return 0
}

// lowestAlarm returns the lowest level above which an alarm comes; NaN for none.
func (v *Vessel) lowestAlarm() float64 {
	low := math.NaN()
	for _, a := range v.Alarms {
		if a.When.Subject == Level && a.When.Above && !(a.When.Bound >= low) {
			low = a.When.Bound
		}
	}
	return low
}

// Sill returns the lowest overflow crest of a vessel, m above base; NaN for none. The overflow is a weir, or a line that leaves above the start level.
func (p *Plant) Sill(v *Vessel) float64 {
	low := math.NaN()
	for _, l := range p.meets[v.Tag] {
		if l.From != v.Tag || len(l.Parts) == 0 {
			continue
		}
		if _, ok := l.Parts[0].Part.(elements.Crest); ok && !(l.Leaves.Height >= low) {
			low = l.Leaves.Height
		}
	}
	return low
}

func (sim *simulation) gasResult(i int) *GasResult {
	o := sim.obs
	patm := sim.sys.atmosphere
	g := &GasResult{Low: o.gas[i].low - patm, LowAt: o.gas[i].lowAt, High: o.gas[i].high - patm, HighAt: o.gas[i].highAt}
	if sim.sys.tightNow(i) {
		g.LowAdiabatic = opt(sim.sys.ratedPressure(i, o.gas[i].low) - patm)
		g.HighAdiabatic = opt(sim.sys.ratedPressure(i, o.gas[i].high) - patm)
	}
	return g
}

func (sim *simulation) lineResults(r *Result) {
	r.Lines = make(map[string]*LineResult, len(sim.plan.Lines))
	o, s := sim.obs, sim.sys
	for i, l := range sim.plan.Lines {
		c := &s.lines[i]
		x := &LineResult{Forward: sim.led.forward[i], Backward: sim.led.backward[i], PeakFlow: o.flow[i].high, PeakFlowAt: o.flow[i].highAt,
			LowFlow: o.flow[i].low, LowFlowAt: o.flow[i].lowAt, RunsBackward: []Reversal{}}
		if c.area > 0 {
			x.PeakVelocity = math.Max(math.Abs(x.PeakFlow), math.Abs(x.LowFlow)) / c.area
		}
		for _, b := range sim.led.reversals[i] {
			if b.Volume >= leastBackflow {
				x.RunsBackward = append(x.RunsBackward, b)
			}
		}
		if len(c.crowns) > 0 {
			x.CrestLow, x.CrestLowAt = opt(o.crest[i].low), opt(o.crest[i].lowAt)
		}
		for _, f := range l.Parts {
			if h, ok := f.Part.(elements.Holds); ok {
				x.Holds += h.Holds()
			}
		}
		r.Lines[l.Tag] = x
	}
}

// leastBackflow is the volume, m³, under which a reversal is not reported: 1 L.
const leastBackflow = 1e-3

func (sim *simulation) outsideResults(r *Result) {
	r.Outside = map[string]*OutsideResult{}
	s := sim.sys
	for k, b := range sim.plan.Outside {
		x := &OutsideResult{}
		for i := range s.lines {
			l := &s.lines[i]
			if l.to.outside() && l.to.at == k {
				x.Received += sim.led.forward[i]
				x.Supplied += sim.led.backward[i]
			}
			if l.from.outside() && l.from.at == k {
				x.Received += sim.led.backward[i]
				x.Supplied += sim.led.forward[i]
			}
		}
		x.PeakFlow, x.PeakFlowAt = math.Max(0, sim.obs.inflow[k].high), sim.obs.inflow[k].highAt
		x.OverCapacity = sim.obs.over[k]
		r.Outside[b.Tag] = x
	}
	for i, v := range sim.plan.Vessels {
		if x, ok := r.Outside[v.SpillsTo]; ok {
			x.Received += sim.solver.Z()[len(s.lines)+i]
		}
	}
}

func (sim *simulation) pumpResults(r *Result) {
	r.Pumps = map[string]*PumpResult{}
	for i := range sim.sys.actuators {
		a := &sim.sys.actuators[i]
		if a.kind != aPump {
			continue
		}
		x := &PumpResult{Starts: len(a.starts), Ran: a.ran}
		if a.to > 0 {
			x.Ran += sim.t - a.since
		}
		for k, t := range a.starts {
			n := 0
			for j := k; j >= 0 && a.starts[j] > t-3600; j-- {
				n++
			}
			x.MostInHour = max(x.MostInHour, n)
		}
		r.Pumps[a.tag] = x
	}
}

// leastBalance is the volume, m³, that the balance is measured against where a plant holds less: a litre.
const leastBalance = 1e-3

// balance closes the books: what was there and came in against what went out, spilled and is left.
func (sim *simulation) balance(r *Result) {
	b := &r.Balance
	for i, v := range sim.plan.Vessels {
		b.Start += v.StartVolume()
		b.In += sim.inflow(i)
		b.Left += sim.y[i]
		if sim.sys.stations[i].spillTo < 0 {
			b.Spilled += sim.solver.Z()[len(sim.sys.lines)+i]
		}
	}
	for _, o := range sim.plan.Outside {
		x := r.Outside[o.Tag]
		b.Out += x.Received
		b.In += x.Supplied
	}
	for _, v := range sim.plan.Vessels {
		if _, ok := r.Outside[v.SpillsTo]; ok { // booked as received there and as spilled: count it once
			b.Out -= r.Vessels[v.Tag].Spilled
		}
	}
	b.Relative = math.Abs(b.Start+b.In-b.Out-b.Spilled-b.Left) / math.Max(b.Start+b.In, leastBalance)
}
