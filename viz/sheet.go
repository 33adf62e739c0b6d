package viz

import (
	"fmt"
	"math"
	"regexp"
	"sort"
	"strconv"
	"strings"

	"headfall/network"
	"headfall/viz/export"
)

// sheetRow is one line of the sequence sheet: a step or a hold.
type sheetRow struct {
	N                             string
	Hold                          bool
	Clock, Elapsed, Who           string
	Verb, Rest                    string // "OPEN", "V-1 to 10 %"
	Action                        string
	Expect, Range, StopIf         string
	Where, Note, Longest, Pending string
	Together                      bool // at the same moment as the row before
	at                            *float64
	height                        float64 // mm on paper, about
}

// sheetPage is one A4 page.
type sheetPage struct {
	N, Of                    int
	First, Last              bool
	Rows                     []sheetRow
	LineUp                   []network.LineUpRow
	Handover                 []handoverView
	Title, Rev, Hash, Day    string
	File, Case, VerdictWords string
	Stop                     bool // the sequence is not to be run as written
	Cautions                 []string
}

// sheetRows lists steps and holds in the order in which they are done; what was never reached comes last.
func sheetRows(p Page, u units, c clock) []sheetRow {
	r := p.Result
	var rows []sheetRow
	holds := map[string]bool{}
	for _, h := range r.Holds {
		holds[h.ID] = true
		row := sheetRow{Hold: true, at: h.At, Who: h.Who, Verb: "HOLD", Rest: h.Says}
		if rest, found := strings.CutPrefix(h.Says, "HOLD"); found {
			row.Rest = strings.TrimLeft(rest, ": ")
		}
		row.Action = row.Rest
		switch {
		case h.LongestWait != nil:
			row.Longest = "longest wait " + c.Span(*h.LongestWait, earlier)
			if h.At != nil && c.Known() {
				row.Longest += ", until " + c.At(*h.At+*h.LongestWait, earlier)
			}
		case h.UpTo > 0:
			row.Longest = "planned for up to " + c.Span(h.UpTo, earlier)
		}
		rows = append(rows, row)
	}
	for _, s := range r.Steps {
		if holds[s.ID] {
			continue
		}
		rows = append(rows, stepRow(p, s, u, c))
	}
	sort.SliceStable(rows, func(a, b int) bool { return order(rows[a].at) < order(rows[b].at) })
	n := 0
	for i := range rows {
		row := &rows[i]
		row.Clock, row.Elapsed = c.Opt(row.at, earlier), ""
		if row.at != nil && c.Known() {
			row.Elapsed = c.Span(*row.at, earlier)
		}
		if row.at == nil {
			row.Clock, row.Pending = "if reached", "not reached in this run"
		}
		if !row.Hold {
			n++
			row.N = strconv.Itoa(n)
		}
		row.Together = i > 0 && !row.Hold && !rows[i-1].Hold && row.at != nil && rows[i-1].at != nil && *row.at == *rows[i-1].at
		row.height = rowHeight(*row)
	}
	return rows
}

func order(at *float64) float64 {
	if at == nil || !finite(*at) {
		return math.Inf(1)
	}
	return *at
}

// lastUnit is a number with its unit at the end of a text; they stay on one line.
var lastUnit = regexp.MustCompile(`(\d) (\S+)$`)

func stepRow(p Page, s *network.StepResult, u units, c clock) sheetRow {
	row := sheetRow{at: s.Done, Who: s.Who, Action: s.Says, StopIf: lastUnit.ReplaceAllString(stopWords(s.StopIf), "$1\u00a0$2"), Where: s.Where, Note: s.Note}
	row.Verb, row.Rest, _ = strings.Cut(s.Says, " ")
	if row.at == nil {
		row.at = s.Due
		if s.Due != nil {
			row.Pending = "not reached in this run"
		}
	}
	if s.Turns != nil && finite(*s.Turns) {
		row.Where = strings.TrimPrefix(row.Where+", "+digits(*s.Turns, 2)+" turns", ", ")
	}
	if e := expected(p, s); e != nil {
		mid, low, high := reading(p.Plant, e, u)
		row.Expect = e.Read + " " + mid + " at\u00a0" + strings.ReplaceAll(c.At(e.At, earlier), " ", "\u00a0")
		if low != high {
			row.Range = low + " to " + high
		}
	}
	return row
}

// reading writes an expected level as the gauge of the vessel shows it.
func reading(plant *network.Plant, e *network.Expect, u units) (mid, low, high string) {
	for _, v := range plant.Vessels {
		if v.Tag != e.Read && (v.Gauge == nil || v.Gauge.Tag != e.Read) {
			continue
		}
		if g := v.Gauge; g != nil && g.Percent && g.Span > 0 {
			show := func(h float64) string { return places(100*(h-g.Zero)/g.Span, 0) }
			return show(e.Mid) + "\u00a0%", show(e.Low) + "\u00a0%", show(e.High) + "\u00a0%"
		} else if g != nil {
			return u.Level.With(e.Mid - g.Zero), u.Level.With(e.Low - g.Zero), u.Level.With(e.High - g.Zero)
		}
	}
	return u.Level.With(e.Mid), u.Level.With(e.Low), u.Level.With(e.High)
}

// rowHeight estimates what a row takes on paper, mm, from the widths of its columns in characters; rather too much than too little.
func rowHeight(r sheetRow) float64 {
	lines := func(s string, width int) float64 { return float64(len(wrap(s, width))) }
	const large, little = 4.2, 4.0
	h := lines(r.Action, 25)*large + (lines(r.Where, 30)+lines(r.Note, 30)+lines(r.Pending, 30)+lines(togetherWords(r.Together), 30))*little
	h = math.Max(h, lines(r.Expect, 14)*large+lines(r.Range, 15)*little)
	h = math.Max(h, math.Max(lines(r.StopIf, 12), lines(r.Who, 8))*large)
	if r.Hold {
		h = lines(r.Rest, 55)*large + lines(r.Longest, 60)*little
	}
	return math.Max(h+3.4, 11.4)
}

const (
	pageHigh = 270.0 // mm of an A4 page that may be filled
	headHigh = 30.0  // mm of the heading, and of the head of the table
)

// sheetPages lays the sheet out on A4 pages.
func sheetPages(p Page, rows []sheetRow, c clock, handovers []handoverView) []*sheetPage {
	base := sheetPage{Title: p.Plant.Title, Rev: p.Plant.Revision, Hash: p.Plant.SHA256, File: p.Plant.File, Case: p.Plant.Case, Day: c.Day(0),
		VerdictWords: newVerdictWord(p.Result), Stop: p.Result.Verdict != network.Run}
	if base.Rev == "" {
		base.Rev = "not stated"
	}
	first := base
	first.LineUp = p.Result.LineUp
	pages := []*sheetPage{&first}
	used := headHigh
	for i := 0; i < len(first.LineUp); i += 3 {
		most := 1
		for _, l := range first.LineUp[i:min(i+3, len(first.LineUp))] {
			most = max(most, len(wrap(l.Valve+" "+l.Position+" "+l.Where+" "+opensWords(l.Opens), 27)))
		}
		used += 4.4*float64(most) + 1.2
	}
	if len(first.LineUp) > 0 {
		used += 16
	}
	turn := func(need float64) {
		if used+need > pageHigh && used > headHigh {
			next := base
			pages = append(pages, &next)
			used = headHigh
		}
		used += need
	}
	for _, row := range rows {
		turn(row.height)
		last := pages[len(pages)-1]
		last.Rows = append(last.Rows, row)
	}
	for _, h := range handovers {
		turn(32 + 4.2*float64(len(wrap(strings.Join(h.Levels, "; "), 80))+len(wrap(strings.Join(h.Valves, "; "), 80))))
		last := pages[len(pages)-1]
		last.Handover = append(last.Handover, h)
	}
	words := cautions(p.Plant, p.Result)
	need := 24.0
	for _, c := range words {
		need += 3.8 * float64(len(wrap(c, 100)))
	}
	turn(need)
	pages[len(pages)-1].Cautions = words
	for i, s := range pages {
		s.N, s.Of, s.First, s.Last = i+1, len(pages), i == 0, i == len(pages)-1
	}
	return pages
}

func newVerdictWord(r *network.Result) string {
	if w, ok := verdictWords[r.Verdict]; ok {
		return w[0]
	}
	return verdictWords[network.NotJudged][0]
}

// handoverView is what is told at a change of shift.
type handoverView struct {
	When, NextStep, NextLimit string
	Levels, Valves            []string
}

func handovers(p Page, u units, c clock) []handoverView {
	var out []handoverView
	for _, h := range p.Result.Handover {
		v := handoverView{When: c.Both(h.At, earlier), NextStep: h.NextStep, NextLimit: h.NextLimit}
		for _, x := range p.Plant.Vessels {
			if level, ok := h.Levels[x.Tag]; ok {
				s := x.Tag + " " + u.Level.With(level)
				if rate, ok := h.Rates[x.Tag]; ok && finite(rate) {
					s += ", " + signed(u.Rate, rate)
				}
				v.Levels = append(v.Levels, s)
			}
		}
		for _, tag := range export.Movers(p.Plant) {
			if x, ok := h.Valves[tag]; ok {
				v.Valves = append(v.Valves, tag+" "+position(x))
			}
			if x, ok := h.Pumps[tag]; ok {
				v.Valves = append(v.Valves, tag+" "+x)
			}
		}
		out = append(out, v)
	}
	return out
}

func signed(u unit, x float64) string {
	if math.Abs(x*u.K) < 0.05 {
		return "steady"
	}
	if x > 0 {
		return "rising " + u.With(x)
	}
	return "falling " + u.With(-x)
}

func position(x float64) string {
	switch {
	case x <= 0:
		return "shut"
	case x >= 1:
		return "open"
	}
	return fmt.Sprintf("%s\u00a0%%", places(100*x, 0))
}
