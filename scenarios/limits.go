package scenarios

import (
	"slices"

	"headfall/elements"
	"headfall/elements/quantity"
	"headfall/network"
)

// limit is a limit as it is being read.
type limit struct {
	*network.Limit
	must   bound
	each   string
	hours  *node
	by     *node
	within *node
}

var eachWords = []string{"day", "hour"}

// limit reads one limit.
func (d *decoder) limit(n *node) {
	l := &limit{Limit: &network.Limit{Place: n.at}}
	l.must.to = &l.Must
	whole := d.mapping(n, "limit", "", d.limitFields(l))
	l.must.typo = !whole
	if n.form == mapping && d.wholeLimit(l, n) && d.window(l, n) && whole {
		d.plant.Limits = append(d.plant.Limits, l.Limit)
	}
}

func (d *decoder) limitFields(l *limit) []field {
	own := []field{
		d.freeText(&l.Why, "why", elements.Optional, "what it protects"),
		d.plainNumber(&l.AveragedOver, "averaged_over", quantity.Time, elements.Optional, "the mean over this time is judged", elements.Positive),
		d.word(&l.each, "each", elements.Optional, "volumes by calendar day, starts in any hour", eachWords...),
		d.plainNumber(&l.InAny, "in_any", quantity.Time, elements.Optional, "volume in any such time", elements.Positive),
		{key: "only_between", help: "two clock times outside which nothing may flow, every day", written: &writing{style: aList, item: &writing{style: aMoment}, least: 2},
			read: func(n *node, _ string) {
				if d.hours(n, "only_between", &l.OnlyBetween) {
					l.Permitted, l.hours = true, n
				}
			}},
		d.momentNode(&l.Within, "within", "emptied within this time from the start", &l.within),
		d.momentNode(&l.Within, "by", "emptied by this time", &l.by),
		d.edgeField(&l.Since, "since", "from when it holds: a time, {after: id} or a condition"),
		d.edgeField(&l.Until, "until", "to when it holds"),
	}
	return append(d.conditionFields(&l.must), own...)
}

func (d *decoder) momentNode(m *network.Moment, key, help string, to **node) field {
	f := d.momentField(m, key, elements.Optional, help)
	read := f.read
	f.read = func(n *node, _ string) { read(n, ""); *to = n }
	return f
}

// edgeField reads one end of a limit's window.
func (d *decoder) edgeField(e *network.Edge, key, help string) field {
	return field{key: key, help: help, written: &writing{style: aMoment, or: &writing{style: aCondition, words: []string{"after"}}}, read: func(n *node, _ string) {
		switch {
		case n.form == scalar:
			e.At, e.Given = d.moment(n, key)
		case n.get("after") != nil:
			e.Given = d.mapping(n, key, "", []field{d.tagField(&e.After, "after", elements.Required, "", aStep, aHold)})
		default:
			e.When = d.condition(n, key)
			e.Given = e.When != nil
		}
	}}
}

// wholeLimit checks that a limit says one thing.
func (d *decoder) wholeLimit(l *limit, n *node) bool {
	if n.get("only_between") != nil {
		return d.permitted(l, n)
	}
	if !d.finish(n, "limit", &l.must) {
		return false
	}
	emptied := l.Must.Subject == network.Emptied
	switch {
	case emptied && l.by == nil && l.within == nil:
		d.problem(n, "emptied needs within or by", `e.g. within: 4 h, or by: "10:00"`)
		return false
	case l.by != nil && l.within != nil:
		d.problem(l.by, "limit has within and by: only one of them can hold", "leave one of them out")
		return false
	case !emptied && (l.by != nil || l.within != nil):
		d.problem(first(l.by, l.within), "within and by go with emptied only", "until: ends a limit's time")
		return false
	case l.within != nil && l.Within.Clock:
		d.problem(l.within, "within is a duration", `a clock time is written by: "`+l.Within.Text+`"`)
		return false
	}
	return true
}

// permitted checks a limit on the hours in which something may flow.
func (d *decoder) permitted(l *limit, n *node) bool {
	for _, key := range []string{"above", "below", "averaged_over", "each", "in_any", "within", "by"} {
		if v := n.get(key); v != nil {
			d.problem(v, "only_between does not go with "+key, "write two limits")
			return false
		}
	}
	if l.must.kind == nil && l.must.typo {
		return false
	}
	if l.must.kind == nil || l.must.kind.is != network.Flow {
		d.problem(n, "only_between goes with flow only", `e.g. {flow: AIR, only_between: ["06:00", "22:00"]}`)
		return false
	}
	l.Must.Place, l.Must.Text = n.at, "0 m3/h"
	return true
}

var (
	averaged = []network.Subject{network.Level, network.Flow, network.Velocity, network.Pressure, network.CrestHead, network.Difference, network.Rising, network.Falling}
	counted  = []network.Subject{network.Passed, network.Backflow, network.Spilled}
)

// window checks the times over which a limit is judged.
func (d *decoder) window(l *limit, n *node) bool {
	volume, starts := slices.Contains(counted, l.Must.Subject), l.Must.Subject == network.Starts
	switch {
	case l.Since.Given && l.Until.Given && l.Since.At.Given && l.Until.At.Given && l.Until.At.S <= l.Since.At.S:
		d.problem(n.get("until"), "until is not after since: the limit would never be judged", "is it the other way round?")
	case l.Since.At.Given && d.plant.RunFor > 0 && l.Since.At.S >= d.plant.RunFor:
		d.problem(n.get("since"), "since is not before the end of the run: the limit would never be judged", "run_for is "+quantity.FormatDuration(d.plant.RunFor))
	case l.AveragedOver > 0 && !slices.Contains(averaged, l.Must.Subject):
		d.problem(n.get("averaged_over"), "averaged_over does not go with "+l.must.kind.key, "leave it out")
	case l.InAny > 0 && !volume:
		d.problem(n.get("in_any"), "in_any goes with volumes only", "e.g. {passed: AIR, below: 150 m3, in_any: 24 h}")
	case l.InAny > 0 && l.each != "":
		d.problem(n.get("in_any"), "limit has each and in_any: only one of them can hold", "leave one of them out")
	case l.each == "hour" && !starts:
		d.problem(n.get("each"), "each: hour goes with starts only", "in_any: 1 h is a volume in any hour")
	case l.each == "day" && !volume && !starts:
		d.problem(n.get("each"), "each goes with volumes and starts only", "leave it out, or e.g. {passed: AIR, below: 150 m3, each: day}")
	case l.each == "day" && d.plant.Start.IsZero():
		d.problem(n.get("each"), "each: a calendar day needs the clock time of the start", `add start: "2027-10-09 06:00" to the file, or write in_any: 24 h`)
	default:
		l.EachDay, l.EachHour = l.each == "day", l.each == "hour"
		return true
	}
	return false
}
