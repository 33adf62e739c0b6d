package network

import (
	"cmp"
	"fmt"
	"math"
	"strings"
	"time"

	"headfall/elements/quantity"
)

// judged is a limit made ready: followed by a tracker where it counts at every instant, judged on a history where it is about a span of time.
type judged struct {
	plan     *Limit
	implicit bool // a rim or a rating of a cover
	track    *tracker
	hist     *history
	vessel   int // of an emptied or an implicit limit
}

// pressureSlack is the pressure, Pa, within which a rating is met: rounding is not a failure.
const pressureSlack = 1e-6

// addTrackers builds the limits, milestones, alarms and empty marks.
func (o *observer) addTrackers() error {
	p := o.sim.plan
	for _, l := range p.Limits {
		if err := o.addLimit(&judged{plan: l}); err != nil {
			return err
		}
	}
	for i, v := range p.Vessels {
		why := "its rim"
		if st := &o.sim.sys.stations[i]; st.closed && len(st.vents) == 0 {
			why = "full and sealed"
		}
		top := Condition{Subject: Level, Of: []string{v.Tag}}
		if err := o.addLimit(implicitLimit(i, top, why)); err != nil {
			return err
		}
		o.rims = append(o.rims, o.limits[len(o.limits)-1].track)
		if c := v.Cover; c != nil {
			rating := Condition{Subject: Pressure, Of: []string{v.Tag}, Gauge: true}
			if !math.IsNaN(c.Vacuum) {
				low := rating
				low.Above = true
				if err := o.addLimit(implicitLimit(i, low, "vacuum it withstands")); err != nil {
					return err
				}
			}
			if !math.IsNaN(c.Overpress) {
				if err := o.addLimit(implicitLimit(i, rating, "pressure it withstands")); err != nil {
					return err
				}
			}
		}
	}
	if err := o.addMoments(); err != nil {
		return err
	}
	o.readNumbers()
	return nil
}

// readNumbers takes over the plan's numbers as they are now.
func (o *observer) readNumbers() {
	s := o.sim.sys
	for _, w := range []*snapshot{&o.prev, &o.mid, &o.now, &o.sample} {
		for i := range w.gas {
			w.gas[i] = s.atmosphere
		}
	}
	for _, j := range o.limits {
		if j.implicit {
			j.plan.Must.Bound = o.ownBound(j)
		}
		switch {
		case j.hist != nil:
			j.hist.probe.readBound(s)
		case j.track != nil && j.plan.Permitted:
			j.track.window.allowed = permitted(o.sim.plan, j.plan)
		case j.track != nil:
			j.track.probe.readBound(s)
		}
	}
	for _, list := range [][]*moment{o.milestones, o.emptied, o.alarms} {
		for _, m := range list {
			m.probe.readBound(s)
		}
	}
}

// ownBound returns the bound that a vessel itself has.
func (o *observer) ownBound(j *judged) float64 {
	v, st := o.sim.plan.Vessels[j.vessel], &o.sim.sys.stations[j.vessel]
	switch must := &j.plan.Must; {
	case must.Subject == Pressure && must.Above:
		return -v.Cover.Vacuum
	case must.Subject == Pressure:
		return v.Cover.Overpress
	case st.closed && len(st.vents) == 0:
		return st.rim
	}
	return v.RimLevel()
}

// write puts the bound of an implicit limit into words.
func (j *judged) write(show *Show) {
	must := &j.plan.Must
	switch {
	case !j.implicit:
	case must.Subject == Level:
		must.Text = own(must.Bound, quantity.Length, show.Level)
	default:
		must.Text = own(must.Bound, quantity.Pressure, cmp.Or(show.Pressure, "mbar"))
	}
}

// own writes a bound that the vessel itself has, without figures that say nothing.
func own(si float64, dim quantity.Dim, unit string) string {
	number, name, _ := strings.Cut(quantity.Format(si, dim, unit, 4), " ")
	if strings.Contains(number, ".") {
		number = strings.TrimRight(strings.TrimRight(number, "0"), ".")
	}
	return number + " " + name
}

func implicitLimit(vessel int, c Condition, why string) *judged {
	return &judged{plan: &Limit{Must: c, Why: why}, implicit: true, vessel: vessel}
}

// addLimit makes a limit ready.
func (o *observer) addLimit(j *judged) error {
	sim, l := o.sim, j.plan
	o.limits = append(o.limits, j)
	p, err := sim.sys.newProbe(&l.Must)
	if err != nil {
		return fmt.Errorf("limit %d: %w", len(o.limits), err)
	}
	if l.Must.Subject == Emptied {
		j.vessel = p.at[0]
		return nil
	}
	if l.AveragedOver > 0 || l.EachDay || l.EachHour || l.InAny > 0 {
		j.hist = newHistory(sim, p)
		if j.hist != nil {
			o.histories = append(o.histories, j.hist)
		}
		return nil
	}
	j.track = newTracker(p, !j.plan.Must.Above) // what breaks "below" is being above
	switch l.Must.Subject {
	case Pressure:
		j.track.slack = pressureSlack
		p.rating = j.implicit
	case Flow:
		j.track.slack = 1e-12
	case Starts:
		j.track.slack = -0.5 // a count of so many is not below so many
	default:
		j.track.slack = 1e-9
	}
	if l.Permitted {
		p.bound = 0
		j.track.sign = 1
		j.track.slack = permitSlack
		j.track.window = &window{inverse: true}
	} else if l.Since.Given || l.Until.Given {
		j.track.window = &window{since: &l.Since, until: &l.Until}
	}
	o.trackers = append(o.trackers, j.track)
	return nil
}

// permitSlack is the flow, m³/s, that counts as none outside permitted hours: 0.4 L/h.
const permitSlack = 1e-7

// permitted returns the spans of the run within which flow is permitted, day by day.
func permitted(p *Plant, l *Limit) (spans [][2]float64) {
	a, b := l.OnlyBetween[0].S, l.OnlyBetween[1].S
	for b <= a {
		b += day
	}
	for k := -math.Ceil(math.Abs(a)/day) - 1; a+k*day < p.RunFor; k++ {
		spans = append(spans, [2]float64{a + k*day, b + k*day})
	}
	return spans
}

// moment is a time to report.
type moment struct {
	*tracker
	name   string
	vessel int
	alarm  *Alarm
}

// addMoments follows milestones, empty marks and alarms.
func (o *observer) addMoments() error {
	sim := o.sim
	add := func(c *Condition, name string) (*moment, error) {
		p, err := sim.sys.newProbe(c)
		if err != nil {
			return nil, err
		}
		m := &moment{tracker: newTracker(p, p.above), name: name}
		o.trackers = append(o.trackers, m.tracker)
		return m, nil
	}
	for _, s := range sim.plan.Milestones {
		m, err := add(&s.When, s.Name)
		if err != nil {
			return fmt.Errorf("milestone %s: %w", s.Name, err)
		}
		o.milestones = append(o.milestones, m)
	}
	for i, v := range sim.plan.Vessels {
		m, err := add(&Condition{Subject: Emptied, Of: []string{v.Tag}}, v.Tag)
		if err != nil {
			return err
		}
		o.emptied = append(o.emptied, m)
		for _, a := range v.Alarms {
			m, err := add(&a.When, a.Name)
			if err != nil {
				return fmt.Errorf("alarm %s of %s: %w", a.Name, v.Tag, err)
			}
			m.vessel, m.alarm = i, a
			o.alarms = append(o.alarms, m)
		}
	}
	return nil
}

// day is a calendar day, s.
const day = 86400

// dayStart returns when, s from the start, the calendar day of the start began: at or before 0.
func dayStart(p *Plant) float64 {
	if p.Start.IsZero() {
		return 0
	}
	midnight := time.Date(p.Start.Year(), p.Start.Month(), p.Start.Day(), 0, 0, 0, 0, p.Start.Location())
	return -p.Start.Sub(midnight).Seconds()
}
