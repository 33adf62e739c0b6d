package network

import "math"

// answer is what was done about an alarm.
type answer struct {
	at   float64 // s at which the valve or pump was reached
	from float64 // travel of the valve then; NaN for a pump
	stem float64 // s that its move takes
}

// addResponses watches the alarms that people answer: after the time to notice and to walk, the valve is moved, or the pump set. What was answered
// stays as it was left: the plan for it ends there.
func (w *watcher) addResponses() error {
	sim := w.sim
	clear(sim.answers)
	if !sim.changes.Respond {
		return nil
	}
	for i, v := range sim.plan.Vessels {
		for _, a := range v.Alarms {
			if a.Response == nil {
				continue
			}
			p, err := sim.sys.newProbe(&a.When)
			if err != nil {
				return err
			}
			heard := false
			hear := func(t float64) {
				heard = true
				sim.control.schedule(timed{at: t + a.Response.Detect + a.Response.Walk, what: answerAlarm, alarm: a})
			}
			dir := -1
			if p.above {
				dir = 1
			}
			if a.When.Subject == Level && float64(dir)*(sim.startLevel(i)-a.When.Bound) > 0 {
				hear(0)
			}
			w.triggers = append(w.triggers, trigger{
				value:  func(s *snapshot) float64 { return p.value(sim, s) },
				active: func() bool { return !heard },
				fire:   hear,
				dir:    dir, sees: p.views(sim.sys), levels: p.ofLevels(), jumps: true,
			})
		}
	}
	return nil
}

func (sim *simulation) startLevel(i int) float64 { return sim.plan.Vessels[i].StartLevel() }

// answer does what an alarm asks for.
func (c *control) answer(alarm *Alarm, t float64) {
	r, s := alarm.Response, c.sim.sys
	done := &answer{at: t, from: math.NaN()}
	c.sim.answers[alarm] = done
	if k, ok := s.actuatorAt[r.Valve]; ok {
		a := &s.actuators[k]
		done.from = a.at(t)
		done.stem = a.moveTo(t, r.To, math.NaN()) - t
		a.stuck = a.to
	}
	if k, ok := s.actuatorAt[r.Pump]; ok {
		c.setPump(k, r.Mode, t)
	}
}
