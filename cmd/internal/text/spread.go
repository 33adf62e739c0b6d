package text

import (
	"fmt"
	"io"
	"sort"
	"strings"

	"headfall/network"
	"headfall/network/study"
)

const influencesShown = 3

// Spread writes what many samples of the doubts come to.
func Spread(w io.Writer, r *study.SpreadResult, opt Options) error {
	s := newStudied(w, &r.Head, opt)
	words, v := Words(r.Verdict), r.Verdict
	if !r.Complete {
		words, v = "NOT FINISHED", network.NotJudged
	}
	found := "no sample was calculated"
	if r.Samples > 0 {
		found = fmt.Sprintf("some limit fails in %s of %s (%s)", percent(r.AnyFails.Share, Up), counted(r.Samples, "sample", "samples"), between(r.AnyFails))
	}
	s.raw(soft(paint(words, v, opt.Colour) + " - " + found + "\n"))
	if opt.Quiet {
		return s.err
	}
	s.plan(&r.Head)
	s.unfinished(r.Complete, r.Samples+r.NotDone, r.Asked.Samples, "samples", r.Trouble)
	if r.NotDone > 0 {
		s.put("Left out", "%s could not be calculated", counted(r.NotDone, "sample", "samples"))
	}
	if m := r.Measure; m != nil {
		s.put("Measure", "first %s (%s): it makes %s of what is uncertain about %s", m.What, keep(m.Doubt), percent(m.Share, Near), m.For)
	}
	if r.Stalls.Share > 0 {
		s.put("Not reached", "some step never comes in %s (%s)", percent(r.Stalls.Share, Up), between(r.Stalls))
	}
	s.spreadLimits(r)
	s.spreadTimes(r, "Empty by", "emptied_at_s")
	s.spreadTimes(r, "Moments", "milestone_at_s")
	s.spreadPeaks(r)
	s.put("Drawn", "%s by Latin hypercube, seed %d", counted(len(r.Doubts), "doubt", "doubts"), r.Asked.Seed)
	for _, name := range opt.Saved {
		s.put("Saved", "%s", keep(name))
	}
	s.put("Exit code", "%d", r.ExitCode)
	return s.err
}

func percent(share float64, dir Dir) string { return figures(share*100, 2, 0.1, dir) + hard + "%" }

// soft turns unbreakable blanks into plain ones, for lines that are not wrapped.
func soft(s string) string { return strings.ReplaceAll(s, hard, " ") }

func between(c study.Chance) string {
	return fmt.Sprintf("95 %% interval %s to %s", percent(c.Low, Down), percent(c.High, Up))
}

// spreadLimits writes the limits that fail in some samples or come near, the likeliest to fail first.
func (s *studied) spreadLimits(r *study.SpreadResult) {
	list := append([]*study.SpreadLimit(nil), r.Limits...)
	sort.SliceStable(list, func(i, j int) bool { return list[i].Fails.Share > list[j].Fails.Share })
	never := 0
	for _, l := range list {
		if l.Fails.Share == 0 {
			never++
			continue
		}
		said := fmt.Sprintf("%s fails in %s (%s)", l.Says, percent(l.Fails.Share, Up), between(l.Fails))
		for i, in := range l.Influences {
			if i == influencesShown {
				break
			}
			lead := "; "
			if i == 0 {
				lead = "; moved by "
			}
			said += fmt.Sprintf("%s%s (%s, %s)", lead, in.What, percent(in.Share, Near), way(in.Rank))
		}
		s.put(map[network.Verdict]string{network.Fails: "Fails", network.TooClose: "Too close"}[l.Verdict], "%s", said)
	}
	if never > 0 {
		_, high := study.Wilson(0, r.Samples, 0.95)
		s.put("Holds", "%s in every sample (fails: 95 %% interval 0 to %s)", counted(never, "limit holds", "limits hold"), percent(high, Up))
	}
}

// way tells which way a margin goes when the number is larger.
func way(rank float64) string {
	if rank < 0 {
		return "more is worse"
	}
	return "less is worse"
}

// spreadTimes writes the bands of moments.
func (s *studied) spreadTimes(r *study.SpreadResult, label, name string) {
	for _, tag := range tags(r.Bands[name]) {
		b := r.Bands[name][tag]
		mid, low, high := "never", "never", "never"
		if b.Mid != nil {
			mid = s.clock.When(*b.Mid, Up)
		}
		if b.Low != nil {
			low = s.clock.At(*b.Low, Down)
		}
		if b.High != nil {
			high = s.clock.At(*b.High, Up)
		}
		s.put(label, "%s%s (band %s to %s)%s", stamp(mid), tag, keep(low), keep(high), strongest(r.Influences[name+" "+tag]))
		label = ""
	}
}

func strongest(in []study.Influence) string {
	if len(in) == 0 {
		return ""
	}
	return fmt.Sprintf(", most by %s (%s)", in[0].What, percent(in[0].Share, Near))
}

// spreadPeaks writes the bands of peak levels.
func (s *studied) spreadPeaks(r *study.SpreadResult) {
	label := "Peaks"
	for _, tag := range tags(r.Bands["peak_level_m"]) {
		if b := r.Bands["peak_level_m"][tag]; b.Low != nil && b.Mid != nil && b.High != nil {
			s.put(label, "%s %s (band %s to %s)", tag, keep(s.units.LevelOf(*b.Mid, Up)), keep(s.units.LevelOf(*b.Low, Down)), keep(s.units.LevelOf(*b.High, Up)))
			label = ""
		}
	}
}

func tags(m map[string]network.Band) []string {
	var list []string
	for tag := range m {
		list = append(list, tag)
	}
	sort.Strings(list)
	return list
}
