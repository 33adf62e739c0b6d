package network

import (
	"fmt"
	"math"
	"sort"

	"headfall/elements/quantity"
)

// record is what was seen when a step acted.
type record struct {
	levels, flows map[string]float64
	from          float64 // travel before
	vessel        int     // that is read
	read          float64 // its level at the check; NaN
	readAt        float64
}

// noteStep keeps what is seen as step i acts, and arranges its reading.
func (c *control) noteStep(i int, t float64) {
	sim := c.sim
	st := &c.steps[i]
	st.seen = record{levels: sim.levelsNow(), flows: sim.flowsNow(), from: math.NaN(), read: math.NaN()}
	if k, ok := sim.sys.actuatorAt[st.plan.Target]; ok && st.plan.Action == MoveValve {
		st.seen.from = sim.sys.actuators[k].at(t)
	}
	if v, ok := sim.sys.vesselAt[st.plan.Read]; ok {
		after := st.plan.CheckAfter
		if math.IsNaN(after) {
			after = 0
		}
		st.seen.readAt, st.seen.vessel = t+after, v
		c.schedule(timed{at: t + after, what: readLevel, k: i})
	}
}

// readLevel takes the reading of step i.
func (c *control) readLevel(i int) {
	seen := &c.steps[i].seen
	seen.read, _ = c.sim.sys.stations[seen.vessel].shape.Level(c.sim.y[seen.vessel])
}

func (sim *simulation) levelsNow() map[string]float64 {
	if !sim.obs.keep {
		return nil
	}
	m := make(map[string]float64, len(sim.plan.Vessels))
	for i, v := range sim.plan.Vessels {
		m[v.Tag], _ = v.Shape.Level(sim.y[i])
	}
	return m
}

func (sim *simulation) flowsNow() map[string]float64 {
	if !sim.obs.keep {
		return nil
	}
	m := make(map[string]float64, len(sim.plan.Lines))
	for i, l := range sim.plan.Lines {
		m[l.Tag] = sim.obs.now.q[i]
	}
	return m
}

func (sim *simulation) stepResults(r *Result) {
	r.Steps, r.Holds = []*StepResult{}, []*HoldResult{}
	for i := range sim.control.steps {
		st := &sim.control.steps[i]
		p := st.plan
		if p.Action == HoldPoint {
			h := &HoldResult{ID: p.ID, Says: p.Says(0), Who: p.Who, UpTo: p.UpTo}
			if sim.came(st) {
				h.At = opt(st.due - sim.changes.wait(p))
			}
			sim.flagUnreached(st, h.Says)
			r.Holds = append(r.Holds, h)
			continue
		}
		x := &StepResult{ID: p.ID, Says: p.Says(st.seen.from), Who: p.Who, Note: p.Note, Levels: st.seen.levels, Flows: st.seen.flows}
		if !math.IsInf(st.due, 0) {
			x.Due = opt(st.due)
		} else if p.At.Given && p.When == nil && p.After == "" {
			x.Due = opt(p.At.S + p.Wait)
		}
		x.Done, x.MovedBy = opt(st.done), opt(st.movedBy)
		if x.Done != nil {
			x.Clock = sim.plan.clock(st.done)
		}
		if x.Levels == nil {
			x.Levels, x.Flows = map[string]float64{}, map[string]float64{}
		}
		if p.Read != "" && !math.IsNaN(st.seen.read) {
			x.Expect = &Expect{Read: p.Read, At: st.seen.readAt, Low: st.seen.read, Mid: st.seen.read, High: st.seen.read}
		}
		if p.StopIf != nil {
			x.StopIf = p.StopIf.Says()
		}
		if k, ok := sim.sys.actuatorAt[p.Target]; ok && p.Action == MoveValve {
			v := sim.sys.actuators[k].valve
			x.Where = v.Location
			if v.Turns > 0 {
				x.Turns = opt(p.To * v.Turns)
			}
		}
		sim.flagUnreached(st, x.Says)
		r.Steps = append(r.Steps, x)
	}
}

// came tells that a step was done; people wait at a hold, be it signed within the run or not.
func (sim *simulation) came(st *stepState) bool {
	if st.plan.Action == HoldPoint {
		return st.due-sim.changes.wait(st.plan) <= sim.t
	}
	return !math.IsNaN(st.done)
}

// unreached tells that a step or hold did not come, where that is a failure.
func (sim *simulation) unreached(st *stepState) bool {
	return !sim.came(st) && !st.plan.Optional && !sim.changes.Missed[st.plan.ID] && sim.complete()
}

// flagUnreached flags a step that did not come.
func (sim *simulation) flagUnreached(st *stepState, says string) {
	if !sim.unreached(st) {
		return
	}
	if f := sim.flag("step_never_reached", st.plan.ID, sim.t, "give it a time, or mark it optional"); f != nil {
		f.Says = fmt.Sprintf("step %s (%s) was never reached: %s", st.plan.ID, says, st.plan.waitsFor())
	}
}

// waitsFor says what a step waits for.
func (st *Step) waitsFor() string {
	switch {
	case st.When != nil:
		return st.When.Says() + " did not come"
	case st.After != "":
		return "it waits for " + st.After
	}
	return "the run ends before its time"
}

func (sim *simulation) limitResults(r *Result) {
	r.Limits, r.Milestones = []*LimitResult{}, []*MilestoneResult{}
	for i, j := range sim.obs.limits {
		v := &sim.brief.Limits[i]
		j.write(&sim.plan.Show)
		x := &LimitResult{ID: i + 1, Subject: j.plan.Must.Subject.String(), Of: j.plan.Must.Of, Bound: "below", BoundSI: opt(j.plan.Must.Bound), UnitSI: j.plan.Must.Subject.Unit(),
			AsWritten: j.plan.Must.Text, Says: j.plan.Says(), Worst: opt(v.Worst), WorstAt: opt(v.WorstAt), Margin: opt(v.Margin), FirstFail: opt(v.FirstFail),
			Verdict: v.Verdict, Implicit: j.implicit, Why: j.plan.Why}
		if j.plan.Must.Above {
			x.Bound = "above"
		}
		if j.plan.Must.Subject == Emptied {
			x.Bound, x.BoundSI, x.AsWritten = "within", opt(j.plan.Within.S), j.plan.Within.Text
			if j.plan.Within.Clock {
				x.Bound = "by"
			}
		}
		if j.plan.Permitted {
			x.Bound, x.BoundSI = "only_between", nil
			x.AsWritten = j.plan.OnlyBetween[0].Text + " to " + j.plan.OnlyBetween[1].Text
		}
		x.Window = sim.windowOf(j.plan)
		if x.FirstFail != nil {
			x.FailsShare = 1
		}
		r.Limits = append(r.Limits, x)
	}
	for i, m := range sim.obs.milestones {
		r.Milestones = append(r.Milestones, &MilestoneResult{Name: m.name, At: opt(sim.brief.Milestones[i])})
	}
}

func (sim *simulation) windowOf(l *Limit) [2]*float64 {
	zero := 0.0
	w := [2]*float64{&zero, nil}
	if l.Since.Given {
		w[0] = opt(sim.edgeAt(&l.Since))
	}
	if l.Until.Given {
		w[1] = opt(sim.edgeAt(&l.Until))
	}
	return w
}

// alarmResults reports alarms: when they came, when the level reached what they protect (the lowest level limit, sill or rim over the alarm),
// and what their response needs.
func (sim *simulation) alarmResults(r *Result) {
	r.Alarms = []*AlarmResult{}
	for i, m := range sim.obs.alarms {
		v, b := sim.plan.Vessels[m.vessel], &sim.brief.Alarms[i]
		x := &AlarmResult{Vessel: v.Tag, Name: m.name, At: opt(b.At), Need: opt(b.Need)}
		for i, j := range sim.obs.limits {
			l := r.Limits[i]
			if j.plan.Must.Subject != Level || j.plan.Must.Above == m.alarm.When.Above || j.plan.Must.Of[0] != v.Tag || l.FirstFail == nil {
				continue
			}
			if beyond := j.plan.Must.Bound - m.alarm.When.Bound; m.alarm.When.Above && beyond < alarmGap || !m.alarm.When.Above && beyond > -alarmGap {
				continue // the alarm itself written as a limit: what it protects lies beyond
			}
			if x.LimitAt == nil || *l.FirstFail < *x.LimitAt {
				x.LimitAt = l.FirstFail
			}
		}
		if x.At != nil && x.LimitAt != nil {
			x.Have = opt(*x.LimitAt - *x.At)
		}
		x.Says = saysAlarm(x)
		r.Alarms = append(r.Alarms, x)
	}
}

// alarmGap is the least distance, m, between an alarm and a limit that it protects.
const alarmGap = 1e-3

func saysAlarm(x *AlarmResult) string {
	switch {
	case x.At == nil:
		return "does not come"
	case x.Have == nil && x.Need != nil:
		return "comes; no limit follows; the response needs " + quantity.FormatDuration(*x.Need)
	case x.Have == nil:
		return "comes; no limit follows"
	case x.Need == nil:
		return "have " + quantity.FormatDuration(math.Floor(*x.Have)) + "; no response stated"
	case *x.Have >= *x.Need:
		return fmt.Sprintf("have %s, need %s: enough", quantity.FormatDuration(math.Floor(*x.Have)), quantity.FormatDuration(math.Ceil(*x.Need)))
	}
	return fmt.Sprintf("have %s, need %s: SHORT", quantity.FormatDuration(math.Floor(*x.Have)), quantity.FormatDuration(math.Ceil(*x.Need)))
}

// finishFlags adds what follows from the results, and puts all flags in the order of time.
func (sim *simulation) finishFlags(r *Result) {
	p := sim.plan
	for _, v := range p.Vessels {
		if x := r.Vessels[v.Tag]; x.Spilled > 0 {
			to := v.SpillsTo
			if to == "" {
				to = "the floor"
			}
			vol := x.Spilled
			if sim.breached(v) {
				sim.flags = append(sim.flags, sim.breachFlag(v, x))
				continue
			}
			from, until := x.PeakAt, x.PeakAt
			if x.FirstSpill != nil && x.SpillEnds != nil { // not seen at the ends of steps where next to nothing spilled
				from, until = *x.FirstSpill, *x.SpillEnds
			}
			sim.flags = append(sim.flags, &Flag{Kind: "overtopped", Where: v.Tag, From: from, To: until, Size: &vol,
				Says: fmt.Sprintf("%s overtops: %s over the rim to %s", v.Tag, quantity.Format(vol, quantity.Volume, p.Show.Volume, 3), to), Do: "shut what fills it, or open what empties it, before then"})
		}
	}
	for _, o := range p.Outside {
		if x := r.Outside[o.Tag]; x.OverCapacity > 0 {
			vol := x.OverCapacity
			sim.flags = append(sim.flags, &Flag{Kind: "over_gully_capacity", Where: o.Tag, From: x.PeakFlowAt, To: x.PeakFlowAt, Size: &vol,
				Says: fmt.Sprintf("%s takes up to %s, more than it can carry; %s too much", o.Tag, quantity.Format(x.PeakFlow, quantity.Flow, p.Show.Flow, 3), quantity.Format(vol, quantity.Volume, p.Show.Volume, 3)),
				Do:   "throttle what runs there"})
		}
	}
	for _, l := range p.Lines {
		for _, b := range r.Lines[l.Tag].RunsBackward {
			vol := b.Volume
			sim.flags = append(sim.flags, &Flag{Kind: "ran_backwards", Where: l.Tag, From: b.From, To: b.To, Size: &vol,
				Says: fmt.Sprintf("liquid runs back through %s from %s to %s: %s", l.Tag, l.To, l.From, quantity.Format(vol, quantity.Volume, p.Show.Volume, 3)), Do: "shut it while the header stands higher"})
		}
	}
	sim.ratingFlags(r)
	r.Flags = append([]*Flag{}, sim.flags...)
	sort.SliceStable(r.Flags, func(i, j int) bool { return r.Flags[i].From < r.Flags[j].From })
}

// ratingFlags flags covers taken beyond what they withstand, judged on the adiabatic extremes where the gas space is tight, and velocities.
func (sim *simulation) ratingFlags(r *Result) {
	for i, j := range sim.obs.limits {
		x := r.Limits[i]
		if x.Verdict != Fails {
			continue
		}
		switch {
		case j.implicit && j.plan.Must.Subject == Pressure && j.plan.Must.Above:
			sim.flagRating("vacuum_rating", j.plan.Must.Of[0], *x.FirstFail, "%s passes the vacuum that it withstands", "prove the vent open by sight before its drain is opened")
		case j.implicit && j.plan.Must.Subject == Pressure:
			sim.flagRating("pressure_rating", j.plan.Must.Of[0], *x.FirstFail, "%s passes the pressure that it withstands", "prove the vent open by sight before it is filled")
		case j.plan.Must.Subject == Velocity:
			sim.flagRating("velocity", j.plan.Must.Of[0], *x.FirstFail, "the velocity in %s passes its limit", "throttle it")
		}
	}
}

func (sim *simulation) flagRating(kind, where string, t float64, says, do string) {
	if f := sim.flag(kind, where, t, do); f != nil {
		f.Says = fmt.Sprintf(says, where)
	}
}
