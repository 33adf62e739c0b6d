package viz

import (
	"html/template"
	"math"
	"strconv"

	"headfall/network"
	"headfall/network/study"
)

// drillView is what goes wrong in rehearsal, the least time to act first.
type drillView struct {
	Count string
	Note  string
	Rows  []drillRow
	Steps [][]string
}

type drillRow struct{ Case, Verdict, Class, First, Limit, Act, Need, Answered, Room string }

func newDrill(d *study.DrillResult, u units, c clock) *drillView {
	if d == nil {
		return nil
	}
	v := &drillView{Count: strconv.Itoa(d.Fails) + " of " + strconv.Itoa(len(d.Cases)) + " rehearsals fail a limit that the plan itself holds, or earlier."}
	if !d.Complete {
		v.Note = "Incomplete: " + strconv.Itoa(d.Done) + " of " + strconv.Itoa(d.Of) + " were calculated. " + d.Trouble
	}
	for _, x := range d.Cases {
		row := drillRow{Case: x.Case, First: c.Opt(x.FirstFail, earlier), Limit: x.Limit, Act: none, Need: none, Answered: x.Answered, Room: none}
		row.Verdict, row.Class = limitWords(&network.LimitResult{Verdict: x.Verdict})
		if x.Verdict == network.Fails && x.AsPlanned {
			row.Verdict, row.Class = "fails as planned", "close"
		}
		if x.TimeToAct != nil {
			row.Act = c.Span(*x.TimeToAct, earlier)
			if x.Since != "" {
				row.Act += " from " + x.Since
			}
		}
		if x.Need != nil {
			row.Need = c.Span(*x.Need, later)
		}
		if x.Headroom != nil {
			row.Room = u.Level.Opt(x.Headroom) + " " + x.WorstVessel
		}
		if x.Spilled > 0 {
			row.Room += ", spills " + u.Volume.Toward(x.Spilled, later)
		}
		if x.Trouble != "" {
			row.Limit = x.Trouble
		}
		v.Rows = append(v.Rows, row)
	}
	for _, s := range d.Steps {
		early, late := c.Opt(s.Earliest, later), c.Opt(s.Latest, earlier)
		if s.Fixed {
			early = "as early as can be"
		}
		if s.Unbounded {
			late = "to the end"
		}
		v.Steps = append(v.Steps, []string{s.Says, c.At(s.At, earlier), early, late})
	}
	return v
}

// spreadView is what the doubts do to the run.
type spreadView struct {
	Count, Any, First string
	Limits            []chanceRow
	Tornados          []tornado
	Bands             [][]string
	Finish            *histogram
}

type chanceRow struct {
	Says, Verdict, Class, Share, Interval, Margin string
	Bar, Whisker                                  template.CSS
}

// tornado ranks the doubts by how much of the spread of one number comes from each.
type tornado struct {
	Of   string
	Rows []tornadoRow
}

type tornadoRow struct {
	What, Doubt, Share, Way string
	Bar                     template.CSS
}

func newSpread(s *study.SpreadResult, plant *network.Plant, u units, c clock) *spreadView {
	if s == nil {
		return nil
	}
	v := &spreadView{Finish: newHistogram(s.Finish, c), Count: strconv.Itoa(s.Samples), Any: percent(s.AnyFails.Share) + " (" + percent(s.AnyFails.Low) + " to " + percent(s.AnyFails.High) + ")"}
	if m := s.Measure; m != nil {
		v.First = m.What + " (" + m.Doubt + "): it makes " + percent(m.Share) + " of the spread of " + m.For
	}
	for _, l := range s.Limits {
		row := chanceRow{Says: l.Says, Share: percent(l.Fails.Share), Interval: percent(l.Fails.Low) + " to " + percent(l.Fails.High)}
		as := &network.LimitResult{Verdict: l.Verdict, Subject: l.Subject, UnitSI: l.UnitSI, MarginLow: l.Margin.Low, MarginHigh: l.Margin.High}
		row.Verdict, row.Class = limitWords(as)
		row.Margin = marginBand(as, u, c)
		row.Bar = template.CSS("left:0%;width:" + css(100*l.Fails.Share))
		row.Whisker = template.CSS("left:" + css(100*l.Fails.Low) + ";width:" + css(100*(l.Fails.High-l.Fails.Low)))
		v.Limits = append(v.Limits, row)
		if len(l.Influences) > 0 && (l.Verdict != network.Holds || l.Fails.Share > 0) {
			v.Tornados = append(v.Tornados, newTornado("margin of "+l.Says, l.Influences))
		}
	}
	for _, x := range plant.Vessels {
		row := []string{x.Tag, none, none}
		if b, ok := s.Bands["emptied_at_s"][x.Tag]; ok && b.Low != nil {
			row[1] = c.At(*b.Low, earlier) + " to " + c.Opt(b.High, later)
			if b.High == nil {
				row[1] = c.At(*b.Low, earlier) + ", not always"
			}
			if in := s.Influences["emptied_at_s "+x.Tag]; len(in) > 0 && len(v.Tornados) < 8 {
				v.Tornados = append(v.Tornados, newTornado("time when "+x.Tag+" is empty", in))
			}
		}
		if b, ok := s.Bands["peak_level_m"][x.Tag]; ok && b.Low != nil && b.High != nil {
			row[2] = u.Level.Toward(*b.Low, earlier) + " to " + u.Level.Toward(*b.High, later)
		}
		v.Bands = append(v.Bands, row)
	}
	return v
}

func percent(x float64) string {
	if p := 100 * x; p > 0 && p < 1 {
		return digits(p, 1) + "\u00a0%"
	}
	return places(100*x, 0) + "\u00a0%"
}

// newTornado draws each share to the side to which the number goes when the doubtful value goes up.
func newTornado(of string, in []study.Influence) tornado {
	t := tornado{Of: of}
	for _, x := range in[:min(len(in), 8)] {
		way, left := "more of it: more", 50.0
		if x.Rank < 0 {
			way, left = "more of it: less", 50-50*math.Min(x.Share, 1)
		}
		t.Rows = append(t.Rows, tornadoRow{x.What, x.Doubt, percent(x.Share), way,
			template.CSS("left:" + css(left) + ";width:" + css(math.Max(50*math.Min(x.Share, 1), 0.4)))})
	}
	return t
}
