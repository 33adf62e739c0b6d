package viz

import (
	"fmt"
	"math"
	"strings"

	"headfall/network"
)

// fact is one line of the verdict strip.
type fact struct {
	Label, Value string
	Bad          bool
	T            *float64 // the moment it is about
}

// verdictView is the answer in words.
type verdictView struct {
	Word, Class, Count, Allowance string
	Facts                         []fact
}

var verdictWords = map[network.Verdict][2]string{
	network.Run:       {"RUN", "run"},
	network.DoNotRun:  {"DO NOT RUN", "stop"},
	network.TooClose:  {"TOO CLOSE TO CALL", "close"},
	network.NotJudged: {"NOT JUDGED", "open"},
}

func newVerdict(plant *network.Plant, r *network.Result, u units, c clock) verdictView {
	w, ok := verdictWords[r.Verdict]
	if !ok {
		w = verdictWords[network.NotJudged]
	}
	v := verdictView{Word: w[0], Class: w[1], Count: limitCount(r), Allowance: allowance(r)}
	if !r.Complete {
		v.Facts = append(v.Facts, fact{Label: "Incomplete", Value: stopped(r, c), Bad: true})
	}
	if l := firstFail(r); l != nil {
		t := *l.FirstFail
		v.Facts = append(v.Facts, fact{"First fail", c.At(t, earlier) + "  " + broken(l) + worst(l, u, c), true, &t})
	} else {
		v.Facts = append(v.Facts, fact{Label: "First fail", Value: "none"})
	}
	if l := r.Tightest(); l != nil && finite(*l.Margin) {
		text := l.Says + ": " + inHand(l, u, c)
		if b := marginBand(l, u, c); b != "" {
			text += ", band " + b
		}
		v.Facts = append(v.Facts, fact{"Smallest margin", text, *l.Margin < 0, l.WorstAt})
	}
	v.Facts = append(v.Facts, lastEmpty(plant, r, c))
	for _, s := range r.Steps {
		if s.Done == nil {
			v.Facts = append(v.Facts, fact{Label: "Not reached", Value: s.ID + "  " + s.Says, Bad: true})
		}
	}
	return v
}

func limitCount(r *network.Result) string {
	n := map[network.Verdict]int{}
	for _, l := range r.Limits {
		n[l.Verdict]++
	}
	all := len(r.Limits)
	if all == 0 {
		return "no limit was stated"
	}
	s := fmt.Sprintf("%d of %d limits hold", n[network.Holds], all)
	if k := n[network.Fails]; k > 0 {
		s = fmt.Sprintf("%d of %d limits fail", k, all)
	}
	if k := n[network.TooClose]; k > 0 {
		s += fmt.Sprintf(", %d too close to call", k)
	}
	if k := n[network.NotJudged]; k > 0 {
		s += fmt.Sprintf(", %d not judged", k)
	}
	return s
}

func allowance(r *network.Result) string {
	switch {
	case r.Allowance.Doubts == "none" || r.Allowance.Samples == 0:
		return "without allowance for doubts"
	case r.Allowance.Doubts == "stated":
		return fmt.Sprintf("with the doubts that the file states, %d samples", r.Allowance.Samples)
	}
	return fmt.Sprintf("with stated and assumed doubts, %d samples", r.Allowance.Samples)
}

func stopped(r *network.Result, c clock) string {
	s := map[string]string{"interrupted": "interrupted", "failed": "the calculation could not finish"}[r.Stopped]
	if s == "" {
		s = "ended early"
	}
	s += " at " + c.Both(r.End, earlier)
	if r.Trouble != "" {
		s += ": " + r.Trouble
	}
	return s
}

func firstFail(r *network.Result) *network.LimitResult {
	var first *network.LimitResult
	for _, l := range r.Limits {
		if l.Verdict == network.Fails && l.FirstFail != nil && finite(*l.FirstFail) && (first == nil || *l.FirstFail < *first.FirstFail) {
			first = l
		}
	}
	return first
}

// share is a margin as a share of its limit; of the greatest reading where the limit is nought.
func share(l *network.LimitResult) float64 {
	if l.Margin == nil || !finite(*l.Margin) {
		return math.NaN()
	}
	return *l.Margin / reference(l)
}

func reference(l *network.LimitResult) float64 {
	ref := 0.0
	if l.BoundSI != nil && finite(*l.BoundSI) {
		ref = math.Abs(*l.BoundSI)
	}
	if ref == 0 && l.Worst != nil && finite(*l.Worst) {
		ref = math.Abs(*l.Worst)
	}
	if ref == 0 {
		ref = math.Max(math.Abs(*l.Margin), 1e-300)
	}
	return ref
}

// broken writes how a limit fails: "level of PIT-4 goes over 2.4 m".
func broken(l *network.LimitResult) string {
	if l.Subject == "emptied" {
		return strings.Replace(l.Says, " emptied ", " is not empty ", 1)
	}
	for _, w := range [][2]string{{" below ", " goes over "}, {" above ", " goes under "}} {
		if s := strings.Replace(l.Says, w[0], w[1], 1); s != l.Says {
			return s
		}
	}
	return l.Says + " does not hold"
}

// inHand writes a margin in words.
func inHand(l *network.LimitResult, u units, c clock) string {
	if *l.Margin < 0 {
		short := -*l.Margin
		return strings.TrimPrefix(amount(&short, l, u, c, later), "+") + " short"
	}
	return amount(l.Margin, l, u, c, earlier) + " in hand"
}

// amount writes a number of a limit, in display units; seconds as a duration.
func amount(si *float64, l *network.LimitResult, u units, c clock, to side) string {
	if si == nil || !finite(*si) {
		return none
	}
	if l.UnitSI == "s" {
		return c.Span(*si, to)
	}
	x := *si
	if l.BoundSI != nil && *l.BoundSI != 0 {
		if b := *l.BoundSI; math.Abs(x) < 1e-6*math.Abs(b) {
			x = 0 // what rounding left of nothing
		} else if math.Abs(x-b) < 1e-6*math.Abs(b) && l.Verdict == network.Holds {
			x = b // the whole of the limit in hand
		}
	}
	k, _ := u.bySI(l.UnitSI, l.Subject)
	return k.Toward(x, to)
}

func marginText(l *network.LimitResult, u units, c clock) string {
	t := amount(l.Margin, l, u, c, earlier)
	if l.Margin != nil && *l.Margin >= 0 && t != none {
		t = "+" + t
	}
	return t
}

func marginBand(l *network.LimitResult, u units, c clock) string {
	if l.MarginLow == nil || l.MarginHigh == nil {
		return ""
	}
	low, high := amount(l.MarginLow, l, u, c, earlier), amount(l.MarginHigh, l, u, c, earlier)
	if low == high {
		return ""
	}
	return low + " to " + high
}

// worstText writes the worst reading, rounded to the side of the limit.
func worstText(l *network.LimitResult, u units, c clock) string {
	if l.Bound == "above" {
		return amount(l.Worst, l, u, c, earlier)
	}
	return amount(l.Worst, l, u, c, later)
}

func worst(l *network.LimitResult, u units, c clock) string {
	if l.Subject == "emptied" || l.Worst == nil || l.WorstAt == nil || !finite(*l.Worst) {
		return ""
	}
	return "; comes to " + worstText(l, u, c) + " at " + c.At(*l.WorstAt, near)
}

func lastEmpty(plant *network.Plant, r *network.Result, c clock) fact {
	last, at, empties := "", math.Inf(-1), 0
	for _, v := range plant.Vessels {
		if q := r.Vessels[v.Tag]; q != nil && q.EmptiedAt != nil && finite(*q.EmptiedAt) {
			if empties++; *q.EmptiedAt > at {
				last, at = v.Tag, *q.EmptiedAt
			}
		}
	}
	if last == "" {
		return fact{Label: "Last vessel empty", Value: "none empties"}
	}
	s := c.At(at, later) + "  " + last
	if b, ok := r.Bands["emptied_at_s"][last]; ok && wide(b) {
		s += ", band " + c.At(*b.Low, earlier) + " to " + c.At(*b.High, later)
	}
	if n := len(plant.Vessels) - empties; n > 0 {
		verb := "do"
		if n == 1 {
			verb = "does"
		}
		s += fmt.Sprintf("; %d of %d vessels %s not empty", n, len(plant.Vessels), verb)
	}
	return fact{"Last vessel empty", s, false, &at}
}
