package network

import (
	"fmt"
	"math"
	"strings"

	"headfall/elements"
	"headfall/elements/quantity"
)

// Says writes a step as an order, verb first; from is the travel of its valve before, NaN when not known.
func (st *Step) Says(from float64) string {
	switch st.Action {
	case MoveValve:
		return saysValve(st, from)
	case SetPump:
		switch st.Mode {
		case elements.On:
			return "START " + st.Target
		case elements.Off:
			return "STOP " + st.Target
		}
		return fmt.Sprintf("SET %s to %s", st.Target, st.Mode)
	case SetInflow:
		if st.To == 0 {
			return "STOP the inflow of " + st.Target
		}
		return fmt.Sprintf("SET the inflow of %s to %s", st.Target, st.ToText)
	case SetVent:
		if st.To > 0 {
			return "OPEN vent " + st.Target
		}
		return "SHUT vent " + st.Target
	case CancelBatch:
		return "CANCEL batch " + st.Target
	}
	return "HOLD: " + st.Hold
}

func saysValve(st *Step, from float64) string {
	over := ""
	if !math.IsNaN(st.Over) && st.Over > 0 {
		over = ", over " + quantity.FormatDuration(st.Over)
	}
	switch {
	case st.To == 0:
		return "SHUT " + st.Target + over
	case st.To >= 1:
		return "OPEN " + st.Target + " fully" + over
	case st.To < from:
		return fmt.Sprintf("THROTTLE %s to %s%s", st.Target, Percent(st.To), over)
	}
	return fmt.Sprintf("OPEN %s to %s%s", st.Target, Percent(st.To), over)
}

// Percent writes a share.
func Percent(x float64) string {
	return strings.TrimSuffix(strings.TrimRight(fmt.Sprintf("%.1f", 100*x), "0"), ".") + " %"
}

// position writes the travel of a valve.
func position(x float64) string {
	switch {
	case x <= 0:
		return "shut"
	case x >= 1:
		return "open"
	}
	return Percent(x)
}

// Says writes a condition: "level of SUMP above 1.9 m".
func (c *Condition) Says() string {
	side := "below"
	if c.Above {
		side = "above"
	}
	of := strings.Join(c.Of, " and ")
	if c.Subject == Emptied {
		return of + " emptied"
	}
	what, own := spoken[c.Subject]
	if !own {
		what = c.Subject.String() + " of"
	}
	return fmt.Sprintf("%s %s %s %s", what, of, side, c.Text)
}

// spoken is how a subject is spoken of where its word in the file makes no sentence.
var spoken = map[Subject]string{Passed: "volume through", Backflow: "backflow through", Spilled: "volume spilled from", CrestHead: "head at the high point of"}

// Says writes a limit as what must hold.
func (l *Limit) Says() string {
	s := l.Must.Says()
	switch {
	case l.Must.Subject == Emptied:
		s += " by " + l.Within.Text
		if !l.Within.Clock {
			s = l.Must.Says() + " within " + l.Within.Text
		}
	case l.Permitted:
		s = fmt.Sprintf("flow of %s only between %s and %s", strings.Join(l.Must.Of, " and "), l.OnlyBetween[0].Text, l.OnlyBetween[1].Text)
	}
	switch {
	case l.AveragedOver > 0:
		s += ", averaged over " + quantity.FormatDuration(l.AveragedOver)
	case l.EachDay:
		s += ", each day"
	case l.EachHour:
		s += ", each hour"
	case l.InAny > 0:
		s += ", in any " + quantity.FormatDuration(l.InAny)
	}
	return s
}

// LineUp returns the position that every valve, pump and vent must have before the first step, each once, in the order of the file.
func (p *Plant) LineUp() []LineUpRow {
	rows := []LineUpRow{}
	for _, l := range p.Lines {
		for _, f := range l.Parts {
			switch part := f.Part.(type) {
			case elements.Actuated:
				a := part.Actuator()
				rows = append(rows, LineUpRow{Valve: a.Tag, Position: position(a.Open), Where: a.Location, Kind: "valve", Opens: p.secondPath(l, a)})
			case elements.Pumps:
				d := part.Drive()
				rows = append(rows, LineUpRow{Valve: d.Tag, Position: d.Mode.String(), Kind: "pump"})
			case elements.Humps:
				if v := part.Crown().Vent; v.Given {
					x := 0.0
					if v.Open {
						x = 1
					}
					rows = append(rows, LineUpRow{Valve: v.Tag, Position: position(x), Kind: "vent"})
				}
			}
		}
	}
	for _, v := range p.Vessels {
		if v.Cover == nil {
			continue
		}
		for _, w := range v.Cover.Vents {
			pos := "clear"
			if w.Blocked > 0 {
				pos = Percent(w.Blocked) + " blocked"
			}
			rows = append(rows, LineUpRow{Valve: w.Tag, Position: pos, Where: v.Tag, Kind: "vent"})
		}
	}
	return rows
}
