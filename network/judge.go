package network

import "math"

// judgement is what became of one limit, in the terms of its bound.
type judgement struct {
	worst, at, first, margin float64 // NaN where there is none
	judged                   bool
}

// judge works out what became of a limit.
func (j *judged) judge(o *observer) judgement {
	switch {
	case j.plan.Must.Subject == Emptied:
		return j.judgeEmptied(o)
	case j.hist != nil:
		return j.judgeSpan(o)
	}
	m := j.track
	if math.IsNaN(m.mostAt) { // its window never opened
		return judgement{worst: math.NaN(), at: math.NaN(), first: math.NaN(), margin: math.NaN(), judged: true}
	}
	worst := m.sign*m.most + m.probe.bound
	if m.probe.subject == Pressure && m.probe.plan.Gauge {
		worst -= o.sim.sys.atmosphere
	}
	return judgement{worst: worst, at: m.mostAt, first: m.first, margin: -m.most, judged: true}
}

func (j *judged) judgeEmptied(o *observer) judgement {
	at := o.emptied[j.vessel].first
	if e, _ := o.sim.plan.EmptyLevel(o.sim.plan.Vessels[j.vessel]); o.sim.plan.Vessels[j.vessel].StartLevel() <= e {
		at = 0
	}
	r := judgement{worst: at, at: at, first: math.NaN(), margin: j.plan.Within.S - at, judged: true}
	if !(at <= j.plan.Within.S) {
		r.first = j.plan.Within.S
		r.judged = o.sim.t >= j.plan.Within.S || o.sim.stopped == "at_rest" || !math.IsNaN(at)
	}
	return r
}

// judgeSpan judges a limit about a span of time on its history.
func (j *judged) judgeSpan(o *observer) judgement {
	h, l := j.hist, j.plan
	bound, sign := j.plan.Must.Bound, 1.0
	if j.plan.Must.Above {
		sign = -1
	}
	from, to := 0.0, o.sim.t
	if l.Since.Given {
		from = o.sim.edgeAt(&l.Since)
	}
	if math.IsNaN(from) { // its window never opened
		return judgement{worst: math.NaN(), at: math.NaN(), first: math.NaN(), margin: math.NaN(), judged: true}
	}
	if t := o.sim.edgeAt(&l.Until); l.Until.Given && !math.IsNaN(t) {
		to = math.Min(to, t)
	}
	var top, at, first float64
	switch {
	case h.kind == hStarts:
		top, at, first = j.starts(o, bound)
	case l.EachDay:
		top, at, first = j.days(o, bound)
	default:
		w := l.AveragedOver
		share := 1 / w
		if l.InAny > 0 {
			w, share = l.InAny, 1
		}
		if l.EachHour {
			w, share = 3600, 1
		}
		if j.plan.Must.Subject == Falling {
			share = -share
		}
		begin := from + w
		if share == 1 { // a volume counts from the start on: what came before is none
			begin = from
		}
		f := func(t float64) float64 { return sign * share * (h.value(t) - h.value(math.Max(from, t-w))) }
		top, at, first = h.most(f, w, begin, to, sign*bound)
	}
	if math.IsInf(top, -1) { // no full window
		return judgement{worst: math.NaN(), at: math.NaN(), first: math.NaN(), margin: math.NaN(), judged: true}
	}
	return judgement{worst: sign * top, at: at, first: first, margin: sign*bound - top, judged: true}
}

// days is the largest volume of a calendar day.
func (j *judged) days(o *observer, bound float64) (top, at, first float64) {
	h := j.hist
	top, at, first = math.Inf(-1), math.NaN(), math.NaN()
	for begins := dayStart(o.sim.plan); begins < o.sim.plan.RunFor; begins += day {
		a, b := math.Max(begins, 0), math.Min(begins+day, o.sim.t)
		if b < a {
			break
		}
		v := h.value(b) - h.value(a)
		if v > top {
			top, at = v, b
		}
		if v > bound && math.IsNaN(first) {
			first = bisect(a, b, true, func(t float64) float64 { return h.value(t) - h.value(a) - bound })
		}
	}
	return top, at, first
}

// starts is the most starts of a pump in any hour, or in a day, or in all.
func (j *judged) starts(o *observer, bound float64) (top, at, first float64) {
	times := o.sim.sys.actuators[j.hist.probe.at[0]].starts
	span := 3600.0
	if j.plan.EachDay {
		span = day
	}
	if j.plan.InAny > 0 {
		span = j.plan.InAny
	}
	top, first = 0, math.NaN()
	for i, t := range times {
		n := 0.0
		for k := i; k >= 0 && times[k] > t-span; k-- {
			n++
		}
		if n > top {
			top, at = n, t
		}
		if n >= bound && math.IsNaN(first) { // a count of so many is not below so many
			first = t
		}
	}
	return top, at, first
}
