package text

import (
	"fmt"
	"io"
	"strings"

	"headfall/network"
	"headfall/network/study"
)

// Track writes how the day goes: the pace and what the forecast says of the limits; then when it ends now, what the readings look like, and the
// readings beside the plan.
func Track(w io.Writer, r *study.TrackResult, opt Options) error {
	p := asked(w, r.Plant, opt)
	f := &r.Forecast
	rest := "not forecast"
	switch f.Verdict {
	case network.Run:
		rest = "every limit still holds"
	case network.DoNotRun:
		rest = "a limit will fail: " + f.Why
	case network.TooClose:
		rest = "too close to call: " + f.Why
	}
	p.first(pace(r), f.Verdict, rest)
	if opt.Quiet {
		return p.err
	}
	p.about(r.Scenario, r.Ending)
	if f.FailsAt != nil {
		p.put("Fails first", "%s%s", stamp(p.clock.When(*f.FailsAt, Down)), f.Why)
	}
	p.emptyNow(r)
	p.hand("Least margin", f.Tightest)
	p.list("Looks like", r.Suspects)
	p.tracked(r)
	for _, o := range r.Fitted {
		p.put("Forecast with", "%s at %s of its value, as the readings of %s have it", o.Name, keep(soft(percent(o.Factor, Near))), o.Vessel)
	}
	if len(r.Fitted) == 0 && r.Ratio != nil && *r.Ratio < 0.1 {
		p.put("Forecast with", "the rates of the plan, as if it drained from now on")
	}
	if len(r.Done) > 0 {
		p.put("Taken as done", "%s; --done ID=TIME and --not-done ID say otherwise", strings.Join(r.Done, ", "))
	}
	return p.close(r.ExitCode)
}

// emptyNow writes when the last vessel is empty by the forecast.
func (p *page) emptyNow(r *study.TrackResult) {
	f := &r.Forecast
	if f.Finish != nil {
		said := p.clock.When(*f.Finish, Up) + p.band(f.Low, f.High)
		if f.Planned != nil {
			said += "; planned " + keep(p.clock.At(*f.Planned, Up)) + p.shift(*f.Finish-*f.Planned)
		}
		p.put("Empty now by", "%s", said)
	} else if f.Planned != nil && r.Complete {
		p.put("Empty now by", "not within the plan's time; planned %s", keep(p.clock.At(*f.Planned, Up)))
	}
}

// pace puts the rate ratio into words: "RUNNING 18 % SLOW".
func pace(r *study.TrackResult) string {
	switch r.Pace {
	case "slow":
		return fmt.Sprintf("RUNNING %.0f %% SLOW", 100*(1-*r.Ratio))
	case "fast":
		return fmt.Sprintf("RUNNING %.0f %% FAST", 100*(*r.Ratio-1))
	case "on_plan":
		return "ON PLAN"
	case "not_moving":
		return r.By + " IS NOT MOVING"
	}
	return "PACE NOT KNOWN YET"
}

func (p *page) shift(s float64) string {
	switch {
	case s > 30:
		return ", " + keep(Duration(s, Up)+" later")
	case s < -30:
		return ", " + keep(Duration(-s, Down)+" earlier")
	}
	return ""
}

// tracked writes the readings beside the plan.
func (p *page) tracked(r *study.TrackResult) {
	if len(r.Rows) == 0 {
		return
	}
	rows := [][]string{{"Read", "vessel", "reading", "level", "by the plan", "off", "rate"}}
	from := max(0, len(r.Rows)-rowsShown)
	for i, x := range r.Rows[from:] {
		rate := ""
		if v := r.Vessels[x.Vessel]; v != nil && v.RateRatio != nil && lastOf(r.Rows[from+i:], x.Vessel) {
			rate = soft(percent(*v.RateRatio, Near)) + " of that expected"
		}
		rows = append(rows, []string{pad(p.exactly(x.Time), indent-2), x.Vessel, x.Text, p.units.LevelOf(x.Read, Near), p.units.LevelOf(x.Expected, Near),
			fmt.Sprintf("%+.0f mm", 1000*x.Off), rate})
	}
	p.raw("\n" + table(rows, 1, 6) + "\n")
	if from > 0 {
		p.put("", "and %s before", counted(from, "reading", "readings"))
	}
}

func lastOf(rows []study.TrackedReading, vessel string) bool {
	for _, x := range rows[1:] {
		if x.Vessel == vessel {
			return false
		}
	}
	return true
}
