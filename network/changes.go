package network

import "math"

// Changes are what one run does differently from the plan: what a hold lasts, what people or things do wrong. The zero value changes nothing.
type Changes struct {
	HoldsUpTo bool               // every hold lasts its up_to
	Waits     map[string]float64 // s that a hold lasts, by id
	Shift     map[string]float64 // s by which a step is late (early: negative), by id
	Missed    map[string]bool    // steps never done
	PartWay   map[string]float64 // share of the move after which a step's valve stops for good
	Upsets    []*Upset           // besides those of the file
	Respond   bool               // alarms with a response are answered
	Open      map[string]float64 // travel at the start, by valve
	Weaken    map[string]float64 // share of head or rate that a pump has left
	CheckLeak float64            // share of Kv that every check valve leaks; 0 as in the file
	Break     map[string]bool    // lines with air at their last high point throughout, or at their upper end
	BlockVent map[string]float64 // share of a vent that is blocked
}

// wait returns what a hold lasts.
func (c *Changes) wait(st *Step) float64 {
	if w, ok := c.Waits[st.ID]; ok {
		return w
	}
	if c.HoldsUpTo {
		return st.UpTo
	}
	return 0
}

// partWay returns the share of the move that a step makes, or NaN for all of it.
func (c *Changes) partWay(id string) float64 {
	if w, ok := c.PartWay[id]; ok {
		return w
	}
	return math.NaN()
}
