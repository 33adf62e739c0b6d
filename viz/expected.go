package viz

import (
	"math"
	"sort"
	"strings"

	"headfall/elements"
	"headfall/network"
)

const (
	readAfter = 900.0 // s after a step at which its effect is read where the file asks for no reading
	readSoon  = 300.0 // s; sooner than this nobody is at the gauge
	readMove  = 0.03  // m; a smaller change cannot be told from the gauge's own
)

// expected is the reading that shows that a step had its effect: the one the file asks for; else, of a valve that moves, the level at an end of its
// line that changes most within a quarter of an hour, or until the next step. nil where no level changes enough to be seen.
func expected(p Page, s *network.StepResult) *network.Expect {
	if s.Expect != nil {
		return s.Expect
	}
	line := movedLine(p.Plant, s)
	series := p.Result.Series
	if line == nil || series == nil || !finite(*s.Done) {
		return nil
	}
	at := math.Min(readUntil(p.Result, *s.Done), p.Result.End)
	var e *network.Expect
	most := readMove
	for _, tag := range []string{line.From, line.To} {
		levels, ok := series.Level[tag]
		if !ok {
			continue
		}
		level := valueAt(series.Time, levels, at)
		if change := math.Abs(level - valueAt(series.Time, levels, *s.Done)); finite(level) && change >= most {
			most, e = change, &network.Expect{Read: tag, At: at, Low: level, Mid: level, High: level}
		}
	}
	if b := p.Result.SeriesBand; e != nil && b != nil && bandOf(p.Result, e.Read) != nil {
		l := b.Level[e.Read]
		e.Low, e.High = math.Min(e.Mid, valueAt(b.Time, l.Low, at)), math.Max(e.Mid, valueAt(b.Time, l.High, at))
	}
	return e
}

// movedLine is the line of the valve that a step moves; nil when it was not reached or moves something else.
func movedLine(plant *network.Plant, s *network.StepResult) *network.Line {
	target := ""
	for _, x := range plant.Steps {
		if x.ID == s.ID && x.Action == network.MoveValve {
			target = x.Target
		}
	}
	if target == "" || s.Done == nil {
		return nil
	}
	for _, l := range plant.Lines {
		for _, f := range l.Parts {
			if a, ok := f.Part.(elements.Actuated); ok && a.Actuator() != nil && a.Actuator().Tag == target {
				return l
			}
		}
	}
	return nil
}

// readUntil is when a step is read, s, on a whole minute.
func readUntil(r *network.Result, done float64) float64 {
	at := done + readAfter
	times := []float64{}
	for _, o := range r.Steps {
		if o.Done != nil && *o.Done >= done+readSoon {
			times = append(times, *o.Done)
		}
	}
	sort.Float64s(times)
	if len(times) > 0 {
		at = math.Min(at, times[0])
	}
	return 60 * math.Floor(at/60+1e-9)
}

// stopWords words a condition as people say it: "INT-10 rises faster than 20 mm/min".
func stopWords(says string) string {
	for _, w := range []struct{ noun, side, words string }{
		{"level of ", " above ", " over "}, {"level of ", " below ", " under "},
		{"rising of ", " above ", " rises faster than "}, {"rising of ", " below ", " rises slower than "},
		{"falling of ", " above ", " falls faster than "}, {"falling of ", " below ", " falls slower than "},
	} {
		rest, ok := strings.CutPrefix(says, w.noun)
		if of, bound, found := strings.Cut(rest, w.side); ok && found {
			return of + w.words + bound
		}
	}
	return says
}
