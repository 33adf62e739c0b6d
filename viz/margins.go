package viz

import (
	"html/template"
	"math"
	"sort"
	"strings"

	"headfall/network"
)

// marginRow is one limit with its bar: places along the bar are in per cent from its left end, nought in the middle.
type marginRow struct {
	Says, Worst, Margin, Band, When, Verdict, Class string
	Notes                                           string // why, and what kind of limit it is
	Bar, Whisker, Cut                               bool
	Left, Width, Low, Span                          string
	T                                               *float64
	share                                           float64
}

// css writes a place along a bar for a style attribute.
func css(x float64) string { return px(math.Min(math.Max(x, 0), 100)) + "%" }

// Style is the bar's place.
func (m marginRow) Style() template.CSS {
	return template.CSS("left:" + m.Left + ";width:" + m.Width)
}

// WhiskerStyle is the band's place.
func (m marginRow) WhiskerStyle() template.CSS {
	return template.CSS("left:" + m.Low + ";width:" + m.Span)
}

// margins lists the limits, the worst first, and how far the bars reach.
func margins(r *network.Result, u units, c clock) (rows []marginRow, reach string) {
	most := 0.0
	for _, l := range r.Limits {
		for _, s := range bandShares(l) {
			most = math.Max(most, math.Abs(s))
		}
	}
	full := 1.0
	for _, f := range []float64{0.05, 0.1, 0.25, 0.5} {
		if most <= f {
			full = f
			break
		}
	}
	at := func(s float64) float64 { return 50 + 50*math.Min(math.Max(s/full, -1), 1) }
	for _, l := range r.Limits {
		m := marginRow{Says: l.Says, Worst: worstText(l, u, c), Margin: marginText(l, u, c), Band: marginBand(l, u, c), T: l.WorstAt, share: share(l)}
		if m.Says == "" {
			m.Says = l.Subject + " " + l.Bound + " " + l.AsWritten
		}
		m.Verdict, m.Class = limitWords(l)
		notes := []string{}
		for _, n := range []struct {
			is   bool
			word string
		}{{l.Why != "", l.Why}, {l.Implicit, "always watched"}, {l.AtUpTo, "with holds at their longest"}} {
			if n.is {
				notes = append(notes, n.word)
			}
		}
		m.Notes = strings.Join(notes, "; ")
		if l.Verdict == network.Fails && l.FirstFail != nil {
			m.When, m.T = "fails "+c.At(*l.FirstFail, earlier), l.FirstFail
		} else if l.WorstAt != nil && l.Subject == "emptied" {
			m.When = c.At(*l.WorstAt, later)
		} else if l.WorstAt != nil {
			m.When = c.At(*l.WorstAt, near)
		}
		if s := m.share; finite(s) {
			m.Bar, m.Cut = true, math.Abs(s) > full
			a, b := at(math.Min(s, 0)), at(math.Max(s, 0))
			m.Left, m.Width = css(a), css(math.Max(b-a, 0.4))
			if l.MarginLow != nil && l.MarginHigh != nil && finite(*l.MarginLow) && finite(*l.MarginHigh) {
				ref := reference(l)
				lo, hi := at(*l.MarginLow/ref), at(*l.MarginHigh/ref)
				m.Whisker, m.Low, m.Span = true, css(math.Min(lo, hi)), css(math.Abs(hi-lo))
			}
		}
		rows = append(rows, m)
	}
	sort.SliceStable(rows, func(a, b int) bool {
		if ra, rb := gravity[rows[a].Class], gravity[rows[b].Class]; ra != rb {
			return ra < rb
		}
		return key(rows[a].share) < key(rows[b].share)
	})
	return rows, digits(full*100, 2) + "\u00a0%"
}

// gravity orders verdicts, the gravest first.
var gravity = map[string]int{"fail": 0, "close": 1, "hold": 2, "open": 3}

func key(s float64) float64 {
	if !finite(s) {
		return math.Inf(1)
	}
	return s
}

func bandShares(l *network.LimitResult) []float64 {
	var out []float64
	if !finite(share(l)) {
		return nil
	}
	out = append(out, math.Min(math.Abs(share(l)), 1))
	for _, m := range []*float64{l.MarginLow, l.MarginHigh} {
		if m != nil && finite(*m) {
			out = append(out, *m/reference(l))
		}
	}
	return out
}

func limitWords(l *network.LimitResult) (words, class string) {
	switch l.Verdict {
	case network.Holds:
		return "holds", "hold"
	case network.Fails:
		return "FAILS", "fail"
	case network.TooClose:
		return "too close", "close"
	}
	return "not judged", "open"
}
