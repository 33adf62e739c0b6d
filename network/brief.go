package network

import "math"

// Brief is what is judged of a run, in bare numbers; NaN stands for what never came. Vessels are in the order of the plant, all else in that of a Result. A
// model has one, which its next run fills anew.
type Brief struct {
	Complete   bool
	Vessels    []VesselBrief
	Steps      []StepBrief
	Limits     []LimitBrief
	Milestones []float64 // s
	Alarms     []AlarmBrief
	Unreached  []string // steps that are not optional and never came
}

type VesselBrief struct {
	Peak    float64 // level, m
	ToRim   float64 // m, from the peak; negative when passed
	Emptied float64 // s
	End     float64 // m³
	Spilled float64 // m³
}

type StepBrief struct {
	Done float64 // s
	Read float64 // the level to be read after it, m
}

type LimitBrief struct {
	Verdict                           Verdict // Holds, Fails or NotJudged
	Worst, WorstAt, Margin, FirstFail float64
}

type AlarmBrief struct {
	At   float64 // s
	Need float64 // s that its response needs; NaN without one
}

// Holds tells that every limit holds and every step was reached.
func (b *Brief) Holds() bool {
	for i := range b.Limits {
		if b.Limits[i].Verdict != Holds {
			return false
		}
	}
	return len(b.Unreached) == 0
}

// complete tells that the run came to its end.
func (sim *simulation) complete() bool { return sim.stopped == "time" || sim.stopped == "at_rest" }

// weigh works out what is judged of the run.
func (sim *simulation) weigh() *Brief {
	b := &sim.brief
	b.Complete = sim.complete()
	b.Vessels, b.Steps, b.Limits, b.Milestones = b.Vessels[:0], b.Steps[:0], b.Limits[:0], b.Milestones[:0]
	b.Alarms, b.Unreached = b.Alarms[:0], b.Unreached[:0]
	for i, v := range sim.plan.Vessels {
		x := VesselBrief{Peak: sim.obs.level[i].high, Emptied: math.NaN(), End: sim.y[i], Spilled: sim.solver.Z()[len(sim.sys.lines)+i]}
		x.ToRim = v.RimLevel() - x.Peak
		if e, _ := sim.plan.EmptyLevel(v); v.StartLevel() > e {
			x.Emptied = sim.obs.emptied[i].first
		}
		b.Vessels = append(b.Vessels, x)
	}
	for i := range sim.control.steps {
		st := &sim.control.steps[i]
		if st.plan.Action != HoldPoint {
			b.Steps = append(b.Steps, StepBrief{st.done, st.seen.read})
		}
		if sim.unreached(st) {
			b.Unreached = append(b.Unreached, st.plan.ID)
		}
	}
	for _, j := range sim.obs.limits {
		v := j.judge(sim.obs)
		x := LimitBrief{Holds, finite(v.worst), finite(v.at), finite(v.margin), finite(v.first)}
		switch {
		case !math.IsNaN(x.FirstFail):
			x.Verdict = Fails
		case !v.judged || !b.Complete:
			x.Verdict = NotJudged
		}
		b.Limits = append(b.Limits, x)
	}
	for _, m := range sim.obs.milestones {
		b.Milestones = append(b.Milestones, m.first)
	}
	for _, m := range sim.obs.alarms {
		b.Alarms = append(b.Alarms, AlarmBrief{m.first, sim.need(m.alarm)})
	}
	return b
}

// finite makes NaN of what is beyond every number.
func finite(v float64) float64 {
	if math.IsInf(v, 0) {
		return math.NaN()
	}
	return v
}

// need returns the time, s, that the response to an alarm takes; NaN where none is stated.
func (sim *simulation) need(alarm *Alarm) float64 {
	a := alarm.Response
	if a == nil {
		return math.NaN()
	}
	need := a.Detect + a.Walk
	if done := sim.answers[alarm]; done != nil {
		return need + done.stem
	}
	if k, ok := sim.sys.actuatorAt[a.Valve]; ok {
		need += math.Abs(sim.sys.actuators[k].at(sim.t)-a.To) * sim.sys.actuators[k].valve.Stroke
	}
	return need
}
